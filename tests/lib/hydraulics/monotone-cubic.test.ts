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

  // scipy's PchipInterpolator and its derivative.
  it.each<[string, number[], number[], [at: number, value: number, slope: number][]]>([
    [
      'points that rise',
      [0, 1, 3],
      [0, 0.1, 4],
      [
        [0, 0.0, 0.0],
        [0.45, 0.0232675493, 0.0979248768],
        [1.2, 0.1799108374, 0.6207643678],
        [2.1, 1.5133774015, 2.2323832102],
        [2.7, 3.07970117, 2.9397575944],
        [3, 4.0, 3.1833333333],
      ],
    ],
    [
      'points that level out',
      [0, 2, 3],
      [0, 4, 4.1],
      [
        [0, 0.0, 3.2666666667],
        [0.45, 1.3857126202, 2.863693109],
        [1.2, 3.1693538462, 1.8138974359],
        [2.1, 4.0168192308, 0.1630384615],
        [2.7, 4.0893038462, 0.0688846154],
        [3, 4.1, 0.0],
      ],
    ],
    [
      'points that turn twice',
      [0, 1, 2, 5],
      [0, 4, 1, 6],
      [
        [0, 0.0, 7.5],
        [0.75, 3.7265625, 2.15625],
        [2.0, 1.0, 0.0],
        [3.5, 1.625, 1.25],
        [4.5, 3.8935185185, 3.4722222222],
        [5, 6.0, 5.0],
      ],
    ],
    [
      'points that are level and then fall',
      [0, 1, 2, 3],
      [1, 1, 1, 0],
      [
        [0, 1.0, 0.0],
        [0.45, 1.0, 0.0],
        [1.2, 1.0, 0.0],
        [2.1, 0.9855, -0.285],
        [2.7, 0.4365, -1.365],
        [3, 0.0, -1.5],
      ],
    ],
    [
      'a steep turn near the start',
      [0, 1, 3],
      [0, 1, -9],
      [
        [0, 0.0, 3.0],
        [0.45, 0.833625, 0.9075],
        [1.2, 0.882, -1.17],
        [2.1, -2.29725, -5.6925],
        [2.7, -6.44175, -8.0325],
        [3, -9.0, -9.0],
      ],
    ],
    [
      'a steep turn near the end',
      [0, 3, 4],
      [-9, 1, 0],
      [
        [0, -9.0, 6.5833333333],
        [0.6, -5.432, 5.3066666667],
        [1.6, -1.2068148148, 3.1344444444],
        [2.8, 0.9545185185, 0.4544444444],
        [3.6, 0.652, -1.19],
        [4, 0.0, -2.0833333333],
      ],
    ],
    [
      'two points',
      [0, 2],
      [3, 7],
      [
        [0, 3.0, 2.0],
        [0.3, 3.6, 2.0],
        [0.8, 4.6, 2.0],
        [1.4, 5.8, 2.0],
        [1.8, 6.6, 2.0],
        [2, 7.0, 2.0],
      ],
    ],
  ])('agrees with scipy on %s', (_, x, y, points) => {
    const curve = monotoneCubic(x, y);
    for (const [place, value, slope] of points) {
      expect(at(curve, place).value).toBeCloseTo(value, 8);
      expect(at(curve, place).slope).toBeCloseTo(slope, 7);
    }
  });

  it('goes straight on past its start as well', () => {
    const curve = monotoneCubic([1, 2, 4], [3, 5, 6]);
    const start = at(curve, 1);
    expect(start.value).toBe(3);
    expect(start.slope).toBeGreaterThan(2);
    expect(at(curve, -1)).toEqual({ value: 3 - 2 * start.slope, slope: start.slope });
  });
});
