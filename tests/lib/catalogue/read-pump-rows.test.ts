import { describe, expect, it } from 'vitest';
import { copiedPump, offeredValves, copiedValve } from '@/lib/catalogue/chosen-entries';
import { pumpFit } from '@/lib/catalogue/pump-fit';
import { readPumpRows } from '@/lib/catalogue/read-pump-rows';
import { pumpHeadAt } from '@/lib/hydraulics/solve-result';

const units = { flowLs: 'L/s', headM: 'm', efficiency: '%', suctionHeadM: 'm' };
const curve = [
  ['0', '20', '', ''],
  ['4', '18', '60', '1.2'],
  ['8', '12', '70', '2.5'],
  ['10', '7', '62', '4'],
];

describe('the table of a pump', () => {
  it('is read in the order of flow, in the units chosen', () => {
    const { points, faults } = readPumpRows(
      [
        ['36', '10', '0.5', ''],
        ['0', '12', '', '1'],
        ['18', '11', '0.6', ''],
      ],
      {
        flowLs: 'm³/h',
        headM: 'ft',
        efficiency: 'fraction',
        suctionHeadM: 'ft',
      },
    );
    expect(faults).toEqual([]);
    expect(points.map(({ flowLs }) => flowLs)).toEqual([0, 5, 10]);
    expect(points[0]!.headM).toBeCloseTo(12 * 0.3048, 12);
    expect(points[0]!.suctionHeadM).toBeCloseTo(0.3048, 12);
    expect(points[2]!.efficiency).toBe(0.5);
  });

  it('with a head that rises with flow is refused at that head, and a level one is not', () => {
    const rising = readPumpRows(
      [
        ['0', '10', '', ''],
        ['4', '10.5', '', ''],
        ['8', '6', '', ''],
      ],
      units,
    );
    expect(rising.faults).toEqual([{ row: 1, column: 'headM', message: expect.stringMatching(/rises with flow/) as string }]);
    expect(
      readPumpRows(
        [
          ['0', '10', '', ''],
          ['4', '10', '', ''],
          ['8', '6', '', ''],
        ],
        units,
      ).faults,
    ).toEqual([]);
  });

  it.each([
    ['1000000000', 1, 'flowLs'],
    ['twelve', 1, 'flowLs'],
    ['0', 1, 'flowLs'],
  ])('with a flow of “%s” is refused there', (flow, row, column) => {
    expect(
      readPumpRows(
        [
          ['0', '10', '', ''],
          [flow, '9', '', ''],
          ['8', '6', '', ''],
        ],
        units,
      ).faults[0],
    ).toMatchObject({ row, column });
  });

  it('asks whether efficiencies far below 1 % are fractions', () => {
    const rows = curve.map(([flow, head, eff]) => [flow!, head!, eff ? `0.${eff}` : '', '']);
    expect(readPumpRows(rows, units).faults[0]!.message).toMatch(/choose “fraction”/);
    expect(readPumpRows(rows, { ...units, efficiency: 'fraction' }).faults).toEqual([]);
  });
});

describe('the fit of a pump', () => {
  const { points } = readPumpRows(curve, units);

  it('goes through the points and is what the engine calculates with', () => {
    const { head } = pumpFit(points);
    const link = { id: 'P', kind: 'pump' as const, from: 'A', to: 'B', curve: copiedPump(points).curve };
    for (const { x, y } of head.line) expect(y).toBeCloseTo(pumpHeadAt(link, x, 1), 12);
    expect(head.line[0]).toEqual({ x: 0, y: 20 });
    expect(head.line.at(-1)).toEqual({ x: 10, y: 7 });
  });

  it('draws no line through a single figure, and none past its points', () => {
    const { efficiency, suctionHead } = pumpFit(points.map((point, i) => ({ ...point, suctionHeadM: i === 1 ? 2 : null })));
    expect(suctionHead).toEqual({ points: [{ x: 4, y: 2 }], line: [] });
    expect([efficiency.line[0]!.x, efficiency.line.at(-1)!.x]).toEqual([4, 10]);
  });
});

it('a piece takes copies: what is then changed in the catalogue does not reach it', () => {
  const family = {
    name: 'House valve',
    sizes: [
      {
        nominal: 'DN15',
        stepTurns: 0.1,
        points: [
          { setting: 1, kv: 1, measuringKv: 2 },
          { setting: 4, kv: 3, measuringKv: 2 },
        ],
      },
    ],
  };
  const [offered] = offeredValves([family]);
  expect(offered).toMatchObject({ name: 'House valve DN15', nominal: 'DN15', kvs: 3, turns: 4, stepTurns: 0.1 });
  const copy = copiedValve(offered!);
  family.sizes[0]!.points[0]!.kv = 99;
  expect(copy.kvTable[0]).toEqual({ setting: 1, kv: 1, measuringKv: 2 });
});
