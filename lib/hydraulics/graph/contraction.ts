import { DegreeBuckets } from '../sparse/degree-buckets';
import { EdgeTable } from './edge-table';

/** A chain (chord) that closes a loop with another one (partner) between the same two groups of nodes. */
export interface LoopSeeds {
  tree: Uint8Array;
  chord: Int32Array;
  /** The parallel chain, or -1 where the chord runs from a node to itself. */
  partner: Int32Array;
  /** 1 where both begin in the same group, -1 where the one begins where the other ends. */
  alike: Int8Array;
}

/**
 * Chooses a complete set of short loops by contracting the network one junction at a time, the least connected first, into the neighbour at the
 * end of its shortest chain. Whenever two chains come to lie between the same two groups, the longer of them is a
 * chord, the two close a loop inside those groups, and the shorter goes on. A chord appears in no later loop, so the
 * loops are independent; there are as many as the network has. In a direct-return ladder they are its meshes, not
 * rounds through the pump, and each touches two others.
 */
export function contract(nodeCount: number, from: Int32Array, to: Int32Array): LoopSeeds {
  const edgeCount = from.length;
  const end = new Int32Array(2 * edgeCount); // end 2e: the group of chain e's from; 2e + 1: of its to
  const length = new Int32Array(edgeCount).fill(1);
  const next = new Int32Array(2 * edgeCount).fill(-1);
  const previous = new Int32Array(2 * edgeCount).fill(-1);
  const head = new Int32Array(nodeCount).fill(-1);
  const degree = new Int32Array(nodeCount);
  const gone = new Uint8Array(edgeCount);
  const between = new EdgeTable(edgeCount);
  const tree = new Uint8Array(edgeCount);
  const chords: number[] = [];
  const partners: number[] = [];
  const alike: number[] = [];

  const attach = (half: number, v: number) => {
    end[half] = v;
    next[half] = head[v];
    previous[half] = -1;
    if (head[v] >= 0) previous[head[v]] = half;
    head[v] = half;
    degree[v]++;
  };
  const detach = (half: number) => {
    const v = end[half];
    if (previous[half] >= 0) next[previous[half]] = next[half];
    else head[v] = next[half];
    if (next[half] >= 0) previous[next[half]] = previous[half];
    degree[v]--;
  };
  const joins = (e: number, u: number, w: number) =>
    !gone[e] && ((end[2 * e] === u && end[2 * e + 1] === w) || (end[2 * e] === w && end[2 * e + 1] === u));

  /** Adds chain e between its two groups; where one lies there already the longer of the two becomes a chord. */
  const place = (e: number) => {
    const u = end[2 * e];
    const w = end[2 * e + 1];
    const other = between.get(u, w);
    if (other >= 0 && other !== e && joins(other, u, w)) {
      // Of equals the newcomer stays, so that many parallel chains pair up in a row instead of all with one.
      const chord = length[other] < length[e] ? e : other;
      gone[chord] = 1;
      alike.push(end[2 * other] === u ? 1 : -1);
      detach(2 * chord);
      detach(2 * chord + 1);
      chords.push(chord);
      partners.push(chord === e ? other : e);
      if (chord === e) return;
    }
    between.set(u, w, e);
  };

  for (let e = 0; e < edgeCount; e++) {
    if (from[e] === to[e]) {
      gone[e] = 1;
      chords.push(e);
      partners.push(-1);
      alike.push(1);
      continue;
    }
    attach(2 * e, from[e]);
    attach(2 * e + 1, to[e]);
    place(e);
  }

  const waiting = new DegreeBuckets(nodeCount);
  for (let v = 0; v < nodeCount; v++) waiting.add(v, Math.min(degree[v], nodeCount));
  for (let left = nodeCount; left > 0; left--) {
    const v = waiting.takeLeast();
    let shortest = -1;
    for (let half = head[v]; half >= 0; half = next[half]) {
      const shorter = shortest < 0 ? -1 : length[half >> 1] - length[shortest >> 1];
      if (shorter < 0 || (shorter === 0 && degree[end[half ^ 1]] < degree[end[shortest ^ 1]])) shortest = half;
    }
    if (shortest < 0) continue;
    const e = shortest >> 1;
    const u = end[shortest ^ 1];
    tree[e] = 1;
    gone[e] = 1;
    detach(2 * e);
    detach(2 * e + 1);
    for (let half = head[v]; half >= 0; half = head[v]) {
      const moved = half >> 1;
      detach(half);
      attach(half, u);
      length[moved] += length[e];
      const w = end[half ^ 1];
      place(moved);
      waiting.move(w, Math.min(degree[w], nodeCount));
    }
    waiting.move(u, Math.min(degree[u], nodeCount));
  }
  return { tree, chord: Int32Array.from(chords), partner: Int32Array.from(partners), alike: Int8Array.from(alike) };
}
