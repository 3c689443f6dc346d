import { describe, expect, it } from 'vitest';
import { designFlows } from '@/lib/hydraulics/design-flows';
import type { LinkOf, NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { houseExample } from '../../make/house-example';
import { networkOfLinks, pump, resistance, terminal, valve } from '../../make/network-of-links';

function flowsOf(document: NetworkDocument) {
  const design = designFlows(document);
  const flow = (id: string) => {
    const number = design.network.numberOf[document.links.findIndex((link) => link.id === id)];
    return number < 0 ? 0 : design.flow[number];
  };
  const openLink = (id: string) => design.network.document.links.find((link) => link.id === id)!;
  return { ...design, at: flow, openLink };
}

const pipe = (id: string, from: string, to: string, lengthM: number): NetworkLink => ({
  id,
  kind: 'pipe',
  from,
  to,
  lengthM,
  boreMm: 40,
  roughnessMm: 0.05,
});

describe('design flows', () => {
  it('of a tree add up from the terminals to the pump, in every link whichever way it is drawn', () => {
    const document = houseExample();
    const turned = document.links.map((link) => (link.id === 'main2' ? { ...link, from: link.to, to: link.from } : link));
    const { at, live, conflict, isPumpDependent } = flowsOf({ ...document, links: turned });
    const expected = { PU: 1, main1: 1, main2: -0.5, main3: 0.2, T1: 0.5, V1: 0.5, T2: 0.3, V2: 0.3, T3: 0.2, V3: 0.2 };
    for (const [id, flow] of Object.entries(expected)) expect(at(id), id).toBeCloseTo(flow, 9);
    expect([...live]).toEqual(['T1', 'T2', 'T3']);
    expect(conflict).toEqual([]);
    expect(isPumpDependent).toBe(false);
  });

  it('leave out a terminal whose circuit is not open all round', () => {
    const document = houseExample();
    const links = document.links.map((link) => (link.id === 'V2' ? { ...link, closed: true } : link));
    links.push(terminal('dead end', 'n2', 'nowhere', 0.4, 20));
    const nodes = [...document.nodes, { id: 'nowhere' }];
    const { at, live } = flowsOf({ ...document, nodes, links });
    expect([...live]).toEqual(['T1', 'T3']);
    expect(at('T2')).toBe(0);
    expect(at('dead end')).toBe(0);
    expect(at('PU')).toBeCloseTo(0.7, 9);
  });

  it('are taken with free valves fully open, locked ones as they stand, limiters and controllers as open passages', () => {
    const free = { ...valve('free', 'b', 'c', 8), setting: 1 } as LinkOf<'balancingValve'>;
    const locked = { ...valve('locked', 'c', 'd', 8), setting: 1, locked: true } as LinkOf<'balancingValve'>;
    const document = networkOfLinks([
      pump('PU', 'A', 'a', 60, 10),
      terminal('T', 'a', 'b', 0.4, 20),
      free,
      locked,
      { id: 'limiter', kind: 'flowLimiter', from: 'd', to: 'e', limitLs: 0.1, minDropKpa: 9 },
      { id: 'controller', kind: 'dpController', from: 'e', to: 'A', setpointKpa: 5, sense: ['a', 'b'], kvs: 3 },
    ]);
    const { at, openLink } = flowsOf(document);
    for (const link of document.links) expect(at(link.id)).toBeCloseTo(0.4, 9);
    expect(openLink('free')).toMatchObject({ setting: 4 });
    expect(openLink('locked')).toMatchObject({ setting: 1 });
    expect(openLink('limiter')).toMatchObject({ kind: 'resistance', from: 'd', to: 'e', designFlowLs: 0.1, designDropKpa: 9 });
    expect(openLink('controller')).toMatchObject({ kind: 'resistance', from: 'e', to: 'A', kv: 3 });
  });

  it('leave a closed limiter closed', () => {
    const document = networkOfLinks([
      pump('PU', 'A', 'a', 60, 10),
      terminal('T', 'a', 'b', 0.4, 20),
      { id: 'limiter', kind: 'flowLimiter', from: 'b', to: 'A', limitLs: 1, minDropKpa: 9, closed: true },
    ]);
    expect([...flowsOf(document).live]).toEqual([]);
  });

  it('share out over parallel pipes by their friction', () => {
    const document = networkOfLinks([
      pump('PU', 'A', 'a', 60, 10),
      terminal('T', 'a', 'b', 0.9, 20),
      resistance('wide', 'b', 'A', 10),
      resistance('narrow', 'b', 'A', 40),
    ]);
    const { at, isPumpDependent } = flowsOf(document);
    expect(at('wide')).toBeCloseTo(0.6, 7);
    expect(at('narrow')).toBeCloseTo(0.3, 7);
    expect(isPumpDependent).toBe(false);
  });

  it('depend on pumps where these stand in parallel, or beside a bypass', () => {
    const circuit = [terminal('T', 'a', 'b', 0.9, 20), resistance('back', 'b', 'A', 10)];
    const twin = networkOfLinks([pump('one', 'A', 'a', 60, 10), pump('two', 'A', 'a', 60, 10), ...circuit]);
    expect(flowsOf(twin)).toMatchObject({ isPumpDependent: true, conflict: [] });
    expect(flowsOf(twin).at('one')).toBeCloseTo(0.45, 6);
    const bypassed = networkOfLinks([pump('one', 'A', 'a', 60, 10), resistance('bypass', 'a', 'A', 600), ...circuit]);
    expect(flowsOf(bypassed).isPumpDependent).toBe(true);
    expect(flowsOf(bypassed).at('one')).toBeCloseTo(0.9 + flowsOf(bypassed).at('bypass'), 9);
    expect(flowsOf(networkOfLinks(circuit)).isPumpDependent).toBe(false);
  });

  it('that do not add up name the nodes where they do not', () => {
    const document = networkOfLinks([pump('PU', 'A', 'a', 60, 10), terminal('T1', 'a', 'b', 0.4, 20), terminal('T2', 'b', 'A', 0.3, 20)]);
    const { conflict } = flowsOf(document);
    expect(conflict).toContain('b');
    expect(conflict.sort()).toEqual(['A', 'a', 'b']);
  });

  it('count a fixed inflow with the terminals’ own', () => {
    const document = networkOfLinks([pump('PU', 'A', 'a', 60, 10), terminal('T', 'a', 'b', 0.4, 20), resistance('back', 'b', 'A', 10)], {
      a: -0.1,
      b: 0.1,
    });
    const { at } = flowsOf(document);
    expect(at('T')).toBeCloseTo(0.4, 9);
    expect(at('PU')).toBeCloseTo(0.5, 9);
  });

  it('by the iteration of all loops, whatever method the document asks for', () => {
    const document: NetworkDocument = {
      ...networkOfLinks([pipe('a', 'A', 'B', 3), terminal('T', 'B', 'A', 0.2, 10)]),
      options: { method: 'hardy-cross', history: true },
    };
    expect(designFlows(document).network.document.options).toEqual({ method: undefined, history: true });
  });
});
