import type { Workbook } from 'exceljs';
import { terminalsOf } from '@/lib/api/report-judgement';
import type { ReportStation } from '@/lib/api/reports';
import { colourVerdicts, measuredColumns, methodWords } from './measured-columns';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, firstRow, formats, type Column } from './sheet-table';

/** One row a terminal: what was asked, what was measured last, with what and by whom. */
export function addTerminals(workbook: Workbook, report: ReportOnPaper): void {
  const { content } = report;
  const serialOf = new Map(content.instruments.map(({ id, serial }) => [id, serial]));
  const columns: Column<ReportStation>[] = [
    { key: 'tag', head: 'Tag', width: 14, content: ({ tag }) => tag },
    { key: 'storey', head: 'Storey', width: 11, content: ({ storey }) => storey },
    { key: 'room', head: 'Room', width: 14, content: ({ room }) => room },
    { key: 'design', head: 'Design flow', unit: 'L/s', width: 10, format: formats.flow, content: ({ designFlowLs }) => designFlowLs },
    ...measuredColumns<ReportStation>(content, (station) => station),
    {
      key: 'setting',
      head: 'Setting',
      unit: 'turns',
      width: 9,
      format: formats.turns,
      content: ({ reading }) => reading?.settingTurns ?? null,
    },
    {
      key: 'designSetting',
      head: 'Setting by design',
      unit: 'turns',
      width: 11,
      format: formats.turns,
      content: ({ settingTurns }) => settingTurns,
    },
    {
      key: 'drop',
      head: 'Drop read',
      unit: 'kPa',
      width: 10,
      format: formats.pressure,
      content: ({ reading }) => reading?.dropKpa ?? null,
    },
    { key: 'kv', head: 'Kv', unit: 'm³/h', width: 8, format: formats.kv, content: ({ reading }) => reading?.kv ?? null },
    {
      key: 'uncertainty',
      head: 'Uncertainty',
      unit: '± % of flow',
      width: 11,
      format: formats.percent,
      content: ({ reading }) => reading && reading.uncertaintyPercent / 100,
    },
    { key: 'method', head: 'Method', width: 11, content: ({ reading }) => reading && methodWords[reading.method] },
    { key: 'instrument', head: 'Instrument', width: 28, content: ({ reading }) => reading?.instrumentName ?? null },
    { key: 'serial', head: 'Serial', width: 11, content: ({ reading }) => (reading && serialOf.get(reading.instrumentId)) ?? null },
    {
      key: 'calibration',
      head: 'Calibration',
      width: 13,
      content: ({ reading }) => reading && (reading.isInstrumentOverdue ? 'overdue' : 'in date'),
    },
    { key: 'by', head: 'Taken by', width: 15, content: ({ reading }) => reading?.takenBy ?? null },
    {
      key: 'at',
      head: 'Taken',
      unit: 'UTC',
      width: 16,
      format: formats.moment,
      content: ({ reading }) => reading && new Date(reading.takenAt),
    },
    { key: 'round', head: 'Round', width: 7, format: formats.whole, content: ({ reading }) => reading?.roundNumber ?? null },
    { key: 'note', head: 'Note', width: 24, content: ({ reading }) => reading?.note ?? null },
  ];
  const terminals = terminalsOf(content);
  const sheet = addSheet(workbook, 'Terminals', { title: 'Terminals', reference: referenceOf(report) });
  addTable(sheet, columns, terminals);
  colourVerdicts(sheet, columns, firstRow, terminals.length);
}
