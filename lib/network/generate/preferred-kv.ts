import { dropAcrossValveKpa } from '@/lib/hydraulics/valve-coefficient';

/** The five steps of a decade of the R5 series of preferred numbers (ISO 3), in which the Kvs of control valves usually go: common practice, no source. */
const STEPS = [1, 1.6, 2.5, 4, 6.3];

/** Kvs from 0.1 to 6300 m³/h at 1 bar, rising. */
export const preferredKvs: readonly number[] = [0.1, 1, 10, 100, 1000].flatMap((decade) =>
  STEPS.map((step) => Number((step * decade).toPrecision(3))),
);

/** The smallest preferred Kv that costs a flow (L/s) no more than a drop (kPa). */
export const kvForMostDrop = (flowLs: number, mostDropKpa: number, densityKgM3: number): number =>
  preferredKvs.find((kv) => dropAcrossValveKpa(kv, flowLs, densityKgM3) <= mostDropKpa) ?? preferredKvs.at(-1)!;

/** Below a half a control valve no longer governs its branch; widely taught, domain facts 5.6. */
export const LEAST_AUTHORITY = 0.5;
/** Above this a valve's drop is no longer worth its authority; common practice, no source. */
const MOST_DROP_KPA = 60;

/**
 * Kvs of a terminal's control valve: the largest with an authority of at least 0.5 in its branch, that is with a drop at design flow no less than
 * that of all else in the branch (`restKpa`: coil, strainer, balancing valve fully open), N = dpv/(dpv + dpc), domain facts 5.6; where that costs more
 * than 60 kPa, the next larger one. The branch's run-outs, a fraction of a kPa, are left out.
 */
export function controlKvs(flowLs: number, restKpa: number, densityKgM3: number): number {
  const dropOf = (kv: number) => dropAcrossValveKpa(kv, flowLs, densityKgM3);
  const authority = (kv: number) => dropOf(kv) / (dropOf(kv) + restKpa);
  const at = preferredKvs.findLastIndex((kv) => authority(kv) >= LEAST_AUTHORITY);
  if (at < 0) return preferredKvs[0];
  const isDear = dropOf(preferredKvs[at]) > MOST_DROP_KPA && at + 1 < preferredKvs.length;
  return preferredKvs[isDear ? at + 1 : at];
}
