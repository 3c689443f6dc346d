import type { Drawing, Equipment } from './drawing';
import type { Point } from './piece-geometry';
import { withStoreysByPlace } from './storeys';

/** Moves pieces to where they are said to stand (their centres); bends of pipes between two moved pieces go along. */
export function placePieces(drawing: Drawing, places: Map<string, Point>): Drawing {
  const shifts = new Map<string, Point>();
  const equipment = drawing.equipment.map((piece) => {
    const place = places.get(piece.id);
    if (!place || (place.x === piece.x && place.y === piece.y)) return piece;
    shifts.set(piece.id, { x: place.x - piece.x, y: place.y - piece.y });
    return { ...piece, ...place };
  });
  if (shifts.size === 0) return drawing;
  const pipes = drawing.pipes.map((pipe) => {
    const by = shifts.get(pipe.from.equipmentId);
    if (!by || !shifts.has(pipe.to.equipmentId) || pipe.bends.length === 0) return pipe;
    return { ...pipe, bends: pipe.bends.map((bend) => ({ x: bend.x + by.x, y: bend.y + by.y })) };
  });
  return withStoreysByPlace({ ...drawing, equipment, pipes }, new Set(shifts.keys()));
}

export function nudgePieces(drawing: Drawing, ids: Set<string>, by: Point): Drawing {
  const chosen = drawing.equipment.filter(({ id }) => ids.has(id));
  return placePieces(drawing, new Map(chosen.map((piece) => [piece.id, { x: piece.x + by.x, y: piece.y + by.y }])));
}

/** Turns each chosen piece a quarter clockwise about its own centre. */
export const rotatePieces = (drawing: Drawing, ids: Set<string>): Drawing =>
  mapPieces(drawing, ids, (piece) => ({ ...piece, rotation: ((piece.rotation + 90) % 360) as Equipment['rotation'] }));

export const mirrorPieces = (drawing: Drawing, ids: Set<string>): Drawing =>
  mapPieces(drawing, ids, (piece) => ({ ...piece, isMirrored: !piece.isMirrored }));

export const mapPieces = (drawing: Drawing, ids: Set<string>, change: (piece: Equipment) => Equipment): Drawing => ({
  ...drawing,
  equipment: drawing.equipment.map((piece) => (ids.has(piece.id) ? change(piece) : piece)),
});
