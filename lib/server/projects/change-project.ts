import { db } from '@/db/knex';
import type { ChangeProject } from '@/lib/api/projects';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound } from '../problem';
import { unlessTaken } from '../unless-taken';
import { writeMembers } from './write-members';
import { writeTolerances } from './write-tolerances';

/** Changes what a project is called, who is on it or its tolerance bands; what is left out stays. */
export async function changeProject(access: Access, projectId: string, { members, tolerances, ...names }: ChangeProject): Promise<void> {
  const { organizationId } = access.person;
  await unlessTaken(
    { code: 'name-taken', message: 'There is a project of this name already.', path: 'name' },
    db().transaction(async (trx) => {
      const project = await trx('projects').where({ organization_id: organizationId, id: projectId }).forUpdate().first('name');
      if (!project) throw notFound();
      if (Object.keys(names).length) await trx('projects').where({ organization_id: organizationId, id: projectId }).update(names);
      if (members) await writeMembers(trx, organizationId, projectId, members);
      if (tolerances) await writeTolerances(trx, organizationId, projectId, tolerances);
      const changed = [Object.keys(names).length && 'the name', members && 'the members', tolerances && 'the tolerance bands'].filter(
        Boolean,
      );
      if (changed.length === 0) return;
      await recordActivity(trx, access, {
        verb: `changed ${changed.join(' and ')} of`,
        subject: names.name ?? project.name,
        detail: { ...names, members, tolerances },
      });
    }),
  );
}
