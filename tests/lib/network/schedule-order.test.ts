import { expect, it } from 'vitest';
import { compareCells, movedKey, orderedKeys } from '@/lib/network/schedule-order';

it('figures stand by size, and tags by the numbers in them', () => {
  expect([10, 9, -1].sort(compareCells)).toEqual([-1, 9, 10]);
  expect(['FC-10', 'FC-2', 'BV-1'].sort(compareCells)).toEqual(['BV-1', 'FC-2', 'FC-10']);
});

it('a column that came later than the chosen order stands behind the one it follows, and one that is gone is left out', () => {
  expect(orderedKeys(['tag', 'room', 'load', 'flow'], ['flow', 'tag', 'gone', 'load'])).toEqual(['flow', 'tag', 'room', 'load']);
  expect(orderedKeys(['tag', 'room'], [])).toEqual(['tag', 'room']);
});

it('a column moves by one place and never beyond the ends', () => {
  expect(movedKey(['a', 'b', 'c'], 'b', -1)).toEqual(['b', 'a', 'c']);
  expect(movedKey(['a', 'b', 'c'], 'c', 1)).toEqual(['a', 'b', 'c']);
});
