import { saveDraftSchema } from '@/lib/api/loops';
import { route } from '@/lib/server/http/route';
import { readDraft } from '@/lib/server/loops/read-draft';
import { saveDraft } from '@/lib/server/loops/save-draft';

export const GET = route({
  permission: 'draft.see',
  scope: 'loop',
  handle: ({ person, params }) => readDraft(person.organizationId, params.loopId),
});

export const PUT = route({
  permission: 'drawing.edit',
  scope: 'loop',
  body: saveDraftSchema,
  maxBytes: 16 << 20,
  handle: ({ params, body, ...access }) => saveDraft(access, params.loopId, body),
});
