import { db } from '@/db/knex';
import type { ResolveSnag } from '@/lib/api/site';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { insertOnce } from './insert-once';

/** Writes down what was done about a snag; it is resolved once and for all, a new fault is a new snag. */
export async function resolveSnag(access: Access, loopId: string, input: ResolveSnag): Promise<{ id: string }> {
  const { organizationId } = access.person;
  const { id, snagId, note, resolvedAt, clockOffsetMs } = input;
  return db().transaction(async (trx) => {
    const snag = await trx('snags').where({ organization_id: organizationId, loop_id: loopId, id: snagId }).forUpdate().first('number');
    if (!snag) throw notFound();
    const done = await trx('snag_resolutions').where({ organization_id: organizationId, snag_id: snagId }).first('id');
    if (done && done.id !== id) throw new Problem('snag-resolved', `Snag ${snag.number} has been resolved already.`);
    const isNew = await insertOnce(
      trx,
      access,
      'snag_resolutions',
      loopId,
      { id, enteredAt: resolvedAt, clockOffsetMs },
      { snag_id: snagId, note },
    );
    const loop = await trx('loops').where({ organization_id: organizationId, id: loopId }).first('name');
    if (isNew) await recordActivity(trx, access, { verb: 'resolved', subject: `snag ${snag.number} of ${loop.name}: ${note}`, loopId });
    return { id };
  });
}
