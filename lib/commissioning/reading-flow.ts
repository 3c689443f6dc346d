import { dropAcrossValveKpa, flowThroughValveLs } from '@/lib/hydraulics/valve-coefficient';
import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';

/** One line of a valve's table: handwheel turns and the Kv there, both rising; where flow is read over an orifice of its own, the Kv of that. */
export interface ValvePoint {
  setting: number;
  kv: number;
  measuringKv?: number;
}

export type ValveFlow =
  { ok: true; kv: number; flowLs: number } | { ok: false; path: 'settingTurns' | 'dropKpa' | 'method'; message: string };

interface DropRead {
  kvTable: readonly ValvePoint[] | null;
  /** Handwheel turns at which the drop was read. */
  settingTurns: number;
  /** Differential pressure across the valve, kPa, 0 or more. */
  dropKpa: number;
  /** Of the loop's fluid at its mean temperature, kg/m³. */
  densityKgM3: number;
}

/**
 * Flow through a balancing valve from the drop across it at its setting: q [L/s] = Kv sqrt(dp [kPa] / SG) / 36 with SG = rho / 1000,
 * Kv straight between the points of the valve's table (IEC 60534-2-1's law, turbulent), and that of the measuring orifice where the valve has
 * one. The table is never extended: a setting beyond its ends is refused, because a Kv read there would be invented.
 */
export function flowFromDrop({ kvTable, settingTurns, dropKpa, densityKgM3 }: DropRead): ValveFlow {
  if (!kvTable || kvTable.length === 0)
    return { ok: false, path: 'method', message: 'This station has no valve with a Kv table: enter a flow.' };
  const lowest = kvTable[0]!.setting;
  const highest = kvTable[kvTable.length - 1]!.setting;
  if (!(settingTurns >= lowest && settingTurns <= highest)) {
    return {
      ok: false,
      path: 'settingTurns',
      message: `The valve’s table goes from ${lowest} to ${highest} turns; ${settingTurns} is not in it.`,
    };
  }
  if (!(dropKpa >= 0)) return { ok: false, path: 'dropKpa', message: 'A drop cannot be negative: check the hoses.' };
  const kv = measuringKvAt(kvTable, settingTurns);
  return { ok: true, kv, flowLs: flowThroughValveLs(kv, dropKpa, densityKgM3) };
}

/** Kv between the measuring points at a setting, m³/h; the valve's own where it has no measuring orifice. */
export function measuringKvAt(kvTable: readonly ValvePoint[], settingTurns: number): number {
  return kvAtSetting(
    kvTable.map(({ setting, kv, measuringKv }) => ({ setting, kv: measuringKv ?? kv })),
    settingTurns,
  );
}

/** The drop that would show at a setting if the flow were as designed, kPa; null where the valve's table says nothing of that setting. */
export function dropAtDesignKpa(read: Omit<DropRead, 'dropKpa'>, designFlowLs: number): number | null {
  const found = flowFromDrop({ ...read, dropKpa: 1 });
  return found.ok && found.kv > 0 ? dropAcrossValveKpa(found.kv, designFlowLs, read.densityKgM3) : null;
}
