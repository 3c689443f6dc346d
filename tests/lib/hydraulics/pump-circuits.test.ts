import { describe, expect, it } from 'vitest';
import { designFlows } from '@/lib/hydraulics/design-flows';
import { pumpCircuits } from '@/lib/hydraulics/pump-circuits';
import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { networkOfLinks, pump, resistance, terminal } from '../../make/network-of-links';

const KPA = 9.80665;

/** Circuits at design flow, with pumps by name and heads in kPa. */
function circuitsOf(document: NetworkDocument) {
  const { network, flow } = designFlows(document);
  const loss = new Float64Array(flow.length);
  for (const { batch, first, last } of network.kinds) batch.evaluate(flow, loss, new Float64Array(flow.length), first, last);
  const found = pumpCircuits(network, flow, loss);
  const name = (i: number) => network.document.links[network.position[i]].id;
  return {
    groups: found.groups.map(({ pumps, flowLs, headBetween, circuits }) => ({
      pumps: pumps.map(name),
      flowLs,
      betweenKpa: headBetween * KPA,
      requiredKpa: circuits.requiredHead * KPA,
    })),
    boosters: found.boosters.map(name),
    stretches: Object.fromEntries(
      Array.from(found.stretchOf, (k, i) => [name(i), k < 0 ? null : { ...found.stretches[k], head: found.stretches[k].head * KPA }]),
    ),
  };
}

const circuit = (from: string, to: string): NetworkLink[] => [
  resistance('main', from, 's', 10),
  terminal('near', 's', 'r', 0.5, 20),
  terminal('far', 's', 'r', 0.5, 35),
  resistance('return', 'r', to, 5),
];

