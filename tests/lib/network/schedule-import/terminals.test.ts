import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { DrawingFluid } from '@/lib/network/drawing';
import { scheduledTerminalSchema } from '@/lib/network/generate/scheduled-terminal';
import { readDelimitedText } from '@/lib/network/schedule-import/delimited-text';
import { exampleSchedule } from '@/lib/network/schedule-import/example-schedule';
import { guessReading, type TableReading } from '@/lib/network/schedule-import/guess-columns';
import { meanings, type Meaning } from '@/lib/network/schedule-import/meanings';
import { cellKey, noCorrections, readTerminals, type Corrections, type ReadRow } from '@/lib/network/schedule-import/read-terminals';
import { scheduleUnitsOf } from '@/lib/network/schedule-import/schedule-units';
import { trimmedTable, type CellMark, type TableCell } from '@/lib/network/schedule-import/table';
import { meaningOf } from '@/lib/network/schedule-import/meanings';

const water: DrawingFluid = { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 };
const heads: TableCell[] = ['Tag', 'Storey', 'Load (kW)', 'Flow (L/s)', 'Coil drop (kPa)', 'Supply (°C)', 'Return (°C)'];

function read(rows: TableCell[][], { corrections = noCorrections, marks = [] as CellMark[], head = heads } = {}): ReadRow[] {
  const table = trimmedTable([head, ...rows], marks);
  return readTerminals(table, guessReading(table, {}), water, corrections);
}

const faultsOf = (row: ReadRow | undefined) => row?.faults.map(({ meaning, severity }) => `${severity} in ${meaning}`);
const good: TableCell[] = ['FC-1', 'Level 1', null, 0.2, 14];
const withCell = (meaning: Meaning, cell: TableCell): TableCell[] => {
  const column = { tag: 0, storey: 1, load: 2, flow: 3, coilDrop: 4, supply: 5, return: 6 }[meaning as 'tag'];
  return Object.assign([...good, null, null], { [column]: cell });
};

