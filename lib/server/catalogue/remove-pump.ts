import { db } from '@/db/knex';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { readPumps } from './read-catalogue';
import { holdEntry } from './versioned-entry';

/** Takes a pump out of the catalogue. What it was stays in the record of activity; drawings keep the copies they took. */
export async function removePump(access: Access, pumpId: string, version: number): Promise<void> {
  const { organizationId } = access.person;
  await db().transaction(async (trx) => {
    await holdEntry(trx, 'catalogue_pumps', { organizationId, id: pumpId, version });
    const [before] = await readPumps(trx, organizationId, pumpId);
    await trx('catalogue_pumps').where({ organization_id: organizationId, id: pumpId }).delete();
    await recordActivity(trx, access, { verb: 'removed', subject: `the pump ${before!.name} from the catalogue`, detail: { before } });
  });
}
