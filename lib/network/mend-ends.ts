import { connect, freePortTowards, isPortTaken } from './connect-pipe';
import { isPoint, portsOf, type Drawing, type Equipment, type PipeEnd } from './drawing';
import { pieceOf, portPlace } from './piece-geometry';
import type { PipeFigures } from './pipe-choice';
import { removeFromDrawing } from './remove-pieces';
import { nextTag } from './tags';

/** How far away, in drawing units, the other end of a missing pipe is looked for. */
const REACH = 400;
/** Aside from the line that an end looks along: more is another line. */
const ASIDE = 60;

/** Joins the open ends of a piece to the nearest free end that lies on the line they look along. Null where there is none for any of them. */
export function joinOpenEnds(drawing: Drawing, pieceId: string, figures: PipeFigures): Drawing | null {
  let mended = drawing;
  const piece = pieceOf(drawing, pieceId);
  if (!piece || isPoint(piece.kind)) return null;
  for (const port of portsOf(piece.kind)) {
    const end: PipeEnd = { equipmentId: pieceId, port };
    if (isPortTaken(mended, end)) continue;
    const other = nearestOnLine(mended, piece, end);
    const made = other && connect(mended, end, other, figures);
    if (made && 'drawing' in made) mended = made.drawing;
  }
  return mended === drawing ? null : mended;
}

function nearestOnLine(drawing: Drawing, piece: Equipment, end: PipeEnd): PipeEnd | null {
  const from = portPlace(piece, end.port);
  let best: { end: PipeEnd; away: number } | null = null;
  for (const other of drawing.equipment) {
    const isFar = Math.abs(other.x - from.x) > REACH || Math.abs(other.y - from.y) > REACH;
    if (isFar || other.id === piece.id || isJoined(drawing, piece.id, other.id)) continue;
    // An outlet goes into an inlet; two outlets have nothing to say to each other.
    const free = freePortTowards(drawing, other, from, end.port === 'out' ? 'in' : 'out');
    if (!free || free.port === end.port) continue;
    const to = portPlace(other, free.port);
    const [dx, dy] = [to.x - from.x, to.y - from.y];
    const along = dx * from.leaves.x + dy * from.leaves.y;
    const aside = Math.abs(dx * from.leaves.y) + Math.abs(dy * from.leaves.x);
    const away = Math.hypot(dx, dy);
    if (along < 0 || aside > ASIDE || away > REACH || (best && best.away <= away)) continue;
    best = { end: free, away };
  }
  return best?.end ?? null;
}

const isJoined = ({ pipes }: Drawing, a: string, b: string) =>
  pipes.some(({ from, to }) => (from.equipmentId === a && to.equipmentId === b) || (from.equipmentId === b && to.equipmentId === a));

/** Takes away a joint that leads nowhere, with the pipe that leads to it. */
export const removeDeadLeg = (drawing: Drawing, pieceId: string): Drawing => removeFromDrawing(drawing, new Set([pieceId]), new Set());

export const removePipe = (drawing: Drawing, pipeId: string): Drawing => removeFromDrawing(drawing, new Set(), new Set([pipeId]));

/** Gives a piece whose tag stands elsewhere too the next free one. */
export function retag(drawing: Drawing, pieceId: string): Drawing {
  const piece = pieceOf(drawing, pieceId);
  if (!piece) return drawing;
  const tag = nextTag(drawing, piece);
  return { ...drawing, equipment: drawing.equipment.map((it) => (it.id === pieceId ? { ...it, tag } : it)) };
}
