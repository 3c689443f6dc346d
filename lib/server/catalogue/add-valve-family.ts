import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import type { ValveFamilyInput, ValveSize } from '@/lib/api/catalogue';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { unlessNameTaken } from './versioned-entry';

export async function addValveFamily(access: Access, { name, source, sizes }: ValveFamilyInput): Promise<{ id: string }> {
  const { organizationId, id: personId } = access.person;
  const id = uuidv7();
  await unlessNameTaken(
    name,
    db().transaction(async (trx) => {
      await trx('valve_families').insert({ organization_id: organizationId, id, name, source, changed_by: personId });
      await insertSizes(trx, organizationId, id, sizes);
      await recordActivity(trx, access, { verb: 'added', subject: `the valve family ${name} to the catalogue` });
    }),
  );
  return { id };
}

export async function insertSizes(trx: Knex.Transaction, organizationId: string, familyId: string, sizes: ValveSize[]): Promise<void> {
  await trx('valve_sizes').insert(
    sizes.map(({ nominal, stepTurns, points }, position) => ({
      organization_id: organizationId,
      family_id: familyId,
      nominal,
      position,
      step_turns: stepTurns,
      points: JSON.stringify(points),
    })),
  );
}
