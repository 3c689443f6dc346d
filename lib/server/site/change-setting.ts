import { db } from '@/db/knex';
import type { ChangeSetting } from '@/lib/api/site';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { readRound, readStation } from '../commissioning/reading-context';
import { Problem } from '../problem';
import { insertOnce } from './insert-once';

/** Writes down that a valve or pump was set, with what it stood at before; once, however often it is sent. */
export async function changeSetting(access: Access, roundId: string, input: ChangeSetting): Promise<{ id: string }> {
  const { organizationId } = access.person;
  const { id, stationId, before, after, note, changedAt, clockOffsetMs } = input;
  return db().transaction(async (trx) => {
    const round = await readRound(trx, organizationId, roundId);
    const station = await readStation(trx, organizationId, round, stationId);
    const isNew = await insertOnce(
      trx,
      access,
      'setting_changes',
      round.loopId,
      { id, enteredAt: changedAt, clockOffsetMs },
      { round_id: roundId, station_id: stationId, before, after, note },
    );
    if (isNew) {
      if (round.isClosed) throw new Problem('round-closed', `Round ${round.number} is closed. Keep this in the round that is open now.`);
      const subject = `${station.tag} from ${before ?? 'unknown'} to ${after}, round ${round.number} of ${round.loopName}`;
      await recordActivity(trx, access, { verb: 'set', subject, loopId: round.loopId });
    }
    return { id };
  });
}
