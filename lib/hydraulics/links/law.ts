import type { FluidProperties } from '../fluids';
import type { NetworkLink } from '../types';

export const GRAVITY_MS2 = 9.80665;

/**
 * Slope of a wall, m per L/s: what a shut check valve or a flow limiter at its limit puts against more flow. Steep enough that 10 m
 * push 1e-8 L/s through, far under the 1e-6 L/s to which nodes are asked to balance.
 */
export const WALL_SLOPE = 1e9;

/** Metres of the fluid per kPa. */
export const metresPerKpa = (densityKgM3: number) => 1000 / (densityKgM3 * GRAVITY_MS2);

/**
 * The links of one kind, gathered for the iteration under the consecutive numbers first, first + 1, …
 * `evaluate` writes head loss (m, from → to) and its slope (m per L/s, never negative) of links a … b - 1 at their flow (L/s).
 */
export interface LinkBatch {
  evaluate(flow: Float64Array, loss: Float64Array, slope: Float64Array, a: number, b: number): void;
}

/** The law of one kind of link. A new kind is one file with one of these, and one row of `linkLaws`. */
export interface LinkLaw<L extends NetworkLink> {
  /** Whether nothing can pass: the link is left out of the network. */
  isShut(link: L): boolean;
  /** A usual flow (L/s, above 0), from which the first flows of the iteration are made. */
  usualFlowLs(link: L, fluid: FluidProperties): number;
  gather(links: L[], first: number, fluid: FluidProperties): LinkBatch;
}
