import { Circuits, type Stretch } from './circuits';
import type { PreparedNetwork } from './prepare';

/** Below this a link counts as without flow, L/s. */
const AT_REST_LS = 1e-9;

/** Pumps in series with nothing branching off between them, and the circuits they drive. */
export interface PumpGroup {
  /** Link numbers, in the order of flow. */
  pumps: number[];
  flowLs: number;
  /** Loss of what lies between the first and last pump, m. */
  headBetween: number;
  circuits: Circuits;
}

export interface PumpCircuits {
  groups: PumpGroup[];
  /** Pumps that stand inside another pump's circuits and keep their speed. */
  boosters: number[];
  /** Links along their flow, and the stretch of each link (-1: at rest, or a pump that drives circuits). */
  stretches: Stretch[];
  stretchOf: Int32Array;
}

/** Opens the network at its pumps and lays out the circuits of each. `flow` L/s and `loss` m by link number. */
export function pumpCircuits(network: PreparedNetwork, flow: Float64Array, loss: Float64Array): PumpCircuits {
  const runs = pumpRuns(network, flow);
  const apart = layOut(network, flow, loss, runs.flatMap(inside));
  const driving = runs.filter((run) => apart.circuitsOf(run));
  if (!driving.length && runs.length) driving.push(runs.reduce((most, run) => (run.flowLs > most.flowLs ? run : most)));
  const { stretches, stretchOf, circuitsOf } = layOut(network, flow, loss, driving.flatMap(inside));
  const groups = driving.flatMap((run) => {
    const circuits = circuitsOf(run);
    const headBetween = run.between.reduce((sum, i) => sum + Math.abs(loss[i]), 0);
    return circuits ? [{ pumps: run.pumps, flowLs: run.flowLs, headBetween, circuits }] : [];
  });
  const led = new Set(groups.flatMap((group) => group.pumps));
  return { groups, boosters: runs.flatMap((run) => run.pumps.filter((i) => !led.has(i))), stretches, stretchOf };
}

interface PumpRun {
  pumps: number[];
  between: number[];
  suction: number;
  discharge: number;
  flowLs: number;
}

const inside = (run: PumpRun) => [...run.pumps, ...run.between];

/** The pumps of each chain with what stands between them. */
function pumpRuns({ kinds, chains, from, to }: PreparedNetwork, flow: Float64Array): PumpRun[] {
  const range = kinds.find(({ kind }) => kind === 'pump');
  const runs: PumpRun[] = [];
  const done = new Set<number>();
  for (let i = range?.first ?? 0; i < (range?.last ?? 0); i++) {
    const c = chains.chainOf[i];
    if (c < 0 || done.has(c) || flow[i] <= AT_REST_LS) continue;
    done.add(c);
    const members = Array.from(chains.member.subarray(chains.start[c], chains.start[c + 1]));
    if (chains.sign[chains.start[c] + members.indexOf(i)] < 0) members.reverse();
    const isPump = (link: number) => link >= range!.first && link < range!.last && flow[link] > AT_REST_LS;
    const first = members.findIndex(isPump);
    const last = members.findLastIndex(isPump);
    const run = members.slice(first, last + 1);
    runs.push({
      pumps: run.filter(isPump),
      between: run.filter((link) => !isPump(link)),
      suction: from[members[first]],
      discharge: to[members[last]],
      flowLs: flow[i],
    });
  }
  return runs;
}

function layOut(network: PreparedNetwork, flow: Float64Array, loss: Float64Array, without: number[]) {
  const { from, to, document, kinds } = network;
  const terminals = kinds.find(({ kind }) => kind === 'terminal');
  const left = new Set(without);
  const stretches: Stretch[] = [];
  const stretchOf = new Int32Array(from.length).fill(-1);
  for (let i = 0; i < from.length; i++) {
    if (left.has(i) || Math.abs(flow[i]) <= AT_REST_LS) continue;
    stretchOf[i] = stretches.length;
    const isTerminal = terminals !== undefined && i >= terminals.first && i < terminals.last;
    const forward = flow[i] > 0;
    stretches.push({ a: forward ? from[i] : to[i], b: forward ? to[i] : from[i], head: forward ? loss[i] : -loss[i], isTerminal });
  }
  const nodeCount = document.nodes.length;
  const circuitsOf = ({ discharge, suction }: PumpRun) =>
    Circuits.of(stretches, nodeCount, discharge, suction) ?? throughDecoupler(stretches, nodeCount, discharge, suction);
  return { stretches, stretchOf, circuitsOf };
}

/**
 * The circuits of a secondary pump where the primary gives more than it takes: the decoupler then flows on from its suction to its return, and its circuits
 * close through the decoupler against that flow, whose loss helps. Null where no way without a terminal leads there.
 */
function throughDecoupler(stretches: Stretch[], nodeCount: number, discharge: number, suction: number): Circuits | null {
  const supplied = reached(stretches, nodeCount, discharge, () => true);
  const open = reached(stretches, nodeCount, suction, ({ isTerminal }) => !isTerminal);
  const end = open.order.find((v) => supplied.behindTerminal[v]);
  if (end === undefined) return null;
  const turned = stretches.slice();
  for (let v = end; v !== suction; v = stretches[open.cameBy[v]].a) {
    const { a, b, head } = stretches[open.cameBy[v]];
    turned[open.cameBy[v]] = { a: b, b: a, head: -head, isTerminal: false };
  }
  return Circuits.of(turned, nodeCount, discharge, suction);
}

/** Places to which flow leads from a node along the chosen stretches, the nearest first; by which stretch, and whether also past a terminal. */
function reached(stretches: Stretch[], nodeCount: number, start: number, isChosen: (stretch: Stretch) => boolean) {
  const leaving: number[][] = Array.from({ length: nodeCount }, () => []);
  stretches.forEach((stretch, k) => {
    if (isChosen(stretch)) leaving[stretch.a].push(k);
  });
  const cameBy = new Int32Array(nodeCount).fill(-1);
  const behindTerminal = new Uint8Array(nodeCount);
  const order = [start];
  const seen = new Uint8Array(nodeCount);
  seen[start] = 1;
  for (let next = 0; next < order.length; next++)
    for (const k of leaving[order[next]]) {
      const { a, b, isTerminal } = stretches[k];
      const isNews = (isTerminal || behindTerminal[a] === 1) && !behindTerminal[b];
      if (isNews) behindTerminal[b] = 1;
      if (!seen[b]) cameBy[b] = k;
      if (isNews || !seen[b]) order.push(b);
      seen[b] = 1;
    }
  return { order, cameBy, behindTerminal };
}
