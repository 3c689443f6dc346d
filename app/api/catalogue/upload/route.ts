import { MAX_UPLOAD_BYTES, uploadQuerySchema } from '@/lib/api/schedule-import';
import { route } from '@/lib/server/http/route';
import { readUpload } from '@/lib/server/schedule-import/read-upload';

/** Answers with what stands in the file and keeps nothing; it is stored when the person saves what they then see. */
export const POST = route({
  permission: 'catalogue.manage',
  scope: 'organization',
  query: uploadQuerySchema,
  upload: { maxBytes: MAX_UPLOAD_BYTES },
  handle: ({ query, upload, request }) => readUpload({ ...query, bytes: upload }, request.signal),
});
