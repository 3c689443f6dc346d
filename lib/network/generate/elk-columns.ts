import ELK, { type ElkNode } from 'elkjs/lib/elk.bundled.js';
import { snap, type Point } from '../piece-geometry';

/** A group of pieces that stays together, with the heights at which its lines go in on the left and out on the right. */
export interface Cell {
  id: string;
  width: number;
  height: number;
  /** Distance from the cell's top, by name. */
  lines: Record<string, number>;
}

/** Two cells that one line of each joins, `[left cell, its line, right cell, its line]`. */
export type CellJoint = [left: string, leftLine: string, right: string, rightLine: string];

/** Between the columns; words beside a piece have room in its own cell. */
export const COLUMN_GAP = 20;
const ROW_GAP = '40';

const elk = new ELK();

/**
 * Where the cells of one band of the sheet go, in columns from left to right: the top left corner of each, by id, on the grid. ELK's layered method with ports
 * held in place: joined cells stand so that the lines between them are straight wherever their ports allow it.
 */
export async function columnsOf(cells: Cell[], joints: CellJoint[]): Promise<Map<string, Point>> {
  const port = (cell: Cell, line: string, side: 'WEST' | 'EAST') => ({
    id: `${cell.id}/${line}/${side}`,
    x: side === 'WEST' ? 0 : cell.width,
    y: cell.lines[line],
    layoutOptions: { 'elk.port.side': side },
  });
  const graph: ElkNode = {
    id: 'band',
    layoutOptions: {
      'elk.algorithm': 'layered',
      'elk.direction': 'RIGHT',
      'elk.edgeRouting': 'ORTHOGONAL',
      'elk.layered.nodePlacement.strategy': 'BRANDES_KOEPF',
      'elk.layered.nodePlacement.favorStraightEdges': 'true',
      'elk.layered.spacing.nodeNodeBetweenLayers': String(COLUMN_GAP),
      'elk.spacing.nodeNode': ROW_GAP,
      'elk.padding': '[top=0,left=0,bottom=0,right=0]',
    },
    children: cells.map((cell) => ({
      id: cell.id,
      width: cell.width,
      height: cell.height,
      layoutOptions: { 'elk.portConstraints': 'FIXED_POS' },
      ports: Object.keys(cell.lines).flatMap((line) => [port(cell, line, 'WEST'), port(cell, line, 'EAST')]),
    })),
    edges: joints.map(([left, leftLine, right, rightLine], k) => ({
      id: `joint ${k}`,
      sources: [`${left}/${leftLine}/EAST`],
      targets: [`${right}/${rightLine}/WEST`],
    })),
  };
  const { children = [] } = await elk.layout(graph);
  return new Map(children.map(({ id, x = 0, y = 0 }) => [id, { x: snap(x), y: snap(y) }]));
}
