import type { FluidProperties } from '../fluids';
import type { TerminalLink } from '../types';
import { type LinkBatch, type LinkLaw, metresPerKpa } from './law';

/** Nearer to rest than this part of design flow an exponent below 2 keeps the slope that it has here, so that it stays finite. */
const REST = 1e-9;

/** drop = designDrop (Q/design)^exponent, odd in Q. */
class TerminalBatch implements LinkBatch {
  private readonly designHead: Float64Array;
  private readonly designFlow: Float64Array;
  private readonly exponent: Float64Array;

  constructor(
    links: TerminalLink[],
    private readonly first: number,
    fluid: FluidProperties,
  ) {
    const count = links.length;
    const head = metresPerKpa(fluid.densityKgM3);
    this.designHead = new Float64Array(count);
    this.designFlow = new Float64Array(count);
    this.exponent = new Float64Array(count);
    for (let k = 0; k < count; k++) {
      this.designHead[k] = links[k].designDropKpa * head;
      this.designFlow[k] = links[k].designFlowLs;
      this.exponent[k] = links[k].exponent ?? 2;
    }
  }

  evaluate(flow: Float64Array, loss: Float64Array, slope: Float64Array, a: number, b: number): void {
    const { first, designHead, designFlow, exponent } = this;
    for (let i = a; i < b; i++) {
      const k = i - first;
      const n = exponent[k];
      const ratio = Math.max(Math.abs(flow[i]) / designFlow[k], n === 2 ? 0 : REST);
      const perFlow = (designHead[k] / designFlow[k]) * (n === 2 ? ratio : ratio ** (n - 1));
      loss[i] = perFlow * flow[i];
      slope[i] = n * perFlow;
    }
  }
}

export const terminalLaw: LinkLaw<TerminalLink> = {
  isShut: () => false,
  usualFlowLs: (link) => link.designFlowLs,
  gather: (links, first, fluid) => new TerminalBatch(links, first, fluid),
};
