import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fluidProperties, type FluidProperties, type FluidSpecification } from '@/lib/hydraulics/fluids';
import { liquidWater, saturationPressureMpa, waterConductivityWMK, waterProperties, waterViscosityMPaS } from '@/lib/hydraulics/water';

function propertiesOf(fluid: FluidSpecification): FluidProperties {
  const result = fluidProperties(fluid);
  if (!result.ok) throw new Error(result.error.message);
  return result.properties;
}

function errorOf(fluid: FluidSpecification) {
  const result = fluidProperties(fluid);
  return result.ok ? null : result.error;
}

const relative = (actual: number, expected: number) => Math.abs(actual / expected - 1);

// IAPWS-IF97 region 1, R12-08 and IF97 region 4 at 0.3 MPa absolute: °C, kg/m³, mPa s, kJ/kg K, kPa (python3-iapws 1.5.2).
const WATER = [
  [1, 1000.0033, 1.73061, 4.21505, 0.65709],
  [4, 1000.0737, 1.566979, 4.20649, 0.81355],
  [6, 1000.04, 1.471217, 4.20189, 0.93535],
  [10, 999.7964, 1.305722, 4.19469, 1.22818],
  [20, 998.297, 1.001536, 4.18418, 2.33921],
  [40, 992.3112, 0.652756, 4.17806, 7.38443],
  [60, 983.2972, 0.466091, 4.18232, 19.9458],
  [75, 974.9447, 0.377477, 4.19111, 38.59536],
  [82, 970.6348, 0.345453, 4.19681, 51.38745],
  [100, 958.4473, 0.281639, 4.21619, 101.41798],
  [120, 943.1564, 0.23206, 4.24611, 198.6654],
];

describe('water', () => {
  it.each(WATER)('at %d °C has the density, viscosity, specific heat and vapour pressure of IAPWS', (temperatureC, rho, mu, cp, pv) => {
    const water = propertiesOf({ medium: 'water', temperatureC });
    expect(relative(water.densityKgM3, rho)).toBeLessThan(1e-6);
    expect(relative(water.viscosityMPaS, mu)).toBeLessThan(5e-6);
    expect(relative(water.specificHeatKJKgK, cp)).toBeLessThan(5e-6);
    expect(relative(water.vapourPressureKpa!, pv)).toBeLessThan(1e-5);
    expect(water.freezingPointC).toBe(0);
  });

  it('meets the verification points printed in the IF97 release', () => {
    expect(1 / liquidWater(300, 3).densityKgM3).toBeCloseTo(0.00100215168, 11);
    expect(liquidWater(300, 3).specificHeatKJKgK).toBeCloseTo(4.17301218, 8);
    expect(1 / liquidWater(300, 80).densityKgM3).toBeCloseTo(0.000971180894, 12);
    expect(liquidWater(300, 80).specificHeatKJKgK).toBeCloseTo(4.01008987, 8);
    expect(1 / liquidWater(500, 3).densityKgM3).toBeCloseTo(0.001202418, 9);
    expect(saturationPressureMpa(300)).toBeCloseTo(0.00353658941, 11);
    expect(saturationPressureMpa(500)).toBeCloseTo(2.63889776, 8);
    expect(saturationPressureMpa(600)).toBeCloseTo(12.3443146, 7);
  });

  it.each([
    [298.15, 998, 889.7351],
    [298.15, 1200, 1437.649467],
    [373.15, 1000, 307.883622],
    [433.15, 1, 14.538324],
  ])('has the viscosity printed in R12-08 at %d K and %d kg/m³', (temperatureK, densityKgM3, microPaS) => {
    expect(waterViscosityMPaS(temperatureK, densityKgM3) * 1000).toBeCloseTo(microPaS, 6);
  });

  it.each([
    [298.15, 998, 607.712868],
    [298.15, 1200, 799.038144],
    [873.15, 0, 79.1034659],
  ])('has the conductivity printed in R15-11 at %d K and %d kg/m³', (temperatureK, densityKgM3, milliWMK) => {
    expect(waterConductivityWMK(temperatureK, densityKgM3) * 1000).toBeCloseTo(milliWMK, 6);
  });

  it('is denser under more pressure', () => {
    expect(waterProperties(20, 1000).densityKgM3).toBeGreaterThan(waterProperties(20).densityKgM3);
    expect(waterProperties(20, 300)).toEqual(waterProperties(20));
  });

  it.each([0, 120])('is known at the end of its range, %d °C', (temperatureC) => {
    expect(fluidProperties({ medium: 'water', temperatureC })).toMatchObject({ ok: true, cautions: [] });
  });

  it.each([-0.01, 120.01, NaN, Infinity, -Infinity])('at %d °C is an error that names the range', (temperatureC) => {
    const error = errorOf({ medium: 'water', temperatureC });
    expect(error).toMatchObject({ code: 'temperature-out-of-range', path: 'fluid.temperatureC' });
    expect(error?.message).toContain('0 to 120 °C');
  });

  it('grows thinner and boils more readily as it warms', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 119, noNaN: true }), fc.double({ min: 0.01, max: 1, noNaN: true }), (t, step) => {
        const cold = waterProperties(t);
        const warm = waterProperties(t + step);
        expect(warm.viscosityMPaS).toBeLessThan(cold.viscosityMPaS);
        expect(warm.vapourPressureKpa).toBeGreaterThan(cold.vapourPressureKpa);
        if (t > 4.2) expect(warm.densityKgM3).toBeLessThan(cold.densityKgM3);
      }),
    );
  });
});

