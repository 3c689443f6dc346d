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

/** A tree over each connected part, breadth first: nodes in the order met, the link by which each was met (-1 at a root) and its part. */
export interface SpanningForest {
  order: Int32Array;
  treeLink: Int32Array;
  parent: Int32Array;
  depth: Int32Array;
  part: Int32Array;
  /** Root of each part. */
  roots: number[];
}

/** `seeds` are tried as roots in their order, then every other node; `usable`, where given, names the links (1) that a tree may use. */
export function spanningForest(
  nodeCount: number,
  from: Int32Array,
  to: Int32Array,
  seeds: number[] = [],
  usable?: Uint8Array,
  adjacency: Adjacency = adjacencyOf(nodeCount, from, to),
): SpanningForest {
  const { start, link } = adjacency;
  const order = new Int32Array(nodeCount);
  const treeLink = new Int32Array(nodeCount).fill(-1);
  const parent = new Int32Array(nodeCount).fill(-1);
  const depth = new Int32Array(nodeCount);
  const part = new Int32Array(nodeCount).fill(-1);
  const roots: number[] = [];
  let met = 0;
  let next = 0;
  const grow = (root: number) => {
    if (part[root] >= 0) return;
    part[root] = roots.length;
    roots.push(root);
    order[met++] = root;
    while (next < met) {
      const v = order[next++];
      for (let k = start[v]; k < start[v + 1]; k++) {
        const i = link[k];
        if (usable && !usable[i]) continue;
        const w = from[i] === v ? to[i] : from[i];
        if (part[w] >= 0) continue;
        part[w] = part[v];
        treeLink[w] = i;
        parent[w] = v;
        depth[w] = depth[v] + 1;
        order[met++] = w;
      }
    }
  };
  for (const seed of seeds) grow(seed);
  for (let v = 0; v < nodeCount; v++) grow(v);
  return { order, treeLink, parent, depth, part, roots };
}
