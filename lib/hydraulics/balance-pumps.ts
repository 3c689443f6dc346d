import { pumpSpeed } from './links/pump';
import type { PreparedNetwork } from './prepare';
import type { PumpCircuits } from './pump-circuits';
import { pumpEfficiency, pumpHeadAt, pumpResult } from './solve-result';
import type { BalancedPump, LinkOf, PumpLink, Warning } from './types';

/**
 * Duty and speed of each pump. A group's circuits may use the head of their index circuit, or with `pumpExcess: 'throttle'` all that the pumps
 * give at their speed where that is more. Pumps in series share a head as their curves at full speed do.
 */
export function balancedPumps(network: PreparedNetwork, { groups, boosters }: PumpCircuits, flow: Float64Array) {
  const throttle = network.document.options?.pumpExcess === 'throttle';
  const linkAt = (i: number) => network.document.links[network.position[i]] as LinkOf<'pump'>;
  const speeds = new Map<string, number>();
  const results: BalancedPump[] = [];
  const warnings: Warning[] = [];
  const heads: number[] = [];
  const shortfalls: number[] = [];

  for (const { pumps, flowLs, headBetween, circuits } of groups) {
    const links = pumps.map(linkAt);
    const most = links.map((link) => pumpHeadAt(link, flowLs, throttle ? pumpSpeed(link) : 1));
    const given = most.reduce((sum, head) => sum + head, 0);
    const needed = circuits.requiredHead + headBetween;
    const used = throttle ? Math.max(needed, given) : needed;
    heads.push(used - headBetween);
    shortfalls.push(Math.max(0, needed - given));
    links.forEach((link, k) => {
      const requiredHeadM = given > 0 ? (used * most[k]) / given : used / links.length;
      const enough = requiredHeadM <= most[k] * (1 + 1e-9);
      const speed = !enough ? 1 : throttle ? pumpSpeed(link) : speedForHead(link, flowLs, requiredHeadM);
      speeds.set(link.id, speed);
      results.push(duty(link, flowLs, requiredHeadM, speed, network.fluid.densityKgM3));
      if (!enough) {
        const message = `${link.id} gives ${most[k].toFixed(2)} m at ${flowLs.toFixed(3)} L/s; ${requiredHeadM.toFixed(2)} m are required.`;
        warnings.push({ code: 'pump-too-small', id: link.id, message });
      }
    });
  }
  for (const i of boosters) {
    const link = linkAt(i);
    const speed = pumpSpeed(link);
    results.push(duty(link, flow[i], pumpHeadAt(link, flow[i], speed), speed, network.fluid.densityKgM3));
  }
  return { results, speeds, warnings, headFor: (group: number) => heads[group], shortfallFor: (group: number) => shortfalls[group] };
}

function duty(link: PumpLink, flowLs: number, requiredHeadM: number, speed: number, densityKgM3: number): BalancedPump {
  const { hydraulicKw } = pumpResult(link, flowLs, requiredHeadM, densityKgM3);
  const efficiency = pumpEfficiency(link, flowLs, speed);
  return { id: link.id, flowLs, requiredHeadM, speed, shaftKw: efficiency ? hydraulicKw / efficiency : null };
}

/** Speed ratio (0 to 1) at which a pump gives a head (m, at most its full-speed head) at a flow: n² H(Q/n) rises with n, so by bisection. */
export function speedForHead(link: PumpLink, flowLs: number, headM: number): number {
  if (pumpHeadAt(link, flowLs, 1) <= headM) return 1;
  let low = 0;
  let high = 1;
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    if (pumpHeadAt(link, flowLs, middle) < headM) low = middle;
    else high = middle;
  }
  return high;
}
