import { convert } from './conversion';
import { definitionOf, definitionsOf, type Quantity } from './quantities';

const stored = (quantity: Quantity) => definitionsOf(quantity)[0]!.expression;

/** A stored value in another unit of its quantity, as a number. */
export const toUnit = (quantity: Quantity, si: number, unit: string): number =>
  convert(si, stored(quantity), definitionOf(quantity, unit).expression);

/** A value in any unit of the quantity as it is stored. */
export const fromUnit = (quantity: Quantity, value: number, unit: string): number =>
  convert(value, definitionOf(quantity, unit).expression, stored(quantity));

/**
 * A stored value as a figure to read in `unit`, without the unit: always the same decimals for one unit, so that a column lines
 * up on its point. What is missing or no number is an en dash.
 */
export function formatQuantity(quantity: Quantity, si: number | null | undefined, unit: string): string {
  if (si === null || si === undefined || !Number.isFinite(si)) return '–';
  return withoutMinusZero(toUnit(quantity, si, unit).toFixed(definitionOf(quantity, unit).decimals));
}

/**
 * A stored value as it was typed in `unit`: as many digits as it was given, up to 12, so that a value typed in any unit, stored
 * and shown again in a field reads the same. Empty for null.
 */
export function typedQuantity(quantity: Quantity, si: number | null, unit: string): string {
  if (si === null || !Number.isFinite(si)) return '';
  const value = toUnit(quantity, si, unit);
  // An offset scale loses digits near its zero: nine decimals are more than any thermometer has.
  const rounded = quantity === 'temperature' ? Number(value.toFixed(9)) : Number(value.toPrecision(12));
  return withoutMinusZero(plainNotation(rounded));
}

/** Number to text without an exponent, which nobody types. */
const plainNotation = (value: number): string =>
  /e/.test(String(value)) ? value.toLocaleString('en-US', { useGrouping: false, maximumSignificantDigits: 12 }) : String(value);

const withoutMinusZero = (text: string): string => text.replace(/^-(?=0(\.0*)?$)/, '');
