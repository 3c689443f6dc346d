import { GRAVITY_MS2 } from './links/law';
import { pressurePowerKw } from './pump-duty';
import type { LinkKind, NetworkDocument, SolveResult } from './types';

export type LinkPower = { id: string; kind: LinkKind; lostKw: number };
export type PowerBreakdown = {
  /** Power given to the water by all pumps that add head. */
  pumpsKw: number;
  /** Every link but the pumps that add head, with the power its drop takes from the water. */
  links: LinkPower[];
  lostByKind: Partial<Record<LinkKind, number>>;
  lostKw: number;
  /** Power brought in by flows from outside (0 in a closed loop). */
  boundaryKw: number;
  /** pumps + boundary - lost: what the solution's residuals leave. */
  imbalanceKw: number;
};

/**
 * Where the pumps' power goes: each link takes flow times drop (1 L/s at 1 kPa is 1 W). Over a closed loop the losses sum to the pumps'
 * hydraulic power, because flow balances at every node (Tellegen's theorem); inflows add their own at the node's piezometric pressure.
 */
export function powerBreakdown(
  document: Pick<NetworkDocument, 'nodes' | 'links'>,
  solution: Pick<SolveResult, 'links' | 'nodes' | 'fluid'>,
): PowerBreakdown {
  const results = new Map(solution.links.map((link) => [link.id, link]));
  const links: LinkPower[] = [];
  const lostByKind: PowerBreakdown['lostByKind'] = {};
  let pumpsKw = 0;
  let lostKw = 0;
  for (const { id, kind } of document.links) {
    const result = results.get(id);
    const powerKw = result ? pressurePowerKw(result.flowLs, result.dropKpa) : 0;
    // A pump driven past its curve brakes the water: its drop is then a loss like any other.
    if (kind === 'pump' && powerKw <= 0) {
      pumpsKw -= powerKw;
      continue;
    }
    links.push({ id, kind, lostKw: powerKw });
    lostByKind[kind] = (lostByKind[kind] ?? 0) + powerKw;
    lostKw += powerKw;
  }
  const boundaryKw = powerOfInflows(document, solution);
  return { pumpsKw, links, lostByKind, lostKw, boundaryKw, imbalanceKw: pumpsKw + boundaryKw - lostKw };
}

function powerOfInflows({ nodes }: Pick<NetworkDocument, 'nodes'>, solution: Pick<SolveResult, 'nodes' | 'fluid'>): number {
  const pressures = new Map(solution.nodes.map((node) => [node.id, node.pressureKpa]));
  return nodes.reduce((sum, { id, inflowLs = 0, elevationM = 0 }) => {
    const piezometricKpa = (pressures.get(id) ?? 0) + (solution.fluid.densityKgM3 * GRAVITY_MS2 * elevationM) / 1000;
    return sum + pressurePowerKw(inflowLs, piezometricKpa);
  }, 0);
}

/** Energy (kWh) a year that a loss in the water costs at the meter; `overallEfficiency` is pump times motor times drive, above 0, up to 1. */
export function annualLossKwh(lostKw: number, overallEfficiency: number, hours: number): number {
  return (lostKw / overallEfficiency) * hours;
}
