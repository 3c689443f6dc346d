import { GrowingList } from '../growing-list';
import { DegreeBuckets } from './degree-buckets';

/** A symmetric pattern without its diagonal: neighbours of i are `index[start[i]]` … */
export interface Pattern {
  size: number;
  start: Int32Array;
  index: Int32Array;
}

/**
 * An order of elimination that keeps a Cholesky factor sparse: at each step the unknown that is joined to the fewest others goes
 * first. Eliminating it joins all its neighbours; that clique is kept as one element, not edge by edge, and degrees are
 * bounded from the elements' sizes (P. Amestoy, T. Davis, I. Duff, SIAM J. Matrix Anal. Appl. 1996, 17(4), 886; without supervariables).
 * What is absorbed comes right before what absorbs it (a postorder, which changes no fill), so that a factor is worked through memory in order.
 */
export function minimumDegree(pattern: Pattern): Int32Array {
  return new Elimination(pattern).run();
}

class Elimination {
  private readonly size: number;
  private readonly start: Int32Array;
  /** Of each unknown: first its elements, then the unknowns it is still joined to one by one. Never grows: a step takes out at least what it adds. */
  private readonly list: Int32Array;
  private readonly elementCount: Int32Array;
  private readonly length: Int32Array;
  /** Unknowns in each element, all in one list; the element is called by its pivot. */
  private readonly members: GrowingList;
  private readonly memberStart: Int32Array;
  private readonly memberEnd: Int32Array;
  /** The element that has absorbed each, or -1. */
  private readonly absorber: Int32Array;
  private readonly done: Uint8Array;
  private readonly mark: Int32Array;
  private readonly seen: Int32Array;
  private readonly outside: Int32Array;
  private readonly scratch: Int32Array;
  private readonly buckets: DegreeBuckets;

  constructor({ size, start, index }: Pattern) {
    this.size = size;
    this.start = start;
    this.list = index.slice();
    this.elementCount = new Int32Array(size);
    this.length = new Int32Array(size);
    this.members = new GrowingList(2 * index.length + 16);
    this.memberStart = new Int32Array(size);
    this.memberEnd = new Int32Array(size);
    this.absorber = new Int32Array(size).fill(-1);
    this.done = new Uint8Array(size);
    this.mark = new Int32Array(size).fill(-1);
    this.seen = new Int32Array(size).fill(-1);
    this.outside = new Int32Array(size);
    this.scratch = new Int32Array(size + 1);
    this.buckets = new DegreeBuckets(size);
    for (let i = 0; i < size; i++) {
      this.length[i] = start[i + 1] - start[i];
      this.buckets.add(i, this.length[i]);
    }
  }

  run(): Int32Array {
    const { size, buckets, members, memberStart, memberEnd } = this;
    const order = new Int32Array(size);
    for (let k = 0; k < size; k++) {
      const pivot = buckets.takeLeast();
      order[k] = pivot;
      this.gatherElement(pivot, k);
      this.measureOverlap(pivot, k);
      for (let m = memberStart[pivot]; m < memberEnd[pivot]; m++) {
        const j = members.at(m);
        const degree = this.replace(j, pivot, k) + memberEnd[pivot] - memberStart[pivot] - 1;
        buckets.move(j, Math.min(degree, size - k - 2));
      }
    }
    return this.postorder(order);
  }

  /** Each subtree of absorptions in one piece, its root last. */
  private postorder(order: Int32Array): Int32Array {
    const { size, absorber } = this;
    const subtree = new Int32Array(size).fill(1);
    for (let k = 0; k < size; k++) if (absorber[order[k]] >= 0) subtree[absorber[order[k]]] += subtree[order[k]];
    const sorted = new Int32Array(size);
    // Where the next child of each goes, and the next root, from the end backwards.
    const end = new Int32Array(size);
    let rootEnd = size;
    for (let k = size - 1; k >= 0; k--) {
      const v = order[k];
      const above = absorber[v];
      const last = (above < 0 ? rootEnd : end[above]) - 1;
      sorted[last] = v;
      end[v] = last;
      if (above < 0) rootEnd = last + 1 - subtree[v];
      else end[above] = last + 1 - subtree[v];
    }
    return sorted;
  }

  /** The new element: all that the pivot is joined to, directly or through elements, which it absorbs. */
  private gatherElement(pivot: number, k: number): void {
    const { list, start, elementCount, length, members, memberStart, memberEnd, absorber, done, mark } = this;
    done[pivot] = 1;
    mark[pivot] = k;
    memberStart[pivot] = members.length;
    const first = start[pivot];
    for (let p = first; p < first + length[pivot]; p++) {
      const each = list[p];
      if (p >= first + elementCount[pivot]) {
        if (!done[each] && mark[each] !== k) this.join(each, k);
        continue;
      }
      if (absorber[each] >= 0) continue;
      absorber[each] = pivot;
      for (let m = memberStart[each]; m < memberEnd[each]; m++) {
        const j = members.at(m);
        if (!done[j] && mark[j] !== k) this.join(j, k);
      }
    }
    memberEnd[pivot] = members.length;
  }

  private join(j: number, k: number): void {
    this.mark[j] = k;
    this.members.push(j);
  }

  /** Of every element that meets the new one: how much of it lies outside. */
  private measureOverlap(pivot: number, k: number): void {
    const { list, start, elementCount, members, memberStart, memberEnd, absorber, seen, outside } = this;
    for (let m = memberStart[pivot]; m < memberEnd[pivot]; m++) {
      const j = members.at(m);
      for (let p = start[j]; p < start[j] + elementCount[j]; p++) {
        const e = list[p];
        if (absorber[e] >= 0) continue;
        if (seen[e] !== k) {
          seen[e] = k;
          outside[e] = memberEnd[e] - memberStart[e];
        }
        outside[e]--;
      }
    }
  }

  /** Puts the new element into j's list in place of all that it covers; answers how much j is joined to outside it. */
  private replace(j: number, pivot: number, k: number): number {
    const { list, start, elementCount, length, absorber, done, mark, outside, scratch } = this;
    const first = start[j];
    let kept = 0;
    let beyond = 0;
    for (let p = first; p < first + elementCount[j]; p++) {
      const e = list[p];
      if (absorber[e] >= 0) continue;
      if (outside[e] <= 0) {
        absorber[e] = pivot;
        continue;
      }
      beyond += outside[e];
      scratch[kept++] = e;
    }
    scratch[kept++] = pivot;
    const elements = kept;
    for (let p = first + elementCount[j]; p < first + length[j]; p++) {
      const i = list[p];
      if (!done[i] && mark[i] !== k) scratch[kept++] = i;
    }
    for (let p = 0; p < kept; p++) list[first + p] = scratch[p];
    elementCount[j] = elements;
    length[j] = kept;
    return beyond + kept - elements;
  }
}
