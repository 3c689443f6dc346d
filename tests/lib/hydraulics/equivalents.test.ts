import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { anyNetwork, quadraticKinds } from '../../make/any-network';
import { resistance } from '../../make/network-of-links';

const CLOSED_KPA = 1e-4;
type Plain = { flowLs: number; dropKpa: number };

/** Alike in flow, or where the law lies flat at next to no flow, in drop. */
const alike = (one: Plain, other: Plain) =>
  Math.abs(one.flowLs - other.flowLs) < 1e-6 + 1e-6 * Math.abs(one.flowLs) || Math.abs(one.dropKpa - other.dropKpa) < CLOSED_KPA;

/** The pumps of a network, driving two copies of all the rest between the same two nodes. */
function doubled(document: NetworkDocument): NetworkDocument {
  const shared = new Set(document.links.filter(({ kind }) => kind === 'pump').flatMap(({ from, to }) => [from, to]));
  const copy = (id: string) => (shared.has(id) ? id : `${id}'`);
  const second = document.links
    .filter(({ kind }) => kind !== 'pump')
    .map((link): NetworkLink => ({ ...link, id: `${link.id}'`, from: copy(link.from), to: copy(link.to) }));
  const nodes = document.nodes.flatMap((node) => (shared.has(node.id) ? [node] : [node, { ...node, id: `${node.id}'` }]));
  return { ...document, nodes, links: [...document.links, ...second] };
}

const factor = fc.double({ min: 0.05, max: 20, noNaN: true });

/** A network with one more link, put there by `put` between two of its nodes. */
function withLinks(document: NetworkDocument, links: (from: string, to: string) => NetworkLink[]): NetworkDocument {
  const added = links(document.nodes[0].id, document.nodes[document.nodes.length - 1].id);
  const known = new Set(document.nodes.map(({ id }) => id));
  const fresh = [...new Set(added.flatMap(({ from, to }) => [from, to]))].filter((id) => !known.has(id));
  return { ...document, nodes: [...document.nodes, ...fresh.map((id) => ({ id }))], links: [...document.links, ...added] };
}

const find = (document: NetworkDocument, id: string) => {
  const result = solve(document);
  expect(result.converged).toBe(true);
  return result.links.find((link) => link.id === id)!;
};

describe('any network', () => {
  it('with every passive link twice has the same flow in both of each pair', () => {
    fc.assert(
      fc.property(anyNetwork(['pipe', ...quadraticKinds]), (document) => {
        const result = solve(doubled(document));
        expect(result.converged).toBe(true);
        const links = new Map(result.links.map((link) => [link.id, link]));
        for (const [id, link] of links) if (links.has(`${id}'`)) expect(alike(link, links.get(`${id}'`)!), id).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('takes two resistances in series as one of their sum', () => {
    fc.assert(
      fc.property(anyNetwork(quadraticKinds), factor, factor, (document, first, second) => {
        const one = withLinks(document, (from, to) => [resistance('R', from, to, first + second)]);
        const two = withLinks(document, (from, to) => [resistance('R', from, 'new', first), resistance('rest', 'new', to, second)]);
        const [whole, part] = [find(one, 'R'), find(two, 'R')];
        expect(alike(whole, { flowLs: part.flowLs, dropKpa: (part.dropKpa * (first + second)) / first })).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('takes two resistances side by side as one whose root of conductance is the sum of theirs', () => {
    fc.assert(
      fc.property(anyNetwork(quadraticKinds), factor, factor, (document, first, second) => {
        const together = (first ** -0.5 + second ** -0.5) ** -2;
        const one = withLinks(document, (from, to) => [resistance('R', from, to, together)]);
        const two = withLinks(document, (from, to) => [resistance('R', from, to, first), resistance('rest', from, to, second)]);
        const [whole, part] = [find(one, 'R'), find(two, 'R')];
        expect(alike(whole, { flowLs: part.flowLs * Math.sqrt(first / together), dropKpa: part.dropKpa })).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it('is the same whichever node the pressure is fixed at, and at whatever height', () => {
    fc.assert(
      fc.property(anyNetwork(), fc.nat(), fc.integer({ min: -50, max: 50 }), (document, at, riseM) => {
        const other = document.nodes[at % document.nodes.length].id;
        const nodes = document.nodes.map((node) => ({ ...node, elevationM: (node.elevationM ?? 0) + riseM }));
        const here = solve(document);
        const there = solve({ ...document, nodes, reference: { node: other, gaugePressureKpa: 333 } });
        here.links.forEach((link, k) => expect(alike(link, there.links[k]), link.id).toBe(true));
        expect(there.nodes.find(({ id }) => id === other)!.pressureKpa).toBeCloseTo(333, 9);
      }),
      { numRuns: 60 },
    );
  });
});
