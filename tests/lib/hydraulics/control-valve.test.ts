import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  authority,
  authorityGrade,
  dropForAuthorityKpa,
  inherentRatio,
  installedFlowRatio,
  kvsForAuthority,
  openingForRatio,
  type Characteristic,
} from '@/lib/hydraulics/control-valve';

const CHARACTERISTICS: Characteristic[] = ['linear', 'equalPercentage', 'quickOpening'];

// Installed flow at stroke h and authorities 1, 0.5, 0.25, 0.1 of an equal-percentage valve of rangeability 50, then of a linear one.
const INSTALLED: [number, number[], number[]][] = [
  [0.1, [0.0296, 0.0418, 0.0591, 0.0932], [0.1, 0.1407, 0.1971, 0.3029]],
  [0.25, [0.0532, 0.0751, 0.1059, 0.1661], [0.25, 0.343, 0.4588, 0.6325]],
  [0.5, [0.1414, 0.198, 0.2747, 0.4117], [0.5, 0.6325, 0.7559, 0.8771]],
  [0.75, [0.3761, 0.4978, 0.6302, 0.7888], [0.75, 0.8485, 0.915, 0.9632]],
  [0.9, [0.6762, 0.7922, 0.8782, 0.9455], []],
];

describe('control valve characteristics', () => {
  it.each(INSTALLED)('at stroke %d give the installed flows of the tabulated authorities', (opening, equalPercentage, linear) => {
    const flows = (characteristic: Characteristic) =>
      [1, 0.5, 0.25, 0.1].map((n) => installedFlowRatio(inherentRatio(characteristic, opening), n));
    flows('equalPercentage').forEach((flow, i) => expect(flow).toBeCloseTo(equalPercentage[i], 4));
    linear.forEach((flow, i) => expect(flows('linear')[i]).toBeCloseTo(flow, 4));
  });

  it('follow their definitions', () => {
    expect(inherentRatio('linear', 0.3)).toBe(0.3);
    expect(inherentRatio('quickOpening', 0.25)).toBe(0.5);
    expect(inherentRatio('equalPercentage', 0.5, 30)).toBeCloseTo(1 / Math.sqrt(30), 12);
  });

  it.each(CHARACTERISTICS)('%s is shut at 0, wide open at 1 and rises between, and can be read backwards', (characteristic) => {
    expect(inherentRatio(characteristic, 0)).toBe(0);
    expect(inherentRatio(characteristic, 1)).toBe(1);
    expect(openingForRatio(characteristic, 0)).toBe(0);
    expect(openingForRatio(characteristic, 1)).toBe(1);
    fc.assert(
      fc.property(fc.double({ min: 0.001, max: 0.99, noNaN: true }), fc.double({ min: 10, max: 100, noNaN: true }), (opening, r) => {
        const ratio = inherentRatio(characteristic, opening, r);
        expect(inherentRatio(characteristic, opening + 0.005, r)).toBeGreaterThan(ratio);
        expect(openingForRatio(characteristic, ratio, r)).toBeCloseTo(opening, 10);
      }),
    );
  });

  it('an equal-percentage valve asked for less than its leak is shut', () => {
    expect(openingForRatio('equalPercentage', 0.019)).toBe(0);
    expect(openingForRatio('equalPercentage', 0.021)).toBeGreaterThan(0);
  });
});

describe('authority', () => {
  it('0.8 against 15 kPa takes 60 kPa, Kv 6.507 at 1.4 L/s; Kv 7 gives 0.776 (published example, chart reading 7)', () => {
    expect(dropForAuthorityKpa(0.8, 15)).toBeCloseTo(60, 10);
    expect(kvsForAuthority(0.8, 15, 1.4)).toBeCloseTo(6.507, 3);
    expect(kvsForAuthority(0.8, 15, 1.4, 1040)).toBeCloseTo(6.507 * Math.sqrt(1.04), 3);
    expect(authority((36 * 1.4) ** 2 / 49, 15)).toBeCloseTo(0.776, 3);
  });

  it('is 1 with nothing else in the circuit', () => expect(authority(20, 0)).toBe(1));

  it('is graded as is customary', () => {
    expect([0.8, 0.5, 0.49, 0.25, 0.249, 0].map(authorityGrade)).toEqual(['good', 'good', 'fair', 'fair', 'unstable', 'unstable']);
  });

  it('lets nothing through a shut valve', () => expect(installedFlowRatio(0, 0.5)).toBe(0));

  it('bends the characteristic: the lower it is, the more flow at part stroke', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 0.95, noNaN: true }), fc.double({ min: 0.05, max: 0.9, noNaN: true }), (ratio, n) => {
        expect(installedFlowRatio(ratio, n)).toBeGreaterThan(installedFlowRatio(ratio, n + 0.1));
        expect(installedFlowRatio(ratio, 1)).toBeCloseTo(ratio, 12);
        expect(installedFlowRatio(1, n)).toBe(1);
      }),
    );
  });
});
