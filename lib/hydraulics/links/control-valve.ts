import { inherentRatio } from '../control-valve';
import type { ControlValveLink } from '../types';
import type { LinkLaw } from './law';
import { QuadraticBatch, resistanceOfKv, usualFlowOfKv } from './quadratic';

/** Kv at the valve's opening, from its inherent characteristic; 0 when shut. */
export const controlValveKv = (link: ControlValveLink) =>
  link.kvs * inherentRatio(link.characteristic ?? 'equalPercentage', link.opening ?? 1, link.rangeability);

export const controlValveLaw: LinkLaw<ControlValveLink> = {
  isShut: (link) => controlValveKv(link) <= 0,
  usualFlowLs: (link, fluid) => usualFlowOfKv(controlValveKv(link), fluid),
  gather: (links, first, fluid) =>
    new QuadraticBatch(
      first,
      Float64Array.from(links, (link) => resistanceOfKv(controlValveKv(link), fluid)),
    ),
};
