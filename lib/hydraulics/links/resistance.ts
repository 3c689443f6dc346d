import type { FluidProperties } from '../fluids';
import type { ResistanceLink } from '../types';
import { type LinkLaw, metresPerKpa } from './law';
import { QuadraticBatch, resistanceOfKv, usualFlowOfKv } from './quadratic';

function coefficient(link: ResistanceLink, fluid: FluidProperties): number {
  if (link.kv !== undefined) return resistanceOfKv(link.kv, fluid);
  return (link.designDropKpa! * metresPerKpa(fluid.densityKgM3)) / link.designFlowLs! ** 2;
}

/** Strainers, heat exchangers, chillers, boilers, open valves: by Kv, or through one design point. */
export const resistanceLaw: LinkLaw<ResistanceLink> = {
  isShut: () => false,
  usualFlowLs: (link, fluid) => (link.kv === undefined ? link.designFlowLs! : usualFlowOfKv(link.kv, fluid)),
  gather: (links, first, fluid) =>
    new QuadraticBatch(
      first,
      Float64Array.from(links, (link) => coefficient(link, fluid)),
    ),
};
