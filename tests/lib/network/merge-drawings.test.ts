import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Drawing } from '@/lib/network/drawing';
import { changesBetween, mergeByItself, mergeDrawings, same, takeTheirs } from '@/lib/network/merge-drawings';
import { drawing, ladder, pipe, pump, tee, unit } from '../../make/drawing';

const base = ladder([0.2, 0.3]);
const change = (from: Drawing, id: string, fields: object): Drawing => ({
  ...from,
  equipment: from.equipment.map((piece) => (piece.id === id ? ({ ...piece, ...fields } as typeof piece) : piece)),
});

describe('joining two drawings that were changed at once', () => {
  it('keeps both changes where they touch different pieces', () => {
    const { merged, conflicts, differences } = mergeDrawings(
      base,
      change(base, 'FC-1', { coilDropKpa: 20 }),
      change(base, 'FC-2', { room: '2.14' }),
    );
    expect(conflicts).toEqual([]);
    expect(merged.equipment.find(({ id }) => id === 'FC-1')).toMatchObject({ coilDropKpa: 20 });
    expect(merged.equipment.find(({ id }) => id === 'FC-2')).toMatchObject({ room: '2.14' });
    expect(differences.map(({ by, message }) => `${by}: ${message}`)).toEqual(['you: FC-1 changed: coil drop', 'them: FC-2 changed: room']);
  });

  it('names a piece that both changed differently, keeps mine, and can take theirs', () => {
    const result = mergeDrawings(base, change(base, 'FC-1', { coilDropKpa: 20 }), change(base, 'FC-1', { coilDropKpa: 30 }));
    expect(result.conflicts.map(({ name }) => name)).toEqual(['FC-1']);
    expect(result.merged.equipment.find(({ id }) => id === 'FC-1')).toMatchObject({ coilDropKpa: 20 });
    const theirs = takeTheirs(result.merged, result.conflicts[0]!);
    expect(theirs.equipment.find(({ id }) => id === 'FC-1')).toMatchObject({ coilDropKpa: 30 });
    expect(theirs.equipment).toHaveLength(base.equipment.length);
  });

  it('does not lose a piece that one changed and the other removed', () => {
    const removed = { ...base, equipment: base.equipment.filter(({ id }) => id !== 'FC-1') };
    const changed = change(base, 'FC-1', { room: '1.02' });
    for (const [mine, theirs] of [
      [removed, changed],
      [changed, removed],
    ] as const) {
      const { merged, conflicts } = mergeDrawings(base, mine, theirs);
      expect(conflicts).toHaveLength(1);
      expect(merged.equipment.some(({ id }) => id === 'FC-1')).toBe(true);
    }
  });

  it('does not lose a change of the fluid that both made: it is a conflict like any other', () => {
    const mine = { ...base, fluid: { ...base.fluid, supplyC: 7 } };
    const theirs = { ...base, fluid: { ...base.fluid, supplyC: 5 }, pumpExcess: 'throttle' as const };
    const { merged, conflicts } = mergeDrawings(base, mine, theirs);
    expect(conflicts.map(({ name, place }) => [name, place.kind])).toEqual([['Fluid', 'loop']]);
    expect(merged).toMatchObject({ fluid: { supplyC: 7 }, pumpExcess: 'throttle' });
    expect(takeTheirs(merged, conflicts[0]!)).toMatchObject({ fluid: theirs.fluid, pumpExcess: 'throttle' });
  });

  it('is not disturbed by the order in which a database gives back keys', () => {
    const turned = JSON.parse(
      JSON.stringify(base, (_, value) =>
        value && typeof value === 'object' && !Array.isArray(value) ? Object.fromEntries(Object.entries(value).reverse()) : value,
      ),
    );
    expect(same(base, turned)).toBe(true);
    expect(changesBetween(base, turned)).toEqual([]);
  });

  const piece = fc.record({ id: fc.constantFrom('A', 'B', 'C', 'D'), designFlowLs: fc.integer({ min: 1, max: 3 }) });
  const drawn = fc.uniqueArray(piece, { selector: ({ id }) => id }).map((pieces) =>
    drawing(
      pieces.map(({ id, designFlowLs }) => unit(id, designFlowLs)),
      [],
    ),
  );

  it('never loses what either side added or changed, whatever they did', () => {
    fc.assert(
      fc.property(drawn, drawn, drawn, (was, mine, theirs) => {
        const { merged, conflicts } = mergeDrawings(was, mine, theirs);
        const contested = new Set(conflicts.map(({ place }) => place.id));
        const find = (from: Drawing, id: string) => from.equipment.find((it) => it.id === id);
        for (const id of ['A', 'B', 'C', 'D']) {
          const [before, my, their, kept] = [find(was, id), find(mine, id), find(theirs, id), find(merged, id)];
          if (contested.has(id)) expect(kept).toEqual(my ?? their);
          else if (!same(before, my)) expect(kept).toEqual(my);
          else expect(kept).toEqual(their);
        }
      }),
    );
  });

  it('joins nothing with nothing', () => {
    fc.assert(
      fc.property(drawn, (one) => {
        expect(mergeDrawings(one, one, one)).toEqual({ merged: one, conflicts: [], differences: [] });
      }),
    );
  });
});

it('what changed from one revision to the next is told in words', () => {
  const after = { ...change(base, 'FC-1', { designFlowLs: 0.25, x: 40 }), pipes: base.pipes.filter(({ id }) => id !== 'b-2') };
  const moved = change(after, 'FC-2', { x: 100 });
  expect(
    changesBetween(base, { ...moved, equipment: [...moved.equipment, pump('P-2'), tee('T-9')] }).map(({ message }) => message),
  ).toEqual(['FC-1 changed: design flow', 'FC-2 moved', 'P-2 added', 'T-9 added', 'Pipe FC-2 to R-2 removed']);
});

describe('two saves of one draft', () => {
  it('join by themselves where they do not touch', () => {
    const mine = change(base, 'FC-1', { designFlowLs: 0.25 });
    const theirs = { ...change(base, 'FC-2', { room: '2.14' }), pumpExcess: 'throttle' as const };
    const joined = mergeByItself(base, mine, theirs);
    expect(joined).toEqual({ ...change(mine, 'FC-2', { room: '2.14' }), pumpExcess: 'throttle' });
    // The one who saves second saves the joined drawing; whoever goes on from the first save finds both.
    expect(mergeByItself(theirs, joined!, theirs)).toEqual(joined);
  });

  it('are shown where both changed one piece', () => {
    expect(mergeByItself(base, change(base, 'FC-1', { x: 10 }), change(base, 'FC-1', { x: 20 }))).toBeNull();
  });

  it('are shown where one drew a pipe to a piece that the other took away', () => {
    const mine = { ...base, pipes: [...base.pipes, pipe('mine', 'S-1.n', 'R-2.s')] };
    const theirs = {
      ...base,
      equipment: base.equipment.filter(({ id }) => id !== 'R-2'),
      pipes: base.pipes.filter(({ from, to }) => from.equipmentId !== 'R-2' && to.equipmentId !== 'R-2'),
    };
    expect(mergeByItself(base, mine, theirs)).toBeNull();
    expect(mergeByItself(base, base, theirs)).toEqual(theirs);
  });
});
