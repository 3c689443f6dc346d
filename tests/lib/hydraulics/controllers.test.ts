import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { changeLinks, prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, solve, solvePrepared } from '@/lib/hydraulics/solve';
import type { LinkOf, Method, NetworkDocument, NetworkLink, SolveResult } from '@/lib/hydraulics/types';
import { networkOfLinks, pump, resistance, terminal } from '../../make/network-of-links';

const MOST_ITERATIONS = 16;
const methods: Method[] = ['hardy-cross', 'simultaneous'];
const link = (result: SolveResult, id: string) => result.links.find((each) => each.id === id)!;
const codes = (result: SolveResult) => result.warnings.map(({ code, id }) => `${code} ${id}`);
const controller = (id: string, from: string, to: string, setpointKpa: number, sense: [string, string], kvs = 10): NetworkLink => ({
  id,
  kind: 'dpController',
  from,
  to,
  setpointKpa,
  sense,
  kvs,
});

/** Pressure difference between two nodes without elevation, kPa. */
const between = (result: SolveResult, high: string, low: string) => {
  const pressure = (id: string) => result.nodes.find((node) => node.id === id)!.pressureKpa;
  return pressure(high) - pressure(low);
};

describe.each(methods)('a differential pressure controller, by %s', (method) => {
  const solved = (links: NetworkLink[], rest: Partial<NetworkDocument> = {}) => {
    const result = solve(networkOfLinks(links, {}, { options: { method }, ...rest }));
    expect(result.converged).toBe(true);
    // Corrected together with the loops, a throttled head is found as fast as the flows are.
    if (method === 'simultaneous') expect(result.iterations).toBeLessThanOrEqual(MOST_ITERATIONS);
    return result;
  };

  it('in the return holds its set point over everything between the sensed nodes', () => {
    const result = solved([
      pump('PU', 'A', 'B', 80, 5),
      resistance('riser', 'B', 'C', 10),
      resistance('coil', 'C', 'D', 80),
      resistance('strainer', 'D', 'E', 20),
      controller('DPC', 'E', 'A', 25, ['C', 'E']),
    ]);
    expect(link(result, 'coil').flowLs).toBeCloseTo(0.5, 6);
    expect(link(result, 'DPC').dropKpa).toBeCloseTo(80 - 5 / 4 - 2.5 - 25, 4);
    expect(codes(result)).toEqual([]);
  });

  it('in the supply does so as well, its sensed links drawn either way', () => {
    const result = solved([
      pump('PU', 'A', 'B', 80, 5),
      controller('DPC', 'B', 'C', 25, ['C', 'A']),
      resistance('coil', 'D', 'C', 80),
      resistance('strainer', 'A', 'D', 20),
    ]);
    expect(link(result, 'coil').flowLs).toBeCloseTo(-0.5, 6);
    expect(between(result, 'C', 'A')).toBeCloseTo(25, 4);
  });

  it('does not count elevation between the sensed nodes', () => {
    const links = [pump('PU', 'A', 'B', 80, 5), resistance('coil', 'B', 'C', 100), controller('DPC', 'C', 'A', 25, ['B', 'C'])];
    const document = networkOfLinks(links, {}, { options: { method } });
    document.nodes.forEach((node, v) => (node.elevationM = 7 * v));
    const result = solve(document);
    expect(link(result, 'coil').flowLs).toBeCloseTo(0.5, 6);
    expect(link(result, 'coil').dropKpa).toBeCloseTo(25, 4);
  });

  it('each holds its own set point, side by side and one inside the other’s reach', () => {
    const result = solved([
      pump('PU', 'A', 'B', 90, 5),
      resistance('main', 'B', 'C', 5),
      resistance('first', 'C', 'D', 80),
      controller('one', 'D', 'A', 20, ['C', 'D']),
      resistance('second', 'C', 'E', 10),
      resistance('coil', 'E', 'F', 120),
      controller('inner', 'F', 'G', 30, ['E', 'F']),
      controller('outer', 'G', 'A', 45, ['C', 'G']),
    ]);
    expect(link(result, 'first').flowLs).toBeCloseTo(0.5, 6);
    expect(link(result, 'coil').flowLs).toBeCloseTo(0.5, 6);
    expect(between(result, 'C', 'G')).toBeCloseTo(45, 4);
    expect(codes(result)).toEqual([]);
  });

  it('stands wide open, and says so, where its set point cannot be reached', () => {
    const result = solved([pump('PU', 'A', 'B', 80, 5), resistance('coil', 'B', 'C', 100), controller('DPC', 'C', 'A', 200, ['B', 'C'])]);
    expect(codes(result)).toEqual(['controller-open DPC']);
    expect(result.warnings[0].message).toBe('DPC stands wide open: its set point cannot be reached.');
    const q = link(result, 'DPC').flowLs;
    expect(link(result, 'DPC').dropKpa).toBeCloseTo((36 * q) ** 2 / 100, 6);
    expect(80 - 5 * q * q).toBeCloseTo(100 * q * q + (36 * q) ** 2 / 100, 4);
  });

  it('where one is out of reach, leaves the others to hold theirs', () => {
    const result = solved([
      pump('PU', 'A', 'B', 60, 5),
      resistance('first', 'B', 'D', 80),
      controller('one', 'D', 'A', 20, ['B', 'D']),
      resistance('second', 'B', 'E', 80),
      controller('other', 'E', 'A', 500, ['B', 'E']),
    ]);
    expect(link(result, 'first').flowLs).toBeCloseTo(0.5, 6);
    expect(codes(result)).toEqual(['controller-open other']);
  });

  it('that could hold its set point only by turning the flow back is shut, and says so', () => {
    // A second pump alone keeps more than 20 kPa over the coil; the controlled supply joins it there, and would be driven backwards.
    const result = solved([
      { ...pump('weak', 'A', 'B', 30, 5), nonReturn: false } as NetworkLink,
      controller('DPC', 'B', 'C', 20, ['C', 'A']),
      pump('strong', 'A', 'C', 90, 5),
      resistance('coil', 'C', 'A', 100),
    ]);
    const [warning] = result.warnings.filter(({ code }) => code !== 'hardy-cross-slow');
    expect(warning).toMatchObject({ code: 'controller-shut', id: 'DPC', message: expect.stringContaining('DPC is shut') });
    expect(Math.abs(link(result, 'DPC').flowLs)).toBeLessThan(1e-6);
    expect(between(result, 'C', 'A')).toBeGreaterThan(80);
  });

  it.each<[string, NetworkLink[]]>([
    ['on a closed branch', [controller('DPC', 'B', 'D', 20, ['B', 'A']), { ...resistance('isolating', 'D', 'A', 1), closed: true }]],
    ['on a dead end', [controller('DPC', 'B', 'end', 20, ['B', 'A'])]],
    [
      'that senses what it cannot move',
      [
        controller('DPC', 'B', 'A', 20, ['F', 'G'], 1e-3),
        pump('other', 'G', 'F', 50, 1),
        resistance('far', 'F', 'G', 9),
        resistance('tie', 'G', 'A', 1),
      ],
    ],
    [
      'that senses what nothing joins',
      [controller('DPC', 'B', 'A', 20, ['F', 'G'], 1e-3), { ...resistance('cut', 'F', 'G', 1), closed: true }],
    ],
  ])('%s leaves the rest alone, where another holds its set point', (_, links) => {
    const result = solved([
      pump('PU', 'A', 'B', 80, 5),
      resistance('coil', 'B', 'E', 80),
      controller('working', 'E', 'A', 20, ['B', 'E']),
      ...links,
    ]);
    expect(link(result, 'coil').flowLs).toBeCloseTo(0.5, 6);
    expect(Math.abs(link(result, 'DPC').flowLs)).toBeLessThan(1e-3);
    expect(codes(result).filter((code) => code.startsWith('controller'))).toEqual([]);
  });
});

