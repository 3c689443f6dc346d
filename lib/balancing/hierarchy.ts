import { solve } from '@/lib/hydraulics/solve';
import type { NetworkDocument } from '@/lib/hydraulics/types';

/** A balancing valve, or the pump at the top, with the terminals whose water goes through it and the stations next below. */
export interface Station {
  link: string;
  kind: 'valve' | 'pump';
  terminals: string[];
  designFlowLs: number;
  /** Links between it and the pump, there and back. */
  distance: number;
  /** Links of one circuit through it that lie on the terminal's side of it. */
  behind: string[];
  parent: Station | null;
  members: Station[];
}

/** The stations of a loop, the pump first; `valveOf` gives the valve that serves one terminal alone. */
export interface LoopHierarchy {
  stations: Map<string, Station>;
  top: Station | null;
  valveOf: Map<string, string>;
}

/**
 * Terminals in branches, branches in risers, risers on mains, as the balancing valves divide them: a valve is above another when all the other's
 * terminals and more are fed through it. Told by following each terminal's water back to the pump and on to it with the valves
 * fully open, at each junction along the larger flow.
 */
export function loopHierarchy(document: NetworkDocument): LoopHierarchy {
  const ways = waysToPump(document);
  const kindOf = new Map(document.links.map((link) => [link.id, link.kind]));
  const terminals = document.links.flatMap((link) => (link.kind === 'terminal' && link.closed !== true ? [link] : []));
  const stations = new Map<string, Station>();
  for (const terminal of terminals) {
    const way = ways(terminal.id);
    way.forEach((id, distance) => {
      const kind = kindOf.get(id);
      if (kind !== 'balancingValve' && kind !== 'pump') return;
      const station = stations.get(id) ?? {
        link: id,
        kind: kind === 'pump' ? 'pump' : 'valve',
        terminals: [],
        designFlowLs: 0,
        distance: Infinity,
        behind: [terminal.id, ...way.slice(0, distance)],
        parent: null,
        members: [],
      };
      stations.set(id, station);
      station.terminals.push(terminal.id);
      station.designFlowLs += terminal.designFlowLs;
      station.distance = Math.min(station.distance, way.length - distance);
    });
  }

  // Of two valves in series for the same terminals the one nearer to the pump is above.
  const widest = [...stations.values()].sort(
    (a, b) => b.terminals.length - a.terminals.length || Number(b.kind === 'pump') - Number(a.kind === 'pump') || a.distance - b.distance,
  );
  const lowest = new Map<string, Station>();
  const valveOf = new Map<string, string>();
  for (const station of widest) {
    const above = lowest.get(station.terminals[0]) ?? null;
    station.parent = above;
    above?.members.push(station);
    for (const terminal of station.terminals) lowest.set(terminal, station);
    if (station.terminals.length === 1 && station.kind === 'valve') valveOf.set(station.terminals[0], station.link);
  }
  for (const { members } of stations.values()) members.sort((a, b) => b.distance - a.distance);
  return { stations, top: widest[0] ?? null, valveOf };
}

interface Step {
  id: string;
  isPump: boolean;
  flowLs: number;
  next: string;
}

/** Answers the links once around through a terminal, from it outwards to the pump on both sides. */
function waysToPump(document: NetworkDocument): (terminal: string) => string[] {
  const open = {
    ...document,
    links: document.links.map((link) => (link.kind === 'balancingValve' ? { ...link, setting: undefined } : link)),
  };
  const flows = solve(open).links;
  const back = new Map<string, Step>();
  const on = new Map<string, Step>();
  const keep = (steps: Map<string, Step>, node: string, step: Step) => {
    const before = steps.get(node);
    if (!before || step.flowLs > before.flowLs) steps.set(node, step);
  };
  const ends = new Map<string, [string, string]>();
  document.links.forEach((link, at) => {
    const { flowLs } = flows[at];
    if (flowLs === 0) return;
    const [upstream, downstream] = flowLs > 0 ? [link.from, link.to] : [link.to, link.from];
    ends.set(link.id, [upstream, downstream]);
    const step = { id: link.id, isPump: link.kind === 'pump', flowLs: Math.abs(flowLs) };
    keep(back, downstream, { ...step, next: upstream });
    keep(on, upstream, { ...step, next: downstream });
  });
  return (terminal) => {
    const [upstream, downstream] = ends.get(terminal) ?? [];
    if (upstream === undefined || downstream === undefined) return [];
    const ways = [follow(back, upstream), follow(on, downstream)];
    const longest = Math.max(ways[0].length, ways[1].length);
    const both: string[] = [];
    for (let k = 0; k < longest; k++) for (const way of ways) if (k < way.length && !both.includes(way[k])) both.push(way[k]);
    return both;
  };
}

function follow(steps: Map<string, Step>, start: string): string[] {
  const way: string[] = [];
  const seen = new Set<string>();
  for (let node = start; !seen.has(node);) {
    seen.add(node);
    const step = steps.get(node);
    if (!step) break;
    way.push(step.id);
    if (step.isPump) break;
    node = step.next;
  }
  return way;
}
