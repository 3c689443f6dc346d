import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import { type ReadingRound, settingIn } from '../readings';
import { activeColumns, activeUnknowns, dot, Gaussian, gramOf } from './gaussian';
import type { LinearModel } from './most-likely';
import type { ReadingModel } from './reading-model';
import type { Unknown } from './unknowns';

export type Cause = 'blocked' | 'mis-set' | 'wrong-chart' | 'pump-off-curve' | 'wrong-reading';

/** A fault that would explain what the design's spread does not. */
export interface Suspicion {
  cause: Cause;
  /** Position of the unknown that it frees, or of the reading that it sets aside. */
  unknown: number | null;
  reading: number | null;
  /** Natural logarithm of the odds for it against no fault there, prior odds included. */
  logOdds: number;
  /** How far it moves its unknown (natural logarithm), or its reading (standard deviations). */
  shift: number;
}

/**
 * How far each fault takes its unknown, as a standard deviation of its logarithm, and the odds for one before anything is measured.
 * A wrong reading is one by a factor of about e in its differential pressure.
 */
const faults: Record<Cause, { deviation: number; odds: number }> = {
  blocked: { deviation: 1.5, odds: 0.02 },
  'mis-set': { deviation: 1, odds: 0.02 },
  'wrong-chart': { deviation: 0.4, odds: 0.01 },
  'pump-off-curve': { deviation: 0.4, odds: 0.01 },
  'wrong-reading': { deviation: 30, odds: 0.003 },
};
const causeOf: Partial<Record<Unknown['kind'], Cause>> = {
  run: 'blocked',
  setting: 'mis-set',
  chart: 'wrong-chart',
  pump: 'pump-off-curve',
};

/** A valve opens or closes no further than its table; this much of its Kv is left to the table's own error. */
const TABLE_ERROR = 0.05;
/** A shift along the tangent may overshoot by as much. */
const BEYOND_TABLE = 1.5;
const WORTH_A_SECOND_LOOK = -2;
/** Faults that look this much alike to the readings (squared cosine) are not taken in one go: the first may explain what speaks for the next. */
const ALIKE = 0.1;
const MOST_RIVALS = 5;
const CHORDS = 3;
const FURTHEST_CHORD = 4;

export const faultDeviation = (cause: Cause) => faults[cause].deviation;

interface Weighed extends Suspicion {
  column: Float64Array;
  whitened: Float64Array;
  variance: number;
}

function unit(length: number, at: number): Float64Array {
  const column = new Float64Array(length);
  column[at] = 1;
  return column;
}

const logOdds = ({ cause, variance }: Pick<Weighed, 'cause' | 'variance'>, growth: number, match: number) =>
  Math.log(faults[cause].odds) - 0.5 * Math.log(growth) + (0.5 * variance * match * match) / growth;

const squaredCosine = (a: Float64Array, b: Float64Array) => dot(a, b) ** 2 / (dot(a, a) * dot(b, b));

/**
 * Weighs every single fault by the generalised likelihood ratio (S. Narasimhan, R. Mah 1987) at the fit's linear model, with the prior odds and
 * the width of each fault as an alternative prior. A freed unknown costs -½ ln(1 + Δ k·S⁻¹k) and gains ½ Δ (k·S⁻¹r)² / (1 + Δ k·S⁻¹k).
 */
export class FaultSearch {
  private gram: Float64Array[];
  private readonly innovation: Float64Array;
  private readonly noise: Float64Array;

  constructor(
    private readonly document: NetworkDocument,
    private readonly rounds: ReadingRound[],
    private readonly unknowns: Unknown[],
    private readonly model: ReadingModel,
    private readonly fit: LinearModel,
    private readonly deviations: Float64Array,
    noise: Float64Array,
  ) {
    this.noise = noise.slice();
    this.gram = gramOf(activeColumns(fit.rows, deviations, activeUnknowns(deviations)));
    // Readings less what the prior expects, on the linear model.
    this.innovation = fit.misfit.map((each, m) => each + dot(fit.rows[m], fit.values));
  }

  /** Unlike faults more likely than none, the most likely first, each found with the earlier ones taken as true; not those dropped before. */
  likely(dropped: Suspicion[]): Suspicion[] {
    const found: Suspicion[] = [];
    const isDropped = (fault: Suspicion) =>
      dropped.some(({ cause, unknown, reading }) => cause === fault.cause && unknown === fault.unknown && reading === fault.reading);
    let candidates = this.weigh(this.candidates().filter((fault) => !isDropped(fault)));
    for (;;) {
      candidates = candidates.filter((each) => each.logOdds > WORTH_A_SECOND_LOOK).sort((a, b) => b.logOdds - a.logOdds);
      const first = candidates.at(0);
      if (!first || first.logOdds <= 0) return found;
      const rivals = candidates.filter((each) => squaredCosine(each.whitened, first.whitened) >= ALIKE);
      candidates = candidates.filter((each) => !rivals.includes(each));
      const best = rivals
        .slice(0, MOST_RIVALS)
        .map((each) => this.followed(each))
        .reduce((a, b) => (b.logOdds > a.logOdds ? b : a));
      if (best.logOdds <= 0) continue;
      found.push(best);
      this.accept(best);
      candidates = this.weigh(candidates);
    }
  }

