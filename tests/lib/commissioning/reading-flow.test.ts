import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { flowFromDrop } from '@/lib/commissioning/reading-flow';

const water = { densityKgM3: 1000 };
const at = (kv: number) => [
  { setting: 0, kv: kv / 2 },
  { setting: 4, kv },
];
const flow = (read: Parameters<typeof flowFromDrop>[0]) => {
  const found = flowFromDrop(read);
  if (!found.ok) throw new Error(found.message);
  return found;
};

describe('the flow across a valve', () => {
  it('is 2.0 m³/h, 0.5556 L/s, for Kv 4.0 at 25 kPa (domain facts, case V4: open training module, example 1)', () => {
    const { flowLs } = flow({ kvTable: at(4), settingTurns: 4, dropKpa: 25, ...water });
    expect(flowLs).toBeCloseTo(0.5556, 4);
    expect(flowLs * 3.6).toBeCloseTo(2, 12);
  });

  it('is 1.0 m³/h for Kv 2.5 at 0.16 bar (domain facts, case V5: the same module)', () => {
    expect(flow({ kvTable: at(2.5), settingTurns: 4, dropKpa: 16, ...water }).flowLs * 3.6).toBeCloseTo(1, 12);
  });

  it('is Kv sqrt(dp) / 36 in water and less by the root of the density in a heavier fluid', () => {
    const kvTable = at(3);
    expect(flow({ kvTable, settingTurns: 4, dropKpa: 9, ...water }).flowLs).toBeCloseTo((3 * Math.sqrt(9)) / 36, 12);
    expect(flow({ kvTable, settingTurns: 4, dropKpa: 9, densityKgM3: 1050 }).flowLs).toBeCloseTo((3 * Math.sqrt(9 / 1.05)) / 36, 12);
  });

  it('takes Kv straight between the points of the table', () => {
    const kvTable = [
      { setting: 1, kv: 0.5 },
      { setting: 2, kv: 1.3 },
      { setting: 4, kv: 2.5 },
    ];
    expect(flow({ kvTable, settingTurns: 2.5, dropKpa: 1, ...water }).kv).toBeCloseTo(1.6, 12);
    expect(flow({ kvTable, settingTurns: 1, dropKpa: 1, ...water }).kv).toBe(0.5);
    expect(flow({ kvTable, settingTurns: 4, dropKpa: 1, ...water }).kv).toBe(2.5);
  });

  it('is refused beyond the ends of the table, below zero, and without a table', () => {
    expect(flowFromDrop({ kvTable: at(4), settingTurns: 4.1, dropKpa: 5, ...water })).toMatchObject({ ok: false, path: 'settingTurns' });
    expect(flowFromDrop({ kvTable: at(4), settingTurns: -0.1, dropKpa: 5, ...water })).toMatchObject({ ok: false, path: 'settingTurns' });
    expect(flowFromDrop({ kvTable: at(4), settingTurns: 2, dropKpa: -1, ...water })).toMatchObject({ ok: false, path: 'dropKpa' });
    expect(flowFromDrop({ kvTable: null, settingTurns: 2, dropKpa: 5, ...water })).toMatchObject({ ok: false, path: 'method' });
  });

  it('doubles when the drop is four times as large, and never falls when the valve is opened', () => {
    const drop = fc.double({ min: 0.01, max: 500, noNaN: true });
    const turns = fc.double({ min: 0, max: 4, noNaN: true });
    fc.assert(
      fc.property(drop, turns, turns, (dropKpa, one, other) => {
        const read = (settingTurns: number, kpa: number) => flow({ kvTable: at(4), settingTurns, dropKpa: kpa, ...water }).flowLs;
        expect(read(one, 4 * dropKpa)).toBeCloseTo(2 * read(one, dropKpa), 9);
        const [less, more] = one < other ? [one, other] : [other, one];
        expect(read(more, dropKpa)).toBeGreaterThanOrEqual(read(less, dropKpa));
      }),
    );
  });
});
