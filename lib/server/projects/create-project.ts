import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { CreateProject } from '@/lib/api/projects';
import { defaultTolerances } from '@/lib/api/tolerances';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { unlessTaken } from '../unless-taken';
import { writeMembers } from './write-members';
import { writeTolerances } from './write-tolerances';

/** Makes a project with its members and the usual tolerance bands; whoever makes it is its designer. */
export async function createProject(access: Access, input: CreateProject): Promise<{ id: string }> {
  const { organizationId, id: personId } = access.person;
  const id = uuidv7();
  await unlessTaken(
    { code: 'name-taken', message: 'There is a project of this name already.', path: 'name' },
    db().transaction(async (trx) => {
      await trx('projects').insert({
        organization_id: organizationId,
        id,
        name: input.name,
        client: input.client,
        building: input.building,
        created_by: personId,
      });
      await writeMembers(trx, organizationId, id, [...input.members, { personId, role: 'designer' }]);
      await writeTolerances(trx, organizationId, id, defaultTolerances);
      await recordActivity(trx, access, { verb: 'made the project', subject: input.name, projectId: id });
    }),
  );
  return { id };
}
