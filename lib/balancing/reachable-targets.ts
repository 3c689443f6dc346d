import { balance } from '@/lib/hydraulics/balance';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { LoopSettings } from './readings';

const ROUNDS = 3;
/** Less than this part of design flow counts as shut. */
const SHUT_RATIO = 0.03;

export interface BalancedSettings {
  settings: LoopSettings;
  /** Part of design flow that each suspected terminal can have; those at 1 need no exception. */
  reachable: Map<string, number>;
}

/**
 * Balances a fitted loop whose suspected terminals shall not hold back the rest: each of these is asked for no more than it takes with
 * its valve fully open at the head that the others need.
 */
export function balanceWithin(document: NetworkDocument, suspected: ReadonlySet<string>): BalancedSettings {
  let reachable = new Map([...suspected].map((id) => [id, 0]));
  for (let round = 0; ; round++) {
    const result = balance(withTargets(document, reachable));
    const settings: LoopSettings = {};
    for (const valve of result.valves) settings[valve.id] = valve.setting;
    for (const pump of result.pumps) settings[pump.id] = pump.speed;
    if (!suspected.size || round === ROUNDS) return { settings, reachable };
    reachable = headroom(document, result, suspected, reachable);
  }
}

/** The part of design flow at which a suspected circuit, its valve fully open, costs what the index circuit of the others does. */
function headroom(
  document: NetworkDocument,
  result: ReturnType<typeof balance>,
  suspected: ReadonlySet<string>,
  before: Map<string, number>,
): Map<string, number> {
  const cost = new Map(result.terminals.map((terminal) => [terminal.id, terminal.circuitDropKpa ?? 0]));
  const most = Math.max(
    ...result.terminals.filter((terminal) => !suspected.has(terminal.id)).map((terminal) => terminal.circuitDropKpa ?? 0),
  );
  return new Map(
    document.links.flatMap((link): [string, number][] => {
      if (!suspected.has(link.id) || link.kind !== 'terminal') return [];
      const part = before.get(link.id)!;
      // A first trial at full design flow tells its resistance.
      if (part === 0) return [[link.id, 1]];
      const own = cost.get(link.id) ?? Infinity;
      const next = Math.min(1, part * Math.sqrt(most / own));
      return [[link.id, next < SHUT_RATIO ? 1e-9 : next]];
    }),
  );
}

/** A terminal with a smaller design flow and the same resistance; shut where that is next to nothing. */
function withTargets(document: NetworkDocument, reachable: Map<string, number>): NetworkDocument {
  const links = document.links.map((link) => {
    const part = reachable.get(link.id);
    if (part === undefined || link.kind !== 'terminal') return link;
    if (part < SHUT_RATIO) return { ...link, closed: true };
    return { ...link, designFlowLs: link.designFlowLs * part, designDropKpa: link.designDropKpa * part ** (link.exponent ?? 2) };
  });
  return { ...document, links };
}
