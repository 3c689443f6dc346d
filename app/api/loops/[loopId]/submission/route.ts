import { submitReportSchema } from '@/lib/api/reports';
import { route } from '@/lib/server/http/route';
import { signReport } from '@/lib/server/reports/sign-report';

export const POST = route({
  permission: 'report.submit',
  scope: 'loop',
  body: submitReportSchema,
  handle: ({ params, body, ...access }) => signReport(access, params.loopId, { ...body, meaning: 'submitted' }),
});
