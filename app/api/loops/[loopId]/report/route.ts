import { route } from '@/lib/server/http/route';
import { readReport } from '@/lib/server/reports/read-report';

export const GET = route({
  permission: 'loop.see',
  scope: 'loop',
  handle: ({ params, ...access }) => readReport(access, params.loopId),
});
