import { balance } from '@/lib/hydraulics/balance';
import { fluidProperties } from '@/lib/hydraulics/fluids';
import type { BalancingValveLink, NetworkDocument } from '@/lib/hydraulics/types';
import { type LoopHierarchy, loopHierarchy, type Station } from './hierarchy';

/** What follows from a document alone, kept with it. */
export interface ProportionalDesign {
  hierarchy: LoopHierarchy;
  groups: Station[];
  leaves: Station[];
  main: Station | null;
  pump: string | null;
  valves: Map<string, BalancingValveLink>;
  /** Drop at design flow of each link, kPa. */
  drops: Map<string, number>;
  densityKgM3: number;
}

const designs = new WeakMap<NetworkDocument, ProportionalDesign>();

export function proportionalDesign(document: NetworkDocument): ProportionalDesign {
  const known = designs.get(document);
  if (known) return known;
  const hierarchy = loopHierarchy(document);
  const stations = [...hierarchy.stations.values()];
  const fluid = fluidProperties(document.fluid);
  const drops = new Map(balance(document).solution.links.map((link) => [link.id, Math.abs(link.dropKpa)]));
  const design: ProportionalDesign = {
    hierarchy,
    groups: stations.filter((station) => station.members.length > 1),
    leaves: stations.filter((station) => station.members.length === 0 && station.kind === 'valve'),
    main: topValve(hierarchy.top),
    pump: stations.find((station) => station.kind === 'pump')?.link ?? null,
    valves: new Map(document.links.flatMap((link) => (link.kind === 'balancingValve' ? [[link.id, link] as const] : []))),
    drops,
    densityKgM3: fluid.ok ? fluid.properties.densityKgM3 : 1000,
  };
  designs.set(document, design);
  return design;
}

/** The valve through which everything goes, where there is one. */
function topValve(top: Station | null): Station | null {
  if (!top || top.kind === 'valve') return top;
  return top.members.length === 1 ? topValve(top.members[0]) : null;
}
