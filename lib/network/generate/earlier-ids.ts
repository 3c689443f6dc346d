import type { Drawing, Equipment } from '../drawing';

const keyOf = ({ kind, tag }: Equipment) => `${kind} ${tag}`;

/**
 * A drawing whose pieces have the ids that pieces of the same kind and tag had in an earlier drawing of the loop: what was measured at a terminal or a valve
 * stays with it. Tees carry no readings and keep their own.
 */
export function withEarlierIds(drawing: Drawing, earlier: Drawing): Drawing {
  const was = new Map(earlier.equipment.filter(({ kind, tag }) => kind !== 'tee' && tag).map((piece) => [keyOf(piece), piece.id]));
  if (was.size === 0) return drawing;
  const idOf = new Map(drawing.equipment.map((piece) => [piece.id, was.get(keyOf(piece)) ?? piece.id]));
  const end = <End extends { equipmentId: string }>(its: End): End => ({ ...its, equipmentId: idOf.get(its.equipmentId)! });
  return {
    ...drawing,
    equipment: drawing.equipment.map((piece) => ({ ...piece, id: idOf.get(piece.id)! })),
    pipes: drawing.pipes.map((pipe) => ({ ...pipe, from: end(pipe.from), to: end(pipe.to) })),
  };
}
