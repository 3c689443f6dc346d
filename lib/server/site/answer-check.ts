import { db } from '@/db/knex';
import type { AnswerCheck } from '@/lib/api/site';
import { readinessChecks } from '@/lib/commissioning/readiness-checks';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { insertOnce } from './insert-once';

const words = { done: 'done', open: 'open again', 'not-applicable': 'not applicable' } as const;

/** Stores the answer to one readiness check; earlier ones stay in the record. */
export async function answerCheck(access: Access, loopId: string, input: AnswerCheck): Promise<{ id: string }> {
  const { id, checkKey, answer, remark, answeredAt, clockOffsetMs } = input;
  const check = readinessChecks.find(({ key }) => key === checkKey);
  if (!check) {
    const message = 'There is no check of this name.';
    throw new Problem('input-invalid', message, { fields: [{ path: 'checkKey', message }] });
  }
  return db().transaction(async (trx) => {
    const loop = await trx('loops').where({ organization_id: access.person.organizationId, id: loopId }).first('name');
    if (!loop) throw notFound();
    const entered = { id, enteredAt: answeredAt, clockOffsetMs };
    const isNew = await insertOnce(trx, access, 'check_answers', loopId, entered, { check_key: checkKey, answer, remark });
    if (isNew)
      await recordActivity(trx, access, {
        verb: 'checked',
        subject: `“${check.text}” of ${loop.name}: ${words[answer]}`,
        loopId,
      });
    return { id };
  });
}
