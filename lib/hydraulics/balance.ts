import { balancedPumps } from './balance-pumps';
import { balancedTerminals } from './balance-terminals';
import { balancedValves, upstreamFirst, valvesOffCircuit } from './balance-valves';
import { designFlows } from './design-flows';
import { pumpSpeed } from './links/pump';
import { type PumpCircuits, pumpCircuits } from './pump-circuits';
import { solve } from './solve';
import { listed } from './solve-warnings';
import type { BalanceResult, NetworkDocument, NetworkLink, PumpLink, Warning } from './types';

const UNSETTLED: Warning = { code: 'not-converged', message: 'The pumps’ speeds and the flows that depend on them had not settled.' };
const NO_SETTINGS = new Map<string, number>();
const SETTLED_SPEED = 1e-9;
const MOST_ROUNDS = 40;
/** Change of a pump's speed in the last of those rounds up to which the duty still counts as found. */
const NEAR_SPEED = 1e-6;

/**
 * Valve settings and pump duty for design flow everywhere, where proportional balancing ends: in each group of parallel circuits the
 * least-favoured keeps its valve fully open, the others are throttled to match it, and what all of a group have in excess is
 * taken by the valve upstream of the group, up to the pump, which slows down (`pumpExcess: 'speed'`) or is throttled at its speed.
 * Control valves count as they stand; locked balancing valves stay.
 */
export function balance(document: NetworkDocument): BalanceResult {
  const { design, loss, circuits, pumps, isSettled } = findDuty(document);
  const { network, flow, live, conflict } = design;
  if (conflict.length) return unbalanced(document, conflict);
  const openCircuitHead = mostHeads(circuits);
  takeExcess(circuits, pumps.headFor, upstreamFirst(network, circuits, flow));
  const valves = balancedValves(network, circuits, flow, loss, pumps.shortfallFor);
  const balanced = { ...document, links: document.links.map((link) => set(link, valves.settings, pumps.speeds)) };
  const solution = solve(balanced);

  const terminals = balancedTerminals(network, design, solution, circuits, openCircuitHead, loss);
  const index = terminals.reduce<(typeof terminals)[number] | null>(
    (most, each) => ((each.circuitDropKpa ?? -1) > (most?.circuitDropKpa ?? -1) ? each : most),
    null,
  );
  return {
    converged: solution.converged && isSettled,
    indexTerminal: index?.id ?? null,
    pumps: pumps.results,
    valves: valves.results,
    terminals,
    solution,
    warnings: [...closedCircuits(document, live), ...pumps.warnings, ...valves.warnings, ...(isSettled ? [] : [UNSETTLED])],
  };
}

/**
 * Design flows, the circuits at them and the pumps' duty. Where pumps decide some of the flows (in parallel, along a bypass) these
 * change with the speeds and the speeds with them, until both stay. A valve on no terminal's circuit (on a bypass) stays as it is set.
 */
function findDuty(given: NetworkDocument) {
  let document = given;
  let atSpeeds = given;
  for (let round = 0; ; round++) {
    const design = designFlows(atSpeeds);
    const { network, flow } = design;
    const loss = new Float64Array(flow.length);
    const slope = new Float64Array(flow.length);
    for (const { batch, first, last } of network.kinds) batch.evaluate(flow, loss, slope, first, last);
    const circuits = pumpCircuits(network, flow, loss);
    const pumps = balancedPumps(network, circuits, flow);
    const found = { design, loss, circuits, pumps, isSettled: true };
    if (design.conflict.length) return found;

    const idle = new Set(valvesOffCircuit(network, circuits));
    if (!idle.size && !design.isPumpDependent) return found;
    const keep = (link: NetworkLink) => (idle.has(link.id) && link.kind === 'balancingValve' ? { ...link, locked: true } : link);
    document = { ...document, links: document.links.map(keep) };
    const next = { ...document, links: document.links.map((link) => set(link, NO_SETTINGS, pumps.speeds)) };
    const change = speedChange(atSpeeds, next);
    if (!idle.size && change < SETTLED_SPEED) return found;
    if (round === MOST_ROUNDS) return { ...found, isSettled: change < NEAR_SPEED };
    atSpeeds = next;
  }
}

/** Largest change of a pump's speed from one document to the next. */
const speedChange = (before: NetworkDocument, after: NetworkDocument): number =>
  after.links.reduce(
    (most, link, at) => (link.kind === 'pump' ? Math.max(most, Math.abs(pumpSpeed(link) - pumpSpeed(before.links[at] as PumpLink))) : most),
    0,
  );

/** Most head of any circuit through each stretch, over all pumps, m. */
function mostHeads({ groups, stretches }: PumpCircuits): Float64Array {
  return Float64Array.from(stretches, (_, k) =>
    groups.reduce((most, group) => Math.max(most, group.circuits.through(k) + group.headBetween), -Infinity),
  );
}

/**
 * Gives each valve, the most upstream first, all that the circuits through it still have to spare. `headFor` is the head that a
 * group's circuits may use, m.
 */
function takeExcess({ groups, stretches, stretchOf }: PumpCircuits, headFor: (group: number) => number, valves: number[]): void {
  for (const valve of valves) {
    const k = stretchOf[valve];
    let spare = Infinity;
    groups.forEach(({ circuits }, g) => {
      const needed = circuits.through(k);
      if (needed > -Infinity) spare = Math.min(spare, headFor(g) - needed);
    });
    if (spare === Infinity || spare <= 0) continue;
    stretches[k].head += spare;
    for (const { circuits } of groups) if (circuits.through(k) > -Infinity) circuits.grown(k);
  }
}

function set(link: NetworkLink, settings: Map<string, number>, speeds: Map<string, number>): NetworkLink {
  const setting = settings.get(link.id);
  if (link.kind === 'balancingValve' && setting !== undefined) return { ...link, setting };
  const speed = speeds.get(link.id);
  return link.kind === 'pump' && speed !== undefined ? { ...link, speed } : link;
}

function closedCircuits({ links }: NetworkDocument, live: Set<string>): Warning[] {
  return links.flatMap((link): Warning[] => {
    if (link.kind !== 'terminal' || live.has(link.id)) return [];
    return [{ code: 'circuit-closed', id: link.id, message: `${link.id} is left out: its circuit is not open all round.` }];
  });
}

function unbalanced(document: NetworkDocument, conflict: string[]): BalanceResult {
  const pumps = document.links.some((link) => link.kind === 'pump');
  const message = `The design flows do not add up at ${listed(conflict)}${pumps ? '' : '; there is no pump'}.`;
  const warnings: Warning[] = [{ code: pumps ? 'design-flow-conflict' : 'no-pump', id: conflict[0], message }];
  return { converged: false, indexTerminal: null, pumps: [], valves: [], terminals: [], solution: solve(document), warnings };
}
