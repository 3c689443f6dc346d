import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { logMeanDifferenceK, outputAtFlow, outputFactor } from '@/lib/hydraulics/radiator';

const DESIGN = { supplyC: 75, returnC: 65, roomC: 20 };

describe('a radiator', () => {
  it('has the EN 442 mean differences 49.833, 31.666, 18.553 K and factors 0.5546, 0.2768 (case T2)', () => {
    expect(logMeanDifferenceK(75, 65, 20)).toBeCloseTo(49.833, 3);
    expect(logMeanDifferenceK(70, 40, 21)).toBeCloseTo(31.666, 3);
    expect(logMeanDifferenceK(45, 35, 21)).toBeCloseTo(18.553, 3);
    expect(outputFactor(DESIGN, 70, 40, 21)).toBeCloseTo(0.5546, 4);
    expect(outputFactor(DESIGN, 45, 35, 21)).toBeCloseTo(0.2768, 4);
  });

  // Table 3.3, radiator 75/65/20, n 1.3.
  it.each([
    [1.1, 101.1],
    [0.95, 99.4],
    [0.9, 98.7],
    [0.75, 96.1],
    [0.5, 88.9],
    [0.25, 72.2],
    [0.2, 65.8],
  ])('at %d of design flow gives %d per cent', (flowRatio, percent) => {
    expect(Math.abs(outputAtFlow(DESIGN, flowRatio).factor * 100 - percent)).toBeLessThan(0.06);
  });

  it('at design flow returns at the design return temperature', () => {
    expect(outputAtFlow(DESIGN, 1).returnC).toBeCloseTo(65, 8);
    expect(outputAtFlow(DESIGN, 1).factor).toBeCloseTo(1, 8);
  });

  it('follows its own exponent', () => {
    expect(outputFactor({ ...DESIGN, exponent: 1 }, 45, 35, 21)).toBeCloseTo(18.553 / 49.833, 4);
  });

  it('gives nothing to a room as warm as its water', () => {
    expect(logMeanDifferenceK(60, 20, 20)).toBe(0);
    expect(logMeanDifferenceK(20, 10, 20)).toBe(0);
    expect(logMeanDifferenceK(10, 30, 20)).toBe(0);
    expect(outputFactor(DESIGN, 60, 19, 20)).toBe(0);
  });

  it('with supply and return equal has that difference', () => {
    expect(logMeanDifferenceK(60, 60, 20)).toBe(40);
    expect(logMeanDifferenceK(60, 59.999, 20)).toBeCloseTo(39.9995, 8);
  });

  it('gives what the water loses, at any flow and supply temperature', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 3, noNaN: true }), fc.double({ min: 30, max: 90, noNaN: true }), (flowRatio, supplyC) => {
        const { factor, returnC } = outputAtFlow(DESIGN, flowRatio, supplyC, 18);
        expect((flowRatio * (supplyC - returnC)) / 10).toBeCloseTo(factor, 8);
        expect(returnC).toBeGreaterThan(18);
        expect(returnC).toBeLessThan(supplyC);
      }),
    );
  });
});
