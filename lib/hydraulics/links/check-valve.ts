import type { CheckValveLink } from '../types';
import type { LinkLaw } from './law';
import { resistanceOfKv, usualFlowOfKv, WalledQuadraticBatch } from './quadratic';

/** An opening that lets nothing back. */
export const checkValveLaw: LinkLaw<CheckValveLink> = {
  isShut: () => false,
  usualFlowLs: (link, fluid) => usualFlowOfKv(link.kv, fluid),
  gather: (links, first, fluid) => {
    const resistance = Float64Array.from(links, (link) => resistanceOfKv(link.kv, fluid));
    return new WalledQuadraticBatch(first, resistance, null);
  },
};
