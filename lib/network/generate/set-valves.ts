import { balance } from '@/lib/hydraulics/balance';
import type { BalanceResult } from '@/lib/hydraulics/types';
import { adoptSettings } from '../adopt-settings';
import type { ChosenValve, Drawing, Equipment } from '../drawing';
import { unitLinkId } from '../drawing-to-document';
import { readableTable, type ValveWish } from './balancing-valve-choice';
import { genericPump } from './generic-pump';
import { designFlowOfLinks, solvableDocument } from './solvable-document';

export interface SetDrawing {
  drawing: Drawing;
  balance: BalanceResult;
  /** Valves that were locked short of fully open, because they would not read enough. */
  locked: number;
}

/**
 * Balances a drawing whose pump is not chosen yet: all valves at their settings, a generic pump for the duty found. Valves are opened no further than
 * they read `minReadingKpa` at design flow; one that its circuit would have opened further is locked there, so that a later balance leaves it.
 * Answers a sentence where the loop has no balance. `pumpSurplus` is how much more head than the duty's the pump gives at design flow (1: none).
 */
export function setValves(piped: Drawing, reading: Omit<ValveWish, 'sizes'>, pumpSurplus = 1): SetDrawing | { unfit: string } {
  const flowOf = designFlowOfLinks(solvableDocument(piped));
  const limited = eachValve(piped, (valve, linkId) => {
    const kvTable = readableTable(valve, flowOf.get(linkId) ?? 0, reading);
    return kvTable === valve.kvTable ? valve : { ...valve, kvTable };
  });
  const balanced = balance(solvableDocument(limited));
  const duty = balanced.pumps[0];
  const lacking = balanced.warnings.find(({ code }) => code === 'pump-too-small' || code === 'not-converged');
  if (!duty || !balanced.converged || lacking) {
    const head = duty ? `it would need a pump of ${Math.round(duty.requiredHeadM)} m` : 'its flows do not add up';
    return { unfit: `This loop cannot be balanced: ${head}. Look for a flow, a coil drop or a length that is out of proportion.` };
  }

  const fullTable = new Map<string, ChosenValve>();
  eachValve(piped, (valve, linkId) => (fullTable.set(linkId, valve), valve));
  const isOpen = new Set(balanced.valves.filter(({ state }) => state !== 'throttled').map(({ id }) => id));
  let locked = 0;
  const set = eachValve(adoptSettings(limited, balanced.valves).drawing, (valve, linkId) => {
    const { kvTable } = fullTable.get(linkId)!;
    if (kvTable === valve.kvTable) return valve;
    const isLocked = isOpen.has(linkId);
    if (isLocked) locked += 1;
    return { ...valve, kvTable, isLocked };
  });
  const pump = genericPump(duty.flowLs, duty.requiredHeadM * pumpSurplus);
  const equipment = set.equipment.map((piece) => (piece.kind === 'pump' ? { ...piece, ...pump } : piece));
  return { drawing: { ...set, equipment }, balance: balanced, locked };
}

/** The same drawing with each of its balancing valves changed, by its link's id. */
function eachValve(drawing: Drawing, change: (valve: ChosenValve, linkId: string) => ChosenValve): Drawing {
  const equipment = drawing.equipment.map((piece): Equipment => {
    if (piece.kind === 'balancingValve') return { ...piece, valve: change(piece.valve, piece.id) };
    if (piece.kind !== 'terminalUnit' || !piece.balancingValve) return piece;
    return { ...piece, balancingValve: change(piece.balancingValve, unitLinkId(piece.id, 'balancing')) };
  });
  return { ...drawing, equipment };
}
