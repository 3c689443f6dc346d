import { v7 as newId } from 'uuid';
import type { Drawing, Storey } from './drawing';

const HEIGHT = 320;
/** From floor to floor, where no other is known. */
export const USUAL_RISE_M = 4;

/** The storey whose band holds a height on the sheet; above and below all bands, the nearest. Null without storeys. */
export function storeyAt(drawing: Drawing, y: number): Storey | null {
  let best: Storey | null = null;
  let bestGap = Infinity;
  for (const storey of drawing.storeys) {
    const gap = Math.max(storey.top - y, y - (storey.top + storey.height), 0);
    if (gap < bestGap) [best, bestGap] = [storey, gap];
  }
  return best;
}

/** Gives the pieces the storeys they now lie in. */
export function withStoreysByPlace(drawing: Drawing, only?: Set<string>): Drawing {
  let isChanged = false;
  const equipment = drawing.equipment.map((piece) => {
    if (only && !only.has(piece.id)) return piece;
    const storeyId = storeyAt(drawing, piece.y)?.id ?? null;
    if (storeyId === piece.storeyId) return piece;
    isChanged = true;
    return { ...piece, storeyId };
  });
  return isChanged ? { ...drawing, equipment } : drawing;
}

/** A storey on top of all or below all, a usual storey height away. */
export function addStorey(drawing: Drawing, where: 'above' | 'below'): Drawing {
  const { storeys } = drawing;
  const top =
    storeys.length === 0
      ? 0
      : where === 'above'
        ? Math.min(...storeys.map((it) => it.top)) - HEIGHT
        : Math.max(...storeys.map((it) => it.top + it.height));
  const elevations = storeys.map((it) => it.elevationM);
  const elevationM =
    storeys.length === 0 ? 0 : where === 'above' ? Math.max(...elevations) + USUAL_RISE_M : Math.min(...elevations) - USUAL_RISE_M;
  const name = freeLevelName(drawing, storeys.length);
  return { ...drawing, storeys: [...storeys, { id: newId(), name, elevationM, top, height: HEIGHT }] };
}

/** "Level 4", or the next number that no storey has. */
export function freeLevelName({ storeys }: Drawing, from: number): string {
  const used = new Set(storeys.map((it) => it.name));
  let number = from;
  while (used.has(`Level ${number}`)) number++;
  return `Level ${number}`;
}

export const isStoreyEmpty = (drawing: Drawing, storeyId: string): boolean =>
  !drawing.equipment.some((piece) => piece.storeyId === storeyId);

/** Takes an empty storey away and closes the gap: what is drawn above it comes down by its height. */
export function removeStorey(drawing: Drawing, storeyId: string): Drawing {
  const gone = drawing.storeys.find(({ id }) => id === storeyId);
  if (!gone || !isStoreyEmpty(drawing, storeyId)) return drawing;
  return shiftAbove({ ...drawing, storeys: drawing.storeys.filter(({ id }) => id !== storeyId) }, gone.top, gone.height);
}

/** Makes a storey's band higher or lower on the sheet; what is drawn above it makes room. */
export function resizeStorey(drawing: Drawing, storeyId: string, height: number): Drawing {
  const storey = drawing.storeys.find(({ id }) => id === storeyId);
  if (!storey) return drawing;
  const shift = storey.height - height;
  const storeys = drawing.storeys.map((it) => (it.id === storeyId ? { ...it, top: it.top + shift, height } : it));
  return shiftAbove({ ...drawing, storeys }, storey.top, shift, storeyId);
}

/**
 * Changes places with the band above or below, with all that is drawn in both. Each keeps its name and its elevation: the
 * order of the bands is how the sheet reads, not how high the storeys lie.
 */
export function moveStorey(drawing: Drawing, storeyId: string, way: 'up' | 'down'): Drawing {
  const falling = [...drawing.storeys].sort((a, b) => a.top - b.top);
  const at = falling.findIndex(({ id }) => id === storeyId);
  const [upper, lower] = way === 'up' ? [falling[at - 1], falling[at]] : [falling[at], falling[at + 1]];
  if (at < 0 || !upper || !lower) return drawing;
  const shifts = new Map([
    [lower.id, upper.top - lower.top],
    [upper.id, lower.top + lower.height - upper.height - upper.top],
  ]);
  const bandOf = ({ y }: { y: number }) => [upper, lower].find(({ top, height }) => y >= top && y < top + height)?.id;
  const shifted = <T extends { y: number }>(item: T, id: string | null | undefined): T => {
    const by = id ? shifts.get(id) : undefined;
    return by ? { ...item, y: item.y + by } : item;
  };
  return {
    ...drawing,
    storeys: drawing.storeys.map((it) => (shifts.has(it.id) ? { ...it, top: it.top + shifts.get(it.id)! } : it)),
    equipment: drawing.equipment.map((piece) => shifted(piece, piece.storeyId)),
    pipes: drawing.pipes.map((pipe) =>
      pipe.bends.some(bandOf) ? { ...pipe, bends: pipe.bends.map((bend) => shifted(bend, bandOf(bend))) } : pipe,
    ),
  };
}

/** Moves what is drawn above a height down by `by` (up where it is negative), with the bands there. */
export function shiftAbove(drawing: Drawing, top: number, by: number, except?: string): Drawing {
  const down = <T extends { y: number }>(item: T): T => (item.y < top ? { ...item, y: item.y + by } : item);
  return {
    ...drawing,
    storeys: drawing.storeys.map((it) => (it.id !== except && it.top < top ? { ...it, top: it.top + by } : it)),
    equipment: drawing.equipment.map(down),
    pipes: drawing.pipes.map((pipe) => (pipe.bends.some((bend) => bend.y < top) ? { ...pipe, bends: pipe.bends.map(down) } : pipe)),
  };
}
