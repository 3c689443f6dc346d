import { unitInHeading, type FigureColumn } from './figure-columns';

export const MOST_ROWS = 1000;
const HEADING_ROWS = 20;

export type PlacedTable =
  | {
      ok: true;
      /** Cells in the order of the columns asked for. */
      rows: string[][];
      /** Units that the headings name, by column. */
      units: Record<string, string>;
      /** Headings of columns that nothing was made of. */
      leftAside: string[];
    }
  | { ok: false; message: string };

/**
 * Finds the columns of a file's or the clipboard's table among those asked for: by their headings where it has any, else in order. A chart
 * with settings down the side and one column a size is turned into rows of size, setting and Kv.
 */
export function placeTable(table: readonly (readonly string[])[], columns: readonly FigureColumn[]): PlacedTable {
  const filled = table.map((row) => row.map((cell) => cell.trim())).filter((row) => row.some(Boolean));
  if (filled.length === 0) return { ok: false, message: 'There is nothing in this table.' };
  const chart = columns.some(({ key }) => key === 'nominal') ? chartOfSizes(filled) : null;
  const placed = chart ?? byHeading(filled, columns) ?? inOrder(filled, columns);
  if (!placed.ok || placed.rows.length <= MOST_ROWS) return placed;
  return { ok: false, message: `The table has ${placed.rows.length} rows; the catalogue takes up to ${MOST_ROWS} at once.` };
}

function byHeading(filled: string[][], columns: readonly FigureColumn[]): PlacedTable | null {
  for (const [at, row] of filled.slice(0, HEADING_ROWS).entries()) {
    const found = new Map<string, number>();
    row.forEach((cell, index) => {
      const column = columns.find(({ key, heading }) => !found.has(key) && heading.test(cell.toLowerCase()));
      if (column) found.set(column.key, index);
    });
    const required = columns.filter(({ isRequired, quantity }) => isRequired && quantity !== 'words');
    if (found.size < 2 || !required.some(({ key }) => found.has(key))) continue;
    const missing = required.filter(({ key }) => !found.has(key));
    if (missing.length)
      return {
        ok: false,
        message: `The table has no column headed “${missing[0]!.label}”: its headings are ${row.filter(Boolean).join(', ')}.`,
      };
    const units = Object.fromEntries(
      columns.flatMap((column) => {
        const index = found.get(column.key);
        const unit = index === undefined ? null : unitInHeading(column, row[index]!);
        return unit ? [[column.key, unit]] : [];
      }),
    );
    const taken = new Set(found.values());
    return {
      ok: true,
      rows: filled.slice(at + 1).map((cells) => columns.map(({ key }) => (found.has(key) ? (cells[found.get(key)!] ?? '') : ''))),
      units,
      leftAside: row.filter((cell, index) => cell && !taken.has(index)),
    };
  }
  return null;
}

/** Without headings: in the order of the columns; a table too narrow to begin with words begins with the first figure. */
function inOrder(filled: string[][], columns: readonly FigureColumn[]): PlacedTable {
  const width = Math.max(...filled.map((row) => row.length));
  const words = columns[0]!.quantity === 'words' && width === 2 ? 1 : 0;
  return {
    ok: true,
    rows: filled.map((row) => columns.map((_, index) => row[index - words] ?? '')),
    units: {},
    leftAside: width > columns.length ? [`${width - columns.length} columns on the right`] : [],
  };
}

const settingHeading = /^(setting|turns?|position|pre-?setting|hand ?wheel)/i;
const sizeHeading = /^(dn ?\d+|\d+([ -]\d\/\d|\/\d)? ?(mm|in|"|″)?)$/i;

/** Settings down the side, a size a column, Kv in the cells; empty cells are settings that a size has not. */
function chartOfSizes(filled: string[][]): PlacedTable | null {
  const at = filled
    .slice(0, HEADING_ROWS)
    .findIndex(
      (row) => settingHeading.test(row[0] ?? '') && row.length > 1 && row.slice(1).every((cell) => cell === '' || sizeHeading.test(cell)),
    );
  if (at < 0) return null;
  const sizes = filled[at]!;
  const body = filled.slice(at + 1);
  const rows = sizes.flatMap((size, index) =>
    index === 0 || !size ? [] : body.flatMap((row) => (row[index] ? [[size, row[0] ?? '', row[index], '', '']] : [])),
  );
  return { ok: true, rows, units: {}, leftAside: [] };
}
