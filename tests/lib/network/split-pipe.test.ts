import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawingSchema } from '@/lib/network/drawing';
import { newPiece } from '@/lib/network/new-piece';
import { removeFromDrawing } from '@/lib/network/remove-pieces';
import { insertOnPipe, insertTee, pipeAt } from '@/lib/network/split-pipe';
import { portPlace } from '@/lib/network/piece-geometry';
import { routeOfPipe } from '@/lib/network/pipe-route';
import { anyDrawing } from '../../make/any-drawing';
import { drawing, pipe, tee } from '../../make/drawing';

const sumOf = (values: (number | null)[]) => values.reduce<number>((sum, value) => sum + (value ?? 0), 0);
const twoTees = () =>
  drawing(
    [
      { ...tee('A'), x: 0, y: 0 },
      { ...tee('B'), x: 200, y: 0 },
    ],
    [pipe('p', 'A.e', 'B.w', 10)],
  );

describe('splitting a pipe', () => {
  it('puts a tee where the pipe was pressed and shares length and local losses evenly', () => {
    const before = twoTees();
    const found = pipeAt(before, { x: 83, y: 6 }, 10)!;
    const { drawing: after, tee: added } = insertTee(before, found);
    expect({ x: added.x, y: added.y }).toEqual({ x: 80, y: 0 });
    expect(after.pipes.map(({ from, to, lengthM, minorK }) => [from.equipmentId, to.equipmentId, lengthM, minorK])).toEqual([
      ['A', added.id, 5, 0.5],
      [added.id, 'B', 5, 0.5],
    ]);
  });

  it('turns a piece that is put on a pipe so that its outlet looks the way the pipe runs', () => {
    const before = drawing(
      [
        { ...tee('A'), x: 0, y: 0 },
        { ...tee('B'), x: 0, y: 200 },
      ],
      [pipe('p', 'A.s', 'B.n', 10)],
    );
    for (const [kind, isMirrored] of [
      ['balancingValve', false],
      ['balancingValve', true],
      ['terminalUnit', false],
      ['pump', true],
    ] as const) {
      const piece = { ...newPiece(before, kind, { x: 7, y: 104 }), isMirrored };
      const after = insertOnPipe({ ...before, equipment: [...before.equipment, piece] }, piece.id, pipeAt(before, piece, 20)!);
      const placed = after.equipment.find(({ id }) => id === piece.id)!;
      expect(portPlace(placed, 'out').leaves).toEqual({ x: 0, y: 1 });
      expect({ x: placed.x, y: placed.y }).toEqual({ x: 0, y: 100 });
    }
  });

  it('finds no pipe farther away than asked', () => {
    expect(pipeAt(twoTees(), { x: 100, y: 15 }, 14)).toBeNull();
    expect(pipeAt(twoTees(), { x: 100, y: 13 }, 14)?.pipe.id).toBe('p');
  });

  it('lets each bend stay with the half that runs through it', () => {
    const bent = {
      ...twoTees(),
      pipes: [
        {
          ...pipe('p', 'A.e', 'B.w', 10),
          bends: [
            { x: 60, y: 80 },
            { x: 140, y: 80 },
          ],
        },
      ],
    };
    const { drawing: after } = insertTee(bent, pipeAt(bent, { x: 100, y: 80 }, 5)!);
    expect(after.pipes.map(({ bends }) => bends)).toEqual([[{ x: 60, y: 80 }], [{ x: 140, y: 80 }]]);
  });

  it('gives the pipe back whole when the piece that split it is taken out again', () => {
    fc.assert(
      fc.property(anyDrawing, fc.nat(), fc.constantFrom('tee', 'balancingValve', 'strainer', 'terminalUnit'), (before, pick, kind) => {
        fc.pre(before.pipes.length > 0);
        const split = before.pipes[pick % before.pipes.length];
        const path = routeOfPipe(split, new Map(before.equipment.map((piece) => [piece.id, piece])))!;
        const piece = newPiece(before, kind, path[0]);
        const at = { ...path[0], distance: 0, part: 0, along: { x: 1, y: 0 } };
        const during = insertOnPipe({ ...before, equipment: [...before.equipment, piece] }, piece.id, { pipe: split, at });
        expect(sumOf(during.pipes.map(({ lengthM }) => lengthM))).toBeCloseTo(sumOf(before.pipes.map(({ lengthM }) => lengthM)), 9);
        const after = removeFromDrawing(during, new Set([piece.id]), new Set());
        expect(after).toEqual(before);
        expect(drawingSchema.safeParse(during).success).toBe(true);
      }),
    );
  });
});
