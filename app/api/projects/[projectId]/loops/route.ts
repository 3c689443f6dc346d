import { createLoopSchema } from '@/lib/api/loops';
import { route } from '@/lib/server/http/route';
import { createLoop } from '@/lib/server/loops/create-loop';

export const POST = route({
  permission: 'loop.create',
  scope: 'project',
  body: createLoopSchema,
  handle: ({ params, body, ...access }) => createLoop(access, params.projectId!, body),
});
