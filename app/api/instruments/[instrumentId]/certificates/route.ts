import { z } from 'zod';
import { route } from '@/lib/server/http/route';
import { addCertificate, listCertificates } from '@/lib/server/instruments/certificates';

export const GET = route({
  permission: 'instruments.see',
  scope: 'organization',
  handle: ({ params, person }) => listCertificates(person.organizationId, params.instrumentId!),
});

export const POST = route({
  permission: 'instruments.manage',
  scope: 'organization',
  query: z.object({ fileName: z.string().max(200) }),
  upload: { maxBytes: 10e6 },
  handle: ({ params, query, upload, ...access }) => addCertificate(access, params.instrumentId!, query.fileName, upload),
});
