import type { UnitChoice } from '@/lib/units/quantities';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { readNumber } from '@/lib/units/number-text';
import { unitFor } from '@/lib/units/quantities';
import { isFigure, type RowOf, type ScheduleColumn, type ScheduleContext } from './schedule-column';
import { cellWords } from './schedule-entry';

type Passes<Row> = (row: Row) => boolean;

/**
 * Reads what was typed above a column: words that a cell must hold, or for figures a bound (">0.5", "<= 2", "0.2..0.4",
 * "=") in the person's unit or its own. Null where everything passes.
 */
export function filterOf<Row extends RowOf<unknown>>(
  column: ScheduleColumn<Row>,
  typed: string,
  units: UnitChoice,
  context: ScheduleContext,
): Passes<Row> | null {
  const text = typed.trim().toLowerCase();
  if (text === '') return null;
  const bounds = isFigure(column) ? boundsOf(column, text, units) : null;
  if (bounds) {
    return (row) => {
      const value = column.read(row);
      return bounds(typeof value === 'number' ? value : null);
    };
  }
  return (row) => cellWords(column, row, units, context).toLowerCase().includes(text);
}

function boundsOf<Row extends RowOf<unknown>>(column: ScheduleColumn<Row>, text: string, units: UnitChoice) {
  const figure = (part: string): number | null => {
    if (column.kind === 'quantity') {
      const read = parseQuantity(column.quantity, part, unitFor(column.quantity, units));
      return read.ok ? read.si : null;
    }
    const read = readNumber(part.replace(/\s*%$/, ''));
    return read.ok ? read.value : null;
  };
  if (text === '=') return (value: number | null) => value === null;
  const between = /^(.+?)\.\.(.+)$/.exec(text);
  if (between) {
    const [least, most] = [figure(between[1]), figure(between[2])];
    return least === null || most === null ? null : (value: number | null) => value !== null && value >= least && value <= most;
  }
  const bound = /^(<=|>=|<|>|=)(.+)$/.exec(text);
  const limit = bound && figure(bound[2]);
  if (!bound || limit === null) return null;
  // What is typed has fewer digits than what is computed: a filter means the figure that is read.
  const slack = Math.abs(limit) * 1e-9;
  const compare: Record<string, (value: number) => boolean> = {
    '<': (value) => value < limit - slack,
    '<=': (value) => value <= limit + slack,
    '>': (value) => value > limit + slack,
    '>=': (value) => value >= limit - slack,
    '=': (value) => Math.abs(value - limit) <= slack,
  };
  return (value: number | null) => value !== null && compare[bound[1]](value);
}

/** Whether any of the shown columns holds the words. */
export const holdsWords = <Row extends RowOf<unknown>>(
  row: Row,
  words: string,
  columns: readonly ScheduleColumn<Row>[],
  units: UnitChoice,
  context: ScheduleContext,
): boolean => {
  const wanted = words.trim().toLowerCase();
  return wanted === '' || columns.some((column) => cellWords(column, row, units, context).toLowerCase().includes(wanted));
};
