import type { FluidProperties } from '../fluids';
import type { LinkKind, LinkOf, NetworkLink } from '../types';
import { balancingValveLaw } from './balancing-valve';
import { checkValveLaw } from './check-valve';
import { controlValveLaw } from './control-valve';
import { dpControllerLaw } from './dp-controller';
import { flowLimiterLaw } from './flow-limiter';
import type { LinkBatch, LinkLaw } from './law';
import { pipeLaw } from './pipe';
import { pumpLaw } from './pump';
import { resistanceLaw } from './resistance';
import { terminalLaw } from './terminal';

export const linkLaws: { [K in LinkKind]: LinkLaw<LinkOf<K>> } = {
  pipe: pipeLaw,
  pump: pumpLaw,
  terminal: terminalLaw,
  controlValve: controlValveLaw,
  balancingValve: balancingValveLaw,
  resistance: resistanceLaw,
  checkValve: checkValveLaw,
  flowLimiter: flowLimiterLaw,
  dpController: dpControllerLaw,
};

/** The order in which kinds are numbered in the iteration. */
export const linkKinds = Object.keys(linkLaws) as LinkKind[];

/** The row of `linkLaws` for a link, which TypeScript cannot pair with the link's own kind by itself. */
const lawOf = (kind: LinkKind) => linkLaws[kind] as unknown as LinkLaw<NetworkLink>;

/** Whether nothing can pass: closed, or a law that says so (a valve at Kv 0, a stopped pump with its non-return). */
export const isShut = (link: NetworkLink) => link.closed === true || lawOf(link.kind).isShut(link);

export const usualFlowLs = (link: NetworkLink, fluid: FluidProperties) => lawOf(link.kind).usualFlowLs(link, fluid);

export const gather = (kind: LinkKind, links: NetworkLink[], first: number, fluid: FluidProperties): LinkBatch =>
  lawOf(kind).gather(links, first, fluid);
