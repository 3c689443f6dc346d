import { validate as isUuid } from 'uuid';
import { db } from '@/db/knex';
import { getFile } from '../files/bucket';
import { fileAnswer } from '../files/file-answer';
import { notFound } from '../problem';
import { photoKey } from './photo-key';

/** A photo of a loop that the person may see. */
export async function readPhoto(organizationId: string, loopId: string, photoId: string): Promise<Response> {
  if (!isUuid(photoId)) throw notFound();
  const row = await db()('photos').where({ organization_id: organizationId, loop_id: loopId, id: photoId }).first('id');
  const bytes = row && (await getFile(photoKey(organizationId, photoId)));
  if (!bytes) throw notFound();
  return fileAnswer(bytes, 'image/jpeg', 'inline', `photo-${photoId}.jpg`);
}
