import { db } from '@/db/knex';
import type { ValveSize } from '@/lib/network/generate/balancing-valve-choice';
import { genericValves } from '@/lib/network/valve-families';
import { readValveFamilies } from '../catalogue/read-catalogue';
import { notFound } from '../problem';

/** The sizes that a loop's balancing valves are chosen from, rising in Kv: of a family of the catalogue, or the generic ones. */
export async function valveSizes(organizationId: string, familyId: string | null): Promise<readonly ValveSize[]> {
  if (familyId === null) return genericValves.map(({ name, kvTable }) => ({ name, kvTable }));
  const [family] = await readValveFamilies(db(), organizationId, familyId);
  if (!family) throw notFound();
  return family.sizes
    .map(({ nominal, points, stepTurns }) => ({ name: `${family.name} ${nominal}`, kvTable: points, stepTurns }))
    .sort((a, b) => a.kvTable.at(-1)!.kv - b.kvTable.at(-1)!.kv);
}
