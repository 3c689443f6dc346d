import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { certaintyOf, percentOfDesign, verdictOf } from '@/lib/commissioning/verdict';

const ten = { lowerPercent: -10, upperPercent: 10 };

describe('the verdict on a flow', () => {
  it('gives the ratios 120, 137.5 and 150 % of the training module’s example 3 (domain facts, case V8)', () => {
    expect(
      [
        [1.2, 1],
        [1.1, 0.8],
        [0.9, 0.6],
      ].map(([flow, design]) => percentOfDesign(flow!, design!)),
    ).toEqual([expect.closeTo(120, 9), expect.closeTo(137.5, 9), expect.closeTo(150, 9)]);
  });

  it('counts the limits themselves as within and rounds nothing into the band', () => {
    expect(verdictOf(90, ten)).toBe('within');
    expect(verdictOf(110, ten)).toBe('within');
    expect(verdictOf(89.999, ten)).toBe('low');
    expect(verdictOf(110.001, ten)).toBe('high');
    expect(verdictOf(99.9, { lowerPercent: 0, upperPercent: 10 })).toBe('low');
  });

  it('cannot tell pass from fail near the edge: ±7 % on 104 % crosses 110 %, on 100 % it does not', () => {
    expect(certaintyOf(104, 7, ten)).toBe('too-near');
    expect(certaintyOf(100, 7, ten)).toBe('yes');
    expect(certaintyOf(130, 7, ten)).toBe('no');
    expect(certaintyOf(112, 5, ten)).toBe('too-near');
    expect(certaintyOf(80, 5, ten)).toBe('no');
  });

  it('never says yes of a flow outside its band nor no of one inside, whatever the uncertainty', () => {
    const percent = fc.double({ min: 0, max: 400, noNaN: true });
    fc.assert(
      fc.property(percent, fc.double({ min: 0, max: 100, noNaN: true }), (flow, uncertainty) => {
        const [verdict, certainty] = [verdictOf(flow, ten), certaintyOf(flow, uncertainty, ten)];
        if (verdict === 'within') expect(certainty).not.toBe('no');
        else expect(certainty).not.toBe('yes');
      }),
    );
  });
});
