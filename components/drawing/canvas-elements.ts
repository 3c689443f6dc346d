import type { Edge, Node } from 'reactflow';
import type { Drawing, DrawingPipe, Equipment } from '@/lib/network/drawing';
import { kindNames } from '@/lib/network/drawing-faults';
import { sizeOf, type Point } from '@/lib/network/piece-geometry';
import { routeOfPipe } from '@/lib/network/pipe-route';
import type { PieceNodeProps } from './piece-node';
import type { PipeEdgeProps } from './pipe-edge';

export interface Measured {
  width: number;
  height: number;
}

const nodes = new WeakMap<Equipment, Node<PieceNodeProps>>();
const routes = new WeakMap<DrawingPipe, { from: Equipment; to: Equipment; path: Point[] }>();
const edges = new WeakMap<Point[], Edge<PipeEdgeProps>>();

/** The pieces as React Flow takes them. A piece that has not changed keeps its node, so that only changed ones are drawn again. */
export function nodesOf(drawing: Drawing, selected: ReadonlySet<string>, measured: Map<string, Measured>): Node<PieceNodeProps>[] {
  return drawing.equipment.map((piece) => {
    const isSelected = selected.has(piece.id);
    const size = measured.get(piece.id);
    const kept = nodes.get(piece);
    if (kept && kept.selected === isSelected && kept.width === size?.width && kept.height === size?.height) return kept;
    const { width, height } = sizeOf(piece);
    const node: Node<PieceNodeProps> = {
      id: piece.id,
      type: 'piece',
      position: { x: piece.x - width / 2, y: piece.y - height / 2 },
      data: { piece },
      selected: isSelected,
      ariaLabel: `${kindNames[piece.kind]} ${piece.tag}`,
      width: size?.width,
      height: size?.height,
    };
    nodes.set(piece, node);
    return node;
  });
}

/** The pipes likewise; one whose piece is gone cannot be drawn and stands in the list of faults alone. */
export function edgesOf(drawing: Drawing, selected: ReadonlySet<string>): Edge<PipeEdgeProps>[] {
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  return drawing.pipes.flatMap((pipe) => {
    const [from, to] = [pieces.get(pipe.from.equipmentId), pieces.get(pipe.to.equipmentId)];
    if (!from || !to) return [];
    const path = keptRoute(pipe, from, to, pieces);
    const kept = edges.get(path);
    const isSelected = selected.has(pipe.id);
    if (kept && kept.selected === isSelected && kept.data?.pipe === pipe) return [kept];
    const edge: Edge<PipeEdgeProps> = {
      id: pipe.id,
      type: 'pipe',
      source: from.id,
      target: to.id,
      sourceHandle: pipe.from.port,
      targetHandle: pipe.to.port,
      data: { pipe, path },
      selected: isSelected,
      ariaLabel: `Pipe from ${from.tag} to ${to.tag}`,
    };
    edges.set(path, edge);
    return [edge];
  });
}

function keptRoute(pipe: DrawingPipe, from: Equipment, to: Equipment, pieces: Map<string, Equipment>): Point[] {
  const kept = routes.get(pipe);
  if (kept && kept.from === from && kept.to === to) return kept.path;
  const path = routeOfPipe(pipe, pieces) ?? [];
  routes.set(pipe, { from, to, path });
  return path;
}
