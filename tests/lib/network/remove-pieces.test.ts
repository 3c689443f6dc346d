import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { removeFromDrawing } from '@/lib/network/remove-pieces';
import { anyDrawing } from '../../make/any-drawing';
import { drawing, pipe, source, tee, unit } from '../../make/drawing';

describe('taking pieces off a drawing', () => {
  it('joins up the pipe where a piece with two ends stood', () => {
    const before = drawing([tee('A'), source('CH'), tee('B')], [pipe('a', 'A.e', 'CH.in', 3), pipe('b', 'CH.out', 'B.w', 4)]);
    const after = removeFromDrawing(before, new Set(['CH']), new Set());
    expect(after.pipes).toHaveLength(1);
    expect(after.pipes[0]).toMatchObject({ id: 'a', from: { equipmentId: 'A' }, to: { equipmentId: 'B' }, lengthM: 7, minorK: 2 });
  });

  it('keeps the way of the first pipe where the two ran against each other', () => {
    const before = drawing([tee('A'), tee('M'), tee('B')], [pipe('a', 'M.w', 'A.e', 3), pipe('b', 'M.e', 'B.w', 4)]);
    const [joined] = removeFromDrawing(before, new Set(['M']), new Set()).pipes;
    expect([joined.from.equipmentId, joined.to.equipmentId]).toEqual(['B', 'A']);
  });

  it('joins up through a chain of pieces that go together', () => {
    const before = drawing(
      [tee('A'), source('X'), source('Y'), tee('B')],
      [pipe('a', 'A.e', 'X.in', 1), pipe('b', 'X.out', 'Y.in', 2), pipe('c', 'Y.out', 'B.w', 4)],
    );
    expect(removeFromDrawing(before, new Set(['X', 'Y']), new Set()).pipes).toMatchObject([{ lengthM: 7 }]);
  });

  it('has no length where one of the two had none', () => {
    const before = drawing(
      [tee('A'), source('X'), tee('B')],
      [pipe('a', 'A.e', 'X.in', 1), { ...pipe('b', 'X.out', 'B.w'), lengthM: null }],
    );
    expect(removeFromDrawing(before, new Set(['X']), new Set()).pipes[0].lengthM).toBeNull();
  });

  it('takes the pipes along where three meet, or where they would come back to the same piece', () => {
    const three = drawing(
      [tee('M'), tee('A'), tee('B'), unit('C')],
      [pipe('a', 'A.e', 'M.w'), pipe('b', 'M.e', 'B.w'), pipe('c', 'M.s', 'C.in')],
    );
    expect(removeFromDrawing(three, new Set(['M']), new Set()).pipes).toEqual([]);
    const ring = drawing([tee('M'), tee('A')], [pipe('a', 'A.e', 'M.w'), pipe('b', 'M.e', 'A.w')]);
    expect(removeFromDrawing(ring, new Set(['M']), new Set()).pipes).toEqual([]);
  });

  it('leaves no pipe that ends in nothing, whatever goes', () => {
    fc.assert(
      fc.property(anyDrawing, fc.array(fc.nat(11)), fc.array(fc.nat(11)), (before, pieces, pipes) => {
        const pieceIds = new Set(pieces.flatMap((i) => before.equipment[i]?.id ?? []));
        const pipeIds = new Set(pipes.flatMap((i) => before.pipes[i]?.id ?? []));
        const after = removeFromDrawing(before, pieceIds, pipeIds);
        const left = new Set(after.equipment.map(({ id }) => id));
        expect([...pieceIds].some((id) => left.has(id))).toBe(false);
        for (const { id, from, to } of after.pipes) {
          expect(left.has(from.equipmentId) && left.has(to.equipmentId) && from.equipmentId !== to.equipmentId).toBe(true);
          expect(pipeIds.has(id)).toBe(false);
        }
      }),
    );
  });
});
