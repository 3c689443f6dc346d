import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { PumpInput } from '@/lib/api/catalogue';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { unlessNameTaken } from './versioned-entry';

export async function addPump(access: Access, { name, source, points }: PumpInput): Promise<{ id: string }> {
  const { organizationId, id: personId } = access.person;
  const id = uuidv7();
  await unlessNameTaken(
    name,
    db().transaction(async (trx) => {
      await trx('catalogue_pumps').insert({
        organization_id: organizationId,
        id,
        name,
        source,
        points: JSON.stringify(points),
        changed_by: personId,
      });
      await recordActivity(trx, access, { verb: 'added', subject: `the pump ${name} to the catalogue` });
    }),
  );
  return { id };
}
