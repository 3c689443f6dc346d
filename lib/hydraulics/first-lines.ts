import { carryAlongTree } from './graph/adjacency';
import { WALL_SLOPE } from './links/law';
import { usualFlowLs } from './links/link-laws';
import type { PreparedNetwork } from './prepare';
import type { LinkKind } from './types';

/** Laws without a wall, which a tangent may stand for. */
const SMOOTH: LinkKind[] = ['pipe', 'terminal', 'controlValve', 'balancingValve', 'resistance', 'pump'];
/** Part of its usual flow below which a link's likely flow says nothing of its slope. */
const LEAST_PART = 0.5;
/** Part of its usual flow at which a link stands that the design flows pass by, such as the cross-link of a mesh. */
const IDLE_PART = 0.25;
const MOST_SCALE = 3;

/** A straight line for every link's law: `head` m at rest and `slope` m per L/s, by link. */
export interface FirstLines {
  flow: Float64Array;
  head: Float64Array;
  slope: Float64Array;
}

/**
 * Makes every law a straight line for the first flows of the iteration, written into `lines`. Where the design flows of terminals and limiters, carried
 * along the network's tree, put a link to work, the line is the tangent there, all flows scaled so that the pumps' power meets
 * the losses'; elsewhere, and everywhere unless `byDesign`, it is the chord to the loss at a usual flow. Only the number of iterations depends on it.
 */
export function firstLines(network: PreparedNetwork, lines: FirstLines, byDesign: boolean): void {
  const { document, position, fluid, kinds } = network;
  const { flow, head, slope } = lines;
  for (let i = 0; i < flow.length; i++) flow[i] = usualFlowLs(document.links[position[i]], fluid);
  shareDesignFlows(network, flow);
  const isTangent = new Uint8Array(flow.length);
  const likely = byDesign ? likelyFlows(network, flow) : null;
  for (const { kind, first, last } of kinds) {
    if (!likely || !SMOOTH.includes(kind)) continue;
    for (let i = first; i < last; i++) {
      isTangent[i] = (kind === 'pump' ? likely[i] : Math.abs(likely[i])) >= LEAST_PART * flow[i] ? 1 : 0;
      if (isTangent[i]) flow[i] = likely[i];
      else if (kind !== 'pump') flow[i] *= IDLE_PART;
    }
  }
  for (const { batch, first, last } of kinds) batch.evaluate(flow, head, slope, first, last);
  const scale = scaleToPumps(network, lines, isTangent);
  if (scale === 0) isTangent.fill(0);
  for (const { kind, batch, first, last } of kinds) {
    if (kind === 'pump') {
      for (let i = first; i < last; i++) if (isTangent[i]) flow[i] *= scale;
      batch.evaluate(flow, head, slope, first, last);
      for (let i = first; i < last; i++) head[i] -= slope[i] * flow[i];
      continue;
    }
    for (let i = first; i < last; i++) {
      // As good as quadratic: the loss goes with the square of the scale.
      const chord = head[i] / flow[i];
      slope[i] = isTangent[i] ? scale * slope[i] : Math.min(chord, WALL_SLOPE);
      head[i] = isTangent[i] ? scale * flow[i] * (scale * chord - slope[i]) : 0;
    }
  }
}

/** A terminal's design flow is also what everything in series with it carries, but no more than a limiter there lets through. */
function shareDesignFlows({ chains, kinds }: PreparedNetwork, flow: Float64Array): void {
  const shared = new Float64Array(chains.count).fill(Infinity);
  for (const { kind, first, last } of kinds) {
    if (kind !== 'terminal' && kind !== 'flowLimiter') continue;
    for (let i = first; i < last; i++) {
      const c = chains.chainOf[i];
      if (c >= 0 && flow[i] < shared[c]) shared[c] = flow[i];
    }
  }
  for (let c = 0; c < chains.count; c++) {
    if (shared[c] === Infinity) continue;
    for (let p = chains.start[c]; p < chains.start[c + 1]; p++) flow[chains.member[p]] = shared[c];
  }
}

/**
 * Flows of all links when every terminal and limiter outside the tree carries what `design` says and nothing else outside it flows. Null without
 * such links.
 */
function likelyFlows({ document, forest, from, to, kinds, baseFlow }: PreparedNetwork, design: Float64Array): Float64Array | null {
  if (!kinds.some(({ kind }) => kind === 'terminal' || kind === 'flowLimiter')) return null;
  const likely = baseFlow.slice();
  const surplus = new Float64Array(document.nodes.length);
  for (const { kind, first, last } of kinds) {
    if (kind !== 'terminal' && kind !== 'flowLimiter') continue;
    for (let i = first; i < last; i++) {
      if (forest.treeLink[from[i]] === i || forest.treeLink[to[i]] === i) continue;
      likely[i] = design[i];
      surplus[from[i]] -= design[i];
      surplus[to[i]] += design[i];
    }
  }
  carryAlongTree(forest, from, surplus, likely);
  return likely;
}

/**
 * The factor s on all flows at which the pumps, along their tangents A + B s, give what quadratic losses take: W s² = A + B s, each weighted
 * with its flow. Limiters let no more through; it is 0 where no pump drives the design flows: all lines are chords then, and what nothing drives starts at rest.
 */
function scaleToPumps({ kinds }: PreparedNetwork, { flow, head, slope }: FirstLines, isTangent: Uint8Array): number {
  let taken = 0;
  let atRest = 0;
  let along = 0;
  let most = MOST_SCALE;
  for (const { kind, first, last } of kinds) {
    if (kind === 'flowLimiter') most = 1;
    for (let i = first; i < last; i++) {
      if (!isTangent[i]) continue;
      if (kind !== 'pump') {
        taken += head[i] * flow[i];
        continue;
      }
      atRest -= (head[i] - slope[i] * flow[i]) * flow[i];
      along -= slope[i] * flow[i] * flow[i];
    }
  }
  if (!(taken > 0 && atRest > 0)) return 0;
  const scale = (along + Math.sqrt(along * along + 4 * taken * atRest)) / (2 * taken);
  return Math.min(Math.max(scale, 1 / MOST_SCALE), most);
}
