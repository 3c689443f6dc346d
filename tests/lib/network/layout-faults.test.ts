import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/lib/network/drawing';
import { faultsOf } from '@/lib/network/drawing-faults';
import { change, decoupler, isolator, ladder, pipe } from '../../make/drawing';

const codes = (from: Drawing) => faultsOf(from).map(({ code, place }) => `${code} ${place.id}`);
const repiped = (from: Drawing, id: string, a: string, b: string): Drawing => ({
  ...from,
  pipes: from.pipes.map((it) => (it.id === id ? { ...it, from: pipe('', a, b).from, to: pipe('', a, b).to } : it)),
});
const add = (from: Drawing, pieces: Drawing['equipment'], pipes: Drawing['pipes']): Drawing => ({
  ...from,
  equipment: [...from.equipment, ...pieces],
  pipes: [...from.pipes, ...pipes],
});

describe('how the pieces are joined', () => {
  it('a pump whose outlet leads to where the coils give their water back stands the wrong way', () => {
    const turned = repiped(repiped(ladder([0.2, 0.3]), 'p-pump', 'R-0.e', 'P-1.out'), 'p-source', 'P-1.in', 'CH-1.in');
    expect(codes(turned)).toEqual(['pump-backwards P-1']);
  });

  it('a loop with a pump and nothing that holds its pressure lacks an expansion vessel', () => {
    const loop = ladder([0.2]);
    expect(
      codes({
        ...loop,
        equipment: loop.equipment.filter(({ id }) => id !== 'EV-1'),
        pipes: loop.pipes.filter(({ id }) => id !== 'p-vessel'),
      }),
    ).toEqual(['no-vessel P-1']);
  });

  it('an open way from supply to return is a short circuit, a closed one or a decoupler is none', () => {
    const bypass = (piece: Drawing['equipment'][number]) =>
      add(ladder([0.2, 0.3]), [piece], [pipe('by-1', 'S-2.e', `${piece.id}.in`), pipe('by-2', `${piece.id}.out`, 'R-2.e')]);
    expect(codes(bypass(isolator('IV-1')))).toEqual([expect.stringMatching(/^short-circuit /)]);
    expect(codes(change(bypass(isolator('IV-1')), 'IV-1', { isClosed: true }))).toEqual([]);
    expect(codes(bypass(decoupler('D-1')))).toEqual([]);
  });

  it('points at the pipe that leads from the one side into the other', () => {
    const loop = ladder([0.2, 0.3]);
    const labelled = {
      ...loop,
      pipes: loop.pipes.map((it) => ({ ...it, circuit: /^[rbp]/.test(it.id) ? ('return' as const) : ('supply' as const) })),
    };
    expect(codes(add(labelled, [], [pipe('short', 'S-2.e', 'R-2.e')]))).toEqual(['short-circuit short']);
  });

  it('a controller whose impulse lines end in one point, or in nothing, cannot hold anything', () => {
    const controller = {
      ...{ kind: 'dpController' as const, id: 'C', tag: 'DPC-1', storeyId: null, x: 0, y: 0, rotation: 0 as const, isMirrored: false },
      ...{ setpointKpa: 20, kvs: 10, senseHigh: null, senseLow: null },
    };
    const loop = repiped(add(ladder([0.2]), [controller], [pipe('c', 'C.out', 'R-0.e')]), 'r-1', 'R-1.w', 'C.in');
    expect(codes(loop)).toEqual(['sense C']);
    expect(codes(change(loop, 'C', { senseHigh: { equipmentId: 'S-1', port: 'n' } }))).toEqual([]);
    expect(codes(change(loop, 'C', { senseHigh: { equipmentId: 'gone', port: 'n' } }))).toEqual(['sense C']);
  });

  it('a load and a flow that disagree by more than a tenth are pointed out', () => {
    // 0.2 L/s of water at 9 °C over 6 K carry 5.04 kW.
    expect(codes(change(ladder([0.2]), 'FC-1', { loadKw: 5.04 }))).toEqual([]);
    expect(codes(change(ladder([0.2]), 'FC-1', { loadKw: 5.5 }))).toEqual([]);
    expect(codes(change(ladder([0.2]), 'FC-1', { loadKw: 5.8 }))).toEqual(['load-flow FC-1']);
  });
});
