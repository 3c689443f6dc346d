import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { portPlace, sizeOf } from '@/lib/network/piece-geometry';
import { nearestOnRoute, route, routeOfPipe } from '@/lib/network/pipe-route';
import { anyDrawing } from '../../make/any-drawing';
import { source, unit } from '../../make/drawing';

describe('the route of a pipe', () => {
  it('runs along the sheet from end to end, whatever is joined', () => {
    fc.assert(
      fc.property(anyDrawing, (drawing) => {
        const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
        for (const pipe of drawing.pipes) {
          const path = routeOfPipe(pipe, pieces)!;
          const { x, y } = portPlace(pieces.get(pipe.from.equipmentId)!, pipe.from.port);
          const end = portPlace(pieces.get(pipe.to.equipmentId)!, pipe.to.port);
          expect(path[0]).toEqual({ x, y });
          expect(path.at(-1)).toEqual({ x: end.x, y: end.y });
          for (let i = 1; i < path.length; i++) expect(path[i].x === path[i - 1].x || path[i].y === path[i - 1].y).toBe(true);
        }
      }),
    );
  });

  it('is straight where it can be, and leaves a piece the way its end looks', () => {
    const left = { ...source('A'), x: 0, y: 0 };
    const right = { ...source('B'), x: 200, y: 0 };
    expect(route(portPlace(left, 'out'), portPlace(right, 'in'))).toEqual([
      { x: 30, y: 0 },
      { x: 170, y: 0 },
    ]);
    const around = route(portPlace(right, 'out'), portPlace(left, 'in'));
    expect(around[1].x).toBeGreaterThan(around[0].x);
    expect(around.at(-2)!.x).toBeLessThan(around.at(-1)!.x);
  });

  it('goes through its bends in turn', () => {
    const bends = [
      { x: 50, y: 90 },
      { x: 120, y: -40 },
    ];
    const path = route({ x: 0, y: 0 }, { x: 200, y: 0 }, bends);
    for (const bend of bends) expect(nearestOnRoute(path, bend).distance).toBe(0);
  });
});

describe('the ends of a piece', () => {
  it('stay on its edge through all turns and mirrors, and come round after four turns', () => {
    for (const isMirrored of [false, true]) {
      const seen = ([0, 90, 180, 270] as const).map((rotation) => {
        const piece = { ...unit('U'), rotation, isMirrored };
        const { width, height } = sizeOf(piece);
        const { x, y, leaves } = portPlace(piece, 'in');
        expect([Math.abs(x) * 2, Math.abs(y) * 2]).toEqual([leaves.x ? width : 0, leaves.y ? height : 0]);
        return `${leaves.x} ${leaves.y}`;
      });
      expect(seen).toEqual(['0 -1', '1 0', '0 1', '-1 0']);
    }
  });
});
