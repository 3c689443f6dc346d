import { db } from '@/db/knex';
import { stripOfReport } from '@/lib/api/report-judgement';
import type { ReportBody } from '@/lib/api/reports';
import type { Access } from '../auth/authorize';
import { notFound } from '../problem';
import { readContent } from './read-content';
import { readSignatures, shownSignature } from './read-signatures';
import { reportSha256 } from './report-sha256';
import { signableBy } from './signing-rules';

/** The report of a loop as it stands, who signed, what was accepted, and what this person may sign. */
export async function readReport({ person, roles }: Access, loopId: string): Promise<ReportBody> {
  const { organizationId } = person;
  const loop = await db()('loops').where({ organization_id: organizationId, id: loopId }).first('state');
  if (!loop) throw notFound();
  const found = await readContent(db(), organizationId, loopId);
  const signatures = await readSignatures(db(), organizationId, loopId);
  const accepted = await db()('reports')
    .where({ organization_id: organizationId, loop_id: loopId })
    .orderBy('number', 'desc')
    .select('number', 'sha256', 'accepted_at');
  const body = {
    state: loop.state,
    signatures: signatures.map(shownSignature),
    accepted: accepted.map((row) => ({ number: row.number, sha256: row.sha256, acceptedAt: row.accepted_at.toISOString() })),
  };
  if (!found)
    return { ...body, content: null, contentSha256: null, strip: [], band: { lowerPercent: 100, upperPercent: 100 }, maySign: [] };
  const { content } = found;
  const contentSha256 = reportSha256(content);
  return {
    ...body,
    content,
    contentSha256,
    ...stripOfReport(content),
    maySign: signableBy({ id: person.id, roles }, content, { state: loop.state, contentSha256, signatures }),
  };
}
