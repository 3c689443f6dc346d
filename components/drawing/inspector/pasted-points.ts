import { parseQuantity } from '@/lib/units/parse-quantity';
import type { Quantity } from '@/lib/units/quantities';
import { readNumber } from '@/lib/units/number-text';

export interface PointColumn {
  key: string;
  label: string;
  /** Null: a plain number. */
  quantity: Quantity | null;
  unit: string;
}

/** Rows of figures out of a spreadsheet: cells parted by tabs or semicolons; a row of words (a heading) is passed over. Null where it is no table. */
export function pastedPoints(text: string, columns: PointColumn[]): Record<string, number>[] | null {
  if (!/[\t\n;]/.test(text.trim())) return null;
  const points: Record<string, number>[] = [];
  for (const line of text.trim().split(/\r?\n/)) {
    const cells = line.split(/[\t;]/).map((cell) => cell.trim());
    const values = columns.map((column, i) => readCell(cells[i] ?? '', column));
    if (values.every((value) => value !== null)) points.push(Object.fromEntries(columns.map(({ key }, i) => [key, values[i] as number])));
  }
  return points.length ? points : null;
}

function readCell(text: string, { quantity, unit }: PointColumn): number | null {
  if (quantity) {
    const parsed = parseQuantity(quantity, text, unit);
    return parsed.ok ? parsed.si : null;
  }
  const read = readNumber(text);
  return read.ok ? read.value : null;
}
