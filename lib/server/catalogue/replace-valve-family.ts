import { db } from '@/db/knex';
import type { ValveFamilyInput } from '@/lib/api/catalogue';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { insertSizes } from './add-valve-family';
import { readValveFamilies } from './read-catalogue';
import { holdEntry, unlessNameTaken } from './versioned-entry';

/** Makes the next version of a family. What stood there goes into the record of activity; drawings keep the copies they took. */
export async function replaceValveFamily(
  access: Access,
  familyId: string,
  { name, source, sizes, version }: ValveFamilyInput & { version: number },
): Promise<{ id: string; version: number }> {
  const { organizationId, id: personId } = access.person;
  const next = version + 1;
  await unlessNameTaken(
    name,
    db().transaction(async (trx) => {
      await holdEntry(trx, 'valve_families', { organizationId, id: familyId, version });
      const [before] = await readValveFamilies(trx, organizationId, familyId);
      await trx('valve_families')
        .where({ organization_id: organizationId, id: familyId })
        .update({ name, source, version: next, changed_by: personId, changed_at: trx.fn.now() });
      await trx('valve_sizes').where({ organization_id: organizationId, family_id: familyId }).delete();
      await insertSizes(trx, organizationId, familyId, sizes);
      const subject = `the valve family ${name} in the catalogue, version ${next}`;
      await recordActivity(trx, access, { verb: 'replaced', subject, detail: { before } });
    }),
  );
  return { id: familyId, version: next };
}
