import { expect, it } from 'vitest';
import { nextSorting, sortRows } from '@/lib/client/sort-rows';

const own = <Value>(value: Value) => value;

it('numbers inside a tag are sorted as numbers', () => {
  expect(sortRows(['FC-10', 'FC-2', 'fc-1'], own, false)).toEqual(['fc-1', 'FC-2', 'FC-10']);
});

it('figures are sorted by size, below zero too', () => {
  expect(sortRows([10, -2, 9], own, false)).toEqual([-2, 9, 10]);
  expect(sortRows([10, -2, 9], own, true)).toEqual([10, 9, -2]);
});

it('what is missing comes last whichever way, and rows that are equal keep their order', () => {
  expect(sortRows([null, 2, null, 1], own, false)).toEqual([1, 2, null, null]);
  expect(sortRows([null, 2, null, 1], own, true)).toEqual([2, 1, null, null]);
  expect(sortRows(['', 'b', 'a'], own, true)).toEqual(['b', 'a', '']);
  const rows = [
    { id: 1, v: 5 },
    { id: 2, v: 5 },
    { id: 3, v: 4 },
  ];
  expect(sortRows(rows, ({ v }) => v, true).map(({ id }) => id)).toEqual([1, 2, 3]);
});

it('the rows that were given stay as they were', () => {
  const rows = [2, 1];
  sortRows(rows, own, false);
  expect(rows).toEqual([2, 1]);
});

it('pressing a head goes up, then down, then back to the order of the drawing', () => {
  const up = nextSorting(null, 'flow');
  const down = nextSorting(up, 'flow');
  expect([up, down, nextSorting(down, 'flow')]).toEqual([{ key: 'flow', isDescending: false }, { key: 'flow', isDescending: true }, null]);
  expect(nextSorting(down, 'drop')).toEqual({ key: 'drop', isDescending: false });
});
