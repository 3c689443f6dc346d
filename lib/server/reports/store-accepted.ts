import type { Knex } from 'knex';
import { v7 as uuidv7 } from 'uuid';
import type { ReportContent } from '@/lib/api/reports';
import { readSignatures, shownSignature } from './read-signatures';
import { sha256 } from './report-sha256';
import { submissionOf } from './signing-rules';
import { buildWorkbook } from './workbook/build-workbook';

interface Accepted {
  organizationId: string;
  loopId: string;
  revisionId: string;
  content: ReportContent;
  contentSha256: string;
}

/** Freezes an accepted report: its content and its workbook, byte by byte, with the SHA-256 of the file. The caller holds the loop's lock. */
export async function storeAccepted(
  trx: Knex.Transaction,
  { organizationId, loopId, revisionId, content, contentSha256 }: Accepted,
): Promise<void> {
  const last = await trx('reports').where({ organization_id: organizationId, loop_id: loopId }).max('number as number').first();
  const number = (last?.number ?? 0) + 1;
  const signatures = await readSignatures(trx, organizationId, loopId);
  const submission = submissionOf(signatures);
  const workbook = await buildWorkbook({
    content,
    contentSha256,
    state: 'accepted',
    signatures: signatures.filter((signature) => signature.submission === submission).map(shownSignature),
    acceptedNumber: number,
    at: new Date(),
  });
  await trx('reports').insert({
    organization_id: organizationId,
    id: uuidv7(),
    loop_id: loopId,
    revision_id: revisionId,
    number,
    content: JSON.stringify(content),
    workbook,
    sha256: sha256(workbook),
  });
}
