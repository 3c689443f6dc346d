import { describe, expect, it } from 'vitest';
import { changeLinks, prepareNetwork } from '@/lib/hydraulics/prepare';
import { solve, solvePrepared } from '@/lib/hydraulics/solve';
import { pumpEfficiency, pumpResult } from '@/lib/hydraulics/solve-result';
import type { LinkOf, NetworkDocument, NetworkLink, SolveResult } from '@/lib/hydraulics/types';
import { houseExample } from '../../make/house-example';
import { networkOfLinks, pump, resistance, terminal, valve } from '../../make/network-of-links';

const KPA = 9.80665;
const link = (result: SolveResult, id: string) => result.links.find((each) => each.id === id)!;
const node = (result: SolveResult, id: string) => result.nodes.find((each) => each.id === id)!;

describe('pressures and heads', () => {
  const document = networkOfLinks([pump('PU', 'A', 'B', 60, 10), resistance('coil', 'B', 'C', 40), resistance('back', 'A', 'C', 10)]);
  document.nodes = document.nodes.map(({ id }) => ({ id, elevationM: { A: 2, B: 12, C: 7 }[id] }));

  it('count from the reference, fall by friction along the flow and with height', () => {
    const result = solve({ ...document, reference: { node: 'C', gaugePressureKpa: 150 } });
    expect(link(result, 'PU').flowLs).toBeCloseTo(1, 9);
    expect(link(result, 'back')).toMatchObject({ flowLs: expect.closeTo(-1, 9), dropKpa: expect.closeTo(-10, 6) });
    expect(node(result, 'C')).toEqual({ id: 'C', pressureKpa: expect.closeTo(150, 9), headM: expect.closeTo(7 + 150 / KPA, 9) });
    expect(node(result, 'B').pressureKpa).toBeCloseTo(150 + 40 - 5 * KPA, 5);
    expect(node(result, 'A').pressureKpa).toBeCloseTo(150 - 10 + 5 * KPA, 5);
    expect(node(result, 'A').headM).toBeCloseTo(node(result, 'A').pressureKpa / KPA + 2, 9);
  });

  it('without a reference count from 0 kPa at the first node', () => {
    expect(node(solve(document), 'A')).toEqual({ id: 'A', pressureKpa: 0, headM: 2 });
  });

  it('across a closed link are what they are on either side of it, and nothing flows', () => {
    const links = [...document.links, { ...resistance('shut', 'B', 'A', 1), closed: true }];
    expect(link(solve({ ...document, links }), 'shut')).toEqual({ id: 'shut', flowLs: 0, dropKpa: expect.closeTo(50, 5) });
  });
});

describe('a pipe’s result', () => {
  const at = (flowLs: number) => {
    const pipe: NetworkLink = { id: 'P', kind: 'pipe', from: 'A', to: 'B', lengthM: 10, boreMm: 20, roughnessMm: 0.05 };
    return solve(networkOfLinks([pipe], { A: flowLs, B: -flowLs })).links[0];
  };
  it('tells velocity, Reynolds number, friction factor and regime', () => {
    // 1 mm²/s in 20 mm: Re = 63 662 per L/s.
    expect(at(0.02)).toMatchObject({ velocityMs: expect.closeTo(0.063662, 6), reynolds: expect.closeTo(1273.24, 2), regime: 'laminar' });
    expect(at(0.02).frictionFactor).toBeCloseTo(64 / 1273.2395, 7);
    expect(at(-0.02)).toMatchObject({ velocityMs: expect.closeTo(0.063662, 6), reynolds: expect.closeTo(1273.24, 2), flowLs: -0.02 });
    expect([at(0.0314).regime, at(0.0315).regime, at(0.0628).regime, at(0.0629).regime]).toEqual([
      'laminar',
      'transition',
      'transition',
      'turbulent',
    ]);
    expect(at(0)).toMatchObject({ velocityMs: 0, reynolds: 0, frictionFactor: 0, regime: 'at-rest' });
    expect(at(1e-9).regime).toBe('laminar');
    const { frictionFactor, dropKpa, velocityMs } = at(0.3);
    expect(dropKpa).toBeCloseTo((frictionFactor! * 10 * velocityMs! ** 2) / 0.02 / 2, 6);
  });
  it('belongs to pipes alone', () => {
    expect(Object.keys(solve(networkOfLinks([resistance('R', 'A', 'B', 3)], { A: 1, B: -1 })).links[0])).toEqual([
      'id',
      'flowLs',
      'dropKpa',
    ]);
  });
});

