import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cubicAt, evaluateCubic, monotoneCubic } from '@/lib/hydraulics/monotone-cubic';

const at = (curve: ReturnType<typeof monotoneCubic>, x: number) => {
  evaluateCubic(curve, x);
  return { ...cubicAt };
};

describe('monotone cubic', () => {
  it('agrees with the interpolation of scipy (PchipInterpolator)', () => {
    const curve = monotoneCubic([0, 1, 2.5, 4], [20, 19, 15, 5]);
    expect(at(curve, 0.5).value).toBeCloseTo(19.634803921568626, 12);
    expect(at(curve, 2).value).toBeCloseTo(16.726735138499844, 12);
    expect(at(curve, 3.7).slope).toBeCloseTo(-8.106666666666666, 12);
  });

  it('passes through its points and never rises where they fall', () => {
    const falls = fc.array(fc.tuple(fc.double({ min: 0.01, max: 5, noNaN: true }), fc.double({ min: 0, max: 5, noNaN: true })), {
      minLength: 2,
      maxLength: 12,
    });
    fc.assert(
      fc.property(falls, fc.double({ min: 0, max: 1, noNaN: true }), (steps, part) => {
        const x = [0];
        const y = [50];
        for (const [dx, dy] of steps) {
          x.push(x[x.length - 1] + dx);
          y.push(y[y.length - 1] - dy);
        }
        const curve = monotoneCubic(x, y);
        x.forEach((each, k) => expect(at(curve, each).value).toBeCloseTo(y[k], 9));
        expect(at(curve, part * x[x.length - 1]).slope).toBeLessThanOrEqual(1e-9);
      }),
    );
  });

  it('goes straight on past its ends', () => {
    const curve = monotoneCubic([0, 1, 2], [10, 9, 6]);
    const end = at(curve, 2);
    expect(at(curve, 3)).toEqual({ value: end.value + end.slope, slope: end.slope });
  });
});
