import { describe, expect, it } from 'vitest';
import { chosenValve, genericValves } from '@/lib/network/valve-families';
import type { Drawing, TerminalUnit } from '@/lib/network/drawing';
import { faultsOf } from '@/lib/network/drawing-faults';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import type { Fault } from '@/lib/network/fault';
import { mendFor } from '@/lib/network/mends';
import { firstPipeFigures, chosenSize } from '@/lib/network/pipe-choice';
import { portPlace } from '@/lib/network/piece-geometry';
import { resultFaults } from '@/lib/network/result-faults';
import { change, drawing, ladder, pipe, pump, source, tee } from '../../make/drawing';
import { solved } from '../../make/solved';

const allFaults = (from: Drawing): Fault[] => [
  ...faultsOf(from),
  ...(drawingToDocument(from, '').document ? resultFaults(from, solved(from)) : []),
];
const codes = (from: Drawing) => allFaults(from).map(({ code }) => code);

/** Presses the mend of the first fault of a code, or of the one at a place. */
function mended(from: Drawing, code: string, at?: string): Drawing {
  const fault = allFaults(from).find((it) => it.code === code && (at === undefined || it.place.id === at));
  if (!fault) throw new Error(`No fault ${code} in ${codes(from).join(', ')}`);
  const balance = drawingToDocument(from, '').document ? solved(from).balance : null;
  const mend = mendFor(fault, from, { newPipe: { ...firstPipeFigures, lengthM: 3 }, balance });
  if (!mend) throw new Error(`No mend for ${code}`);
  const made = mend.apply(from);
  if ('refused' in made) throw new Error(made.refused);
  return made;
}

/** The loop with every valve where the balance wants it: nothing is left to mend. */
const balanced = (from: Drawing) => mended(from, 'unbalanced');

