import { type SpanningForest, spanningForest } from './graph/adjacency';
import { isShut } from './links/link-laws';
import type { NetworkDocument } from './types';

/** Imbalance of a part, L/s and as part of what flows in and out, up to which its inflows count as summing to zero. */
const BALANCED_LS = 1e-6;
const BALANCED_RATIO = 1e-9;

/** Ids of the nodes with an inflow in every part, connected by open links, whose inflows do not sum to zero. */
export function unbalancedNodes(document: NetworkDocument): string[] {
  const index = new Map(document.nodes.map((node, v) => [node.id, v]));
  const open = document.links.filter((link) => !isShut(link));
  const from = Int32Array.from(open, (link) => index.get(link.from)!);
  const to = Int32Array.from(open, (link) => index.get(link.to)!);
  return unbalancedIn(document, spanningForest(document.nodes.length, from, to));
}

export function unbalancedIn(document: NetworkDocument, { part, roots }: SpanningForest): string[] {
  const sum = new Float64Array(roots.length);
  const size = new Float64Array(roots.length);
  document.nodes.forEach((node, v) => {
    sum[part[v]] += node.inflowLs ?? 0;
    size[part[v]] += Math.abs(node.inflowLs ?? 0);
  });
  const isOff = (k: number) => Math.abs(sum[k]) > BALANCED_LS + BALANCED_RATIO * size[k];
  return document.nodes.flatMap((node, v) => (node.inflowLs && isOff(part[v]) ? [node.id] : []));
}
