import sharp from 'sharp';
import { v7 as uuidv7 } from 'uuid';
import { addCertificate } from '@/lib/server/instruments/certificates';
import { storePhoto } from '@/lib/server/site/store-photo';
import type { Access } from '@/lib/server/auth/authorize';
import type { MadeOrganization } from './organization';
import type { MadeRound } from './round';

export interface MadeFiles {
  photoId: string;
  certificateId: string;
}

/** A photo of the made station and a certificate of the made meter, as the technician stores them. Wants `withFiles`. */
export async function makeFiles({ technician, projectId, loopId, stationId, instrumentId }: MadeOrganization & MadeRound): Promise<MadeFiles> {
  const access: Access = { person: technician as unknown as Access['person'], roles: ['technician'], projectId };
  const photoId = uuidv7();
  const picture = await sharp({ create: { width: 8, height: 6, channels: 3, background: '#357' } })
    .jpeg()
    .toBuffer();
  const about = { id: photoId, subject: 'station', subjectId: stationId, takenAt: '2026-06-01T09:30:00.000Z' } as const;
  await storePhoto(access, loopId, about, picture);
  const { id } = await addCertificate(access, instrumentId, 'certificate.pdf', Buffer.from('%PDF-1.7'));
  return { photoId, certificateId: id };
}
