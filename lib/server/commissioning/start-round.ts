import type { Knex } from 'knex';
import { db } from '@/db/knex';
import type { Round, StartRound } from '@/lib/api/commissioning';
import type { LoopState } from '@/lib/api/loops';
import { openChecks } from '@/lib/commissioning/readiness-checks';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { readSite } from '../site/read-site';
import { readRounds } from './read-rounds';

const measurable: LoopState[] = ['issued', 'in-commissioning'];

/**
 * Starts a round on the newest revision; an issued loop is in commissioning from then on. The loop's row is locked, so two who start at
 * once do not make two rounds, and a start that is sent again is answered with the round it made.
 */
export async function startRound(access: Access, loopId: string, { id, purpose, openChecksReason }: StartRound): Promise<Round> {
  const { organizationId } = access.person;
  return db().transaction(async (trx) => {
    const loop = await trx('loops').where({ organization_id: organizationId, id: loopId }).forUpdate().first('name', 'state');
    if (!loop) throw notFound();
    const known = await trx('rounds').where({ organization_id: organizationId, id }).first('loop_id');
    if (known && known.loop_id !== loopId) {
      throw new Problem('input-invalid', 'This id belongs to another round.', { fields: [{ path: 'id', message: 'Make a new id.' }] });
    }
    if (!known) {
      if (!measurable.includes(loop.state)) throw new Problem('loop-state', refusedBecause(loop.state));
      const other = await trx('rounds').where({ organization_id: organizationId, loop_id: loopId }).whereNull('closed_at').first('number');
      if (other) throw new Problem('round-open', `Round ${other.number} of this loop is still open. Close it before another is started.`);
      const { checks } = await readSite(organizationId, loopId, trx);
      const open = openChecks(checks).length;
      if (open > 0 && openChecksReason === '') throw unexplained(open);
      const reason = open > 0 ? openChecksReason : '';
      const number = await insertRound(trx, access, loopId, { id, purpose, openChecksReason: reason });
      if (loop.state === 'issued')
        await trx('loops').where({ organization_id: organizationId, id: loopId }).update({ state: 'in-commissioning' });
      await recordActivity(trx, access, { verb: 'started', subject: `round ${number} of ${loop.name}: ${purpose}`, loopId });
    }
    const [round] = await readRounds(trx, organizationId, { 'rounds.id': id });
    return round!;
  });
}

/** Answers its number: one more than the loop's last. The caller holds the loop's lock. */
async function insertRound(
  trx: Knex.Transaction,
  { person }: Access,
  loopId: string,
  { id, purpose, openChecksReason }: StartRound,
): Promise<number> {
  const ofLoop = { organization_id: person.organizationId, loop_id: loopId };
  const revision = await trx('revisions').where(ofLoop).orderBy('number', 'desc').first('id');
  const last = await trx('rounds').where(ofLoop).max('number as number').first();
  const number = (last?.number ?? 0) + 1;
  await trx('rounds').insert({
    ...ofLoop,
    id,
    revision_id: revision.id,
    number,
    purpose,
    open_checks_reason: openChecksReason,
    started_by: person.id,
  });
  return number;
}

function unexplained(open: number): Problem {
  const message = `${open === 1 ? 'One readiness check is' : `${open} readiness checks are`} open. Say why the round starts all the same.`;
  return new Problem('input-invalid', message, { fields: [{ path: 'openChecksReason', message }] });
}

const refusedBecause = (state: LoopState): string =>
  state === 'draft'
    ? 'The loop has no issued revision yet, so there is nothing to measure against.'
    : `The loop is ${state}: it must be returned, or a new revision issued, before it is measured again.`;