describe('a mend takes its fault away', () => {
  it('a repeated tag becomes the next free one', () => {
    const twice = change(ladder([0.2, 0.3]), 'FC-2', { tag: 'FC-1' });
    const after = mended(twice, 'tag-repeated');
    expect(codes(after)).not.toContain('tag-repeated');
    expect(after.equipment.map(({ id }) => id)).toEqual(twice.equipment.map(({ id }) => id));
  });

  it('an open end is joined to the free end on its line, an outlet to an inlet', () => {
    const apart = drawing([pump('P-1'), { ...source('CH-1'), x: 200 }, { ...source('CH-2'), x: 0, y: 150 }], []);
    const after = mended(apart, 'open-end');
    expect(after.pipes).toMatchObject([{ from: { equipmentId: 'P-1', port: 'out' }, to: { equipmentId: 'CH-1', port: 'in' }, lengthM: 3 }]);
  });

  it('an open end with nothing on its line has no mend', () => {
    const apart = drawing([pump('P-1'), { ...source('CH-1'), x: 2000 }], []);
    expect(mendFor(allFaults(apart)[0]!, apart, { newPipe: firstPipeFigures, balance: null })).toBeNull();
  });

  it('a dead leg goes, and the pipe that led to it', () => {
    const leg = ladder([0.2]);
    const after = mended(
      { ...leg, equipment: [...leg.equipment, tee('T-9')], pipes: [...leg.pipes, pipe('leg', 'S-1.e', 'T-9.w')] },
      'dead-leg',
    );
    expect(after).toEqual(leg);
  });

  it('a pipe that ends in nothing, or begins where it ends, goes', () => {
    const loop = ladder([0.2]);
    expect(mended({ ...loop, pipes: [...loop.pipes, pipe('lost', 'S-1.e', 'gone.in')] }, 'pipe-end')).toEqual(loop);
    expect(mended({ ...loop, pipes: [...loop.pipes, pipe('ring', 'S-1.e', 'S-1.n')] }, 'pipe-to-itself')).toEqual(loop);
  });

  it('a pump the wrong way turns around where it stands', () => {
    const loop = ladder([0.2, 0.3]);
    const swap = (it: (typeof loop.pipes)[number]) =>
      it.id === 'p-pump' ? pipe('p-pump', 'P-1.out', 'R-0.e') : it.id === 'p-source' ? pipe('p-source', 'CH-1.in', 'P-1.in') : it;
    const wrong = { ...loop, pipes: loop.pipes.map(swap) };
    const after = mended(wrong, 'pump-backwards');
    expect(codes(after)).not.toContain('pump-backwards');
    const [before, now] = [wrong, after].map((it) => it.equipment.find(({ id }) => id === 'P-1')!);
    expect(portPlace(now!, 'in')).toMatchObject({ x: portPlace(before!, 'out').x, y: portPlace(before!, 'out').y });
    expect(solved(after).solve.pumps[0]!.flowLs).toBeGreaterThan(0.3);
  });

  it('supply drawn against its flow is turned, and nothing else changes', () => {
    const loop = ladder([0.2, 0.3]);
    const wrong = { ...loop, pipes: loop.pipes.map((it) => (it.id === 's-2' ? { ...it, from: it.to, to: it.from } : it)) };
    expect(codes(wrong)).toContain('supply-backwards');
    expect(mended(wrong, 'supply-backwards')).toEqual(loop);
  });

  it('a loop without an expansion vessel gets one at the inlet of its pump, and flows as before', () => {
    const loop = ladder([0.2]);
    const bare = {
      ...loop,
      equipment: loop.equipment.filter(({ id }) => id !== 'EV-1'),
      pipes: loop.pipes.filter(({ id }) => id !== 'p-vessel'),
    };
    const after = mended(bare, 'no-vessel');
    expect(codes(after)).not.toContain('no-vessel');
    expect(solved(after).solve.pumps[0]!.flowLs).toBeCloseTo(solved(bare).solve.pumps[0]!.flowLs, 6);
  });

  it('a flow that its load contradicts is taken from the load', () => {
    const after = mended(change(ladder([0.2]), 'FC-1', { loadKw: 10 }), 'load-flow');
    expect(codes(after)).not.toContain('load-flow');
    // 10 kW / (999.9 kg/m³ · 4.196 kJ/(kg K) · 6 K), water at 9 °C by IAPWS-IF97.
    const flowLs = (after.equipment.find(({ id }) => id === 'FC-1') as TerminalUnit).designFlowLs!;
    expect(flowLs).toBeCloseTo(0.3973, 3);
  });

  it('a pipe over its limits gets the smallest size of its series that keeps them', () => {
    const loop = balanced(ladder([0.6, 0.6]));
    const tight = {
      ...loop,
      pipes: loop.pipes.map((it) => (it.id === 's-1' ? { ...it, ...chosenSize('steel-en10255-medium', 'DN20')! } : it)),
    };
    const isOver = (from: Drawing) => allFaults(from).some(({ code, place }) => code === 'pipe-limit' && place.id === 's-1');
    expect(isOver(tight)).toBe(true);
    const after = mended(tight, 'pipe-limit', 's-1');
    expect(isOver(after)).toBe(false);
    expect(after.pipes.find(({ id }) => id === 's-1')).toMatchObject({ nominal: 'DN40' });
    const own = { ...tight, pipeLimits: [{ upToBoreMm: null, maxPaPerM: 100, maxVelocityMs: 1 }] };
    expect(mended(own, 'pipe-limit', 's-1').pipes.find(({ id }) => id === 's-1')).toMatchObject({ nominal: 'DN50' });
  });

  it('valves that stand wrong take the settings of the balance', () => {
    const loop = ladder([0.2, 0.3]);
    expect(codes(loop)).toContain('unbalanced');
    expect(codes(balanced(loop))).not.toContain('unbalanced');
  });

  it('a balancing valve too large to be read gives way to a smaller one', () => {
    const large = chosenValve(genericValves.find(({ nominal }) => nominal === 'DN40')!);
    const loop = change(ladder([0.2]), 'FC-1', { balancingValve: large });
    expect(codes(loop)).toContain('valve-signal');
    const after = mended(loop, 'valve-signal');
    expect(codes(after)).not.toContain('valve-signal');
    const own = change(loop, 'FC-1', { balancingValve: { ...large, name: 'Chosen on site' } });
    expect(
      mendFor(
        allFaults(own).find(({ code }) => code === 'valve-signal')!,
        own,
        { newPipe: firstPipeFigures, balance: solved(own).balance },
      ),
    ).toBeNull();
  });

  it('a control valve without authority gives way to a smaller one', () => {
    const loop = change(ladder([0.2]), 'FC-1', { controlValve: { kvs: 6.3, characteristic: 'equalPercentage', opening: 1 } });
    expect(codes(loop)).toContain('authority');
    expect(codes(mended(loop, 'authority'))).not.toContain('authority');
  });

  it('water that runs backwards through a piece is told', () => {
    // Two pumps against each other: the stronger one wins, and the water goes backwards through the weaker one, which has no non-return valve.
    const loop = drawing(
      [pump('P-1', 20), { ...pump('P-2', 2), hasNonReturn: false } as Drawing['equipment'][number], source('CH-1')],
      [pipe('a', 'P-1.out', 'CH-1.in'), pipe('b', 'CH-1.out', 'P-2.out'), pipe('c', 'P-2.in', 'P-1.in')],
    );
    expect(allFaults(loop).find(({ code }) => code === 'flow-backwards')?.place).toEqual({ kind: 'equipment', id: 'P-2' });
  });
});
