import { db } from '@/db/knex';
import type { Round } from '@/lib/api/commissioning';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound } from '../problem';
import { readRounds } from './read-rounds';

/** Closes a round: no reading enters it any more. Closing a closed one changes nothing. */
export async function closeRound(access: Access, roundId: string): Promise<Round> {
  const { organizationId } = access.person;
  return db().transaction(async (trx) => {
    // The lock waits for readings that are on their way into the round.
    const row = await trx('rounds')
      .where({ organization_id: organizationId, id: roundId })
      .forUpdate()
      .first('loop_id', 'number', 'closed_at');
    if (!row) throw notFound();
    if (!row.closed_at) {
      await trx('rounds').where({ organization_id: organizationId, id: roundId }).update({ closed_at: trx.fn.now() });
      const loop = await trx('loops').where({ organization_id: organizationId, id: row.loop_id }).first('name');
      await recordActivity(trx, access, { verb: 'closed', subject: `round ${row.number} of ${loop.name}`, loopId: row.loop_id });
    }
    const [round] = await readRounds(trx, organizationId, { 'rounds.id': roundId });
    return round!;
  });
}