describe('a pump’s powers', () => {
  const link = pump('PU', 'A', 'B', 80, 20) as LinkOf<'pump'>;
  const curve = [0, 0.5, 1, 1.5].map((flowLs) => ({ flowLs, fraction: 0.7 * flowLs * (2 - flowLs) }));

  it('are rho g Q H, and that over the efficiency', () => {
    expect(pumpResult({ ...link, efficiency: curve }, 1, 6, 990)).toEqual({
      id: 'PU',
      flowLs: 1,
      headM: 6,
      hydraulicKw: expect.closeTo(990 * KPA * 1e-3 * 6 * 1e-3, 12),
      shaftKw: expect.closeTo((990 * KPA * 6e-6) / 0.7, 9),
    });
    expect(pumpResult(link, 1, 6, 990).shaftKw).toBeNull();
  });

  it('take the efficiency at the flow over the speed, held at the ends of its points', () => {
    const withCurve = { ...link, efficiency: curve };
    expect(pumpEfficiency(withCurve, 1)).toBeCloseTo(0.7, 12);
    expect(pumpEfficiency(withCurve, 0.5, 0.5)).toBeCloseTo(0.7, 12);
    expect(pumpEfficiency({ ...withCurve, speed: 0.5 }, 0.25)).toBeCloseTo(0.525, 12);
    expect(pumpEfficiency(withCurve, 9)).toBeCloseTo(0.525, 12);
    const late = { ...link, efficiency: [0.5, 1].map((flowLs) => ({ flowLs, fraction: flowLs / 2 })) };
    expect(pumpEfficiency(late, 0.1)).toBeCloseTo(0.25, 12);
    expect(pumpEfficiency({ ...link, efficiency: [{ flowLs: 1, fraction: 0.6 }] }, 0.2)).toBe(0.6);
  });

  it('have no shaft power where the efficiency is nought or unknown, or the pump stands', () => {
    expect(pumpEfficiency({ ...link, efficiency: [] }, 1)).toBeNull();
    expect(pumpEfficiency({ ...link, efficiency: [{ flowLs: 1, fraction: 0 }] }, 1)).toBeNull();
    expect(pumpEfficiency({ ...link, efficiency: curve }, 0)).toBeNull();
    expect(pumpEfficiency({ ...link, efficiency: curve }, 1, 0)).toBeNull();
    expect(pumpEfficiency({ ...link, efficiency: [0, 2].map((flowLs) => ({ flowLs, fraction: 0 })) }, 1)).toBeNull();
  });
});

describe('a network without a solution', () => {
  // 1 L/s is forced backwards through the check valve, beside a loop that closes.
  const result = solve(
    networkOfLinks(
      [pump('PU', 'A', 'B', 50, 1), resistance('load', 'B', 'A', 49), { id: 'C', kind: 'checkValve', from: 'A', to: 'D', kv: 5 }],
      { A: -1, D: 1 },
    ),
  );
  it('is not called converged, says so, and lists where it did not close', () => {
    expect(result.converged).toBe(false);
    expect(result.warnings.at(-1)).toMatchObject({
      code: 'not-converged',
      message: expect.stringMatching(/^The network did not close within \d+ iterations\.$/),
    });
    expect(result.worst).toBeDefined();
  });
  it('that is solved carries no such list', () => {
    expect(solve(houseExample()).worst).toBeUndefined();
  });

  it('whose fixed flows do not add up names the nodes, the worst first, ten at most', () => {
    const links = Array.from({ length: 15 }, (_, k) => resistance(`R${k}`, `N${k}`, `N${k + 1}`, 1));
    const inflows = Object.fromEntries(Array.from({ length: 16 }, (_, k) => [`N${k}`, k + 1]));
    const { converged, residuals, worst } = solve(networkOfLinks(links, inflows));
    expect(converged).toBe(false);
    expect(residuals.continuityLs).toBeCloseTo(136, 6);
    expect(worst!.nodes[0].continuityLs).toBeCloseTo(136, 6);
    expect(worst!.nodes.length).toBeLessThanOrEqual(10);
  });
});

