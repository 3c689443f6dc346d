import type { FluidProperties } from '../fluids';
import { friction, frictionOf, LAMINAR_RE, TURBULENT_RE } from '../friction';
import type { PipeLink } from '../types';
import { GRAVITY_MS2, type LinkBatch, type LinkLaw } from './law';

const USUAL_VELOCITY_MS = 0.7;

export const boreAreaM2 = (boreMm: number) => (Math.PI / 4) * (boreMm / 1000) ** 2;

/** Reynolds number per L/s in a bore: rho D / (mu A), flow in m³/s. */
export const reynoldsPerLs = (boreMm: number, fluid: FluidProperties) =>
  (fluid.densityKgM3 / (boreAreaM2(boreMm) * 1000 * (fluid.viscosityMPaS / 1000))) * (boreMm / 1000);

/** Darcy-Weisbach with local losses: h = (f L/D + K) v²/2g. */
class PipeBatch implements LinkBatch {
  private readonly perReynolds: Float64Array;
  private readonly velocityHead: Float64Array;
  private readonly lengthInBores: Float64Array;
  private readonly roughness: Float64Array;
  private readonly minorK: Float64Array;
  /** Of the last turbulent flow: what `frictionOf` left for the next, its logarithmic slope and the Reynolds number; guess 0 where there is none. */
  private readonly guess: Float64Array;
  private readonly logSlope: Float64Array;
  private readonly reynoldsBefore: Float64Array;

  constructor(
    links: PipeLink[],
    private readonly first: number,
    fluid: FluidProperties,
  ) {
    const count = links.length;
    this.perReynolds = new Float64Array(count);
    this.velocityHead = new Float64Array(count);
    this.lengthInBores = new Float64Array(count);
    this.roughness = new Float64Array(count);
    this.minorK = new Float64Array(count);
    this.guess = new Float64Array(count);
    this.logSlope = new Float64Array(count);
    this.reynoldsBefore = new Float64Array(count);
    for (let k = 0; k < count; k++) {
      const { boreMm, lengthM, roughnessMm, minorK } = links[k];
      this.perReynolds[k] = reynoldsPerLs(boreMm, fluid);
      this.velocityHead[k] = (1e-3 / boreAreaM2(boreMm)) ** 2 / (2 * GRAVITY_MS2);
      this.lengthInBores[k] = (lengthM * 1000) / boreMm;
      this.roughness[k] = roughnessMm / boreMm;
      this.minorK[k] = minorK ?? 0;
    }
  }

  evaluate(flow: Float64Array, loss: Float64Array, slope: Float64Array, a: number, b: number): void {
    const { first, perReynolds, velocityHead, lengthInBores, roughness, minorK, guess, logSlope, reynoldsBefore } = this;
    for (let i = a; i < b; i++) {
      const k = i - first;
      const q = flow[i];
      const magnitude = Math.abs(q);
      const minor = velocityHead[k] * minorK[k] * magnitude;
      const reynolds = perReynolds[k] * magnitude;
      if (reynolds < LAMINAR_RE) {
        // f/Re stays finite at rest: a pipe keeps its laminar slope there.
        const laminar = ((64 * lengthInBores[k]) / perReynolds[k]) * velocityHead[k];
        loss[i] = (laminar + minor) * q;
        slope[i] = laminar + 2 * minor;
        continue;
      }
      // The guess goes with f to the power -1/2: along its slope it comes so near that one step reaches rounding.
      const risen = (2 * (reynolds - reynoldsBefore[k])) / (reynolds + reynoldsBefore[k]);
      frictionOf(reynolds, roughness[k], guess[k] * (1 - 0.5 * logSlope[k] * risen));
      guess[k] = friction.guess;
      logSlope[k] = reynolds >= TURBULENT_RE ? friction.logSlope : 0;
      reynoldsBefore[k] = reynolds;
      const perFlow = velocityHead[k] * lengthInBores[k] * friction.factor * magnitude;
      loss[i] = (perFlow + minor) * q;
      slope[i] = perFlow * (2 + friction.logSlope) + 2 * minor;
    }
  }
}

export const pipeLaw: LinkLaw<PipeLink> = {
  isShut: () => false,
  usualFlowLs: (link) => USUAL_VELOCITY_MS * boreAreaM2(link.boreMm) * 1000,
  gather: (links, first, fluid) => new PipeBatch(links, first, fluid),
};
