import { kvAtSetting, settingAtKv } from '@/lib/hydraulics/links/balancing-valve';
import { dropAcrossValveKpa, kvForFlow } from '@/lib/hydraulics/valve-coefficient';
import type { ChosenValve, KvPoint } from '../drawing';

/** One size of a family that balancing valves are chosen from. */
export interface ValveSize {
  name: string;
  kvTable: KvPoint[];
  stepTurns?: number | null;
}

export interface ValveWish {
  /** Rising in Kv. */
  sizes: readonly ValveSize[];
  minReadingKpa: number;
  densityKgM3: number;
}

/** What the meter reads across a valve's measuring points at a flow, kPa: over its orifice where it has one, else over the whole valve. */
export function readingKpa({ kv, measuringKv }: KvPoint, flowLs: number, densityKgM3: number): number {
  return dropAcrossValveKpa(measuringKv ?? kv, flowLs, densityKgM3);
}

/**
 * The balancing valve for a design flow (L/s): the largest that still reads `minReadingKpa` when fully open, so that it costs least and flow can be
 * read wherever the handwheel comes to stand; where none does, the smallest, which `readableTable` then keeps from being opened too far.
 */
export function chooseBalancingValve(flowLs: number, { sizes, minReadingKpa, densityKgM3 }: ValveWish): ChosenValve {
  const size = sizes.findLast(({ kvTable }) => readingKpa(kvTable.at(-1)!, flowLs, densityKgM3) >= minReadingKpa) ?? sizes[0];
  return {
    name: size.name,
    kvTable: size.kvTable,
    settingTurns: null,
    isLocked: false,
    ...(size.stepTurns && { stepTurns: size.stepTurns }),
  };
}

/**
 * The table of a valve up to the setting at which it just reads `minReadingKpa`: what a balance may use of it. The whole table where it reads that
 * much fully open, or where its reading does not depend on the handwheel.
 */
export function readableTable(valve: ChosenValve, flowLs: number, { minReadingKpa, densityKgM3 }: Omit<ValveWish, 'sizes'>): KvPoint[] {
  const { kvTable, stepTurns } = valve;
  if (kvTable.at(-1)!.measuringKv !== undefined || readingKpa(kvTable.at(-1)!, flowLs, densityKgM3) >= minReadingKpa) return kvTable;
  const step = stepTurns ?? FINEST_STEP_TURNS;
  const exact = settingAtKv(kvTable, kvForFlow(flowLs, minReadingKpa, densityKgM3));
  const last = Number((Math.floor(exact / step + 1e-9) * step).toPrecision(12));
  const below = kvTable.filter(({ setting }) => setting < last);
  // Two points make a table; a valve far too large for its flow keeps its two lowest settings.
  if (below.length === 0) return kvTable.slice(0, 2);
  return [...below, { setting: last, kv: kvAtSetting(kvTable, last) }];
}

/** A hundredth of a turn is what settings are rounded to where a valve names no step of its own. */
const FINEST_STEP_TURNS = 0.01;
