import type { Workbook } from 'exceljs';
import { cautions, cautionSentence } from '@/lib/commissioning/cautions';
import { referenceOf, type ReportOnPaper } from './report-on-paper';
import { addSheet, addTable, type Column } from './sheet-table';

/** For whoever takes the report to plant. */
export function addCautions(workbook: Workbook, report: ReportOnPaper): void {
  const columns: Column<string>[] = [
    { key: 'caution', head: 'Before anyone goes to the plant', width: 120, content: (caution) => caution },
  ];
  addTable(addSheet(workbook, 'Cautions', { title: 'Cautions', reference: referenceOf(report) }), columns, [...cautions, cautionSentence]);
}
