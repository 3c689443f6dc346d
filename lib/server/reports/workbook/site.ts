import type { Workbook } from 'exceljs';
import type { ReportSite } from '@/lib/api/reports';
import { checkWords } from '@/lib/commissioning/readiness-checks';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, formats, type Column } from './sheet-table';

const moment = (text: string | null) => (text ? new Date(text) : null);

/** Readiness checks, snags and changes of setting, each a sheet of its own; reports accepted before these were kept have none. */
export function addSite(workbook: Workbook, report: ReportOnPaper): void {
  const { site } = report.content;
  if (!site) return;
  const reference = referenceOf(report);
  const checks: Column<ReportSite['checks'][number]>[] = [
    { key: 'text', head: 'Check', width: 60, content: ({ text }) => text },
    { key: 'answer', head: 'Stands', width: 18, content: ({ answer }) => checkWords[answer] },
    { key: 'remark', head: 'Remark', width: 40, content: ({ remark }) => remark },
    { key: 'by', head: 'By', width: 20, content: ({ answeredBy }) => answeredBy },
    { key: 'at', head: 'Answered', unit: 'UTC', width: 16, format: formats.moment, content: ({ answeredAt }) => moment(answeredAt) },
  ];
  addTable(addSheet(workbook, 'Readiness', { title: 'Readiness', reference }), checks, site.checks);
  const snags: Column<ReportSite['snags'][number]>[] = [
    { key: 'number', head: 'No.', width: 7, format: formats.whole, content: ({ number }) => number },
    { key: 'tag', head: 'Station', width: 14, content: ({ tag }) => tag },
    { key: 'text', head: 'Snag', width: 60, content: ({ text }) => text },
    { key: 'by', head: 'Raised by', width: 20, content: ({ raisedBy }) => raisedBy },
    { key: 'at', head: 'Raised', unit: 'UTC', width: 16, format: formats.moment, content: ({ raisedAt }) => moment(raisedAt) },
    { key: 'done', head: 'Resolution', width: 50, content: ({ resolution }) => resolution?.note ?? 'open' },
    { key: 'doneBy', head: 'Resolved by', width: 20, content: ({ resolution }) => resolution?.resolvedBy ?? null },
    {
      key: 'doneAt',
      head: 'Resolved',
      unit: 'UTC',
      width: 16,
      format: formats.moment,
      content: ({ resolution }) => moment(resolution?.resolvedAt ?? null),
    },
  ];
  addTable(addSheet(workbook, 'Snags', { title: 'Snags', reference }), snags, site.snags);
  const changes: Column<ReportSite['settingChanges'][number]>[] = [
    { key: 'tag', head: 'Station', width: 18, content: ({ tag }) => tag },
    { key: 'before', head: 'Before', unit: 'turns or speed', width: 14, format: formats.pressure, content: ({ before }) => before },
    { key: 'after', head: 'After', unit: 'turns or speed', width: 14, format: formats.pressure, content: ({ after }) => after },
    { key: 'by', head: 'By', width: 20, content: ({ changedBy }) => changedBy },
    { key: 'at', head: 'Changed', unit: 'UTC', width: 16, format: formats.moment, content: ({ changedAt }) => moment(changedAt) },
    { key: 'note', head: 'Note', width: 40, content: ({ note }) => note },
  ];
  addTable(addSheet(workbook, 'Settings', { title: 'Settings changed', reference }), changes, site.settingChanges);
}
