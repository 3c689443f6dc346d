import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { WATER_1000 } from './network-of-loops';

/** A document whose nodes are the ends of its links, in the order in which they come up. Water of 1000 kg/m³ unless `rest` says otherwise. */
export function networkOfLinks(
  links: NetworkLink[],
  inflows: Record<string, number> = {},
  rest: Partial<NetworkDocument> = {},
): NetworkDocument {
  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  return { format: 'network/1', fluid: WATER_1000, nodes: ids.map((id) => ({ id, inflowLs: inflows[id] })), links, ...rest };
}

/** A drop of K Q² kPa, Q in L/s. */
export const resistance = (id: string, from: string, to: string, kpaPerLs2: number): NetworkLink => ({
  id,
  kind: 'resistance',
  from,
  to,
  designFlowLs: 1,
  designDropKpa: kpaPerLs2,
});

/** A terminal of a design flow (L/s) and drop (kPa). */
export const terminal = (id: string, from: string, to: string, designFlowLs: number, designDropKpa: number): NetworkLink => ({
  id,
  kind: 'terminal',
  from,
  to,
  designFlowLs,
  designDropKpa,
});

/** A pump of shutOff - fall Q² kPa (Q in L/s, water of 1000 kg/m³), up to `mostLs`. */
export const pump = (id: string, from: string, to: string, shutOffKpa: number, fall: number, mostLs = 2): NetworkLink => ({
  id,
  kind: 'pump',
  from,
  to,
  curve: Array.from({ length: 41 }, (_, k) => {
    const flowLs = (k * mostLs) / 40;
    return { flowLs, headM: (shutOffKpa - fall * flowLs ** 2) / 9.80665 };
  }),
});

/** A balancing valve whose scale from 0 to 4 is straight in Kv, fully open at `kvs`. */
export const valve = (id: string, from: string, to: string, kvs: number): NetworkLink => ({
  id,
  kind: 'balancingValve',
  from,
  to,
  kvTable: [0.01, 1, 2, 3, 4].map((setting) => ({ setting, kv: (kvs * setting) / 4 })),
});
