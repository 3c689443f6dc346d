import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { WATER_1000 } from './network-of-loops';

export interface HouseExample {
  /** kPa per (L/s)² of the main from the pump to the first tee. */
  firstMain?: number;
  kv?: [number, number, number];
  secondTerminal?: number;
  closed?: string;
  bypass?: number;
  pump?: (flowLs: number) => number;
}

const KPA_PER_M = 9.80665;

/**
 * Three terminals, direct return, every loss K Q² in kPa and L/s, pump 60 - 15 Q² kPa. Constructed; solved by hand: at design (0.5, 0.3,
 * 0.2 L/s) 45 kPa at the pump leave 35, 30 and 28 kPa at the tees, and valves of Kv 4.6476, 3.4153, 4.1569.
 */
export function houseExample({
  firstMain = 10,
  kv = [4.6475800154, 3.415259873, 4.1569219382],
  secondTerminal = 222.2222222,
  closed,
  bypass,
  pump = (q) => 60 - 15 * q * q,
}: HouseExample = {}): NetworkDocument {
  const loss = (id: string, from: string, to: string, k: number): NetworkLink => ({
    id,
    kind: 'resistance',
    from,
    to,
    designFlowLs: 1,
    designDropKpa: k,
  });
  const curve = Array.from({ length: 161 }, (_, i) => ({ flowLs: i / 100, headM: pump(i / 100) / KPA_PER_M }));
  const design = [0.5, 0.3, 0.2];
  const links: NetworkLink[] = [
    { id: 'PU', kind: 'pump', from: 'X', to: 'P', curve },
    loss('main1', 'P', 'n1', firstMain),
    loss('main2', 'n1', 'n2', 20),
    loss('main3', 'n2', 'n3', 50),
  ];
  [80, secondTerminal, 625].forEach((k, i) => {
    const kvTable = [1, 2, 3, 4].map((setting) => ({ setting, kv: (kv[i] * setting) / 4 }));
    links.push(
      { id: `T${i + 1}`, kind: 'terminal', from: `n${i + 1}`, to: `m${i + 1}`, designFlowLs: design[i], designDropKpa: k * design[i] ** 2 },
      { id: `V${i + 1}`, kind: 'balancingValve', from: `m${i + 1}`, to: 'X', kvTable, closed: closed === `T${i + 1}` },
    );
  });
  if (bypass) links.push(loss('bypass', 'n1', 'X', bypass));
  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  return { format: 'network/1', fluid: WATER_1000, reference: { node: 'X', gaugePressureKpa: 0 }, nodes: ids.map((id) => ({ id })), links };
}