describe('pump circuits', () => {
  it('go from the pump’s discharge through the index terminal back to its suction', () => {
    const { groups, boosters, stretches } = circuitsOf(networkOfLinks([pump('PU', 'A', 'a', 90, 10), ...circuit('a', 'A')]));
    expect(groups).toEqual([{ pumps: ['PU'], flowLs: expect.closeTo(1, 9), betweenKpa: 0, requiredKpa: expect.closeTo(50, 6) }]);
    expect(boosters).toEqual([]);
    expect(stretches.PU).toBeNull();
    expect(stretches.far).toMatchObject({ isTerminal: true, head: expect.closeTo(35, 6) });
    expect(stretches.main).toMatchObject({ isTerminal: false, head: expect.closeTo(10, 6) });
  });

  it('follow the flow, not the way a link is drawn', () => {
    const turned = circuit('a', 'A').map((link) => (link.id === 'main' ? { ...link, from: 's', to: 'a' } : link));
    const { groups, stretches } = circuitsOf(networkOfLinks([pump('PU', 'A', 'a', 90, 10), ...turned]));
    expect(groups[0].requiredKpa).toBeCloseTo(50, 6);
    expect(stretches.main!.head).toBeCloseTo(10, 6);
  });

  it('take pumps in series with what stands between them as one drive', () => {
    const links = [
      pump('first', 'A', 'x', 40, 5),
      resistance('strainer', 'x', 'y', 3),
      pump('second', 'y', 'a', 40, 5),
      ...circuit('a', 'A'),
    ];
    const { groups, boosters, stretches } = circuitsOf(networkOfLinks(links));
    expect(groups).toEqual([
      { pumps: ['first', 'second'], flowLs: expect.closeTo(1, 9), betweenKpa: expect.closeTo(3, 6), requiredKpa: expect.closeTo(50, 6) },
    ]);
    expect(boosters).toEqual([]);
    expect(stretches.strainer).toBeNull();
  });

  it('do so whatever the order in which the pumps are drawn', () => {
    const links = [
      pump('second', 'y', 'a', 40, 5),
      ...circuit('a', 'A'),
      resistance('strainer', 'y', 'x', 3),
      pump('first', 'A', 'x', 40, 5),
    ];
    expect(circuitsOf(networkOfLinks(links)).groups[0]).toMatchObject({ pumps: ['first', 'second'], betweenKpa: expect.closeTo(3, 6) });
  });

  it('do so as well where the run is found from its suction side', () => {
    const pumps = [pump('first', 'A', 'x', 40, 5), resistance('strainer', 'x', 'y', 3), pump('second', 'y', 'a', 40, 5)];
    const [main, near, far, back] = circuit('a', 'A');
    const { groups } = circuitsOf(networkOfLinks([back, ...pumps, main, near, far]));
    expect(groups[0]).toMatchObject({ pumps: ['first', 'second'], betweenKpa: expect.closeTo(3, 6), requiredKpa: expect.closeTo(50, 6) });
  });

  it('on supply and return with a branch between are those of the pump that carries most, the other being a booster', () => {
    const links = [
      pump('supply', 'A', 'a', 60, 5),
      resistance('main', 'a', 's', 10),
      terminal('near', 's', 'r', 0.5, 20),
      terminal('past the second pump', 's', 'B', 0.2, 22),
      pump('return', 'r', 'B', 20, 40),
      resistance('back', 'B', 'A', 5),
    ];
    const { groups, boosters } = circuitsOf(networkOfLinks(links));
    expect(boosters).toEqual(['return']);
    // 10 · 0.7² + 22 + 5 · 0.7² past the second pump; 10 less of 20 by it.
    expect(groups).toMatchObject([{ pumps: ['supply'], flowLs: expect.closeTo(0.7, 9), requiredKpa: expect.closeTo(29.35, 5) }]);
  });

  it('have a pump inside another’s circuits as a booster, which keeps its speed and gives its head to the circuit', () => {
    const links = [
      pump('PU', 'A', 'a', 90, 10),
      resistance('main', 'a', 's', 10),
      terminal('near', 's', 'r', 0.5, 20),
      terminal('far', 's', 'm', 0.5, 35),
      pump('booster', 'm', 'r', 12, 8),
      resistance('return', 'r', 'A', 5),
    ];
    const { groups, boosters, stretches } = circuitsOf(networkOfLinks(links));
    expect(groups.map((group) => group.pumps)).toEqual([['PU']]);
    expect(boosters).toEqual(['booster']);
    expect(stretches.booster!.head).toBeCloseTo(-10, 4);
    // 10 + 35 - 10 + 5 by the boosted way, 10 + 20 + 5 by the other.
    expect(groups[0].requiredKpa).toBeCloseTo(40, 4);
  });

  it.each([
    ['a drive of its own where it gives more than the secondary takes', 10],
    ['a booster where it gives less', 60],
  ])('of a decoupled system are the secondary’s, with the primary pump as %s', (_, fall) => {
    const links = [
      pump('primary', 'R', 'a', 60, fall),
      resistance('chiller', 'a', 'S', 30),
      resistance('decoupler', 'S', 'R', 4),
      pump('secondary', 'S', 'b', 90, 10),
      ...circuit('b', 'R'),
    ];
    const { groups, boosters, stretches } = circuitsOf(networkOfLinks(links));
    expect(groups.map((group) => group.pumps)).toEqual(fall === 10 ? [['primary'], ['secondary']] : [['secondary']]);
    expect(boosters).toEqual(fall === 10 ? [] : ['primary']);
    // The head across the decoupler helps the secondary while it flows on, and is for the secondary to give while it flows back.
    const decoupler = stretches.decoupler!.head;
    expect(decoupler).toBeGreaterThan(0.05);
    expect(groups.at(-1)!.requiredKpa).toBeCloseTo(50 + (fall === 10 ? -decoupler : decoupler), 3);
  });

  it('are none for a pump at rest or without a way back', () => {
    const idle = networkOfLinks([pump('PU', 'A', 'a', 90, 10), ...circuit('a', 'A'), pump('idle', 'A', 'nowhere', 50, 5)]);
    const { groups, boosters } = circuitsOf(idle);
    expect(groups.map((group) => group.pumps)).toEqual([['PU']]);
    expect(boosters).toEqual([]);
    expect(circuitsOf(networkOfLinks(circuit('a', 'a')))).toMatchObject({ groups: [], boosters: [] });
  });
});
