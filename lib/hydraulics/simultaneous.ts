import type { DpControl } from './dp-control';
import type { CorrectionOfAll } from './correction-of-all';
import type { NetworkState } from './network-state';
import { moveTowardsRoot, type RisingFunction } from './rising-root';

export interface IterationOutcome {
  closed: boolean;
  iterations: number;
  /** Head left around the worst loop, m. */
  worstM: number;
}

/** What an iteration stops at: head left around the worst loop (m) and summed flow change over summed flow. */
export const CLOSED_HEAD_M = 1e-6;
export const SETTLED_FLOW_RATIO = 1e-6;
const MOST_ITERATIONS = 200;
const MOST_FLOW_STEP_LS = 1e7;

/**
 * All loops corrected together: Newton's method on the heads around the loops (R. Epp and A. G. Fowler 1970), the steps from the loops' equations
 * or, where loops outnumber them, from the nodes' (`correctionOfAll`). The laws never fall with flow, so the solution is the least of
 * a convex function, and a step that overshoots along its own direction is cut back to where that function is least: no
 * network diverges. Flows are L/s, heads m.
 */
export class SimultaneousIteration {
  private readonly step: Float64Array;
  private readonly before: Float64Array;

  private readonly alongStep: RisingFunction = {
    value: 0,
    slope: 0,
    evaluate: (part) => this.evaluateAlong(part),
  };

  private control: DpControl | null = null;

  constructor(
    readonly state: NetworkState,
    readonly loops: CorrectionOfAll,
  ) {
    const chains = state.chainFlow.length;
    this.step = new Float64Array(chains);
    this.before = new Float64Array(chains);
  }

  /** First flows: those of the network with every law made a straight line, near its design flows where `byDesign`. */
  start(byDesign: boolean): void {
    const { state, loops, step } = this;
    state.chainFlow.fill(0);
    state.linearize(byDesign);
    loops.sumHeads(state.chainLoss);
    loops.assemble(state.chainSlope);
    loops.correct(step);
    state.chainFlow.set(step);
  }

  /** Iterates from the state's present flows until it is closed and settled. */
  run(control: DpControl | null): IterationOutcome {
    const { state, loops, step } = this;
    this.control = control;
    state.evaluate();
    let change = Infinity;
    let shrinking = 1;
    for (let iterations = 0; ; iterations++) {
      const worst = loops.sumHeads(state.chainLoss);
      const off = control ? control.worstError(state) : 0;
      const closed = worst <= CLOSED_HEAD_M && off <= CLOSED_HEAD_M;
      // Settled: the next change, if it shrinks again as the last one did, would be below the tolerance.
      if (closed && (change * shrinking <= SETTLED_FLOW_RATIO || worst === 0)) {
        if (!control?.switchStates(state)) return { closed: true, iterations, worstM: worst };
        state.evaluate();
        loops.sumHeads(state.chainLoss);
      }
      if (iterations === MOST_ITERATIONS || Number.isNaN(worst)) return { closed: false, iterations, worstM: worst };
      loops.assemble(state.chainSlope);
      loops.correct(step);
      if (control) control.correct(state, loops, step);
      const next = this.takeStep(worst + off);
      shrinking = change < Infinity ? Math.min(1, next / change) : 1;
      change = next;
    }
  }

  /** Moves along the step and evaluates; answers the summed change over the summed flow. */
  private takeStep(errorBefore: number): number {
    const { state, step, before, control } = this;
    before.set(state.chainFlow);
    let largest = 0;
    for (let c = 0; c < step.length; c++) largest = Math.max(largest, Math.abs(step[c]));
    const longest = largest > MOST_FLOW_STEP_LS ? MOST_FLOW_STEP_LS / largest : 1;
    const part = control?.isThrottling() ? this.cutByError(longest, errorBefore) : this.cutByPower(longest);
    let moved = 0;
    let total = 0;
    for (let c = 0; c < step.length; c++) {
      moved += Math.abs(part * step[c]);
      total += Math.abs(state.chainFlow[c]);
    }
    return total > 0 ? moved / total : moved > 0 ? Infinity : 0;
  }

  private moveTo(part: number): void {
    const { state, step, before } = this;
    const { chainFlow } = state;
    for (let c = 0; c < chainFlow.length; c++) chainFlow[c] = before[c] + part * step[c];
    this.control?.moveTo(state, part);
    state.evaluate();
  }

  /**
   * The slope of the convex function along the step, and how it rises: the head that the step's own flows meet. The full step is taken
   * if the function still falls at its end or has nearly stopped to; else the step is cut to about where it is least.
   */
  private cutByPower(longest: number): number {
    const along = this.alongStep;
    this.sumAlong();
    const atStart = along.value;
    return moveTowardsRoot(along, atStart, longest, 0.5 * Math.abs(atStart));
  }

  private evaluateAlong(part: number): void {
    this.moveTo(part);
    this.sumAlong();
  }

  private sumAlong(): void {
    const { step, alongStep } = this;
    const { chainLoss, chainSlope } = this.state;
    let value = 0;
    let slope = 0;
    for (let c = 0; c < step.length; c++) {
      value += chainLoss[c] * step[c];
      slope += chainSlope[c] * step[c] * step[c];
    }
    alongStep.value = value;
    alongStep.slope = slope;
  }

  /** With controllers at work the function is no longer convex: halve until the worst error falls, a few times at most. */
  private cutByError(longest: number, errorBefore: number): number {
    let part = longest;
    for (let tries = 0; ; tries++, part /= 2) {
      this.moveTo(part);
      const error = this.loops.sumHeads(this.state.chainLoss) + this.control!.worstError(this.state);
      if (error < errorBefore || tries === 6) return part;
    }
  }
}
