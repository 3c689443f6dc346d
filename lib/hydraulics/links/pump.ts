import { cubicAt, evaluateCubic, type MonotoneCubic, monotoneCubic } from '../monotone-cubic';
import type { PumpLink } from '../types';
import { type LinkBatch, type LinkLaw, WALL_SLOPE } from './law';

/** Past its last point a curve falls on at least this steeply, m per L/s, so that a level curve still has one duty point. */
const LEAST_FALL = 1e-6;

export const pumpSpeed = (link: PumpLink) => link.speed ?? 1;
export const hasNonReturn = (link: PumpLink) => link.nonReturn ?? true;

/** The full-speed curve as a monotone cubic through its points. */
export const pumpCurve = (link: PumpLink) =>
  monotoneCubic(
    link.curve.map((point) => point.flowLs),
    link.curve.map((point) => point.headM),
  );

/** Head and its slope left by `pumpHead`, m and m per L/s. */
export const headAt = { headM: 0, slope: 0 };

/**
 * Head raised at a flow (L/s) and speed ratio, left in `headAt`: affinity laws Q ~ n, H ~ n²; level before the first point,
 * straight on past the last. A stopped pump (speed 0) raises nothing.
 */
export function pumpHead(curve: MonotoneCubic, flowLs: number, speed: number): void {
  headAt.headM = 0;
  headAt.slope = 0;
  if (speed <= 0) return;
  const { x, y, slope } = curve;
  const last = x.length - 1;
  const q = flowLs / speed;
  if (q <= x[0]) {
    headAt.headM = speed * speed * y[0];
  } else if (q >= x[last]) {
    const fall = Math.min(slope[last], -LEAST_FALL);
    headAt.headM = speed * speed * (y[last] + fall * (q - x[last]));
    headAt.slope = speed * fall;
  } else {
    evaluateCubic(curve, q);
    headAt.headM = speed * speed * cubicAt.value;
    headAt.slope = speed * cubicAt.slope;
  }
}

class PumpBatch implements LinkBatch {
  private readonly curves: MonotoneCubic[];

  constructor(
    private readonly links: PumpLink[],
    private readonly first: number,
  ) {
    this.curves = links.map(pumpCurve);
  }

  evaluate(flow: Float64Array, loss: Float64Array, slope: Float64Array, a: number, b: number): void {
    for (let i = a; i < b; i++) {
      const link = this.links[i - this.first];
      pumpHead(this.curves[i - this.first], flow[i], pumpSpeed(link));
      loss[i] = -headAt.headM;
      slope[i] = -headAt.slope;
      if (flow[i] < 0 && hasNonReturn(link)) {
        loss[i] += WALL_SLOPE * flow[i];
        slope[i] = WALL_SLOPE;
      }
    }
  }
}

export const pumpLaw: LinkLaw<PumpLink> = {
  isShut: (link) => pumpSpeed(link) <= 0 && hasNonReturn(link),
  usualFlowLs: (link) => 0.6 * link.curve[link.curve.length - 1].flowLs * Math.max(pumpSpeed(link), 0.1),
  gather: (links, first) => new PumpBatch(links, first),
};
