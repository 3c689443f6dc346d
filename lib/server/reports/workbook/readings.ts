import type { Workbook } from 'exceljs';
import type { ReportContent, ReportReading } from '@/lib/api/reports';
import { methodWords } from './measured-columns';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, formats, type Column } from './sheet-table';

/** Every entry in the order it was taken, those too that were put right, with the reason: nothing measured is left out. */
export function addReadings(workbook: Workbook, report: ReportOnPaper): void {
  const { content } = report;
  const standing = standings(content);
  const correctionOf = new Map(
    content.readings.flatMap((entry) => (entry.correctsReadingId ? [[entry.correctsReadingId, entry] as const] : [])),
  );
  const serialOf = new Map(content.instruments.map(({ id, serial }) => [id, serial]));
  const columns: Column<ReportReading>[] = [
    { key: 'tag', head: 'Station', width: 14, content: ({ tag }) => tag },
    { key: 'round', head: 'Round', width: 7, format: formats.whole, content: ({ roundNumber }) => roundNumber },
    { key: 'revision', head: 'Revision', width: 8, format: formats.whole, content: ({ revisionNumber }) => revisionNumber },
    { key: 'taken', head: 'Taken', unit: 'UTC', width: 16, format: formats.moment, content: ({ takenAt }) => new Date(takenAt) },
    {
      key: 'recorded',
      head: 'Received',
      unit: 'UTC',
      width: 16,
      format: formats.moment,
      content: ({ recordedAt }) => new Date(recordedAt),
    },
    { key: 'by', head: 'Taken by', width: 16, content: ({ takenBy }) => takenBy },
    { key: 'method', head: 'Method', width: 11, content: ({ method }) => methodWords[method] },
    { key: 'setting', head: 'Setting', unit: 'turns', width: 9, format: formats.turns, content: ({ settingTurns }) => settingTurns },
    { key: 'drop', head: 'Drop', unit: 'kPa', width: 9, format: formats.pressure, content: ({ dropKpa }) => dropKpa },
    { key: 'kv', head: 'Kv', unit: 'm³/h', width: 8, format: formats.kv, content: ({ kv }) => kv },
    { key: 'flow', head: 'Flow', unit: 'L/s', width: 9, format: formats.flow, content: ({ flowLs }) => flowLs },
    {
      key: 'percent',
      head: 'Of design then',
      unit: '%',
      width: 9,
      format: formats.percent,
      content: ({ percentOfDesign }) => percentOfDesign / 100,
    },
    { key: 'verdict', head: 'Verdict then', width: 9, content: ({ verdict }) => verdict },
    {
      key: 'uncertainty',
      head: 'Uncertainty',
      unit: '± % of flow',
      width: 11,
      format: formats.percent,
      content: ({ uncertaintyPercent }) => uncertaintyPercent / 100,
    },
    {
      key: 'entered',
      head: 'As it was typed',
      width: 24,
      content: ({ entered }) => entered.map(({ quantity, text, unit }) => `${quantity} ${text} ${unit}`.trim()).join('; '),
    },
    { key: 'instrument', head: 'Instrument', width: 28, content: ({ instrumentName }) => instrumentName },
    { key: 'serial', head: 'Serial', width: 11, content: ({ instrumentId }) => serialOf.get(instrumentId) ?? null },
    {
      key: 'calibration',
      head: 'Calibration',
      width: 13,
      content: ({ isInstrumentOverdue }) => (isInstrumentOverdue ? 'overdue' : 'in date'),
    },
    { key: 'standing', head: 'Standing', width: 17, content: ({ id }) => standing(id) },
    { key: 'reason', head: 'Why it was put right', width: 26, content: ({ id }) => correctionOf.get(id)?.note ?? null },
    { key: 'note', head: 'Note', width: 26, content: ({ note }) => note },
  ];
  const sheet = addSheet(workbook, 'Readings', { title: 'Every entry', reference: referenceOf(report) });
  addTable(sheet, columns, content.readings);
}

function standings(content: ReportContent): (id: string) => string {
  const counting = new Set(content.stations.flatMap(({ reading }) => (reading ? [reading.id] : [])));
  const corrected = new Set(content.readings.flatMap(({ correctsReadingId }) => correctsReadingId ?? []));
  return (id) => (corrected.has(id) ? 'put right later' : counting.has(id) ? 'counts' : 'superseded');
}
