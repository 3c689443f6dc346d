import type { Drawing, DrawingPipe, Equipment, PipeEnd } from './drawing';

/**
 * Takes pieces and pipes off the drawing. A piece with two pipes gives way to one pipe of their length together; where
 * that cannot be (one pipe, or three) its pipes go with it.
 */
export function removeFromDrawing(drawing: Drawing, pieceIds: Set<string>, pipeIds: Set<string>): Drawing {
  let result: Drawing = { ...drawing, pipes: drawing.pipes.filter(({ id }) => !pipeIds.has(id)) };
  for (const id of pieceIds) result = removePiece(result, id);
  return result;
}

function removePiece(drawing: Drawing, pieceId: string): Drawing {
  const joined = drawing.pipes.filter((pipe) => touches(pipe, pieceId));
  const healed = joined.length === 2 ? healedPipe(joined[0], joined[1], pieceId) : null;
  const gone = new Set(joined.map(({ id }) => id));
  return {
    ...drawing,
    equipment: drawing.equipment.filter(({ id }) => id !== pieceId).map((piece) => withoutSenseAt(piece, pieceId)),
    pipes: drawing.pipes.flatMap((pipe) => {
      if (!gone.has(pipe.id)) return [pipe];
      return healed && pipe.id === healed.id ? [healed] : [];
    }),
  };
}

/** A controller lets go of what its impulse lines ended at. */
function withoutSenseAt(piece: Equipment, goneId: string): Equipment {
  if (piece.kind !== 'dpController') return piece;
  const [isHigh, isLow] = [piece.senseHigh?.equipmentId === goneId, piece.senseLow?.equipmentId === goneId];
  return isHigh || isLow ? { ...piece, senseHigh: isHigh ? null : piece.senseHigh, senseLow: isLow ? null : piece.senseLow } : piece;
}

const touches = (pipe: DrawingPipe, pieceId: string) => pipe.from.equipmentId === pieceId || pipe.to.equipmentId === pieceId;
const sum = (a: number | null, b: number | null) => (a === null || b === null ? null : a + b);

/** The one pipe in place of two that met at a piece: it runs the way of the first and has its size. */
export function healedPipe(first: DrawingPipe, second: DrawingPipe, pieceId: string): DrawingPipe | null {
  const isForward = first.to.equipmentId === pieceId;
  const near = isForward ? first.from : first.to;
  const isSecondAway = second.from.equipmentId === pieceId;
  const far = isSecondAway ? second.to : second.from;
  if (near.equipmentId === pieceId || far.equipmentId === pieceId || isSame(near, far)) return null;
  const firstBends = isForward ? first.bends : [...first.bends].reverse();
  const secondBends = isSecondAway ? second.bends : [...second.bends].reverse();
  const bends = [...firstBends, ...secondBends];
  return {
    ...first,
    from: isForward ? near : far,
    to: isForward ? far : near,
    lengthM: sum(first.lengthM, second.lengthM),
    minorK: first.minorK + second.minorK,
    bends: (isForward ? bends : bends.reverse()).slice(0, 20),
  };
}

const isSame = (a: PipeEnd, b: PipeEnd) => a.equipmentId === b.equipmentId;
