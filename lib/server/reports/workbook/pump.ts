import type { Workbook } from 'exceljs';
import { pumpsOf, type ReportPump } from '@/lib/api/report-judgement';
import { colourVerdicts, measuredColumns, methodWords } from './measured-columns';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, firstRow, formats, type Column } from './sheet-table';

/** The duty that the loop asks of each pump at design flow, beside the flow that was measured. */
export function addPump(workbook: Workbook, report: ReportOnPaper): void {
  const columns: Column<ReportPump>[] = [
    { key: 'tag', head: 'Tag', width: 14, content: ({ station }) => station.tag },
    { key: 'storey', head: 'Storey', width: 16, content: ({ station }) => station.storey },
    { key: 'design', head: 'Design flow', unit: 'L/s', width: 11, format: formats.flow, content: ({ duty }) => duty.flowLs },
    { key: 'head', head: 'Head needed', unit: 'm', width: 10, format: formats.head, content: ({ duty }) => duty.requiredHeadM },
    { key: 'speed', head: 'Speed', unit: '% of full', width: 10, format: formats.percent, content: ({ duty }) => duty.speed },
    { key: 'shaft', head: 'Shaft power', unit: 'kW', width: 10, format: formats.power, content: ({ duty }) => duty.shaftKw },
    ...measuredColumns<ReportPump>(report.content, ({ station }) => station),
    { key: 'method', head: 'Method', width: 12, content: ({ station: { reading } }) => reading && methodWords[reading.method] },
    { key: 'instrument', head: 'Instrument', width: 28, content: ({ station }) => station.reading?.instrumentName ?? null },
    { key: 'by', head: 'Taken by', width: 16, content: ({ station }) => station.reading?.takenBy ?? null },
    {
      key: 'at',
      head: 'Taken',
      unit: 'UTC',
      width: 16,
      format: formats.moment,
      content: ({ station: { reading } }) => reading && new Date(reading.takenAt),
    },
  ];
  const pumps = pumpsOf(report.content);
  const sheet = addSheet(workbook, 'Pump', { title: 'Pump duty', reference: referenceOf(report) });
  addTable(sheet, columns, pumps);
  colourVerdicts(sheet, columns, firstRow, pumps.length);
}