/** Branches off a main, each a terminal, a limiter on every other, and a controller over it in the return. */
function branches(count: number): NetworkDocument {
  const links: NetworkLink[] = [pump('PU', 'R0', 'S0', 120, 3, 4)];
  for (let k = 1; k <= count; k++) {
    links.push(resistance(`s${k}`, `S${k - 1}`, `S${k}`, 4), resistance(`r${k}`, `R${k}`, `R${k - 1}`, 4));
    links.push(terminal(`T${k}`, `S${k}`, `m${k}`, 0.3, 15), terminal(`U${k}`, `S${k}`, k % 2 ? `m${k}` : `l${k}`, 0.2, 12));
    if (k % 2 === 0) links.push({ id: `L${k}`, kind: 'flowLimiter', from: `l${k}`, to: `m${k}`, limitLs: 0.15, minDropKpa: 6 });
    links.push(controller(`C${k}`, `m${k}`, `R${k}`, 20, [`S${k}`, `m${k}`], 8));
  }
  return networkOfLinks(links);
}

/** Asserts that each controller and limiter of `branches` does what it is for. */
function expectControlled(document: NetworkDocument, result: SolveResult) {
  expect(result.converged).toBe(true);
  for (const each of document.links) {
    const { flowLs, dropKpa } = link(result, each.id);
    if (each.kind === 'flowLimiter') {
      expect(flowLs).toBeLessThan(each.limitLs + 1e-6);
      if (flowLs > each.limitLs - 1e-7) expect(dropKpa).toBeGreaterThan(each.minDropKpa - 1e-3);
      else expect(dropKpa).toBeCloseTo(each.minDropKpa * (flowLs / each.limitLs) ** 2, 3);
    }
    if (each.kind === 'dpController') {
      const sensed = between(result, ...each.sense);
      const openKpa = ((3.6 * flowLs) / each.kvs) ** 2 * 100;
      const isOpen = codes(result).includes(`controller-open ${each.id}`);
      expect(sensed).toBeLessThan(each.setpointKpa + 1e-2);
      if (isOpen) expect(dropKpa).toBeCloseTo(openKpa, 2);
      else expect(sensed).toBeCloseTo(each.setpointKpa, 2);
      expect(dropKpa).toBeGreaterThan(openKpa - 1e-2);
    }
  }
}