describe('the loops of a history', () => {
  it('lead round, link by link, each along or against its direction', () => {
    const document: NetworkDocument = { ...houseExample(), options: { method: 'hardy-cross', history: true } };
    const { history, links } = solve(document);
    const known = new Map(document.links.map((each) => [each.id, each]));
    for (const loop of history!.loops) {
      let [begin, place] = ['', ''];
      for (const { link: id, direction } of loop) {
        const { from, to } = known.get(id)!;
        const [start, end] = direction > 0 ? [from, to] : [to, from];
        if (begin) expect(start).toBe(place);
        else begin = start;
        place = end;
      }
      expect(place).toBe(begin);
      const around = loop.reduce((sum, { link: id, direction }) => sum + direction * links.find((each) => each.id === id)!.dropKpa, 0);
      expect(Math.abs(around)).toBeLessThan(1e-3);
    }
  });
});

describe('fixed inflows', () => {
  it('find their way along any tree, in links drawn either way', () => {
    const links = [resistance('a', 'A', 'B', 1), resistance('b', 'C', 'B', 1), resistance('c', 'C', 'D', 1), resistance('d', 'E', 'C', 1)];
    const result = solve(networkOfLinks(links, { A: 3, D: -1, E: -2 }, { reference: { node: 'C', gaugePressureKpa: 50 } }));
    expect(result.links.map(({ flowLs }) => flowLs)).toEqual([3, -3, 1, -2].map((each) => expect.closeTo(each, 12)));
    expect(result.residuals.continuityLs).toBeLessThan(1e-12);
    expect(node(result, 'A').pressureKpa).toBeCloseTo(50 + 18, 9);
  });

  it('share themselves round a ring', () => {
    const links = [resistance('short', 'A', 'B', 10), resistance('long', 'A', 'C', 25), resistance('rest', 'C', 'B', 15)];
    const result = solve(networkOfLinks(links, { A: 3, B: -3 }));
    expect(link(result, 'short').flowLs).toBeCloseTo(2, 6);
    expect(link(result, 'long').flowLs).toBeCloseTo(1, 6);
  });
});

describe('a change of a prepared network', () => {
  const document = networkOfLinks([
    pump('PU', 'A', 'a', 90, 10),
    resistance('main', 'a', 's', 10),
    terminal('T', 's', 'n', 0.5, 20),
    valve('V', 'n', 'A', 18),
    terminal('other', 's', 'A', 0.5, 35),
  ]);
  const of = (id: string) => document.links.find((each) => each.id === id)!;
  const changes: NetworkLink[] = [{ ...of('V'), setting: 1 } as NetworkLink, { ...of('PU'), speed: 0.8 } as NetworkLink];

  it('is solved as the changed document would be, and leaves the first document as it was', () => {
    const network = prepareNetwork(document);
    const before = structuredClone(document);
    expect(changeLinks(network, changes)).toBe(true);
    expect(document).toEqual(before);
    expect(network.document.links[3]).toEqual(changes[0]);
    const afresh = solve({ ...document, links: document.links.map((each) => changes.find(({ id }) => id === each.id) ?? each) });
    solvePrepared(network).links.forEach((each, k) => expect(each.flowLs).toBeCloseTo(afresh.links[k].flowLs, 9));
  });

  it.each<[string, NetworkLink]>([
    ['closes a link', { ...of('T'), closed: true }],
    ['shuts a valve', { ...of('V'), kvTable: [0, 1].map((setting) => ({ setting, kv: setting })), setting: 0 } as NetworkLink],
    ['makes it another kind', resistance('T', 's', 'n', 4)],
    ['moves its start', { ...of('T'), from: 'a' }],
    ['moves its end', { ...of('T'), to: 'A' }],
    ['is of a link that is not there', resistance('new', 's', 'n', 4)],
  ])('that %s is not taken, and nothing changes', (_, change) => {
    const network = prepareNetwork(document);
    const before = solvePrepared(network);
    expect(changeLinks(network, [changes[0], change])).toBe(false);
    expect(network.document).toBe(document);
    expect(solvePrepared(network)).toEqual(before);
  });

  it('of a fluid outside its data is refused when it is prepared', () => {
    expect(() => prepareNetwork({ ...document, fluid: { medium: 'water', temperatureC: 150 } })).toThrow(/120/);
  });
});
