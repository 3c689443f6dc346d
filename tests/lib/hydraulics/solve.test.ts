import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { frictionFactor } from '@/lib/hydraulics/friction';
import { pumpHeadAt } from '@/lib/hydraulics/solve-result';
import { solve } from '@/lib/hydraulics/solve';
import type { LinkOf, Method, NetworkDocument, NetworkLink, SolveResult } from '@/lib/hydraulics/types';
import { anyNetwork, quadraticKinds } from '../../make/any-network';

const GRAVITY = 9.80665;

/** Flow out of balance at the worst node, L/s, from the result's flows alone. */
function imbalanceOf(document: NetworkDocument, result: SolveResult): number {
  const sum = new Map(document.nodes.map((node) => [node.id, node.inflowLs ?? 0]));
  document.links.forEach((link, k) => {
    sum.set(link.from, sum.get(link.from)! - result.links[k].flowLs);
    sum.set(link.to, sum.get(link.to)! + result.links[k].flowLs);
  });
  return Math.max(...[...sum.values()].map(Math.abs));
}

/**
 * Head that a link's law asks for at its flow, kPa, written out here apart from the engine; null where the law leaves it open (a wall: shut check
 * valve, pump against its non-return, limiter at its limit).
 */
function lawKpa(link: NetworkLink, flowLs: number, document: NetworkDocument): number | null {
  const { densityKgM3, viscosityMPaS } = document.fluid as Extract<NetworkDocument['fluid'], { medium: 'custom' }>;
  const ofKv = (kv: number) => (((3.6 * flowLs) / kv) * Math.abs((3.6 * flowLs) / kv) * 100 * densityKgM3) / 1000;
  switch (link.kind) {
    case 'pipe': {
      const bore = link.boreMm / 1000;
      const velocity = flowLs / 1000 / ((Math.PI / 4) * bore ** 2);
      const reynolds = (densityKgM3 * Math.abs(velocity) * bore) / (viscosityMPaS / 1000);
      const factor = reynolds > 0 ? frictionFactor(reynolds, link.roughnessMm / link.boreMm) : 0;
      return ((((factor * link.lengthM) / bore + (link.minorK ?? 0)) * densityKgM3 * velocity * Math.abs(velocity)) / 2) * 1e-3;
    }
    case 'terminal':
      return link.designDropKpa * Math.sign(flowLs) * Math.abs(flowLs / link.designFlowLs) ** (link.exponent ?? 2);
    case 'controlValve':
      return ofKv(link.kvs * (link.characteristic === 'linear' ? link.opening! : 50 ** (link.opening! - 1)));
    case 'balancingValve':
      return ofKv((link.kvTable[2].kv * link.setting!) / 4);
    case 'resistance':
      return ofKv(link.kv!);
    case 'checkValve':
      return flowLs < 0 ? null : ofKv(link.kv);
    case 'flowLimiter':
      return flowLs > link.limitLs - 1e-7 ? null : link.minDropKpa * Math.sign(flowLs) * (flowLs / link.limitLs) ** 2;
    case 'pump':
      return flowLs < 1e-7 ? null : (-pumpHeadAt(link, flowLs, link.speed ?? 1) * densityKgM3 * GRAVITY) / 1000;
    case 'dpController':
      return null;
  }
}

/** Asserts that nodes balance, pressures differ by what each law asks for, and walls hold: the whole steady state, from the result alone. */
function expectSteady(document: NetworkDocument, result: SolveResult) {
  const { densityKgM3 } = document.fluid as Extract<NetworkDocument['fluid'], { medium: 'custom' }>;
  expect(result.converged).toBe(true);
  expect(imbalanceOf(document, result)).toBeLessThan(1e-9);
  const node = new Map(
    result.nodes.map((each, v) => [each.id, each.pressureKpa + (densityKgM3 * GRAVITY * (document.nodes[v].elevationM ?? 0)) / 1000]),
  );
  document.links.forEach((link, k) => {
    const { flowLs, dropKpa } = result.links[k];
    expect(Number.isFinite(flowLs)).toBe(true);
    expect(node.get(link.from)! - node.get(link.to)!).toBeCloseTo(dropKpa, 6);
    const law = lawKpa(link, flowLs, document);
    if (law !== null) expect(Math.abs(dropKpa - law), `${link.id} (${link.kind})`).toBeLessThan(1e-3 + 1e-5 * Math.abs(law));
    if (link.kind === 'checkValve') expect(flowLs).toBeGreaterThan(-1e-7);
    if (link.kind === 'pump') expect(flowLs).toBeGreaterThan(-1e-7);
    if (link.kind === 'flowLimiter') expect(flowLs).toBeLessThan(link.limitLs + 1e-7);
    if (link.kind === 'flowLimiter' && law === null) expect(dropKpa).toBeGreaterThan(link.minDropKpa - 1e-3);
  });
}

