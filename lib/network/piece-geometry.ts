import { isPoint, type Drawing, type Equipment, type EquipmentKind, type Port } from './drawing';

/**
 * Where a piece and its ends lie on the drawing. `x` and `y` of a piece are its centre, in drawing units (y grows
 * downwards); a piece is first mirrored left to right, then turned clockwise. None of it changes the calculation.
 */

export interface Point {
  x: number;
  y: number;
}

/** The pitch on which pieces and bends are placed. */
export const GRID = 10;

const sizes: Record<EquipmentKind, { width: number; height: number }> = {
  pump: { width: 40, height: 40 },
  source: { width: 60, height: 40 },
  terminalUnit: { width: 40, height: 120 },
  balancingValve: { width: 40, height: 40 },
  controlValve: { width: 40, height: 40 },
  checkValve: { width: 40, height: 40 },
  isolatingValve: { width: 40, height: 40 },
  strainer: { width: 40, height: 40 },
  tee: { width: 20, height: 20 },
  expansionVessel: { width: 40, height: 40 },
  dpController: { width: 40, height: 40 },
  flowLimiter: { width: 40, height: 40 },
  header: { width: 200, height: 20 },
  decoupler: { width: 40, height: 120 },
  flowStation: { width: 40, height: 40 },
  pressureStation: { width: 20, height: 20 },
};

/** Between two places along a header. */
const HEADER_PITCH = 40;

type Turned = Pick<Equipment, 'kind' | 'rotation' | 'isMirrored'>;

/** Width and height of a piece as it stands, turned. */
export function sizeOf({ kind, rotation }: Pick<Equipment, 'kind' | 'rotation'>): { width: number; height: number } {
  const { width, height } = sizes[kind];
  return rotation === 90 || rotation === 270 ? { width: height, height: width } : { width, height };
}

/** From the centre of the unturned piece to its end, and the way a pipe leaves there. */
function unturnedPort(kind: EquipmentKind, port: Port): { at: Point; leaves: Point } {
  const { width, height } = sizes[kind];
  const sides = { n: { x: 0, y: -1 }, e: { x: 1, y: 0 }, s: { x: 0, y: 1 }, w: { x: -1, y: 0 } };
  if (kind === 'header') return headerPlace(port, width, height);
  if (isPoint(kind)) return { at: { x: 0, y: 0 }, leaves: sides[port as keyof typeof sides] };
  if (kind === 'expansionVessel') return { at: { x: 0, y: height / 2 }, leaves: sides.s };
  if (kind === 'terminalUnit' || kind === 'decoupler')
    return port === 'in' ? { at: { x: 0, y: -height / 2 }, leaves: sides.n } : { at: { x: 0, y: height / 2 }, leaves: sides.s };
  return port === 'in' ? { at: { x: -width / 2, y: 0 }, leaves: sides.w } : { at: { x: width / 2, y: 0 }, leaves: sides.e };
}

/** The ends of a header's bar, and four places along each of its sides. */
function headerPlace(port: Port, width: number, height: number): { at: Point; leaves: Point } {
  if (port === 'e' || port === 'w') {
    const way = port === 'e' ? 1 : -1;
    return { at: { x: (way * width) / 2, y: 0 }, leaves: { x: way, y: 0 } };
  }
  const way = port.startsWith('n') ? -1 : 1;
  return { at: { x: (Number(port.slice(1)) - 2.5) * HEADER_PITCH, y: (way * height) / 2 }, leaves: { x: 0, y: way } };
}

function turn({ x, y }: Point, { rotation, isMirrored }: Turned): Point {
  const mirrored = isMirrored ? -x : x;
  // `+ 0` turns -0 into 0, so that points compare equal.
  if (rotation === 90) return { x: -y + 0, y: mirrored + 0 };
  if (rotation === 180) return { x: -mirrored + 0, y: -y + 0 };
  if (rotation === 270) return { x: y + 0, y: -mirrored + 0 };
  return { x: mirrored + 0, y: y + 0 };
}

/** From the centre of the piece as it stands to one of its ends, and the way a pipe leaves there (a unit step). */
export function portOffset(piece: Turned, port: Port): { at: Point; leaves: Point } {
  const { at, leaves } = unturnedPort(piece.kind, port);
  // The sides of a tee are those of the sheet, however it was turned.
  if (isPoint(piece.kind) && piece.kind !== 'header') return { at, leaves };
  return { at: turn(at, piece), leaves: turn(leaves, piece) };
}

export interface PortPlace extends Point {
  leaves: Point;
  /** The side is only a wish: all sides of a tee are the same point. */
  isFree: boolean;
}

export function portPlace(piece: Equipment, port: Port): PortPlace {
  const { at, leaves } = portOffset(piece, port);
  return { x: piece.x + at.x, y: piece.y + at.y, leaves, isFree: isPoint(piece.kind) && piece.kind !== 'header' };
}

/** The side of a tee that looks towards a point. */
export function sideTowards(from: Point, to: Point): Port {
  const [dx, dy] = [to.x - from.x, to.y - from.y];
  if (Math.abs(dx) >= Math.abs(dy)) return dx >= 0 ? 'e' : 'w';
  return dy >= 0 ? 's' : 'n';
}

export const snap = (value: number): number => Math.round(value / GRID) * GRID;
export const snapPoint = ({ x, y }: Point): Point => ({ x: snap(x), y: snap(y) });

export const pieceOf = (drawing: Drawing, id: string): Equipment | undefined => drawing.equipment.find((piece) => piece.id === id);

/** The box around some pieces. */
export function boundsOf(pieces: Equipment[]): { left: number; top: number; width: number; height: number } {
  const boxes = pieces.map((piece) => ({ ...sizeOf(piece), x: piece.x, y: piece.y }));
  const left = Math.min(...boxes.map((box) => box.x - box.width / 2));
  const top = Math.min(...boxes.map((box) => box.y - box.height / 2));
  return {
    left,
    top,
    width: Math.max(...boxes.map((box) => box.x + box.width / 2)) - left,
    height: Math.max(...boxes.map((box) => box.y + box.height / 2)) - top,
  };
}
