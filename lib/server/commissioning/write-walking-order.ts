import { db } from '@/db/knex';
import type { WalkingOrder } from '@/lib/api/commissioning';
import type { Access } from '../auth/authorize';
import { notFound } from '../problem';

/** Sets the order in which a loop's stations are walked; an empty list gives the revision's own back. The report keeps the revision's. */
export async function writeWalkingOrder(access: Access, loopId: string, { stationIds }: WalkingOrder): Promise<WalkingOrder> {
  const ofLoop = { organization_id: access.person.organizationId, loop_id: loopId };
  return db().transaction(async (trx) => {
    const known = new Set(await trx('stations').where(ofLoop).pluck('id'));
    if (stationIds.some((id) => !known.has(id))) throw notFound();
    await trx('station_orders').where(ofLoop).delete();
    await trx.batchInsert(
      'station_orders',
      stationIds.map((stationId, position) => ({ ...ofLoop, station_id: stationId, position })),
      500,
    );
    return { stationIds };
  });
}
