import { type FluidCaution, type FluidProperties, fluidProperties } from './fluids';
import { adjacencyOf, carryAlongTree, MOST_RANK, type SpanningForest, spanningForest } from './graph/adjacency';
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

  const { position, numberOf, startOf } = numberByKind(links);
  const from = new Int32Array(position.length);
  const to = new Int32Array(position.length);
  const open: NetworkLink[] = [];
  for (let i = 0; i < position.length; i++) {
    const link = links[position[i]];
    open.push(link);
    from[i] = nodeIndex.get(link.from)!;
    to[i] = nodeIndex.get(link.to)!;
  }

  const kinds: KindRange[] = [];
  linkKinds.forEach((kind, k) => {
    const [first, last] = [startOf[k], startOf[k + 1]];
    if (last > first) kinds.push({ kind, first, last, batch: gather(kind, open.slice(first, last), first, fluid) });
  });

  const reference = document.reference ? nodeIndex.get(document.reference.node)! : 0;
  const adjacency = adjacencyOf(nodeCount, from, to);
  const forest = spanningForest(nodeCount, from, to, [reference], undefined, adjacency, Uint8Array.from(open, rankInTree));
  const baseFlow = forcedFlows(document, forest, from);
  const chains = chainsOf(nodeCount, from, to, adjacency);
  return { document, fluid, cautions: found.cautions, nodeIndex, position, numberOf, from, to, kinds, forest, baseFlow, chains };
}

const kindNumber = Object.fromEntries(linkKinds.map((kind, k) => [kind, k])) as Record<LinkKind, number>;

/** Open links numbered kind by kind, those of kind k from `startOf[k]`, otherwise in the document's order. */
function numberByKind(links: NetworkLink[]) {
  const kindOf = new Int8Array(links.length);
  const startOf = new Int32Array(linkKinds.length + 1);
  for (let at = 0; at < links.length; at++) {
    const link = links[at];
    kindOf[at] = isShut(link) ? -1 : kindNumber[link.kind];
    if (kindOf[at] >= 0) startOf[kindOf[at] + 1]++;
  }
  for (let k = 0; k < linkKinds.length; k++) startOf[k + 1] += startOf[k];
  const next = startOf.slice();
  const position = new Int32Array(startOf[linkKinds.length]);
  const numberOf = new Int32Array(links.length).fill(-1);
  for (let at = 0; at < links.length; at++) {
    if (kindOf[at] < 0) continue;
    const i = next[kindOf[at]]++;
    numberOf[at] = i;
    position[i] = at;
  }
  return { position, numberOf, startOf };
}

/** Bores of the lowest and highest rank among pipes, mm. */
const LARGEST_BORE_MM = 1000;
const RANKS_PER_HALVING = 6;

/**
 * Heads are carried along the mains: the tree takes the pipes of larger bore first, and terminals and limiters last, so that a loop is a terminal's
 * round through the mains.
 */
function rankInTree(link: NetworkLink): number {
  if (link.kind === 'terminal' || link.kind === 'flowLimiter') return MOST_RANK;
  if (link.kind !== 'pipe') return 0;
  const halvings = Math.log2(LARGEST_BORE_MM / link.boreMm);
  return Math.min(Math.max(1, Math.round(RANKS_PER_HALVING * halvings)), MOST_RANK - 1);
}

/** What each subtree draws from or gives to outside passes through the link that joins it to its parent. */
function forcedFlows(document: NetworkDocument, forest: SpanningForest, from: Int32Array): Float64Array {
  const baseFlow = new Float64Array(from.length);
  if (document.nodes.every((node) => !node.inflowLs)) return baseFlow;
  const surplus = Float64Array.from(document.nodes, (node) => node.inflowLs ?? 0);
  carryAlongTree(forest, from, surplus, baseFlow);
  return baseFlow;
}

/** Where each link stands in a network's document, found when first asked for: a change keeps the ids. */
const positions = new WeakMap<PreparedNetwork, Map<string, number>>();

function positionsOf(prepared: PreparedNetwork): Map<string, number> {
  const known = positions.get(prepared) ?? new Map(prepared.document.links.map((link, i) => [link.id, i]));
  positions.set(prepared, known);
  return known;
}

/**
 * The same network with some links' quantities changed (settings, speeds, openings), found by id: only the laws of their kinds are gathered again.
 * Answers false, changing nothing, where a link would open or shut or change its kind or ends: prepare the changed document then.
 */
export function changeLinks(prepared: PreparedNetwork, changed: NetworkLink[]): boolean {
  const { document, kinds, position, numberOf } = prepared;
  const at = positionsOf(prepared);
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
