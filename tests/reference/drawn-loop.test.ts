import { expect, it } from 'vitest';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { solveDocument } from '@/lib/server/solving/solve-document';
import { drawTwoTerminals } from '../make/two-terminals';
import expected from './data/networks/two-terminals.expected.json';

/** Independent solution of tests/reference/data/networks/two-terminals.json: scipy, all heads and flows at once, no loops. */
const { document, faults } = drawingToDocument(drawTwoTerminals(), 'two terminals');
const within = (actual: number, wanted: number) => expect(Math.abs(actual / wanted - 1)).toBeLessThan(1e-3);

it('a drawn loop has the flows and drops of the independent solution', () => {
  expect(faults).toEqual([]);
  const { solve } = solveDocument(document!);
  const linkOf = new Map(solve.links.map((link) => [link.id, link]));
  const { links } = expected.solve;
  for (const [ours, theirs] of [
    ['P-1', 'PU'],
    ['CH-1', 'CH'],
    ['s1', 's1'],
    ['s2', 's2'],
    ['r1', 'r1'],
    ['r2', 'r2'],
    ['FC-1:coil', 'T1'],
    ['FC-2:coil', 'T2'],
    ['FC-1:balancing', 'V1'],
    ['FC-2:balancing', 'V2'],
  ] as const) {
    within(linkOf.get(ours)!.flowLs, links[theirs].flowLs);
    within(linkOf.get(ours)!.dropKpa, links[theirs].dropKpa);
  }
});

it('its settings and its pump duty are those of the independent balance', () => {
  const { balance, indexLinks } = solveDocument(document!);
  const valveOf = new Map(balance!.valves.map((valve) => [valve.id, valve]));
  for (const [ours, theirs] of [
    ['FC-1:balancing', 'V1'],
    ['FC-2:balancing', 'V2'],
  ] as const) {
    within(valveOf.get(ours)!.setting, expected.balance.valves[theirs].setting);
    within(valveOf.get(ours)!.dropKpa, expected.balance.valves[theirs].dropKpa);
    expect(valveOf.get(ours)!.state).toBe(expected.balance.valves[theirs].open ? 'open' : 'throttled');
  }
  within(balance!.pumps[0].flowLs, expected.balance.pump.flowLs);
  within(balance!.pumps[0].requiredHeadM, expected.balance.pump.requiredHeadM);
  expect(balance!.indexTerminal).toBe('FC-2:coil');
  expect(indexLinks).toEqual(['P-1', 'j-source', 'CH-1', 's1', 's2', 'FC-2:coil', 'FC-2:balancing', 'r2', 'r1', 'j-pump']);
});
