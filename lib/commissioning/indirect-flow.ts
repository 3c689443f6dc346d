import { headAt, pumpCurve, pumpHead } from '@/lib/hydraulics/links/pump';
import { instrumentError, type Accuracy } from './uncertainty';

/** A flow that follows from something else that was read, with its ± in per cent of the flow; or why none follows. */
export type IndirectFlow = { ok: true; flowLs: number; uncertaintyPercent: number } | { ok: false; path: string; message: string };

const STANDARD_GRAVITY_MS2 = 9.80665;
const LARGEST_PERCENT = 100;

export const coilAssumption = {
  percent: 5,
  source: 'Assumed: ±5 % on the coil’s flow at its stated drop (common practice, no source)',
} as const;
export const curveAssumption = {
  percentOfHead: 5,
  source: 'Assumed: ±5 % on the head of a published curve (ISO 9906 grade 2, from memory)',
} as const;

/**
 * Flow through a coil from the drop across it, kPa, and its design point: q = q_d sqrt(dp / dp_d) (turbulent, common practice). Uncertainty
 * as across a valve: u(q)² = u(coil)² + (u(dp) / (2 dp))² (JCGM 100:2008, 5.1.2).
 */
export function flowAcrossCoil(dropKpa: number, design: { flowLs: number; dropKpa: number }, accuracy: Accuracy): IndirectFlow {
  if (!(dropKpa >= 0)) return { ok: false, path: 'dropKpa', message: 'A drop cannot be negative: check the hoses.' };
  const share = dropKpa === 0 ? LARGEST_PERCENT : (100 * instrumentError(dropKpa, accuracy)) / dropKpa / 2;
  return {
    ok: true,
    flowLs: design.flowLs * Math.sqrt(dropKpa / design.dropKpa),
    uncertaintyPercent: Math.min(LARGEST_PERCENT, Math.hypot(coilAssumption.percent, share)),
  };
}

interface PumpRead {
  /** What the pump raises, corrected for the gauges' heights, kPa. */
  dropKpa: number;
  /** Part of full speed, above 0. */
  speed: number;
  curve: { flowLs: number; headM: number }[];
  densityKgM3: number;
}

/**
 * Flow of a pump from the head it raises at its speed: where its curve (affinity laws Q ~ n, H ~ n²) gives H = dp / (rho g). A head above that at
 * no flow or below the end of the curve gives none. Uncertainty through the curve's slope, u(q) = u(H) / |dH/dq|: a flat curve tells little.
 */
export function flowOnPumpCurve({ dropKpa, speed, curve, densityKgM3 }: PumpRead, accuracy: Accuracy): IndirectFlow {
  if (!(speed > 0 && speed <= 2)) return { ok: false, path: 'pumpSpeed', message: 'The speed is a part of full speed, above 0.' };
  const headM = (dropKpa * 1000) / (densityKgM3 * STANDARD_GRAVITY_MS2);
  const spline = pumpCurve({ kind: 'pump', id: 'pump', from: 'a', to: 'b', curve });
  const headAtFlow = (flowLs: number) => {
    pumpHead(spline, flowLs, speed);
    return headAt.headM;
  };
  const most = curve[curve.length - 1]!.flowLs * speed;
  const [shutOff, least] = [headAtFlow(0), headAtFlow(most)];
  if (headM > shutOff)
    return {
      ok: false,
      path: 'dropKpa',
      message: `More than the pump raises at no flow (${metres(shutOff)} m). Check speed, gauges and rotation.`,
    };
  if (headM < least)
    return {
      ok: false,
      path: 'dropKpa',
      message: `Less than the pump raises at the end of its curve (${metres(least)} m): the curve tells nothing there.`,
    };
  let [low, high] = [0, most];
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (headAtFlow(middle) > headM) low = middle;
    else high = middle;
  }
  const flowLs = (low + high) / 2;
  pumpHead(spline, flowLs, speed);
  const errorM = Math.hypot(
    (instrumentError(dropKpa, accuracy) * 1000) / (densityKgM3 * STANDARD_GRAVITY_MS2),
    (curveAssumption.percentOfHead / 100) * headM,
  );
  const percent = flowLs === 0 ? LARGEST_PERCENT : (100 * errorM) / Math.abs(headAt.slope) / flowLs;
  return { ok: true, flowLs, uncertaintyPercent: Math.min(LARGEST_PERCENT, percent) };
}

interface HeatRead {
  heatKw: number;
  supplyC: number;
  returnC: number;
  densityKgM3: number;
  specificHeatKJKgK: number;
}

/**
 * Flow from the heat that a circuit carries and its temperatures: q = P / (rho c |ts − tr|). Each temperature with the thermometer's error, so
 * u(q) = sqrt(2) u(t) / |ts − tr|; the heat is taken as it was read. To be used under a steady load alone.
 */
export function flowFromHeat({ heatKw, supplyC, returnC, densityKgM3, specificHeatKJKgK }: HeatRead, accuracy: Accuracy): IndirectFlow {
  const differenceK = Math.abs(supplyC - returnC);
  const error = Math.SQRT2 * Math.max(instrumentError(supplyC, accuracy), instrumentError(returnC, accuracy));
  if (!(heatKw >= 0)) return { ok: false, path: 'heatKw', message: 'Heat is typed without a sign, heating or cooling.' };
  if (differenceK <= error)
    return { ok: false, path: 'returnC', message: 'The temperatures are nearer to each other than the thermometer can tell.' };
  return {
    ok: true,
    flowLs: (1000 * heatKw) / (densityKgM3 * specificHeatKJKgK * differenceK),
    uncertaintyPercent: Math.min(LARGEST_PERCENT, (100 * error) / differenceK),
  };
}

const metres = (headM: number): string => headM.toFixed(2);
