import type { Drawing } from '@/lib/network/drawing';
import { wayOf } from '@/lib/network/bend-pipe';
import { boundsOf, GRID, pieceOf, snapPoint, type Point } from '@/lib/network/piece-geometry';
import { labelPlace } from '@/lib/network/pipe-route';
import { midView, bringIntoView, type Stage } from './actions/stage';
import { placePiece } from './placing';

const APART = 10 * GRID;

/**
 * Places the chosen kind without a pointer: into the selected pipe, right of the selected piece, or in mid-view, and in any
 * case where nothing stands yet.
 */
export function placeByKey(stage: Stage): void {
  const { canvasStore, drawingStore } = stage.editor;
  const { tool, pieces, pipes } = canvasStore.getState();
  if (tool === 'select' || tool === 'pipe') return;
  const { drawing } = drawingStore.getState();
  const way = pipes.size === 1 && pieces.size === 0 ? wayOf(drawing, [...pipes][0]) : null;
  const beside = pieceOf(drawing, [...pieces].at(-1) ?? '');
  const at = way ? labelPlace(way.path) : freeFrom(drawing, beside ? { x: beside.x + APART, y: beside.y } : midView(stage));
  placePiece(stage.editor, tool, at, way ? 1 : 0);
  bringIntoView(stage, at);
}

/** The first free place from a point to the right. */
function freeFrom(drawing: Drawing, point: Point): Point {
  const isTaken = ({ x, y }: Point) =>
    drawing.equipment.some((piece) => {
      const { left, top, width, height } = boundsOf([piece]);
      return x > left - 2 * GRID && x < left + width + 2 * GRID && y > top - 2 * GRID && y < top + height + 2 * GRID;
    });
  const at = snapPoint(point);
  while (isTaken(at)) at.x += APART / 2;
  return at;
}
