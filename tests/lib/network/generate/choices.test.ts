import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import { chooseBalancingValve, readableTable, readingKpa } from '@/lib/network/generate/balancing-valve-choice';
import { genericPump } from '@/lib/network/generate/generic-pump';
import { controlKvs, kvForMostDrop, preferredKvs } from '@/lib/network/generate/preferred-kv';
import { genericValves } from '@/lib/network/valve-families';

const wish = { sizes: genericValves, minReadingKpa: 3, densityKgM3: 1000 };
const anyFlow = fc.integer({ min: 20, max: 60_000 }).map((thousandths) => thousandths / 1000);

describe('the balancing valve for a design flow', () => {
  it('reads the limit fully open while the next larger would not', () => {
    fc.assert(
      fc.property(anyFlow, (flowLs) => {
        const chosen = chooseBalancingValve(flowLs, wish);
        const at = genericValves.findIndex(({ name }) => name === chosen.name);
        const reading = ({ kvTable }: { kvTable: { setting: number; kv: number }[] }) => readingKpa(kvTable.at(-1)!, flowLs, 1000);
        if (at > 0) expect(reading(chosen)).toBeGreaterThanOrEqual(3);
        if (at + 1 < genericValves.length) expect(reading(genericValves[at + 1])).toBeLessThan(3);
      }),
    );
  });

  it('is opened no further than it reads the limit', () => {
    fc.assert(
      fc.property(fc.integer({ min: 20, max: 143 }), (thousandths) => {
        const flowLs = thousandths / 1000;
        const chosen = chooseBalancingValve(flowLs, wish);
        const table = readableTable(chosen, flowLs, wish);
        const last = table.at(-1)!;
        expect(last.kv).toBeCloseTo(kvAtSetting(chosen.kvTable, last.setting), 9);
        expect(dropAcrossValveKpa(last.kv, flowLs, 1000)).toBeGreaterThanOrEqual(3);
        expect(last.setting * 100).toBeCloseTo(Math.round(last.setting * 100), 6);
      }),
    );
  });

  it('keeps its whole table where its orifice is read, whatever the handwheel', () => {
    const kvTable = [1, 2, 3].map((setting) => ({ setting, kv: setting, measuringKv: 0.9 }));
    const valve = { name: 'orifice', kvTable, settingTurns: null, isLocked: false };
    expect(readableTable(valve, 0.05, wish)).toBe(kvTable);
    expect(readingKpa(kvTable[0], 0.05, 1000)).toBe(readingKpa(kvTable[2], 0.05, 1000));
  });
});

describe('the Kvs of a control valve', () => {
  it('has an authority of a half or more in its branch with the largest preferred size that has, unless that costs over 60 kPa', () => {
    fc.assert(
      fc.property(fc.integer({ min: 50, max: 3000 }), fc.integer({ min: 5, max: 55 }), (thousandths, restKpa) => {
        const flowLs = thousandths / 1000;
        const drop = (kv: number) => dropAcrossValveKpa(kv, flowLs, 1000);
        const at = preferredKvs.indexOf(controlKvs(flowLs, restKpa, 1000));
        expect(drop(preferredKvs[at + 1])).toBeLessThan(restKpa);
        if (drop(preferredKvs[at]) < restKpa) expect(drop(preferredKvs[at - 1])).toBeGreaterThan(60);
      }),
    );
  });

  it('is 1.6 for 0.2 L/s in a branch that costs 20 kPa else: 36 · 0.2 / 1.6 squared is 20.25 kPa', () => {
    expect(controlKvs(0.2, 20, 1000)).toBe(1.6);
    expect(controlKvs(0.2, 20.5, 1000)).toBe(1);
  });

  it('of a strainer is the smallest that costs no more than it may', () => {
    expect(kvForMostDrop(0.2, 2.5, 1000)).toBe(6.3);
    expect(preferredKvs.slice(0, 6)).toEqual([0.1, 0.16, 0.25, 0.4, 0.63, 1]);
  });
});

describe('a generic pump', () => {
  it('gives its duty’s head at its duty’s flow, a quarter more at none, and is best there', () => {
    const { curve, efficiency } = genericPump(5, 12);
    expect(curve[0]).toEqual({ flowLs: 0, headM: 15 });
    expect(curve.find(({ flowLs }) => flowLs === 5)?.headM).toBe(12);
    expect(curve.map(({ headM }) => headM)).toEqual(curve.map(({ headM }) => headM).toSorted((a, b) => b - a));
    expect(efficiency.reduce((best, point) => (point.fraction > best.fraction ? point : best)).flowLs).toBe(5);
  });
});
