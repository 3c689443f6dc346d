import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coilAtFlow, coilFromDesign, effectiveness, ntuFor, type Arrangement, type CoilDesign } from '@/lib/hydraulics/coil';

/** Design points of table 3.3: water in and out, air in and out, °C; loads of any size, since only ratios matter. */
const HIGH: CoilDesign = { loadKw: 10, waterInC: 82, waterOutC: 71, airInC: -2, airOutC: 22 };
const MEDIUM: CoilDesign = { loadKw: 10, waterInC: 80, waterOutC: 60, airInC: 10, airOutC: 30 };
const LOW: CoilDesign = { loadKw: 10, waterInC: 50, waterOutC: 40, airInC: 15, airOutC: 30 };
const COOLING: CoilDesign = { loadKw: -10, waterInC: 6, waterOutC: 12, airInC: 26, airOutC: 14 };

function coilOf(design: CoilDesign) {
  const result = coilFromDesign(design);
  if (!result.ok) throw new Error(result.error.message);
  return result.coil;
}

const percent = (design: CoilDesign, flowRatio: number) =>
  (coilAtFlow(coilOf(design), flowRatio, design.waterInC, design.airInC).loadKw / design.loadKw) * 100;

describe('a coil at another flow', () => {
  // Table 3.3: output per cent; counterflow, 30 % of the resistance on the water side.
  it.each([
    [1.1, 102.3, 102.9, 102.7, 102.3],
    [0.95, 98.7, 98.4, 98.5, 98.7],
    [0.9, 97.3, 96.6, 96.9, 97.3],
    [0.75, 92.4, 90.6, 91.3, 92.3],
    [0.5, 80.7, 76.4, 77.8, 79.7],
    [0.25, 59.6, 52.2, 53.8, 55.6],
    [0.2, 52.9, 45.1, 46.6, 48.1],
  ])('at %d of design flow gives the tabulated outputs', (flowRatio, ...expected) => {
    [HIGH, MEDIUM, LOW, COOLING].forEach((design, i) => expect(Math.abs(percent(design, flowRatio) - expected[i])).toBeLessThan(0.06));
  });

  // The bracketed figures of the same table: UA kept constant.
  it.each([
    [0.9, 99.3, 98.4, 98.5],
    [0.75, 98.0, 95.4, 95.7],
    [0.5, 94.1, 86.8, 87.5],
    [0.25, 83.3, 66.1, 67.1],
    [0.2, 78.5, 58.2, 59.0],
  ])('at %d with constant UA gives the bracketed outputs', (flowRatio, ...expected) => {
    [HIGH, MEDIUM, LOW].forEach((design, i) => {
      expect(Math.abs(percent({ ...design, waterResistanceShare: 0 }, flowRatio) - expected[i])).toBeLessThan(0.06);
    });
  });

  // Fault table, "swapped supply/return at a coil": counterflow becomes parallel flow.
  it.each([
    [HIGH, 98.5],
    [MEDIUM, 96.4],
    [LOW, 94.1],
    [COOLING, 90.4],
  ])('with supply and return swapped gives the tabulated shortfall', (design, expected) => {
    const swapped = { ...coilOf(design), arrangement: 'parallel' as const };
    const state = coilAtFlow(swapped, 1, design.waterInC, design.airInC);
    expect(Math.abs((state.loadKw / design.loadKw) * 100 - expected)).toBeLessThan(0.06);
  });

  it('at design flow is its design point', () => {
    for (const design of [HIGH, MEDIUM, LOW, COOLING, { ...LOW, arrangement: 'crossflow' as const }]) {
      const state = coilAtFlow(coilOf(design), 1, design.waterInC, design.airInC);
      expect(state.loadKw).toBeCloseTo(design.loadKw, 8);
      expect(state.waterOutC).toBeCloseTo(design.waterOutC, 8);
      expect(state.airOutC).toBeCloseTo(design.airOutC, 8);
    }
  });

  it('is counterflow unless told', () => expect(coilOf(LOW).arrangement).toBe('counterflow'));

  it('without flow gives nothing', () => {
    expect(coilAtFlow(coilOf(LOW), 0, 50, 15)).toEqual({ loadKw: 0, waterOutC: 15, airOutC: 15, effectiveness: 0 });
  });

  it('gives the air what it takes from the water, never more than the entering temperatures allow, and more with more flow', () => {
    const arrangement = fc.constantFrom<Arrangement>('counterflow', 'parallel', 'crossflow');
    fc.assert(
      fc.property(
        arrangement,
        fc.double({ min: 0.05, max: 2, noNaN: true }),
        fc.double({ min: 30, max: 90, noNaN: true }),
        (kind, ratio, water) => {
          const coil = { ...coilOf(LOW), arrangement: kind };
          const state = coilAtFlow(coil, ratio, water, 15);
          expect(coil.waterKwK * ratio * (water - state.waterOutC)).toBeCloseTo(state.loadKw, 9);
          expect(coil.airKwK * (state.airOutC - 15)).toBeCloseTo(state.loadKw, 9);
          expect(state.effectiveness).toBeLessThan(1);
          expect(state.waterOutC).toBeGreaterThan(15);
          expect(coilAtFlow(coil, ratio * 1.05, water, 15).loadKw).toBeGreaterThan(state.loadKw);
        },
      ),
    );
  });
});

