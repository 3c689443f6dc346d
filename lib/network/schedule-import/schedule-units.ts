import { fromUnit } from '@/lib/units/format-quantity';
import { readNumber } from '@/lib/units/number-text';
import { parseQuantity } from '@/lib/units/parse-quantity';
import { definitionsOf, storedUnitOf, unitsOf, type Quantity } from '@/lib/units/quantities';
import { cellText, type TableCell } from './table';

/** The quantities that a terminal schedule has columns of. */
export type ScheduleQuantity = Extract<Quantity, 'flow' | 'power' | 'pressure' | 'temperature'>;

/** A unit that schedules are written in and nobody works in, so that it is no choice of a person's: its factor to the stored unit. */
interface ScheduleUnit {
  unit: string;
  factor: number;
  typed: readonly string[];
}

/** Btu by the international table, 1055.05585262 J; a ton of refrigeration is 12,000 Btu/h (NIST SP 811, appendix B). */
const BTU_H_KW = 1055.05585262 / 3600 / 1000;

const further: Record<ScheduleQuantity, readonly ScheduleUnit[]> = {
  flow: [
    { unit: 'L/min', factor: 1 / 60, typed: ['lpm', 'l/m'] },
    { unit: 'L/h', factor: 1 / 3600, typed: ['lph', 'l/hr'] },
  ],
  power: [
    { unit: 'W', factor: 1 / 1000, typed: ['watt', 'watts'] },
    { unit: 'Btu/h', factor: BTU_H_KW, typed: ['btuh', 'btu/hr'] },
    { unit: 'MBH', factor: 1000 * BTU_H_KW, typed: ['mbtu/h', 'kbtu/h'] },
    { unit: 'tons', factor: 12000 * BTU_H_KW, typed: ['ton', 'tr'] },
  ],
  pressure: [
    { unit: 'Pa', factor: 1 / 1000, typed: [] },
    { unit: 'bar', factor: 100, typed: [] },
  ],
  temperature: [],
};

/** The units that a column may be in, the stored one first. */
export const scheduleUnitsOf = (quantity: ScheduleQuantity): string[] => [
  ...unitsOf(quantity),
  ...further[quantity].map(({ unit }) => unit),
];

const spelling = (text: string): string =>
  text
    .toLowerCase()
    .replace(/[\s.]/g, '')
    .replaceAll('³', '3')
    .replaceAll('²', '2')
    .replace(/^deg/, '')
    .replace('º', '°')
    .replace(/^litres?|^liters?/, 'l');

/** The unit that a text names, or null where it names none of this quantity. */
export function unitNamed(quantity: ScheduleQuantity, text: string): string | null {
  const wanted = spelling(text);
  if (wanted === '') return null;
  const isNamed = (unit: string, typed: readonly string[]) => [unit, ...typed].some((name) => spelling(name) === wanted);
  const known = definitionsOf(quantity).find(({ unit, typed }) => isNamed(unit, typed));
  return known?.unit ?? further[quantity].find(({ unit, typed }) => isNamed(unit, typed))?.unit ?? null;
}

/** What a cell means in the stored unit, or why it cannot be used. `ownUnit` is what the cell itself names, against the column. */
export type ReadFigure = { ok: true; si: number; ownUnit: string | null } | { ok: false; message: string };

const numberThenUnit = /^([-+\u2212]?[\d.,\s\u00a0\u2009\u202f]*)(.*)$/su;

/** Reads one cell of a column in `unit`; "12 gpm" goes before the column's unit. `decimalMark` is what the column shows, where it does. */
export function readFigure(quantity: ScheduleQuantity, cell: TableCell, unit: string, decimalMark: DecimalMark): ReadFigure {
  if (typeof cell === 'number') return Number.isFinite(cell) ? stored(quantity, cell, unit, null) : { ok: false, message: 'No number.' };
  const [, written = '', tail = ''] = numberThenUnit.exec(cellText(cell)) ?? [];
  if (written.trim() === '') return { ok: false, message: `“${cellText(cell)}” is not a number.` };
  const ownUnit = tail.trim() === '' ? null : unitNamed(quantity, tail);
  // The message of lib/units names the units that are.
  if (tail.trim() !== '' && ownUnit === null) {
    const parsed = parseQuantity(quantity, cellText(cell), storedUnitOf(quantity));
    if (!parsed.ok) return parsed;
  }
  const number = readNumber(withoutDoubt(written.trim(), decimalMark));
  return number.ok ? stored(quantity, number.value, ownUnit ?? unit, ownUnit === unit ? null : ownUnit) : number;
}

function stored(quantity: ScheduleQuantity, value: number, unit: string, ownUnit: string | null): ReadFigure {
  const own = further[quantity].find((it) => it.unit === unit);
  return { ok: true, si: own ? value * own.factor : fromUnit(quantity, value, unit), ownUnit };
}

/** What stands before the decimals in a column; null where its cells leave it open. */
export type DecimalMark = ',' | '.' | null;

const surelyComma = /^[-+]?(0?,\d+|\d+,\d{1,2}|\d+,\d{4,}|\d{4,},\d+|\d{1,3}(\.\d{3})+,\d+)(?![\d.,])/;
const surelyPoint = /^[-+]?(0?\.\d+|\d+\.\d{1,2}|\d+\.\d{4,}|\d{4,}\.\d+|\d{1,3}(,\d{3})+\.\d+)(?![\d.,])/;

/** Whether the cells of a column are written with a decimal comma or point: one cell that can be read one way only decides for all. */
export function decimalMarkOf(cells: readonly TableCell[]): DecimalMark {
  let found: DecimalMark = null;
  for (const cell of cells) {
    if (typeof cell !== 'string') continue;
    const mark = surelyComma.test(cell.trim()) ? ',' : surelyPoint.test(cell.trim()) ? '.' : null;
    if (mark !== null && found !== null && mark !== found) return null;
    found = mark ?? found;
  }
  return found;
}

/** "1,250" in a column of decimal commas is one and a quarter, in one of decimal points over a thousand. */
function withoutDoubt(written: string, decimalMark: DecimalMark): string {
  if (decimalMark === ',' && /^\d{1,3},\d{3}$/.test(written)) return written.replace(',', '.');
  if (decimalMark === '.' && /^\d{1,3}(,\d{3})+$/.test(written)) return written.replaceAll(',', '');
  if (decimalMark === ',' && /^\d{1,3}(\.\d{3})+$/.test(written)) return written.replaceAll('.', '');
  return written;
}
