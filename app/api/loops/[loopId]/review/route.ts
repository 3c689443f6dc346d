import { reviewReportSchema } from '@/lib/api/reports';
import { route } from '@/lib/server/http/route';
import { signReport } from '@/lib/server/reports/sign-report';

export const POST = route({
  permission: 'report.review',
  scope: 'loop',
  body: reviewReportSchema,
  handle: ({ params, body, ...access }) => signReport(access, params.loopId, body),
});
