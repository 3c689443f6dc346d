import { type Adjacency, adjacencyOf, type SpanningForest, spanningForest } from './graph/adjacency';
import type { CorrectionOfAll } from './correction-of-all';
import type { Pattern } from './sparse/minimum-degree';
import { SparseLdl } from './sparse/ldl';

/** The chains by the junctions that they join, numbered from 0. */
export interface JunctionChains {
  count: number;
  from: Int32Array;
  to: Int32Array;
}

/**
 * The same correction of all loops from the equations of the nodes (E. Todini and S. Pilati 1987): with G = D⁻¹ the chains' conductances and
 * A their ends, heads y at the junctions solve (A G Aᵀ) y = A G r, and the chains' flows change by -G (r - Aᵀ y). One unknown a
 * junction, however many loops there are. r is zero along a tree and the head around the loop that it closes in every other chain, so that
 * rounding goes with what is left to correct; the tree's own flows are summed from the others', so that nodes balance to rounding.
 */
export class NodeEquations implements CorrectionOfAll {
  private readonly from: Int32Array;
  private readonly to: Int32Array;
  private readonly forest: SpanningForest;
  /** Chains outside the tree: each closes one loop through it. */
  private readonly closing: Int32Array;
  private readonly closingHead: Float64Array;
  private readonly conductance: Float64Array;
  private readonly slot: Int32Array;
  private readonly factors: SparseLdl;
  private readonly head: Float64Array;
  private readonly net: Float64Array;

  private constructor({ from, to, count }: JunctionChains, forest: SpanningForest, factors: SparseLdl) {
    this.from = from;
    this.to = to;
    this.forest = forest;
    this.factors = factors;
    const inTree = new Uint8Array(from.length);
    for (let v = 0; v < count; v++) if (forest.treeLink[v] >= 0) inTree[forest.treeLink[v]] = 1;
    this.closing = new Int32Array(from.length - count + forest.roots.length);
    for (let c = 0, k = 0; c < from.length; c++) if (!inTree[c]) this.closing[k++] = c;
    this.closingHead = new Float64Array(this.closing.length);
    this.conductance = new Float64Array(from.length);
    this.head = new Float64Array(count);
    this.net = new Float64Array(count);
    this.slot = new Int32Array(from.length).fill(-1);
    const { treeLink } = forest;
    for (let c = 0; c < from.length; c++)
      if (from[c] !== to[c] && treeLink[from[c]] >= 0 && treeLink[to[c]] >= 0) this.slot[c] = factors.slot(from[c], to[c]);
  }

  /** Null where the factors would have more than `mostFill` entries or take more than `mostWork` multiplications. */
  static of(chains: JunctionChains, mostFill: number, mostWork: number): NodeEquations | null {
    const { count, from, to } = chains;
    const adjacency = adjacencyOf(count, from, to);
    const forest = spanningForest(count, from, to, [], undefined, adjacency);
    const pattern = patternOf(chains, adjacency, forest);
    const factors = SparseLdl.of(pattern, mostFill, mostWork);
    return factors && new NodeEquations(chains, forest, factors);
  }

  sumHeads(chainLoss: Float64Array): number {
    const { from, to, closing, closingHead, head, forest } = this;
    const { order, treeLink, parent } = forest;
    for (let k = 0; k < order.length; k++) {
      const v = order[k];
      const c = treeLink[v];
      head[v] = c < 0 ? 0 : head[parent[v]] + (from[c] === v ? chainLoss[c] : -chainLoss[c]);
    }
    let worst = 0;
    for (let k = 0; k < closing.length; k++) {
      const c = closing[k];
      const around = chainLoss[c] - head[from[c]] + head[to[c]];
      closingHead[k] = around;
      const magnitude = Math.abs(around);
      if (!(magnitude <= worst)) worst = magnitude;
    }
    return worst;
  }

  assemble(chainSlope: Float64Array): void {
    const { from, to, conductance, slot, factors, forest } = this;
    const { diagonal, value } = factors;
    diagonal.fill(0);
    value.fill(0);
    for (let c = 0; c < conductance.length; c++) {
      const g = 1 / chainSlope[c];
      conductance[c] = g;
      if (from[c] === to[c]) continue;
      diagonal[from[c]] += g;
      diagonal[to[c]] += g;
      if (slot[c] >= 0) value[slot[c]] -= g;
    }
    for (const root of forest.roots) diagonal[root] = 1;
    factors.factorize();
  }

  correct(chainStep: Float64Array): void {
    const { from, to, closing, closingHead, conductance, factors, head, net, forest } = this;
    const { order, treeLink, parent, roots } = forest;
    net.fill(0);
    for (let k = 0; k < closing.length; k++) {
      const c = closing[k];
      const flow = conductance[c] * closingHead[k];
      net[from[c]] += flow;
      net[to[c]] -= flow;
    }
    for (const root of roots) net[root] = 0;
    factors.solve(net, head);
    net.fill(0);
    for (let k = 0; k < closing.length; k++) {
      const c = closing[k];
      const flow = -conductance[c] * (closingHead[k] - head[from[c]] + head[to[c]]);
      chainStep[c] = flow;
      net[from[c]] += flow;
      net[to[c]] -= flow;
    }
    for (let k = order.length - 1; k >= 0; k--) {
      const v = order[k];
      const c = treeLink[v];
      if (c < 0) continue;
      chainStep[c] = from[c] === v ? -net[v] : net[v];
      net[parent[v]] += net[v];
    }
  }
}

/** Junctions joined by chains, the roots left out: their heads are the others' measure. Chains in parallel make one entry. */
function patternOf({ count, from, to }: JunctionChains, { start, link }: Adjacency, { treeLink }: SpanningForest): Pattern {
  const met = new Int32Array(count).fill(-1);
  const rows = new Int32Array(count + 1);
  const index = new Int32Array(link.length);
  let kept = 0;
  for (let v = 0; v < count; v++) {
    met[v] = v;
    for (let p = start[v]; p < start[v + 1] && treeLink[v] >= 0; p++) {
      const w = from[link[p]] === v ? to[link[p]] : from[link[p]];
      if (met[w] === v || treeLink[w] < 0) continue;
      met[w] = v;
      index[kept++] = w;
    }
    rows[v + 1] = kept;
  }
  return { size: count, start: rows, index: index.slice(0, kept) };
}
