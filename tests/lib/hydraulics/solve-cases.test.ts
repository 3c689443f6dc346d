import { describe, expect, it } from 'vitest';
import { changeLinks, prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, solve, solvePrepared } from '@/lib/hydraulics/solve';
import type { LinkOf, NetworkDocument, NetworkLink, SolveResult } from '@/lib/hydraulics/types';
import { distribution } from '../../make/distribution';
import { houseExample } from '../../make/house-example';

const flow = (result: SolveResult, id: string) => result.links.find((link) => link.id === id)!.flowLs;
const codes = (result: SolveResult) => result.warnings.map((warning) => `${warning.code} ${warning.id}`);
const pumpCurve = [0, 1, 2, 3].map((flowLs) => ({ flowLs, headM: 20 - 2 * flowLs ** 2 }));

function network(links: NetworkLink[], inflows: Record<string, number> = {}): NetworkDocument {
  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  const fluid = { medium: 'water' as const, temperatureC: 10 };
  return { format: 'network/1', fluid, nodes: ids.map((id) => ({ id, inflowLs: inflows[id] ?? 0 })), links };
}

describe('pumps', () => {
  it('against closed valves stand at shut-off head, without flow', () => {
    const result = solve(
      network([
        { id: 'PU', kind: 'pump', from: 'A', to: 'B', curve: pumpCurve },
        { id: 'V', kind: 'resistance', from: 'B', to: 'A', kv: 4, closed: true },
      ]),
    );
    expect(result.converged).toBe(true);
    expect(result.pumps).toMatchObject([{ flowLs: 0, headM: 20, hydraulicKw: 0, shaftKw: null }]);
  });

  it('past the last point of the curve go straight on, with a warning', () => {
    const result = solve(
      network([
        { id: 'PU', kind: 'pump', from: 'A', to: 'B', curve: pumpCurve },
        { id: 'V', kind: 'resistance', from: 'B', to: 'A', kv: 100 },
      ]),
    );
    expect(result.converged).toBe(true);
    expect(flow(result, 'PU')).toBeGreaterThan(3);
    expect(codes(result)).toContain('pump-past-curve PU');
  });

  it('in series add their heads, in parallel their flows', () => {
    const pump = (id: string, from: string, to: string): NetworkLink => ({ id, kind: 'pump', from, to, curve: pumpCurve });
    const load: NetworkLink = { id: 'load', kind: 'resistance', from: 'B', to: 'A', designFlowLs: 1, designDropKpa: 100 };
    const series = solve(network([pump('P1', 'A', 'M'), pump('P2', 'M', 'B'), load]));
    expect(series.pumps[0].headM).toBeCloseTo(series.pumps[1].headM, 9);
    expect(series.pumps[0].headM * 2).toBeCloseTo(series.nodes.find((n) => n.id === 'B')!.headM, 6);
    const parallel = solve(network([pump('P1', 'A', 'B'), pump('P2', 'A', 'B'), load]));
    expect(flow(parallel, 'P1') + flow(parallel, 'P2')).toBeCloseTo(flow(parallel, 'load'), 9);
  });

  it('with a non-return, a weak one beside a strong one stands; without, it is driven backwards', () => {
    const beside = (nonReturn: boolean) =>
      solve(
        network([
          { id: 'strong', kind: 'pump', from: 'A', to: 'B', curve: pumpCurve },
          {
            id: 'weak',
            kind: 'pump',
            from: 'A',
            to: 'C',
            curve: pumpCurve.map((point) => ({ ...point, headM: point.headM / 4 })),
            nonReturn,
          },
          { id: 'own', kind: 'resistance', from: 'C', to: 'B', kv: 5 },
          { id: 'load', kind: 'resistance', from: 'B', to: 'A', kv: 3 },
        ]),
      );
    expect(Math.abs(flow(beside(true), 'weak'))).toBeLessThan(1e-7);
    expect(flow(beside(false), 'weak')).toBeLessThan(-0.1);
  });

  it('stopped with a non-return are closed links', () => {
    const result = solve(houseExample());
    const stopped = houseExample();
    (stopped.links[0] as LinkOf<'pump'>).speed = 0;
    expect(flow(result, 'PU')).toBeGreaterThan(0.9);
    expect(solve(stopped).links.every((link) => link.flowLs === 0)).toBe(true);
  });

  it('report shaft power through their efficiency', () => {
    const document = houseExample();
    (document.links[0] as LinkOf<'pump'>).efficiency = [
      { flowLs: 0, fraction: 0 },
      { flowLs: 1, fraction: 0.5 },
      { flowLs: 2, fraction: 0.3 },
    ];
    const [pump] = solve(document).pumps;
    expect(pump.hydraulicKw).toBeCloseTo(45e-3, 5);
    expect(pump.shaftKw).toBeCloseTo(90e-3, 4);
  });
});

