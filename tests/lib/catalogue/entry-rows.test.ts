import fc from 'fast-check';
import { expect, it } from 'vitest';
import { linearTicks, logTicks } from '@/lib/catalogue/axis-ticks';
import { rowsOfPump, rowsOfSizes } from '@/lib/catalogue/entry-rows';
import { readPumpRows } from '@/lib/catalogue/read-pump-rows';
import { readValveRows } from '@/lib/catalogue/read-valve-rows';
import { uploadedCells } from '@/lib/catalogue/uploaded-cells';

const units = {
  setting: 'turns',
  kv: 'Kv',
  measuringKv: 'Kv',
  step: 'turns',
  flowLs: 'L/s',
  headM: 'm',
  efficiency: '%',
  suctionHeadM: 'm',
};

it('a stored family opens as a table that means the same: plain, with a fixed orifice, and with one by setting', () => {
  const points = [
    { setting: 0.5, kv: 0.131 },
    { setting: 4, kv: 2.4 },
  ];
  const sizes = [
    { nominal: 'DN15', stepTurns: 0.1, points: points.map((point) => ({ ...point, measuringKv: 1.9 })) },
    { nominal: 'DN20', stepTurns: null, points },
    { nominal: 'DN25', stepTurns: null, points: points.map((point, i) => ({ ...point, measuringKv: 3 + i })) },
  ];
  expect(readValveRows(rowsOfSizes(sizes, units), units)).toEqual({ sizes, faults: [] });
  const inCv = { ...units, kv: 'Cv', measuringKv: 'Cv' };
  const again = readValveRows(rowsOfSizes(sizes, inCv), inCv);
  expect(again.faults).toEqual([]);
  again.sizes.forEach((size, i) => size.points.forEach(({ kv }, j) => expect(kv).toBeCloseTo(sizes[i]!.points[j]!.kv, 9)));
});

it('a stored pump opens as a table that means the same', () => {
  const points = [
    { flowLs: 0, headM: 12, efficiency: null, suctionHeadM: null },
    { flowLs: 2.5, headM: 11.25, efficiency: 0.605, suctionHeadM: 1.1 },
    { flowLs: 5, headM: 7, efficiency: 0.55, suctionHeadM: 2.4 },
  ];
  expect(readPumpRows(rowsOfPump(points, units), units)).toEqual({ points, faults: [] });
});

it('an uploaded figure loses what binary sums left behind it; formulas and merged cells are told', () => {
  const { cells, remarks } = uploadedCells({
    rows: [['DN15', 0.1 + 0.2, null]],
    firstRow: 1,
    marks: [
      { row: 0, column: 0, kind: 'merged' },
      { row: 0, column: 1, kind: 'formula' },
      { row: 0, column: 2, kind: 'formula-without-result' },
    ],
  });
  expect(cells).toEqual([['DN15', '0.3', 'formula without a result']]);
  expect(remarks).toHaveLength(2);
  expect(readValveRows([['DN15', '0.3', cells[0]![2]!]], units).faults[0]).toMatchObject({ row: 0, column: 'kv' });
});

it('an axis begins at or below its figures, ends at or above them, and has few ticks', () => {
  expect(linearTicks(14.8)).toEqual([0, 5, 10, 15]);
  expect(logTicks(0.13, 33)).toEqual([0.1, 1, 10, 100]);
  expect(logTicks(3, 60)).toEqual([2, 5, 10, 20, 50, 100]);
  fc.assert(
    fc.property(fc.double({ min: 1e-6, max: 1e8, noNaN: true }), fc.double({ min: 1, max: 1e6, noNaN: true }), (smallest, ratio) => {
      const largest = smallest * ratio;
      const linear = linearTicks(largest);
      expect(linear.at(-1)! * (1 + 1e-9)).toBeGreaterThanOrEqual(largest);
      expect(linear.length).toBeLessThanOrEqual(7);
      const ticks = logTicks(smallest, largest);
      expect(ticks[0]!).toBeLessThanOrEqual(smallest * (1 + 1e-9));
      expect(ticks.at(-1)!).toBeGreaterThanOrEqual(largest * (1 - 1e-9));
    }),
  );
});
