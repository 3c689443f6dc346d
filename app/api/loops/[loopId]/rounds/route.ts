import { startRoundSchema } from '@/lib/api/commissioning';
import { startRound } from '@/lib/server/commissioning/start-round';
import { route } from '@/lib/server/http/route';

export const POST = route({
  permission: 'readings.record',
  scope: 'loop',
  body: startRoundSchema,
  handle: ({ params, body, ...access }) => startRound(access, params.loopId!, body),
});
