import { v7 as newId } from 'uuid';
import type { Drawing, DrawingPipe, Equipment, PipeEnd } from './drawing';
import { withRoomOfItsOwn } from './new-piece';
import { boundsOf, GRID, type Point } from './piece-geometry';
import { storeyAt } from './storeys';
import { nextTag, tagsOf } from './tags';

/** Pieces and the pipes among them, taken from a drawing to be put down again, here or on another. */
export interface DrawingPart {
  equipment: Equipment[];
  pipes: DrawingPipe[];
}

/** The chosen pieces with the pipes that run between two of them. */
export function partOf(drawing: Drawing, pieceIds: Set<string>): DrawingPart {
  return {
    equipment: drawing.equipment.filter(({ id }) => pieceIds.has(id)),
    pipes: drawing.pipes.filter(({ from, to }) => pieceIds.has(from.equipmentId) && pieceIds.has(to.equipmentId)),
  };
}

/** Puts a part down, moved by `by`, with fresh ids and tags and the storeys of its new place. */
export function addPart(drawing: Drawing, part: DrawingPart, by: Point): { drawing: Drawing; added: DrawingPart } {
  const idOf = new Map(part.equipment.map(({ id }) => [id, newId()]));
  const known = new Set(drawing.equipment.map(({ id }) => id));
  const taken = tagsOf(drawing);
  const equipment = part.equipment.map((piece): Equipment => {
    const y = piece.y + by.y;
    const moved: Equipment = { ...piece, id: idOf.get(piece.id)!, x: piece.x + by.x, y, storeyId: storeyAt(drawing, y)?.id ?? null };
    const copy: Equipment = { ...sensing(withRoomOfItsOwn(moved), idOf, known), tag: nextTag(drawing, moved, taken) };
    taken.add(copy.tag);
    return copy;
  });
  const pipes = part.pipes.map((pipe) => ({
    ...pipe,
    id: newId(),
    from: { ...pipe.from, equipmentId: idOf.get(pipe.from.equipmentId)! },
    to: { ...pipe.to, equipmentId: idOf.get(pipe.to.equipmentId)! },
    bends: pipe.bends.map((bend) => ({ x: bend.x + by.x, y: bend.y + by.y })),
  }));
  return {
    drawing: { ...drawing, equipment: [...drawing.equipment, ...equipment], pipes: [...drawing.pipes, ...pipes] },
    added: { equipment, pipes },
  };
}

/** A copied controller senses the copies of what it sensed; what was not copied along it goes on sensing, where that is on this drawing. */
function sensing(piece: Equipment, idOf: Map<string, string>, known: Set<string>): Equipment {
  if (piece.kind !== 'dpController') return piece;
  const moved = (end: PipeEnd | null): PipeEnd | null => {
    const id = end && (idOf.get(end.equipmentId) ?? (known.has(end.equipmentId) ? end.equipmentId : null));
    return id ? { ...end!, equipmentId: id } : null;
  };
  return { ...piece, senseHigh: moved(piece.senseHigh), senseLow: moved(piece.senseLow) };
}

/** Duplicates pieces to the right of themselves, clear of the originals. */
export function duplicatePieces(drawing: Drawing, pieceIds: Set<string>): { drawing: Drawing; added: DrawingPart } {
  const part = partOf(drawing, pieceIds);
  if (part.equipment.length === 0) return { drawing, added: part };
  return addPart(drawing, part, { x: Math.ceil((boundsOf(part.equipment).width + 4 * GRID) / GRID) * GRID, y: 0 });
}
