import { beforeAll, describe, expect, it } from 'vitest';
import type { Workspace } from 'epanet-js';
import { solve } from '@/lib/hydraulics/solve';
import { quadraticKinds, randomMesh } from '../make/any-network';
import { distribution } from '../make/distribution';
import { epanetInput, epanetWorkspace, runEpanet } from '../make/epanet';

let workspace: Workspace;
beforeAll(async () => {
  workspace = await epanetWorkspace();
});

/** Largest flow difference over the largest flow. */
function difference(document: Parameters<typeof solve>[0]): number {
  const result = solve(document);
  expect(result.converged).toBe(true);
  const { flows } = runEpanet(workspace, epanetInput(document, 1e-8), document.links.length);
  const largest = Math.max(...flows.map(Math.abs));
  return Math.max(...result.links.map((link, k) => Math.abs(link.flowLs - flows[k]))) / largest;
}

// EPANET 2.2 of the Open Water Analytics community, compiled to JavaScript: a global gradient solver on nodes.
describe('against EPANET', () => {
  it('200 random meshes of quadratic links have the same flows', () => {
    for (let seed = 1; seed <= 200; seed++) {
      const document = randomMesh(seed, 4 + (seed % 40), 3 + (seed % 23), quadraticKinds);
      expect(difference(document), `mesh ${seed}`).toBeLessThan(2e-4);
    }
  });

  it('100 random meshes of pipes agree within what its explicit friction formula differs from Colebrook-White', () => {
    for (let seed = 1; seed <= 100; seed++) {
      const document = randomMesh(1000 + seed, 4 + (seed % 40), 3 + (seed % 23), ['pipe']);
      expect(difference(document), `mesh ${seed}`).toBeLessThan(0.03);
    }
  });

  it.each([false, true])('a building of 300 terminals agrees (meshed: %s)', (isMeshed) => {
    expect(difference(distribution(300, isMeshed))).toBeLessThan(0.01);
  });
});
