import { route } from '@/lib/server/http/route';
import { readLoop } from '@/lib/server/loops/read-loop';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ params, ...access }) => readLoop(access, params.loopId),
});
