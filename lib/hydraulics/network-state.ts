import { firstLines } from './first-lines';
import { WALL_SLOPE } from './links/law';
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

  /** Makes every chain a straight line for the first flows: leaves its head at rest in `chainLoss` and its slope in `chainSlope`; sets the least slopes. */
  linearize(byDesign: boolean): void {
    const { chains, baseFlow } = this.network;
    const { linkFlow, linkLoss, linkSlope, chainLoss, chainSlope, leastSlope } = this;
    firstLines(this.network, { flow: linkFlow, head: linkLoss, slope: linkSlope }, byDesign);
    for (let c = 0; c < chains.count; c++) {
      let head = 0;
      let line = 0;
      for (let p = chains.start[c]; p < chains.start[c + 1]; p++) {
        const i = chains.member[p];
        head += chains.sign[p] * (linkLoss[i] + linkSlope[i] * baseFlow[i]);
        line += linkSlope[i];
      }
      chainLoss[c] = head;
      chainSlope[c] = Math.max(line, 1e-9);
      leastSlope[c] = LEAST_SLOPE_RATIO * chainSlope[c];
    }
  }
}
