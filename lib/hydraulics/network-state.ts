import { WALL_SLOPE } from './links/law';
import { usualFlowLs } from './links/link-laws';
import type { PreparedNetwork } from './prepare';

/** A slope never counts for less than this part of the usual one, so that a loop at rest still has a finite correction. */
const LEAST_SLOPE_RATIO = 1e-4;

/**
 * Flows, head losses (m) and slopes (m per L/s) of a network while it is being solved. The chains' flows are the state; `evaluate`
 * follows from them. Nodes balance whatever the chains carry round their loops.
 */
export class NetworkState {
  readonly chainFlow: Float64Array;
  readonly chainLoss: Float64Array;
  readonly chainSlope: Float64Array;
  readonly linkFlow: Float64Array;
  readonly linkLoss: Float64Array;
  readonly linkSlope: Float64Array;
  /** Head that a differential pressure controller takes beyond its open valve, m, and whether it is shut; by link, 0 elsewhere. */
  readonly throttledHead: Float64Array;
  readonly shut: Uint8Array;
  private readonly leastSlope: Float64Array;
  private readonly controllers: number[] = [];

  constructor(readonly network: PreparedNetwork) {
    const { chains, from, kinds } = network;
    this.chainFlow = new Float64Array(chains.count);
    this.chainLoss = new Float64Array(chains.count);
    this.chainSlope = new Float64Array(chains.count);
    this.leastSlope = new Float64Array(chains.count);
    this.linkFlow = new Float64Array(from.length);
    this.linkLoss = new Float64Array(from.length);
    this.linkSlope = new Float64Array(from.length);
    this.throttledHead = new Float64Array(from.length);
    this.shut = new Uint8Array(from.length);
    for (const { kind, first, last } of kinds) if (kind === 'dpController') for (let i = first; i < last; i++) this.controllers.push(i);
  }

  /** Every controller wide open, as before a solution. */
  openControllers(): void {
    this.throttledHead.fill(0);
    this.shut.fill(0);
  }

  /** Losses and slopes of all links and chains at the chains' present flows. */
  evaluate(): void {
    this.spreadFlows();
    this.evaluateLinks();
    this.gatherChains();
  }

  /** Losses of the links that no chain holds follow from the same call; their flow never changes. */
  private spreadFlows(): void {
    const { chains, baseFlow } = this.network;
    const { linkFlow, chainFlow } = this;
    const { start, member, sign, count } = chains;
    linkFlow.set(baseFlow);
    for (let c = 0; c < count; c++) for (let p = start[c]; p < start[c + 1]; p++) linkFlow[member[p]] += sign[p] * chainFlow[c];
  }

  private evaluateLinks(): void {
    const { linkFlow, linkLoss, linkSlope } = this;
    for (const { batch, first, last } of this.network.kinds) batch.evaluate(linkFlow, linkLoss, linkSlope, first, last);
    for (const i of this.controllers) this.applyController(i);
  }

  private applyController(i: number): void {
    this.linkLoss[i] += this.throttledHead[i];
    if (!this.shut[i]) return;
    this.linkLoss[i] = WALL_SLOPE * this.linkFlow[i];
    this.linkSlope[i] = WALL_SLOPE;
  }

  private gatherChains(): void {
    const { start, member, sign, count } = this.network.chains;
    const { chainLoss, chainSlope, linkLoss, linkSlope, leastSlope } = this;
    for (let c = 0; c < count; c++) {
      let loss = 0;
      let slope = 0;
      for (let p = start[c]; p < start[c + 1]; p++) {
        const i = member[p];
        loss += sign[p] * linkLoss[i];
        slope += linkSlope[i];
      }
      chainLoss[c] = loss;
      chainSlope[c] = slope > leastSlope[c] ? slope : leastSlope[c];
    }
  }

  /** As `evaluate`, for the links of one chain alone: what correcting one loop after another needs. */
  evaluateChain(c: number): void {
    const { chains, baseFlow, kinds } = this.network;
    const { linkFlow, linkLoss, linkSlope } = this;
    let loss = 0;
    let slope = 0;
    for (let p = chains.start[c]; p < chains.start[c + 1]; p++) {
      const i = chains.member[p];
      linkFlow[i] = baseFlow[i] + chains.sign[p] * this.chainFlow[c];
      let k = 0;
      while (kinds[k].last <= i) k++;
      kinds[k].batch.evaluate(linkFlow, linkLoss, linkSlope, i, i + 1);
      if (kinds[k].kind === 'dpController') this.applyController(i);
      loss += chains.sign[p] * linkLoss[i];
      slope += linkSlope[i];
    }
    this.chainLoss[c] = loss;
    this.chainSlope[c] = Math.max(slope, this.leastSlope[c]);
  }

  /**
   * Makes every chain a straight line for the first flows: a passive link through its drop at a usual flow, a pump along its
   * tangent there. Leaves the head at rest in `chainLoss` and the line's slope in `chainSlope`; sets the least slopes.
   */
  linearize(): void {
    const { chains, baseFlow, document, position, fluid, kinds } = this.network;
    const { linkFlow, linkLoss, linkSlope, chainLoss, chainSlope, leastSlope } = this;
    for (let i = 0; i < linkFlow.length; i++) linkFlow[i] = usualFlowLs(document.links[position[i]], fluid);
    this.shareDesignFlows();
    for (const { batch, first, last } of kinds) batch.evaluate(linkFlow, linkLoss, linkSlope, first, last);
    const isPump = new Uint8Array(linkFlow.length);
    for (const { kind, first, last } of kinds) if (kind === 'pump') isPump.fill(1, first, last);
    for (let c = 0; c < chains.count; c++) {
      let head = 0;
      let line = 0;
      for (let p = chains.start[c]; p < chains.start[c + 1]; p++) {
        const i = chains.member[p];
        const slope = isPump[i] ? linkSlope[i] : Math.min(linkLoss[i] / linkFlow[i], WALL_SLOPE);
        const atRest = isPump[i] ? linkLoss[i] - slope * linkFlow[i] : 0;
        head += chains.sign[p] * (atRest + slope * baseFlow[i]);
        line += slope;
      }
      chainLoss[c] = head;
      chainSlope[c] = Math.max(line, 1e-9);
      leastSlope[c] = LEAST_SLOPE_RATIO * chainSlope[c];
    }
  }

  /** A terminal's design flow is also what everything in series with it carries, but no more than a limiter there lets through. */
  private shareDesignFlows(): void {
    const { chains, kinds } = this.network;
    const { linkFlow } = this;
    const shared = new Float64Array(chains.count).fill(Infinity);
    for (const name of ['terminal', 'flowLimiter'] as const) {
      const range = kinds.find(({ kind }) => kind === name);
      for (let i = range?.first ?? 0; i < (range?.last ?? 0); i++) {
        const c = chains.chainOf[i];
        if (c >= 0 && linkFlow[i] < shared[c]) shared[c] = linkFlow[i];
      }
    }
    for (let c = 0; c < chains.count; c++) {
      if (shared[c] === Infinity) continue;
      for (let p = chains.start[c]; p < chains.start[c + 1]; p++) linkFlow[chains.member[p]] = shared[c];
    }
  }
}
