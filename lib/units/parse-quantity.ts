import { fromUnit } from './format-quantity';
import { readNumber } from './number-text';
import { definitionsOf, unitsOf, type Quantity } from './quantities';

/** What was typed: its stored value, the number as typed, and the unit it was typed in; or why it cannot be used. */
export type ParsedQuantity = { ok: true; si: number; text: string; unit: string } | { ok: false; message: string };

const numberThenUnit = /^([-+\u2212]?[\d.,\s\u00a0\u2009\u202f]*)(.*)$/su;

/**
 * Reads what a person typed for a quantity. `unit` is the one shown beside the field; a unit in the text itself ("12 gpm",
 * "3,4 m3/h", "7.4kPa") goes before it. Never answers NaN; empty text is refused, so ask first whether it may be left out.
 */
export function parseQuantity(quantity: Quantity, typed: string, unit: string): ParsedQuantity {
  const [, number = '', tail = ''] = numberThenUnit.exec(typed.trim()) ?? [];
  const text = number.trim();
  if (text === '') return { ok: false, message: typed.trim() === '' ? 'A number is needed.' : `“${typed.trim()}” is not a number.` };

  const typedUnit = tail === '' ? unit : unitFromText(quantity, tail);
  if (!typedUnit) return { ok: false, message: `“${tail.trim()}” is not a unit here: use ${listed(unitsOf(quantity))}.` };

  const read = readNumber(text);
  return read.ok ? { ok: true, si: fromUnit(quantity, read.value, typedUnit), text, unit: typedUnit } : read;
}

function unitFromText(quantity: Quantity, tail: string): string | null {
  const wanted = spelling(tail);
  const found = definitionsOf(quantity).find((it) => spelling(it.unit) === wanted || it.typed.includes(wanted));
  return found?.unit ?? null;
}

const spelling = (unit: string): string => unit.toLowerCase().replace(/\s/g, '').replace('³', '3').replace('²', '2');

const listed = (units: readonly string[]): string =>
  units.length < 2 ? units.join('') : `${units.slice(0, -1).join(', ')} or ${units.at(-1)}`;
