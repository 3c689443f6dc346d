export interface Sorting {
  key: string;
  isDescending: boolean;
}

const words = new Intl.Collator('en', { numeric: true, sensitivity: 'base' });

/** Rows in order of a value: figures by size, words with their numbers by size ("FC-2" before "FC-10"), what is missing last either way. */
export function sortRows<Row>(rows: readonly Row[], sortBy: (row: Row) => string | number | null, isDescending: boolean): Row[] {
  const direction = isDescending ? -1 : 1;
  return [...rows].sort((a, b) => {
    const [left, right] = [sortBy(a), sortBy(b)];
    if (left === null || left === '') return right === null || right === '' ? 0 : 1;
    if (right === null || right === '') return -1;
    return direction * (typeof left === 'number' && typeof right === 'number' ? left - right : words.compare(String(left), String(right)));
  });
}

/** A press on a head: up, then down, then as drawn. */
export function nextSorting(sorting: Sorting | null, key: string): Sorting | null {
  if (sorting?.key !== key) return { key, isDescending: false };
  return sorting.isDescending ? null : { key, isDescending: true };
}
