import { route } from '@/lib/server/http/route';
import { keepPresence } from '@/lib/server/loops/keep-presence';

export const POST = route({
  permission: 'drawing.edit',
  scope: 'loop',
  handle: ({ params, ...access }) => keepPresence(access, params.loopId),
});
