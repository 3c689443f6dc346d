import type { MouseEvent } from 'react';
import type { Drawing } from '@/lib/network/drawing';
import type { Point } from '@/lib/network/piece-geometry';
import { pipeAt } from '@/lib/network/split-pipe';
import { selectOnly, type CanvasStore } from './canvas-state';

/** How near to a piece, in px on the screen, a press from far away is taken for it. */
const NEAR_PX = 12;

const isAdding = (event: MouseEvent) => event.shiftKey || event.ctrlKey || event.metaKey;

/** From far away pieces are no parts of the page: a press selects the nearest one, or the pipe beneath it, or nothing. */
export function selectNear(store: CanvasStore, drawing: Drawing, at: Point, event: MouseEvent, zoom: number): void {
  const within = NEAR_PX / zoom;
  let best: { id: string; away: number } | null = null;
  for (const { id, x, y } of drawing.equipment) {
    const away = Math.hypot(x - at.x, y - at.y);
    if (away <= Math.max(within, 30) && (!best || away < best.away)) best = { id, away };
  }
  const before = isAdding(event) ? store.getState() : { pieces: [], pipes: [] };
  const pipe = best ? null : pipeAt(drawing, at, within);
  selectOnly(store, best ? [...before.pieces, best.id] : before.pieces, pipe ? [...before.pipes, pipe.pipe.id] : before.pipes);
}

/** What a box drawn from far away holds: the pieces in it and the pipes among them. One without a size is a press, not a box. */
export function selectBox(store: CanvasStore, { equipment, pipes }: Drawing, a: Point, b: Point): void {
  if (a.x === b.x || a.y === b.y) return;
  const inside = new Set(
    equipment
      .filter(({ x, y }) => x >= Math.min(a.x, b.x) && x <= Math.max(a.x, b.x) && y >= Math.min(a.y, b.y) && y <= Math.max(a.y, b.y))
      .map(({ id }) => id),
  );
  const inner = pipes.filter(({ from, to }) => inside.has(from.equipmentId) && inside.has(to.equipmentId));
  selectOnly(
    store,
    inside,
    inner.map(({ id }) => id),
  );
}
