import { db } from '@/db/knex';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { readValveFamilies } from './read-catalogue';
import { holdEntry } from './versioned-entry';

/** Takes a family out of the catalogue. What it was stays in the record of activity; drawings keep the copies they took. */
export async function removeValveFamily(access: Access, familyId: string, version: number): Promise<void> {
  const { organizationId } = access.person;
  await db().transaction(async (trx) => {
    await holdEntry(trx, 'valve_families', { organizationId, id: familyId, version });
    const [before] = await readValveFamilies(trx, organizationId, familyId);
    await trx('valve_families').where({ organization_id: organizationId, id: familyId }).delete();
    await recordActivity(trx, access, {
      verb: 'removed',
      subject: `the valve family ${before!.name} from the catalogue`,
      detail: { before },
    });
  });
}
