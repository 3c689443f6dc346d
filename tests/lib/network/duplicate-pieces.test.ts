import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawingSchema } from '@/lib/network/drawing';
import { addPart, duplicatePieces, partOf } from '@/lib/network/duplicate-pieces';
import { anyDrawing } from '../../make/any-drawing';
import { drawing, pipe, tee, unit } from '../../make/drawing';

describe('duplicating', () => {
  it('copies the chosen pieces with the pipes among them, not those that lead away', () => {
    const before = drawing(
      [
        { ...tee('S'), x: 0, y: 0 },
        { ...unit('FC-1', 0.3), x: 0, y: 100 },
        { ...tee('R'), x: 0, y: 200 },
      ],
      [pipe('a', 'S.s', 'FC-1.in', 2), pipe('b', 'FC-1.out', 'R.n', 3)],
    );
    const { drawing: after, added } = duplicatePieces(before, new Set(['S', 'FC-1']));
    expect(added.equipment).toHaveLength(2);
    expect(added.pipes.map(({ lengthM }) => lengthM)).toEqual([2]);
    expect(after.pipes).toHaveLength(3);
    const copy = added.equipment.find(({ kind }) => kind === 'terminalUnit')!;
    expect(copy).toMatchObject({ designFlowLs: 0.3, room: '', y: 100 });
    expect(copy.x).toBeGreaterThan(40);
  });

  it('never repeats an id or a tag, and leaves what was there untouched', () => {
    fc.assert(
      fc.property(anyDrawing, fc.array(fc.nat(11)), (before, picks) => {
        const ids = new Set(picks.flatMap((i) => before.equipment[i]?.id ?? []));
        const once = duplicatePieces(before, ids).drawing;
        const { drawing: after } = addPart(once, partOf(before, ids), { x: 0, y: 330 });
        const all = [...after.equipment, ...after.pipes].map(({ id }) => id);
        const tags = after.equipment.map(({ tag }) => tag);
        expect(new Set(all).size).toBe(all.length);
        expect(new Set(tags).size).toBe(tags.length);
        expect(after.equipment.slice(0, before.equipment.length)).toEqual(before.equipment);
        expect(after.pipes.slice(0, before.pipes.length)).toEqual(before.pipes);
        expect(drawingSchema.safeParse(after).success).toBe(true);
      }),
    );
  });
});
