import { readCommissioning } from '@/lib/server/commissioning/read-commissioning';
import { route } from '@/lib/server/http/route';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ params, ...access }) => readCommissioning(access, params.loopId!),
});
