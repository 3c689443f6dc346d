import type { BalancedValve } from '@/lib/hydraulics/types';
import type { ChosenValve, Drawing, Equipment } from './drawing';
import { unitLinkId } from './drawing-to-document';

/** A hundredth of a turn is finer than any handwheel shows, and is what the schedule prints. */
function onHandwheel(setting: number, { kvTable }: ChosenValve): number {
  const rounded = Math.round(setting * 100) / 100;
  return Math.min(Math.max(rounded, kvTable[0]?.setting ?? rounded), kvTable.at(-1)?.setting ?? rounded);
}

/** The drawing with the settings of a balance in its valves; valves that are locked, or that the balance does not name, stay. */
export function adoptSettings(drawing: Drawing, valves: BalancedValve[]): { drawing: Drawing; count: number } {
  const settingOf = new Map(valves.map(({ id, setting }) => [id, setting]));
  let count = 0;
  const adopted = (valve: ChosenValve, linkId: string): ChosenValve => {
    const exact = settingOf.get(linkId);
    if (exact === undefined || valve.isLocked) return valve;
    const settingTurns = onHandwheel(exact, valve);
    if (valve.settingTurns === settingTurns) return valve;
    count += 1;
    return { ...valve, settingTurns };
  };
  const equipment = drawing.equipment.map((piece): Equipment => {
    if (piece.kind === 'balancingValve') {
      const valve = adopted(piece.valve, piece.id);
      return valve === piece.valve ? piece : { ...piece, valve };
    }
    if (piece.kind !== 'terminalUnit' || !piece.balancingValve) return piece;
    const valve = adopted(piece.balancingValve, unitLinkId(piece.id, 'balancing'));
    return valve === piece.balancingValve ? piece : { ...piece, balancingValve: valve };
  });
  return { drawing: count ? { ...drawing, equipment } : drawing, count };
}
