import { DpControl } from './dp-control';
import { type Loops, shortLoops, treeLoops } from './graph/loops';
import { balanceHeads } from './hardy-cross';
import { correctionOfAll } from './correction-of-all';
import { NetworkState } from './network-state';
import { type PreparedNetwork, prepareNetwork } from './prepare';
import { SimultaneousIteration } from './simultaneous';
import { solveResult } from './solve-result';
import type { LoopCorrection, Method, NetworkDocument, SolveResult, Warning } from './types';

/** Chains in all loops up to which the loops of a least-resistance tree are used for correcting one after another. */
const MOST_TREE_LOOP_CHAINS = 400_000;
/** Corrections that a result carries at most when a history is asked for. */
const MOST_HISTORY = 20_000;

export interface SolveOptions {
  /** Flows of an earlier solution by link number, L/s, to start from. */
  startFlows?: Float64Array;
}

/**
 * Steady flows and heads of a checked network document as its valves and pumps stand. Never throws for a checked document: what cannot be
 * closed is answered with `converged: false` and the worst loops.
 */
export function solve(document: NetworkDocument): SolveResult {
  return solvePrepared(prepareNetwork(document));
}

/** As `solve`, on a network prepared before; with flows of an earlier solution it is only corrected from there. */
export function solvePrepared(network: PreparedNetwork, options: SolveOptions = {}): SolveResult {
  const solution = findFlows(network, options);
  return solveResult(network, solution);
}

export interface Solution {
  state: NetworkState;
  /** Those corrected one after another, or the short ones, found when first asked for. */
  loops: () => Loops;
  method: Method;
  iterations: number;
  closed: boolean;
  worstM: number;
  control: DpControl | null;
  warnings: Warning[];
  history: LoopCorrection[] | null;
}

/** One iteration a prepared network, so that solving it again finds its loops and factors' pattern ready. */
const iterations = new WeakMap<PreparedNetwork, SimultaneousIteration>();

/** The simultaneous iteration of a network at its first flows, or, solved before, at those it has. */
export function startIteration(network: PreparedNetwork, startFlows?: Float64Array): SimultaneousIteration {
  const known = iterations.get(network);
  const iteration =
    known ?? new SimultaneousIteration(new NetworkState(network), correctionOfAll(network.document.nodes.length, network.chains));
  iterations.set(network, iteration);
  iteration.state.openControllers();
  // The first flows are also what the least slopes come from. One loop after another starts from flows that know nothing of the design.
  if (!known || !startFlows) iteration.start(network.document.options?.method !== 'hardy-cross');
  if (startFlows) takeFlows(iteration.state, startFlows);
  return iteration;
}

/** The flows alone, without the result's tables. The state belongs to the network and changes when it is solved again. */
export function findFlows(network: PreparedNetwork, { startFlows }: SolveOptions = {}): Solution {
  const { document, chains } = network;
  const simultaneous = startIteration(network, startFlows);
  const { state } = simultaneous;
  const shortest = () => shortLoops(document.nodes.length, chains);
  const control = DpControl.of(network);
  const warnings: Warning[] = [];

  if (document.options?.method === 'hardy-cross') {
    // Slopes at the first flows: a valve that these hold shut is a wall, and wants a loop of its own.
    state.evaluate();
    const cross = treeLoops(document.nodes.length, chains, state.chainSlope, MOST_TREE_LOOP_CHAINS) ?? shortest();
    const history: LoopCorrection[] | null = document.options.history ? [] : null;
    const outcome = balanceHeads(state, cross, control, history);
    const kept = history?.slice(0, MOST_HISTORY) ?? null;
    if (outcome.closed) return { state, loops: () => cross, method: 'hardy-cross', ...outcome, control, warnings, history: kept };
    const message = `Correcting one loop after another had not closed after ${outcome.iterations} sweeps; all loops were corrected together from there.`;
    warnings.push({ code: 'hardy-cross-slow', message });
  }
  const outcome = simultaneous.run(control);
  return { state, loops: shortest, method: 'simultaneous', ...outcome, control, warnings, history: null };
}

function takeFlows(state: NetworkState, startFlows: Float64Array): void {
  const { chains, baseFlow } = state.network;
  for (let c = 0; c < chains.count; c++) {
    const i = chains.member[chains.start[c]];
    state.chainFlow[c] = chains.sign[chains.start[c]] * (startFlows[i] - baseFlow[i]);
  }
}
