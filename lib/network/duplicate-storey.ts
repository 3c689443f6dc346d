import { v7 as newId } from 'uuid';
import { isPoint, type Drawing, type DrawingPipe, type Storey } from './drawing';
import { addPart, partOf, type DrawingPart } from './duplicate-pieces';
import { mapPieces } from './move-pieces';
import { pieceOf } from './piece-geometry';
import { freeLevelName, shiftAbove, USUAL_RISE_M } from './storeys';

/**
 * A storey like this one, right above it, with all that is drawn in it and new tags. What lies above moves up to make room.
 * Where a pipe of a riser meets the storey in a tee, the riser goes on through the tee of the copy, so that the copy is
 * joined as the storey is. Null where there is no such storey.
 */
export function duplicateStorey(drawing: Drawing, storeyId: string): { drawing: Drawing; added: DrawingPart; storey: Storey } | null {
  const like = drawing.storeys.find(({ id }) => id === storeyId);
  if (!like) return null;
  const riseM = riseAbove(drawing, like);
  const number = Number(like.name.match(/\d{1,4}/)?.[0] ?? drawing.storeys.length - 1) + 1;
  const storey: Storey = {
    ...like,
    id: newId(),
    name: freeLevelName(drawing, number),
    elevationM: like.elevationM + riseM,
    top: like.top - like.height,
  };
  const part = partOf(drawing, new Set(drawing.equipment.filter((piece) => piece.storeyId === storeyId).map(({ id }) => id)));
  const roomy = mapPieces(shiftAbove(drawing, like.top, -like.height), new Set(part.equipment.map(({ id }) => id)), ({ id }) =>
    pieceOf(drawing, id)!,
  );
  const raised = roomy.storeys.map((it) =>
    it.top < like.top && it.elevationM > like.elevationM ? { ...it, elevationM: it.elevationM + riseM } : it,
  );
  const withBand = { ...roomy, storeys: [...raised, storey] };
  const made = addPart(withBand, part, { x: 0, y: -like.height });
  const copyOf = new Map(part.equipment.map(({ id }, i) => [id, made.added.equipment[i].id]));
  const pipes = ledOn(drawing, made.drawing.pipes, copyOf, like);
  return { drawing: { ...made.drawing, pipes }, added: made.added, storey };
}

/** From this storey to the next one up, m. */
function riseAbove({ storeys }: Drawing, like: Storey): number {
  const higher = storeys.map((it) => it.elevationM - like.elevationM).filter((rise) => rise > 0);
  return higher.length > 0 ? Math.min(...higher) : USUAL_RISE_M;
}

/** Leads each riser that meets the storey in a tee on through the tee's copy: a pipe up from it is cut there, one from below goes on. */
function ledOn(drawing: Drawing, pipes: DrawingPipe[], copyOf: Map<string, string>, { top }: Storey): DrawingPipe[] {
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const links = new Map<string, { pipe: DrawingPipe; isUp: boolean; isOutOf: boolean }>();
  for (const pipe of drawing.pipes) {
    for (const [near, far] of [
      [pipe.from, pipe.to],
      [pipe.to, pipe.from],
    ]) {
      const [tee, other] = [pieces.get(near.equipmentId), pieces.get(far.equipmentId)];
      if (!tee || !other || !copyOf.has(tee.id) || copyOf.has(other.id) || !isPoint(tee.kind) || tee.kind === 'header') continue;
      const isUp = other.y < top;
      if (isUp || !links.has(tee.id)) links.set(tee.id, { pipe, isUp, isOutOf: near === pipe.from });
    }
  }
  const between = [...links].map(([teeId, { pipe, isUp, isOutOf }]): DrawingPipe => {
    const [tee, copy] = [
      { equipmentId: teeId, port: 'n' as const },
      { equipmentId: copyOf.get(teeId)!, port: 's' as const },
    ];
    // Water that leaves upwards, or comes from below, runs from the tee to its copy.
    const [from, to] = isUp === isOutOf ? [tee, copy] : [copy, tee];
    return { ...pipe, id: newId(), from, to, bends: [] };
  });
  const reEnded = new Map([...links].filter(([, { isUp }]) => isUp).map(([teeId, { pipe, isOutOf }]) => [pipe.id, { teeId, isOutOf }]));
  const cut = pipes.map((pipe) => {
    const link = reEnded.get(pipe.id);
    if (!link) return pipe;
    const end = link.isOutOf ? 'from' : 'to';
    return { ...pipe, [end]: { ...pipe[end], equipmentId: copyOf.get(link.teeId)! }, bends: pipe.bends.filter(({ y }) => y < top) };
  });
  return [...cut, ...between];
}
