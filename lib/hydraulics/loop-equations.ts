import type { Loops } from './graph/loops';
import type { CorrectionOfAll } from './correction-of-all';
import { type LoopSolver, loopSolver } from './loop-matrix';

/**
 * The correction of all loops from the loops' own equations, (B D Bᵀ) x = -B h, with h and D the losses and slopes of the chains and B the
 * loops' directions (R. Epp and A. G. Fowler 1970): one unknown a loop, few where the loops are short.
 */
export class LoopEquations implements CorrectionOfAll {
  private readonly solver: LoopSolver;
  private readonly head: Float64Array;
  private readonly flow: Float64Array;

  constructor(
    readonly loops: Loops,
    chainCount: number,
  ) {
    this.solver = loopSolver(loops, chainCount);
    this.head = new Float64Array(loops.count);
    this.flow = new Float64Array(loops.count);
  }

  sumHeads(chainLoss: Float64Array): number {
    const { head } = this;
    const { count, start, sign, chain } = this.loops;
    let worst = 0;
    for (let l = 0; l < count; l++) {
      let around = 0;
      for (let p = start[l]; p < start[l + 1]; p++) around += sign[p] * chainLoss[chain[p]];
      head[l] = around;
      const magnitude = Math.abs(around);
      if (!(magnitude <= worst)) worst = magnitude;
    }
    return worst;
  }

  assemble(chainSlope: Float64Array): void {
    this.solver.assemble(chainSlope);
  }

  correct(chainStep: Float64Array): void {
    const { head, flow } = this;
    const { count, start, sign, chain } = this.loops;
    this.solver.solve(head, flow);
    chainStep.fill(0);
    for (let l = 0; l < count; l++) {
      const round = flow[l];
      for (let p = start[l]; p < start[l + 1]; p++) chainStep[chain[p]] -= sign[p] * round;
    }
  }
}
