import type { EquipmentOf } from '../drawing';

/**
 * A pump's curves from its duty, for a draft whose pump is not chosen yet; our own and no maker's. Head falls from 1.25 of the duty's at no flow, through
 * the duty, H = H0 (1.25 - 0.25 (Q/Q0)²); efficiency is best, 0.68, at the duty. Flow in L/s and head in m, both above 0.
 */
export function genericPump(dutyFlowLs: number, dutyHeadM: number): Pick<EquipmentOf<'pump'>, 'curve' | 'efficiency'> {
  const flowAt = (part: number) => Number((part * dutyFlowLs).toPrecision(6));
  return {
    curve: [0, 0.4, 0.8, 1, 1.3, 1.6].map((part) => ({ flowLs: flowAt(part), headM: upTo(dutyHeadM * (SHUT_OFF - FALL * part * part)) })),
    efficiency: efficiencies.map(([part, fraction]) => ({ flowLs: flowAt(part), fraction })),
  };
}

const SHUT_OFF = 1.25;
const FALL = SHUT_OFF - 1;
const efficiencies = [
  [0.2, 0.25],
  [0.5, 0.5],
  [0.8, 0.64],
  [1, 0.68],
  [1.3, 0.66],
  [1.6, 0.56],
] as const;

/** Rounded up, so that the duty is never missed by a rounding. */
const upTo = (headM: number) => Math.ceil(headM * 1000) / 1000;