const change = fc.record({
  branch: fc.integer({ min: 1, max: 5 }),
  what: fc.constantFrom('setpoint', 'drop', 'speed', 'limit' as const),
  size: fc.double({ min: 0, max: 1, noNaN: true }),
});

function changed(document: NetworkDocument, { branch, what, size }: { branch: number; what: string; size: number }): NetworkLink {
  const of = (id: string) => document.links.find((each) => each.id === id)!;
  switch (what) {
    case 'setpoint':
      return { ...(of(`C${branch}`) as LinkOf<'dpController'>), setpointKpa: 2 + 60 * size };
    case 'drop':
      return { ...(of(`T${branch}`) as LinkOf<'terminal'>), designDropKpa: 10 ** (4 * size) };
    case 'limit':
      return { ...(of(`L${2 * Math.max(1, branch >> 1)}`) as LinkOf<'flowLimiter'>), limitLs: 0.02 + 0.4 * size };
    default:
      return { ...(of('PU') as LinkOf<'pump'>), speed: 0.2 + size };
  }
}

describe('controllers and limiters together', () => {
  it('settle after every change of a random sequence, in few iterations, where solving afresh does', () => {
    fc.assert(
      fc.property(fc.array(change, { minLength: 1, maxLength: 8 }), (changes) => {
        const network = prepareNetwork(branches(5));
        let startFlows = findFlows(network).state.linkFlow.slice();
        for (const each of changes) {
          expect(changeLinks(network, [changed(network.document, each)])).toBe(true);
          const result = solvePrepared(network, { startFlows });
          expectControlled(network.document, result);
          expect(result.iterations).toBeLessThan(80);
          const afresh = solve(network.document);
          expect(afresh.iterations).toBeLessThan(80);
          result.links.forEach(({ id, flowLs }, k) => expect(Math.abs(flowLs - afresh.links[k].flowLs), id).toBeLessThan(1e-5));
          startFlows = findFlows(network, { startFlows }).state.linkFlow.slice();
        }
      }),
      { numRuns: 40 },
    );
  }, 60_000);
});
