import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { dropUncertaintyPercent, flowUncertaintyPercent, kvAssumption } from '@/lib/commissioning/uncertainty';

const tenthOfAKpa = { accuracyPercent: 0, accuracyAbsolute: 0.1 };

describe('the uncertainty of a reading', () => {
  // Table 3.4 of the domain facts, dp ± 0.1 kPa: signal kPa, with Kv ±5 %, with Kv ±3 %.
  it.each([
    [0.5, 11.2, 10.4],
    [1, 7.1, 5.8],
    [2, 5.6, 3.9],
    [3, 5.3, 3.4],
    [5, 5.1, 3.2],
    [10, 5.0, 3.0],
  ])('at a signal of %d kPa is %d %% with Kv ±5 %%, %d %% with Kv ±3 %%', (dropKpa, atFive, atThree) => {
    expect(dropUncertaintyPercent(dropKpa, tenthOfAKpa)).toBeCloseTo(atFive, 1);
    expect(Math.abs(dropUncertaintyPercent(dropKpa, tenthOfAKpa, 3) - atThree)).toBeLessThanOrEqual(0.051);
  });

  it('of a direct flow is the instrument’s own: 2 % of reading and 0.01 L/s make 7 % at 0.2 L/s', () => {
    expect(flowUncertaintyPercent(0.2, { accuracyPercent: 2, accuracyAbsolute: 0.01 })).toBeCloseTo(7, 12);
  });

  it('of a zero reading says that it tells nothing, and is a number', () => {
    expect(dropUncertaintyPercent(0, tenthOfAKpa)).toBe(100);
    expect(flowUncertaintyPercent(0, tenthOfAKpa)).toBe(100);
    expect(flowUncertaintyPercent(0, { accuracyPercent: 2, accuracyAbsolute: 0 })).toBe(0);
  });

  it('never falls below the share of Kv, and falls as the signal rises', () => {
    const drop = fc.double({ min: 0.01, max: 1000, noNaN: true });
    const accuracy = fc.record({
      accuracyPercent: fc.double({ min: 0, max: 50, noNaN: true }),
      accuracyAbsolute: fc.double({ min: 0, max: 5, noNaN: true }),
    });
    fc.assert(
      fc.property(drop, accuracy, (dropKpa, it) => {
        expect(dropUncertaintyPercent(dropKpa, it)).toBeGreaterThanOrEqual(kvAssumption.percent);
        expect(dropUncertaintyPercent(2 * dropKpa, it)).toBeLessThanOrEqual(dropUncertaintyPercent(dropKpa, it) + 1e-9);
      }),
    );
  });
});
