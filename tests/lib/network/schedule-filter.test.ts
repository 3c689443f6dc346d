import { describe, expect, it } from 'vitest';
import { filterOf, holdsWords } from '@/lib/network/schedule-filter';
import { scheduleOf } from '@/lib/network/schedule-rows';
import { terminalTable } from '@/lib/network/schedule-terminals';
import { totalOf } from '@/lib/network/schedule-totals';
import { noValveOffer } from '@/lib/network/schedule-valve-offer';
import { ladder } from '../../make/drawing';

const rows = scheduleOf(ladder([0.2, 0.3, 0.25]), { solve: null, balance: null }).terminals;
const column = (key: string) => terminalTable.columns.find((it) => it.key === key)!;
const passing = (key: string, typed: string, units: Record<string, string> = {}) => {
  const passes = filterOf(column(key), typed, units, { valves: noValveOffer });
  return rows.filter((row) => !passes || passes(row)).map(({ id }) => id);
};

describe('a filter above a column', () => {
  it('of words keeps the cells that hold them', () => {
    expect(passing('tag', 'fc-2')).toEqual(['FC-2']);
    expect(passing('tag', '  ')).toHaveLength(3);
  });

  it('of figures takes bounds, in the unit of the column or their own', () => {
    expect(passing('design', '>0.2')).toEqual(['FC-2', 'FC-3']);
    expect(passing('design', '>= 0,25')).toEqual(['FC-2', 'FC-3']);
    expect(passing('design', '0.2..0.25')).toEqual(['FC-1', 'FC-3']);
    expect(passing('design', '=0.9', { flow: 'm³/h' })).toEqual(['FC-3']);
    expect(passing('design', '<0.8 m3/h')).toEqual(['FC-1']);
    expect(passing('flow', '=')).toHaveLength(3);
  });

  it('that is no bound is looked for in what is read', () => {
    expect(passing('design', '.30')).toEqual(['FC-2']);
  });
});

it('the quick filter looks through all columns that are given', () => {
  expect(rows.filter((row) => holdsWords(row, '0.300', [column('tag'), column('design')], {}, { valves: noValveOffer }))).toHaveLength(1);
  expect(rows.filter((row) => holdsWords(row, '0.300', [column('tag')], {}, { valves: noValveOffer }))).toHaveLength(0);
});

it('a foot sums what there is, and says nothing where there is nothing', () => {
  expect(totalOf(column('design'), rows)).toBeCloseTo(0.75, 12);
  expect(totalOf(column('flow'), rows)).toBeNull();
  expect(totalOf(column('tag'), rows)).toBeNull();
  const flows = rows.map((row, index) => ({ ...row, percentOfDesign: [90, 100, 140][index], authority: [0.5, 0.3, 0.4][index] }));
  expect(totalOf(column('percent'), flows)).toBeCloseTo(110, 12);
  expect(totalOf(column('authority'), flows)).toBe(0.3);
});
