import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fitLoop } from '@/lib/balancing/fit-loop';
import { fittedDocument, scaled } from '@/lib/balancing/fit/fitted-document';
import { ReadingModel } from '@/lib/balancing/fit/reading-model';
import { ReadingScale } from '@/lib/balancing/fit/reading-scale';
import { unknownsOf, usualPriors } from '@/lib/balancing/fit/unknowns';
import { mostTellingReading } from '@/lib/balancing/most-telling-reading';
import { predictSettings } from '@/lib/balancing/predict-settings';
import { documentAt, type LoopSettings, type ReadingRound } from '@/lib/balancing/readings';
import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { threeTerminals } from '../../make/three-terminals';

const stations = ['V1', 'V2', 'V3', 'PU'];
const open: LoopSettings = { V1: 9, V2: 6, V3: 4.1569 };

/** Readings without error of a loop as built. */
function exactRound(built: NetworkDocument, settings: LoopSettings): ReadingRound {
  const drops = new Map(solve(documentAt(built, settings)).links.map((link) => [link.id, Math.abs(link.dropKpa)]));
  return {
    settings,
    readings: stations.map((link) => ({
      link,
      quantity: 'dropKpa',
      value: drops.get(link)!,
      meter: 'exact',
      flowRelative: 0.005,
      absolute: 0.01,
    })),
  };
}

const builtWith = (factors: Record<string, number>) => {
  const document = threeTerminals();
  return { ...document, links: document.links.map((link) => (factors[link.id] === undefined ? link : scaled(link, factors[link.id]))) };
};

describe('the fit of a loop to its readings', () => {
  it('finds no fault and moves nothing where the readings are the design’s', () => {
    const fitted = fitLoop(threeTerminals(), [exactRound(threeTerminals(), open)]);
    expect(fitted.converged).toBe(true);
    expect(fitted.faults).toEqual([]);
    for (const value of fitted.values) expect(Math.abs(value)).toBeLessThan(1e-3);
  });

  it('recovers resistances from readings at two settings', () => {
    const built = builtWith({ T1: 1.5, T2: 0.7, T3: 1.2 });
    const fitted = fitLoop(threeTerminals(), [exactRound(built, open), exactRound(built, { V1: 5, V2: 3, V3: 3 })], {
      ...usualPriors,
      chart: 0.001,
      meter: 0.001,
      pump: 0.001,
      mainRun: 0.01,
    });
    const factorOf = (id: string) =>
      Math.exp(fitted.values[fitted.unknowns.findIndex((unknown) => unknown.kind === 'run' && unknown.id === id)]);
    expect(factorOf('T1')).toBeCloseTo(1.5, 1);
    expect(factorOf('T2')).toBeCloseTo(0.7, 1);
    expect(factorOf('T3')).toBeCloseTo(1.2, 1);
  });

  it('has the Jacobian that finite differences give', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -0.4, max: 0.4, noNaN: true }), { minLength: 16, maxLength: 16 }), (seeds) => {
        const document = threeTerminals();
        const rounds = [exactRound(document, open)];
        const unknowns = unknownsOf(document, rounds, usualPriors);
        const model = new ReadingModel(document, rounds, unknowns);
        const values = Float64Array.from(unknowns, (_, j) => seeds[j % seeds.length]);
        const rows = model.jacobian(model.solve(values));
        const STEP = 1e-4;
        unknowns.forEach((_, j) => {
          const aside = (by: number) => model.solve(values.map((value, k) => (k === j ? value + by : value))).scaled;
          const [up, down] = [aside(STEP), aside(-STEP)];
          rows.forEach((row, m) => {
            const slope = (up[m] - down[m]) / (2 * STEP);
            expect(Math.abs(row[j] - slope)).toBeLessThan(0.02 + 2e-3 * Math.abs(slope));
          });
        });
      }),
      { numRuns: 12 },
    );
  });

  it('gives a reading’s error the same size on its scale, however large the reading', () => {
    const scale = new ReadingScale({ link: 'V', quantity: 'dropKpa', value: 0, meter: 'm', flowRelative: 0.015, absolute: 0.1 });
    fc.assert(
      fc.property(fc.double({ min: -1, max: 200, noNaN: true }), (dropKpa) => {
        const error = Math.hypot(0.03 * dropKpa, 0.1) / 100;
        expect((scale.of(dropKpa + error) - scale.of(dropKpa - error)) / 0.02).toBeCloseTo(1, 2);
      }),
    );
  });

  it('sets aside one reading that is ten times too high, and keeps the rest', () => {
    const round = exactRound(threeTerminals(), { V1: 4.6476, V2: 3.4153, V3: 4.1569 });
    const second = {
      ...round,
      readings: round.readings.map((reading) => (reading.link === 'V2' ? { ...reading, value: 10 * reading.value } : reading)),
    };
    const fitted = fitLoop(threeTerminals(), [round, second]);
    expect(fitted.faults.map(({ cause, link, round: at }) => [cause, link, at])).toEqual([['wrong-reading', 'V2', 1]]);
    expect(fitted.faults[0].factor).toBeCloseTo(10, 0);
  });

  it('refuses a reading at a link that is not there', () => {
    expect(() =>
      fitLoop(threeTerminals(), [{ settings: {}, readings: [{ link: 'V9', quantity: 'dropKpa', value: 1, meter: 'm' }] }]),
    ).toThrow(RangeError);
  });
});

