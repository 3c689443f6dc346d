import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/lib/network/drawing';
import { faultsOf } from '@/lib/network/drawing-faults';
import { drawing, ladder, pipe, pump, tee, unit } from '../../make/drawing';

const messages = (from: Drawing) =>
  faultsOf(from).map(({ severity, message, place }) => `${severity} ${place.kind} ${place.id}: ${message}`);
const change = (from: Drawing, id: string, fields: object): Drawing => ({
  ...from,
  equipment: from.equipment.map((piece) => (piece.id === id ? ({ ...piece, ...fields } as typeof piece) : piece)),
});

describe('faults of a drawing', () => {
  it('a whole loop has none, an empty sheet has none', () => {
    expect(messages(ladder([0.2, 0.3]))).toEqual([]);
    expect(messages(drawing([], []))).toEqual([]);
  });

  it('names each end with no pipe', () => {
    expect(messages(drawing([pump('P-1')], []))).toEqual([
      'error equipment P-1: P-1 has no pipe at its inlet.',
      'error equipment P-1: P-1 has no pipe at its outlet.',
    ]);
  });

  it('names every figure that is missing', () => {
    const bare = change(change(ladder([0.2]), 'FC-1', { designFlowLs: null, coilDropKpa: null }), 'CH-1', { designDropKpa: null });
    expect(messages({ ...bare, pipes: bare.pipes.map((it) => (it.id === 's-1' ? { ...it, lengthM: null, boreMm: null } : it)) })).toEqual([
      'error equipment CH-1: CH-1 has no drop at design flow.',
      'error equipment FC-1: FC-1 has no design flow.',
      'error equipment FC-1: FC-1 has no coil drop.',
      'error pipe s-1: A pipe has no length and no size.',
    ]);
  });

  it('refuses a pump whose head rises, and a curve out of order', () => {
    const rising = change(ladder([0.2]), 'P-1', {
      curve: [
        { flowLs: 0, headM: 5 },
        { flowLs: 1, headM: 6 },
        { flowLs: 2, headM: 4 },
      ],
    });
    expect(messages(rising)).toEqual(['error equipment P-1: The head of P-1 must not rise with flow.']);
    const unsorted = change(ladder([0.2]), 'P-1', {
      curve: [
        { flowLs: 1, headM: 6 },
        { flowLs: 0, headM: 5 },
        { flowLs: 2, headM: 4 },
      ],
    });
    expect(messages(unsorted)).toEqual(['error equipment P-1: The curve of P-1 must go from low to high flow, each flow once.']);
  });

  it('sees two pieces with one tag, a dead leg, a loop with no pump, a valve beyond its table', () => {
    expect(messages(change(ladder([0.2, 0.3]), 'FC-2', { tag: 'FC-1' }))).toEqual([
      'error equipment FC-2: The tag FC-1 stands on more than one piece.',
    ]);
    const leg = ladder([0.2]);
    expect(messages({ ...leg, equipment: [...leg.equipment, tee('T-9')], pipes: [...leg.pipes, pipe('leg', 'S-1.e', 'T-9.w')] })).toEqual([
      'warning equipment T-9: T-9 joins fewer than two pipes: a dead leg.',
    ]);
    expect(messages(drawing([tee('A'), unit('FC-1')], [pipe('a', 'A.e', 'FC-1.in'), pipe('b', 'FC-1.out', 'A.w')]))).toEqual([
      'warning equipment A: The loop has no pump: nothing will flow.',
    ]);
    const set = {
      ...(ladder([0.2]).equipment.find(({ id }) => id === 'FC-1') as { balancingValve: object }).balancingValve,
      settingTurns: 9,
    };
    expect(messages(change(ladder([0.2]), 'FC-1', { balancingValve: set }))).toEqual([
      'error equipment FC-1: FC-1 stands at 9, outside its table (0 to 4).',
    ]);
  });

  it('a pipe whose piece is gone ends in nothing', () => {
    const cut = ladder([0.2]);
    const found = messages({ ...cut, equipment: cut.equipment.filter(({ id }) => id !== 'FC-1') });
    expect(found).toContain('error pipe a-1: A pipe ends in nothing.');
    expect(found).toContain('error pipe b-1: A pipe ends in nothing.');
  });
});
