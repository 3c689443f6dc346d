import type { Drawing, DrawingPipe, Equipment } from './drawing';
import type { Point } from './piece-geometry';

/** Going about the drawing by key: from piece to piece as they lie on the sheet, and along the pipes as they join. */

export type Heading = 'left' | 'right' | 'up' | 'down';

const steps: Record<Heading, Point> = { left: { x: -1, y: 0 }, right: { x: 1, y: 0 }, up: { x: 0, y: -1 }, down: { x: 0, y: 1 } };
/** A piece aside counts as farther away than one straight ahead. */
const ASIDE = 2;

/** The nearest piece that lies in a direction from a point; null where there is none. */
export function pieceTowards(drawing: Drawing, from: Point, heading: Heading): Equipment | null {
  const step = steps[heading];
  let best: Equipment | null = null;
  let bestFar = Infinity;
  for (const piece of drawing.equipment) {
    const [dx, dy] = [piece.x - from.x, piece.y - from.y];
    const ahead = dx * step.x + dy * step.y;
    const aside = Math.abs(dx * step.y) + Math.abs(dy * step.x);
    if (ahead <= 0 || aside > 4 * ahead) continue;
    const far = ahead + ASIDE * aside;
    if (far < bestFar) [best, bestFar] = [piece, far];
  }
  return best;
}

/** The piece nearest to a point. */
export function pieceNear(drawing: Drawing, point: Point): Equipment | null {
  const far = (piece: Equipment) => Math.hypot(piece.x - point.x, piece.y - point.y);
  return drawing.equipment.reduce<Equipment | null>((best, piece) => (best && far(best) <= far(piece) ? best : piece), null);
}

export const pipesAt = (drawing: Drawing, pieceId: string): DrawingPipe[] =>
  drawing.pipes.filter(({ from, to }) => from.equipmentId === pieceId || to.equipmentId === pieceId);

/** The pipes of a piece in turn: the one after `pipeId`, or the first; null where it has none. */
export function nextPipeAt(drawing: Drawing, pieceId: string, pipeId: string | null): DrawingPipe | null {
  const pipes = pipesAt(drawing, pieceId);
  return pipes[(pipes.findIndex(({ id }) => id === pipeId) + 1) % pipes.length] ?? null;
}

/** The piece at the other end of a pipe. */
export const farEndOf = ({ from, to }: DrawingPipe, pieceId: string | null): string =>
  from.equipmentId === pieceId ? to.equipmentId : to.equipmentId === pieceId ? from.equipmentId : to.equipmentId;
