import type { NetworkDocument, SolveResult } from '@/lib/hydraulics/types';

/**
 * The links once around through one terminal: against the flow to the pump's outlet and with the flow back to its
 * inlet, at each branching along the larger flow. Empty where no single circuit can be told.
 */
export function circuitThrough(document: NetworkDocument, flows: SolveResult, terminalId: string): string[] {
  const flowOf = new Map(flows.links.map((link) => [link.id, link.flowLs]));
  const start = document.links.find((link) => link.id === terminalId);
  if (!start) return [];

  // Each link once for each way that water goes through it: from its upstream node to its downstream node.
  const leaving = new Map<string, Step[]>();
  const arriving = new Map<string, Step[]>();
  for (const link of document.links) {
    const flowLs = flowOf.get(link.id) ?? 0;
    if (flowLs === 0) continue;
    const step: Step = {
      id: link.id,
      kind: link.kind,
      size: Math.abs(flowLs),
      upstream: flowLs > 0 ? link.from : link.to,
      downstream: flowLs > 0 ? link.to : link.from,
    };
    add(leaving, step.upstream, step);
    add(arriving, step.downstream, step);
  }
  const flowLs = flowOf.get(terminalId) ?? 0;
  if (flowLs === 0) return [];
  const [upstream, downstream] = flowLs > 0 ? [start.from, start.to] : [start.to, start.from];
  const back = walk(upstream, arriving, (step) => step.upstream);
  const on = walk(downstream, leaving, (step) => step.downstream);
  if (!back || !on) return [];
  // Both walks end at the pump: it is named once.
  return [...new Set([...back.reverse(), terminalId, ...on])];
}

interface Step {
  id: string;
  kind: string;
  size: number;
  upstream: string;
  downstream: string;
}

const add = (map: Map<string, Step[]>, node: string, step: Step) => map.set(node, [...(map.get(node) ?? []), step]);

/** Follows the largest flow from a node until a pump is passed; null where it leads nowhere. */
function walk(node: string, steps: Map<string, Step[]>, next: (step: Step) => string): string[] | null {
  const path: string[] = [];
  const seen = new Set<string>();
  let here = node;
  while (!seen.has(here)) {
    seen.add(here);
    const step = steps.get(here)?.reduce((a, b) => (b.size > a.size ? b : a));
    if (!step) return null;
    path.push(step.id);
    if (step.kind === 'pump') return path;
    here = next(step);
  }
  return null;
}
