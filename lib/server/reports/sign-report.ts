import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import { db } from '@/db/knex';
import { may } from '@/lib/api/permissions';
import { summaryOf } from '@/lib/api/report-judgement';
import type { ReportContent, Sign } from '@/lib/api/reports';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { notFound, Problem } from '../problem';
import { readContent } from './read-content';
import { readSignatures } from './read-signatures';
import { reportSha256 } from './report-sha256';
import { hasSigned, isAsSubmitted, isOpenFor, signingRules, submissionOf, type Standing } from './signing-rules';
import { storeAccepted } from './store-accepted';

/**
 * Puts a person's signature under the report and moves the loop on. The loop's row is locked first and everything is looked
 * at again behind the lock, so of two who sign at once the second is judged by what the first has done.
 */
export async function signReport(access: Access, loopId: string, sign: Sign): Promise<{ submission: number }> {
  const { organizationId, id: personId, name } = access.person;
  const rule = signingRules[sign.meaning];
  if (!may(access.roles, rule.permission)) throw new Problem('not-allowed', `Only a ${rule.signsAs} of this project signs this.`);
  return db().transaction(async (trx) => {
    const loop = await trx('loops').where({ organization_id: organizationId, id: loopId }).forUpdate().first('name', 'state');
    if (!loop) throw notFound();
    const found = await readContent(trx, organizationId, loopId);
    if (!found) throw new Problem('loop-state', 'No revision is issued yet, so there is no report to sign.');
    const { content, revisionId } = found;
    const signatures = await readSignatures(trx, organizationId, loopId);
    const standing: Standing = { state: loop.state, contentSha256: reportSha256(content), signatures };
    refuseUnfit(sign, standing, personId, content);

    const submission = submissionOf(signatures) + (sign.meaning === 'submitted' ? 1 : 0);
    await trx('signatures').insert({
      organization_id: organizationId,
      id: uuidv7(),
      loop_id: loopId,
      revision_id: revisionId,
      submission,
      meaning: sign.meaning,
      note: sign.note,
      content_sha256: standing.contentSha256,
      person_id: personId,
      person_name: name,
      person_role: rule.signsAs,
    });
    await trx('loops').where({ organization_id: organizationId, id: loopId }).update({ state: rule.to });
    if (sign.meaning === 'submitted') await closeRound(trx, organizationId, loopId);
    if (sign.meaning === 'accepted')
      await storeAccepted(trx, { organizationId, loopId, revisionId, content, contentSha256: standing.contentSha256 });
    await recordActivity(trx, access, {
      verb: sign.meaning,
      subject: `the report of ${loop.name}, revision ${content.revision.number}`,
      loopId,
      detail: { submission },
    });
    return { submission };
  });
}

function refuseUnfit(sign: Sign, standing: Standing, personId: string, content: ReportContent): void {
  if (sign.meaning !== 'submitted' && hasSigned(standing, personId)) {
    throw new Problem('already-signed', 'You have signed this submission already. Nobody signs twice on one report.');
  }
  if (!isOpenFor(sign.meaning, standing))
    throw new Problem('loop-state', `${signingRules[sign.meaning].before}; this loop is ${standing.state.replace('-', ' ')}.`);
  if (sign.contentSha256 !== standing.contentSha256) {
    throw new Problem('revision-superseded', 'The report has changed since you looked at it. Look at it again, then sign.');
  }
  if ((sign.meaning === 'reviewed' || sign.meaning === 'accepted') && !isAsSubmitted(standing)) {
    throw new Problem(
      'revision-superseded',
      'The report has changed since it was submitted: the technician has to submit it again before it is signed.',
    );
  }
  if (sign.meaning === 'submitted') refuseUnmeasured(content, sign.note);
}

function refuseUnmeasured(content: ReportContent, note: string): void {
  const { terminals, notMeasured } = summaryOf(content);
  if (notMeasured.length === terminals)
    throw new Problem('nothing-measured', 'No terminal of this revision is measured yet, so there is nothing to submit.');
  if (notMeasured.length === 0 || note !== '') return;
  const tags = notMeasured.slice(0, 12).map(({ tag }) => tag);
  const more = notMeasured.length - tags.length;
  const message = `Not measured: ${tags.join(', ')}${more > 0 ? ` and ${more} more` : ''}. Say in the note why, then sign.`;
  throw new Problem('input-invalid', message, { fields: [{ path: 'note', message }] });
}

const closeRound = (trx: Knex.Transaction, organizationId: string, loopId: string) =>
  trx('rounds').where({ organization_id: organizationId, loop_id: loopId }).whereNull('closed_at').update({ closed_at: trx.fn.now() });
