import type { CellValue } from './schedule-column';

const words = new Intl.Collator('en', { numeric: true, sensitivity: 'base' });

/** The order of two cells of a column: figures by size, words with their numbers by size ("FC-2" before "FC-10"). */
export const compareCells = (a: CellValue, b: CellValue): number =>
  typeof a === 'number' && typeof b === 'number' ? a - b : words.compare(String(a ?? ''), String(b ?? ''));

/** Columns in the order that a person chose; those they never placed come where they stand by default, after the one before them. */
export function orderedKeys(all: readonly string[], chosen: readonly string[]): string[] {
  const order = chosen.filter((key) => all.includes(key));
  all.forEach((key, index) => {
    if (order.includes(key)) return;
    const before = index === 0 ? -1 : order.indexOf(all[index - 1]);
    order.splice(before + 1, 0, key);
  });
  return order;
}

/** The order with one column a place earlier or later among those that are shown. */
export function movedKey(order: readonly string[], key: string, by: -1 | 1): string[] {
  const from = order.indexOf(key);
  const to = from + by;
  if (from < 0 || to < 0 || to >= order.length) return [...order];
  const next = [...order];
  next[from] = order[to];
  next[to] = key;
  return next;
}
