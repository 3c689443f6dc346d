import type { Point } from './piece-geometry';

/**
 * Where a pipe passes another without joining it. Of the two that cross, the level one is drawn with a small hop; a
 * crossing is one of insides alone: pipes that meet at an end or turn on each other do not cross.
 */
export interface Hop {
  /** The level part of the route, from 0. */
  part: number;
  /** Its x on the sheet. */
  x: number;
}

/** Hops of each level pipe by its id, in the order of its route. A pipe whose crossings stay keeps its list. */
export type Hops = ReadonlyMap<string, readonly Hop[]>;

interface Part {
  pipeId: string;
  part: number;
  isLevel: boolean;
  /** The height of a level part, the column of a plumb one. */
  at: number;
  low: number;
  high: number;
}

/** Side of a cell of the register, drawing units: about the length of a pipe. */
const CELL = 200;

/**
 * Keeps the crossings of a drawing up to date. All parts stand in a register of square cells; a call compares the routes
 * with those of the call before (by identity) and looks only where one has changed, so that dragging a piece costs no
 * more than its own pipes. O(parts near the changed ones), not O(n²).
 */
export function crossingRegister(): (routes: ReadonlyMap<string, Point[]>) => Hops {
  const known = new Map<string, { path: Point[]; parts: Part[] }>();
  const cells = new Map<string, Set<Part>>();
  /** By the level pipe, then by both parts that cross. */
  const crossings = new Map<string, Map<string, Hop & { plumbId: string }>>();
  const hopped = new Map<string, Set<string>>();
  let hops = new Map<string, readonly Hop[]>();

  const takeOut = (pipeId: string, stale: Set<string>) => {
    for (const part of known.get(pipeId)?.parts ?? []) for (const cell of cellsOf(part)) cells.get(cell)?.delete(part);
    known.delete(pipeId);
    if (crossings.delete(pipeId)) stale.add(pipeId);
    for (const levelId of hopped.get(pipeId) ?? []) {
      const its = crossings.get(levelId);
      for (const [key, { plumbId }] of its ?? []) if (plumbId === pipeId) its?.delete(key);
      stale.add(levelId);
    }
    hopped.delete(pipeId);
  };

  const note = (level: Part, plumb: Part, stale: Set<string>) => {
    const its = crossings.get(level.pipeId) ?? new Map<string, Hop & { plumbId: string }>();
    its.set(`${level.part} ${plumb.pipeId} ${plumb.part}`, { part: level.part, x: plumb.at, plumbId: plumb.pipeId });
    crossings.set(level.pipeId, its);
    hopped.set(plumb.pipeId, (hopped.get(plumb.pipeId) ?? new Set()).add(level.pipeId));
    stale.add(level.pipeId);
  };

  return (routes) => {
    const stale = new Set<string>();
    const changed = [...routes].filter(([id, path]) => known.get(id)?.path !== path);
    for (const id of [...known.keys()]) if (!routes.has(id)) takeOut(id, stale);
    for (const [id] of changed) takeOut(id, stale);
    for (const [id, path] of changed) {
      const parts = partsOf(id, path);
      known.set(id, { path, parts });
      for (const part of parts) for (const cell of cellsOf(part)) cells.set(cell, (cells.get(cell) ?? new Set()).add(part));
    }
    for (const [id] of changed)
      for (const part of known.get(id)!.parts)
        for (const cell of cellsOf(part))
          for (const other of cells.get(cell) ?? []) {
            const [level, plumb] = part.isLevel ? [part, other] : [other, part];
            if (cross(level, plumb)) note(level, plumb, stale);
          }
    if (stale.size > 0) {
      hops = new Map(hops);
      for (const id of stale) {
        const its = crossings.get(id);
        if (its?.size) hops.set(id, inOrder([...its.values()], known.get(id)!.path));
        else hops.delete(id);
      }
    }
    return hops;
  };
}

function partsOf(pipeId: string, path: Point[]): Part[] {
  return path.slice(1).flatMap((b, part): Part[] => {
    const a = path[part];
    const isLevel = a.y === b.y;
    if (!isLevel && a.x !== b.x) return [];
    const [from, to] = isLevel ? [a.x, b.x] : [a.y, b.y];
    return [{ pipeId, part, isLevel, at: isLevel ? a.y : a.x, low: Math.min(from, to), high: Math.max(from, to) }];
  });
}

function cellsOf({ isLevel, at, low, high }: Part): string[] {
  const fixed = Math.floor(at / CELL);
  const keys: string[] = [];
  for (let cell = Math.floor(low / CELL); cell <= Math.floor(high / CELL); cell++)
    keys.push(isLevel ? `${cell},${fixed}` : `${fixed},${cell}`);
  return keys;
}

const cross = (level: Part, plumb: Part): boolean =>
  level.isLevel &&
  !plumb.isLevel &&
  level.pipeId !== plumb.pipeId &&
  plumb.at > level.low &&
  plumb.at < level.high &&
  level.at > plumb.low &&
  level.at < plumb.high;

function inOrder(hops: Hop[], path: Point[]): Hop[] {
  const along = ({ part, x }: Hop) => x * Math.sign(path[part + 1].x - path[part].x);
  const sorted = [...hops].sort((a, b) => a.part - b.part || along(a) - along(b));
  // Two pipes that run on top of each other are passed with one hop.
  return sorted
    .filter((hop, i) => i === 0 || hop.part !== sorted[i - 1].part || hop.x !== sorted[i - 1].x)
    .map(({ part, x }) => ({ part, x }));
}
