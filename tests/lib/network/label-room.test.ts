import fc from 'fast-check';
import { expect, it } from 'vitest';
import { covers, fittingLabels, hasRoom, labelBox } from '@/lib/network/label-room';
import { anyDrawing } from '../../make/any-drawing';

const shownOf = (drawing: Parameters<typeof hasRoom>[0], words: number) =>
  drawing.equipment.filter(({ kind, id }) => kind !== 'tee' && hasRoom(drawing, words, id));

it('no two labels that are shown cover one another, at any size of words', () => {
  fc.assert(
    fc.property(anyDrawing, fc.constantFrom(1, 1.2, 1.5, 1.8), (drawing, words) => {
      const boxes = shownOf(drawing, words).map((piece) => labelBox(piece, words));
      for (const [i, a] of boxes.entries()) for (const b of boxes.slice(i + 1)) expect(covers(a, b)).toBe(false);
    }),
  );
});

it('a label is left out only where one of its rank or a higher one stands', () => {
  fc.assert(
    fc.property(anyDrawing, (drawing) => {
      const shown = shownOf(drawing, 1).map((piece) => labelBox(piece, 1));
      for (const piece of drawing.equipment) {
        if (piece.kind === 'tee' || hasRoom(drawing, 1, piece.id)) continue;
        const box = labelBox(piece, 1);
        expect(shown.some((other) => other.rank <= box.rank && covers(box, other))).toBe(true);
      }
    }),
  );
});

it('of a row of labels more are left out as words grow', () => {
  const row = (words: number) =>
    fittingLabels(
      Array.from({ length: 40 }, (_, i) => ({ id: `${i}`, rank: 1, left: i * 50, right: i * 50 + 45 * words, top: 0, bottom: 10 })),
    ).size;
  expect([row(1), row(1.5), row(3)]).toEqual([40, 20, 14]);
});
