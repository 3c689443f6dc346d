import { acceptReportSchema } from '@/lib/api/reports';
import { route } from '@/lib/server/http/route';
import { signReport } from '@/lib/server/reports/sign-report';

export const POST = route({
  permission: 'report.accept',
  scope: 'loop',
  body: acceptReportSchema,
  handle: ({ params, body, ...access }) => signReport(access, params.loopId, { ...body, meaning: 'accepted' }),
});
