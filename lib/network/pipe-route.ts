import type { DrawingPipe, Equipment } from './drawing';
import { portPlace, type Point, type PortPlace } from './piece-geometry';

const STUB = 20;
const CORNER_COST = 24;
const WRONG_SIDE_COST = 2000;
const SIDEWAYS_COST = 400;
const OTHER_SIDE_OF_TEE_COST = 14;

/** The corners of a pipe on the drawing, ends included: straight lines along the sheet, through its bends in turn. */
export function routeOfPipe(pipe: DrawingPipe, pieces: Map<string, Equipment>): Point[] | null {
  const from = pieces.get(pipe.from.equipmentId);
  const to = pieces.get(pipe.to.equipmentId);
  if (!from || !to) return null;
  return route(portPlace(from, pipe.from.port), portPlace(to, pipe.to.port), pipe.bends);
}

/** The same between any two places; an end without `leaves` (the pointer, a bend) may be met from any side. */
export function route(from: Point & Partial<PortPlace>, to: Point & Partial<PortPlace>, bends: Point[] = []): Point[] {
  const stops = [from, ...bends, to];
  const path: Point[] = [{ x: from.x, y: from.y }];
  for (let i = 1; i < stops.length; i++) path.push(...leg(stops[i - 1], stops[i]).slice(1));
  return withoutStraightCorners(path);
}

type End = Point & Partial<PortPlace>;

/** The cheapest of the usual ways between two points: straight, one corner, two corners, or around. */
function leg(a: End, b: End): Point[] {
  let best: Point[] | null = null;
  let bestCost = Infinity;
  for (const corners of candidates(a, b)) {
    const path = withoutStraightCorners([{ x: a.x, y: a.y }, ...corners, { x: b.x, y: b.y }]);
    const cost = costOf(path, a, b);
    if (cost < bestCost) [best, bestCost] = [path, cost];
  }
  return best ?? [a, b];
}

function candidates(a: End, b: End): Point[][] {
  const middle = (from: number, to: number) => Math.round((from + to) / 20) * 10;
  const columns = [
    middle(a.x, b.x),
    Math.min(a.x, b.x) - STUB * 1.5,
    Math.max(a.x, b.x) + STUB * 1.5,
    a.x + STUB,
    a.x - STUB,
    b.x + STUB,
    b.x - STUB,
  ];
  const rows = [
    middle(a.y, b.y),
    Math.min(a.y, b.y) - STUB * 1.5,
    Math.max(a.y, b.y) + STUB * 1.5,
    a.y + STUB,
    a.y - STUB,
    b.y + STUB,
    b.y - STUB,
  ];
  const ways: Point[][] = a.x === b.x || a.y === b.y ? [[]] : [];
  ways.push([{ x: b.x, y: a.y }], [{ x: a.x, y: b.y }]);
  for (const x of columns)
    ways.push([
      { x, y: a.y },
      { x, y: b.y },
    ]);
  for (const y of rows)
    ways.push([
      { x: a.x, y },
      { x: b.x, y },
    ]);
  // Around a corner: out of one end, along, and into the other from its own side.
  for (const x of columns.slice(3))
    for (const y of rows.slice(3)) {
      ways.push(
        [
          { x, y: a.y },
          { x, y },
          { x: b.x, y },
        ],
        [
          { x: a.x, y },
          { x, y },
          { x, y: b.y },
        ],
      );
    }
  // Back around both pieces, where their ends look away from each other.
  const [out, into] = [stubOf(a), stubOf(b)];
  for (const y of [...rows.slice(0, 1), Math.min(a.y, b.y) - 2 * STUB, Math.max(a.y, b.y) + 2 * STUB])
    ways.push([out, { x: out.x, y }, { x: into.x, y }, into]);
  for (const x of [...columns.slice(0, 1), Math.min(a.x, b.x) - 2 * STUB, Math.max(a.x, b.x) + 2 * STUB])
    ways.push([out, { x, y: out.y }, { x, y: into.y }, into]);
  return ways;
}

const stubOf = ({ x, y, leaves }: End): Point => ({ x: x + STUB * (leaves?.x ?? 0), y: y + STUB * (leaves?.y ?? 0) });

function costOf(path: Point[], a: End, b: End): number {
  let cost = (path.length - 2) * CORNER_COST;
  for (let i = 1; i < path.length; i++) cost += Math.abs(path[i].x - path[i - 1].x) + Math.abs(path[i].y - path[i - 1].y);
  return cost + sideCost(path[0], path[1], a) + sideCost(path.at(-1)!, path.at(-2)!, b);
}

/** A pipe should leave a piece the way its port looks. */
function sideCost(at: Point, next: Point, end: End): number {
  if (!end.leaves) return 0;
  const along = Math.sign(next.x - at.x) * end.leaves.x + Math.sign(next.y - at.y) * end.leaves.y;
  if (along > 0) return 0;
  if (end.isFree) return OTHER_SIDE_OF_TEE_COST;
  return along < 0 ? WRONG_SIDE_COST : SIDEWAYS_COST;
}

function withoutStraightCorners(path: Point[]): Point[] {
  const kept: Point[] = [];
  for (const point of path) {
    const [before, last] = [kept.at(-2), kept.at(-1)];
    if (last && last.x === point.x && last.y === point.y) continue;
    const isStraight =
      before &&
      last &&
      ((before.x === last.x && last.x === point.x && between(before.y, last.y, point.y)) ||
        (before.y === last.y && last.y === point.y && between(before.x, last.x, point.x)));
    if (isStraight) kept.pop();
    kept.push(point);
  }
  return kept.length > 1 ? kept : path.slice(0, 2);
}

const between = (a: number, b: number, c: number) => (a <= b && b <= c) || (a >= b && b >= c);

export interface RoutePlace extends Point {
  distance: number;
  /** Which straight part of the route, from 0. */
  part: number;
  /** The way the route runs there, a unit step from its beginning to its end. */
  along: Point;
}

/** The point of a route nearest to another point. */
export function nearestOnRoute(path: Point[], point: Point): RoutePlace {
  let best: RoutePlace | null = null;
  for (let part = 0; part < path.length - 1; part++) {
    const [a, b] = [path[part], path[part + 1]];
    const x = Math.min(Math.max(point.x, Math.min(a.x, b.x)), Math.max(a.x, b.x));
    const y = Math.min(Math.max(point.y, Math.min(a.y, b.y)), Math.max(a.y, b.y));
    const distance = Math.hypot(point.x - x, point.y - y);
    if (!best || distance < best.distance) best = { x, y, distance, part, along: { x: Math.sign(b.x - a.x), y: Math.sign(b.y - a.y) } };
  }
  return best!;
}

/** The middle of the longest straight part: where an arrow or a figure stands best. */
export function labelPlace(path: Point[]): Point & { along: Point; length: number } {
  let best = { x: path[0].x, y: path[0].y, along: { x: 1, y: 0 }, length: -1 };
  for (let i = 1; i < path.length; i++) {
    const [a, b] = [path[i - 1], path[i]];
    const length = Math.abs(b.x - a.x) + Math.abs(b.y - a.y);
    if (length > best.length)
      best = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2, along: { x: Math.sign(b.x - a.x), y: Math.sign(b.y - a.y) }, length };
  }
  return best;
}
