import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { darbyK, fittings, hooperK, sumMinorK, type FittingId } from '@/lib/hydraulics/fittings';
import { convergingTee90, divergingWye45 } from '@/lib/hydraulics/tees';

// Hooper 1981 2-K and Darby 1999 3-K at Re 5000 in 2 in pipe, computed by the open fluids library 1.0.22.
const PUBLISHED: [FittingId, number, number | null][] = [
  ['elbow-90-threaded', 0.76, 0.754861],
  ['elbow-90-welded', 0.535, 0.54666],
  ['elbow-90-long-radius', 0.46, 0.47321],
  ['elbow-45', 0.4, 0.41321],
  ['tee-run-threaded', 0.19, 0.42666],
  ['tee-run-welded', 0.105, 0.24245],
  ['tee-branch-threaded', 1.15, 1.264228],
  ['tee-branch-welded', 1.36, 1.349722],
  ['gate-valve', 0.21, 0.214207],
  ['ball-valve', 0.325, 0.125329],
  ['globe-valve', 6.3, 6.970985],
  ['butterfly-valve', 0.535, null],
  ['swing-check-valve', 2.55, 2.254543],
  ['diaphragm-valve', 3.2, 3.636225],
];

describe('fittings', () => {
  it.each(PUBLISHED)('%s has its published coefficients', (id, twoK, threeK) => {
    expect(hooperK(fittings[id].twoK, 50.8, 5000)).toBeCloseTo(twoK, 6);
    const darby = fittings[id].threeK;
    if (threeK === null) expect(darby).toBeNull();
    else expect(darbyK(darby!, 2, 5000)).toBeCloseTo(threeK, 5);
  });

  it('cover the list, each with a name of its own', () => {
    expect(PUBLISHED.map(([id]) => id).sort()).toEqual(Object.keys(fittings).sort());
    const names = Object.values(fittings).map((fitting) => fitting.name);
    expect(new Set(names).size).toBe(names.length);
    for (const name of names) expect(name).toMatch(/^(Elbow|Tee|\w+ (check )?valve|\w+ check valve)/i);
  });

  it('give 0.680 and 0.67486 for a 2 in threaded elbow at Re 10 000 (case V12)', () => {
    expect(hooperK(fittings['elbow-90-threaded'].twoK, 50.8, 1e4)).toBeCloseTo(0.68, 10);
    expect(darbyK(fittings['elbow-90-threaded'].threeK!, 2, 1e4)).toBeCloseTo(0.67486, 5);
  });

  it('sum over a pipe by count', () => {
    expect(sumMinorK({}, 52.5, 20000)).toBe(0);
    const one = sumMinorK({ 'elbow-90-welded': 1 }, 50.8, 5000);
    expect(one).toBeCloseTo(0.535, 10);
    expect(sumMinorK({ 'elbow-90-welded': 4, 'gate-valve': 2, 'elbow-45': 0 }, 50.8, 5000)).toBeCloseTo(4 * one + 2 * 0.21, 10);
    expect(sumMinorK({ 'gate-valve': undefined }, 50.8, 5000)).toBe(0);
  });

  it('cost more in small pipes and in slow flow', () => {
    const id = fc.constantFrom(...(Object.keys(fittings) as FittingId[]));
    fc.assert(
      fc.property(id, fc.double({ min: 10, max: 300, noNaN: true }), fc.double({ min: 100, max: 1e6, noNaN: true }), (name, bore, re) => {
        const { twoK, threeK } = fittings[name];
        expect(hooperK(twoK, bore, re)).toBeGreaterThan(hooperK(twoK, bore * 1.1, re * 1.1));
        if (threeK) expect(darbyK(threeK, bore / 25, re)).toBeGreaterThan(darbyK(threeK, bore / 20, re * 1.1));
      }),
    );
  });
});

describe('tees by the ratio of flows', () => {
  it('joining 300 and 100 gpm at 90° have K 0.325 on the run and -0.0421875 on the branch (TP-410 problem 7.35)', () => {
    expect(convergingTee90(0.25).run).toBeCloseTo(0.325, 10);
    expect(convergingTee90(0.25).branch).toBeCloseTo(-0.0421875, 10);
  });

  it('dividing 400 and 250 gpm at 45° have K -0.06827 on the run and 0.46462 on the branch (TP-410 problem 7.36)', () => {
    expect(divergingWye45(250 / 650).run).toBeCloseTo(-0.06827, 5);
    expect(divergingWye45(250 / 650).branch).toBeCloseTo(0.46462, 5);
  });

  // Past the limits of the tables, by the open fluids library 1.0.22.
  it('follow the second half of the tables where the branch carries most', () => {
    expect(convergingTee90(0.4).branch).toBeCloseTo(0.54 * (1.16 - 0.72), 10);
    expect(convergingTee90(0.7).branch).toBeCloseTo(0.7205, 10);
    expect(convergingTee90(0.7).run).toBeCloseTo(0.595, 10);
    expect(divergingWye45(0.5).run).toBeCloseTo(0, 12);
    expect(divergingWye45(0.6).branch).toBeCloseTo(0.64 * (1.36 - 1.2 * Math.SQRT1_2), 10);
    expect(divergingWye45(0.8).run).toBeCloseTo(0.1152, 10);
    expect(divergingWye45(0.8).branch).toBeCloseTo(0.305177, 6);
  });
});
