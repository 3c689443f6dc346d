import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  annualEnergyKwh,
  dutyAtSpeed,
  electricalPowerKw,
  hydraulicPowerKw,
  pressurePowerKw,
  shaftPowerKw,
  suctionCheck,
  suctionHeadAvailableM,
  suctionHeadFromVesselM,
} from '@/lib/hydraulics/pump-duty';

const GPM_LS = 3.785411784 / 60;
const FOOT_M = 0.3048;
const HP_KW = 0.745699872;
const PSI_KPA = 6.894757293;
const LB_FT3 = 16.01846337;

describe('pump power', () => {
  it('is 107.056 hp at the shaft, 87.535 kW and 84 033 a year (TP-410 problem 7.34, printed 83 970)', () => {
    const shaft = shaftPowerKw(hydraulicPowerKw(700 * GPM_LS, 428 * FOOT_M, 62.364 * LB_FT3), 0.707);
    const electrical = electricalPowerKw(shaft, 0.95, 0.96);
    expect(shaft / HP_KW).toBeCloseTo(107.056, 2);
    expect(electrical).toBeCloseTo(87.535, 2);
    expect(annualEnergyKwh([{ hours: 8000, electricalKw: electrical }]) * 0.12).toBeCloseTo(84_033, -1);
  });

  it('is 3340.5 W for 12 L/s at 20.4751 m with efficiency 0.72 (constructed case P13)', () => {
    expect(shaftPowerKw(hydraulicPowerKw(12, 20.4751, 998.2), 0.72)).toBeCloseTo(3.3405, 4);
  });

  it('is 2.857 kW at the shaft and 3.273 kW electrical for 10 L/s at 200 kPa (constructed case P14)', () => {
    const shaft = shaftPowerKw(pressurePowerKw(10, 200), 0.7);
    expect(shaft).toBeCloseTo(2.857, 3);
    expect(electricalPowerKw(shaft, 0.9, 0.97)).toBeCloseTo(3.273, 3);
    expect(electricalPowerKw(shaft, 0.9)).toBeCloseTo(shaft / 0.9, 12);
  });

  it('adds up over the parts of a year', () => {
    const profile = [
      { hours: 1000, electricalKw: 5 },
      { hours: 3000, electricalKw: 2 },
    ];
    expect(annualEnergyKwh(profile)).toBe(11_000);
    expect(annualEnergyKwh([])).toBe(0);
  });
});

describe('affinity laws', () => {
  it('take 400 gpm, 126 ft, 17.5 hp at 3500 rpm to 194.286, 29.726, 2.0053 at 1700 (TP-410 problem 7.33)', () => {
    const slow = dutyAtSpeed({ flowLs: 400, headM: 126, shaftKw: 17.5 }, 1700 / 3500);
    expect(slow.flowLs).toBeCloseTo(194.286, 3);
    expect(slow.headM).toBeCloseTo(29.726, 3);
    expect(slow.shaftKw).toBeCloseTo(2.0053, 4);
  });

  it('keep the efficiency, and undo themselves', () => {
    const ratio = fc.double({ min: 0.2, max: 1.5, noNaN: true });
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 100, noNaN: true }),
        fc.double({ min: 1, max: 50, noNaN: true }),
        ratio,
        (flowLs, headM, n) => {
          const duty = { flowLs, headM, shaftKw: hydraulicPowerKw(flowLs, headM, 998) / 0.7 };
          const other = dutyAtSpeed(duty, n);
          expect(hydraulicPowerKw(other.flowLs, other.headM, 998) / other.shaftKw).toBeCloseTo(0.7, 10);
          expect(dutyAtSpeed(other, 1 / n).shaftKw / duty.shaftKw).toBeCloseTo(1, 10);
        },
      ),
    );
  });
});

describe('suction', () => {
  it('has 13.887 ft from a tank 25 ft below, and fails against 20 ft with margin 1.3 (TP-410 problem 7.32)', () => {
    const liquid = { densityKgM3: 62.364 * LB_FT3, vapourKpaAbs: 0.256 * PSI_KPA };
    const available = suctionHeadFromVesselM(5 * PSI_KPA, -25 * FOOT_M, 6 * FOOT_M, liquid);
    expect(available / FOOT_M).toBeCloseTo(13.887, 2);
    const check = suctionCheck(available, 20 * FOOT_M, 1.3);
    expect(check.enough).toBe(false);
    expect(check.neededM / FOOT_M).toBeCloseTo(26, 10);
    expect(check.spareM).toBeCloseTo(available - check.neededM, 12);
  });

  it('has 16.148 m at 80 °C and 100 kPa gauge (constructed case P15)', () => {
    const liquid = { densityKgM3: 971.89, vapourKpaAbs: 47.415 };
    expect(suctionHeadAvailableM(100, liquid)).toBeCloseTo(16.148, 3);
    expect(suctionHeadAvailableM(100, liquid, 2) - suctionHeadAvailableM(100, liquid)).toBeCloseTo(4 / 19.6133, 12);
    expect(suctionCheck(16.148, 16.148, 1).enough).toBe(true);
  });

  it('is less at altitude', () => {
    const sea = { densityKgM3: 998, vapourKpaAbs: 2.3 };
    const lost = suctionHeadAvailableM(0, sea) - suctionHeadAvailableM(0, { ...sea, atmosphereKpa: 80 });
    expect(lost).toBeCloseTo((21.325 * 1000) / (998 * 9.80665), 10);
  });
});
