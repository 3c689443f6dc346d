import type { NetworkDocument } from '@/lib/hydraulics/types';
import { activeColumns, activeUnknowns, Gaussian } from './fit/gaussian';
import { linearWithin, mostLikely } from './fit/most-likely';
import { ReadingModel } from './fit/reading-model';
import { type Cause, faultDeviation, FaultSearch, type Suspicion } from './fit/suspicions';
import { type Priors, type Unknown, unknownsOf, usualPriors } from './fit/unknowns';
import type { LoopReading, ReadingRound } from './readings';

/** What one reading showed, what the fitted loop would show there, and how far they are apart in standard deviations. */
export interface FittedReading {
  round: number;
  reading: LoopReading;
  expected: number;
  deviations: number;
  /** Set aside as one that does not belong to this loop. */
  isSetAside: boolean;
}

/** A fault that the fit takes as likelier than none: `link` is its valve, pump or the run's terminal or first pipe, and `round` the first in which it acts. */
export interface SuspectedFault {
  cause: Cause;
  link: string;
  round: number;
  logOdds: number;
  /** True over assumed: resistance, Kv, head, or reading over expectation. */
  factor: number;
}

/** The loop as its readings show it. */
export interface FittedLoop {
  document: NetworkDocument;
  rounds: ReadingRound[];
  unknowns: Unknown[];
  /** Natural logarithm of each unknown's factor. */
  values: Float64Array;
  /** Prior standard deviation of each unknown, widened where a fault is suspected. */
  deviations: Float64Array;
  readings: FittedReading[];
  faults: SuspectedFault[];
  converged: boolean;
  /** The same faults by position among the unknowns and readings. */
  accepted: Suspicion[];
  /** Unknowns that are not held at their design, by position. */
  active: Int32Array;
  /** The linear model at the fit, of the active unknowns in units of `deviations`. */
  posterior: Gaussian;
}

const MOST_PASSES = 12;

/**
 * Fits the loop's resistances, charts, pump heads and meters to readings: maximum a posteriori with log-normal priors about the
 * design, each reading by its own error. A reading or unknown that would be beyond its spread is freed where a fault there is likelier than
 * none. `before`, the fit to the earlier rounds alone, saves steps. Throws a RangeError for a reading at a link that is not in the document.
 */
export function fitLoop(document: NetworkDocument, rounds: ReadingRound[], priors: Priors = usualPriors, before?: FittedLoop): FittedLoop {
  const unknowns = unknownsOf(document, rounds, priors);
  const model = new ReadingModel(document, rounds, unknowns);
  let accepted = before ? clearFaults(before, unknowns) : [];
  let { deviations, noise } = spreadsWith(accepted, unknowns, model.placed.length);
  let fit = mostLikely(model, deviations, noise, startValues(unknowns, deviations, before));
  const searchNow = () => new FaultSearch(document, rounds, unknowns, model, linearWithin(model, deviations, fit), deviations, noise);
  let search = searchNow();
  let newest: Suspicion[] = [];
  const dropped: Suspicion[] = [];
  for (let pass = 0; pass < MOST_PASSES; pass++) {
    // A fault found last was weighed against all that is known; those before it may have stood in for it.
    const gone = search.unlikely(accepted.filter((each) => !newest.includes(each)));
    dropped.push(...gone);
    const found = gone.length ? [] : search.likely(dropped);
    if (!found.length && !gone.length) break;
    accepted = [...accepted.filter((each) => !gone.includes(each)), ...found];
    newest = found;
    ({ deviations, noise } = spreadsWith(accepted, unknowns, model.placed.length));
    fit = mostLikely(
      model,
      deviations,
      noise,
      fit.values.map((value, j) => (deviations[j] > 0 ? value : 0)),
    );
    search = searchNow();
  }

  const readings = model.placed.map(({ reading, round }, m) => {
    return { round, reading, expected: fit.shown[m], deviations: fit.misfit[m], isSetAside: noise[m] > 1 };
  });
  const faults = accepted.map(({ cause, unknown, reading, logOdds }): SuspectedFault => {
    if (unknown !== null) {
      const { id, rounds: acts } = unknowns[unknown];
      return { cause, link: id, round: acts.indexOf(true), logOdds, factor: Math.exp(fit.values[unknown]) };
    }
    const { reading: wrong, round, expected } = readings[reading!];
    return { cause, link: wrong.link, round, logOdds, factor: wrong.value / expected };
  });
  const active = activeUnknowns(deviations);
  const posterior = new Gaussian(activeColumns(fit.rows, deviations, active), noise);
  return {
    document,
    rounds,
    unknowns,
    values: fit.values,
    deviations,
    readings,
    faults,
    accepted,
    converged: fit.converged,
    active,
    posterior,
  };
}

/** Prior deviations and variances of the readings, widened where a fault is suspected. */
function spreadsWith(accepted: Suspicion[], unknowns: Unknown[], readings: number) {
  const deviations = Float64Array.from(unknowns, (unknown) => unknown.deviation);
  const noise = new Float64Array(readings).fill(1);
  for (const { cause, unknown, reading } of accepted) {
    const deviation = faultDeviation(cause);
    if (unknown !== null) deviations[unknown] = Math.hypot(deviations[unknown], deviation);
    else noise[reading!] += deviation ** 2;
  }
  return { deviations, noise };
}

/**
 * Odds, as a logarithm, beyond which a mis-set valve of an earlier fit needs no second search. Other faults are told from each other by
 * the later rounds and are searched again.
 */
const CLEAR_ODDS = 15;

const keyOf = ({ kind, id, rounds }: Unknown) => `${kind} ${id} ${rounds.indexOf(true)}`;

function startValues(unknowns: Unknown[], deviations: Float64Array, before?: FittedLoop): Float64Array {
  const known = new Map(before?.unknowns.map((unknown, j) => [keyOf(unknown), before.values[j]]));
  return Float64Array.from(unknowns, (unknown, j) => (deviations[j] > 0 ? (known.get(keyOf(unknown)) ?? 0) : 0));
}

function clearFaults(before: FittedLoop, unknowns: Unknown[]): Suspicion[] {
  const places = new Map(unknowns.map((unknown, j) => [keyOf(unknown), j]));
  return before.accepted.flatMap((fault): Suspicion[] => {
    if (fault.cause !== 'mis-set' || fault.logOdds < CLEAR_ODDS || fault.unknown === null) return [];
    const unknown = places.get(keyOf(before.unknowns[fault.unknown]));
    return unknown === undefined ? [] : [{ ...fault, unknown }];
  });
}
