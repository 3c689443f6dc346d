import { kvAtSetting, largestSetting, settingAtKv } from '@/lib/hydraulics/links/balancing-valve';
import type { BalancingValveLink } from '@/lib/hydraulics/types';

/** Answer of a flow ratio to the Kv, both as logarithms, that two readings may tell: less or more is measuring error. */
const LEAST_ANSWER = 0.2;
const MOST_ANSWER = 1.2;

/** Where a valve should be set so that its ratio is multiplied by `factor`. */
export interface ThrottleTarget {
  setting: number;
  kv: number;
}

/**
 * The valve's drop and what is behind it share what the group has, dp + rest · (q/design)² = constant: with the flow q·factor the
 * valve is left with the remainder. `restKpa` is the design's drop behind the valve at its present flow.
 */
export function kvByRest(kv: number, dropKpa: number, restKpa: number, factor: number): number {
  const left = Math.max(dropKpa + restKpa * (1 - factor * factor), 0.02 * (dropKpa + restKpa));
  return kv * factor * Math.sqrt(Math.max(dropKpa, 1e-6) / left);
}

/** The Kv at which the line through the last two pairs (logarithms of Kv and ratio over reference) meets 1; null where they do not tell. */
export function kvBySecant(pairs: { kv: number; quotient: number }[]): number | null {
  const last = pairs[pairs.length - 1];
  const before = pairs.findLast((pair) => Math.abs(Math.log(pair.kv / last.kv)) > 1e-9);
  if (!before || last.quotient <= 0 || before.quotient <= 0) return null;
  const answer = Math.log(last.quotient / before.quotient) / Math.log(last.kv / before.kv);
  const bounded = Math.min(Math.max(answer, LEAST_ANSWER), MOST_ANSWER);
  return last.kv * Math.exp(-Math.log(last.quotient) / bounded);
}

/** The nearest setting that the valve's scale has. */
export function settingForKv({ kvTable, settingStep }: BalancingValveLink, kv: number): ThrottleTarget {
  const exact = settingAtKv(kvTable, kv);
  const stepped = settingStep ? Number((Math.round(exact / settingStep) * settingStep).toPrecision(12)) : exact;
  const setting = Math.min(Math.max(stepped, kvTable[0].setting), largestSetting(kvTable));
  return { setting, kv: kvAtSetting(kvTable, setting) };
}
