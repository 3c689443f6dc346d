import type { Drawing, Equipment } from './drawing';

const ACROSS = 150;
const DOWN = 160;
const ROOM = 100;

/** Gives every piece a place: a column a step from the pumps on, a band a storey, one below the other within. Only the layout changes. */
export function layered(drawing: Drawing): Drawing {
  const column = columnsFrom(drawing);
  const rows = new Map<string, number>();
  const rowOf = new Map<string, number>();
  const most = new Map<string | null, number>();
  for (const piece of drawing.equipment) {
    const key = `${piece.storeyId} ${column.get(piece.id)}`;
    const row = rows.get(key) ?? 0;
    rows.set(key, row + 1);
    rowOf.set(piece.id, row);
    most.set(piece.storeyId, Math.max(most.get(piece.storeyId) ?? 0, row + 1));
  }
  let top = 0;
  const storeys = [...drawing.storeys]
    .sort((a, b) => b.elevationM - a.elevationM)
    .map((storey) => {
      const height = Math.max(most.get(storey.id) ?? 1, 1) * DOWN + ROOM;
      const placed = { ...storey, top, height };
      top += height;
      return placed;
    });
  const topOf = new Map(storeys.map((storey) => [storey.id, storey.top]));
  const equipment = drawing.equipment.map((piece): Equipment => ({
    ...piece,
    x: (column.get(piece.id) ?? 0) * ACROSS,
    y: (topOf.get(piece.storeyId ?? '') ?? 0) + ROOM + (rowOf.get(piece.id) ?? 0) * DOWN,
  }));
  return { ...drawing, storeys, equipment };
}

/** Steps along the pipes as they are drawn, from the pumps, then from whatever those do not lead to. */
function columnsFrom({ equipment, pipes }: Drawing): Map<string, number> {
  const next = new Map<string, string[]>();
  for (const { from, to } of pipes) next.set(from.equipmentId, [...(next.get(from.equipmentId) ?? []), to.equipmentId]);
  const column = new Map<string, number>();
  const starts = [...equipment.filter(({ kind }) => kind === 'pump'), ...equipment];
  for (const start of starts) {
    if (column.has(start.id)) continue;
    column.set(start.id, 0);
    const waiting = [start.id];
    for (let i = 0; i < waiting.length; i++) {
      const here = waiting[i]!;
      for (const id of next.get(here) ?? []) {
        if (column.has(id)) continue;
        column.set(id, column.get(here)! + 1);
        waiting.push(id);
      }
    }
  }
  return column;
}
