import { route } from '@/lib/server/http/route';
import { readCertificate } from '@/lib/server/instruments/certificates';

export const GET = route({
  permission: 'instruments.see',
  scope: 'organization',
  handle: ({ params, person }) => readCertificate(person.organizationId, params.instrumentId!, params.certificateId!),
});
