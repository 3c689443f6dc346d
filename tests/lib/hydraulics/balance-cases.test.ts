import { describe, expect, it } from 'vitest';
import { balance } from '@/lib/hydraulics/balance';
import { balancedPumps, speedForHead } from '@/lib/hydraulics/balance-pumps';
import { upstreamFirst } from '@/lib/hydraulics/balance-valves';
import { designFlows } from '@/lib/hydraulics/design-flows';
import { pumpCircuits } from '@/lib/hydraulics/pump-circuits';
import { pumpHeadAt } from '@/lib/hydraulics/solve-result';
import type { BalanceResult, LinkOf, NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { networkOfLinks, pump, resistance, terminal, valve } from '../../make/network-of-links';

const KPA = 9.80665;
const pumpOf = (result: BalanceResult, id: string) => result.pumps.find((each) => each.id === id)!;
const valveOf = (result: BalanceResult, id: string) => result.valves.find((each) => each.id === id)!;
const terminalOf = (result: BalanceResult, id: string) => result.terminals.find((each) => each.id === id)!;
const codes = (result: BalanceResult) => result.warnings.map(({ code, id }) => `${code} ${id}`);

/** Kv of a drop of K Q² kPa in water of 1000 kg/m³. */
const kvOf = (kpaPerLs2: number) => 36 / Math.sqrt(kpaPerLs2);

/** Two circuits of 0.5 L/s, 20 and 35 kPa, with a valve each, on mains of 10 and 5 kPa (at 1 L/s); valves of 1 kPa fully open. */
const circuit = (from: string, to: string): NetworkLink[] => [
  resistance('main', from, 's', 10),
  terminal('near', 's', 'n', 0.5, 20),
  valve('near valve', 'n', 'r', kvOf(4)),
  terminal('far', 's', 'f', 0.5, 35),
  valve('far valve', 'f', 'r', kvOf(4)),
  resistance('return', 'r', to, 5),
];

function expectBalanced(result: BalanceResult) {
  expect(result.converged).toBe(true);
  expect(result.warnings).toEqual([]);
  for (const each of result.terminals) expect(each.percentOfDesign).toBeCloseTo(100, 3);
  for (const each of result.pumps) {
    const solved = result.solution.pumps.find(({ id }) => id === each.id)!;
    expect(solved.flowLs, each.id).toBeCloseTo(each.flowLs, 5);
    expect(solved.headM, each.id).toBeCloseTo(each.requiredHeadM, 4);
  }
}

describe('balance with one pump', () => {
  const document = networkOfLinks([pump('PU', 'A', 'a', 90, 10), ...circuit('a', 'A')]);

  it('throttles the near circuit by what the far one needs more, and slows the pump to 51 kPa', () => {
    const result = balance(document);
    expectBalanced(result);
    expect(pumpOf(result, 'PU').requiredHeadM * KPA).toBeCloseTo(51, 6);
    expect(valveOf(result, 'far valve')).toMatchObject({ state: 'open', setting: 4, dropKpa: expect.closeTo(1, 6) });
    expect(valveOf(result, 'near valve')).toMatchObject({
      state: 'throttled',
      dropKpa: expect.closeTo(16, 6),
      flowLs: expect.closeTo(0.5, 9),
    });
    expect(valveOf(result, 'near valve').kv).toBeCloseTo((36 * 0.5) / 4, 6);
    expect(valveOf(result, 'near valve').wantedKv).toBeCloseTo(4.5, 6);
    expect(terminalOf(result, 'near').circuitDropKpa).toBeCloseTo(36, 6);
    expect(terminalOf(result, 'far').circuitDropKpa).toBeCloseTo(51, 6);
    expect(result.indexTerminal).toBe('far');
    expect(result.valves.map(({ id }) => id)).toEqual(['near valve', 'far valve']);
  });

  it('gives its shaft power at the speed found', () => {
    const links = document.links.map((link) =>
      link.kind === 'pump' ? { ...link, efficiency: [0.5, 1, 1.5, 2].map((flowLs) => ({ flowLs, fraction: 0.6 })) } : link,
    );
    const { shaftKw } = pumpOf(balance({ ...document, links }), 'PU');
    expect(shaftKw).toBeCloseTo(0.051 / 0.6, 6);
    expect(pumpOf(balance(document), 'PU').shaftKw).toBeNull();
  });

  it('kept at its speed gives the excess to the valve nearest to it, of two that carry the same', () => {
    const links = [pump('PU', 'A', 'a', 90, 10), valve('first', 'a', 'b', 40), valve('second', 'b', 'c', 40), ...circuit('c', 'A')];
    const throttle = networkOfLinks(links, {}, { options: { pumpExcess: 'throttle' } });
    const result = balance(throttle);
    expectBalanced(result);
    expect(pumpOf(result, 'PU')).toMatchObject({ speed: 1, requiredHeadM: expect.closeTo(80 / KPA, 6) });
    expect([valveOf(result, 'first').state, valveOf(result, 'second').state]).toEqual(['throttled', 'open']);
    const back = [pump('PU', 'A', 'a', 90, 10), ...circuit('a', 'x'), valve('far off', 'x', 'y', 40), valve('at suction', 'y', 'A', 40)];
    const returned = balance(networkOfLinks(back, {}, { options: { pumpExcess: 'throttle' } }));
    expect([valveOf(returned, 'far off').state, valveOf(returned, 'at suction').state]).toEqual(['open', 'throttled']);
  });

  it('kept at less than full speed uses what it gives there', () => {
    const links = document.links.map((link) => (link.kind === 'pump' ? { ...link, speed: 0.95 } : link));
    const result = balance({ ...document, links, options: { pumpExcess: 'throttle' } });
    expectBalanced(result);
    expect(pumpOf(result, 'PU').speed).toBe(0.95);
    expect(pumpOf(result, 'PU').requiredHeadM * KPA).toBeCloseTo(0.95 ** 2 * 90 - 10, 3);
  });

  it('too small at its speed is set to full speed, and named with its head and what is wanted', () => {
    const small = balance(networkOfLinks([pump('PU', 'A', 'a', 45, 10), ...circuit('a', 'A')]));
    expect(pumpOf(small, 'PU').speed).toBe(1);
    expect(pumpOf(small, 'PU').requiredHeadM * KPA).toBeCloseTo(51, 6);
    const [warning] = small.warnings;
    expect(warning).toMatchObject({ code: 'pump-too-small', id: 'PU' });
    expect(warning.message).toBe('PU gives 3.57 m at 1.000 L/s; 5.20 m are required.');
    expect(codes(small)).toEqual(['pump-too-small PU', 'valve-too-small far valve']);
    expect(small.warnings[1].message).toBe('far valve fully open costs more than its circuit has to spare.');
    expect(valveOf(small, 'near valve')).toMatchObject({ state: 'throttled', kv: expect.closeTo(4.5, 6) });
    expect(terminalOf(small, 'far').percentOfDesign).toBeLessThan(95);
    const slowed = networkOfLinks([{ ...pump('PU', 'A', 'a', 90, 10), speed: 0.7 } as NetworkLink, ...circuit('a', 'A')]);
    expect(pumpOf(balance({ ...slowed, options: { pumpExcess: 'throttle' } }), 'PU')).toMatchObject({ speed: 1 });
  });
});

describe('balance with several pumps', () => {
  it('in series shares the head as their curves at full speed do', () => {
    const links = [pump('strong', 'A', 'x', 70, 10), pump('weak', 'x', 'a', 30, 10), ...circuit('a', 'A')];
    const result = balance(networkOfLinks(links));
    expectBalanced(result);
    expect(pumpOf(result, 'strong').requiredHeadM * KPA).toBeCloseTo((51 * 60) / 80, 4);
    expect(pumpOf(result, 'weak').requiredHeadM * KPA).toBeCloseTo((51 * 20) / 80, 4);
  });

  it('in series also drives what stands between them', () => {
    const links = [pump('one', 'A', 'x', 50, 10), resistance('strainer', 'x', 'y', 9), pump('two', 'y', 'a', 50, 10), ...circuit('a', 'A')];
    const result = balance(networkOfLinks(links));
    expectBalanced(result);
    expect(pumpOf(result, 'one').requiredHeadM * KPA).toBeCloseTo(30, 5);
    expect(terminalOf(result, 'far').circuitDropKpa).toBeCloseTo(60, 5);
  });

  it('in parallel runs them alike', () => {
    const links = [pump('one', 'A', 'a', 90, 40), pump('two', 'A', 'a', 90, 40), ...circuit('a', 'A')];
    const result = balance(networkOfLinks(links));
    expectBalanced(result);
    expect(pumpOf(result, 'one').flowLs).toBeCloseTo(0.5, 5);
    expect(pumpOf(result, 'one').speed).toBeCloseTo(pumpOf(result, 'two').speed, 6);
    expect(pumpOf(result, 'one').speed).toBeLessThan(0.9);
  });

  it.each([
    ['more than', 10],
    ['less than', 60],
  ])('decoupled slows the secondary to its own circuits and leaves the primary, which gives %s it takes', (_, fall) => {
    const links = [
      pump('primary', 'R', 'a', 60, fall),
      resistance('chiller', 'a', 'S', 30),
      resistance('decoupler', 'S', 'R', 0.1),
      pump('secondary', 'S', 'b', 90, 10),
      ...circuit('b', 'R'),
    ];
    const result = balance(networkOfLinks(links));
    expectBalanced(result);
    expect(pumpOf(result, 'primary').speed).toBe(1);
    expect(pumpOf(result, 'secondary').requiredHeadM * KPA).toBeCloseTo(51, 1);
    expect(valveOf(result, 'far valve').state).toBe('open');
  });

  it('leaves a booster at its speed and counts on its head', () => {
    const links = [
      pump('PU', 'A', 'a', 90, 10),
      resistance('main', 'a', 's', 10),
      terminal('near', 's', 'n', 0.5, 20),
      valve('near valve', 'n', 'r', kvOf(4)),
      terminal('far', 's', 'f', 0.5, 35),
      pump('booster', 'f', 'g', 12, 8),
      valve('far valve', 'g', 'r', kvOf(4)),
      resistance('return', 'r', 'A', 5),
    ];
    const result = balance(networkOfLinks(links));
    expectBalanced(result);
    expect(pumpOf(result, 'booster')).toMatchObject({ speed: 1, requiredHeadM: expect.closeTo(10 / KPA, 3) });
    expect(pumpOf(result, 'PU').requiredHeadM * KPA).toBeCloseTo(41, 2);
  });

  it('in parallel and unlike each gives at their common head what is left of its curve', () => {
    const links = [pump('one', 'A', 'a', 90, 40), pump('two', 'A', 'a', 60, 5), ...circuit('a', 'A')];
    const result = balance(networkOfLinks(links));
    expectBalanced(result);
    for (const each of result.pumps) expect(each.requiredHeadM * KPA).toBeCloseTo(51, 4);
  });

  it('whose speeds do not settle is not called converged', () => {
    // Either flat pump, slowed to what the terminals need, is overpowered by the other.
    const links = [pump('one', 'A', 'a', 55, 1), pump('two', 'A', 'a', 54, 1), ...circuit('a', 'A')];
    const result = balance(networkOfLinks(links));
    expect(result.converged).toBe(false);
    expect(result.solution.converged).toBe(true);
    expect(result.warnings.map(({ code }) => code)).toEqual(['not-converged']);
  });
});

describe('a speed for a head', () => {
  const link = pump('PU', 'A', 'B', 80, 20) as LinkOf<'pump'>;
  it('is the one at which the pump gives it at that flow', () => {
    for (const headM of [1, 3, 6]) expect(pumpHeadAt(link, 0.5, speedForHead(link, 0.5, headM))).toBeCloseTo(headM, 9);
  });
  it('is full speed where the pump cannot give more, and next to none for no head', () => {
    expect(speedForHead(link, 0.5, 9)).toBe(1);
    expect(speedForHead(link, 0.5, 75 / KPA)).toBeCloseTo(1, 9);
    expect(speedForHead(link, 0, 0)).toBeLessThan(1e-9);
  });
});

describe('valves', () => {
  const order = (document: NetworkDocument) => {
    const { network, flow } = designFlows(document);
    const loss = new Float64Array(flow.length);
    for (const { batch, first, last } of network.kinds) batch.evaluate(flow, loss, new Float64Array(flow.length), first, last);
    const circuits = pumpCircuits(network, flow, loss);
    balancedPumps(network, circuits, flow);
    return upstreamFirst(network, circuits, flow).map((i) => network.document.links[network.position[i]].id);
  };

  it('are set those that carry most first, then those nearer to a pump, then as drawn', () => {
    const links = [
      pump('PU', 'A', 'a', 90, 10),
      valve('behind', 'r', 'q', 20),
      valve('two off', 'b', 's', 20),
      valve('next', 'a', 'b', 20),
      terminal('near', 's', 'n', 0.5, 20),
      valve('first of equals', 'n', 'r', 9),
      terminal('far', 's', 'f', 0.5, 35),
      valve('second of equals', 'f', 'r', 9),
      resistance('return', 'q', 'A', 5),
    ];
    expect(order(networkOfLinks(links))).toEqual(['next', 'behind', 'two off', 'first of equals', 'second of equals']);
    const locked = links.map((link) => (link.id === 'next' ? ({ ...link, locked: true } as NetworkLink) : link));
    expect(order(networkOfLinks(locked))).not.toContain('next');
  });

  it('in a row are set from the pump outwards, whatever the order in which they are drawn, and those that carry little last', () => {
    const links = [
      pump('PU', 'A', 'a', 90, 10),
      valve('third', 'c', 'd', 40),
      terminal('small', 'a', 'x', 0.1, 20),
      valve('near, but carries little', 'x', 'A', 9),
      valve('fourth', 'd', 's', 40),
      valve('first', 'a', 'b', 40),
      valve('second', 'b', 'c', 40),
      terminal('T', 's', 'e', 0.9, 20),
      resistance('on', 'e', 'f', 1),
      resistance('and on', 'f', 'g', 1),
      resistance('back', 'g', 'A', 1),
    ];
    expect(order(networkOfLinks(links))).toEqual(['first', 'second', 'third', 'fourth', 'near, but carries little']);
  });

  const stepped = (settingStep: number, near: Partial<LinkOf<'balancingValve'>> = {}) => {
    const links = circuit('a', 'A').map((link) => (link.id === 'near valve' ? ({ ...link, settingStep, ...near } as NetworkLink) : link));
    return valveOf(balance(networkOfLinks([pump('PU', 'A', 'a', 90, 10), ...links])), 'near valve');
  };

  it('go to the nearest mark of their scale, with the Kv of that mark, but not past its ends', () => {
    // Kv 4.5 of 18 at 4 is setting 1.
    expect(stepped(0.3)).toMatchObject({ setting: 0.9, kv: expect.closeTo(18 * (0.9 / 4), 9), wantedKv: expect.closeTo(4.5, 6) });
    expect(stepped(0.7).setting).toBe(0.7);
    expect(stepped(3).setting).toBe(0.01);
    const coarse = [1, 3.9].map((setting) => ({ setting, kv: setting * 1.16 }));
    expect(stepped(4, { kvTable: coarse }).setting).toBe(3.9);
  });

  it('whose smallest Kv passes too much are named with both', () => {
    const kvTable = [1, 2].map((setting) => ({ setting, kv: 5 * setting }));
    const links = circuit('a', 'A').map((link) => (link.id === 'near valve' ? ({ ...link, kvTable } as NetworkLink) : link));
    const result = balance(networkOfLinks([pump('PU', 'A', 'a', 90, 10), ...links]));
    expect(valveOf(result, 'near valve')).toMatchObject({ state: 'too-large', setting: 1, kv: 5 });
    expect(result.warnings.map(({ message }) => message)).toEqual([
      expect.stringMatching(/^near valve at its smallest setting still passes more than is wanted \(Kv 5\.00, wanted 4\.5\d\)\.$/),
    ]);
    expect(codes(result)).toEqual(['valve-too-large near valve']);
  });
});

describe('what cannot be balanced', () => {
  it('without a pump is named so', () => {
    const result = balance(
      networkOfLinks([terminal('T', 'a', 'b', 0.4, 20), resistance('back', 'b', 'c', 1), terminal('T2', 'c', 'a', 0.2, 9)]),
    );
    expect(result).toMatchObject({ converged: false, indexTerminal: null, pumps: [], valves: [], terminals: [] });
    expect(codes(result)[0]).toMatch(/^no-pump /);
    expect(result.warnings[0].message).toMatch(/^The design flows do not add up at .*; there is no pump\.$/);
    expect(result.solution.converged).toBe(true);
  });

  it('for design flows that do not add up names the places', () => {
    const result = balance(
      networkOfLinks([pump('PU', 'A', 'a', 60, 10), terminal('T1', 'a', 'b', 0.4, 20), terminal('T2', 'b', 'A', 0.3, 20)]),
    );
    expect(result.converged).toBe(false);
    expect(codes(result)).toEqual([expect.stringMatching(/^design-flow-conflict [Aab]$/)]);
    expect(result.warnings[0].message).not.toContain('no pump');
  });
});

describe('the authority of a control valve', () => {
  it('is its drop fully open at design flow over that of the whole branch, wherever in it the valve stands', () => {
    const links = [
      pump('PU', 'A', 'a', 90, 10),
      resistance('main', 'a', 's', 10),
      { id: 'control', kind: 'controlValve', from: 's', to: 'c', kvs: kvOf(60) } as NetworkLink,
      terminal('T', 'c', 'n', 0.5, 20),
      valve('near valve', 'n', 'r', kvOf(4)),
      terminal('far', 's', 'r', 0.5, 40),
      resistance('return', 'r', 'A', 5),
    ];
    // 15 kPa of 15 + 20 + 5, the balancing valve taking what is left of the far terminal's 40.
    const result = balance(networkOfLinks(links));
    expect(terminalOf(result, 'T').authority).toBeCloseTo(15 / 40, 6);
    expect(terminalOf(result, 'far').authority).toBeNull();
    const half = links.map((link) => (link.id === 'control' ? ({ ...link, opening: 0.9 } as NetworkLink) : link));
    const throttled = balance(networkOfLinks(half));
    const branch = 20 + 1 + 15 * 50 ** 0.2;
    expect(terminalOf(throttled, 'T').authority).toBeCloseTo(15 / branch, 5);
  });
});
