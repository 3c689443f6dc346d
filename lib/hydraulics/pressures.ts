import { GRAVITY_MS2 } from './links/law';
import { ATMOSPHERE_KPA } from './pump-duty';
import type { NetworkDocument, SolveResult } from './types';

/** Gauge pressure below which a high point draws air or vents badly: 0.3 bar, common practice. */
export const LEAST_TOP_PRESSURE_KPA = 30;

/**
 * Gauge pressure (kPa) to fill a stopped system to, at the filling point: the static height to the highest point above it (m) and what is to
 * remain there. Source: hydrostatics; the margin is common practice.
 */
export function staticFillPressureKpa(highestAboveFillM: number, densityKgM3: number, topKpa = LEAST_TOP_PRESSURE_KPA): number {
  return (densityKgM3 * GRAVITY_MS2 * highestAboveFillM) / 1000 + topKpa;
}

/** Gauge pressure (kPa) of every node with the pumps stopped, from the reference node; meaningful for nodes connected to it. */
export function stoppedPressures(
  { nodes, reference }: Pick<NetworkDocument, 'nodes' | 'reference'>,
  densityKgM3: number,
): { id: string; pressureKpa: number }[] {
  const base = nodes.find((node) => node.id === reference?.node) ?? nodes[0];
  const pressureAt = (elevationM: number) =>
    (reference?.gaugePressureKpa ?? 0) + (densityKgM3 * GRAVITY_MS2 * ((base.elevationM ?? 0) - elevationM)) / 1000;
  return nodes.map((node) => ({ id: node.id, pressureKpa: pressureAt(node.elevationM ?? 0) }));
}

export type PressureConcern = 'boils' | 'below-atmosphere' | 'low' | 'above-rating';
export type NodePressure = {
  id: string;
  pressureKpa: number;
  /** Absolute pressure less vapour pressure; null when the vapour pressure is not known. */
  aboveVapourKpa: number | null;
  concern: PressureConcern | null;
};
export type PressureLimits = {
  /** Absolute, at the hottest the water gets. Null: boiling is not judged. Water's own is a safe (high) value for a glycol mixture. */
  vapourKpaAbs: number | null;
  atmosphereKpa?: number;
  leastGaugeKpa?: number;
  /** Gauge rating of the weakest component; none by default. */
  ratingKpa?: number;
};
export type PressureSurvey = { nodes: NodePressure[]; lowest: NodePressure | null; highest: NodePressure | null };

/**
 * Judges the gauge pressure (kPa) of every node of a solution: boils (absolute at or below the vapour pressure), below the atmosphere (draws
 * air), low (under `leastGaugeKpa`, default 30) or above the rating; and finds the lowest and highest (the first of equals, null without nodes).
 */
export function surveyPressures(solution: Pick<SolveResult, 'nodes'>, limits: PressureLimits): PressureSurvey {
  const { vapourKpaAbs, atmosphereKpa = ATMOSPHERE_KPA } = limits;
  const nodes = solution.nodes.map(({ id, pressureKpa }): NodePressure => {
    const aboveVapourKpa = vapourKpaAbs === null ? null : pressureKpa + atmosphereKpa - vapourKpaAbs;
    return { id, pressureKpa, aboveVapourKpa, concern: concernOf(pressureKpa, aboveVapourKpa, limits) };
  });
  const extreme = (better: (a: number, b: number) => boolean) =>
    nodes.reduce<NodePressure | null>((best, node) => (best === null || better(node.pressureKpa, best.pressureKpa) ? node : best), null);
  return { nodes, lowest: extreme((a, b) => a < b), highest: extreme((a, b) => a > b) };
}

function concernOf(pressureKpa: number, aboveVapourKpa: number | null, limits: PressureLimits): PressureConcern | null {
  if (aboveVapourKpa !== null && aboveVapourKpa <= 0) return 'boils';
  if (pressureKpa < 0) return 'below-atmosphere';
  if (pressureKpa < (limits.leastGaugeKpa ?? LEAST_TOP_PRESSURE_KPA)) return 'low';
  return pressureKpa > (limits.ratingKpa ?? Infinity) ? 'above-rating' : null;
}
