import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { alignPieces, distributePieces, type Alignment } from '@/lib/network/align-pieces';
import type { Equipment } from '@/lib/network/drawing';
import { boundsOf, GRID, sizeOf } from '@/lib/network/piece-geometry';
import { anyDrawing } from '../../make/any-drawing';
import { drawing, tee, unit } from '../../make/drawing';

const edges: Record<Alignment, (piece: Equipment) => number> = {
  left: (piece) => piece.x - sizeOf(piece).width / 2,
  column: (piece) => piece.x,
  right: (piece) => piece.x + sizeOf(piece).width / 2,
  top: (piece) => piece.y - sizeOf(piece).height / 2,
  row: (piece) => piece.y,
  bottom: (piece) => piece.y + sizeOf(piece).height / 2,
};

describe('aligning', () => {
  it('brings what was chosen onto one line of its box, across that line only, and nothing else', () => {
    fc.assert(
      fc.property(
        anyDrawing,
        fc.constantFrom<Alignment>('left', 'column', 'right', 'top', 'row', 'bottom'),
        fc.nat(),
        (before, to, skip) => {
          const ids = new Set(
            before.equipment.filter((_, i) => i !== skip % before.equipment.length || before.equipment.length < 3).map(({ id }) => id),
          );
          const after = alignPieces(before, ids, to);
          const chosen = after.equipment.filter(({ id }) => ids.has(id));
          expect(new Set(chosen.map(edges[to])).size).toBe(1);
          const box = boundsOf(before.equipment.filter(({ id }) => ids.has(id)));
          const line = edges[to](chosen[0]);
          if (to === 'left') expect(line).toBe(box.left);
          if (to === 'bottom') expect(line).toBe(box.top + box.height);
          const still = ['left', 'column', 'right'].includes(to) ? 'y' : 'x';
          after.equipment.forEach((piece, i) => {
            expect(piece[still]).toBe(before.equipment[i][still]);
            if (!ids.has(piece.id)) expect(piece).toBe(before.equipment[i]);
            expect(Math.abs(piece.x % GRID) + Math.abs(piece.y % GRID)).toBe(0);
          });
        },
      ),
    );
  });

  it('of one piece changes nothing', () => {
    const before = drawing([tee('a'), { ...tee('b'), x: 50 }], []);
    expect(alignPieces(before, new Set(['a']), 'left')).toBe(before);
  });
});

describe('distributing', () => {
  it('makes the gaps between pieces even to the grid and leaves the outer ones', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 300 }), { minLength: 3, maxLength: 8 }), (places) => {
        const before = drawing(
          places.map((place, i) => ({ ...(i % 2 ? unit(`p${i}`) : tee(`p${i}`)), x: place * 10, y: i * 30 })),
          [],
        );
        const after = distributePieces(before, new Set(before.equipment.map(({ id }) => id)), 'across');
        const order = [...before.equipment].sort((a, b) => a.x - b.x).map(({ id }) => after.equipment.find((it) => it.id === id)!);
        expect([order[0].x, order.at(-1)!.x]).toEqual([Math.min(...places) * 10, Math.max(...places) * 10]);
        const gaps = order.slice(1).map((piece, i) => edges.left(piece) - edges.right(order[i]));
        expect(Math.max(...gaps) - Math.min(...gaps)).toBeLessThanOrEqual(GRID);
        expect(after.equipment.map(({ y }) => y)).toEqual(before.equipment.map(({ y }) => y));
      }),
    );
  });

  it('works down the sheet too', () => {
    const before = drawing([tee('a'), { ...tee('b'), y: 10 }, { ...tee('c'), y: 200 }], []);
    expect(distributePieces(before, new Set(['a', 'b', 'c']), 'down').equipment.map(({ y }) => y)).toEqual([0, 100, 200]);
  });
});
