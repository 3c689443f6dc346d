import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { Drawing, Equipment } from '@/lib/network/drawing';
import { sizeOf, type Point } from '@/lib/network/piece-geometry';
import { symbolOf } from '@/lib/network/symbol-shapes';
import { verdictOf, type Verdict } from './deviation-mark';
import { routeKept } from './canvas-elements';
import type { Results } from './editor-context';

/** A colour of app/globals.css. */
export type Ink = 'ink' | 'quiet' | 'petrol' | 'brass' | 'high' | 'low';

/** Everything of one colour, as a single path in the units of the drawing. */
interface Layer {
  ink: Ink;
  path: Path2D;
  /** On the screen; 0 is filled instead. */
  widthPx: number;
  opacity?: number;
}

export interface FarSheet {
  pipes: Layer[];
  /** Dots, for where symbols would be specks. */
  dots: Layer[];
  /** By parts of the sheet: symbols are many lines, and only those in view are drawn. */
  symbols: { x: number; y: number; layers: Layer[] }[];
}

/** From how near symbols are drawn instead of dots; beneath, a piece is a few pixels. */
export const SYMBOLS_FROM_ZOOM = 0.25;

/** Width and height of a part of the sheet, in drawing units. */
export const PART = 800;

const DOT = 16;

/** A drawing prepared to be drawn from far away: what has one colour is one path, so that a thousand terminals are a few strokes. */
export function farSheetOf(
  drawing: Drawing,
  selected: ReadonlySet<string>,
  results: Pick<Results, 'figures' | 'faulty' | 'index'>,
  band: StripBand,
): FarSheet {
  const pieces = new Map(drawing.equipment.map((piece) => [piece.id, piece]));
  const layers = { index: new Path2D(), supply: new Path2D(), return: new Path2D(), faulty: new Path2D(), selected: new Path2D() };
  for (const pipe of drawing.pipes) {
    const route = routeKept(pipe, pieces);
    if (!route) continue;
    if (results.index.has(pipe.id)) trace(layers.index, route);
    trace(selected.has(pipe.id) ? layers.selected : results.faulty.has(pipe.id) ? layers.faulty : layers[pipe.circuit], route);
  }
  const dots = new Map<Ink, Path2D>();
  const symbols = new Map<string, { x: number; y: number; paths: Map<Ink, Path2D> }>();
  for (const piece of drawing.equipment) {
    const percent = piece.kind === 'terminalUnit' ? (results.figures?.pieces.get(piece.id)?.percentOfDesign ?? null) : null;
    const verdict = percent === null ? 'within' : verdictOf(percent, band);
    const ink = selected.has(piece.id) ? 'brass' : results.faulty.has(piece.id) ? 'high' : verdict === 'within' ? 'ink' : verdict;
    addDot(pathOf(dots, ink), piece, verdict);
    const [x, y] = [Math.floor(piece.x / PART) * PART, Math.floor(piece.y / PART) * PART];
    const part = symbols.get(`${x} ${y}`) ?? { x, y, paths: new Map<Ink, Path2D>() };
    symbols.set(`${x} ${y}`, part);
    addSymbol(pathOf(part.paths, ink), piece, verdict);
  }
  return {
    pipes: [
      { ink: 'petrol', path: layers.index, widthPx: 5, opacity: 0.25 },
      { ink: 'quiet', path: layers.return, widthPx: 0.8 },
      { ink: 'ink', path: layers.supply, widthPx: 1 },
      { ink: 'high', path: layers.faulty, widthPx: 1.5 },
      { ink: 'brass', path: layers.selected, widthPx: 2 },
    ],
    dots: [...dots].map(([ink, path]) => ({ ink, path, widthPx: 0 })),
    symbols: [...symbols.values()].map(({ x, y, paths }) => ({
      x,
      y,
      layers: [...paths].map(([ink, path]) => ({ ink, path, widthPx: 1 })),
    })),
  };
}

const pathOf = (paths: Map<Ink, Path2D>, ink: Ink): Path2D => {
  const path = paths.get(ink) ?? new Path2D();
  paths.set(ink, path);
  return path;
};

function trace(path: Path2D, route: Point[]): void {
  route.forEach(({ x, y }, i) => (i ? path.lineTo(x, y) : path.moveTo(x, y)));
}

/** Joints are where lines meet: no dot is needed there. A terminal that is low is a lower half, one that is high an upper one: not told by colour alone. */
function addDot(path: Path2D, piece: Equipment, verdict: Verdict): void {
  if (piece.kind === 'tee') return;
  const { width, height } = sizeOf(piece);
  const isLong = piece.kind === 'terminalUnit' || piece.kind === 'header' || piece.kind === 'source';
  const [across, down] = isLong ? [Math.max(width - 8, DOT), Math.max(height - 24, DOT)] : [DOT, DOT];
  const top = piece.y - down / 2 + (verdict === 'low' ? down / 2 : 0);
  path.rect(piece.x - across / 2, top, across, verdict === 'within' ? down : down / 2);
}

function addSymbol(path: Path2D, piece: Equipment, verdict: Verdict): void {
  path.addPath(
    symbolPath(piece),
    new DOMMatrix()
      .translate(piece.x, piece.y)
      .rotate(piece.rotation)
      .scale(piece.isMirrored ? -1 : 1, 1),
  );
  if (verdict === 'within') return;
  const way = verdict === 'low' ? 1 : -1;
  path.addPath(new Path2D(`M18 ${-6 * way}h16l-8 ${14 * way}Z`), new DOMMatrix().translate(piece.x, piece.y));
}

const symbolPaths = new Map<string, Path2D>();

/** One path a symbol, however many pieces have it. */
function symbolPath(piece: Equipment): Path2D {
  const d = symbolOf(piece)
    .map((stroke) => stroke.d)
    .join('');
  const known = symbolPaths.get(d);
  if (known) return known;
  const made = new Path2D(d);
  symbolPaths.set(d, made);
  return made;
}