  /** The same fault weighed along the chord to where it takes its unknown: the tangent is misleading for a valve nearly shut. */
  private followed(fault: Weighed): Weighed {
    let here = fault;
    for (let round = 0; round < CHORDS && here.unknown !== null && here.shift !== 0; round++) {
      const shift = Math.min(Math.max(here.shift, -FURTHEST_CHORD), FURTHEST_CHORD);
      const values = this.fit.values.slice();
      values[here.unknown] += shift;
      const solved = this.model.solve(values);
      if (!solved.closed) return here;
      const column = solved.scaled.map((each, m) => (each - (this.model.placed[m].scaled - this.fit.misfit[m])) / shift);
      [here] = this.weigh([{ ...here, column }]);
    }
    return here;
  }

  /** Of faults taken as true already, those that are no longer likelier than none, all others being kept. */
  unlikely(accepted: Suspicion[]): Suspicion[] {
    const { gaussian, innovation } = this.factorised();
    return accepted.filter(({ cause, unknown, reading }) => {
      const { deviation, odds } = faults[cause];
      const whitened = gaussian.whiten(
        unknown !== null ? Float64Array.from(this.fit.rows, (row) => row[unknown]) : unit(this.model.placed.length, reading!),
      );
      // S holds the fault's own variance; taken out of it, k·S⁻¹k and k·S⁻¹r both grow by 1 / (1 - Δ k·S⁻¹k).
      const shrinkage = Math.max(1 - deviation ** 2 * dot(whitened, whitened), 1e-12);
      return Math.log(odds) + 0.5 * Math.log(shrinkage) + (0.5 * deviation ** 2 * dot(whitened, innovation) ** 2) / shrinkage <= 0;
    });
  }

  private accept({ reading, column, variance }: Weighed): void {
    this.factors = null;
    if (reading !== null) this.noise[reading] += variance;
    else for (let m = 0; m < column.length; m++) for (let k = 0; k <= m; k++) this.gram[m][k] += variance * column[m] * column[k];
  }

  private candidates(): Weighed[] {
    const { unknowns, fit, deviations, noise } = this;
    const { placed } = this.model;
    const weighed = (cause: Cause, unknown: number | null, reading: number | null, column: Float64Array): Weighed => {
      return { cause, unknown, reading, column, whitened: column, variance: faults[cause].deviation ** 2, logOdds: -Infinity, shift: 0 };
    };
    const ofUnknowns = unknowns.flatMap((unknown, j) => {
      const cause = causeOf[unknown.kind];
      // What is freed already is not freed twice.
      if (!cause || deviations[j] > 0.9 * faults[cause].deviation) return [];
      return [
        weighed(
          cause,
          j,
          null,
          Float64Array.from(fit.rows, (row) => row[j]),
        ),
      ];
    });
    const ofReadings = placed.flatMap((_, m) => {
      if (noise[m] > 1) return [];
      return [weighed('wrong-reading', null, m, unit(placed.length, m))];
    });
    return [...ofUnknowns, ...ofReadings];
  }

  private factors: { gaussian: Gaussian; innovation: Float64Array; pull: Float64Array } | null = null;

  /** S as it stands, factorised once for all that is weighed with it. */
  private factorised() {
    if (!this.factors) {
      const gaussian = new Gaussian([], this.noise, 0, this.gram);
      this.factors = { gaussian, innovation: gaussian.whiten(this.innovation), pull: gaussian.solve(this.innovation) };
    }
    return this.factors;
  }

  private weigh(candidates: Weighed[]): Weighed[] {
    const { gaussian, innovation, pull } = this.factorised();
    return candidates.map((each) => {
      // k·S⁻¹k is at least k_m² / S_mm for any reading m (Cauchy-Schwarz): most candidates are ruled out by that alone.
      let least = 0;
      each.column.forEach((value, m) => (least = Math.max(least, value ** 2 / (this.gram[m][m] + this.noise[m]))));
      const most = logOdds(each, 1 + each.variance * least, dot(each.column, pull));
      if (most < WORTH_A_SECOND_LOOK) return { ...each, shift: 0, logOdds: -Infinity };
      const whitened = gaussian.whiten(each.column);
      const growth = 1 + each.variance * dot(whitened, whitened);
      const match = dot(whitened, innovation);
      const shift = (each.variance * match) / growth;
      return { ...each, whitened, shift, logOdds: this.isPossible(each, shift) ? logOdds(each, growth, match) : -Infinity };
    });
  }

  /** Dirt only adds resistance, and a valve stands within its table. */
  private isPossible({ cause, unknown }: Weighed, shift: number): boolean {
    if (cause === 'blocked') return shift > 0;
    if (cause !== 'mis-set') return true;
    const { links, rounds } = this.unknowns[unknown!];
    const link = this.document.links[links[0]];
    if (link.kind !== 'balancingValve') return false;
    const table = link.kvTable;
    const kv = kvAtSetting(table, settingIn(this.rounds[rounds.indexOf(true)].settings, link));
    const least = Math.log(table[0].kv / kv);
    const most = Math.log(table[table.length - 1].kv / kv);
    return shift > 0 ? most > TABLE_ERROR && shift < BEYOND_TABLE * most : least < -TABLE_ERROR && shift > BEYOND_TABLE * least;
  }
}
