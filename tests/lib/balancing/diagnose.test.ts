import { describe, expect, it } from 'vitest';
import { diagnose } from '@/lib/balancing/diagnose';
import { fitLoop } from '@/lib/balancing/fit-loop';
import { isUnitRatio } from '@/lib/balancing/possible-causes';
import type { LoopReading } from '@/lib/balancing/readings';
import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { balancedKv, threeTerminals } from '../../make/three-terminals';

const balanced = threeTerminals(balancedKv);
const priors = { terminalRun: 0.1, mainRun: 0.1, chart: 0.01, pump: 0.03, meter: 0.01 };

/** Reads the flows, total and pump of case N11 with one fault in it (case T9). */
function diagnoseWith(change: (link: NetworkLink) => NetworkLink, added: NetworkLink[] = []) {
  const built: NetworkDocument = { ...balanced, links: [...balanced.links.map(change), ...added] };
  const links = new Map(solve(built).links.map((link) => [link.id, link]));
  const flow = (link: string): LoopReading => ({ link, quantity: 'flowLs', value: links.get(link)!.flowLs, meter: 'flow' });
  const pump: LoopReading = { link: 'PU', quantity: 'dropKpa', value: -links.get('PU')!.dropKpa, meter: 'gauge' };
  return {
    links,
    found: diagnose(
      fitLoop(balanced, [{ settings: { ...balancedKv }, readings: [flow('T1'), flow('T2'), flow('T3'), flow('PU'), pump] }], priors),
    ),
  };
}

const first = ({ found }: ReturnType<typeof diagnoseWith>) => found.map(({ at, causes }) => [at, causes[0].cause]);
const withDrop = (id: string, times: number) => (link: NetworkLink) =>
  link.id === id && 'designDropKpa' in link ? { ...link, designDropKpa: times * link.designDropKpa! } : link;

describe('possible causes by signature (case T9)', () => {
  it('names nothing in a healthy loop', () => {
    expect(diagnoseWith((link) => link).found).toEqual([]);
  });

  it('suspects the main strainer where all fall by one ratio and the pump raises more', () => {
    const seen = diagnoseWith(withDrop('M1', 4));
    expect(seen.links.get('T1')!.flowLs / 0.5).toBeCloseTo(0.816, 3);
    expect(first(seen)[0]).toEqual([null, 'main-strainer-blocked']);
  });

  it('suspects a fouled strainer or coil where one terminal is low and the others slightly high', () => {
    const seen = diagnoseWith(withDrop('T2', 4));
    expect(seen.links.get('T2')!.flowLs / 0.3).toBeCloseTo(0.625, 3);
    expect(first(seen)).toEqual([['T2', 'strainer-or-coil-fouled']]);
  });

  it('suspects a shut valve where one terminal has no flow', () => {
    expect(first(diagnoseWith((link) => (link.id === 'T2' ? { ...link, closed: true } : link)))).toEqual([['T2', 'isolating-valve-shut']]);
  });

  it('suspects the setting of a balancing valve that takes too much from all others', () => {
    const seen = diagnoseWith((link) => (link.id === 'V1' && link.kind === 'balancingValve' ? { ...link, setting: 9 } : link));
    expect(seen.links.get('T1')!.flowLs / 0.5).toBeCloseTo(1.156, 3);
    expect(first(seen)).toEqual([['V1', 'valve-not-as-noted']]);
  });

  it('suspects a bypass where the total is high, the pump raises little and all terminals are low', () => {
    const seen = diagnoseWith(
      (link) => link,
      [{ id: 'BP', kind: 'resistance', from: 'n1', to: 'back', designFlowLs: 1, designDropKpa: 20 }],
    );
    expect(seen.links.get('T1')!.flowLs / 0.5).toBeCloseTo(0.594, 3);
    expect(first(seen)[0]).toEqual([null, 'bypass-open']);
  });

  it('suspects the pump where total and differential are both low', () => {
    const seen = diagnoseWith((link) => (link.kind === 'pump' ? { ...link, speed: 0.531 } : link));
    expect(first(seen)[0]).toEqual([null, 'pump-reversed-or-wrong-impeller']);
  });

  it('suspects the check valve where the pump stands near shut-off and nothing flows', () => {
    const seen = diagnoseWith(withDrop('M1', 1e6));
    expect(first(seen)[0]).toEqual([null, 'check-valve-stuck']);
  });

  it('names swapped hoses for a negative reading', () => {
    const links = new Map(solve(balanced).links.map((link) => [link.id, link]));
    const drop = (link: string, sign = 1): LoopReading => ({
      link,
      quantity: 'dropKpa',
      value: sign * Math.abs(links.get(link)!.dropKpa),
      meter: 'gauge',
    });
    const found = diagnose(
      fitLoop(balanced, [{ settings: { ...balancedKv }, readings: [drop('V1'), drop('V2', -1), drop('V3'), drop('PU')] }], priors),
    );
    expect(found.some(({ at, causes }) => at === 'V2' && causes[0].cause === 'hoses-swapped')).toBe(true);
  });

  it('knows the ratios of units taken for one another', () => {
    expect([3.6, 10, 1 / 3.6, 15.85, 0.1].every(isUnitRatio)).toBe(true);
    expect([1, 1.3, 2, 5].some(isUnitRatio)).toBe(false);
  });
});
