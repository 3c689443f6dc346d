import Papa from 'papaparse';
import type { CellEdit } from './schedule-edits';

/** Cells as the table shows them: rows and columns from 0, both ends included. */
export interface CellRange {
  top: number;
  bottom: number;
  left: number;
  right: number;
}

/** What stands in the table now, in the order in which it is seen. */
export interface SeenCells {
  rowIds: readonly string[];
  keys: readonly string[];
}

export type BlockEdits = { ok: true; edits: CellEdit[] } | { ok: false; message: string };

/** Cells copied from a spreadsheet: tabs between columns, quotation marks around cells with line ends. */
export function parseBlock(text: string): string[][] {
  const { data } = Papa.parse<string[]>(text.replace(/(\r\n|\r|\n)$/, ''), { delimiter: '\t' });
  return data.map((row) => row.map((cell) => cell.replace(/^'(?=[=+\-@])/, '')));
}

/** Cells for a spreadsheet. What it would take for a formula is marked as text by an apostrophe. */
export const blockText = (rows: readonly (readonly { text: string; isFigure: boolean }[])[]): string =>
  Papa.unparse(
    rows.map((row) => row.map(({ text, isFigure }) => (!isFigure && /^[=+\-@\t\r]/.test(text) ? `'${text}` : text))),
    { delimiter: '\t', newline: '\n' },
  );

/**
 * Which cells a block changes when it is pasted at a range: from its upper left corner, or all of it where a single
 * cell was copied. A block that reaches beyond the table is refused as a whole.
 */
export function pasteEdits(block: string[][], range: CellRange, { rowIds, keys }: SeenCells): BlockEdits {
  const width = Math.max(0, ...block.map(({ length }) => length));
  if (width === 0) return { ok: false, message: 'There is nothing to paste.' };
  const isSingle = block.length === 1 && width === 1;
  const { top, left } = range;
  const bottom = isSingle ? range.bottom : top + block.length - 1;
  const right = isSingle ? range.right : left + width - 1;
  if (bottom >= rowIds.length)
    return { ok: false, message: `The block has ${counted(block.length, 'row')}; from here only ${rowIds.length - top} stand below.` };
  if (right >= keys.length)
    return { ok: false, message: `The block has ${counted(width, 'column')}; from here only ${keys.length - left} stand to the right.` };
  const edits: CellEdit[] = [];
  for (let row = top; row <= bottom; row++) {
    for (let column = left; column <= right; column++) {
      const text = isSingle ? block[0][0] : block[row - top][column - left];
      // A row that is shorter than the others says nothing of its last columns.
      if (text !== undefined) edits.push({ id: rowIds[row], key: keys[column], text });
    }
  }
  return { ok: true, edits };
}

/** What fills a range from its first row down, value by value. */
export function fillDownEdits(
  { top, bottom, left, right }: CellRange,
  { rowIds, keys }: SeenCells,
  valueOf: (id: string, key: string) => string | number | null,
): CellEdit[] {
  const edits: CellEdit[] = [];
  for (let column = left; column <= right; column++) {
    const value = valueOf(rowIds[top], keys[column]);
    for (let row = top + 1; row <= bottom; row++) edits.push({ id: rowIds[row], key: keys[column], value });
  }
  return edits;
}

const counted = (count: number, what: string) => `${count} ${what}${count === 1 ? '' : 's'}`;
