import type { Workbook } from 'exceljs';
import { isFigure, type RowOf, type ScheduleColumn, type ScheduleContext } from '@/lib/network/schedule-column';
import { cellWords, unitOfColumn } from '@/lib/network/schedule-entry';
import { totalOf } from '@/lib/network/schedule-totals';
import { toUnit } from '@/lib/units/format-quantity';
import { definitionOf, unitFor, type UnitChoice } from '@/lib/units/quantities';

export interface SeenTable<Row extends RowOf<unknown>> {
  /** Of the sheet. */
  name: string;
  /** Above the table: which loop, and of which state. */
  title: string;
  columns: readonly ScheduleColumn<Row>[];
  rows: readonly Row[];
  units: UnitChoice;
  context: ScheduleContext;
}

const HEAD_ROW = 3;

/**
 * The table as it is seen: its columns, order and rows, figures as numbers in the person's units. Text is stored as text
 * whatever it begins with, so that no tag becomes a formula.
 */
export function fillWorkbook<Row extends RowOf<unknown>>(workbook: Workbook, seen: SeenTable<Row>): void {
  const { columns, rows, units } = seen;
  const sheet = workbook.addWorksheet(seen.name, {
    views: [{ state: 'frozen', xSplit: 1, ySplit: HEAD_ROW }],
    pageSetup: { paperSize: 9, orientation: 'landscape', fitToPage: true, fitToWidth: 1, fitToHeight: 0 },
  });
  sheet.getCell('A1').value = seen.title;
  sheet.getCell('A1').font = { bold: true, size: 14 };
  const head = sheet.getRow(HEAD_ROW);
  columns.forEach((column, index) => {
    const unit = unitOfColumn(column, units);
    const cell = head.getCell(index + 1);
    cell.value = unit ? `${column.head} (${unit})` : column.head;
    cell.font = { bold: true };
    cell.alignment = { wrapText: true, vertical: 'bottom', horizontal: isFigure(column) ? 'right' : 'left' };
    cell.border = { bottom: { style: 'thin' } };
    sheet.getColumn(index + 1).width = Math.max(9, Math.round((column.widthRem ?? 6) * 1.6));
  });
  const write = (rowNumber: number, valueOf: (column: ScheduleColumn<Row>) => string | number | null, isBold = false) =>
    columns.forEach((column, index) => {
      const value = valueOf(column);
      if (value === null || value === '') return;
      const cell = sheet.getRow(rowNumber).getCell(index + 1);
      cell.value = value;
      if (typeof value === 'number') cell.numFmt = formatOf(column, units);
      else if (isFigure(column)) cell.alignment = { horizontal: 'right' };
      if (isBold) {
        cell.font = { bold: true };
        cell.border = { top: { style: 'thin' } };
      }
    });
  rows.forEach((row, index) =>
    write(HEAD_ROW + 1 + index, (column) => {
      const value = column.read(row);
      return typeof value === 'number' ? inUnit(column, value, units) : cellWords(column, row, units, seen.context);
    }),
  );
  const foot = HEAD_ROW + rows.length + 1;
  write(foot, (column) => footOf(column, rows, units), true);
  sheet.getRow(foot).getCell(1).value = `${rows.length} ${rows.length === 1 ? 'row' : 'rows'}`;
  sheet.getRow(foot).getCell(1).font = { bold: true };
}

function footOf<Row extends RowOf<unknown>>(column: ScheduleColumn<Row>, rows: readonly Row[], units: UnitChoice): number | null {
  const total = totalOf(column, rows);
  return total === null ? null : inUnit(column, total, units);
}

const inUnit = <Row extends RowOf<unknown>>(column: ScheduleColumn<Row>, value: number, units: UnitChoice): number =>
  column.kind === 'quantity' ? Number(toUnit(column.quantity, value, unitFor(column.quantity, units)).toPrecision(12)) : value;

function formatOf<Row extends RowOf<unknown>>(column: ScheduleColumn<Row>, units: UnitChoice): string {
  const decimals =
    column.kind === 'quantity'
      ? definitionOf(column.quantity, unitFor(column.quantity, units)).decimals
      : column.kind === 'number'
        ? column.decimals
        : 0;
  return decimals === 0 ? '0' : `0.${'0'.repeat(decimals)}`;
}

/** Hands the table over as a file; the workbook's library is fetched at the first time. */
export async function downloadWorkbook<Row extends RowOf<unknown>>(seen: SeenTable<Row>, fileName: string): Promise<void> {
  const { default: ExcelJS } = await import('exceljs');
  const workbook = new ExcelJS.Workbook();
  fillWorkbook(workbook, seen);
  const bytes = await workbook.xlsx.writeBuffer();
  const url = URL.createObjectURL(new Blob([bytes], { type: 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet' }));
  const link = document.createElement('a');
  link.href = url;
  link.download = fileName;
  link.click();
  setTimeout(() => URL.revokeObjectURL(url), 60_000);
}
