import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { moveTowardsRoot } from '@/lib/hydraulics/rising-root';

/** A rising function from its value and slope, which counts how often it was asked. */
function rising(value: (x: number) => number, slope: (x: number) => number) {
  return {
    value: 0,
    slope: 0,
    at: NaN,
    calls: 0,
    evaluate(x: number) {
      this.value = value(x);
      this.slope = slope(x);
      this.at = x;
      this.calls++;
    },
  };
}

describe('moving towards the root of a rising function', () => {
  it('takes the full step where it lands near enough, and leaves the function there', () => {
    const line = rising(
      (x) => 2 * x - 6,
      () => 2,
    );
    expect(moveTowardsRoot(line, -6, 3, 0)).toBe(3);
    expect(line).toMatchObject({ at: 3, calls: 1, value: 0 });
  });

  it('takes a step that falls short as it is, on either side', () => {
    const line = rising(
      (x) => 2 * x - 6,
      () => 2,
    );
    expect(moveTowardsRoot(line, -6, 1, 0)).toBe(1);
    const below = rising(
      (x) => 2 * x + 6,
      () => 2,
    );
    expect(moveTowardsRoot(below, 6, -1, 0)).toBe(-1);
    expect([line.calls, below.calls]).toEqual([1, 1]);
  });

  it('turns back from a step that goes beyond the root by too much', () => {
    const line = rising(
      (x) => 2 * x - 6,
      () => 2,
    );
    expect(moveTowardsRoot(line, -6, 10, 1)).toBeCloseTo(3, 12);
    const below = rising(
      (x) => 2 * x + 6,
      () => 2,
    );
    expect(moveTowardsRoot(below, 6, -10, 1)).toBeCloseTo(-3, 12);
  });

  it('keeps a step beyond the root that leaves no more than is enough', () => {
    const line = rising(
      (x) => 2 * x - 6,
      () => 2,
    );
    expect(moveTowardsRoot(line, -6, 4, 2)).toBe(4);
    expect(moveTowardsRoot(line, -6, 4.5, 2)).toBeCloseTo(3, 12);
  });

  it('from beyond a wall lands on the wall’s foot at once, on either side', () => {
    const wall = (x: number) => Math.max(0, x - 2) * 1e9;
    const gentle = rising(
      (x) => 0.1 * x - 1 + wall(x),
      (x) => (x > 2 ? 1e9 : 0.1),
    );
    expect(moveTowardsRoot(gentle, -1, 10, 0.9)).toBeCloseTo(2, 6);
    expect(gentle.calls).toBe(2);
    const mirrored = rising(
      (x) => 0.1 * x + 1 - wall(-x),
      (x) => (x < -2 ? 1e9 : 0.1),
    );
    expect(moveTowardsRoot(mirrored, 1, -10, 0.9)).toBeCloseTo(-2, 6);
    expect(mirrored.calls).toBe(2);
  });

  it('halves where the slope leads out of what is known to hold the root', () => {
    // Level except about 4: a Newton step from elsewhere goes nowhere near.
    const step = rising(
      (x) => 5 * Math.tanh(50 * (x - 4)),
      (x) => 250 / Math.cosh(Math.min(50 * Math.abs(x - 4), 300)) ** 2 + 1e-9,
    );
    const found = moveTowardsRoot(step, -5, 9, 1);
    expect(found).toBeGreaterThan(3.98);
    expect(found).toBeLessThan(4.02);
    expect(step.calls).toBeLessThan(20);
  });

  it('stays within reach of its step where nothing bounds the root', () => {
    // The first value is beyond what was left at 0 on the same side: no root is bracketed, and the level slope points nowhere.
    const odd = rising(
      () => -8,
      () => 0,
    );
    expect(moveTowardsRoot(odd, -1, 5, 0.5)).toBe(5);
    expect(odd.calls).toBe(1);
  });

  it('ends on a function that jumps over its root', () => {
    const jump = rising(
      (x) => (x < Math.SQRT2 ? -5 : 5),
      () => 0,
    );
    expect(moveTowardsRoot(jump, -5, 9, 0)).toBeCloseTo(Math.SQRT2, 9);
    expect(jump.calls).toBeLessThan(100);
  });

  it('does nothing where nothing is left to find', () => {
    const line = rising(
      (x) => 3 * x,
      () => 3,
    );
    expect(moveTowardsRoot(line, 0, 0, 0)).toBe(0);
    expect(line.calls).toBe(1);
  });

  it('never leaves more than there was, of any smooth rising law', () => {
    const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(number(0.5, 3), fc.oneof(number(0.01, 50), number(-50, -0.01)), number(0.01, 20), (exponent, offset, first) => {
        const value = (x: number) => Math.sign(x) * Math.abs(x) ** exponent + 1e-3 * x + offset;
        const slope = (x: number) => exponent * Math.max(Math.abs(x), 1e-9) ** (exponent - 1) + 1e-3;
        const law = rising(value, slope);
        moveTowardsRoot(law, offset, offset > 0 ? -first : first, 0.5 * Math.abs(offset));
        expect(Math.abs(law.value)).toBeLessThanOrEqual(Math.abs(offset) + 1e-12);
      }),
    );
  });
});
