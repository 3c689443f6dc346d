import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  chargePressureKpa,
  diaphragmTankL,
  expansionFraction,
  fillPressureKpa,
  finalPressureKpa,
  sizeExpansionVessel,
  vesselRules,
  type VesselInput,
} from '@/lib/hydraulics/expansion-vessel';
import { waterProperties } from '@/lib/hydraulics/water';

const growth = (coldC: number, hotC: number) => expansionFraction(waterProperties(coldC).densityKgM3, waterProperties(hotC).densityKgM3);

function sized(input: VesselInput) {
  const result = sizeExpansionVessel(input);
  if (!result.ok) throw new Error(result.error.message);
  return result.vessel;
}

describe('growth of water', () => {
  // IAPWS densities at 0.3 MPa absolute, per cent from 10 °C.
  it.each([
    [40, 0.754],
    [50, 1.18],
    [60, 1.678],
    [70, 2.243],
    [80, 2.871],
    [82, 3.004],
    [90, 3.562],
    [95, 3.93],
    [100, 4.314],
    [110, 5.128],
  ])('from 10 to %d °C is %d %%', (hotC, percent) => expect(growth(10, hotC) * 100).toBeCloseTo(percent, 3));

  it('of a chilled loop filled at 6 °C and stopped at 35 or 40 °C is 0.595 or 0.779 %', () => {
    expect(growth(6, 35) * 100).toBeCloseTo(0.595, 3);
    expect(growth(6, 40) * 100).toBeCloseTo(0.779, 3);
  });
});

describe('an expansion vessel', () => {
  const heating: VesselInput = { systemVolumeL: 2000, expansionFraction: growth(10, 82), chargeKpa: 150, finalKpa: 350 };

  it('for 2000 L from 10 to 82 °C, 1.5 to 3.5 bar, is 157.7 L, filled to at least 1.669 bar (constructed case T5)', () => {
    const vessel = sized(heating);
    expect(vessel.expansionL).toBeCloseTo(60.09, 2);
    expect(vessel.reserveL).toBe(10);
    expect(vessel.acceptance).toBeCloseTo(200 / 450, 12);
    expect(vessel.vesselL).toBeCloseTo(157.7, 1);
    expect(vessel.minimumFillKpa).toBeCloseTo(166.9, 1);
  });

  it('for 300 L growing 2 %, 3 to 5.5 bar, accepts 38.5 % and is 15.6 L (published plumbing example, no reserve)', () => {
    const vessel = sized({ systemVolumeL: 300, expansionFraction: 0.02, chargeKpa: 300, finalKpa: 550, reserveL: 0 });
    expect(vessel.acceptance).toBeCloseTo(0.3846, 4);
    expect(vessel.vesselL).toBeCloseTo(15.6, 2);
    expect(vessel.minimumFillKpa).toBeCloseTo(300, 10);
    expect(growth(10, 65) * 100).toBeCloseTo(1.952, 2);
  });

  it('keeps at least 3 L of reserve', () => expect(sized({ ...heating, systemVolumeL: 100 }).reserveL).toBe(3));

  it('by the diaphragm form is 124.19 L with steel pipes (constructed case T6)', () => {
    const tank = { systemVolumeL: 2000, expansionFraction: growth(10, 82), pipeExpansionPerK: 11.7e-6, temperatureRiseK: 72 };
    expect(diaphragmTankL({ ...tank, fillKpaAbs: 251.3, finalKpaAbs: 451.3 })).toBeCloseTo(124.19, 1);
  });

  it('reaches exactly its final pressure when it holds reserve and expansion', () => {
    const positive = fc.double({ min: 50, max: 20_000, noNaN: true });
    const pressure = fc.double({ min: 0, max: 300, noNaN: true });
    fc.assert(
      fc.property(positive, fc.double({ min: 0.005, max: 0.05, noNaN: true }), pressure, (systemVolumeL, fraction, chargeKpa) => {
        const vessel = sized({ systemVolumeL, expansionFraction: fraction, chargeKpa, finalKpa: chargeKpa + 150 });
        expect(fillPressureKpa(vessel.vesselL, chargeKpa, vessel.reserveL + vessel.expansionL)).toBeCloseTo(chargeKpa + 150, 6);
        expect(vessel.minimumFillKpa).toBeGreaterThan(chargeKpa);
      }),
    );
  });

  it.each<[Partial<VesselInput>, string, string]>([
    [{ systemVolumeL: 0 }, 'not-positive', 'systemVolumeL'],
    [{ expansionFraction: -0.01 }, 'not-positive', 'expansionFraction'],
    [{ finalKpa: NaN }, 'not-positive', 'finalKpa'],
    [{ chargeKpa: -1 }, 'not-positive', 'chargeKpa'],
    [{ chargeKpa: Infinity }, 'not-positive', 'chargeKpa'],
    [{ reserveL: -1 }, 'not-positive', 'reserveL'],
    [{ finalKpa: 150 }, 'final-not-above-charge', 'finalKpa'],
  ])('%o is an error: %s', (change, code, path) => {
    const result = sizeExpansionVessel({ ...heating, ...change });
    expect(result).toMatchObject({ ok: false, error: { code, path } });
    if (!result.ok) expect(result.error.message).toMatch(code === 'not-positive' ? path : /final pressure/);
  });

  it('with no charge pressure is no error', () => expect(sized({ ...heating, chargeKpa: 0 }).acceptance).toBeCloseTo(350 / 450, 12));
});

describe('its pressures', () => {
  it('charge covers the static height plus 30 kPa, and the vapour pressure above 100 °C', () => {
    expect(chargePressureKpa(12, 1000)).toBeCloseTo(117.68 + 30, 2);
    expect(chargePressureKpa(12, 1000, 47.4)).toBe(chargePressureKpa(12, 1000));
    expect(chargePressureKpa(12, 1000, 143.376)).toBeCloseTo(117.68 + 30 + 42.051, 2);
    expect(chargePressureKpa(12, 1000, 0, 50)).toBeCloseTo(117.68 + 50, 2);
  });

  it('final stays 50 kPa or a tenth below the safety valve', () => {
    expect(finalPressureKpa(300)).toBe(250);
    expect(finalPressureKpa(500)).toBe(450);
    expect(finalPressureKpa(1000)).toBe(900);
  });

  it('every rule says where it comes from', () => {
    for (const rule of Object.values(vesselRules))
      expect(rule).toMatchObject({ unit: expect.any(String), source: expect.stringMatching(/from memory/) });
  });
});
