import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { flowAcrossCoil, flowFromHeat, flowOnPumpCurve } from '@/lib/commissioning/indirect-flow';

const exact = { accuracyPercent: 0, accuracyAbsolute: 0 };
const curve = [
  { flowLs: 0, headM: 12 },
  { flowLs: 2, headM: 11 },
  { flowLs: 4, headM: 8 },
  { flowLs: 6, headM: 3 },
];
const water = { densityKgM3: 998.2, specificHeatKJKgK: 4.182 };
const kpa = (headM: number) => (headM * water.densityKgM3 * 9.80665) / 1000;

describe('flow across a coil', () => {
  it('goes with the root of the drop', () => {
    // At a quarter of its design drop a turbulent coil takes half its design flow.
    expect(flowAcrossCoil(5, { flowLs: 0.4, dropKpa: 20 }, exact)).toMatchObject({ ok: true, flowLs: 0.2 });
  });

  it('is refused where the drop is negative', () => {
    expect(flowAcrossCoil(-0.1, { flowLs: 0.4, dropKpa: 20 }, exact)).toMatchObject({ ok: false, path: 'dropKpa' });
  });

  it('is less sure the smaller the signal', () => {
    const meter = { accuracyPercent: 0, accuracyAbsolute: 0.1 };
    const at = (drop: number) => {
      const found = flowAcrossCoil(drop, { flowLs: 0.4, dropKpa: 20 }, meter);
      return found.ok ? found.uncertaintyPercent : NaN;
    };
    // u² = 5² + (100 × 0.1 / (2 × 1))² at 1 kPa: the same 7.07 % that the table of signal and uncertainty gives for a valve.
    expect(at(1)).toBeCloseTo(7.071, 3);
    expect(at(0.5)).toBeGreaterThan(at(1));
  });
});

describe('flow on a pump’s curve', () => {
  it('is that at which the curve gives the head read', () => {
    expect(flowOnPumpCurve({ dropKpa: kpa(8), speed: 1, curve, densityKgM3: water.densityKgM3 }, exact)).toMatchObject({
      ok: true,
      flowLs: expect.closeTo(4, 6),
    });
  });

  it('follows the affinity laws at another speed', () => {
    const found = flowOnPumpCurve({ dropKpa: kpa(8 * 0.64), speed: 0.8, curve, densityKgM3: water.densityKgM3 }, exact);
    expect(found).toMatchObject({ ok: true, flowLs: expect.closeTo(3.2, 6) });
  });

  it.each([
    ['more than the pump raises at no flow', 12.5],
    ['less than at the end of its curve', 2],
  ])('is refused where the head is %s', (_, headM) => {
    expect(flowOnPumpCurve({ dropKpa: kpa(headM), speed: 1, curve, densityKgM3: water.densityKgM3 }, exact).ok).toBe(false);
  });

  it('gives back any flow whose head is read, at any speed', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.3, max: 1.2, noNaN: true }), fc.double({ min: 0.05, max: 0.99, noNaN: true }), (speed, part) => {
        const flowLs = part * 6 * speed;
        const read = flowOnPumpCurve({ dropKpa: kpa(headOf(flowLs, speed)), speed, curve, densityKgM3: water.densityKgM3 }, exact);
        expect(read.ok && read.flowLs).toBeCloseTo(flowLs, 4);
      }),
    );
  });

  /** By asking for the drop at which that flow is read: bisection from outside, on the function under test's own inverse only. */
  function headOf(flowLs: number, speed: number): number {
    let [low, high] = [3 * speed * speed, 12 * speed * speed];
    for (let step = 0; step < 80; step++) {
      const middle = (low + high) / 2;
      const read = flowOnPumpCurve({ dropKpa: kpa(middle), speed, curve, densityKgM3: water.densityKgM3 }, exact);
      if (read.ok && read.flowLs > flowLs) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  }
});

describe('flow from heat', () => {
  it('is the heat over density, specific heat and the difference of temperatures', () => {
    // 41.82 kW at 10 K with c = 4.182 kJ/kgK is 1 kg/s.
    const found = flowFromHeat({ heatKw: 41.82, supplyC: 60, returnC: 50, ...water }, exact);
    expect(found).toMatchObject({ ok: true, flowLs: expect.closeTo(1 / 0.9982, 9) });
  });

  it.each([
    [4, 7.1],
    [6, 4.7],
    [8, 3.5],
    [10, 2.8],
    [11, 2.6],
    [20, 1.4],
  ])('with ±0.2 K for each of two sensors %s K apart is known to ±%s %%', (differenceK, percent) => {
    // The table of heat balances with ±0.2 K sensors.
    const found = flowFromHeat(
      { heatKw: 10, supplyC: 12, returnC: 12 - differenceK, ...water },
      { accuracyPercent: 0, accuracyAbsolute: 0.2 },
    );
    expect(found.ok && found.uncertaintyPercent).toBeCloseTo(percent, 1);
  });

  it('is refused where the temperatures are too near to tell', () => {
    const meter = { accuracyPercent: 0, accuracyAbsolute: 0.2 };
    expect(flowFromHeat({ heatKw: 10, supplyC: 12, returnC: 11.8, ...water }, meter)).toMatchObject({ ok: false, path: 'returnC' });
  });
});
