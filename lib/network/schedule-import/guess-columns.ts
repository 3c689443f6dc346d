import { unitFor, type UnitChoice } from '@/lib/units/quantities';
import { meaningOf, meanings, type Meaning } from './meanings';
import { unitNamed, type ScheduleQuantity } from './schedule-units';
import { cellText, columnLetters, type ScheduleTable, type TableCell } from './table';

/** Where one quantity of a terminal is found: its column, the column's unit, and what holds where a cell is empty. */
export interface ColumnChoice {
  column: number | null;
  /** Null for what has no unit. */
  unit: string | null;
  /** As typed; read in `unit`. '' where nothing is to be assumed. */
  whenEmpty: string;
}

export type ColumnMap = Record<Meaning, ColumnChoice>;

/** How a table is to be read: the row that holds its heads (null for none), the first row of terminals, and its columns. */
export interface TableReading {
  headRow: number | null;
  firstRow: number;
  columns: ColumnMap;
}

const quantities = ['flow', 'power', 'pressure', 'temperature'] as const satisfies readonly ScheduleQuantity[];
/** A head stands near the top; below that a row of words is a terminal. */
const LAST_HEAD_ROW = 30;

interface Head {
  words: string;
  unit: { quantity: ScheduleQuantity; unit: string } | null;
}

/** The head "Flow (L/s)" as its words and its unit; "gpm" alone is a unit without words. */
export function readHead(cell: TableCell | undefined): Head {
  const text = cellText(cell);
  const bracketed = /[([{]([^)\]}]*)[)\]}]/.exec(text);
  const afterMark = /[,/:–-]\s*([^,]+)$/.exec(text);
  const candidates: [unit: string | undefined, words: string][] = [
    [bracketed?.[1], text.replace(bracketed?.[0] ?? '', ' ')],
    [text, ''],
    [afterMark?.[1], text.slice(0, afterMark?.index)],
    ...lastWords(text),
  ];
  for (const [named, words] of candidates) {
    const unit = named === undefined ? null : anyUnit(named);
    if (unit) return { words: plain(words), unit };
  }
  return { words: plain(text), unit: null };
}

/** "Design flow L/s" and "Flow US gpm": the unit as the last word or two. */
function lastWords(text: string): [string, string][] {
  const words = text.split(' ');
  return [2, 1].filter((count) => words.length > count).map((count) => [words.slice(-count).join(' '), words.slice(0, -count).join(' ')]);
}

function anyUnit(text: string): Head['unit'] {
  // "m" and "ft" are heads of water only to a column that is known to be a drop; alone they are lengths.
  if (/^['"′″]?(m|ft|c|f|t|in)?$/i.test(text.trim())) return null;
  for (const quantity of quantities) {
    const unit = unitNamed(quantity, text);
    if (unit) return { quantity, unit };
  }
  return null;
}

const plain = (text: string): string =>
  text
    .toLowerCase()
    .replaceAll('δp', 'dp')
    .replace(/[_.:;,()[\]{}#*/\\-]+/g, ' ')
    .replace(/\s+/g, ' ')
    .trim();

/** How surely a head has a meaning; 0 where it has not. */
function sureness({ words, unit }: Head, meaning: Meaning): number {
  const { quantity, words: patterns, not } = meaningOf[meaning];
  if (unit && unit.quantity !== quantity) return 0;
  if (not?.test(words)) return 0;
  const place = patterns.findIndex((pattern) => pattern.test(words));
  const byWords = place < 0 ? 0 : 10 - place;
  if (!unit) return byWords;
  // A unit alone tells a load, a flow and a drop, but not which of two temperatures.
  return byWords > 0 ? byWords + 5 : quantity === 'temperature' || words !== '' ? 0 : 3;
}

/** For each meaning the column whose head says it most surely; a column has one meaning. */
function columnsByHeads(heads: Head[]): Map<Meaning, number> {
  const ranked = meanings
    .flatMap((meaning) => heads.map((head, column) => ({ meaning, column, score: sureness(head, meaning) })))
    .filter(({ score }) => score > 0)
    .sort((a, b) => b.score - a.score || a.column - b.column);
  const found = new Map<Meaning, number>();
  const taken = new Set<number>();
  for (const { meaning, column } of ranked) {
    if (found.has(meaning) || taken.has(column)) continue;
    found.set(meaning, column);
    taken.add(column);
  }
  return found;
}

/** Guesses head row, columns and units of a table; `choice` is what the person reads in, taken where no head names a unit. */
export function guessReading(table: ScheduleTable, choice: UnitChoice): TableReading {
  let headRow: number | null = null;
  let mostFound = 1;
  for (let row = 0; row < Math.min(table.rows.length, LAST_HEAD_ROW); row++) {
    const found = columnsByHeads(table.rows[row]!.map(readHead)).size;
    if (found > mostFound) [headRow, mostFound] = [row, found];
  }
  return readingWithHead(table, headRow, choice);
}

/** The reading that follows from the row of heads that a person chose. */
export function readingWithHead(table: ScheduleTable, headRow: number | null, choice: UnitChoice): TableReading {
  const heads = headRow === null ? [] : table.rows[headRow]!.map(readHead);
  const unitRow = headRow === null ? null : unitsBelow(table, headRow);
  if (unitRow) heads.forEach((head, column) => (head.unit ??= unitRow[column] ?? null));
  const found = columnsByHeads(heads);
  const columns = Object.fromEntries(
    meanings.map((meaning): [Meaning, ColumnChoice] => {
      const { quantity } = meaningOf[meaning];
      const column = found.get(meaning) ?? null;
      const named = column === null ? null : heads[column]!.unit;
      const unit = quantity && (named?.quantity === quantity ? named.unit : unitFor(quantity, choice));
      return [meaning, { column, unit, whenEmpty: '' }];
    }),
  ) as ColumnMap;
  return { headRow, firstRow: headRow === null ? 0 : headRow + (unitRow ? 2 : 1), columns };
}

/** A second row of heads that holds nothing but units. */
function unitsBelow(table: ScheduleTable, headRow: number): Head['unit'][] | null {
  const cells = table.rows[headRow + 1]?.map(cellText) ?? [];
  const units = cells.map((text) => anyUnit(text.replace(/^[([]|[)\]]$/g, '')));
  const filled = cells.filter((text) => text !== '').length;
  return filled > 0 && units.filter(Boolean).length >= filled / 2 && units.filter(Boolean).length > 0 ? units : null;
}

/** What a column is called in a list to choose from. */
export function columnName({ rows }: ScheduleTable, headRow: number | null, column: number): string {
  const head = headRow === null ? '' : cellText(rows[headRow]?.[column]);
  return head === '' ? `Column ${columnLetters(column)}` : `${columnLetters(column)}: ${head}`;
}

/** The same for two schedules with the same heads, in the same order: what a remembered choice of columns is kept under. */
export const headSignature = ({ rows }: ScheduleTable, headRow: number | null): string =>
  headRow === null
    ? `no heads, ${rows[0]?.length ?? 0} columns`
    : (rows[headRow] ?? []).map((cell) => cellText(cell).toLowerCase()).join('|');
