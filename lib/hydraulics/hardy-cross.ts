import type { DpControl } from './dp-control';
import type { Loops } from './graph/loops';
import type { NetworkState } from './network-state';
import { CLOSED_HEAD_M, type IterationOutcome } from './simultaneous';
import type { LoopCorrection } from './types';

/** Evaluations of a chain after which the sweeps are given up, and sweeps at most. */
const MOST_EVALUATIONS = 2e7;
const MOST_SWEEPS = 5000;
/** Head left around the worst loop at the end of the sweeps, m: they close slowly, so nearer than one simultaneous step needs. */
const SWEPT_HEAD_M = 0.1 * CLOSED_HEAD_M;

/**
 * The published method of balancing heads (Hardy Cross, Analysis of flow in networks of conduits or conductors, University of Illinois
 * Bulletin 286, 1936): flows that balance at every node are corrected round one loop after another,
 *
 *   dQ = - sum(h) / sum(dh/dQ),
 *
 * each loop with the flows that the loops before it have left. Where a correction would leave more head than it found
 * (a law with a kink, or flat at rest) it is halved; nothing else is added to the method. Flows L/s, heads m.
 */
export function balanceHeads(state: NetworkState, loops: Loops, control: DpControl | null, history: LoopCorrection[] | null): IterationOutcome {
  const mostSweeps = Math.min(MOST_SWEEPS, Math.ceil(MOST_EVALUATIONS / Math.max(1, loops.chain.length)));
  state.evaluate();
  for (let sweep = 0; ; sweep++) {
    const worst = worstHead(state, loops);
    const off = control ? control.worstError(state) : 0;
    if (worst <= SWEPT_HEAD_M && off <= CLOSED_HEAD_M) {
      if (!control?.switchStates(state)) return { closed: true, iterations: sweep };
      state.evaluate();
    }
    if (sweep >= mostSweeps || Number.isNaN(worst)) return { closed: false, iterations: sweep };
    for (let loop = 0; loop < loops.count; loop++) {
      const correction = correctLoop(state, loops, loop);
      history?.push({ sweep: sweep + 1, loop, ...correction });
    }
    if (control) {
      control.nudge(state);
      state.evaluate();
    }
  }
}

/** One correction of one loop. */
function correctLoop(state: NetworkState, loops: Loops, loop: number): Omit<LoopCorrection, 'sweep' | 'loop'> {
  const { chain, sign, start } = loops;
  const { chainFlow, chainSlope } = state;
  const headM = loopHead(state, loops, loop);
  let slope = 0;
  for (let p = start[loop]; p < start[loop + 1]; p++) slope += chainSlope[chain[p]];
  let correction = -headM / slope;
  let put = 0;
  for (let halvings = 0; ; halvings++) {
    for (let p = start[loop]; p < start[loop + 1]; p++) {
      const c = chain[p];
      chainFlow[c] += sign[p] * (correction - put);
      state.evaluateChain(c);
    }
    put = correction;
    if (Math.abs(loopHead(state, loops, loop)) <= Math.abs(headM) || halvings === 60) break;
    correction /= 2;
  }
  return { headM, slopeMPerLs: slope, correctionLs: put };
}

function loopHead(state: NetworkState, loops: Loops, loop: number): number {
  let head = 0;
  for (let p = loops.start[loop]; p < loops.start[loop + 1]; p++) head += loops.sign[p] * state.chainLoss[loops.chain[p]];
  return head;
}

function worstHead(state: NetworkState, loops: Loops): number {
  let worst = 0;
  for (let loop = 0; loop < loops.count; loop++) {
    const head = Math.abs(loopHead(state, loops, loop));
    if (!(head <= worst)) worst = head;
  }
  return worst;
}

