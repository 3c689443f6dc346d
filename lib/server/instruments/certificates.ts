import { createHash } from 'node:crypto';
import { v7 as uuidv7, validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import type { Certificate } from '@/lib/api/commissioning';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { getFile, putFile } from '../files/bucket';
import { fileAnswer } from '../files/file-answer';
import { notFound, Problem } from '../problem';

const keyOf = (organizationId: string, id: string) => `${organizationId}/certificates/${id}`;

/** First bytes of what is taken in; the name says nothing. */
const kinds: [mediaType: string, ending: string, starts: number[]][] = [
  ['application/pdf', 'pdf', [0x25, 0x50, 0x44, 0x46, 0x2d]],
  ['image/jpeg', 'jpg', [0xff, 0xd8, 0xff]],
  ['image/png', 'png', [0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]],
];

/** Keeps a meter's calibration certificate; earlier ones stay. */
export async function addCertificate(access: Access, instrumentId: string, fileName: string, bytes: Buffer): Promise<Certificate> {
  const { organizationId, id: personId, name: uploadedBy } = access.person;
  const kind = kinds.find(([, , starts]) => starts.every((byte, at) => bytes[at] === byte));
  if (!kind) throw new Problem('input-invalid', 'A certificate is a PDF, a JPEG or a PNG; this file is none of them. Nothing was changed.');
  if (!isUuid(instrumentId)) throw notFound();
  const meter = await db()('instruments').where({ organization_id: organizationId, id: instrumentId }).first('name', 'serial');
  if (!meter) throw notFound();
  const id = uuidv7();
  await putFile(keyOf(organizationId, id), bytes, kind[0]);
  const name = fileName.trim().slice(0, 120) || `certificate.${kind[1]}`;
  await db().transaction(async (trx) => {
    await trx('instrument_certificates').insert({
      organization_id: organizationId,
      id,
      instrument_id: instrumentId,
      file_name: name,
      media_type: kind[0],
      bytes: bytes.length,
      sha256: createHash('sha256').update(bytes).digest('hex'),
      uploaded_by: personId,
    });
    await recordActivity(trx, access, { verb: 'added a certificate to', subject: `the meter ${meter.name}, serial ${meter.serial}` });
  });
  return { id, instrumentId, fileName: name, uploadedBy, uploadedAt: new Date().toISOString() };
}

/** Certificates of a meter, the newest first. */
export async function listCertificates(organizationId: string, instrumentId: string): Promise<Certificate[]> {
  const meter = isUuid(instrumentId) && (await db()('instruments').where({ organization_id: organizationId, id: instrumentId }).first('id'));
  if (!meter) throw notFound();
  const rows = await db()('instrument_certificates as held')
    .join('people', (join) => join.on('people.organization_id', 'held.organization_id').on('people.id', 'held.uploaded_by'))
    .where({ 'held.organization_id': organizationId, 'held.instrument_id': instrumentId })
    .orderBy('held.uploaded_at', 'desc')
    .select({
      id: 'held.id',
      instrumentId: 'held.instrument_id',
      fileName: 'held.file_name',
      uploadedBy: 'people.name',
      uploadedAt: 'held.uploaded_at',
    });
  return rows.map((row) => ({ ...row, uploadedAt: row.uploadedAt.toISOString() }));
}

/** One certificate, to be saved. */
export async function readCertificate(organizationId: string, instrumentId: string, id: string): Promise<Response> {
  if (!isUuid(id) || !isUuid(instrumentId)) throw notFound();
  const row = await db()('instrument_certificates')
    .where({ organization_id: organizationId, instrument_id: instrumentId, id })
    .first('file_name', 'media_type');
  const bytes = row && (await getFile(keyOf(organizationId, id)));
  if (!bytes) throw notFound();
  return fileAnswer(bytes, row.media_type, 'attachment', row.file_name);
}
