import type { DpControl } from './dp-control';
import type { Loops } from './graph/loops';
import type { NetworkState } from './network-state';
import { CLOSED_HEAD_M, type IterationOutcome } from './simultaneous';
import { moveTowardsRoot, type RisingFunction } from './rising-root';
import type { LoopCorrection } from './types';

/** Evaluations of a chain after which the sweeps are given up, and sweeps at most. */
const MOST_EVALUATIONS = 4e6;
const MOST_SWEEPS = 2000;
/** Head left around the worst loop at the end of the sweeps, m: they close slowly, so nearer than one simultaneous step needs. */
const SWEPT_HEAD_M = 0.1 * CLOSED_HEAD_M;

/**
 * The published method of balancing heads (Hardy Cross, Analysis of flow in networks of conduits or conductors, University of Illinois
 * Bulletin 286, 1936): flows that balance at every node are corrected round one loop after another,
 *
 *   dQ = - sum(h) / sum(dh/dQ),
 *
 * each loop with the flows that the loops before it have left. Where a correction would leave more head than it found
 * (a law with a wall, or flat at rest) the same loop is corrected again at once; nothing else is added to the method. Flows L/s, heads m.
 */
export function balanceHeads(
  state: NetworkState,
  loops: Loops,
  control: DpControl | null,
  history: LoopCorrection[] | null,
): IterationOutcome {
  const mostSweeps = Math.min(MOST_SWEEPS, Math.ceil(MOST_EVALUATIONS / Math.max(1, loops.chain.length)));
  const around = new LoopHead(state, loops);
  state.evaluate();
  for (let sweep = 0; ; sweep++) {
    const worst = worstHead(around, loops);
    const off = control ? control.worstError(state) : 0;
    if (worst <= SWEPT_HEAD_M && off <= CLOSED_HEAD_M) {
      if (!control?.switchStates(state)) return { closed: true, iterations: sweep, worstM: worst };
      state.evaluate();
    }
    if (sweep >= mostSweeps || Number.isNaN(worst)) return { closed: false, iterations: sweep, worstM: worst };
    for (let loop = 0; loop < loops.count; loop++) {
      around.choose(loop);
      const headM = around.value;
      const slopeMPerLs = around.slope;
      const correctionLs = moveTowardsRoot(around, headM, -headM / slopeMPerLs, Math.abs(headM));
      history?.push({ sweep: sweep + 1, loop, headM, slopeMPerLs, correctionLs });
    }
    if (control) {
      control.nudge(state);
      state.evaluate();
    }
  }
}

/** One loop's head as a function of the flow put round it. */
class LoopHead implements RisingFunction {
  value = 0;
  slope = 0;
  private loop = 0;
  private put = 0;

  constructor(
    private readonly state: NetworkState,
    private readonly loops: Loops,
  ) {}

  choose(loop: number): void {
    this.loop = loop;
    this.put = 0;
    this.sum();
  }

  evaluate(correction: number): void {
    const { chain, sign, start } = this.loops;
    for (let p = start[this.loop]; p < start[this.loop + 1]; p++) {
      this.state.chainFlow[chain[p]] += sign[p] * (correction - this.put);
      this.state.evaluateChain(chain[p]);
    }
    this.put = correction;
    this.sum();
  }

  private sum(): void {
    const { chain, sign, start } = this.loops;
    const { chainLoss, chainSlope } = this.state;
    this.value = 0;
    this.slope = 0;
    for (let p = start[this.loop]; p < start[this.loop + 1]; p++) {
      this.value += sign[p] * chainLoss[chain[p]];
      this.slope += chainSlope[chain[p]];
    }
  }
}

function worstHead(around: LoopHead, loops: Loops): number {
  let worst = 0;
  for (let loop = 0; loop < loops.count; loop++) {
    around.choose(loop);
    const head = Math.abs(around.value);
    if (!(head <= worst)) worst = head;
  }
  return worst;
}
