import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  CV_PER_KV,
  cvFromKv,
  dropAcrossValveKpa,
  flowThroughValveLs,
  kvForFlow,
  kvFromCv,
  kvFromLossCoefficient,
  lossCoefficientFromKv,
} from '@/lib/hydraulics/valve-coefficient';

const positive = (max: number) => fc.double({ min: 0.01, max, noNaN: true });

describe('the valve law', () => {
  it('passes 2 m³/h, 0.5556 L/s, at Kv 4 and 25 kPa (open commissioning course, example 1)', () => {
    expect(flowThroughValveLs(4, 25)).toBeCloseTo(0.5556, 4);
    expect(flowThroughValveLs(4, 25) * 3.6).toBeCloseTo(2, 12);
  });

  it('passes 1 m³/h at Kv 2.5 and 0.16 bar (same course)', () => {
    expect(flowThroughValveLs(2.5, 16) * 3.6).toBeCloseTo(1, 12);
    expect(dropAcrossValveKpa(2.5, 1 / 3.6)).toBeCloseTo(16, 12);
  });

  it('passes 3.505 gpm at Cv 6.4 and 0.3 psi (measuring device data page, printed 3.5)', () => {
    const flowGpm = (flowThroughValveLs(kvFromCv(6.4), 0.3 * 6.894757) * 60) / 3.785411784;
    expect(flowGpm).toBeCloseTo(3.505, 3);
  });

  // Constructed loop N11: Kv = 36 q / sqrt(dp).
  it.each([
    [0.5, 15, 4.64758],
    [0.3, 10, 3.41526],
    [0.2, 3, 4.15692],
  ])('takes %d L/s at %d kPa with Kv %d', (flowLs, dropKpa, kv) => {
    expect(kvForFlow(flowLs, dropKpa)).toBeCloseTo(kv, 5);
  });

  it('passes less of a denser fluid, as the root of the density', () => {
    expect(flowThroughValveLs(4, 25, 1040) / flowThroughValveLs(4, 25)).toBeCloseTo(1 / Math.sqrt(1.04), 12);
    expect(dropAcrossValveKpa(4, 0.5, 1040) / dropAcrossValveKpa(4, 0.5)).toBeCloseTo(1.04, 12);
    expect(kvForFlow(0.5, 25, 1040) / kvForFlow(0.5, 25)).toBeCloseTo(Math.sqrt(1.04), 12);
  });

  it('is odd: reversing the pressure reverses the flow', () => {
    expect(flowThroughValveLs(4, -25)).toBe(-flowThroughValveLs(4, 25));
    expect(dropAcrossValveKpa(4, -0.5)).toBe(-dropAcrossValveKpa(4, 0.5));
    expect(flowThroughValveLs(4, 0)).toBe(0);
    expect(flowThroughValveLs(0, 25)).toBe(0);
  });

  it('goes there and back without loss', () => {
    fc.assert(
      fc.property(positive(500), positive(300), fc.double({ min: 940, max: 1100, noNaN: true }), (kv, dropKpa, density) => {
        const flowLs = flowThroughValveLs(kv, dropKpa, density);
        expect(dropAcrossValveKpa(kv, flowLs, density) / dropKpa).toBeCloseTo(1, 10);
        expect(kvForFlow(flowLs, dropKpa, density) / kv).toBeCloseTo(1, 10);
        expect(kvFromCv(cvFromKv(kv)) / kv).toBeCloseTo(1, 12);
        expect(kvFromLossCoefficient(lossCoefficientFromKv(kv, 50), 50) / kv).toBeCloseTo(1, 10);
      }),
    );
  });
});

describe('other coefficients', () => {
  it('have 1.156 Cv to the Kv', () => {
    expect(CV_PER_KV).toBeCloseTo(1.1561, 4);
    expect(cvFromKv(10)).toBeCloseTo(11.561, 3);
  });

  it('agree with dp = K rho v²/2', () => {
    const velocity = flowThroughValveLs(10, 20) / 1000 / ((Math.PI / 4) * 0.05 ** 2);
    expect((lossCoefficientFromKv(10, 50) * 1000 * velocity ** 2) / 2).toBeCloseTo(20_000, 6);
  });
});
