import { MAX_UPLOAD_BYTES, uploadQuerySchema } from '@/lib/api/schedule-import';
import { route } from '@/lib/server/http/route';
import { readUpload } from '@/lib/server/schedule-import/read-upload';

export const POST = route({
  permission: 'drawing.edit',
  scope: 'loop',
  query: uploadQuerySchema,
  upload: { maxBytes: MAX_UPLOAD_BYTES },
  handle: ({ query, upload, request }) => readUpload({ ...query, bytes: upload }, request.signal),
});
