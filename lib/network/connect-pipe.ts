import { v7 as newId } from 'uuid';
import { circuitAt, isPoint, portsOf, type Drawing, type DrawingPipe, type Equipment, type PipeEnd, type Port } from './drawing';
import { pieceOf, portPlace, sideTowards, type Point } from './piece-geometry';
import type { PipeFigures } from './pipe-choice';

/** Why two ends cannot be joined, in words for the designer. */
export interface Refusal {
  refused: string;
}

export const isPortTaken = (drawing: Drawing, end: PipeEnd): boolean =>
  drawing.pipes.some((pipe) => [pipe.from, pipe.to].some((it) => it.equipmentId === end.equipmentId && it.port === end.port));

/** A new pipe between two ends. It runs the way of the water where an end tells: out of an outlet, into an inlet. */
export function connect(
  drawing: Drawing,
  a: PipeEnd,
  b: PipeEnd,
  figures: PipeFigures,
  bends: Point[] = [],
): { drawing: Drawing; pipe: DrawingPipe } | Refusal {
  const [pieceA, pieceB] = [pieceOf(drawing, a.equipmentId), pieceOf(drawing, b.equipmentId)];
  if (!pieceA || !pieceB) return { refused: 'One end of the pipe is no longer on the drawing.' };
  if (pieceA.id === pieceB.id) return { refused: 'A pipe joins two different pieces.' };
  for (const [piece, end] of [
    [pieceA, a],
    [pieceB, b],
  ] as const) {
    if ((piece.kind === 'header' || !isPoint(piece.kind)) && isPortTaken(drawing, end)) {
      return { refused: `${piece.tag || 'This piece'} already has a pipe there. Drop the end on that pipe to branch off it with a tee.` };
    }
  }
  const isBackwards = a.port === 'in' || b.port === 'out';
  const [from, to] = isBackwards ? [b, a] : [a, b];
  const pipe: DrawingPipe = {
    ...figures,
    id: newId(),
    from,
    to,
    circuit: circuitOf(drawing, from, to),
    bends: isBackwards ? [...bends].reverse() : bends,
  };
  return { drawing: { ...drawing, pipes: [...drawing.pipes, pipe] }, pipe };
}

/** Supply up to the terminals, return from them: read from the pieces at the ends and the pipes that meet there. */
export function circuitOf(drawing: Drawing, from: PipeEnd, to: PipeEnd): DrawingPipe['circuit'] {
  const [start, goal] = [pieceOf(drawing, from.equipmentId), pieceOf(drawing, to.equipmentId)];
  if (start?.kind === 'terminalUnit') return 'return';
  if (goal?.kind === 'terminalUnit') return 'supply';
  if (start?.kind === 'decoupler') return circuitAt(start.kind, from.port) ?? 'return';
  if (goal?.kind === 'decoupler') return circuitAt(goal.kind, to.port) ?? 'supply';
  const near = drawing.pipes.filter((pipe) =>
    [pipe.from, pipe.to].some((end) => end.equipmentId === from.equipmentId || end.equipmentId === to.equipmentId),
  );
  if (start?.kind === 'source' && from.port === 'out') return 'supply';
  if (goal?.kind === 'source' && to.port === 'in')
    return near.find((pipe) => pipe.to.equipmentId === from.equipmentId)?.circuit ?? 'return';
  if (goal?.kind === 'expansionVessel' || start?.kind === 'expansionVessel') return 'return';
  return near.find((pipe) => pipe.to.equipmentId === from.equipmentId)?.circuit ?? near[0]?.circuit ?? 'supply';
}

/** The end of a piece nearest to a point that still takes a pipe; of a tee, the side that looks there. */
export function freePortTowards(drawing: Drawing, piece: Equipment, point: Point, wanted?: Port): PipeEnd | null {
  if (isPoint(piece.kind) && piece.kind !== 'header') return { equipmentId: piece.id, port: sideTowards(piece, point) };
  const free = portsOf(piece.kind).filter((port) => !isPortTaken(drawing, { equipmentId: piece.id, port }));
  if (free.length === 0) return null;
  const gap = (port: Port) => {
    const place = portPlace(piece, port);
    return Math.hypot(place.x - point.x, place.y - point.y);
  };
  const port = wanted && free.includes(wanted) ? wanted : free.reduce((a, b) => (gap(b) < gap(a) ? b : a));
  return { equipmentId: piece.id, port };
}

/** Joins two pieces by their free ends, outlet to inlet where both have one. */
export function joinPieces(drawing: Drawing, first: Equipment, second: Equipment, figures: PipeFigures): ReturnType<typeof connect> {
  const a = freePortTowards(drawing, first, second, 'out');
  const b = freePortTowards(drawing, second, first, 'in');
  if (!a || !b) return { refused: `${(a ? second : first).tag || 'That piece'} has no free end.` };
  return connect(drawing, a, b, figures);
}
