import type { Workbook } from 'exceljs';
import type { ReportInstrument } from '@/lib/api/reports';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, formats, type Column } from './sheet-table';

const kindWords = { 'differential-pressure': 'differential pressure', flow: 'flow', temperature: 'temperature' } as const;
const unitOf = { 'differential-pressure': 'kPa', flow: 'L/s', temperature: '°C' } as const;

/** The instruments that were read, with their accuracy and calibration. */
export function addInstruments(workbook: Workbook, report: ReportOnPaper): void {
  const { instruments, readings } = report.content;
  const entries = (id: string) => readings.filter(({ instrumentId }) => instrumentId === id);
  const day = (text: string | null) => (text ? new Date(`${text}T00:00:00Z`) : null);
  const columns: Column<ReportInstrument>[] = [
    { key: 'name', head: 'Instrument', width: 28, content: ({ name }) => name },
    { key: 'serial', head: 'Serial', width: 16, content: ({ serial }) => serial },
    { key: 'kind', head: 'Reads', width: 20, content: ({ kind }) => kindWords[kind] },
    { key: 'unit', head: 'Unit', width: 7, content: ({ kind }) => unitOf[kind] },
    { key: 'low', head: 'Range from', unit: 'in its unit', width: 11, format: formats.pressure, content: ({ rangeLow }) => rangeLow },
    { key: 'high', head: 'Range to', unit: 'in its unit', width: 11, format: formats.pressure, content: ({ rangeHigh }) => rangeHigh },
    {
      key: 'accuracy',
      head: 'Accuracy',
      unit: '± % of reading',
      width: 14,
      format: formats.percent,
      content: ({ accuracyPercent }) => accuracyPercent / 100,
    },
    {
      key: 'fixed',
      head: 'and fixed',
      unit: '± in its unit',
      width: 12,
      format: formats.pressure,
      content: ({ accuracyAbsolute }) => accuracyAbsolute,
    },
    { key: 'calibrated', head: 'Calibrated on', width: 13, format: formats.day, content: ({ calibratedOn }) => day(calibratedOn) },
    { key: 'due', head: 'Due on', width: 12, format: formats.day, content: ({ calibrationDueOn }) => day(calibrationDueOn) },
    { key: 'entries', head: 'Entries', width: 9, format: formats.whole, content: ({ id }) => entries(id).length },
    {
      key: 'overdue',
      head: 'Of them when overdue',
      width: 12,
      format: formats.whole,
      content: ({ id }) => entries(id).filter(({ isInstrumentOverdue }) => isInstrumentOverdue).length,
    },
  ];
  addTable(addSheet(workbook, 'Instruments', { title: 'Instruments', reference: referenceOf(report) }), columns, instruments);
}
