import { kvAtSetting, largestSetting, settingAtKv } from '@/lib/hydraulics/links/balancing-valve';
import type { BalancingValveLink, NetworkDocument } from '@/lib/hydraulics/types';
import { type ExpectedLoop, expectCentred, meanOf } from './expected-loop';
import { linkAnswers } from './fit/sensitivities';
import type { Unknown } from './fit/unknowns';
import { outsideTolerance } from './normal';
import { settingIn } from './readings';

/** A valve is touched again when that spares this many terminals out of tolerance, on the average. */
export const WORTH_A_CHANGE = 0.1;
const ROUNDS = 3;
const USUAL_STEP = 0.1;

interface Move {
  valve: BalancingValveLink;
  setting: number;
  logRatios: Float64Array;
  outside: number;
}

/** Expected number of terminals outside their tolerance. */
export function expectedOutside(logRatios: Float64Array, spreads: Float64Array, tolerance: number): number {
  let sum = 0;
  for (let t = 0; t < logRatios.length; t++) sum += outsideTolerance(logRatios[t], spreads[t], tolerance);
  return sum;
}

/**
 * The fewest further changes: one valve after another, always the one that takes most terminals back into tolerance, while that is worth a
 * walk. Pump speed is changed freely. Returns the loop as expected afterwards.
 */
export function touchUp(
  document: NetworkDocument,
  start: ExpectedLoop,
  terminals: number[],
  spreads: Float64Array,
  tolerance: number,
): ExpectedLoop {
  const valves = document.links.flatMap((link, at) =>
    link.kind === 'balancingValve' && !link.locked && link.closed !== true ? [{ link, at }] : [],
  );
  const unknowns = document.links.flatMap((link, at): Unknown[] => {
    if (link.kind === 'pump') return [{ kind: 'pump', id: link.id, links: [at], rounds: [], deviation: 1 }];
    return valves.some((valve) => valve.at === at) ? [{ kind: 'chart', id: link.id, links: [at], rounds: [], deviation: 1 }] : [];
  });
  let here = start;
  const touched = new Set<string>();
  for (let round = 0; round < ROUNDS; round++) {
    const answers = linkAnswers(here.network, here.solution, unknowns, () => true, terminals);
    const columns = unknowns.map((_, j) => Float64Array.from(answers, ({ flowLs, flowPerUnknown }) => flowPerUnknown[j] / flowLs));
    const pumps = columns.filter((_, j) => unknowns[j].kind === 'pump');
    let { settings } = here;
    let logRatios = here.logRatios;
    let outside = expectedOutside(logRatios, spreads, tolerance);
    const movable = new Map(valves.map(({ link }) => [link.id, link]));
    for (;;) {
      let best: Move | null = null;
      let bestGain = 0;
      for (const [j, unknown] of unknowns.entries()) {
        const valve = movable.get(unknown.id);
        if (!valve) continue;
        const move = bestMove(valve, settingIn(settings, valve), columns[j], pumps, logRatios, spreads, tolerance);
        if (!move) continue;
        const gain = outside - move.outside - (touched.has(valve.id) ? 0 : WORTH_A_CHANGE);
        if (gain > bestGain + 1e-3) [best, bestGain] = [move, gain];
      }
      if (!best) break;
      settings = { ...settings, [best.valve.id]: best.setting };
      ({ logRatios, outside } = best);
      touched.add(best.valve.id);
      movable.delete(best.valve.id);
    }
    if (settings === here.settings) break;
    here = expectCentred(document, settings, terminals);
  }
  return here;
}

/** The setting of one valve that brings the ratios nearest to 1, and the ratios then, on straight lines and with the pump put right. */
function bestMove(
  valve: BalancingValveLink,
  setting: number,
  column: Float64Array,
  pumps: Float64Array[],
  logRatios: Float64Array,
  spreads: Float64Array,
  tolerance: number,
): Move | null {
  let along = 0;
  let square = 0;
  for (let t = 0; t < column.length; t++) {
    along += column[t] * logRatios[t];
    square += column[t] ** 2;
  }
  if (square < 1e-12) return null;
  const { kvTable, settingStep = USUAL_STEP } = valve;
  const kv = kvAtSetting(kvTable, setting);
  const wanted = settingAtKv(kvTable, kv * Math.exp(-along / square));
  const stands = Math.min(
    Math.max(Number((Math.round(wanted / settingStep) * settingStep).toPrecision(12)), kvTable[0].setting),
    largestSetting(kvTable),
  );
  if (stands === setting) return null;
  const moved = Math.log(kvAtSetting(kvTable, stands) / kv);
  let next: Float64Array = logRatios.map((each, t) => each + moved * column[t]);
  for (const pump of pumps) next = centred(next, pump);
  return { valve, setting: stands, logRatios: next, outside: expectedOutside(next, spreads, tolerance) };
}

function centred(logRatios: Float64Array, pump: Float64Array): Float64Array {
  const answer = meanOf(pump);
  const off = meanOf(logRatios);
  return answer > 1e-9 ? logRatios.map((each, t) => each - (pump[t] / answer) * off) : logRatios;
}
