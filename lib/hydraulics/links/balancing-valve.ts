import type { BalancingValveLink } from '../types';
import type { LinkLaw } from './law';
import { QuadraticBatch, resistanceOfKv, usualFlowOfKv } from './quadratic';

type KvPoint = { setting: number; kv: number };

/** y at x on the straight lines between rising points, held at the ends. */
function interpolate(table: KvPoint[], at: number, x: keyof KvPoint, y: keyof KvPoint): number {
  const next = table.findIndex((point) => point[x] >= at);
  if (next === 0) return table[0][y];
  if (next < 0) return table[table.length - 1][y];
  const before = table[next - 1];
  const after = table[next];
  return before[y] + ((at - before[x]) / (after[x] - before[x])) * (after[y] - before[y]);
}

/** Kv at a setting, straight between the points of the table (settings and Kv both rising). */
export const kvAtSetting = (table: KvPoint[], setting: number) => interpolate(table, setting, 'setting', 'kv');

/** Setting that gives a Kv: the inverse of `kvAtSetting`, held at the table's ends. */
export const settingAtKv = (table: KvPoint[], kv: number) => interpolate(table, kv, 'kv', 'setting');

export const largestSetting = (table: KvPoint[]) => table[table.length - 1].setting;

export const balancingValveKv = (link: BalancingValveLink) => kvAtSetting(link.kvTable, link.setting ?? largestSetting(link.kvTable));

export const balancingValveLaw: LinkLaw<BalancingValveLink> = {
  isShut: (link) => balancingValveKv(link) <= 0,
  usualFlowLs: (link, fluid) => usualFlowOfKv(balancingValveKv(link), fluid),
  gather: (links, first, fluid) =>
    new QuadraticBatch(
      first,
      Float64Array.from(links, (link) => resistanceOfKv(balancingValveKv(link), fluid)),
    ),
};