describe('a row of a schedule', () => {
  it('becomes a terminal in SI', () => {
    expect(read([good])[0]!.terminal).toEqual({
      tag: 'FC-1',
      storey: 'Level 1',
      riser: '',
      room: '',
      loadKw: null,
      designFlowLs: 0.2,
      coilDropKpa: 14,
    });
  });

  // NIST SP 811: US gallon 3.785411784 L, Btu (IT) 1055.05585262 J, ton of refrigeration 12,000 Btu/h, psi 6.894757 kPa.
  it.each([
    ['Flow (US gpm)', 12, 'designFlowLs', (12 * 3.785411784) / 60],
    ['Flow (m³/h)', 1.8, 'designFlowLs', 0.5],
    ['Flow (L/min)', 30, 'designFlowLs', 0.5],
    ['Flow (L/h)', 720, 'designFlowLs', 0.2],
    ['Load (MBH)', 34.12141633, 'loadKw', 10],
    ['Load (W)', 4200, 'loadKw', 4.2],
    ['Load (tons)', 2, 'loadKw', 2 * 3.51685284],
    ['Coil drop (psi)', 2, 'coilDropKpa', 13.789514],
    ['Coil drop (ft water)', 5, 'coilDropKpa', 5 * 0.3048 * 9.80665],
    ['Coil drop (bar)', 0.14, 'coilDropKpa', 14],
    ['Coil drop (Pa)', 14000, 'coilDropKpa', 14],
  ] as const)('with “%s” %d is converted', (head, figure, name, expected) => {
    const table = trimmedTable([
      ['Tag', 'Storey', 'Flow (L/s)', 'Coil drop (kPa)', 'x']
        .map((it) => (it.split(' ')[0] === head.split(' ')[0] ? '' : it))
        .with(4, head),
      ['A', '1', 0.2, 14, figure],
    ]);
    const [row] = readTerminals(table, guessReading(table, {}), water);
    expect(row!.terminal![name]! / expected).toBeCloseTo(1, 7);
  });

  it.each([
    ['0,167', 0.167],
    ['12 gpm', 0.757082],
    ['0.6 m3/h', 0.166667],
    [' 10 l/min ', 0.166667],
  ])('may say “%s” for a flow', (text, flowLs) => {
    expect(read([withCell('flow', text)])[0]!.terminal!.designFlowLs).toBeCloseTo(flowLs, 6);
  });

  it('with a unit of its own against the column’s is pointed out', () => {
    expect(faultsOf(read([withCell('flow', '12 gpm')])[0])).toEqual(['warning in flow']);
  });

  it('“1,250” is one and a quarter in a column of decimal commas, over a thousand beside decimal points, and doubtful alone', () => {
    const flow = (...texts: string[]) =>
      read(texts.map((text, index) => ['A' + index, '1', null, text, '14'])).map(({ terminal }) => terminal?.designFlowLs ?? null);
    expect(flow('0,45', '1,250')).toEqual([0.45, 1.25]);
    expect(flow('1,250')).toEqual([null]);
    const load = read([
      ['A', '1', '1,250', '20', '14'],
      ['B', '1', '12.5', '0.5', '14'],
    ]);
    expect(load[0]!.terminal!.loadKw).toBe(1250);
  });

  it.each<[Meaning, TableCell]>([
    ['tag', ''],
    ['tag', 'x'.repeat(41)],
    ['storey', null],
    ['coilDrop', ''],
    ['flow', 'by others'],
    ['flow', 0],
    ['flow', -0.2],
    ['flow', 1e9],
    ['flow', '1000000000'],
    ['flow', '99999999999999999999'],
    ['flow', Number.NaN],
    ['flow', Number.POSITIVE_INFINITY],
    ['flow', '12 furlongs'],
    ['coilDrop', 1e9],
    ['load', '#N/A'],
    ['supply', 900],
  ])('with a bad %s (%j) is refused at that cell', (meaning, cell) => {
    const [row] = read([withCell(meaning, cell)]);
    expect(faultsOf(row)).toContain(`error in ${meaning}`);
    expect(row!.terminal).toBeNull();
  });

  it('is no terminal where the tag is another row’s, whatever its case', () => {
    const rows = read([good, ['fc-1 ', 'Level 2', null, 0.3, 12]]);
    expect(rows[1]!.faults).toEqual([{ meaning: 'tag', severity: 'error', message: 'fc-1 is already the tag of row 2.' }]);
    expect(rows.map(({ terminal }) => terminal !== null)).toEqual([true, false]);
  });

  it('with a formula that was never calculated, a date or merged figures says so', () => {
    const marked = (kind: CellMark['kind'], cell: TableCell) => read([withCell('flow', cell)], { marks: [{ row: 1, column: 3, kind }] })[0];
    expect(faultsOf(marked('formula-without-result', null))).toContain('error in flow');
    expect(faultsOf(marked('date', '2026-05-01'))).toContain('error in flow');
    expect(faultsOf(marked('merged', 0.2))).toEqual(['warning in flow']);
    expect(faultsOf(marked('formula', 0.2))).toEqual([]);
  });

  it('that holds a heading or nothing is left out, and can be brought back', () => {
    const rows: TableCell[][] = [['Level 1'], [], good];
    expect(read(rows).map(({ number, leftOut }) => [number, leftOut])).toEqual([
      [2, 'no-terminal'],
      [4, null],
    ]);
    const corrections: Corrections = { ...noCorrections, rows: new Map([[1, 'brought-back']]) };
    expect(read(rows, { corrections })[0]!.leftOut).toBeNull();
  });

  it('of a heading that is merged over all columns is left out too', () => {
    expect(read([heads.map(() => 'Level 2'), good]).map(({ leftOut }) => leftOut)).toEqual(['no-terminal', null]);
  });

  it('is put right by what is typed in its place, and left out on demand', () => {
    const rows: TableCell[][] = [withCell('flow', 'by others'), good];
    const texts = new Map([
      [cellKey(1, 'flow'), '0,3'],
      [cellKey(1, 'tag'), 'FC-9'],
    ]);
    expect(read(rows, { corrections: { ...noCorrections, texts } })[0]!.terminal).toMatchObject({ tag: 'FC-9', designFlowLs: 0.3 });
    const leftOut = read(rows, { corrections: { ...noCorrections, rows: new Map([[1, 'left-out']]) } });
    expect(leftOut.map(({ leftOut }) => leftOut)).toEqual(['by-hand', null]);
  });

  it('takes what holds for empty cells where its own are empty', () => {
    const table = trimmedTable([
      ['Tag', 'Flow (L/s)'],
      ['A', 0.2],
    ]);
    const reading: TableReading = guessReading(table, {});
    reading.columns.storey.whenEmpty = 'Level 3';
    reading.columns.coilDrop = { ...reading.columns.coilDrop, whenEmpty: '2 psi' };
    expect(readTerminals(table, reading, water)[0]!.terminal).toMatchObject({ storey: 'Level 3', coilDropKpa: expect.closeTo(13.7895, 3) });
  });
});

