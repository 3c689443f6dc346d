import { db } from '@/db/knex';
import { notFound, Problem } from '../problem';
import { readContent } from './read-content';
import { readSignatures, shownSignature } from './read-signatures';
import { reportSha256, sha256 } from './report-sha256';
import { buildWorkbook } from './workbook/build-workbook';

interface Download {
  bytes: Buffer;
  fileName: string;
}

/** The workbook of the report as it stands, or of an accepted one: the very bytes that were stored when it was accepted. */
export const downloadWorkbook = (organizationId: string, loopId: string, number: number | undefined): Promise<Download> =>
  number === undefined ? currentWorkbook(organizationId, loopId) : acceptedWorkbook(organizationId, loopId, number);

async function acceptedWorkbook(organizationId: string, loopId: string, number: number): Promise<Download> {
  const row = await db()('reports')
    .where({ organization_id: organizationId, loop_id: loopId, number })
    .first({
      workbook: 'workbook',
      loop: db().raw("content -> 'loop' ->> 'name'"),
      revision: db().raw("content -> 'revision' ->> 'number'"),
    });
  if (!row) throw notFound();
  return { bytes: row.workbook, fileName: fileName(row.loop, `revision ${row.revision}`, `report ${number}`) };
}

async function currentWorkbook(organizationId: string, loopId: string): Promise<Download> {
  const loop = await db()('loops').where({ organization_id: organizationId, id: loopId }).first('state');
  if (!loop) throw notFound();
  const found = await readContent(db(), organizationId, loopId);
  if (!found) throw new Problem('loop-state', 'No revision is issued yet, so there is nothing to download.');
  const { content } = found;
  const signatures = (await readSignatures(db(), organizationId, loopId)).map(shownSignature);
  const bytes = await buildWorkbook({
    content,
    contentSha256: reportSha256(content),
    state: loop.state,
    signatures,
    acceptedNumber: null,
    at: new Date(),
  });
  return { bytes, fileName: fileName(content.loop.name, `revision ${content.revision.number}`, 'as it stands') };
}

/** Letters and digits that every file system and header takes; whatever else a name holds becomes a hyphen. */
export const fileName = (...parts: string[]): string => {
  const safe = ['report', ...parts]
    .join(' ')
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^A-Za-z0-9]+/g, '-');
  return `${safe.replace(/-$/, '').slice(0, 120)}.xlsx`;
};

/** As a file to be kept, with its digest (RFC 9530) to check it by. */
export const asAttachment = ({ bytes, fileName }: Download): Response =>
  new Response(new Uint8Array(bytes), {
    headers: {
      'Content-Type': 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
      'Content-Disposition': `attachment; filename="${fileName}"`,
      'Repr-Digest': `sha-256=:${Buffer.from(sha256(bytes), 'hex').toString('base64')}:`,
      'Cache-Control': 'private, no-store',
    },
  });