describe('the design point', () => {
  it.each<Partial<CoilDesign>>([
    { waterOutC: 50 },
    { airOutC: 15 },
    { airOutC: 10 },
    { waterOutC: 60 },
    { loadKw: 0 },
    { waterInC: 10, waterOutC: 5 },
    { loadKw: NaN },
  ])('%o is not a coil', (change) => {
    const result = coilFromDesign({ ...LOW, ...change });
    expect(result).toMatchObject({ ok: false, error: { code: 'not-a-coil', message: expect.stringContaining('warmer') } });
  });

  it('beyond what the arrangement can do is refused', () => {
    const crossed: CoilDesign = { loadKw: 10, waterInC: 50, waterOutC: 30, airInC: 15, airOutC: 40, arrangement: 'parallel' };
    expect(coilFromDesign(crossed)).toMatchObject({
      ok: false,
      error: { code: 'not-reachable', message: expect.stringContaining('arrangement') },
    });
    expect(coilFromDesign({ ...crossed, arrangement: 'counterflow' }).ok).toBe(true);
  });
});

describe('effectiveness', () => {
  it('has the textbook values at NTU 2 and ratio 0.5, and its limits', () => {
    expect(effectiveness('counterflow', 2, 0.5)).toBeCloseTo((1 - Math.exp(-1)) / (1 - 0.5 * Math.exp(-1)), 12);
    expect(effectiveness('parallel', 2, 0.5)).toBeCloseTo((1 - Math.exp(-3)) / 1.5, 12);
    expect(effectiveness('crossflow', 2, 0.5)).toBeCloseTo(1 - Math.exp((2 ** 0.22 / 0.5) * (Math.exp(-0.5 * 2 ** 0.78) - 1)), 12);
    expect(effectiveness('counterflow', 2, 1)).toBeCloseTo(2 / 3, 9);
    for (const kind of ['counterflow', 'parallel', 'crossflow'] as const) {
      expect(effectiveness(kind, 0, 0.5)).toBe(0);
      expect(effectiveness(kind, -1, 0.5)).toBe(0);
      expect(effectiveness(kind, 2, 0)).toBeCloseTo(1 - Math.exp(-2), 9);
    }
  });

  it('can be read backwards', () => {
    const kind = fc.constantFrom<Arrangement>('counterflow', 'parallel', 'crossflow');
    fc.assert(
      fc.property(
        kind,
        fc.double({ min: 0.05, max: 4, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (arrangement, ntu, ratio) => {
          const found = ntuFor(arrangement, effectiveness(arrangement, ntu, ratio), ratio)!;
          expect(effectiveness(arrangement, found, ratio)).toBeCloseTo(effectiveness(arrangement, ntu, ratio), 10);
          if (ntu < 2) expect(found).toBeCloseTo(ntu, 6);
        },
      ),
    );
  });
});
