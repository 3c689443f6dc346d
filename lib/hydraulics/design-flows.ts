import { largestSetting } from './links/balancing-valve';
import { shortLoops } from './graph/loops';
import { unbalancedIn } from './inflows';
import { type PreparedNetwork, prepareNetwork } from './prepare';
import { findFlows } from './solve';
import type { NetworkDocument, NetworkLink } from './types';

export interface DesignFlows {
  /** The document as it is sized and balanced: free balancing valves fully open, limiters and controllers as open passages. */
  network: PreparedNetwork;
  /** Flow of each open link, L/s, by its number in `network`. */
  flow: Float64Array;
  /** Terminals on a circuit that is open all round; the others have design flow 0. */
  live: Set<string>;
  /** Whether pumps decide any of the flows: in parallel, or along a bypass. */
  isPumpDependent: boolean;
  /** Nodes of parts where design flows do not add up, for which no flows exist. */
  conflict: string[];
}

/**
 * The flows that every pipe carries when each terminal has its design flow. Where the rest of the network is a tree they follow
 * from adding up alone; rings, parallel pumps and decouplers in it are solved with the terminals' flows held.
 */
export function designFlows(document: NetworkDocument): DesignFlows {
  const open = { ...document, links: document.links.map(fullyOpen), options: { ...document.options, method: undefined } };
  const network = prepareNetwork(open);
  const live = liveTerminals(network);
  const inflow = new Map(open.nodes.map((node) => [node.id, node.inflowLs ?? 0]));
  const add = (id: string, flowLs: number) => inflow.set(id, inflow.get(id)! + flowLs);
  const rest = open.links.filter((link) => {
    if (link.kind !== 'terminal') return true;
    if (live.has(link.id)) {
      add(link.from, -link.designFlowLs);
      add(link.to, link.designFlowLs);
    }
    return false;
  });
  const restNetwork = prepareNetwork({
    ...open,
    links: rest,
    nodes: open.nodes.map((node) => ({ ...node, inflowLs: inflow.get(node.id)! })),
  });
  const conflict = unbalancedIn(restNetwork.document, restNetwork.forest);
  const solution = findFlows(restNetwork);
  const restFlow = new Map(
    rest.map((link, at) => [link.id, restNetwork.numberOf[at] < 0 ? 0 : solution.state.linkFlow[restNetwork.numberOf[at]]]),
  );
  const flow = Float64Array.from(network.position, (at) => {
    const link = open.links[at];
    return link.kind === 'terminal' ? (live.has(link.id) ? link.designFlowLs : 0) : restFlow.get(link.id)!;
  });
  const isPumpDependent = holdsPump(restNetwork, solution.loops().chain);
  return { network, flow, live, isPumpDependent, conflict: solution.closed ? conflict : open.nodes.map((node) => node.id) };
}

function fullyOpen(link: NetworkLink): NetworkLink {
  switch (link.kind) {
    case 'balancingValve':
      return link.locked ? link : { ...link, setting: largestSetting(link.kvTable) };
    case 'flowLimiter':
      return { ...ends(link), kind: 'resistance', designFlowLs: link.limitLs, designDropKpa: link.minDropKpa };
    case 'dpController':
      return { ...ends(link), kind: 'resistance', kv: link.kvs };
    default:
      return link;
  }
}

const ends = ({ id, from, to, closed }: NetworkLink) => ({ id, from, to, closed });

/** A terminal that no loop passes has nowhere to send its flow back. */
function liveTerminals({ document, chains, kinds, position }: PreparedNetwork): Set<string> {
  const loops = shortLoops(document.nodes.length, chains);
  const looped = new Uint8Array(chains.count);
  for (const c of loops.chain) looped[c] = 1;
  const live = new Set<string>();
  for (const { kind, first, last } of kinds) {
    if (kind !== 'terminal') continue;
    for (let i = first; i < last; i++) if (chains.chainOf[i] >= 0 && looped[chains.chainOf[i]]) live.add(document.links[position[i]].id);
  }
  return live;
}

function holdsPump({ kinds, chains }: PreparedNetwork, looped: Int32Array): boolean {
  const pumps = kinds.find(({ kind }) => kind === 'pump');
  if (!pumps) return false;
  const inLoop = new Set(looped);
  for (let i = pumps.first; i < pumps.last; i++) if (inLoop.has(chains.chainOf[i])) return true;
  return false;
}
