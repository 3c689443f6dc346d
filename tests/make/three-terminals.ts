import type { NetworkDocument, NetworkLink } from '@/lib/hydraulics/types';
import { kvForFlow } from '@/lib/hydraulics/valve-coefficient';

const GRAVITY = 9.80665;
const kpa = (headKpa: number) => headKpa / GRAVITY;

/** Case N11: three terminals on direct-return mains, all losses K q² (kPa, L/s), pump 60 - 15 q² kPa, water of 1000 kg/m³. Resistances by their design pairs. */
export function threeTerminals(settings: { V1: number; V2: number; V3: number } = { V1: 9, V2: 6, V3: 4.1569 }): NetworkDocument {
  const main = (id: string, from: string, to: string, k: number): NetworkLink => ({
    id,
    kind: 'resistance',
    from,
    to,
    designFlowLs: 1,
    designDropKpa: k,
  });
  const unit = (n: number, flowLs: number, k: number, largestKv: number, setting: number): NetworkLink[] => [
    { id: `T${n}`, kind: 'terminal', from: `n${n}`, to: `t${n}`, designFlowLs: flowLs, designDropKpa: k * flowLs ** 2 },
    // The scale of these valves is their Kv, so that settings read as Kv.
    {
      id: `V${n}`,
      kind: 'balancingValve',
      from: `t${n}`,
      to: 'back',
      kvTable: [
        { setting: 0.5, kv: 0.5 },
        { setting: largestKv, kv: largestKv },
      ],
      setting,
    },
  ];
  const flows = Array.from({ length: 17 }, (_, k) => k / 8);
  const links: NetworkLink[] = [
    {
      id: 'PU',
      kind: 'pump',
      from: 'back',
      to: 'out',
      curve: flows.map((flowLs) => ({ flowLs, headM: kpa(60 - 15 * flowLs ** 2) })),
      speed: 1,
    },
    main('M1', 'out', 'n1', 10),
    main('M2', 'n1', 'n2', 20),
    main('M3', 'n2', 'n3', 50),
    ...unit(1, 0.5, 80, 9, settings.V1),
    ...unit(2, 0.3, 222.2222, 6, settings.V2),
    ...unit(3, 0.2, 625, 4.1569, settings.V3),
  ];
  const ids = [...new Set(links.flatMap((link) => [link.from, link.to]))];
  const fluid = { medium: 'custom' as const, densityKgM3: 1000, viscosityMPaS: 1, specificHeatKJKgK: 4.19 };
  return { format: 'network/1', fluid, nodes: ids.map((id) => ({ id })), links };
}

/** Settings at which all three have design flow. */
export const balancedKv = { V1: kvForFlow(0.5, 15), V2: kvForFlow(0.3, 10), V3: kvForFlow(0.2, 3) };
