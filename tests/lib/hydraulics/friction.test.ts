import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { friction, frictionFactor, frictionOf } from '@/lib/hydraulics/friction';

const roughness = fc.double({ min: 0, max: 0.1, noNaN: true });

describe('friction factor', () => {
  it('is 64/Re in laminar flow', () => expect(frictionFactor(800, 0.001)).toBeCloseTo(0.08, 15));

  it('satisfies Colebrook-White in turbulent flow', () => {
    fc.assert(
      fc.property(fc.double({ min: 4000, max: 1e9, noNaN: true }), roughness, (reynolds, e) => {
        const root = 1 / Math.sqrt(frictionFactor(reynolds, e));
        expect(root).toBeCloseTo(-2 * Math.log10(e / 3.7 + (2.51 * root) / reynolds), 12);
      }),
    );
  });

  it('does not depend on the guess it starts from', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 2001, max: 1e8, noNaN: true }),
        roughness,
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        (reynolds, e, guess) => {
          const cold = frictionFactor(reynolds, e);
          frictionOf(reynolds, e, guess);
          expect(Math.abs(friction.factor / cold - 1)).toBeLessThan(1e-12);
        },
      ),
    );
  });

  it.each([2000, 4000])('joins smoothly at Re %d', (at) => {
    for (const e of [0, 1e-3, 0.05]) {
      frictionOf(at * (1 - 1e-9), e);
      const { factor, logSlope } = friction;
      frictionOf(at * (1 + 1e-9), e);
      expect(friction.factor).toBeCloseTo(factor, 9);
      expect(friction.logSlope).toBeCloseTo(logSlope, 6);
    }
  });

  it('makes a head loss that rises with flow, its slope being the derivative', () => {
    fc.assert(
      fc.property(fc.double({ min: 100, max: 1e7, noNaN: true }), roughness, (reynolds, e) => {
        frictionOf(reynolds, e);
        const slope = friction.factor * reynolds * (2 + friction.logSlope);
        expect(slope).toBeGreaterThan(0);
        const loss = (re: number) => frictionFactor(re, e) * re * re;
        const step = reynolds * 1e-5;
        expect((loss(reynolds + step) - loss(reynolds - step)) / (2 * step) / slope).toBeCloseTo(1, 4);
      }),
    );
  });
});
