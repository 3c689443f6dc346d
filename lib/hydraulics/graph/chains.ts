import { GrowingList } from '../growing-list';
import { type Adjacency, adjacencyOf } from './adjacency';

/**
 * Links in series share one flow, so the loops are found and corrected on chains: runs of links between junctions. Links that lead
 * to dead ends carry no loop and belong to no chain (`chainOf` -1). Members of chain c are `member[start[c]]` …, each with its
 * direction along the chain in `sign`.
 */
export interface Chains {
  count: number;
  start: Int32Array;
  member: Int32Array;
  sign: Int8Array;
  chainOf: Int32Array;
  from: Int32Array;
  to: Int32Array;
}

export function chainsOf(
  nodeCount: number,
  from: Int32Array,
  to: Int32Array,
  adjacency: Adjacency = adjacencyOf(nodeCount, from, to),
): Chains {
  const linkCount = from.length;
  const { start: first, link } = adjacency;
  const degree = new Int32Array(nodeCount);
  for (let v = 0; v < nodeCount; v++) degree[v] = first[v + 1] - first[v];
  const used = cutDeadEnds(degree, first, link, from, to);

  const member = new Int32Array(linkCount);
  const sign = new Int8Array(linkCount);
  const chainOf = new Int32Array(linkCount).fill(-1);
  const starts = new GrowingList(linkCount);
  const ends = new GrowingList(linkCount);
  const begins = new GrowingList(linkCount);
  let filled = 0;

  /** Follows one run from a junction until the next, or back to where it began. */
  const follow = (junction: number, firstLink: number) => {
    begins.push(junction);
    starts.push(filled);
    let v = junction;
    let i = firstLink;
    for (;;) {
      used[i] = 1;
      const forward = from[i] === v;
      member[filled] = i;
      sign[filled++] = forward ? 1 : -1;
      chainOf[i] = starts.length - 1;
      v = forward ? to[i] : from[i];
      if (v === junction || degree[v] !== 2) break;
      const a = first[v];
      i = -1;
      for (let k = a; k < first[v + 1] && i < 0; k++) if (!used[link[k]]) i = link[k];
    }
    ends.push(v);
  };

  const followFrom = (v: number) => {
    for (let k = first[v]; k < first[v + 1]; k++) if (!used[link[k]]) follow(v, link[k]);
  };
  for (let v = 0; v < nodeCount; v++) if (degree[v] > 2) followFrom(v);
  // What is left are circuits without a junction: each is one chain from any of its nodes round to itself.
  for (let v = 0; v < nodeCount; v++) if (degree[v] === 2) followFrom(v);

  const count = starts.length;
  starts.push(filled);
  return {
    count,
    start: starts.toArray(),
    member: member.slice(0, filled),
    sign: sign.slice(0, filled),
    chainOf,
    from: begins.toArray(),
    to: ends.toArray(),
  };
}

/** Marks the links of dead ends as used, one end after another, and lowers `degree` to what remains. */
function cutDeadEnds(degree: Int32Array, first: Int32Array, link: Int32Array, from: Int32Array, to: Int32Array): Uint8Array {
  const used = new Uint8Array(from.length);
  const ends: number[] = [];
  for (let v = 0; v < degree.length; v++) if (degree[v] === 1) ends.push(v);
  for (let v = ends.pop(); v !== undefined; v = ends.pop()) {
    for (let k = first[v]; k < first[v + 1]; k++) {
      const i = link[k];
      if (used[i]) continue;
      used[i] = 1;
      const w = from[i] === v ? to[i] : from[i];
      degree[v]--;
      if (--degree[w] === 1) ends.push(w);
    }
  }
  return used;
}
