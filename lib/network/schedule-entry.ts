import type { z } from 'zod';
import { formatQuantity, toUnit, typedQuantity } from '@/lib/units/format-quantity';
import { readNumber } from '@/lib/units/number-text';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { unitFor, type UnitChoice } from '@/lib/units/quantities';
import type { CellValue, Option, RowOf, ScheduleColumn, ScheduleContext } from './schedule-column';

export type ReadEntry = { ok: true; value: CellValue } | { ok: false; message: string };

const refused = (message: string): ReadEntry => ({ ok: false, message });

/**
 * Reads what was typed or pasted into a cell: figures in the person's unit or their own ("12 gpm", "3,4"), choices by
 * their words. Ranges are those of the drawing.
 */
export function readEntry<Row extends RowOf<unknown>>(
  column: ScheduleColumn<Row>,
  item: Row['item'],
  typed: string,
  { units, context }: { units: UnitChoice; context: ScheduleContext },
): ReadEntry {
  const text = typed.trim();
  if (column.kind === 'text') {
    const most = column.longest ?? 200;
    return text.length > most ? refused(`Longer than ${most} characters.`) : { ok: true, value: text };
  }
  if (column.kind === 'choice') return readChoice(column.options(item, context), text);
  if (text === '' || text === '–' || isEmptyWord(column, text)) return inRange(column, null, units);
  if (column.kind === 'quantity') {
    const read = parseQuantity(column.quantity, text, unitFor(column.quantity, units));
    return read.ok ? inRange(column, read.si, units) : refused(read.message);
  }
  const read = readNumber(column.unit === '%' ? text.replace(/\s*%$/, '') : text);
  return read.ok ? inRange(column, read.value, units) : refused(read.message);
}

/** Of columns whose empty cells say something: "open" is read as nothing. */
const isEmptyWord = <Row extends RowOf<unknown>>({ emptyWord }: ScheduleColumn<Row>, text: string) =>
  emptyWord !== undefined && /^(open|none)$/i.test(text);

const plain = (text: string) => text.toLowerCase().replace(/\s/g, '');

function readChoice(options: readonly Option[], text: string): ReadEntry {
  if (options.length === 0) return refused('There is nothing to choose here.');
  const wanted = plain(text);
  const found = options.find(([value, words]) => plain(value) === wanted || plain(words) === wanted || plain(value) === `dn${wanted}`);
  if (found) return { ok: true, value: found[0] };
  const words = options.slice(0, 6).map((option) => option[1]);
  return refused(`${text === '' ? 'Nothing' : `“${text}”`} is none of the choices: ${words.join(', ')}${options.length > 6 ? ' …' : ''}.`);
}

/** A value of a figure's column against the range that the drawing allows, told in the unit that the column is read in. */
function inRange<Row extends RowOf<unknown>>(
  column: Extract<ScheduleColumn<Row>, { kind: 'quantity' | 'number' }>,
  value: number | null,
  units: UnitChoice,
): ReadEntry {
  const checked = column.range?.safeParse(value);
  if (!checked || checked.success) return { ok: true, value };
  if (value === null) return refused('A figure is needed here.');
  const unit = column.kind === 'quantity' ? unitFor(column.quantity, units) : column.unit;
  const shown = (limit: number) => {
    const own = column.kind === 'quantity' ? Number(toUnit(column.quantity, limit, unit!).toPrecision(6)) : limit;
    return `${own}${unit ? ` ${unit}` : ''}`;
  };
  return refused(rangeWords(checked.error.issues[0], shown));
}

function rangeWords(issue: z.core.$ZodIssue, shown: (limit: number) => string): string {
  if (issue.code === 'too_small')
    return issue.inclusive ? `${shown(Number(issue.minimum))} or more.` : `Above ${shown(Number(issue.minimum))}.`;
  if (issue.code === 'too_big') return `At most ${shown(Number(issue.maximum))}.`;
  return issue.message;
}

/** A cell as it is read: fixed decimals in the person's unit. */
export function cellWords<Row extends RowOf<unknown>>(
  column: ScheduleColumn<Row>,
  row: Row,
  units: UnitChoice,
  context: ScheduleContext,
): string {
  const value = column.read(row);
  if (value === null) return column.emptyWord?.(row) ?? '';
  if (column.kind === 'quantity') return formatQuantity(column.quantity, Number(value), unitFor(column.quantity, units));
  if (column.kind === 'number') return Number(value).toFixed(column.decimals);
  if (column.kind === 'choice') return column.options(row.item, context).find(([key]) => key === value)?.[1] ?? String(value);
  return String(value);
}

/** A cell as it is typed: every digit that it was given. */
export function typedWords<Row extends RowOf<unknown>>(
  column: ScheduleColumn<Row>,
  row: Row,
  units: UnitChoice,
  context: ScheduleContext,
): string {
  const value = column.read(row);
  if (typeof value !== 'number') return value === null ? '' : cellWords(column, row, units, context);
  if (column.kind === 'quantity') return typedQuantity(column.quantity, value, unitFor(column.quantity, units));
  return String(Number(value.toPrecision(12)));
}

/** The unit in the head of a column; null where its cells have none. */
export const unitOfColumn = <Row extends RowOf<unknown>>(column: ScheduleColumn<Row>, units: UnitChoice): string | null =>
  column.kind === 'quantity' ? unitFor(column.quantity, units) : column.kind === 'number' ? column.unit : null;
