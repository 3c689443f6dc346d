import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { SparseLdl } from '@/lib/hydraulics/sparse/ldl';
import { minimumDegree, type Pattern } from '@/lib/hydraulics/sparse/minimum-degree';

function patternOf(size: number, pairs: [number, number][]): Pattern {
  const neighbours = Array.from({ length: size }, () => new Set<number>());
  for (const [i, j] of pairs) {
    if (i === j) continue;
    neighbours[i].add(j);
    neighbours[j].add(i);
  }
  const start = new Int32Array(size + 1);
  neighbours.forEach((set, i) => (start[i + 1] = start[i] + set.size));
  return { size, start, index: Int32Array.from(neighbours.flatMap((set) => [...set])) };
}

const pairsOf = ({ size, start, index }: Pattern) =>
  Array.from({ length: size }, (_, i) => Array.from(index.subarray(start[i], start[i + 1]), (j) => [i, j])).flat();

const anyPattern = fc
  .record({ size: fc.integer({ min: 1, max: 40 }), pairs: fc.array(fc.tuple(fc.nat(999), fc.nat(999)), { maxLength: 120 }) })
  .map(({ size, pairs }) =>
    patternOf(
      size,
      pairs.map(([i, j]) => [i % size, j % size]),
    ),
  );

function grid(side: number): Pattern {
  const pairs: [number, number][] = [];
  for (let k = 0; k < side * side; k++) {
    if ((k + 1) % side) pairs.push([k, k + 1]);
    if (k + side < side * side) pairs.push([k, k + side]);
  }
  return patternOf(side * side, pairs);
}

describe('sparse factors', () => {
  it('solve any diagonally dominant system', () => {
    fc.assert(
      fc.property(anyPattern, fc.infiniteStream(fc.double({ min: 0.1, max: 2, noNaN: true })), (pattern, numbers) => {
        const next = () => numbers.next().value;
        const factors = SparseLdl.of(pattern, 1e6, 1e9)!;
        const entries: [number, number, number][] = [];
        const sums = new Float64Array(pattern.size).fill(0.5);
        for (const [i, j] of pairsOf(pattern)) {
          if (j > i) continue;
          const value = -next();
          entries.push([i, j, value]);
          factors.value[factors.slot(i, j)] = value;
          sums[i] -= value;
          sums[j] -= value;
        }
        factors.diagonal.set(sums);
        factors.factorize();
        const right = Float64Array.from({ length: pattern.size }, next);
        const x = new Float64Array(pattern.size);
        factors.solve(right, x);
        const image = sums.map((sum, i) => sum * x[i]);
        for (const [i, j, value] of entries) {
          image[i] += value * x[j];
          image[j] += value * x[i];
        }
        image.forEach((each, i) => expect(each).toBeCloseTo(right[i], 9));
      }),
    );
  });

  it('are refused when they would be too full', () => {
    expect(SparseLdl.of(grid(20), 500, 1e9)).toBeNull();
  });
});

describe('minimum degree', () => {
  it('orders every unknown once', () => {
    fc.assert(
      fc.property(anyPattern, (pattern) => {
        expect([...minimumDegree(pattern)].sort((a, b) => a - b)).toEqual(Array.from({ length: pattern.size }, (_, k) => k));
      }),
    );
  });

  it('keeps the factor of a square grid far sparser than its band', () => {
    const side = 40;
    expect(SparseLdl.of(grid(side), 1e7, 1e12)!.fill).toBeLessThan(0.35 * side ** 3);
  });
});
