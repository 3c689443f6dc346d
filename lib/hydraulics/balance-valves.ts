import { kvAtSetting, largestSetting, settingAtKv } from './links/balancing-valve';
import { metresPerKpa } from './links/law';
import type { PreparedNetwork } from './prepare';
import type { PumpCircuits } from './pump-circuits';
import type { BalancedValve, BalancingValveLink, ValveState, Warning } from './types';
import { dropAcrossValveKpa, kvForFlow } from './valve-coefficient';

/** A valve within this part of its largest Kv counts as fully open. */
const OPEN_RATIO = 1 - 1e-7;
/** Head missing before a valve counts as too small, m. */
const MISSING_M = 1e-6;

const freeValves = ({ kinds, document, position }: PreparedNetwork, { stretchOf }: PumpCircuits) =>
  kinds
    .filter(({ kind }) => kind === 'balancingValve')
    .flatMap(({ first, last }) => Array.from({ length: last - first }, (_, k) => first + k))
    .filter((i) => stretchOf[i] >= 0 && !(document.links[position[i]] as BalancingValveLink).locked);

/** Ids of the free balancing valves through which flow runs, but no circuit of a pump. */
export const valvesOffCircuit = (network: PreparedNetwork, circuits: PumpCircuits): string[] =>
  freeValves(network, circuits)
    .filter((i) => circuits.groups.every((group) => group.circuits.through(circuits.stretchOf[i]) === -Infinity))
    .map((i) => network.document.links[network.position[i]].id);

/** The free balancing valves, those that carry most first, and of equals those nearer to a pump. */
export function upstreamFirst(network: PreparedNetwork, circuits: PumpCircuits, flow: Float64Array): number[] {
  const near = linksFromPump(network, circuits);
  const carried = (i: number) => Number(Math.abs(flow[i]).toPrecision(9));
  return freeValves(network, circuits).sort(
    (i, j) => carried(j) - carried(i) || near[i] - near[j] || network.position[i] - network.position[j],
  );
}

/** Links between each link and the nearest pump connection, up or down the flow. */
function linksFromPump({ document, from }: PreparedNetwork, { groups, stretches, stretchOf }: PumpCircuits): Float64Array {
  const down = walk(
    document.nodes.length,
    groups.map(({ circuits }) => circuits.discharge),
    stretches.map(({ a, b }) => [a, b]),
  );
  const up = walk(
    document.nodes.length,
    groups.map(({ circuits }) => circuits.suction),
    stretches.map(({ a, b }) => [b, a]),
  );
  return Float64Array.from(from, (_, i) =>
    stretchOf[i] < 0 ? Infinity : Math.min(down[stretches[stretchOf[i]].a], up[stretches[stretchOf[i]].b]),
  );
}

function walk(nodeCount: number, starts: number[], steps: [number, number][]): Float64Array {
  const away = new Float64Array(nodeCount).fill(Infinity);
  const next: number[][] = Array.from({ length: nodeCount }, () => []);
  for (const [a, b] of steps) next[a].push(b);
  const queue = [...starts];
  for (const start of starts) away[start] = 0;
  for (let k = 0; k < queue.length; k++)
    for (const b of next[queue[k]]) {
      if (away[b] < Infinity) continue;
      away[b] = away[queue[k]] + 1;
      queue.push(b);
    }
  return away;
}

/**
 * Settings from the heads that the valves are to take. `loss` is each link's with its valve fully open, m; the circuits' stretches hold
 * what was found. Settings are rounded to the valve's own step where it has one.
 */
export function balancedValves(
  network: PreparedNetwork,
  circuits: PumpCircuits,
  flow: Float64Array,
  loss: Float64Array,
  shortfallFor: (group: number) => number,
) {
  const { document, position, fluid } = network;
  const { groups, stretches, stretchOf } = circuits;
  const settings = new Map<string, number>();
  const warnings: Warning[] = [];
  const found = new Map<string, BalancedValve>();
  for (const i of freeValves(network, circuits)) {
    const link = document.links[position[i]] as BalancingValveLink;
    const k = stretchOf[i];
    const table = link.kvTable;
    const largest = table[table.length - 1].kv;
    const wantedDropKpa = stretches[k].head / metresPerKpa(fluid.densityKgM3);
    const taken = stretches[k].head - Math.abs(loss[i]);
    const wantedKv = taken > 0 ? kvForFlow(Math.abs(flow[i]), wantedDropKpa, fluid.densityKgM3) : largest;
    const missing = groups.some(
      (group, g) =>
        group.circuits.through(k) > group.circuits.requiredHead - shortfallFor(g) + MISSING_M &&
        shortfallFor(g) > MISSING_M &&
        taken < MISSING_M,
    );
    const state = stateOf(wantedKv, table[0].kv, largest, missing);
    const setting = roundedSetting(link, state === 'open' ? largestSetting(table) : settingAtKv(table, wantedKv));
    const kv = state === 'throttled' && !link.settingStep ? wantedKv : kvAtSetting(table, setting);
    settings.set(link.id, setting);
    found.set(link.id, {
      id: link.id,
      flowLs: flow[i],
      dropKpa: Math.abs(dropAcrossValveKpa(kv, flow[i], fluid.densityKgM3)),
      kv,
      setting,
      state,
      wantedKv,
    });
    if (state === 'too-large')
      warnings.push({
        code: 'valve-too-large',
        id: link.id,
        message: `${link.id} at its smallest setting still passes more than is wanted (Kv ${kv.toFixed(2)}, wanted ${wantedKv.toFixed(2)}).`,
      });
    if (state === 'too-small')
      warnings.push({ code: 'valve-too-small', id: link.id, message: `${link.id} fully open costs more than its circuit has to spare.` });
  }
  const results = document.links.flatMap((link) => found.get(link.id) ?? []);
  return { settings, results, warnings };
}

function stateOf(wantedKv: number, smallest: number, largest: number, missing: boolean): ValveState {
  if (missing) return 'too-small';
  if (wantedKv >= largest * OPEN_RATIO) return 'open';
  return wantedKv < smallest * OPEN_RATIO ? 'too-large' : 'throttled';
}

function roundedSetting({ settingStep, kvTable }: BalancingValveLink, setting: number): number {
  if (!settingStep) return setting;
  const steps = Math.round(setting / settingStep);
  // 0.1 has no exact binary form: the number that a person would write is kept.
  const rounded = Number((steps * settingStep).toPrecision(12));
  return Math.min(Math.max(rounded, kvTable[0].setting), largestSetting(kvTable));
}
