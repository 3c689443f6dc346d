import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { CreateLoop } from '@/lib/api/loops';
import { emptyDrawing } from '@/lib/network/drawing';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { unlessTaken } from '../unless-taken';

/** Makes a loop with an empty drawing as the first version of its draft. */
export async function createLoop(access: Access, projectId: string, { name, service }: CreateLoop): Promise<{ id: string }> {
  const { organizationId, id: personId } = access.person;
  const id = uuidv7();
  await unlessTaken(
    { code: 'name-taken', message: 'There is a loop of this name in the project already.', path: 'name' },
    db().transaction(async (trx) => {
      await trx('loops').insert({ organization_id: organizationId, id, project_id: projectId, name, service, created_by: personId });
      await trx('drafts').insert({
        organization_id: organizationId,
        loop_id: id,
        version: 1,
        drawing: JSON.stringify(emptyDrawing(service)),
        saved_by: personId,
      });
      await recordActivity(trx, access, { verb: 'made the loop', subject: name, loopId: id });
    }),
  );
  return { id };
}
