import { recordReadingSchema } from '@/lib/api/commissioning';
import { recordReading } from '@/lib/server/commissioning/record-reading';
import { route } from '@/lib/server/http/route';

export const POST = route({
  permission: 'readings.record',
  scope: 'round',
  body: recordReadingSchema,
  handle: ({ params, body, ...access }) => recordReading(access, params.roundId!, body),
});