const CLOSED_KPA = 1e-4;

/**
 * Asserts that two solved networks stand alike, link by link: `flow` turns the first one's flow into the second one's, `drop` its drop. Flows agree
 * within 1e-6 L/s; where a quadratic law lies flat at next to no flow, an iteration that closes heads tells the flow no better
 * than its head, and there the drops agree within 0.1 Pa.
 */
function expectAlike(
  first: SolveResult,
  second: SolveResult,
  { flow = (q: number, _: string) => q, drop = (kpa: number, _: string) => kpa } = {},
) {
  const there = new Map(second.links.map((link) => [link.id, link]));
  for (const { id, flowLs, dropKpa } of first.links) {
    const other = there.get(id)!;
    const isSameFlow = Math.abs(flow(flowLs, id) - other.flowLs) < 1e-6;
    expect(isSameFlow || Math.abs(drop(dropKpa, id) - other.dropKpa) < CLOSED_KPA, `${id}: ${flowLs} L/s against ${other.flowLs}`).toBe(
      true,
    );
  }
}

describe('any network', () => {
  it.each<Method>(['simultaneous', 'hardy-cross'])(
    'is solved to a steady state by %s',
    (method) => {
      fc.assert(
        fc.property(anyNetwork(), (document) => {
          expectSteady(document, solve({ ...document, options: { method } }));
        }),
        { numRuns: method === 'simultaneous' ? 200 : 60 },
      );
    },
    60_000,
  );

  it('has the same flows whatever the order of its links', () => {
    fc.assert(
      fc.property(anyNetwork(['pipe', ...quadraticKinds]), fc.integer(), (document, seed) => {
        const shuffled = [...document.links].sort((a, b) => hash(a.id, seed) - hash(b.id, seed));
        expectAlike(solve(document), solve({ ...document, links: shuffled }));
      }),
      { numRuns: 60 },
    );
  });

  it('has the opposite flow in a link that is turned round', () => {
    fc.assert(
      fc.property(anyNetwork(['pipe', ...quadraticKinds]), fc.nat(), (document, at) => {
        const passive = document.links.filter((link) => link.kind !== 'pump');
        const turned = passive[at % passive.length];
        const links = document.links.map((link) => (link === turned ? { ...link, from: link.to, to: link.from } : link));
        const turn = (value: number, id: string) => (id === turned.id ? -value : value);
        expectAlike(solve(document), solve({ ...document, links }), { flow: turn, drop: turn });
      }),
      { numRuns: 60 },
    );
  });

  it('has the same flows when a pipe is cut in two', () => {
    fc.assert(
      fc.property(anyNetwork(['pipe']), fc.nat(), fc.double({ min: 0.05, max: 0.95, noNaN: true }), (document, at, part) => {
        const pipes = document.links.filter((link): link is LinkOf<'pipe'> => link.kind === 'pipe');
        const cut = pipes[at % pipes.length];
        const piece = (id: string, from: string, to: string, share: number) => ({
          ...cut,
          id,
          from,
          to,
          lengthM: cut.lengthM * share,
          minorK: cut.minorK! * share,
        });
        const links = document.links.flatMap((link): NetworkLink[] =>
          link === cut ? [piece(cut.id, cut.from, 'new', part), piece('rest', 'new', cut.to, 1 - part)] : [link],
        );
        const here = solve({ ...document, links, nodes: [...document.nodes, { id: 'new' }] });
        const ofCut = (kpa: number, id: string) => (id === cut.id ? kpa * part : kpa);
        expectAlike(solve(document), here, { drop: ofCut });
      }),
      { numRuns: 60 },
    );
  });

  it('scales: quadratic links at a quarter of the drop and pumps at half speed halve every flow', () => {
    fc.assert(
      fc.property(anyNetwork(quadraticKinds), (document) => {
        const slow = document.links.map((link) => (link.kind === 'pump' ? { ...link, speed: 0.5 } : link));
        expectAlike(solve(document), solve({ ...document, links: slow }), { flow: (q) => q / 2, drop: (kpa) => kpa / 4 });
      }),
      { numRuns: 60 },
    );
  });

  it('without a pump stands still', () => {
    fc.assert(
      fc.property(anyNetwork(), (document) => {
        const result = solve({ ...document, links: document.links.filter((link) => link.kind !== 'pump') });
        expect(result.converged).toBe(true);
        for (const link of result.links) expect(Math.abs(link.flowLs)).toBeLessThan(1e-9);
      }),
      { numRuns: 40 },
    );
  });
});

const hash = (id: string, seed: number) =>
  [...id].reduce((sum, letter) => (sum * 31 + letter.charCodeAt(0) + seed) % 10_007, seed % 10_007);
