import { designFlows } from './design-flows';
import { type FluidProperties } from './fluids';
import { frictionFactor } from './friction';
import { boreAreaM2, reynoldsPerLs } from './links/pipe';
import { type PipeSize, pipeSeries } from './pipe-series';
import { listed } from './solve-warnings';
import type { NetworkDocument, PipeLink, SizedPipe, SizeResult, SizingLimit, Warning } from './types';

/** Rings share their flow by the bores, and the bores follow the flow: rounds until nothing changes. */
const MOST_ROUNDS = 20;

/**
 * Bores for the design flows: each pipe with `size: true` gets the smallest nominal size of its series that keeps friction (Pa/m, local losses
 * left out) and velocity (m/s) within `options.sizing`. Answers the pipes and the whole sized document.
 */
export function size(document: NetworkDocument): SizeResult {
  const limits = [document.options?.sizing ?? []].flat();
  let sized = document;
  let flows = designFlows(sized);
  let chosen = new Map<string, SizedPipe>();
  for (let round = 0; round < MOST_ROUNDS && !flows.conflict.length; round++) {
    chosen = chooseSizes(sized, flows, limits);
    const changed = sized.links.some((link) => chosen.has(link.id) && chosen.get(link.id)!.boreMm !== (link as PipeLink).boreMm);
    sized = { ...sized, links: sized.links.map((link) => (chosen.has(link.id) ? { ...link, boreMm: chosen.get(link.id)!.boreMm } : link)) };
    if (!changed) return { converged: true, pipes: [...chosen.values()], document: sized, warnings: unmet(chosen, limits) };
    flows = designFlows(sized);
  }
  const message = flows.conflict.length
    ? `The design flows do not add up at ${listed(flows.conflict)}.`
    : `The bores had not settled after ${MOST_ROUNDS} rounds.`;
  const code = flows.conflict.length ? 'design-flow-conflict' : 'not-converged';
  return { converged: false, pipes: [...chosen.values()], document: sized, warnings: [{ code, message }] };
}

function chooseSizes(document: NetworkDocument, { network, flow }: ReturnType<typeof designFlows>, limits: SizingLimit[]) {
  const chosen = new Map<string, SizedPipe>();
  document.links.forEach((link, at) => {
    if (link.kind !== 'pipe' || !link.size || !link.series) return;
    const i = network.numberOf[at];
    chosen.set(link.id, sizePipe(link, i < 0 ? 0 : flow[i], limits, network.fluid));
  });
  return chosen;
}

function sizePipe(link: PipeLink, flowLs: number, limits: SizingLimit[], fluid: FluidProperties): SizedPipe {
  const { sizes } = pipeSeries[link.series!];
  const of = (each: PipeSize) => sizedPipe(link, flowLs, each, fluid);
  return sizes.map(of).find((each) => isWithin(each, limits)) ?? of(sizes[sizes.length - 1]);
}

/** Friction of a flow (L/s) in a size: dp/L = f rho v² / 2D. */
function sizedPipe(link: PipeLink, flowLs: number, { nominal, boreMm }: PipeSize, fluid: FluidProperties): SizedPipe {
  const velocityMs = Math.abs(flowLs) / 1000 / boreAreaM2(boreMm);
  const reynolds = Math.abs(flowLs) * reynoldsPerLs(boreMm, fluid);
  const factor = reynolds > 0 ? frictionFactor(reynolds, link.roughnessMm / boreMm) : 0;
  return { id: link.id, flowLs, nominal, boreMm, paPerM: (factor * fluid.densityKgM3 * velocityMs ** 2) / 2 / (boreMm / 1000), velocityMs };
}

/** The limit of the first range that reaches the bore, the last one beyond them all. */
function isWithin({ boreMm, paPerM, velocityMs }: SizedPipe, limits: SizingLimit[]): boolean {
  const limit = limits.find(({ upToBoreMm }) => upToBoreMm === undefined || boreMm <= upToBoreMm) ?? limits[limits.length - 1];
  return !limit || (paPerM <= limit.maxPaPerM && velocityMs <= limit.maxVelocityMs);
}

function unmet(chosen: Map<string, SizedPipe>, limits: SizingLimit[]): Warning[] {
  return [...chosen.values()].flatMap((pipe): Warning[] => {
    if (isWithin(pipe, limits)) return [];
    return [{ code: 'no-size', id: pipe.id, message: `No size of its series keeps ${pipe.id} within the limits; it has the largest.` }];
  });
}
