import { activeColumns, activeUnknowns, Gaussian, gramOf, transposeTimes } from './gaussian';
import type { ReadingModel } from './reading-model';

const MOST_STEPS = 25;
/** A step that lowers the misfit by less than this part of it is the last: the next would gain its square. */
const SETTLED = 0.004;
/** No resistance is taken further than this logarithm from its design: beyond, it is as good as shut. */
const FURTHEST = 9;

/** The model made linear at some values of the unknowns. */
export interface LinearModel {
  values: Float64Array;
  /** Reading minus expectation, in standard deviations of the reading as the meter's data give it. */
  misfit: Float64Array;
  /** Jacobian of the scaled readings per unit of each unknown. */
  rows: Float64Array[];
}

/** The unknowns at their most likely values. */
export interface MostLikely extends LinearModel {
  /** Sum of the squared misfits of readings and of unknowns, each in its own standard deviations. */
  cost: number;
  converged: boolean;
  shown: Float64Array;
}

/** An unknown further than this many of its deviations carries somebody else's fault. */
const MOST_DEVIATIONS = 2;

/**
 * The linear model at a fit where every unknown is taken back to twice its deviation: there faults that have not been freed yet still show
 * in the readings, not in resistances bent to hide them.
 */
export function linearWithin(model: ReadingModel, deviations: Float64Array, fit: MostLikely): LinearModel {
  const values = fit.values.map((value, j) => Math.min(Math.max(value, -MOST_DEVIATIONS * deviations[j]), MOST_DEVIATIONS * deviations[j]));
  if (values.every((value, j) => value === fit.values[j])) return fit;
  const solved = model.solve(values);
  if (!solved.closed) return fit;
  const misfit = Float64Array.from(model.placed, (each, m) => each.scaled - solved.scaled[m]);
  return { values, misfit, rows: model.jacobian(solved) };
}

/**
 * Maximum a posteriori by Levenberg-Marquardt steps: Gauss-Newton, damped where a step does not lower the misfit.
 * `deviations` are prior standard deviations of the unknowns, `noise` variances of the scaled readings.
 */
export function mostLikely(model: ReadingModel, deviations: ArrayLike<number>, noise: Float64Array, start: Float64Array): MostLikely {
  const observed = Float64Array.from(model.placed, (each) => each.scaled);
  const evaluate = (values: Float64Array) => {
    const solved = model.solve(values);
    const misfit = observed.map((each, m) => each - solved.scaled[m]);
    let cost = solved.closed ? 0 : Infinity;
    misfit.forEach((each, m) => (cost += (each * each) / noise[m]));
    values.forEach((value, j) => (cost += deviations[j] > 0 ? (value / deviations[j]) ** 2 : 0));
    return { values, solved, misfit, cost };
  };

  let here = evaluate(start);
  let rows = model.jacobian(here.solved);
  let damping = 0;
  let converged = false;
  for (let step = 0; step < MOST_STEPS && !converged; step++) {
    const active = activeUnknowns(deviations);
    const columns = activeColumns(rows, deviations, active);
    const pull = transposeTimes(
      columns,
      here.misfit.map((each, m) => each / noise[m]),
      active.length,
    );
    const downhill = pull.map((each, k) => each - here.values[active[k]] / deviations[active[k]]);
    const gram = gramOf(columns);
    for (;;) {
      const move = new Gaussian(columns, noise, damping, gram).covarianceTimes(downhill);
      const values = here.values.slice();
      active.forEach((j, k) => (values[j] = clamp(values[j] + deviations[j] * move[k])));
      const next = evaluate(values);
      const gained = here.cost - next.cost;
      if (gained >= 0) {
        here = next;
        damping = damping < 0.01 ? 0 : damping / 10;
        converged = gained <= SETTLED * next.cost;
        break;
      }
      damping = Math.max(0.1, 10 * damping);
      if (damping > 1e6) {
        converged = true;
        break;
      }
    }
    rows = model.jacobian(here.solved);
  }
  return {
    values: here.values,
    cost: here.cost,
    converged: converged && here.solved.closed,
    shown: here.solved.shown,
    misfit: here.misfit,
    rows,
  };
}

const clamp = (value: number) => Math.min(Math.max(value, -FURTHEST), FURTHEST);
