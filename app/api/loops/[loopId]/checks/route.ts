import { answerCheckSchema } from '@/lib/api/site';
import { route } from '@/lib/server/http/route';
import { answerCheck } from '@/lib/server/site/answer-check';

export const POST = route({
  permission: 'readings.record',
  scope: 'loop',
  body: answerCheckSchema,
  handle: ({ params, body, ...access }) => answerCheck(access, params.loopId!, body),
});
