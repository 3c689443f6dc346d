import { closeRoundSchema } from '@/lib/api/commissioning';
import { closeRound } from '@/lib/server/commissioning/close-round';
import { route } from '@/lib/server/http/route';

export const PATCH = route({
  permission: 'readings.record',
  scope: 'round',
  body: closeRoundSchema,
  handle: ({ params, ...access }) => closeRound(access, params.roundId!),
});
