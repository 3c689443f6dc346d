import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { CatalogueBody, CataloguePump, ValveFamily, ValveSize } from '@/lib/api/catalogue';

type Table = 'valve_families' | 'catalogue_pumps';
type Described<Row extends { changedAt: string }> = Omit<Row, 'changedAt' | 'sizes' | 'points'> & { changedAt: Date };

/** The organisation's own valve families and pumps, by name. */
export async function readCatalogue(organizationId: string, connection: Knex = db()): Promise<CatalogueBody> {
  const [valveFamilies, pumps] = await Promise.all([readValveFamilies(connection, organizationId), readPumps(connection, organizationId)]);
  return { valveFamilies, pumps };
}

/** All families, or the one that is named. */
export async function readValveFamilies(connection: Knex, organizationId: string, id?: string): Promise<ValveFamily[]> {
  const families: Described<ValveFamily>[] = await described(connection, 'valve_families', organizationId, id);
  const sizes: (ValveSize & { familyId: string })[] = await connection('valve_sizes')
    .where({ organization_id: organizationId, ...(id === undefined ? {} : { family_id: id }) })
    .orderBy('position')
    .select({ familyId: 'family_id', nominal: 'nominal', stepTurns: 'step_turns', points: 'points' });
  const sizesOf = new Map<string, ValveSize[]>(families.map((family) => [family.id, []]));
  for (const { familyId, ...size } of sizes) sizesOf.get(familyId)?.push(size);
  return families.map((family) => ({ ...stamped(family), sizes: sizesOf.get(family.id)! }));
}

/** All pumps, or the one that is named. */
export async function readPumps(connection: Knex, organizationId: string, id?: string): Promise<CataloguePump[]> {
  const pumps: (Described<CataloguePump> & Pick<CataloguePump, 'points'>)[] = await described(
    connection,
    'catalogue_pumps',
    organizationId,
    id,
  ).select({ points: 'entry.points' });
  return pumps.map(stamped);
}

const stamped = <Row extends { changedAt: Date }>(row: Row) => ({ ...row, changedAt: row.changedAt.toISOString() });

const described = (connection: Knex, table: Table, organizationId: string, id?: string) =>
  connection({ entry: table })
    .join('people', (join) => join.on('people.organization_id', 'entry.organization_id').on('people.id', 'entry.changed_by'))
    .where({ 'entry.organization_id': organizationId, ...(id === undefined ? {} : { 'entry.id': id }) })
    .orderByRaw('lower(entry.name)')
    .select({
      id: 'entry.id',
      name: 'entry.name',
      source: 'entry.source',
      version: 'entry.version',
      changedBy: 'people.name',
      changedAt: 'entry.changed_at',
    });
