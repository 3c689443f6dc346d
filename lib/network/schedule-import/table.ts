import { MAX_SCHEDULED_TERMINALS } from '../generate/scheduled-terminal';

/** What a cell of a schedule holds, as the file or the pasted text has it. */
export type TableCell = string | number | null;

/** A cell whose value is not simply what was typed there. `row` and `column` count from 0 within `rows`. */
export interface CellMark {
  row: number;
  column: number;
  /** A formula with its last result, one that was never calculated, the repeated value of merged cells, or a date. */
  kind: 'formula' | 'formula-without-result' | 'merged' | 'date';
}

/** A schedule as it came: rows of equal length. `firstRow` is the number that the file gives its first row, for messages. */
export interface ScheduleTable {
  rows: TableCell[][];
  marks: CellMark[];
  firstRow: number;
}

/** Room above and below the terminals for titles, heads and totals. */
export const MAX_TABLE_ROWS = MAX_SCHEDULED_TERMINALS + 200;
export const MAX_TABLE_COLUMNS = 60;
/** No name, room or figure is longer; what is, is cut here. */
export const MAX_CELL_LENGTH = 300;

/** "A" for 0, "AB" for 27, as a spreadsheet names its columns. */
export function columnLetters(column: number): string {
  const last = String.fromCharCode(65 + (column % 26));
  return column < 26 ? last : columnLetters(Math.floor(column / 26) - 1) + last;
}

/** A text in one line and without blanks around it, as every cell of a table is kept. */
export const oneLine = (text: string): string => text.replace(/\s+/g, ' ').trim();

export const cellText = (cell: TableCell | undefined): string => (cell === null || cell === undefined ? '' : String(cell));

/** The table without empty rows above and below and empty columns at the right, every row as long as the longest. */
export function trimmedTable(rows: TableCell[][], marks: CellMark[] = [], firstRow = 1): ScheduleTable {
  const cells = rows.map((row) => Array.from(row, (cell) => (typeof cell === 'string' ? oneLine(cell) : (cell ?? null))));
  const isFilled = (cell: TableCell | undefined) => cellText(cell) !== '';
  const marked = new Set(marks.filter(({ kind }) => kind === 'formula-without-result').map(({ row }) => row));
  const filled = cells.map((row, index) => marked.has(index) || row.some(isFilled));
  const first = filled.indexOf(true);
  if (first < 0) return { rows: [], marks: [], firstRow };
  const end = filled.lastIndexOf(true) + 1;
  let width = 0;
  for (const row of cells) {
    for (let column = row.length; column > width; column--) if (isFilled(row[column - 1])) width = column;
  }
  for (const { column } of marks) width = Math.max(width, column + 1);
  return {
    rows: cells.slice(first, end).map((row) => Array.from({ length: width }, (_, column) => row[column] ?? null)),
    marks: marks.filter(({ row }) => row >= first && row < end).map((mark) => ({ ...mark, row: mark.row - first })),
    firstRow: firstRow + first,
  };
}
