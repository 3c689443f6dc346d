/** Links at each node, packed: those of node v are `link[start[v]]` … `link[start[v + 1] - 1]`. */
export interface Adjacency {
  start: Int32Array;
  link: Int32Array;
}

/** Lists the links (from[i], to[i]) at each node; a link from a node to itself is listed twice. */
export function adjacencyOf(nodeCount: number, from: Int32Array, to: Int32Array): Adjacency {
  const start = new Int32Array(nodeCount + 1);
  for (let i = 0; i < from.length; i++) {
    start[from[i] + 1]++;
    start[to[i] + 1]++;
  }
  for (let v = 0; v < nodeCount; v++) start[v + 1] += start[v];
  const fill = start.slice(0, nodeCount);
  const link = new Int32Array(2 * from.length);
  for (let i = 0; i < from.length; i++) {
    link[fill[from[i]]++] = i;
    link[fill[to[i]]++] = i;
  }
  return { start, link };
}

/** A tree over each connected part: nodes in the order met, each after its parent, the link by which each was met (-1 at a root) and its part. */
export interface SpanningForest {
  order: Int32Array;
  treeLink: Int32Array;
  parent: Int32Array;
  depth: Int32Array;
  part: Int32Array;
  /** Root of each part. */
  roots: number[];
}

export const MOST_RANK = 63;

/**
 * A tree of least ranks over each connected part (V. Jarník 1930, R. Prim 1957, with a queue a rank). `seeds` are tried as roots in their order, then
 * every other node; `usable`, where given, names the links (1) that a tree may use. Links of a lower `rank` (0 to `MOST_RANK`) go
 * first; among equals, and without it, breadth first.
 */
export function spanningForest(
  nodeCount: number,
  from: Int32Array,
  to: Int32Array,
  seeds: number[] = [],
  usable?: Uint8Array,
  adjacency: Adjacency = adjacencyOf(nodeCount, from, to),
  rank?: Uint8Array,
): SpanningForest {
  const { start, link } = adjacency;
  const order = new Int32Array(nodeCount);
  const treeLink = new Int32Array(nodeCount).fill(-1);
  const parent = new Int32Array(nodeCount).fill(-1);
  const depth = new Int32Array(nodeCount);
  const part = new Int32Array(nodeCount).fill(-1);
  const roots: number[] = [];
  const queue = { first: new Int32Array(MOST_RANK + 1).fill(-1), last: new Int32Array(MOST_RANK + 1), next: new Int32Array(from.length) };
  const isQueued = new Uint8Array(from.length);
  let met = 0;
  let lowest = 0;
  const meet = (v: number) => {
    order[met++] = v;
    for (let k = start[v]; k < start[v + 1]; k++) {
      const i = link[k];
      if (isQueued[i] || (usable && !usable[i])) continue;
      isQueued[i] = 1;
      const r = rank ? rank[i] : 0;
      if (queue.first[r] < 0) queue.first[r] = i;
      else queue.next[queue.last[r]] = i;
      queue.last[r] = i;
      queue.next[i] = -1;
      if (r < lowest) lowest = r;
    }
  };
  const grow = (root: number) => {
    if (part[root] >= 0) return;
    part[root] = roots.length;
    roots.push(root);
    meet(root);
    while (lowest <= MOST_RANK) {
      const i = queue.first[lowest];
      if (i < 0) {
        lowest++;
        continue;
      }
      queue.first[lowest] = queue.next[i];
      const v = part[from[i]] >= 0 ? from[i] : to[i];
      const w = from[i] === v ? to[i] : from[i];
      if (part[w] >= 0) continue;
      part[w] = part[v];
      treeLink[w] = i;
      parent[w] = v;
      depth[w] = depth[v] + 1;
      meet(w);
    }
  };
  for (const seed of seeds) grow(seed);
  for (let v = 0; v < nodeCount; v++) grow(v);
  return { order, treeLink, parent, depth, part, roots };
}

/** Carries what each node has to give (`surplus`, used up) along the tree towards its root: adds to `flow` of the tree's links. */
export function carryAlongTree(
  { order, treeLink, parent }: SpanningForest,
  from: Int32Array,
  surplus: Float64Array,
  flow: Float64Array,
): void {
  for (let k = order.length - 1; k >= 0; k--) {
    const v = order[k];
    const link = treeLink[v];
    if (link < 0) continue;
    flow[link] += from[link] === v ? surplus[v] : -surplus[v];
    surplus[parent[v]] += surplus[v];
  }
}
