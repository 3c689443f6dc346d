import { walkingOrderSchema } from '@/lib/api/commissioning';
import { writeWalkingOrder } from '@/lib/server/commissioning/write-walking-order';
import { route } from '@/lib/server/http/route';

export const PUT = route({
  permission: 'readings.record',
  scope: 'loop',
  body: walkingOrderSchema,
  handle: ({ params, body, ...access }) => writeWalkingOrder(access, params.loopId!, body),
});
