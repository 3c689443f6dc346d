import { type FluidCaution, type FluidProperties, fluidProperties } from './fluids';
import { type SpanningForest, spanningForest } from './graph/adjacency';
import { type Chains, chainsOf } from './graph/chains';
import type { LinkBatch } from './links/law';
import { gather, isShut, linkKinds } from './links/link-laws';
import type { LinkKind, NetworkDocument, NetworkLink } from './types';

/** A run of links of one kind, numbered first … last - 1, with their law. */
export interface KindRange {
  kind: LinkKind;
  first: number;
  last: number;
  batch: LinkBatch;
}

/**
 * A network document made ready to be solved again and again: open links numbered kind by kind, their laws gathered, the tree by
 * which heads are carried, the flows that inflows force, and the chains on which loops are found. Shut links are left out.
 */
export interface PreparedNetwork {
  document: NetworkDocument;
  fluid: FluidProperties;
  /** What the property data warn of. */
  cautions: FluidCaution[];
  nodeIndex: Map<string, number>;
  /** Document position of each open link, and the reverse (-1 for a shut one). */
  position: Int32Array;
  numberOf: Int32Array;
  from: Int32Array;
  to: Int32Array;
  kinds: KindRange[];
  forest: SpanningForest;
  /** Flow of each open link that satisfies the inflows along the tree, L/s; loops add to it. */
  baseFlow: Float64Array;
  chains: Chains;
}

/**
 * Prepares a checked document (see `parseNetworkDocument`). Throws a RangeError for a fluid outside its property data, which
 * the check of the document finds first.
 */
export function prepareNetwork(document: NetworkDocument): PreparedNetwork {
  const found = fluidProperties(document.fluid);
  if (!found.ok) throw new RangeError(found.error.message);
  const fluid = found.properties;
  const { nodes, links } = document;
  const nodeCount = nodes.length;
  const nodeIndex = new Map<string, number>();
  for (let v = 0; v < nodeCount; v++) nodeIndex.set(nodes[v].id, v);

  const open = openLinksByKind(links);
  const position = Int32Array.from(linkKinds.flatMap((kind) => open[kind]));
  const numberOf = new Int32Array(links.length).fill(-1);
  const from = new Int32Array(position.length);
  const to = new Int32Array(position.length);
  for (let i = 0; i < position.length; i++) {
    const link = links[position[i]];
    numberOf[position[i]] = i;
    from[i] = nodeIndex.get(link.from)!;
    to[i] = nodeIndex.get(link.to)!;
  }

  const kinds: KindRange[] = [];
  let first = 0;
  for (const kind of linkKinds) {
    const last = first + open[kind].length;
    if (last > first) {
      const members = open[kind].map((at) => links[at]);
      kinds.push({ kind, first, last, batch: gather(kind, members, first, fluid) });
    }
    first = last;
  }

  const reference = document.reference ? nodeIndex.get(document.reference.node)! : 0;
  const forest = spanningForest(nodeCount, from, to, [reference]);
  const baseFlow = forcedFlows(document, forest, from);
  const chains = chainsOf(nodeCount, from, to);
  return { document, fluid, cautions: found.cautions, nodeIndex, position, numberOf, from, to, kinds, forest, baseFlow, chains };
}

function openLinksByKind(links: NetworkLink[]): Record<LinkKind, number[]> {
  const open = Object.fromEntries(linkKinds.map((kind) => [kind, [] as number[]])) as Record<LinkKind, number[]>;
  for (let at = 0; at < links.length; at++) if (!isShut(links[at])) open[links[at].kind].push(at);
  return open;
}

/** What each subtree draws from or gives to outside passes through the link that joins it to its parent. */
function forcedFlows(document: NetworkDocument, forest: SpanningForest, from: Int32Array): Float64Array {
  const baseFlow = new Float64Array(from.length);
  if (document.nodes.every((node) => !node.inflowLs)) return baseFlow;
  const surplus = Float64Array.from(document.nodes, (node) => node.inflowLs ?? 0);
  for (let k = forest.order.length - 1; k >= 0; k--) {
    const v = forest.order[k];
    const link = forest.treeLink[v];
    if (link < 0) continue;
    baseFlow[link] = from[link] === v ? surplus[v] : -surplus[v];
    surplus[forest.parent[v]] += surplus[v];
  }
  return baseFlow;
}

/**
 * The same network with some links' quantities changed (settings, speeds, openings), found by id: only the laws of their kinds are gathered again.
 * Answers false, changing nothing, where a link would open or shut or change its kind or ends: prepare the changed document then.
 */
export function changeLinks(prepared: PreparedNetwork, changed: NetworkLink[]): boolean {
  const { document, kinds, position, numberOf } = prepared;
  const at = new Map(document.links.map((link, i) => [link.id, i]));
  const kept = changed.every((link) => {
    const i = at.get(link.id);
    const old = i === undefined ? undefined : document.links[i];
    const same = old !== undefined && old.kind === link.kind && old.from === link.from && old.to === link.to;
    return same && isShut(link) === numberOf[i!] < 0;
  });
  if (!kept) return false;
  const links = document.links.slice();
  for (const link of changed) links[at.get(link.id)!] = link;
  prepared.document = { ...document, links };
  const touched = new Set(changed.map((link) => link.kind));
  for (const range of kinds) {
    if (!touched.has(range.kind)) continue;
    const members = Array.from(position.subarray(range.first, range.last), (i) => links[i]);
    range.batch = gather(range.kind, members, range.first, prepared.fluid);
  }
  return true;
}
