import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';
import type { Refusal } from './connect-pipe';
import type { ChosenValve, Drawing } from './drawing';
import { mapPieces } from './move-pieces';
import { LEAST_AUTHORITY, LEAST_READING_KPA } from './result-faults';
import { chosenValve, genericValves } from './valve-families';

/** Kvs in which control valves are commonly made: the R5 series of preferred numbers (ISO 3), m³/h. */
const kvsSeries = [0.16, 0.25, 0.4, 0.63, 1, 1.6, 2.5, 4, 6.3, 10, 16, 25, 40, 63, 100, 160, 250, 400, 630];

/** Only a generic valve gives way to another: one that somebody chose from a maker's chart is that person's to change. */
export const isGeneric = (valve: ChosenValve | null): boolean => valve !== null && genericValves.some(({ name }) => name === valve.name);

/** Puts in the largest generic balancing valve that still reads well, fully open, at this flow (L/s). */
export function smallerBalancingValve(drawing: Drawing, pieceId: string, flowLs: number): Drawing | Refusal {
  const reads = genericValves.findLast(({ kvs }) => dropAcrossValveKpa(kvs, Math.abs(flowLs)) >= LEAST_READING_KPA);
  if (!reads) return { refused: `Even the smallest generic valve drops less than ${LEAST_READING_KPA} kPa at this flow.` };
  return mapPieces(drawing, new Set([pieceId]), (piece) => {
    if (piece.kind === 'balancingValve') return { ...piece, valve: { ...piece.valve, ...chosenValve(reads) } };
    if (piece.kind === 'terminalUnit' && piece.balancingValve)
      return { ...piece, balancingValve: { ...piece.balancingValve, ...chosenValve(reads) } };
    return piece;
  });
}

/**
 * Gives a terminal's control valve the largest Kvs below its own whose drop at design flow (L/s) is at least the least authority's share of
 * itself with the rest of its branch (the differential now over the branch less the valve's own drop).
 */
export function smallerControlValve(drawing: Drawing, pieceId: string, flowLs: number, authority: number): Drawing | Refusal {
  const unit = drawing.equipment.find(({ id }) => id === pieceId);
  const kvs = unit?.kind === 'terminalUnit' ? (unit.controlValve?.kvs ?? null) : null;
  if (kvs === null) return { refused: 'There is no control valve with a Kvs here.' };
  const dropKpa = dropAcrossValveKpa(kvs, flowLs);
  const restKpa = dropKpa / authority - dropKpa;
  const wanted = kvsSeries.findLast((it) => {
    const its = dropAcrossValveKpa(it, flowLs);
    return it < kvs && its / (its + restKpa) >= LEAST_AUTHORITY;
  });
  if (wanted === undefined) return { refused: 'No smaller control valve of the usual series would reach the authority.' };
  return mapPieces(drawing, new Set([pieceId]), (piece) =>
    piece.kind === 'terminalUnit' && piece.controlValve ? { ...piece, controlValve: { ...piece.controlValve, kvs: wanted } } : piece,
  );
}
