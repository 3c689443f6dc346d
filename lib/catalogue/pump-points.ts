import type { PointFault } from './valve-points';

/** One point of a pump's curves at its nominal speed; null where the maker's curve says nothing there. */
export interface PumpPoint {
  flowLs: number;
  headM: number;
  /** Hydraulic over shaft power, 0 to 1. */
  efficiency: number | null;
  /** Net positive suction head required, m. */
  suctionHeadM: number | null;
}

export type PumpColumn = keyof PumpPoint;

export const FEWEST_PUMP_POINTS = 3;
export const MOST_PUMP_POINTS = 100;
export const LARGEST_FLOW_LS = 10_000;
export const LARGEST_HEAD_M = 1000;
export const LARGEST_SUCTION_HEAD_M = 100;

/**
 * What keeps points from being a pump's curve: three or more, flow rising from point to point, and a head that may stay level but not rise
 * with flow: where it rises one head has two flows, and a pump on such a curve has no single duty point.
 */
export function faultsOfPumpPoints(points: readonly PumpPoint[]): PointFault<PumpColumn>[] {
  const faults: PointFault<PumpColumn>[] = [];
  const last = points.length - 1;
  if (points.length < FEWEST_PUMP_POINTS)
    faults.push({ index: Math.max(last, 0), column: 'flowLs', message: `A curve needs ${FEWEST_PUMP_POINTS} points or more.` });
  if (points.length > MOST_PUMP_POINTS)
    faults.push({ index: last, column: 'flowLs', message: `A curve has up to ${MOST_PUMP_POINTS} points.` });
  points.forEach((point, index) => {
    const before = points[index - 1];
    const outside = (column: PumpColumn, largest: number, words: string) => {
      const value = point[column];
      if (value === null || (value >= 0 && value <= largest)) return false;
      return Boolean(faults.push({ index, column, message: words }));
    };
    const isFlowOut = outside('flowLs', LARGEST_FLOW_LS, `A flow is from 0 to ${LARGEST_FLOW_LS} L/s.`);
    if (!isFlowOut && before && point.flowLs <= before.flowLs)
      faults.push({ index, column: 'flowLs', message: 'This flow stands there twice, or out of order.' });
    const isHeadOut = outside('headM', LARGEST_HEAD_M, `A head is from 0 to ${LARGEST_HEAD_M} m.`);
    if (!isHeadOut && before && point.headM > before.headM)
      faults.push({
        index,
        column: 'headM',
        message: 'The head rises with flow here: one head would have two flows, and no single duty point.',
      });
    outside('efficiency', 1, 'An efficiency is from 0 to 100 %.');
    outside('suctionHeadM', LARGEST_SUCTION_HEAD_M, `A suction head required is from 0 to ${LARGEST_SUCTION_HEAD_M} m.`);
  });
  if (points.length > 0 && points.every(({ headM }) => headM === 0))
    faults.push({ index: 0, column: 'headM', message: 'A pump raises some head: all points have 0.' });
  return faults;
}
