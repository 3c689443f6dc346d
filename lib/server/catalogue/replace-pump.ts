import { db } from '@/db/knex';
import type { PumpInput } from '@/lib/api/catalogue';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { readPumps } from './read-catalogue';
import { holdEntry, unlessNameTaken } from './versioned-entry';

/** Makes the next version of a pump. What stood there goes into the record of activity; drawings keep the copies they took. */
export async function replacePump(
  access: Access,
  pumpId: string,
  { name, source, points, version }: PumpInput & { version: number },
): Promise<{ id: string; version: number }> {
  const { organizationId, id: personId } = access.person;
  const next = version + 1;
  await unlessNameTaken(
    name,
    db().transaction(async (trx) => {
      await holdEntry(trx, 'catalogue_pumps', { organizationId, id: pumpId, version });
      const [before] = await readPumps(trx, organizationId, pumpId);
      await trx('catalogue_pumps')
        .where({ organization_id: organizationId, id: pumpId })
        .update({ name, source, version: next, points: JSON.stringify(points), changed_by: personId, changed_at: trx.fn.now() });
      const subject = `the pump ${name} in the catalogue, version ${next}`;
      await recordActivity(trx, access, { verb: 'replaced', subject, detail: { before } });
    }),
  );
  return { id: pumpId, version: next };
}
