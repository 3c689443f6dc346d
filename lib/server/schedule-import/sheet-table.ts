import ExcelJS from 'exceljs';
import { tooManyColumns, tooManyRows } from '@/lib/network/schedule-import/delimited-text';
import {
  MAX_CELL_LENGTH,
  MAX_TABLE_COLUMNS,
  MAX_TABLE_ROWS,
  trimmedTable,
  type CellMark,
  type ScheduleTable,
  type TableCell,
} from '@/lib/network/schedule-import/table';
import { UnreadableWorkbook } from './zip';

/** What stands in a sheet; throws `UnreadableWorkbook` where that is no table. */
export function sheetTable(worksheet: ExcelJS.Worksheet): ScheduleTable {
  if (worksheet.actualRowCount > MAX_TABLE_ROWS) throw new UnreadableWorkbook(tooManyRows(worksheet.actualRowCount));
  const rows: TableCell[][] = [];
  const marks: CellMark[] = [];
  let firstRow = 1;
  let isWide = false;
  worksheet.eachRow((row, number) => {
    if (rows.length === 0) firstRow = number;
    const index = number - firstRow;
    if (index >= MAX_TABLE_ROWS)
      throw new UnreadableWorkbook(`Row ${number} is far below the others. Copy the rows to a sheet of their own.`);
    while (rows.length <= index) rows.push([]);
    row.eachCell((cell, columnFrom1) => {
      const column = columnFrom1 - 1;
      const read = plainCell(cell);
      if (column >= MAX_TABLE_COLUMNS) {
        isWide ||= read.value !== null && column >= 4 * MAX_TABLE_COLUMNS;
        return;
      }
      rows[index]![column] = read.value;
      if (read.kind) marks.push({ row: index, column, kind: read.kind });
    });
  });
  if (isWide) throw new UnreadableWorkbook(tooManyColumns);
  const table = trimmedTable(
    Array.from(rows, (row) => Array.from(row, (cell) => cell ?? null)),
    marks,
    firstRow,
  );
  if (table.rows.length === 0) throw new UnreadableWorkbook('The sheet is empty.');
  return table;
}

/** A cell as text or number: what the spreadsheet shows, without its format. */
function plainCell(cell: ExcelJS.Cell): { value: TableCell; kind: CellMark['kind'] | null } {
  const { value } = cell;
  if (cell.type === ExcelJS.ValueType.Merge) return { value: plainCell(cell.master).value, kind: 'merged' };
  if (cell.formula || cell.type === ExcelJS.ValueType.Formula) {
    const { result } = cell;
    return result === undefined || result === null
      ? { value: null, kind: 'formula-without-result' }
      : { value: plainValue(result), kind: result instanceof Date ? 'date' : 'formula' };
  }
  return { value: plainValue(value), kind: value instanceof Date ? 'date' : null };
}

function plainValue(value: ExcelJS.CellValue): TableCell {
  if (value === null || value === undefined) return null;
  if (typeof value === 'number') return Number.isFinite(value) ? value : null;
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? 'a date' : value.toISOString().slice(0, 10);
  return textOf(value).slice(0, MAX_CELL_LENGTH);
}

function textOf(value: Exclude<ExcelJS.CellValue, null | undefined | number | Date>): string {
  if (typeof value !== 'object') return typeof value === 'boolean' ? String(value).toUpperCase() : value;
  if ('error' in value) return String(value.error);
  if ('richText' in value) return value.richText.map(({ text }) => text).join('');
  if ('text' in value) return typeof value.text === 'string' ? value.text : textOf(value.text as ExcelJS.CellRichTextValue);
  return '';
}
