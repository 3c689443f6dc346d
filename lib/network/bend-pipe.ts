import type { Drawing, PipeEnd } from './drawing';
import { isPoint } from './drawing';
import { pieceOf, type Point } from './piece-geometry';
import { routeOfPipe } from './pipe-route';

/** How far a pipe goes straight on from the end of a piece before it turns, drawing units. */
const STUB = 20;
/** As many bends as `pipeSchema` takes. */
const MOST_BENDS = 20;

/** Whether a pipe may turn at once where it begins and where it ends, as it may at a tee. */
export interface EndTurns {
  atStart: boolean;
  atEnd: boolean;
}

/**
 * The corners of a route once one straight part of it was moved sideways: a level part to the height `to`, a plumb one
 * to the column `to`. Both ends stay where they are; what joins them to the moved part is drawn along the sheet.
 */
export function movePart(path: Point[], part: number, to: number, turns: EndTurns): Point[] {
  return withoutNeedless(movedPart(path, part, to, turns).path);
}

/** The same for a corner, which takes both parts that meet there along; `corner` counts from 1, the first after the start. */
export function moveCorner(path: Point[], corner: number, to: Point, turns: EndTurns): Point[] {
  const place = (at: Point[], part: number) => (isLevel(at, part) ? to.y : to.x);
  const first = movedPart(path, corner - 1, place(path, corner - 1), turns);
  const second = movedPart(first.path, first.part + 1, place(first.path, first.part + 1), turns);
  return withoutNeedless(second.path);
}

export const isLevel = (path: Point[], part: number): boolean => path[part].y === path[part + 1].y;

/** Needless corners still in, so that the moved part can be told by its place in the list. */
function movedPart(path: Point[], part: number, to: number, turns: EndTurns): { path: Point[]; part: number } {
  const level = isLevel(path, part);
  const [a, b] = [path[part], path[part + 1]];
  const moved = ({ x, y }: Point): Point => (level ? { x, y: to } : { x: to, y });
  const [start, end] = [path.slice(0, part), path.slice(part + 2)];
  if (part === 0) start.push(a, towards(a, b, turns.atStart));
  else if (path[part - 1][level ? 'y' : 'x'] === a[level ? 'y' : 'x']) start.push(a);
  if (part === path.length - 2) end.unshift(towards(b, a, turns.atEnd), b);
  else if (path[part + 2][level ? 'y' : 'x'] === b[level ? 'y' : 'x']) end.unshift(b);
  const [from, upTo] = [part === 0 ? start.at(-1)! : a, part === path.length - 2 ? end[0] : b];
  return { path: [...start, moved(from), moved(upTo), ...end], part: start.length };
}

/** Where the pipe turns off near its end: right there, or a little way out, but never past the middle. */
function towards(from: Point, to: Point, mayTurn: boolean): Point {
  if (mayTurn) return from;
  const length = Math.abs(to.x - from.x) + Math.abs(to.y - from.y);
  const out = Math.min(STUB, length / 2);
  return { x: from.x + Math.sign(to.x - from.x) * out, y: from.y + Math.sign(to.y - from.y) * out };
}

/** Leaves out corners that stand twice or on a straight line, also where the line would double back over itself. */
function withoutNeedless(path: Point[]): Point[] {
  const kept: Point[] = [];
  path.forEach((point, i) => {
    const isEnd = i === path.length - 1;
    for (;;) {
      const [before, last] = [kept.at(-2), kept.at(-1)];
      if (last && kept.length > 1 && last.x === point.x && last.y === point.y) kept.pop();
      else if (before && last && ((before.x === last.x && last.x === point.x) || (before.y === last.y && last.y === point.y))) kept.pop();
      else break;
    }
    const last = kept.at(-1);
    if (isEnd || !last || last.x !== point.x || last.y !== point.y) kept.push(point);
  });
  return kept;
}

/** The drawing with a pipe's route taken as its bends; null where that would be more bends than a pipe may have. */
export function withRoute(drawing: Drawing, pipeId: string, path: Point[]): Drawing | null {
  const bends = path.slice(1, -1);
  if (bends.length > MOST_BENDS) return null;
  return { ...drawing, pipes: drawing.pipes.map((pipe) => (pipe.id === pipeId ? { ...pipe, bends } : pipe)) };
}

/** A pipe's route and how it may turn at its ends, as `movePart` and `moveCorner` take them. */
export function wayOf(drawing: Drawing, pipeId: string): { path: Point[]; turns: EndTurns } | null {
  const pipe = drawing.pipes.find(({ id }) => id === pipeId);
  if (!pipe) return null;
  const [from, to] = [pieceOf(drawing, pipe.from.equipmentId), pieceOf(drawing, pipe.to.equipmentId)];
  const path = from && to && routeOfPipe(pipe, new Map([from, to].map((piece) => [piece.id, piece])));
  return path ? { path, turns: { atStart: mayTurnAt(drawing, pipe.from), atEnd: mayTurnAt(drawing, pipe.to) } } : null;
}

function mayTurnAt(drawing: Drawing, end: PipeEnd): boolean {
  const kind = pieceOf(drawing, end.equipmentId)?.kind;
  return kind !== undefined && isPoint(kind) && kind !== 'header';
}

/** Gives pipes back the way that they find by themselves. */
export const straightenPipes = (drawing: Drawing, pipeIds: ReadonlySet<string>): Drawing => ({
  ...drawing,
  pipes: drawing.pipes.map((pipe) => (pipeIds.has(pipe.id) && pipe.bends.length > 0 ? { ...pipe, bends: [] } : pipe)),
});
