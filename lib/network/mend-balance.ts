import type { BalanceResult } from '@/lib/hydraulics/types';
import { adoptSettings } from './adopt-settings';
import type { Drawing } from './drawing';

/** The drawing as the balance leaves it: its settings in the valves, and its speed at the pumps where those are slowed for the excess. */
export function takeOverBalance(drawing: Drawing, { valves, pumps }: BalanceResult): Drawing {
  const { drawing: set } = adoptSettings(drawing, valves);
  if (set.pumpExcess !== 'speed') return set;
  const speedOf = new Map(pumps.map(({ id, speed }) => [id, speed]));
  return {
    ...set,
    equipment: set.equipment.map((piece) => {
      const speed = piece.kind === 'pump' ? speedOf.get(piece.id) : undefined;
      return piece.kind === 'pump' && speed ? { ...piece, speed: Number(speed.toFixed(4)) } : piece;
    }),
  };
}