describe('parts of a network', () => {
  it('cut off by closed links have no flow, and a warning names them', () => {
    const document = houseExample();
    document.links.find((link) => link.id === 'T2')!.closed = true;
    document.links.find((link) => link.id === 'V2')!.closed = true;
    const result = solve(document);
    expect(flow(result, 'T2')).toBe(0);
    expect(codes(result)).toEqual(['cut-off m2']);
  });

  it('that nothing joins are solved each by itself', () => {
    const one = houseExample();
    const rename = (id: string) => `other ${id}`;
    const two: NetworkDocument = {
      ...one,
      nodes: [...one.nodes, ...one.nodes.map((node) => ({ ...node, id: rename(node.id) }))],
      links: [...one.links, ...one.links.map((link) => ({ ...link, id: rename(link.id), from: rename(link.from), to: rename(link.to) }))],
    };
    const result = solve(two);
    for (const id of ['T1', 'T2', 'T3']) expect(flow(result, rename(id))).toBeCloseTo(flow(result, id), 9);
    expect(codes(result)).toEqual(['no-reference other X']);
  });

  it('that an inflow would force through a check valve have no solution, and say so', () => {
    const result = solve(network([{ id: 'C', kind: 'checkValve', from: 'A', to: 'B', kv: 5 }], { A: -1, B: 1 }));
    expect(result.converged).toBe(false);
    expect(codes(result)).toContain('forced-flow C');
  });
});

describe('a decoupler', () => {
  it('carries the difference between primary and secondary flow', () => {
    const pipe = { kind: 'pipe', lengthM: 1, boreMm: 80, roughnessMm: 0.045 } as const;
    const result = solve(
      network([
        { id: 'primary', kind: 'pump', from: 'R', to: 'a', curve: pumpCurve },
        { id: 'chiller', kind: 'resistance', from: 'a', to: 'S', designFlowLs: 2, designDropKpa: 60 },
        { ...pipe, id: 'decoupler', from: 'S', to: 'R' },
        { id: 'secondary', kind: 'pump', from: 'S', to: 'b', curve: pumpCurve },
        { id: 'load', kind: 'terminal', from: 'b', to: 'R', designFlowLs: 1, designDropKpa: 80 },
      ]),
    );
    expect(result.converged).toBe(true);
    expect(flow(result, 'decoupler')).toBeCloseTo(flow(result, 'primary') - flow(result, 'secondary'), 9);
    expect(flow(result, 'primary')).toBeGreaterThan(flow(result, 'secondary'));
  });
});

