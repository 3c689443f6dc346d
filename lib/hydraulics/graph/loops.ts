import { spanningForest, type SpanningForest } from './adjacency';
import { GrowingList } from '../growing-list';
import type { Chains } from './chains';
import { contract } from './contraction';

/** Loops over chains: those of loop l are `chain[start[l]]` …, each with its direction along the loop. */
export interface Loops {
  count: number;
  start: Int32Array;
  chain: Int32Array;
  sign: Int8Array;
}

/** A complete set of independent loops, chosen short: what the simultaneous correction wants, for few loops then share a chain. */
export function shortLoops(nodeCount: number, chains: Chains): Loops {
  const { from, to } = chains;
  const { tree, chord, partner, alike } = contract(nodeCount, from, to);
  const list = new LoopList(from, to, spanningForest(nodeCount, from, to, [], tree));
  for (let k = 0; k < chord.length; k++) {
    const c = chord[k];
    const p = partner[k];
    list.begin();
    list.add(c, 1);
    if (p < 0) continue;
    list.walk(to[c], alike[k] > 0 ? to[p] : from[p]);
    list.add(p, alike[k] > 0 ? -1 : 1);
    list.walk(alike[k] > 0 ? from[p] : to[p], from[c]);
  }
  return list.finish();
}

/**
 * The loops that each chain outside a tree closes through it, the tree being the one of least resistance (Kruskal 1956).
 * A chain of high resistance then lies in one loop alone, which is what lets corrections made one loop after another settle in few sweeps.
 * Null where the loops would hold more than `limit` chains in all.
 */
export function treeLoops(nodeCount: number, chains: Chains, resistance: Float64Array, limit: number): Loops | null {
  const { from, to } = chains;
  const tree = leastTree(nodeCount, from, to, resistance);
  const list = new LoopList(from, to, spanningForest(nodeCount, from, to, [], tree));
  for (let c = 0; c < chains.count; c++) {
    if (tree[c]) continue;
    list.begin();
    list.add(c, 1);
    list.walk(to[c], from[c]);
    if (list.length > limit) return null;
  }
  return list.finish();
}

function leastTree(nodeCount: number, from: Int32Array, to: Int32Array, resistance: Float64Array): Uint8Array {
  const group = Int32Array.from({ length: nodeCount }, (_, v) => v);
  const groupOf = (v: number) => {
    while (group[v] !== v) v = group[v] = group[group[v]];
    return v;
  };
  const tree = new Uint8Array(from.length);
  const byResistance = Array.from(from.keys()).sort((a, b) => resistance[a] - resistance[b] || a - b);
  for (const c of byResistance) {
    const u = groupOf(from[c]);
    const v = groupOf(to[c]);
    if (u === v) continue;
    group[u] = v;
    tree[c] = 1;
  }
  return tree;
}

class LoopList {
  private readonly start = new GrowingList();
  private readonly chain: GrowingList;
  private readonly sign: GrowingList;
  private readonly down = new GrowingList();

  constructor(
    private readonly from: Int32Array,
    private readonly to: Int32Array,
    private readonly forest: SpanningForest,
  ) {
    this.chain = new GrowingList(2 * from.length);
    this.sign = new GrowingList(2 * from.length);
  }

  get length(): number {
    return this.chain.length;
  }

  begin(): void {
    this.start.push(this.chain.length);
  }

  add(chain: number, sign: 1 | -1): void {
    this.chain.push(chain);
    this.sign.push(sign);
  }

  /** Adds the tree's way from a to b. */
  walk(a: number, b: number): void {
    const { depth, parent, treeLink } = this.forest;
    const { from, to, down } = this;
    down.length = 0;
    while (a !== b) {
      if (depth[a] >= depth[b]) {
        this.add(treeLink[a], from[treeLink[a]] === a ? 1 : -1);
        a = parent[a];
      } else {
        down.push(b);
        b = parent[b];
      }
    }
    for (let k = down.length - 1; k >= 0; k--) {
      const v = down.at(k);
      this.add(treeLink[v], to[treeLink[v]] === v ? 1 : -1);
    }
  }

  finish(): Loops {
    const count = this.start.length;
    this.begin();
    return { count, start: this.start.toArray(), chain: this.chain.toArray(), sign: Int8Array.from(this.sign.toArray()) };
  }
}
