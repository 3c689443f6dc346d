/** A symmetric pattern without its diagonal: neighbours of i are `index[start[i]]` … */
export interface Pattern {
  size: number;
  start: Int32Array;
  index: Int32Array;
}

/**
 * An order of elimination that keeps a Cholesky factor sparse: at each step the unknown that is joined to the fewest others goes
 * first, on the quotient graph with approximate degrees (P. Amestoy, T. Davis, I. Duff 1996, without its supervariables).
 */
export function minimumDegree({ size, start, index }: Pattern): Int32Array {
  const variables: number[][] = [];
  const elements: number[][] = [];
  const members: (number[] | null)[] = new Array(size).fill(null);
  const degree = new Int32Array(size);
  const done = new Uint8Array(size);
  const mark = new Int32Array(size).fill(-1);
  const outside = new Int32Array(size);
  const seen = new Int32Array(size).fill(-1);
  const buckets: number[][] = [];
  let least = 0;
  const wait = (i: number) => {
    while (buckets.length <= degree[i]) buckets.push([]);
    buckets[degree[i]].push(i);
    if (degree[i] < least) least = degree[i];
  };
  for (let i = 0; i < size; i++) {
    variables.push(Array.from(index.subarray(start[i], start[i + 1])));
    elements.push([]);
    degree[i] = variables[i].length;
    wait(i);
  }

  const order = new Int32Array(size);
  for (let k = 0; k < size; k++) {
    let pivot = -1;
    while (pivot < 0) {
      const candidate = buckets[least].pop();
      if (candidate === undefined) least++;
      else if (!done[candidate] && degree[candidate] === least) pivot = candidate;
    }
    order[k] = pivot;
    done[pivot] = 1;

    // The new element: all that the pivot is joined to, directly or through elements, which it absorbs.
    const joined: number[] = [];
    mark[pivot] = k;
    const join = (list: number[]) => {
      for (const j of list) {
        if (done[j] || mark[j] === k) continue;
        mark[j] = k;
        joined.push(j);
      }
    };
    join(variables[pivot]);
    for (const e of elements[pivot]) {
      join(members[e]!);
      members[e] = null;
    }
    members[pivot] = joined;
    variables[pivot] = [];

    // Of every element that meets the new one: how much of it lies outside.
    for (const j of joined)
      for (const e of elements[j]) {
        if (!members[e]) continue;
        if (seen[e] !== k) {
          seen[e] = k;
          outside[e] = members[e]!.length;
        }
        outside[e]--;
      }
    for (const j of joined) {
      let count = joined.length - 1;
      const direct = variables[j];
      let kept = 0;
      for (const i of direct) if (!done[i] && mark[i] !== k) direct[kept++] = i;
      direct.length = kept;
      const of = elements[j];
      kept = 0;
      for (const e of of) {
        if (!members[e]) continue;
        if (outside[e] <= 0) continue;
        count += outside[e];
        of[kept++] = e;
      }
      of.length = kept;
      of.push(pivot);
      degree[j] = Math.min(count + direct.length, size - k - 2);
      wait(j);
    }
  }
  return order;
}
