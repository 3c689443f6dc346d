import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';

type LinkLaw = NetworkLink extends infer L ? (L extends NetworkLink ? Omit<L, 'id' | 'from' | 'to'> : never) : never;

export const WATER_1000 = { medium: 'custom' as const, densityKgM3: 1000, viscosityMPaS: 1, specificHeatKJKgK: 4.19 };
const KPA_PER_M = 9.80665;

/** h [m] = K Q^n with Q in L/s, as a link. */
export const headLoss = (perFlow: number, exponent = 2): LinkLaw => ({
  kind: 'terminal',
  designFlowLs: 1,
  designDropKpa: perFlow * KPA_PER_M,
  exponent,
});

/**
 * The network of a published example that gives its loops (pipes numbered from 1, negative against their direction) and
 * first flows (L/s) instead of nodes: ends are what the loops make them, inflows what the first flows leave over.
 */
export function networkOfLoops(loops: number[][], firstFlows: number[], laws: LinkLaw[], fluid: NetworkDocument['fluid']): NetworkDocument {
  const group = new Map<string, string>();
  const nodeOf = (end: string): string => {
    const up = group.get(end);
    return up === undefined || up === end ? end : nodeOf(up);
  };
  const start = (pipe: number) => `${Math.abs(pipe)}${pipe > 0 ? 'a' : 'b'}`;
  const end = (pipe: number) => `${Math.abs(pipe)}${pipe > 0 ? 'b' : 'a'}`;
  for (const loop of loops) loop.forEach((pipe, k) => group.set(nodeOf(end(pipe)), nodeOf(start(loop[(k + 1) % loop.length]))));

  const links = laws.map((law, k) => ({ ...law, id: `${k + 1}`, from: nodeOf(`${k + 1}a`), to: nodeOf(`${k + 1}b`) }) as NetworkLink);
  const inflow = new Map<string, number>();
  links.forEach((link, k) => {
    inflow.set(link.from, (inflow.get(link.from) ?? 0) + firstFlows[k]);
    inflow.set(link.to, (inflow.get(link.to) ?? 0) - firstFlows[k]);
  });
  const nodes = [...inflow].map(([id, flow]) => ({ id, inflowLs: Math.abs(flow) < 1e-9 ? 0 : flow }));
  return { format: 'network/1', fluid, nodes, links };
}
