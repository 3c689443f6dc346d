import type { Workbook } from 'exceljs';
import type { ReportRound } from '@/lib/api/reports';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, formats, type Column } from './sheet-table';

/** The passes of readings that were made, and under which revision. */
export function addRounds(workbook: Workbook, report: ReportOnPaper): void {
  const { rounds, readings } = report.content;
  const columns: Column<ReportRound>[] = [
    { key: 'number', head: 'Round', width: 9, format: formats.whole, content: ({ number }) => number },
    { key: 'purpose', head: 'Purpose', width: 40, content: ({ purpose }) => purpose },
    { key: 'revision', head: 'Revision', width: 10, format: formats.whole, content: ({ revisionNumber }) => revisionNumber },
    {
      key: 'entries',
      head: 'Entries',
      width: 9,
      format: formats.whole,
      content: ({ id }) => readings.filter(({ roundId }) => roundId === id).length,
    },
    { key: 'by', head: 'Started by', width: 20, content: ({ startedBy }) => startedBy },
    { key: 'reason', head: 'Started with checks open because', width: 40, content: ({ openChecksReason }) => openChecksReason ?? '' },
    { key: 'started', head: 'Started', unit: 'UTC', width: 16, format: formats.moment, content: ({ startedAt }) => new Date(startedAt) },
  ];
  addTable(addSheet(workbook, 'Rounds', { title: 'Rounds', reference: referenceOf(report) }), columns, rounds);
}
