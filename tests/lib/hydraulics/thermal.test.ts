import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { capacityKwPerLsK, decouplerState, flowForLoadLs, heatGivenKw, mixedTemperatureC } from '@/lib/hydraulics/thermal';

const PLAIN = { densityKgM3: 1000, specificHeatKJKgK: 4.2 };

describe('heat carried by water', () => {
  it('is 8.824 kW at 0.191 L/s from 82 to 71 °C (published coil example, c 4.2)', () => {
    expect(heatGivenKw(0.191, 82, 71, PLAIN)).toBeCloseTo(8.824, 3);
    expect(heatGivenKw(0.191, 71, 82, PLAIN)).toBeCloseTo(-8.824, 3);
  });

  it('needs 0.191 L/s to carry that load, cooling or heating', () => {
    expect(flowForLoadLs(8.8242, 11, PLAIN)).toBeCloseTo(0.191, 6);
    expect(flowForLoadLs(-8.8242, 11, PLAIN)).toBeCloseTo(0.191, 6);
    expect(flowForLoadLs(8.8242, -11, PLAIN)).toBeCloseTo(0.191, 6);
  });

  it('follows density and specific heat', () =>
    expect(capacityKwPerLsK({ densityKgM3: 1040, specificHeatKJKgK: 3.7 })).toBeCloseTo(3.848, 12));
});

describe('mixing', () => {
  it('gives 8.40 °C from 0.6 of 6 and 0.4 of 12, and 68.30 °C from three returns (case T7)', () => {
    const supply = [
      { flowLs: 0.6, temperatureC: 6 },
      { flowLs: 0.4, temperatureC: 12 },
    ];
    const returns = [
      { flowLs: 0.5, temperatureC: 71 },
      { flowLs: 0.3, temperatureC: 68 },
      { flowLs: 0.2, temperatureC: 62 },
    ];
    expect(mixedTemperatureC(supply)).toBeCloseTo(8.4, 12);
    expect(mixedTemperatureC([...supply, ...supply])).toBeCloseTo(8.4, 12);
    expect(mixedTemperatureC(returns)).toBeCloseTo(68.3, 12);
  });

  it('of nothing has no temperature', () => {
    expect(mixedTemperatureC([])).toBeNull();
    expect(mixedTemperatureC([{ flowLs: 0, temperatureC: 20 }])).toBeNull();
  });
});

describe('a decoupler', () => {
  it('warms the secondary supply to 7.0 °C when the secondary takes 12 L/s of the primary’s 10 (case T8)', () => {
    const state = decouplerState({ flowLs: 10, temperatureC: 6 }, { flowLs: 12, temperatureC: 12 });
    expect(state).toEqual({ bypassFlowLs: -2, secondarySupplyC: 7, primaryReturnC: 12 });
  });

  it('cools the primary return to 11.0 °C when the primary gives 12 L/s to a secondary of 10 (case T8)', () => {
    const state = decouplerState({ flowLs: 12, temperatureC: 6 }, { flowLs: 10, temperatureC: 12 });
    expect(state).toEqual({ bypassFlowLs: 2, secondarySupplyC: 6, primaryReturnC: 11 });
  });

  it('changes nothing when the flows are equal, and loses no heat otherwise', () => {
    const flow = fc.double({ min: 0.1, max: 50, noNaN: true });
    expect(decouplerState({ flowLs: 5, temperatureC: 6 }, { flowLs: 5, temperatureC: 12 })).toMatchObject({
      secondarySupplyC: 6,
      primaryReturnC: 12,
    });
    fc.assert(
      fc.property(flow, flow, (primaryLs, secondaryLs) => {
        const state = decouplerState({ flowLs: primaryLs, temperatureC: 80 }, { flowLs: secondaryLs, temperatureC: 60 });
        const primaryKw = primaryLs * (80 - state.primaryReturnC);
        const secondaryKw = secondaryLs * (state.secondarySupplyC - 60);
        expect(Math.abs(primaryKw - secondaryKw)).toBeLessThan(1e-9 * Math.max(primaryKw, 1));
      }),
    );
  });
});
