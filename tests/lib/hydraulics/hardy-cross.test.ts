import { describe, expect, it } from 'vitest';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, solve, solvePrepared } from '@/lib/hydraulics/solve';
import type { NetworkDocument, NetworkLink, SolveResult } from '@/lib/hydraulics/types';
import { houseExample } from '../../make/house-example';
import { networkOfLinks, pump, resistance } from '../../make/network-of-links';

const KPA = 9.80665;

/** Two loops without a pump, h = K Q|Q| (E. Maurer, R package hydraulics, hardycross): m and m³/s there, kPa and L/s here. */
const PUBLISHED: [id: string, from: string, to: string, k: number][] = [
  ['1', 'C', 'A', 200],
  ['2', 'A', 'D', 2500],
  ['3', 'D', 'C', 500],
  ['4', 'A', 'B', 800],
  ['5', 'B', 'D', 300],
];
const twoLoops = (options: NetworkDocument['options']) =>
  networkOfLinks(
    PUBLISHED.map(([id, from, to, k]) => resistance(id, from, to, k * KPA * 1e-6)),
    { C: 500, B: -500 },
    { options },
  );

/** Goes through a history from the flows it began with, as a reviewer would with a calculator. */
function follow(document: NetworkDocument, result: SolveResult, resistanceOf: (id: string) => number) {
  const { loops, corrections } = result.history!;
  const flow = new Map(result.links.map(({ id, flowLs }) => [id, flowLs]));
  const put = (loop: number, correctionLs: number) => {
    for (const { link, direction } of loops[loop]) flow.set(link, flow.get(link)! + direction * correctionLs);
  };
  for (const { loop, correctionLs } of [...corrections].reverse()) put(loop, -correctionLs);
  return corrections.map((each) => {
    let headM = 0;
    let slopeMPerLs = 0;
    for (const { link, direction } of loops[each.loop]) {
      const q = flow.get(link)!;
      headM += (direction * resistanceOf(link) * q * Math.abs(q)) / KPA;
      slopeMPerLs += (2 * resistanceOf(link) * Math.abs(q)) / KPA;
    }
    put(each.loop, each.correctionLs);
    return { ...each, headM, slopeMPerLs };
  });
}

describe('the Hardy Cross iteration', () => {
  it('corrects one loop after another by minus the head around it over its slope, with the flows that the loop before has left', () => {
    const document = twoLoops({ method: 'hardy-cross', history: true });
    const result = solve(document);
    expect(result.method).toBe('hardy-cross');
    const k = new Map(PUBLISHED.map(([id, , , each]) => [id, each * KPA * 1e-6]));
    const followed = follow(document, result, (id) => k.get(id)!);
    expect(followed.length).toBe(2 * result.iterations);
    followed.forEach(({ headM, slopeMPerLs, correctionLs }, at) => {
      const told = result.history!.corrections[at];
      expect(told.headM).toBeCloseTo(headM, 6);
      expect(told.slopeMPerLs).toBeCloseTo(slopeMPerLs, 8);
      expect(correctionLs).toBeCloseTo(-headM / slopeMPerLs, 4);
      expect(told).toMatchObject({ sweep: 1 + (at >> 1), loop: at % 2 });
    });
    expect(result.iterations).toBeGreaterThan(2);
    expect(Math.abs(followed[0].headM)).toBeGreaterThan(Math.abs(followed.at(-1)!.headM) * 1e3);
  });

  it('stops when no loop is more than 1e-7 m off, and not before', () => {
    const { history, residuals, iterations } = solve(twoLoops({ method: 'hardy-cross', history: true }));
    expect(residuals.loopPa).toBeLessThan(1e-7 * KPA * 1000);
    const before = history!.corrections.filter(({ sweep }) => sweep === iterations);
    expect(Math.max(...before.map(({ headM }) => Math.abs(headM)))).toBeGreaterThan(1e-7);
  });

  it('leaves no history unless asked, and none where all loops are corrected together', () => {
    expect(solve(twoLoops({ method: 'hardy-cross' })).history).toBeUndefined();
    expect(solve(twoLoops({ method: 'simultaneous', history: true })).history).toBeUndefined();
    expect(solve(twoLoops(undefined)).method).toBe('simultaneous');
  });

  it('that gets nowhere says so, and the loops are corrected together from there', () => {
    // A controller that must be found shut is nudged by its own error each sweep, in vain.
    const links: NetworkLink[] = [
      pump('weak', 'A', 'B', 30, 5),
      { id: 'DPC', kind: 'dpController', from: 'B', to: 'C', setpointKpa: 20, sense: ['C', 'A'], kvs: 10 },
      pump('strong', 'A', 'C', 90, 5),
      resistance('coil', 'C', 'A', 100),
    ];
    const result = solve(networkOfLinks(links, {}, { options: { method: 'hardy-cross' } }));
    expect(result.converged).toBe(true);
    expect(result.method).toBe('simultaneous');
    const [warning] = result.warnings;
    expect(warning.code).toBe('hardy-cross-slow');
    expect(warning.message).toMatch(
      /^Correcting one loop after another had not closed after \d+ sweeps; all loops were corrected together from there\.$/,
    );
    expect(Number(/\d+/.exec(warning.message)![0])).toBeGreaterThan(100);
  });

  it('has nothing to do where there is no loop', () => {
    const result = solve(
      networkOfLinks([resistance('R', 'A', 'B', 5)], { A: 1, B: -1 }, { options: { method: 'hardy-cross', history: true } }),
    );
    expect(result).toMatchObject({ converged: true, method: 'hardy-cross', iterations: 0, history: { loops: [], corrections: [] } });
    expect(result.links[0]).toMatchObject({ flowLs: 1, dropKpa: expect.closeTo(5, 9) });
  });
});

describe('solving a prepared network again', () => {
  it('from its own flows has next to nothing left to do, and gives the same', () => {
    // Not yet balanced: at its design flows the first start would be the answer already.
    const network = prepareNetwork(houseExample({ kv: [9, 6, 4.1569219382] }));
    const first = solvePrepared(network);
    const again = solvePrepared(network, { startFlows: findFlows(network).state.linkFlow.slice() });
    expect(again.iterations).toBeLessThanOrEqual(1);
    again.links.forEach(({ flowLs }, k) => expect(flowLs).toBeCloseTo(first.links[k].flowLs, 9));
  });

  it('afresh gives the same to the last digit, whatever was solved in between', () => {
    const network = prepareNetwork(houseExample());
    const first = solvePrepared(network);
    solvePrepared(network, { startFlows: new Float64Array(network.position.length).fill(3) });
    expect(solvePrepared(network)).toEqual(first);
  });

  it('starts from the flows given, also where inflows force some', () => {
    const links = [
      pump('PU', 'A', 'B', 60, 10),
      resistance('main', 'B', 'C', 10),
      resistance('one', 'C', 'A', 40),
      resistance('two', 'C', 'A', 160),
    ];
    const network = prepareNetwork(networkOfLinks(links, { B: -0.2, A: 0.2 }));
    const first = solvePrepared(network);
    const again = solvePrepared(network, { startFlows: findFlows(network).state.linkFlow.slice() });
    expect(again.iterations).toBeLessThanOrEqual(1);
    const [pumped, main] = again.links.map(({ flowLs }) => flowLs);
    expect(pumped - main).toBeCloseTo(0.2, 9);
    again.links.forEach(({ flowLs }, k) => expect(flowLs).toBeCloseTo(first.links[k].flowLs, 7));
  });
});
