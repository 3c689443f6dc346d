import { generateLoopSchema } from '@/lib/api/generate';
import { generateDraft } from '@/lib/server/generate/generate-draft';
import { route } from '@/lib/server/http/route';

export const POST = route({
  permission: 'drawing.edit',
  scope: 'loop',
  body: generateLoopSchema,
  maxBytes: 8 << 20,
  handle: ({ params, body, request, ...access }) => generateDraft(access, params.loopId, body, request.signal),
});
