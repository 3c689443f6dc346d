import { isPoint, portsOf, type Drawing, type Equipment, type PipeEnd, type Port } from './drawing';

/** A drawing as what joins what: for each point of the network, the ends of pieces and pipes that meet there. */
export interface DrawnGraph {
  pieces: Map<string, Equipment>;
  pipesAt: Map<string, { id: string; to: PipeEnd }[]>;
}

export interface Reached {
  /** Ends of pieces that were not passed, each where the way came to. */
  ends: { piece: Equipment; port: Port }[];
  /** Pipes on the way, nearest first. */
  pipes: string[];
}

const pointOf = (pieces: Map<string, Equipment>, { equipmentId, port }: PipeEnd) => {
  const piece = pieces.get(equipmentId);
  return piece && isPoint(piece.kind) ? equipmentId : `${equipmentId}.${port}`;
};

export function drawnGraph({ equipment, pipes }: Drawing): DrawnGraph {
  const pieces = new Map(equipment.map((piece) => [piece.id, piece]));
  const pipesAt: DrawnGraph['pipesAt'] = new Map();
  const join = (id: string, from: PipeEnd, to: PipeEnd) => {
    const point = pointOf(pieces, from);
    const there = pipesAt.get(point);
    if (there) there.push({ id, to });
    else pipesAt.set(point, [{ id, to }]);
  };
  for (const { id, from, to } of pipes) {
    join(id, from, to);
    join(id, to, from);
  }
  return { pieces, pipesAt };
}

/** Everything that water can come to from an end of a piece, outwards, through the pieces that `passes` lets by. */
export function reach({ pieces, pipesAt }: DrawnGraph, from: PipeEnd, passes: (piece: Equipment) => boolean): Reached {
  const start = pieces.get(from.equipmentId);
  const ends: Reached['ends'] = start ? [{ piece: start, port: from.port }] : [];
  const pipes: string[] = [];
  const seen = new Set([pointOf(pieces, from)]);
  const waiting = [...seen];
  const enter = (end: PipeEnd) => {
    const point = pointOf(pieces, end);
    if (seen.has(point)) return false;
    seen.add(point);
    waiting.push(point);
    return true;
  };
  for (let point = waiting.shift(); point !== undefined; point = waiting.shift()) {
    for (const { id, to } of pipesAt.get(point) ?? []) {
      const piece = pieces.get(to.equipmentId);
      if (!piece) continue;
      if (!enter(to)) continue;
      pipes.push(id);
      if (isPoint(piece.kind)) continue;
      if (!passes(piece)) ends.push({ piece, port: to.port });
      else for (const port of portsOf(piece.kind)) if (port !== to.port) enter({ equipmentId: piece.id, port });
    }
  }
  return { ends, pipes };
}