describe('settings predicted from a fit', () => {
  it('bring a loop that differs from its design to design flow at the first go', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ min: -0.5, max: 0.3, noNaN: true }), { minLength: 3, maxLength: 3 }), ([a, b, c]) => {
        const built = builtWith({ T1: Math.exp(a), T2: Math.exp(b), T3: Math.exp(c) });
        const fitted = fitLoop(threeTerminals(), [exactRound(built, open)]);
        const { settings } = predictSettings(fitted);
        const stands = Object.fromEntries(settings.map(({ link, setting }) => [link, setting]));
        const flows = new Map(solve(documentAt(built, stands)).links.map((link) => [link.id, link.flowLs]));
        const ratios = [flows.get('T1')! / 0.5, flows.get('T2')! / 0.3, flows.get('T3')! / 0.2];
        // What cannot be had is a pump faster than full speed: the ratios are equal all the same.
        expect(Math.max(...ratios) / Math.min(...ratios)).toBeLessThan(1.06);
        expect(Math.max(...ratios)).toBeLessThan(1.05);
      }),
      { numRuns: 20 },
    );
  });

  it('come with the reading to expect and a spread that shrinks with the next round', () => {
    const first = exactRound(threeTerminals(), open);
    const stands = { V1: 4.6476, V2: 3.4153, V3: 4.1569 };
    const spreadAfter = (rounds: ReadingRound[]) =>
      predictSettings(fitLoop(threeTerminals(), rounds)).settings.find((each) => each.link === 'V1')!;
    const before = spreadAfter([first]);
    const after = spreadAfter([first, exactRound(threeTerminals(), stands)]);
    expect(before.expectedDropKpa).toBeGreaterThan(13);
    expect(before.expectedDropKpa).toBeLessThan(17);
    expect(after.flowSpreadPercent).toBeLessThan(before.flowSpreadPercent);
  });

  it('change nothing in a loop that has its flows', () => {
    const stands = { V1: 4.6476, V2: 3.4153, V3: 4.1569 };
    const { settings } = predictSettings(fitLoop(threeTerminals(), [exactRound(threeTerminals(), stands)]));
    expect(settings.filter((each) => each.isChanged)).toEqual([]);
  });
});

describe('what the readings leave unknown', () => {
  it('is a terminal that was not read, and the reading that tells most is there', () => {
    const round = exactRound(threeTerminals(), open);
    const fitted = fitLoop(threeTerminals(), [{ ...round, readings: round.readings.filter((reading) => reading.link !== 'V2') }]);
    const unknown = mostTellingReading(fitted);
    expect(unknown.terminals[0].link).toBe('T2');
    expect(['T2', 'V2']).toContain(unknown.readings[0].link);
    expect(unknown.readings[0].varianceReduction).toBeGreaterThan(0.5);
    expect(fittedDocument(fitted.document, fitted.unknowns, fitted.values, null).links.length).toBe(fitted.document.links.length);
  });
});
