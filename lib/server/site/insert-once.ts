import { isDeepStrictEqual } from 'node:util';
import type { Knex } from 'knex';
import type { Access } from '../auth/authorize';
import { Problem } from '../problem';
import { refuseFuture } from '../commissioning/refuse-future';

interface Entered {
  id: string;
  enteredAt: string;
  clockOffsetMs: number | null;
}

/**
 * Stores what was entered on a device once, however often it is sent: an entry of the same id must be the same entry by the same person,
 * or it is refused and nothing changes. True where it is new. `columns` are the entry's own; `given` those that the server adds once.
 */
export async function insertOnce(
  trx: Knex.Transaction,
  { person }: Access,
  table: string,
  loopId: string,
  { id, enteredAt, clockOffsetMs }: Entered,
  columns: Record<string, unknown>,
  given: Record<string, unknown> = {},
): Promise<boolean> {
  const key = { organization_id: person.organizationId, id };
  const own = { loop_id: loopId, entered_by: person.id, ...columns };
  const isStored = async () => {
    const row = await trx(table)
      .where(key)
      .first([...Object.keys(own), 'entered_at']);
    if (!row) return false;
    const { entered_at: at, ...rest } = row;
    if (at.getTime() !== Date.parse(enteredAt) || !isDeepStrictEqual(rest, own))
      throw new Problem('reading-id-taken', 'Another entry is stored under this id. Nothing was changed; enter this one again.');
    return true;
  };
  if (await isStored()) return false;
  refuseFuture(enteredAt, clockOffsetMs);
  const rows = await trx(table)
    .insert({ ...key, ...own, ...given, entered_at: new Date(enteredAt), clock_offset_ms: clockOffsetMs })
    .onConflict(['organization_id', 'id'])
    .ignore()
    .returning('id');
  if (rows.length > 0) return true;
  // Another request with the same id was faster; what it stored must be this.
  await isStored();
  return false;
}