describe('differential pressure controllers', () => {
  const branch = (setpointKpa: number, headM = 20): NetworkDocument =>
    network([
      { id: 'PU', kind: 'pump', from: 'A', to: 'B', curve: pumpCurve.map((point) => ({ ...point, headM: (point.headM * headM) / 20 })) },
      { id: 'T1', kind: 'terminal', from: 'B', to: 'C', designFlowLs: 0.3, designDropKpa: 20 },
      { id: 'T2', kind: 'terminal', from: 'B', to: 'C', designFlowLs: 0.2, designDropKpa: 20 },
      { id: 'DPC', kind: 'dpController', from: 'C', to: 'A', setpointKpa, sense: ['B', 'C'], kvs: 4 },
    ]);

  it.each(['hardy-cross', 'simultaneous'] as const)('hold their set point by %s', (method) => {
    const result = solve({ ...branch(20), options: { method } });
    expect(result.converged).toBe(true);
    expect(flow(result, 'T1')).toBeCloseTo(0.3, 6);
    expect(flow(result, 'T2')).toBeCloseTo(0.2, 6);
  });

  it('stand wide open where the set point cannot be reached', () => {
    const result = solve(branch(300));
    expect(result.converged).toBe(true);
    expect(codes(result)).toContain('controller-open DPC');
    const { dropKpa, flowLs } = result.links[3];
    expect(dropKpa).toBeCloseTo(((3.6 * flowLs) / 4) ** 2 * 100 * (result.fluid.densityKgM3 / 1000), 6);
  });

  it('keep their set point when the terminals are nearly shut', () => {
    const document = branch(20);
    for (const link of document.links) if (link.kind === 'terminal') link.designDropKpa = 1e6;
    const result = solve(document);
    expect(result.converged).toBe(true);
    expect(result.links[1].dropKpa).toBeCloseTo(20, 4);
  });
});

describe('flow limiters', () => {
  it('hold their limit with head to spare, and pass less without', () => {
    const at = (headM: number) =>
      solve(
        network([
          { id: 'PU', kind: 'pump', from: 'A', to: 'B', curve: pumpCurve.map((point) => ({ ...point, headM: headM - point.flowLs })) },
          { id: 'L', kind: 'flowLimiter', from: 'B', to: 'A', limitLs: 0.5, minDropKpa: 16 },
        ]),
      );
    expect(flow(at(20), 'L')).toBeCloseTo(0.5, 7);
    const starved = at(1.5);
    expect(flow(starved, 'L')).toBeLessThan(0.5);
    expect(starved.links[1].dropKpa).toBeCloseTo(16 * (flow(starved, 'L') / 0.5) ** 2, 6);
    expect(codes(starved)).toContain('limiter-starved L');
  });
});

describe('a history of the Hardy Cross iteration', () => {
  it('gives every correction as the head left over the slope, and leads to the answer', () => {
    const document: NetworkDocument = { ...houseExample(), options: { method: 'hardy-cross', history: true } };
    const { history, iterations } = solve(document);
    expect(history!.loops).toHaveLength(3);
    expect(history!.corrections).toHaveLength(3 * iterations);
    const plain = history!.corrections.filter(
      ({ headM, slopeMPerLs, correctionLs }) => Math.abs(correctionLs + headM / slopeMPerLs) < 1e-15,
    );
    expect(plain.length).toBeGreaterThan(0.9 * history!.corrections.length);
    const last = history!.corrections.slice(-3);
    for (const { headM } of last) expect(Math.abs(headM)).toBeLessThan(1e-4);
  });
});

describe('a prepared network', () => {
  it('solved again from its last flows after one valve has changed agrees with solving afresh', () => {
    const document = distribution(100);
    const network = prepareNetwork(document);
    const { linkFlow } = findFlows(network).state;
    const valve = { ...(document.links.find((link) => link.kind === 'balancingValve') as LinkOf<'balancingValve'>), setting: 1.5 };
    expect(changeLinks(network, [valve])).toBe(true);
    const again = solvePrepared(network, { startFlows: linkFlow });
    const afresh = solve({ ...document, links: document.links.map((link) => (link.id === valve.id ? valve : link)) });
    again.links.forEach((link, k) => expect(Math.abs(link.flowLs - afresh.links[k].flowLs)).toBeLessThan(1e-7));
  });

  it('does not take a change that opens or shuts a link', () => {
    const document = distribution(25);
    const network = prepareNetwork(document);
    expect(changeLinks(network, [{ ...document.links[0], closed: true }])).toBe(false);
  });
});
