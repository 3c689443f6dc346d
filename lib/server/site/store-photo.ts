import { createHash } from 'node:crypto';
import sharp, { type OutputInfo } from 'sharp';
import { validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import type { Photo, PhotoInput } from '@/lib/api/site';
import { readinessChecks } from '@/lib/commissioning/readiness-checks';
import { recordActivity } from '../activity/record-activity';
import type { Access } from '../auth/authorize';
import { putFile } from '../files/bucket';
import { notFound, Problem } from '../problem';
import { insertOnce } from './insert-once';
import { photoKey } from './photo-key';

const LONGEST_PX = 2400;
const QUALITY = 82;
const MOST_PIXELS = 100e6;
const accepted = ['jpeg', 'png', 'webp', 'heif', 'avif'];

/**
 * Takes in a photo: what the bytes are decides, not what they are called. It is drawn anew as JPEG, which leaves out where and with what it
 * was taken, and written down only if the bucket took it; sent again it is stored once.
 */
export async function storePhoto(access: Access, loopId: string, input: PhotoInput, bytes: Buffer): Promise<Photo> {
  const { organizationId, name } = access.person;
  const picture = await drawnAnew(bytes);
  await refuseUnknownSubject(organizationId, loopId, input);
  return db().transaction(async (trx) => {
    const loop = await trx('loops').where({ organization_id: organizationId, id: loopId }).first('name');
    if (!loop) throw notFound();
    const isNew = await insertOnce(
      trx,
      access,
      'photos',
      loopId,
      { id: input.id, enteredAt: input.takenAt, clockOffsetMs: null },
      {
        subject: input.subject,
        subject_id: input.subjectId,
        // Of what was sent: the same photo sent again is known by it.
        sha256: createHash('sha256').update(bytes).digest('hex'),
      },
      { width_px: picture.info.width, height_px: picture.info.height, bytes: picture.data.length },
    );
    if (isNew) {
      // Only for a new one: under the id of another, nothing that is kept may be written over. Where the bucket refuses, nothing is written down.
      await putFile(photoKey(organizationId, input.id), picture.data, 'image/jpeg');
      await recordActivity(trx, access, { verb: 'added a photo to', subject: loop.name, loopId });
    }
    return { ...input, takenBy: name, widthPx: picture.info.width, heightPx: picture.info.height };
  });
}

async function drawnAnew(bytes: Buffer): Promise<{ data: Buffer; info: OutputInfo }> {
  try {
    const source = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error' });
    const { format } = await source.metadata();
    if (!format || !accepted.includes(format)) throw new Error(`a file of format ${format}`);
    return await source
      .rotate()
      .resize({ width: LONGEST_PX, height: LONGEST_PX, fit: 'inside', withoutEnlargement: true })
      .jpeg({ quality: QUALITY })
      .toBuffer({ resolveWithObject: true });
  } catch {
    // Whatever the decoder says of it, it is no picture for us.
    throw new Problem(
      'input-invalid',
      'This file is not a photo that can be read (JPEG, PNG, WebP, HEIF or AVIF, at most 100 megapixels).',
    );
  }
}

async function refuseUnknownSubject(organizationId: string, loopId: string, { subject, subjectId }: PhotoInput): Promise<void> {
  if (subject === 'check') {
    if (!readinessChecks.some(({ key }) => key === subjectId)) throw notFound();
    return;
  }
  const table = subject === 'station' ? 'stations' : 'snags';
  const row = isUuid(subjectId)
    ? await db()(table).where({ organization_id: organizationId, loop_id: loopId, id: subjectId }).first('id')
    : undefined;
  if (!row) throw notFound();
}
