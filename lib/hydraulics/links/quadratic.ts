import type { FluidProperties } from '../fluids';
import { dropAcrossValveKpa, flowThroughValveLs } from '../valve-coefficient';
import { type LinkBatch, metresPerKpa, WALL_SLOPE } from './law';

/** A drop at which a valve or strainer usually stands, kPa: for first flows only. */
const USUAL_DROP_KPA = 8;

/** Head loss per flow squared, m/(L/s)², of a valve coefficient Kv above 0. */
export const resistanceOfKv = (kv: number, fluid: FluidProperties) =>
  dropAcrossValveKpa(kv, 1, fluid.densityKgM3) * metresPerKpa(fluid.densityKgM3);

export const usualFlowOfKv = (kv: number, fluid: FluidProperties) => flowThroughValveLs(kv, USUAL_DROP_KPA, fluid.densityKgM3);

/** Head loss r q |q|, odd in q: every opening that is turbulent at all flows. */
export class QuadraticBatch implements LinkBatch {
  constructor(
    private readonly first: number,
    private readonly resistance: Float64Array,
  ) {}

  evaluate(flow: Float64Array, loss: Float64Array, slope: Float64Array, a: number, b: number): void {
    const { first, resistance } = this;
    for (let i = a; i < b; i++) {
      const magnitude = Math.abs(flow[i]);
      const perFlow = resistance[i - first] * magnitude;
      loss[i] = perFlow * flow[i];
      slope[i] = 2 * perFlow;
    }
  }
}

/** The same opening with a wall: against all flow above `limit` (L/s), or below 0 where `limit` is absent. */
export class WalledQuadraticBatch implements LinkBatch {
  constructor(
    private readonly first: number,
    private readonly resistance: Float64Array,
    private readonly limit: Float64Array | null,
  ) {}

  evaluate(flow: Float64Array, loss: Float64Array, slope: Float64Array, a: number, b: number): void {
    const { first, resistance, limit } = this;
    for (let i = a; i < b; i++) {
      const wall = limit ? limit[i - first] : 0;
      const beyond = limit ? flow[i] - wall : -flow[i];
      if (beyond > 0) {
        const away = limit ? beyond : -beyond;
        loss[i] = resistance[i - first] * wall * wall + WALL_SLOPE * away;
        slope[i] = WALL_SLOPE;
        continue;
      }
      const perFlow = resistance[i - first] * Math.abs(flow[i]);
      loss[i] = perFlow * flow[i];
      slope[i] = 2 * perFlow;
    }
  }
}
