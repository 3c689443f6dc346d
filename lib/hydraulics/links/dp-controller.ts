import type { DpControllerLink } from '../types';
import type { LinkLaw } from './law';
import { QuadraticBatch, resistanceOfKv, usualFlowOfKv } from './quadratic';

/** Its law wide open. What it throttles beyond that depends on two nodes elsewhere and is found in `dp-control.ts`. */
export const dpControllerLaw: LinkLaw<DpControllerLink> = {
  isShut: () => false,
  usualFlowLs: (link, fluid) => usualFlowOfKv(link.kvs, fluid),
  gather: (links, first, fluid) =>
    new QuadraticBatch(
      first,
      Float64Array.from(links, (link) => resistanceOfKv(link.kvs, fluid)),
    ),
};