describe('the design flow', () => {
  // 4.2 kW over 6 K of water at 9 °C: 4.2 / (0.99978 kg/L × 4.1959 kJ/(kg K) × 6 K) = 0.16687 L/s (steam tables).
  it('follows from load and the loop’s temperatures where none is given', () => {
    const [row] = read([['A', '1', 4.2, null, 14]]);
    expect(row).toMatchObject({ isFlowFromLoad: true, faults: [] });
    expect(row!.terminal!.designFlowLs).toBeCloseTo(0.16687, 4);
  });

  it('follows from the row’s own temperatures before the loop’s', () => {
    const [own] = read([['A', '1', 4.2, null, 14, 7, 17]]);
    expect(own!.terminal!.designFlowLs).toBeCloseTo(0.1, 3);
  });

  it('has no answer where the temperatures are equal', () => {
    expect(faultsOf(read([['A', '1', 4.2, null, 14, 7, 7]])[0])).toEqual(['error in flow']);
  });

  it('stands as given, with a warning where the load asks for more than 5 % more or less', () => {
    const at = (flow: number) => read([['A', '1', 4.2, flow, 14]])[0]!;
    expect(faultsOf(at(0.172))).toEqual([]);
    expect(faultsOf(at(0.19))).toEqual(['warning in flow']);
    expect(at(0.19).terminal!.designFlowLs).toBe(0.19);
  });
});

describe('a whole schedule', () => {
  it('of the example is read without a fault', () => {
    const text = readDelimitedText(exampleSchedule);
    if (!text.ok) throw new Error(text.message);
    const rows = readTerminals(text.table, guessReading(text.table, {}), water);
    expect(rows.flatMap(({ faults }) => faults)).toEqual([]);
    expect(rows.map(({ terminal }) => terminal?.tag)).toHaveLength(8);
  });

  it('of 5000 rows is read fast enough to be read again at each correction', () => {
    const rows = Array.from({ length: 5000 }, (_, row): TableCell[] => [
      `FC-${row}`,
      `Level ${row % 40}`,
      '4,2',
      row % 2 ? '0,167' : '',
      '14,5',
      '6',
      '12',
    ]);
    read(rows.slice(0, 100));
    const startedAt = performance.now();
    expect(read(rows).every(({ terminal }) => terminal !== null)).toBe(true);
    expect(performance.now() - startedAt).toBeLessThan(3000);
  });

  const cell = fc.oneof(
    fc.constantFrom<TableCell>(
      null,
      '',
      '1,5',
      '12 gpm',
      '1e9',
      1e9,
      -1,
      0,
      Number.NaN,
      '=1+1',
      '6',
      'Flow (L/s)',
      'Tag',
      'kPa',
      'Level 1',
      '\u2212',
      '.',
      ',',
    ),
    fc.string({ unit: 'binary' }),
    fc.double(),
  );
  const anyMark = fc.record({
    row: fc.nat(12),
    column: fc.nat(12),
    kind: fc.constantFrom<CellMark['kind']>('formula', 'formula-without-result', 'merged', 'date'),
  });
  const anyChoice = fc.record({ column: fc.option(fc.nat(14)), whenEmpty: fc.oneof(fc.string(), fc.constant('2 psi')) });

  it('of any content never throws, and what passes is a terminal that can be drawn', () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(cell, { maxLength: 12 }), { maxLength: 12 }),
        fc.array(anyMark, { maxLength: 5 }),
        fc.option(fc.tuple(...meanings.map(() => anyChoice))),
        fc.record({ supplyC: fc.double({ min: -40, max: 200, noNaN: true }), returnC: fc.double({ min: -40, max: 200, noNaN: true }) }),
        (cells, marks, choices, temperatures) => {
          const table = trimmedTable(cells, marks);
          const reading = guessReading(table, {});
          choices?.forEach((choice, at) => {
            const meaning = meanings[at]!;
            const { quantity } = meaningOf[meaning];
            reading.columns[meaning] = { ...choice, unit: quantity && scheduleUnitsOf(quantity).at(-1)! };
          });
          for (const row of readTerminals(table, reading, { ...water, ...temperatures })) {
            if (row.terminal) expect(scheduledTerminalSchema.safeParse(row.terminal).success).toBe(true);
            else expect(row.leftOut !== null || row.faults.some(({ severity }) => severity === 'error')).toBe(true);
          }
        },
      ),
      { numRuns: 200 },
    );
  }, 60_000);

  it('pasted as any text never throws', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary' }), (text) => {
        const read = readDelimitedText(text);
        if (read.ok) readTerminals(read.table, guessReading(read.table, {}), water);
      }),
      { numRuns: 500 },
    );
  }, 60_000);
});
