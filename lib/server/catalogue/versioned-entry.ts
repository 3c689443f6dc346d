import type { Knex } from 'knex';
import { validate as isUuid } from 'uuid';
import { notFound, Problem, type ProblemCode } from '../problem';
import { unlessTaken } from '../unless-taken';

export type EntryTable = 'valve_families' | 'catalogue_pumps';

interface Seen {
  organizationId: string;
  id: string;
  /** The version that the person looked at. */
  version: number;
}

/** Holds an entry's row for a change of it; another organisation's is not there, and one that has changed since it was looked at is not overwritten. */
export async function holdEntry(trx: Knex.Transaction, table: EntryTable, { organizationId, id, version }: Seen): Promise<void> {
  if (!isUuid(id)) throw notFound();
  const row: { name: string; version: number } | undefined = await trx(table)
    .where({ organization_id: organizationId, id })
    .forUpdate()
    .first('name', 'version');
  if (!row) throw notFound();
  if (row.version === version) return;
  throw new Problem('catalogue-changed', `${row.name} has been changed since you opened it. Open it again; nothing was changed.`);
}

export const unlessNameTaken = <Result>(name: string, work: Promise<Result>): Promise<Result> => {
  const code: ProblemCode = 'name-taken';
  return unlessTaken(
    { code, message: `The catalogue has a “${name}” already. Choose another name, or change that one.`, path: 'name' },
    work,
  );
};
