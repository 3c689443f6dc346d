import type { KvPoint } from '@/lib/network/drawing';

/** A figure of a table that cannot be used: which point of it, which column, and why. */
export interface PointFault<Column extends string> {
  index: number;
  column: Column;
  message: string;
}

export type ValveColumn = 'setting' | 'kv' | 'measuringKv';

/** Beyond any valve of a building; a held key or an extra nought stays out of the catalogue. Turns, and m³/h at 1 bar. */
export const LARGEST_SETTING_TURNS = 1000;
export const LARGEST_KV = 50_000;
export const MOST_POINTS = 100;

/**
 * What keeps the points of one size from being a valve: two settings or more, settings and Kv both rising from point to point, no figure
 * out of range, and a measuring Kv at all settings or at none. Settings in turns, Kv in m³/h at 1 bar.
 */
export function faultsOfValvePoints(points: readonly KvPoint[]): PointFault<ValveColumn>[] {
  const faults: PointFault<ValveColumn>[] = [];
  const last = points.length - 1;
  if (points.length < 2) faults.push({ index: Math.max(last, 0), column: 'setting', message: 'A size needs two settings or more.' });
  if (points.length > MOST_POINTS) faults.push({ index: last, column: 'setting', message: `A size has up to ${MOST_POINTS} settings.` });
  const hasMeasuring = points.some(({ measuringKv }) => measuringKv !== undefined);
  points.forEach(({ setting, kv, measuringKv }, index) => {
    const before = points[index - 1];
    if (!(setting >= 0 && setting <= LARGEST_SETTING_TURNS))
      faults.push({ index, column: 'setting', message: `A setting is from 0 to ${LARGEST_SETTING_TURNS} turns, not ${setting}.` });
    else if (before && setting <= before.setting)
      faults.push({ index, column: 'setting', message: `The setting ${setting} stands there twice, or out of order.` });
    if (!(kv >= 0 && kv <= LARGEST_KV)) faults.push({ index, column: 'kv', message: `A Kv is from 0 to ${LARGEST_KV} m³/h, not ${kv}.` });
    else if (before && kv <= before.kv)
      faults.push({ index, column: 'kv', message: `Kv must rise with the setting: ${short(kv)} comes after ${short(before.kv)}.` });
    if (measuringKv === undefined) {
      if (hasMeasuring) faults.push({ index, column: 'measuringKv', message: 'A measuring Kv stands at every setting or at none.' });
    } else if (!(measuringKv > 0 && measuringKv <= LARGEST_KV))
      faults.push({ index, column: 'measuringKv', message: `A measuring Kv is above 0, up to ${LARGEST_KV} m³/h.` });
  });
  return faults;
}

const short = (value: number) => String(Number(value.toPrecision(6)));
