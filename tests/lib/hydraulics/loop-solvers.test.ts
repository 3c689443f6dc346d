import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { chainsOf } from '@/lib/hydraulics/graph/chains';
import { type Loops, shortLoops } from '@/lib/hydraulics/graph/loops';
import { LoopGradients } from '@/lib/hydraulics/loop-gradients';
import { loopSolver, type LoopSolver } from '@/lib/hydraulics/loop-matrix';
import { solveDense } from '@/lib/hydraulics/sparse/dense';

const meshed = fc
  .record({
    nodes: fc.integer({ min: 2, max: 15 }),
    pairs: fc.array(fc.tuple(fc.nat(999), fc.nat(999)), { minLength: 2, maxLength: 40 }),
    numbers: fc.array(fc.double({ min: 0.1, max: 30, noNaN: true }), { minLength: 80, maxLength: 80 }),
  })
  .map(({ nodes, pairs, numbers }) => {
    const ends = pairs.map(([a, b]) => [a % nodes, b % nodes]).filter(([a, b]) => a !== b);
    const chains = chainsOf(
      nodes,
      Int32Array.from(ends, ([a]) => a),
      Int32Array.from(ends, ([, b]) => b),
    );
    const loops = shortLoops(nodes, chains);
    return { loops, slope: Float64Array.from({ length: chains.count }, (_, c) => numbers[c]), numbers };
  })
  .filter(({ loops }) => loops.count > 0);

/** B D Bᵀ, written out. */
function matrixOf(loops: Loops, slope: Float64Array): Float64Array[] {
  const rows = Array.from({ length: loops.count }, (_, l) => {
    const row = new Float64Array(slope.length);
    for (let p = loops.start[l]; p < loops.start[l + 1]; p++) row[loops.chain[p]] += loops.sign[p];
    return row;
  });
  return rows.map((a) => Float64Array.from(rows, (b) => a.reduce((sum, x, c) => sum + x * slope[c] * b[c], 0)));
}

const solvers: [string, (loops: Loops, chains: number) => LoopSolver][] = [
  ['factors', loopSolver],
  ['conjugate gradients', (loops, chains) => new LoopGradients(loops, chains)],
];

describe.each(solvers)('all loops together, by %s', (_, make) => {
  it('are given the flows whose heads are those asked for, again and again with other slopes', () => {
    fc.assert(
      fc.property(meshed, ({ loops, slope, numbers }) => {
        const solver = make(loops, slope.length);
        for (const scale of [1, 7, 0.2]) {
          const scaled = slope.map((each, c) => each * (c % 3 ? scale : 1));
          solver.assemble(scaled);
          for (const shift of [0, 11]) {
            const heads = Float64Array.from({ length: loops.count }, (_, l) => numbers[l + shift] - 10);
            const flows = new Float64Array(loops.count).fill(5);
            solver.solve(heads, flows);
            const expected = solveDense(matrixOf(loops, scaled), heads.slice());
            flows.forEach((flow, l) => expect(Math.abs(flow - expected[l])).toBeLessThan(1e-6 * (1 + Math.abs(expected[l]))));
            expect(heads[0]).toBe(numbers[shift] - 10);
          }
        }
      }),
      { numRuns: 60 },
    );
  });

  it('that are in balance are left alone', () => {
    const chains = chainsOf(2, Int32Array.of(0, 0, 0), Int32Array.of(1, 1, 1));
    const loops = shortLoops(2, chains);
    const solver = make(loops, chains.count);
    solver.assemble(Float64Array.of(1, 2, 3));
    const flows = new Float64Array(loops.count).fill(9);
    solver.solve(new Float64Array(loops.count), flows);
    expect([...flows]).toEqual([0, 0]);
  });
});

describe('a small system solved by elimination', () => {
  it('comes back from its own image, whatever the order of its rows', () => {
    const number = fc.double({ min: -9, max: 9, noNaN: true });
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 6 }), fc.array(number, { minLength: 42, maxLength: 42 }), fc.nat(5), (n, numbers, turn) => {
        const rows = Array.from({ length: n }, (_, i) =>
          Float64Array.from({ length: n }, (_, j) => numbers[i * 6 + j] + (i === j ? 60 : 0)),
        );
        const wanted = numbers.slice(36, 36 + n);
        const turned = rows.map((_, i) => rows[(i + turn) % n].slice());
        const right = Float64Array.from(turned, (row) => row.reduce((sum, each, j) => sum + each * wanted[j], 0));
        solveDense(turned, right).forEach((each, j) => expect(each).toBeCloseTo(wanted[j], 9));
      }),
    );
  });

  it('leaves an unknown that nothing tells at 0 and finds the rest', () => {
    const rows = [Float64Array.of(2, 0, 1), Float64Array.of(0, 0, 0), Float64Array.of(0, 0, 4)];
    expect([...solveDense(rows, Float64Array.of(10, 0, 8))]).toEqual([4, 0, 2]);
  });
});
