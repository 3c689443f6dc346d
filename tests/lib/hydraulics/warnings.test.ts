import { describe, expect, it } from 'vitest';
import { solve } from '@/lib/hydraulics/solve';
import { listed } from '@/lib/hydraulics/solve-warnings';
import type { NetworkDocument, NetworkLink, SolveResult } from '@/lib/hydraulics/types';
import { networkOfLinks, pump, resistance } from '../../make/network-of-links';

const told = (result: SolveResult) => result.warnings.map(({ code, id, message }) => `${code} ${id}: ${message}`);
const warningsOf = (links: NetworkLink[], inflows: Record<string, number> = {}, rest: Partial<NetworkDocument> = {}) =>
  told(solve(networkOfLinks(links, inflows, rest)));
const closed = (id: string, from: string, to: string): NetworkLink => ({ ...resistance(id, from, to, 1), closed: true });
const loop = (name: string): NetworkLink[] => [
  pump(`pump ${name}`, `A${name}`, `B${name}`, 50, 1),
  resistance(`load ${name}`, `B${name}`, `A${name}`, 49),
];
const cutOff = (ids: string) => `Closed links cut off ${ids}: nothing flows to or from there, and its pressure is not known.`;

describe('a solved loop', () => {
  it('with nothing to tell tells nothing', () => expect(warningsOf(loop('1'))).toEqual([]));
});

describe('parts cut off by closed links', () => {
  it('are told from the part with the reference, however small that is', () => {
    const links = [...loop('1'), closed('cut', 'A1', 'C'), resistance('stub', 'C', 'D', 5)];
    expect(warningsOf(links)).toEqual([`cut-off C: ${cutOff('C, D')}`]);
    expect(warningsOf(links, {}, { reference: { node: 'D', gaugePressureKpa: 100 } })).toEqual([`cut-off A1: ${cutOff('A1, B1')}`]);
  });

  it('of a network without the reference are told from its largest part', () => {
    const apart = [resistance('x', 'E', 'F', 1), closed('cut', 'F', 'G'), resistance('y', 'G', 'H', 1), resistance('z', 'H', 'I', 1)];
    expect(warningsOf([...loop('1'), ...apart])).toEqual([
      `cut-off E: ${cutOff('E, F')}`,
      'no-reference E: Nothing joins E to the reference: pressures there are counted from 0 kPa at E.',
    ]);
  });

  it('of equal size are told from the first', () => {
    const apart = [resistance('x', 'E', 'F', 1), closed('cut', 'F', 'G'), resistance('y', 'G', 'H', 1)];
    expect(warningsOf([...loop('1'), ...apart])[0]).toBe(`cut-off G: ${cutOff('G, H')}`);
  });

  it('are told one by one', () => {
    const links = [...loop('1'), closed('one', 'A1', 'C'), closed('two', 'B1', 'D')];
    expect(warningsOf(links)).toEqual([`cut-off C: ${cutOff('C')}`, `cut-off D: ${cutOff('D')}`]);
  });
});

describe('networks that nothing joins', () => {
  it('are each told where their pressures count from', () => {
    expect(warningsOf([...loop('1'), ...loop('2'), ...loop('3')])).toEqual([
      'no-reference A2: Nothing joins A2 to the reference: pressures there are counted from 0 kPa at A2.',
      'no-reference A3: Nothing joins A3 to the reference: pressures there are counted from 0 kPa at A3.',
    ]);
    const [first, second] = warningsOf([...loop('1'), ...loop('2')], {}, { reference: { node: 'B2', gaugePressureKpa: 100 } });
    expect(first).toMatch(/^no-reference A1:/);
    expect(second).toBeUndefined();
  });
});

