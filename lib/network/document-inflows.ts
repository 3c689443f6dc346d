import { unbalancedNodes } from '@/lib/hydraulics/inflows';
import type { NetworkDocument } from '@/lib/hydraulics/types';
import type { Issue } from './document-fault';

/** Every node with an inflow in a connected part whose inflows do not sum to zero. */
export function inflowFaults(document: NetworkDocument): Issue[] {
  if (document.nodes.every((node) => !node.inflowLs)) return [];
  const off = new Set(unbalancedNodes(document));
  return document.nodes.flatMap((node, i) =>
    off.has(node.id) ? [{ path: `nodes[${i}].inflowLs`, id: node.id, message: 'must sum to zero over its connected part' }] : [],
  );
}
