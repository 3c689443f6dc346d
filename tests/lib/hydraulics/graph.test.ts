import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { adjacencyOf, spanningForest } from '@/lib/hydraulics/graph/adjacency';
import { chainsOf } from '@/lib/hydraulics/graph/chains';
import { EdgeTable } from '@/lib/hydraulics/graph/edge-table';
import { shortLoops, treeLoops } from '@/lib/hydraulics/graph/loops';
import { DegreeBuckets } from '@/lib/hydraulics/sparse/degree-buckets';

interface Ends {
  nodes: number;
  from: Int32Array;
  to: Int32Array;
}

const endsOf = (nodes: number, pairs: number[][]): Ends => ({
  nodes,
  from: Int32Array.from(pairs, ([a]) => a),
  to: Int32Array.from(pairs, ([, b]) => b),
});

const graph = fc
  .record({ nodes: fc.integer({ min: 1, max: 20 }), pairs: fc.array(fc.tuple(fc.nat(999), fc.nat(999)), { maxLength: 40 }) })
  .map(({ nodes, pairs }) =>
    endsOf(
      nodes,
      pairs.map(([a, b]) => [a % nodes, b % nodes]).filter(([a, b]) => a !== b),
    ),
  );

/** The number of connected parts, counted by merging names. */
function partsOf({ nodes, from, to }: Ends, usable: (i: number) => boolean = () => true): number[] {
  const name = Array.from({ length: nodes }, (_, v) => v);
  from.forEach((v, i) => {
    if (!usable(i)) return;
    const [keep, drop] = [name[v], name[to[i]]];
    name.forEach((each, w) => {
      if (each === drop) name[w] = keep;
    });
  });
  return name;
}

describe('links at each node', () => {
  it('are all listed, at both ends', () => {
    fc.assert(
      fc.property(graph, ({ nodes, from, to }) => {
        const { start, link } = adjacencyOf(nodes, from, to);
        for (let v = 0; v < nodes; v++) {
          const listed = [...link.slice(start[v], start[v + 1])].sort((a, b) => a - b);
          expect(listed).toEqual([...from.keys()].filter((i) => from[i] === v || to[i] === v));
        }
      }),
    );
  });
});

describe('a spanning forest', () => {
  it('reaches every node of each part over a link from its parent, the nearest first', () => {
    fc.assert(
      fc.property(graph, fc.array(fc.boolean(), { minLength: 40, maxLength: 40 }), fc.boolean(), (ends, chosen, isLimited) => {
        const { nodes, from, to } = ends;
        const usable = isLimited ? Uint8Array.from(from, (_, i) => Number(chosen[i])) : undefined;
        const forest = spanningForest(nodes, from, to, [nodes - 1], usable);
        const parts = partsOf(ends, (i) => !usable || usable[i] === 1);
        expect(forest.roots[0]).toBe(nodes - 1);
        expect(forest.roots.length).toBe(new Set(parts).size);
        expect([...forest.order].sort((a, b) => a - b)).toEqual(Array.from({ length: nodes }, (_, v) => v));
        const met = new Set<number>();
        let last = { part: -1, depth: 0 };
        for (const v of forest.order) {
          const link = forest.treeLink[v];
          if (link < 0) {
            expect(forest.parent[v]).toBe(-1);
            expect(forest.depth[v]).toBe(0);
            expect(forest.roots[forest.part[v]]).toBe(v);
          } else {
            const parent = forest.parent[v];
            expect([from[link], to[link]].sort()).toEqual([parent, v].sort());
            if (usable) expect(usable[link]).toBe(1);
            expect(met.has(parent)).toBe(true);
            expect(forest.depth[v]).toBe(forest.depth[parent] + 1);
            expect(forest.part[v]).toBe(forest.part[parent]);
          }
          if (last.part === forest.part[v]) expect(forest.depth[v]).toBeGreaterThanOrEqual(last.depth);
          last = { part: forest.part[v], depth: forest.depth[v] };
          met.add(v);
        }
        for (let v = 0; v < nodes; v++) for (let w = 0; w < v; w++) expect(forest.part[v] === forest.part[w]).toBe(parts[v] === parts[w]);
        // Nearest first: no usable link skips a level.
        from.forEach((v, i) => {
          if (!usable || usable[i]) expect(Math.abs(forest.depth[v] - forest.depth[to[i]])).toBeLessThanOrEqual(1);
        });
      }),
    );
  });
});

