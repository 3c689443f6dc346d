import { db } from '@/db/knex';
import type { RaiseSnag } from '@/lib/api/site';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound } from '../problem';
import { insertOnce } from './insert-once';

/** Writes down what is wrong, under the loop's next number. The loop's row is locked, so two snags never share one. */
export async function raiseSnag(access: Access, loopId: string, input: RaiseSnag): Promise<{ id: string }> {
  const { organizationId } = access.person;
  const { id, stationId, text, raisedAt, clockOffsetMs } = input;
  return db().transaction(async (trx) => {
    const loop = await trx('loops').where({ organization_id: organizationId, id: loopId }).forUpdate().first('name');
    if (!loop) throw notFound();
    if (stationId !== null) {
      const station = await trx('stations').where({ organization_id: organizationId, loop_id: loopId, id: stationId }).first('id');
      if (!station) throw notFound();
    }
    const last = await trx('snags').where({ organization_id: organizationId, loop_id: loopId }).max('number as number').first();
    const number = (last?.number ?? 0) + 1;
    const entered = { id, enteredAt: raisedAt, clockOffsetMs };
    const isNew = await insertOnce(trx, access, 'snags', loopId, entered, { station_id: stationId, text }, { number });
    if (isNew) await recordActivity(trx, access, { verb: 'raised', subject: `snag ${number} of ${loop.name}: ${text}`, loopId });
    return { id };
  });
}
