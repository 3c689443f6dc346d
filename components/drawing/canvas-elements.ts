import type { Edge, Node } from 'reactflow';
import type { Drawing, DrawingPipe, Equipment } from '@/lib/network/drawing';
import { kindNames } from '@/lib/network/fault';
import { sizeOf, type Point } from '@/lib/network/piece-geometry';
import type { Hop, Hops } from '@/lib/network/pipe-crossings';
import { routeOfPipe } from '@/lib/network/pipe-route';
import type { PieceNodeProps } from './piece-node';
import type { PipeEdgeProps } from './pipe-edge';

const nodes = new WeakMap<Equipment, Node<PieceNodeProps>>();
const routes = new WeakMap<DrawingPipe, { from: Equipment; to: Equipment; path: Point[] }>();
const edges = new WeakMap<Point[], Edge<PipeEdgeProps>>();

/** The pieces as React Flow takes them. A piece that has not changed keeps its node, so that only changed ones are drawn again. */
export function nodesOf(drawing: Drawing, selected: ReadonlySet<string>): Node<PieceNodeProps>[] {
  return drawing.equipment.map((piece) => {
    const isSelected = selected.has(piece.id);
    const kept = nodes.get(piece);
    if (kept && kept.selected === isSelected) return kept;
    const { width, height } = sizeOf(piece);
    const node: Node<PieceNodeProps> = {
      id: piece.id,
      type: 'piece',
      position: { x: piece.x - width / 2, y: piece.y - height / 2 },
      data: { piece },
      selected: isSelected,
      ariaLabel: `${kindNames[piece.kind]} ${piece.tag}`,
      width,
      height,
    };
    nodes.set(piece, node);
    return node;
  });
}

const noHops: readonly Hop[] = [];

/**
 * The pipes likewise; one whose piece is gone cannot be drawn and stands in the list of faults alone. `crossingsOf` tells where
 * each passes over others.
 */
export function edgesOf(
  drawing: Drawing,
  selected: ReadonlySet<string>,
  crossingsOf: (routes: ReadonlyMap<string, Point[]>) => Hops,
): Edge<PipeEdgeProps>[] {
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const drawn = drawing.pipes.flatMap((pipe) => {
    const [from, to] = [pieces.get(pipe.from.equipmentId), pieces.get(pipe.to.equipmentId)];
    return from && to ? [{ pipe, from, to, path: keptRoute(pipe, from, to, pieces) }] : [];
  });
  const crossings = crossingsOf(new Map(drawn.map(({ pipe, path }) => [pipe.id, path])));
  return drawn.map(({ pipe, from, to, path }) => {
    const hops = crossings.get(pipe.id) ?? noHops;
    const kept = edges.get(path);
    const isSelected = selected.has(pipe.id);
    if (kept && kept.selected === isSelected && kept.data?.pipe === pipe && kept.data.hops === hops) return kept;
    const edge: Edge<PipeEdgeProps> = {
      id: pipe.id,
      type: 'pipe',
      source: from.id,
      target: to.id,
      sourceHandle: pipe.from.port,
      targetHandle: pipe.to.port,
      data: { pipe, path, hops },
      selected: isSelected,
      ariaLabel: `Pipe from ${from.tag} to ${to.tag}`,
    };
    edges.set(path, edge);
    return edge;
  });
}

/** The corners of a pipe, worked out once for as long as it and its ends stay; null where an end is gone. */
export function routeKept(pipe: DrawingPipe, pieces: Map<string, Equipment>): Point[] | null {
  const [from, to] = [pieces.get(pipe.from.equipmentId), pieces.get(pipe.to.equipmentId)];
  return from && to ? keptRoute(pipe, from, to, pieces) : null;
}

function keptRoute(pipe: DrawingPipe, from: Equipment, to: Equipment, pieces: Map<string, Equipment>): Point[] {
  const kept = routes.get(pipe);
  if (kept && kept.from === from && kept.to === to) return kept.path;
  const path = routeOfPipe(pipe, pieces) ?? [];
  routes.set(pipe, { from, to, path });
  return path;
}
