import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chainsOf } from '@/lib/hydraulics/graph/chains';
import { type Loops, shortLoops, treeLoops } from '@/lib/hydraulics/graph/loops';
import { solveDense } from '@/lib/hydraulics/sparse/dense';

const graph = fc
  .record({ nodes: fc.integer({ min: 1, max: 25 }), ends: fc.array(fc.tuple(fc.nat(1000), fc.nat(1000)), { maxLength: 60 }) })
  .map(({ nodes, ends }) => ends.map(([a, b]) => [a % nodes, b % nodes]).filter(([a, b]) => a !== b))
  .map((ends) => ({ from: Int32Array.from(ends, ([a]) => a), to: Int32Array.from(ends, ([, b]) => b) }));

function ladder(rungs: number) {
  const ends: [number, number][] = [];
  for (let k = 0; k < rungs; k++) ends.push([2 * k, 2 * k + 1]);
  for (let k = 0; k + 1 < rungs; k++) ends.push([2 * k, 2 * k + 2], [2 * k + 1, 2 * k + 3]);
  return { from: Int32Array.from(ends, ([a]) => a), to: Int32Array.from(ends, ([, b]) => b) };
}

const nodesOf = ({ from, to }: ReturnType<typeof ladder>) => Math.max(0, ...from, ...to) + 1;

/** Links minus nodes plus connected parts: how many independent loops there are. */
function loopNumber({ from, to }: ReturnType<typeof ladder>): number {
  const nodes = nodesOf({ from, to });
  const group = Array.from({ length: nodes }, (_, v) => v);
  const of = (v: number): number => (group[v] === v ? v : of(group[v]));
  let parts = nodes;
  from.forEach((v, i) => {
    if (of(v) === of(to[i])) return;
    group[of(v)] = of(to[i]);
    parts--;
  });
  return from.length - nodes + parts;
}

function expectIndependentLoops(ends: ReturnType<typeof ladder>, loops: Loops) {
  const chains = chainsOf(nodesOf(ends), ends.from, ends.to);
  expect(loops.count).toBe(loopNumber(ends));
  const rows = Array.from({ length: loops.count }, (_, l) => {
    const row = new Float64Array(chains.count);
    const atNode = new Map<number, number>();
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) {
      const [c, sign] = [loops.chain[p], loops.sign[p]];
      row[c] += sign;
      atNode.set(chains.from[c], (atNode.get(chains.from[c]) ?? 0) - sign);
      atNode.set(chains.to[c], (atNode.get(chains.to[c]) ?? 0) + sign);
    }
    for (const sum of atNode.values()) expect(sum).toBe(0);
    return row;
  });
  // Independent: the matrix of their common chains is regular, so 1s around come back.
  const gram = rows.map((a) => Float64Array.from(rows, (b) => a.reduce((sum, x, c) => sum + x * b[c], 0)));
  const right = Float64Array.from(gram, (row) => row.reduce((sum, x) => sum + x, 0));
  for (const x of solveDense(gram, right)) expect(x).toBeCloseTo(1, 6);
}

describe('loops', () => {
  it('are closed, independent and as many as there are, in any network', () => {
    fc.assert(
      fc.property(graph, (ends) => {
        const chains = chainsOf(nodesOf(ends), ends.from, ends.to);
        expectIndependentLoops(ends, shortLoops(nodesOf(ends), chains));
        const resistance = Float64Array.from({ length: chains.count }, (_, c) => (c * 7) % 5);
        expectIndependentLoops(ends, treeLoops(nodesOf(ends), chains, resistance, 1e6)!);
      }),
    );
  });

  it('of a direct-return ladder are its meshes, not rounds through the root', () => {
    const ends = ladder(500);
    const loops = shortLoops(nodesOf(ends), chainsOf(nodesOf(ends), ends.from, ends.to));
    for (let l = 0; l < loops.count; l++) expect(loops.start[l + 1] - loops.start[l]).toBeLessThanOrEqual(4);
  });

  it('of many parallel links pair up in a row', () => {
    const from = new Int32Array(1000);
    const to = new Int32Array(1000).fill(1);
    const loops = shortLoops(2, chainsOf(2, from, to));
    const uses = new Map<number, number>();
    for (const c of loops.chain) uses.set(c, (uses.get(c) ?? 0) + 1);
    expect(Math.max(...uses.values())).toBe(2);
  });
});