describe('chains', () => {
  it('hold each link that is not on a dead end once, run from junction to junction, and leave dead ends out', () => {
    fc.assert(
      fc.property(graph, ({ nodes, from, to }) => {
        const chains = chainsOf(nodes, from, to);
        const alive = new Set(from.keys());
        const degree = (v: number) => [...alive].filter((i) => from[i] === v || to[i] === v).length;
        for (let isCut = true; isCut;) {
          const dead = [...alive].find((i) => degree(from[i]) === 1 || degree(to[i]) === 1);
          isCut = dead !== undefined;
          if (dead !== undefined) alive.delete(dead);
        }
        const held = Array.from({ length: chains.count }, (_, c) => [...chains.member.slice(chains.start[c], chains.start[c + 1])]);
        expect(held.flat().sort((a, b) => a - b)).toEqual([...alive]);
        held.forEach((links, c) => {
          let v = chains.from[c];
          links.forEach((i, k) => {
            const forward = chains.sign[chains.start[c] + k] === 1;
            expect(forward ? from[i] : to[i]).toBe(v);
            v = forward ? to[i] : from[i];
            expect(chains.chainOf[i]).toBe(c);
            const isLast = k === links.length - 1;
            if (!isLast) expect(degree(v)).toBe(2);
            else if (v !== chains.from[c]) expect(degree(v)).toBeGreaterThan(2);
          });
          expect(v).toBe(chains.to[c]);
          if (chains.from[c] !== chains.to[c]) expect(degree(chains.from[c])).toBeGreaterThan(2);
        });
        from.forEach((_, i) => {
          if (!alive.has(i)) expect(chains.chainOf[i]).toBe(-1);
        });
      }),
    );
  });

  it('of a ring are one, round to where it began', () => {
    const { nodes, from, to } = endsOf(4, [
      [0, 1],
      [2, 1],
      [2, 3],
      [3, 0],
    ]);
    const chains = chainsOf(nodes, from, to);
    expect(chains).toMatchObject({ count: 1, from: Int32Array.of(0), to: Int32Array.of(0) });
    expect([...chains.member].sort()).toEqual([0, 1, 2, 3]);
  });
});

describe('loops through a tree of least resistance', () => {
  it('leave each chain of high resistance in one loop alone', () => {
    // Three parallel chains between two junctions: the two costly ones close loops through the cheap one.
    const { nodes, from, to } = endsOf(2, [
      [0, 1],
      [1, 0],
      [0, 1],
    ]);
    const chains = chainsOf(nodes, from, to);
    const cost = Float64Array.from({ length: chains.count }, (_, c) => [5, 1, 9][chains.member[chains.start[c]]]);
    const loops = treeLoops(nodes, chains, cost, 100)!;
    const uses = (link: number) => [...loops.chain].filter((c) => chains.member[chains.start[c]] === link).length;
    expect([uses(0), uses(1), uses(2)]).toEqual([1, 2, 1]);
    expect(treeLoops(nodes, chains, cost, 4)).not.toBeNull();
    expect(treeLoops(nodes, chains, cost, 3)).toBeNull();
  });
});

describe('loops found by contraction', () => {
  it('of a grid are its meshes, four links each', () => {
    const side = 6;
    const pairs: number[][] = [];
    for (let v = 0; v < side * side; v++) {
      if ((v + 1) % side) pairs.push([v, v + 1]);
      if (v + side < side * side) pairs.push([v, v + side]);
    }
    const { nodes, from, to } = endsOf(side * side, pairs);
    const chains = chainsOf(nodes, from, to);
    const loops = shortLoops(nodes, chains);
    expect(loops.count).toBe((side - 1) ** 2);
    const lengths = Array.from({ length: loops.count }, (_, l) =>
      [...loops.chain.slice(loops.start[l], loops.start[l + 1])].reduce((sum, c) => sum + chains.start[c + 1] - chains.start[c], 0),
    );
    expect(lengths.reduce((sum, each) => sum + each, 0) / lengths.length).toBeLessThan(5.5);
    expect(lengths.filter((each) => each === 4).length).toBeGreaterThan(0.6 * lengths.length);
  });
});

describe('a table of edges', () => {
  it('gives the edge last set between two nodes, from either, however many there are', () => {
    const entry = fc.tuple(fc.nat(40), fc.nat(40), fc.nat(1e6));
    fc.assert(
      fc.property(fc.nat(3), fc.array(entry, { maxLength: 400 }), (expected, entries) => {
        const table = new EdgeTable(expected);
        const map = new Map<string, number>();
        const key = (u: number, v: number) => `${Math.min(u, v)}-${Math.max(u, v)}`;
        for (const [u, v, edge] of entries) {
          expect(table.get(v, u)).toBe(map.get(key(u, v)) ?? -1);
          table.set(u, v, edge);
          map.set(key(u, v), edge);
        }
        for (let u = 0; u <= 40; u += 3) for (let v = 0; v <= 40; v++) expect(table.get(u, v)).toBe(map.get(key(u, v)) ?? -1);
      }),
    );
  });
});

describe('numbers by degree', () => {
  it('come out with the least degree first, after any moves', () => {
    const moves = fc.array(fc.tuple(fc.nat(99), fc.nat(99)), { maxLength: 30 });
    fc.assert(
      fc.property(fc.array(fc.nat(99), { minLength: 1, maxLength: 25 }), moves, (start, steps) => {
        const size = start.length;
        const degrees = new Map(start.map((degree, i) => [i, degree % (size + 1)]));
        const buckets = new DegreeBuckets(size);
        for (const [i, degree] of degrees) buckets.add(i, degree);
        const takeOne = () => {
          const taken = buckets.takeLeast();
          expect(degrees.get(taken)).toBe(Math.min(...degrees.values()));
          degrees.delete(taken);
        };
        for (const [which, degree] of steps) {
          const left = [...degrees.keys()];
          if (!left.length) break;
          const i = left[which % left.length];
          if (degree % 4 === 0) takeOne();
          else {
            buckets.move(i, degree % (size + 1));
            degrees.set(i, degree % (size + 1));
          }
        }
        while (degrees.size) takeOne();
      }),
    );
  });
});
