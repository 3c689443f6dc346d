import type { FlowLimiterLink } from '../types';
import { type LinkLaw, metresPerKpa } from './law';
import { WalledQuadraticBatch } from './quadratic';

/** Holds the limit while its drop is at least `minDropKpa`; below that, and backwards, the opening that passes the limit at `minDropKpa`. */
export const flowLimiterLaw: LinkLaw<FlowLimiterLink> = {
  isShut: () => false,
  usualFlowLs: (link) => link.limitLs,
  gather: (links, first, fluid) => {
    const head = metresPerKpa(fluid.densityKgM3);
    const resistance = Float64Array.from(links, (link) => (link.minDropKpa * head) / link.limitLs ** 2);
    return new WalledQuadraticBatch(
      first,
      resistance,
      Float64Array.from(links, (link) => link.limitLs),
    );
  },
};
