import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { valveFamilySchema } from '@/lib/api/catalogue';
import { readValveRows } from '@/lib/catalogue/read-valve-rows';

const units = { setting: 'turns', kv: 'Kv', measuringKv: 'Kv', step: 'turns' };
const read = (...rows: string[][]) => readValveRows(rows, units);

describe('the table of a valve family', () => {
  it('makes a size of each name, an empty one going on with the size above, settings in order', () => {
    const { sizes, faults } = read(
      ['DN15', '1', '0,8', '', '0.1'],
      ['', '4', '2.4'],
      ['', '2', '1.5'],
      ['DN20', '1', '1.1'],
      ['DN20', '4', '5'],
    );
    expect(faults).toEqual([]);
    expect(sizes).toEqual([
      {
        nominal: 'DN15',
        stepTurns: 0.1,
        points: [
          { setting: 1, kv: 0.8 },
          { setting: 2, kv: 1.5 },
          { setting: 4, kv: 2.4 },
        ],
      },
      {
        nominal: 'DN20',
        stepTurns: null,
        points: [
          { setting: 1, kv: 1.1 },
          { setting: 4, kv: 5 },
        ],
      },
    ]);
  });

  it('takes a measuring Kv in the first row of a size for a fixed orifice, and else asks for one at every setting', () => {
    expect(read(['DN15', '1', '0.8', '1.9'], ['', '4', '2.4', '']).sizes[0]!.points).toEqual([
      { setting: 1, kv: 0.8, measuringKv: 1.9 },
      { setting: 4, kv: 2.4, measuringKv: 1.9 },
    ]);
    const some = read(['DN15', '1', '0.8', ''], ['', '2', '1.5', '1.9'], ['', '4', '2.4', '']);
    expect(some.faults.map(({ row, column }) => [row, column])).toEqual([
      [0, 'measuringKv'],
      [2, 'measuringKv'],
    ]);
  });

  it('keeps a Cv as the Kv it is', () => {
    const { sizes } = readValveRows(
      [
        ['DN15', '1', '1.1561'],
        ['', '2', '2.3122'],
      ],
      { ...units, kv: 'Cv' },
    );
    expect(sizes[0]!.points[0]!.kv).toBeCloseTo(1, 4);
    expect(sizes[0]!.points[1]!.kv).toBeCloseTo(2, 4);
  });

  it.each([
    ['words where a figure belongs', ['DN15', '3', 'open'], 'kv', /not a number/],
    ['a formula', ['DN15', '3', '=A1*2'], 'kv', /not a number/],
    ['a Kv of 1e9', ['DN15', '3', '1000000000'], 'kv', /50000/],
    ['a number that can be read two ways', ['DN15', '3', '1,250'], 'kv', /two ways/],
    ['a missing figure', ['DN15', '3', ''], 'kv', /missing/],
    ['a negative setting', ['DN15', '-1', '0.1'], 'setting', /0 to 1000/],
    ['a setting that stands there twice', ['DN15', '2', '3'], 'setting', /twice/],
    ['a Kv that falls as the valve opens', ['DN15', '3', '1.2'], 'kv', /must rise/],
    ['a step of nothing', ['DN15', '3', '2', '', '0'], 'step', /above 0/],
  ])('names the cell that holds %s', (_, row, column, message) => {
    const { faults } = read(['DN15', '1', '0.8'], ['DN15', '2', '1.5'], row);
    expect(faults).toHaveLength(1);
    expect(faults[0]).toMatchObject({ row: 2, column });
    expect(faults[0]!.message).toMatch(message);
  });

  it('wants two settings of each size, a size for each row, and some rows', () => {
    expect(read(['DN15', '1', '0.8']).faults).toEqual([{ row: 0, column: 'setting', message: 'DN15: A size needs two settings or more.' }]);
    expect(read(['', '1', '0.8'], ['', '2', '1']).faults[0]).toMatchObject({ row: 0, column: 'nominal' });
    expect(read(['', '', '']).faults).toHaveLength(1);
  });

  it('never lets through what the server would refuse, whatever the cells hold', () => {
    const cell = fc.oneof(
      fc.constantFrom('', 'DN15', 'DN20', '1', '2', '3.5', '1e9', '-1', '=1+1', '1,5', '999999999'),
      fc.string({ maxLength: 5 }),
    );
    fc.assert(
      fc.property(fc.array(fc.array(cell, { minLength: 5, maxLength: 5 }), { maxLength: 8 }), (rows) => {
        const { sizes, faults } = readValveRows(rows, units);
        if (faults.length === 0) expect(valveFamilySchema.safeParse({ name: 'A', source: 'B', sizes }).success).toBe(true);
      }),
      { numRuns: 2000 },
    );
  });
});