// Melinder 2010 polynomials evaluated independently (CoolProp 8.0): density, specific heat J/kg K, viscosity mPa s.
const GLYCOL = [
  ['propylene-glycol', 0.2, 0, 1020.08, 3935.9, 4.3124],
  ['propylene-glycol', 0.2, 80, 983.18, 4101.6, 0.5638],
  ['propylene-glycol', 0.3, 6, 1029.54, 3819.0, 5.3146],
  ['propylene-glycol', 0.3, 40, 1013.43, 3910.4, 1.5731],
  ['propylene-glycol', 0.4, 20, 1032.27, 3706.7, 4.3838],
  ['propylene-glycol', 0.4, 60, 1006.31, 3833.9, 1.2827],
  ['ethylene-glycol', 0.2, 6, 1027.88, 3871.3, 2.5698],
  ['ethylene-glycol', 0.2, 60, 1006.21, 3969.3, 0.6969],
  ['ethylene-glycol', 0.3, 20, 1038.05, 3718.3, 2.1664],
  ['ethylene-glycol', 0.3, 80, 1004.26, 3877.7, 0.6388],
  ['ethylene-glycol', 0.4, 0, 1060.39, 3434.2, 5.8107],
  ['ethylene-glycol', 0.4, 40, 1041.35, 3597.8, 1.6351],
] as const;

