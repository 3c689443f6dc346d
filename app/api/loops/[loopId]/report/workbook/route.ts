import { workbookQuerySchema } from '@/lib/api/reports';
import { route } from '@/lib/server/http/route';
import { asAttachment, downloadWorkbook } from '@/lib/server/reports/download-workbook';

export const GET = route({
  permission: 'report.download',
  scope: 'loop',
  query: workbookQuerySchema,
  handle: async ({ person, params, query }) => asAttachment(await downloadWorkbook(person.organizationId, params.loopId, query.number)),
});
