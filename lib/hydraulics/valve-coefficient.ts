import { boreAreaM2 } from './links/pipe';

/**
 * The valve law: Q [m³/h] = Kv sqrt(dp [bar] · 1000 / rho), Kv being the flow of water in m³/h at 1 bar (IEC 60534-2-1, turbulent, not choked).
 * Flows in L/s, differential pressures in kPa, density in kg/m³ (default 1000). Check values: cases V4 to V6 and N11 in the tests.
 */

const LS_PER_M3H = 1 / 3.6;
const KPA_PER_BAR = 100;
const REFERENCE_DENSITY_KGM3 = 1000;

const GALLON_M3 = 0.003785411784;
const PSI_BAR = 0.0689475729317831;
/** Cv (US gpm at 1 psi) of a valve with Kv 1: exact from the units, 1.1561. */
export const CV_PER_KV = Math.sqrt(PSI_BAR) / (GALLON_M3 * 60);

/** Flow through a valve, L/s, with the sign of its differential pressure; kv 0 or more (0 passes nothing). */
export function flowThroughValveLs(kv: number, dropKpa: number, densityKgM3 = REFERENCE_DENSITY_KGM3): number {
  const drop = (Math.abs(dropKpa) / KPA_PER_BAR) * (REFERENCE_DENSITY_KGM3 / densityKgM3);
  return Math.sign(dropKpa) * kv * Math.sqrt(drop) * LS_PER_M3H;
}

/** Differential pressure across a valve, kPa, with the sign of its flow; kv above 0. */
export function dropAcrossValveKpa(kv: number, flowLs: number, densityKgM3 = REFERENCE_DENSITY_KGM3): number {
  const ratio = flowLs / LS_PER_M3H / kv;
  return ratio * Math.abs(ratio) * KPA_PER_BAR * (densityKgM3 / REFERENCE_DENSITY_KGM3);
}

/** Kv that passes a flow at a differential pressure above 0 (both of one sign). In water Kv = 36 q / sqrt(dp). */
export function kvForFlow(flowLs: number, dropKpa: number, densityKgM3 = REFERENCE_DENSITY_KGM3): number {
  return flowLs / flowThroughValveLs(1, dropKpa, densityKgM3);
}

export const cvFromKv = (kv: number): number => kv * CV_PER_KV;
export const kvFromCv = (cv: number): number => cv / CV_PER_KV;

/** Local loss coefficient of a valve (Kv above 0) on the velocity in a bore in mm: K = 200 A² (3600 / Kv)², A in m². */
export function lossCoefficientFromKv(kv: number, boreMm: number): number {
  return 200 * (boreAreaM2(boreMm) * (3600 / kv)) ** 2;
}

/** Kv of a local loss coefficient (above 0) in a bore in mm: the inverse of `lossCoefficientFromKv`. */
export function kvFromLossCoefficient(lossCoefficient: number, boreMm: number): number {
  return 3600 * boreAreaM2(boreMm) * Math.sqrt(200 / lossCoefficient);
}