describe('glycol', () => {
  it.each(GLYCOL)('%s, mass fraction %d, at %d °C has the published properties', (medium, massFraction, temperatureC, rho, cp, mu) => {
    const mixture = propertiesOf({ medium, massFraction, temperatureC });
    expect(mixture.densityKgM3).toBeCloseTo(rho, 2);
    expect(mixture.specificHeatKJKgK * 1000).toBeCloseTo(cp, 1);
    expect(mixture.viscosityMPaS).toBeCloseTo(mu, 4);
    expect(mixture.vapourPressureKpa).toBeNull();
    expect(mixture.conductivityWMK).toBeGreaterThan(0.35);
    expect(mixture.conductivityWMK).toBeLessThan(0.6);
  });

  it.each([
    ['propylene-glycol', 0.2, -7.17],
    ['propylene-glycol', 0.3, -12.79],
    ['propylene-glycol', 0.4, -20.57],
    ['ethylene-glycol', 0.2, -7.95],
    ['ethylene-glycol', 0.3, -14.58],
    ['ethylene-glycol', 0.4, -23.81],
  ] as const)('%s, mass fraction %d, freezes at %d °C and is refused below', (medium, massFraction, freezingC) => {
    expect(propertiesOf({ medium, massFraction, temperatureC: 20 }).freezingPointC).toBeCloseTo(freezingC, 2);
    const exactlyC = propertiesOf({ medium, massFraction, temperatureC: 20 }).freezingPointC!;
    expect(fluidProperties({ medium, massFraction, temperatureC: exactlyC }).ok).toBe(true);
    const error = errorOf({ medium, massFraction, temperatureC: freezingC - 0.01 });
    expect(error).toMatchObject({ code: 'below-freezing-point', path: 'fluid.temperatureC' });
    expect(error?.message).toContain(`${freezingC.toFixed(2)} °C, to 100 °C`);
  });

  it('conducts less heat the more glycol it holds (Melinder 2010: about 0.43 W/m K at 30 % propylene, 6 °C)', () => {
    const at = (massFraction: number) => propertiesOf({ medium: 'propylene-glycol', massFraction, temperatureC: 6 }).conductivityWMK!;
    expect(at(0.3)).toBeCloseTo(0.433, 3);
    expect(at(0.5)).toBeLessThan(at(0.3));
  });

  it('with no glycol in it is water', () => {
    const water = propertiesOf({ medium: 'water', temperatureC: 20 });
    expect(propertiesOf({ medium: 'propylene-glycol', massFraction: 0, temperatureC: 20 })).toEqual(water);
    expect(errorOf({ medium: 'ethylene-glycol', massFraction: 0, temperatureC: -1 })?.code).toBe('temperature-out-of-range');
  });

  it.each([-0.001, 0.601, NaN, Infinity])('with a mass fraction of %d is an error that names the range', (massFraction) => {
    const error = errorOf({ medium: 'ethylene-glycol', massFraction, temperatureC: 20 });
    expect(error).toMatchObject({ code: 'mass-fraction-out-of-range', path: 'fluid.massFraction' });
    expect(error?.message).toContain('0 to 0.6');
  });

  it.each([100.01, NaN, Infinity])('at %d °C is out of range', (temperatureC) => {
    const error = errorOf({ medium: 'ethylene-glycol', massFraction: 0.3, temperatureC });
    expect(error).toMatchObject({ code: 'temperature-out-of-range', path: 'fluid.temperatureC' });
  });

  it('above 60 °C carries a caution, and none up to it', () => {
    const at = (temperatureC: number) => fluidProperties({ medium: 'propylene-glycol', massFraction: 0.6, temperatureC });
    expect(at(60)).toMatchObject({ ok: true, cautions: [] });
    expect(at(60.5)).toMatchObject({ ok: true, cautions: [{ code: 'glycol-warm', message: expect.stringContaining('60 °C') }] });
    expect(at(100).ok).toBe(true);
  });

  it('has positive properties everywhere in its range, and grows thinner as it warms', () => {
    const medium = fc.constantFrom('propylene-glycol' as const, 'ethylene-glycol' as const);
    const fraction = fc.double({ min: 0.01, max: 0.6, noNaN: true });
    fc.assert(
      fc.property(medium, fraction, fc.double({ min: 0, max: 99, noNaN: true }), (m, massFraction, temperatureC) => {
        const cold = propertiesOf({ medium: m, massFraction, temperatureC });
        const warm = propertiesOf({ medium: m, massFraction, temperatureC: temperatureC + 1 });
        for (const value of [cold.densityKgM3, cold.viscosityMPaS, cold.specificHeatKJKgK, cold.conductivityWMK!])
          expect(value).toBeGreaterThan(0);
        expect(warm.viscosityMPaS).toBeLessThan(cold.viscosityMPaS);
      }),
    );
  });
});

describe('more glycol', () => {
  it('makes a mixture that freezes lower, flows thicker and carries less heat, at any temperature', () => {
    const medium = fc.constantFrom('propylene-glycol' as const, 'ethylene-glycol' as const);
    const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(medium, number(0.05, 0.55), number(0.005, 0.05), number(0, 60), (m, massFraction, more, temperatureC) => {
        const thin = propertiesOf({ medium: m, massFraction, temperatureC });
        const thick = propertiesOf({ medium: m, massFraction: massFraction + more, temperatureC });
        expect(thick.freezingPointC!).toBeLessThan(thin.freezingPointC!);
        expect(thick.viscosityMPaS).toBeGreaterThan(thin.viscosityMPaS);
        expect(thick.specificHeatKJKgK).toBeLessThan(thin.specificHeatKJKgK);
        expect(thick.densityKgM3).toBeGreaterThan(0.99 * thin.densityKgM3);
      }),
    );
  });
});

describe('a custom fluid', () => {
  const brine = { medium: 'custom', densityKgM3: 1100, viscosityMPaS: 2.2, specificHeatKJKgK: 3.4 } as const;

  it('is what it says, with nothing invented', () => {
    expect(fluidProperties(brine)).toMatchObject({ ok: true, cautions: [] });
    expect(propertiesOf(brine)).toEqual({
      densityKgM3: 1100,
      viscosityMPaS: 2.2,
      specificHeatKJKgK: 3.4,
      vapourPressureKpa: null,
      freezingPointC: null,
      conductivityWMK: null,
    });
  });

  it.each(['densityKgM3', 'viscosityMPaS', 'specificHeatKJKgK'] as const)('needs a positive %s', (name) => {
    for (const value of [0, -1, NaN, Infinity]) {
      const error = errorOf({ ...brine, [name]: value });
      expect(error).toMatchObject({ code: 'not-positive', path: `fluid.${name}` });
      expect(error?.message).toContain(name);
    }
  });
});
