import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawingSchema, type Drawing } from '@/lib/network/drawing';
import { duplicateStorey } from '@/lib/network/duplicate-storey';
import { moveStorey, storeyAt } from '@/lib/network/storeys';
import { anyDrawing } from '../../make/any-drawing';
import { drawing, pipe, pump, tee, unit } from '../../make/drawing';

const storeys = [
  { id: 's2', name: 'Level 2', elevationM: 7, top: 0, height: 200 },
  { id: 's1', name: 'Level 1', elevationM: 3, top: 200, height: 200 },
  { id: 's0', name: 'Plant', elevationM: 0, top: 400, height: 200 },
];
const on = (storeyId: string, y: number) => ({ storeyId, y });

/** A pump below, one storey with a unit between its two tees, and one above it that the supply riser goes on to. */
const risers: Drawing = {
  ...drawing(
    [
      { ...pump('P'), ...on('s0', 500) },
      { ...tee('S1'), ...on('s1', 300) },
      { ...unit('U1', 0.4), ...on('s1', 310), x: 100 },
      { ...tee('R1'), ...on('s1', 320), x: 200 },
      { ...tee('S2'), ...on('s2', 100) },
    ],
    [
      pipe('up-1', 'P.out', 'S1.s', 4),
      pipe('up-2', 'S1.n', 'S2.s', 3.5),
      pipe('a', 'S1.e', 'U1.in', 2),
      pipe('b', 'U1.out', 'R1.w', 2),
      pipe('down-1', 'R1.s', 'P.in', 6),
    ],
  ),
  storeys,
};

describe('duplicating a storey', () => {
  it('puts the copy right above, raises what lies above, and leads the risers on through it', () => {
    const { drawing: after, added, storey } = duplicateStorey(risers, 's1')!;
    expect(storey).toMatchObject({ name: 'Level 3', elevationM: 7, top: 0, height: 200 });
    expect(after.storeys.find(({ id }) => id === 's2')).toMatchObject({ elevationM: 11, top: -200 });
    expect(added.equipment).toHaveLength(3);
    const [copyS, , copyR] = added.equipment;
    const runs = after.pipes.map(({ from, to, lengthM }) => [from.equipmentId, to.equipmentId, lengthM]);
    // The supply riser: pump, tee, its copy, the storey above.
    expect(runs).toContainEqual(['P', 'S1', 4]);
    expect(runs).toContainEqual(['S1', copyS.id, 3.5]);
    expect(runs).toContainEqual([copyS.id, 'S2', 3.5]);
    // The return comes down from the copy.
    expect(runs).toContainEqual([copyR.id, 'R1', 6]);
    expect(runs).toHaveLength(5 + 2 + 2);
    expect(drawingSchema.safeParse(after).success).toBe(true);
    expect(new Set(after.equipment.map(({ tag }) => tag)).size).toBe(after.equipment.length);
    for (const piece of after.equipment) expect(storeyAt(after, piece.y)?.id).toBe(piece.storeyId);
  });

  it('keeps all that was there, whatever was drawn', () => {
    fc.assert(
      fc.property(anyDrawing, fc.nat(2), (before, pick) => {
        const { id, height } = before.storeys[pick];
        const { drawing: after, added } = duplicateStorey(before, id)!;
        expect(drawingSchema.safeParse(after).success).toBe(true);
        const inside = before.equipment.filter(({ storeyId }) => storeyId === id);
        expect(added.equipment).toHaveLength(inside.length);
        added.equipment.forEach((copy, i) => expect(copy.y).toBe(inside[i].y - height));
        const ids = [...after.equipment, ...after.pipes, ...after.storeys].map((it) => it.id);
        expect(new Set(ids).size).toBe(ids.length);
        for (const { from, to } of after.pipes) expect(from.equipmentId).not.toBe(to.equipmentId);
      }),
    );
  });
});

describe('moving a storey', () => {
  it('changes places with its neighbour, with what is drawn in both, and keeps names and elevations', () => {
    const after = moveStorey(risers, 's1', 'up');
    expect(after.storeys.map(({ id, top, elevationM }) => [id, top, elevationM])).toEqual([
      ['s2', 200, 7],
      ['s1', 0, 3],
      ['s0', 400, 0],
    ]);
    expect(after.equipment.map(({ id, y }) => [id, y])).toEqual([
      ['P', 500],
      ['S1', 100],
      ['U1', 110],
      ['R1', 120],
      ['S2', 300],
    ]);
    expect(moveStorey(after, 's1', 'down')).toEqual(risers);
    expect(moveStorey(risers, 's2', 'up')).toBe(risers);
    expect(moveStorey(risers, 's0', 'down')).toBe(risers);
  });

  it('there and back changes nothing, bands of any height', () => {
    fc.assert(
      fc.property(anyDrawing, fc.integer({ min: 80, max: 900 }), (before, height) => {
        const uneven = {
          ...before,
          storeys: before.storeys.map((it, i) => (i === 0 ? { ...it, top: it.top - height, height: height + it.height } : it)),
        };
        const there = moveStorey(uneven, 'storey-1', 'up');
        expect(moveStorey(there, 'storey-1', 'down').equipment).toEqual(uneven.equipment);
      }),
    );
  });
});
