import type { Drawing, Equipment } from './drawing';
import { placePieces } from './move-pieces';
import { boundsOf, sizeOf, snap, type Point } from './piece-geometry';

/** Edges or centres of the chosen pieces that come to lie on one line; `column` and `row` are their centres. */
export type Alignment = 'left' | 'column' | 'right' | 'top' | 'row' | 'bottom';

/** Brings the chosen pieces onto one line of the box around them; each moves across that line only. */
export function alignPieces(drawing: Drawing, ids: ReadonlySet<string>, to: Alignment): Drawing {
  const pieces = drawing.equipment.filter(({ id }) => ids.has(id));
  if (pieces.length < 2) return drawing;
  const { left, top, width, height } = boundsOf(pieces);
  const place = (piece: Equipment): Point => {
    const { x, y } = piece;
    const size = sizeOf(piece);
    switch (to) {
      case 'left':
        return { x: left + size.width / 2, y };
      case 'column':
        return { x: snap(left + width / 2), y };
      case 'right':
        return { x: left + width - size.width / 2, y };
      case 'top':
        return { x, y: top + size.height / 2 };
      case 'row':
        return { x, y: snap(top + height / 2) };
      case 'bottom':
        return { x, y: top + height - size.height / 2 };
    }
  };
  return placePieces(drawing, new Map(pieces.map((piece) => [piece.id, place(piece)])));
}

/**
 * Makes the gaps between the chosen pieces even, `across` the sheet or `down` it. The first and the last stay; those
 * between them lie on the grid, so that gaps differ by at most one pitch of it.
 */
export function distributePieces(drawing: Drawing, ids: ReadonlySet<string>, way: 'across' | 'down'): Drawing {
  const axis = way === 'across' ? 'x' : 'y';
  const lengthOf = (piece: Equipment) => sizeOf(piece)[way === 'across' ? 'width' : 'height'];
  const pieces = drawing.equipment.filter(({ id }) => ids.has(id)).sort((a, b) => a[axis] - b[axis]);
  if (pieces.length < 3) return drawing;
  const [first, last] = [pieces[0], pieces[pieces.length - 1]];
  const inner = pieces.slice(1, -1);
  const room = last[axis] - lengthOf(last) / 2 - (first[axis] + lengthOf(first) / 2);
  const gap = (room - inner.reduce((sum, piece) => sum + lengthOf(piece), 0)) / (inner.length + 1);
  let edge = first[axis] + lengthOf(first) / 2;
  const places = new Map<string, Point>();
  for (const piece of inner) {
    const centre = edge + gap + lengthOf(piece) / 2;
    places.set(piece.id, { x: piece.x, y: piece.y, [axis]: snap(centre) });
    edge = centre + lengthOf(piece) / 2;
  }
  return placePieces(drawing, places);
}