describe('pipes between laminar and turbulent flow', () => {
  it('are named together', () => {
    // Re 3000 in 20 mm at 1 mm²/s is 0.0471 L/s.
    const pipe = (id: string, from: string, to: string, boreMm: number): NetworkLink => ({
      id,
      kind: 'pipe',
      from,
      to,
      boreMm,
      lengthM: 1,
      roughnessMm: 0.01,
    });
    const links = [pipe('one', 'A', 'B', 20), pipe('wide', 'B', 'C', 40), pipe('two', 'C', 'D', 20), pipe('narrow', 'D', 'E', 10)];
    expect(warningsOf(links, { A: 0.0471, E: -0.0471 })).toEqual([
      'transition-flow one: Flow is between laminar and turbulent in one, two: the friction there is uncertain.',
    ]);
  });
});

describe('a pump', () => {
  const flat = (speed: number): NetworkLink => ({ ...pump('PU', 'A', 'B', 50, 10, 1), speed }) as NetworkLink;
  it('past the last point of its curve at its speed is named with both flows', () => {
    const [warning] = warningsOf([flat(1), resistance('load', 'B', 'A', 5)]);
    // On past 1 L/s the curve falls by 20 kPa per L/s: 40 - 20 (Q - 1) = 5 Q² at 2 L/s.
    expect(warning).toBe(
      'pump-past-curve PU: PU runs at 2.000 L/s, past the last point of its curve (1.000 L/s at this speed); the curve is drawn straight on.',
    );
    expect(warningsOf([flat(0.5), resistance('load', 'B', 'A', 5)])[0]).toContain('(0.500 L/s at this speed)');
  });
  it('within its curve is not, nor is one that stands', () => {
    expect(warningsOf([flat(1), resistance('load', 'B', 'A', 60)])).toEqual([]);
    expect(warningsOf([{ ...flat(0), nonReturn: false } as NetworkLink, resistance('load', 'B', 'A', 60)], { A: 2, B: -2 })).toEqual([]);
  });
});

describe('flow that cannot be', () => {
  const forced = (id: string) => `forced-flow ${id}: Inflows force flow through ${id}, which does not let it pass.`;
  const limiter: NetworkLink = { id: 'L', kind: 'flowLimiter', from: 'A', to: 'B', limitLs: 0.5, minDropKpa: 10 };

  it('through a check valve, a non-return or beyond a limit is named, and no solution', () => {
    const cases: NetworkLink[] = [{ id: 'C', kind: 'checkValve', from: 'B', to: 'A', kv: 5 }, pump('P', 'B', 'A', 50, 1), limiter];
    for (const link of cases) {
      const result = solve(networkOfLinks([link], { A: 0.6, B: -0.6 }));
      expect(result.converged).toBe(false);
      expect(told(result)).toContain(forced(link.id));
    }
  });

  it('is not what a limiter passes within its limit, or a check valve forwards', () => {
    const result = solve(networkOfLinks([limiter], { A: 0.5, B: -0.5 }));
    expect(result.converged).toBe(true);
    expect(told(result)).toEqual([]);
    expect(warningsOf([{ id: 'C', kind: 'checkValve', from: 'A', to: 'B', kv: 5 }], { A: 0.6, B: -0.6 })).toEqual([]);
  });

  it('a limiter below its limit for want of differential pressure is named with both flows', () => {
    expect(warningsOf([limiter], { A: 0.4, B: -0.4 })).toEqual([
      'limiter-starved L: L passes 0.400 L/s, below its limit of 0.5 L/s: it has less than its least differential pressure.',
    ]);
  });

  it('turns a check valve’s circuit off without a word, for that is its job', () => {
    const links = [...loop('1'), { id: 'C', kind: 'checkValve', from: 'A1', to: 'B1', kv: 5 } as NetworkLink];
    expect(warningsOf(links)).toEqual([]);
  });
});

it('a list of names stops after twelve', () => {
  const names = Array.from({ length: 15 }, (_, k) => `P${k + 1}`);
  expect(listed(names.slice(0, 12))).toBe('P1, P2, P3, P4, P5, P6, P7, P8, P9, P10, P11, P12');
  expect(listed(names)).toBe('P1, P2, P3, P4, P5, P6, P7, P8, P9, P10, P11, P12 and 3 more');
  expect(listed(['A'])).toBe('A');
});
