import { expect, it } from 'vitest';
import type { SolvedDocument } from '@/lib/server/solving/solve-document';
import { solveDocument } from '@/lib/server/solving/solve-document';
import { cachedSolution, keepSolution } from '@/lib/server/solving/solution-cache';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { ladder } from '../../make/drawing';

const solved = solveDocument(drawingToDocument(ladder([0.02]), 'ladder').document!);
const ofLinks = (count: number): SolvedDocument => ({
  ...solved,
  solve: { ...solved.solve, links: Array(count).fill(solved.solve.links[0]) },
});

it('lets go of the solutions that were asked for longest ago when all together are large', () => {
  for (const key of ['a', 'b', 'c']) keepSolution(key, ofLinks(30_000));
  cachedSolution('a');
  keepSolution('d', ofLinks(30_000));
  expect(['a', 'b', 'c', 'd'].filter((key) => cachedSolution(key))).toEqual(['a', 'c', 'd']);
});

it('keeps sixty-four small ones', () => {
  for (let i = 0; i < 65; i++) keepSolution(`small ${i}`, solved);
  expect(cachedSolution('small 0')).toBeUndefined();
  expect(cachedSolution('small 1')).toBeDefined();
});
