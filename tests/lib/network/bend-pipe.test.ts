import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { drawingSchema } from '@/lib/network/drawing';
import { isLevel, moveCorner, movePart, straightenPipes, wayOf, withRoute } from '@/lib/network/bend-pipe';
import type { Point } from '@/lib/network/piece-geometry';
import { anyDrawing } from '../../make/any-drawing';
import { drawing, pipe, source, tee } from '../../make/drawing';

const along = (path: Point[]) => path.every((point, i) => i === 0 || point.x === path[i - 1].x || point.y === path[i - 1].y);
const wayAfter = (before: Parameters<typeof wayOf>[0], id: string, path: Point[]) => {
  const after = withRoute(before, id, path);
  return after && { after, path: wayOf(after, id)!.path };
};

describe('a part of a pipe that is moved', () => {
  it('lies where it was put, and the pipe still runs along the sheet between the same ends', () => {
    fc.assert(
      fc.property(anyDrawing, fc.nat(), fc.nat(), fc.integer({ min: -60, max: 160 }), (before, pick, pickPart, place) => {
        fc.pre(before.pipes.length > 0);
        const { id } = before.pipes[pick % before.pipes.length];
        const { path, turns } = wayOf(before, id)!;
        fc.pre(path[0].x !== path.at(-1)!.x || path[0].y !== path.at(-1)!.y);
        const part = pickPart % (path.length - 1);
        const to = place * 10;
        const made = wayAfter(before, id, movePart(path, part, to, turns));
        if (!made) return;
        expect(along(made.path)).toBe(true);
        expect([made.path[0], made.path.at(-1)]).toEqual([path[0], path.at(-1)]);
        expect(made.path.some((point, i) => i > 0 && (isLevel(path, part) ? point.y : point.x) === to)).toBe(true);
        expect(drawingSchema.safeParse(made.after).success).toBe(true);
      }),
    );
  });

  it('turns off a little way from the end of a piece, and at once at a tee', () => {
    const before = drawing(
      [
        { ...source('A'), x: 0 },
        { ...tee('T'), x: 230 },
      ],
      [pipe('p', 'A.out', 'T.w')],
    );
    const { path, turns } = wayOf(before, 'p')!;
    expect(path).toEqual([
      { x: 30, y: 0 },
      { x: 230, y: 0 },
    ]);
    expect(movePart(path, 0, 80, turns)).toEqual([
      { x: 30, y: 0 },
      { x: 50, y: 0 },
      { x: 50, y: 80 },
      { x: 230, y: 80 },
      { x: 230, y: 0 },
    ]);
  });

  it('that is put back where it was leaves no bend behind', () => {
    const before = drawing(
      [
        { ...source('A'), x: 0 },
        { ...tee('T'), x: 230 },
      ],
      [pipe('p', 'A.out', 'T.w')],
    );
    const { path, turns } = wayOf(before, 'p')!;
    const bent = movePart(path, 0, 80, turns);
    expect(movePart(bent, 2, 0, turns)).toEqual(path);
  });
});

describe('a corner of a pipe that is moved', () => {
  it('stands where it was put, and the pipe still runs along the sheet between the same ends', () => {
    fc.assert(
      fc.property(
        anyDrawing,
        fc.nat(),
        fc.nat(),
        fc.integer({ min: -60, max: 160 }),
        fc.integer({ min: -60, max: 160 }),
        (before, pick, pickCorner, x, y) => {
          fc.pre(before.pipes.length > 0);
          const { id } = before.pipes[pick % before.pipes.length];
          const { path, turns } = wayOf(before, id)!;
          fc.pre(path.length > 2);
          const made = wayAfter(before, id, moveCorner(path, 1 + (pickCorner % (path.length - 2)), { x: x * 10, y: y * 10 }, turns));
          if (!made) return;
          expect(along(made.path)).toBe(true);
          expect([made.path[0], made.path.at(-1)]).toEqual([path[0], path.at(-1)]);
          const onPath = made.path.some((a, i) => {
            const b = made.path[i + 1];
            if (!b) return false;
            const within = (v: number, p: number, q: number) => v >= Math.min(p, q) && v <= Math.max(p, q);
            return within(x * 10, a.x, b.x) && within(y * 10, a.y, b.y);
          });
          // Put where the pipe would run out and straight back over itself, that spur is left out: the corner then lies on the line of a part.
          const isSpur = made.path.some((a, i) => {
            const b = made.path[i + 1];
            return b !== undefined && ((a.x === b.x && a.x === x * 10) || (a.y === b.y && a.y === y * 10));
          });
          expect(onPath || isSpur).toBe(true);
        },
      ),
    );
  });
});

describe('a pipe', () => {
  it('takes no more bends than it may have', () => {
    const before = drawing(
      [
        { ...source('A'), x: 0 },
        { ...tee('T'), x: 230 },
      ],
      [pipe('p', 'A.out', 'T.w')],
    );
    const stairs = Array.from({ length: 24 }, (_, i) => ({ x: Math.ceil(i / 2) * 10, y: Math.floor(i / 2) * 10 }));
    expect(withRoute(before, 'p', stairs)).toBeNull();
    expect(withRoute(before, 'p', stairs.slice(0, 22))?.pipes[0].bends).toHaveLength(20);
  });

  it('finds its own way again when it is straightened', () => {
    const before = drawing(
      [
        { ...source('A'), x: 0 },
        { ...tee('T'), x: 230 },
      ],
      [pipe('p', 'A.out', 'T.w')],
    );
    const { path, turns } = wayOf(before, 'p')!;
    const bent = withRoute(before, 'p', movePart(path, 0, 80, turns))!;
    expect(wayOf(straightenPipes(bent, new Set(['p'])), 'p')!.path).toEqual(path);
  });
});
