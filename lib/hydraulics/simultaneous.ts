import type { Loops } from './graph/loops';
import type { DpControl } from './dp-control';
import { type LoopSolver, loopSolver } from './loop-matrix';
import type { NetworkState } from './network-state';
import { moveTowardsRoot, type RisingFunction } from './rising-root';

export interface IterationOutcome {
  closed: boolean;
  iterations: number;
}

/** What an iteration stops at: head left around the worst loop (m) and summed flow change over summed flow. */
export const CLOSED_HEAD_M = 1e-6;
export const SETTLED_FLOW_RATIO = 1e-6;
const MOST_ITERATIONS = 200;
const MOST_FLOW_STEP_LS = 1e7;

/**
 * All loops corrected together: Newton's method on the heads around the loops, (B D Bᵀ) dq = -B h, with h and D the losses and slopes of the
 * chains and B the loops' directions (D. W. Martin and G. Peters 1963 for nodes; Epp and Fowler 1970 for loops; the steps are
 * those of the gradient method of E. Todini and S. Pilati 1987). The laws never fall with flow, so the solution is the
 * least of a convex function, and a step that overshoots along its own direction is cut back to where that
 * function is least: no network diverges. Flows are L/s, heads m.
 */
export class SimultaneousIteration {
  private readonly solver: LoopSolver;
  private readonly loopHead: Float64Array;
  private readonly loopStep: Float64Array;
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
    readonly loops: Loops,
  ) {
    const chains = state.chainFlow.length;
    this.solver = loopSolver(loops, chains);
    this.loopHead = new Float64Array(loops.count);
    this.loopStep = new Float64Array(loops.count);
    this.step = new Float64Array(chains);
    this.before = new Float64Array(chains);
  }

  /** First flows: those of the network with every law made a straight line. */
  start(): void {
    const { state, solver, loopHead, loopStep, step } = this;
    state.chainFlow.fill(0);
    state.linearize();
    this.sumLoopHeads();
    solver.assemble(state.chainSlope);
    for (let l = 0; l < loopHead.length; l++) loopHead[l] = -loopHead[l];
    solver.solve(loopHead, loopStep);
    this.spreadStep();
    state.chainFlow.set(step);
  }

  /** Iterates from the state's present flows until it is closed and settled. */
  run(control: DpControl | null): IterationOutcome {
    const { state } = this;
    this.control = control;
    state.evaluate();
    let change = Infinity;
    let shrinking = 1;
    for (let iterations = 0; ; iterations++) {
      const worst = this.sumLoopHeads();
      const off = control ? control.worstError(state) : 0;
      const closed = worst <= CLOSED_HEAD_M && off <= CLOSED_HEAD_M;
      // Settled: the next change, if it shrinks again as the last one did, would be below the tolerance.
      if (closed && (change * shrinking <= SETTLED_FLOW_RATIO || worst === 0)) {
        if (!control?.switchStates(state)) return { closed: true, iterations };
        state.evaluate();
        this.sumLoopHeads();
      }
      if (iterations === MOST_ITERATIONS || Number.isNaN(worst)) return { closed: false, iterations };
      this.findStep();
      const next = this.takeStep(worst + off);
      shrinking = change < Infinity ? Math.min(1, next / change) : 1;
      change = next;
    }
  }

  /** Head left around each loop; answers the largest. */
  private sumLoopHeads(): number {
    const { loops, loopHead } = this;
    const { chainLoss } = this.state;
    let worst = 0;
    for (let l = 0; l < loops.count; l++) {
      let head = 0;
      for (let p = loops.start[l]; p < loops.start[l + 1]; p++) head += loops.sign[p] * chainLoss[loops.chain[p]];
      loopHead[l] = head;
      const magnitude = Math.abs(head);
      if (!(magnitude <= worst)) worst = magnitude;
    }
    return worst;
  }

  private findStep(): void {
    const { state, solver, loopHead, loopStep, control } = this;
    solver.assemble(state.chainSlope);
    for (let l = 0; l < loopHead.length; l++) loopHead[l] = -loopHead[l];
    solver.solve(loopHead, loopStep);
    if (control) control.correct(state, this.loops, solver, loopStep);
    this.spreadStep();
  }

  private spreadStep(): void {
    const { loops, loopStep, step } = this;
    step.fill(0);
    for (let l = 0; l < loops.count; l++) {
      const d = loopStep[l];
      for (let p = loops.start[l]; p < loops.start[l + 1]; p++) step[loops.chain[p]] += loops.sign[p] * d;
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
      const error = this.sumLoopHeads() + this.control!.worstError(this.state);
      if (error < errorBefore || tries === 6) return part;
    }
  }
}
