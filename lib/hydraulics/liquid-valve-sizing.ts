import { WATER_CRITICAL_PRESSURE_KPA } from './water';

/**
 * Sizing of a control valve for a liquid by IEC 60534-2-1 (turbulent flow), choked or not, with the reducers of its pipe.
 * Pressures in kPa absolute, all above 0. `recoveryFactor` is F_L of the valve, above 0 and at most 1. `reducers`: nominal valve size and
 * the bores of its pipe, none smaller; leave it out for a valve of line size. `incipientCavitation` is the maker's x_Fz.
 */
export type LiquidSizing = {
  flowM3h: number;
  densityKgM3: number;
  inletKpaAbs: number;
  outletKpaAbs: number;
  vapourKpaAbs: number;
  criticalKpaAbs?: number;
  recoveryFactor: number;
  reducers?: { valveMm: number; pipeInMm: number; pipeOutMm: number };
  incipientCavitation?: number;
};

export type SizingWarning = { code: 'choked' | 'flashing' | 'cavitation'; message: string };
export type SizedValve = {
  kv: number;
  choked: boolean;
  /** Differential pressure at which flow stops growing in a valve of line size: F_L² (p1 - F_F pv). */
  chokedDropKpa: number;
  /** F_F. */
  criticalPressureRatio: number;
  /** x_F = (p1 - p2) / (p1 - pv). */
  pressureRatio: number;
  /** F_P, 1 without reducers. */
  pipingFactor: number;
  warnings: SizingWarning[];
};
export type SizingError = {
  code: 'not-positive' | 'no-drop' | 'inlet-flashes' | 'recovery-factor' | 'valve-larger-than-pipe' | 'valve-too-small';
  message: string;
  path: string;
};
export type SizingResult = { ok: true; valve: SizedValve } | { ok: false; error: SizingError };

/** N1 for kPa and N2 for mm in the standard's table 1, and water at 15 °C, to which its relative density refers. */
const N1 = 0.1;
const N2 = 0.0016;
const WATER_15C_KGM3 = 999.103;

/** F_F = 0.96 - 0.28 sqrt(pv / pc): the liquid's vena contracta pressure when choked, over its vapour pressure. */
export function liquidCriticalPressureRatio(vapourKpaAbs: number, criticalKpaAbs: number = WATER_CRITICAL_PRESSURE_KPA): number {
  return 0.96 - 0.28 * Math.sqrt(vapourKpaAbs / criticalKpaAbs);
}

/**
 * Kv that passes the flow. Both regimes' equations are solved for Kv in closed form; passing the flow takes the larger of the two, and the
 * flow is choked when that is the choked one. Below a valve Reynolds number of 10 000 (very viscous or very small) the answer is too small.
 * Errors are values that name the offending quantity. Check values: the standard's annex examples 1 and 2 in the tests.
 */
export function sizeLiquidValve(input: LiquidSizing): SizingResult {
  const error = faultIn(input);
  if (error) return { ok: false, error };
  const { flowM3h, densityKgM3, inletKpaAbs, outletKpaAbs, vapourKpaAbs, recoveryFactor } = input;
  const criticalPressureRatio = liquidCriticalPressureRatio(vapourKpaAbs, input.criticalKpaAbs);
  const drop = inletKpaAbs - outletKpaAbs;
  const driving = inletKpaAbs - criticalPressureRatio * vapourKpaAbs;
  const { inlet, both } = reducerLosses(input.reducers);

  const base = (flowM3h / N1) ** 2 * (densityKgM3 / WATER_15C_KGM3);
  // Kv² = a² (1 + b Kv²) with a² = base / dp, from F_P; and likewise with F_LP when choked.
  const freeShare = 1 - (base / drop) * both;
  const chokedShare = 1 - (base / driving) * inlet;
  if (freeShare <= 0 || chokedShare <= 0) {
    const message = 'The reducers alone take more than the whole differential pressure: the valve is too small for this pipe and flow.';
    return { ok: false, error: { code: 'valve-too-small', message, path: 'reducers.valveMm' } };
  }
  const freeKv = Math.sqrt(base / drop / freeShare);
  const chokedKv = Math.sqrt(base / driving / chokedShare) / recoveryFactor;
  const kv = Math.max(freeKv, chokedKv);
  const valve = {
    kv,
    choked: chokedKv >= freeKv,
    chokedDropKpa: recoveryFactor ** 2 * driving,
    criticalPressureRatio,
    pressureRatio: drop / (inletKpaAbs - vapourKpaAbs),
    pipingFactor: 1 / Math.sqrt(1 + both * kv * kv),
  };
  return { ok: true, valve: { ...valve, warnings: warningsFor(valve.choked, valve.pressureRatio, input) } };
}

/** Sum of the reducers' loss coefficients over N2 d⁴: of the inlet alone (for F_LP) and of both (for F_P). */
function reducerLosses(reducers: LiquidSizing['reducers']): { inlet: number; both: number } {
  if (!reducers) return { inlet: 0, both: 0 };
  const { valveMm, pipeInMm, pipeOutMm } = reducers;
  const areaIn = (valveMm / pipeInMm) ** 2;
  const areaOut = (valveMm / pipeOutMm) ** 2;
  const scale = 1 / (N2 * valveMm ** 4);
  const inlet = 0.5 * (1 - areaIn) ** 2 + (1 - areaIn ** 2);
  const outlet = (1 - areaOut) ** 2 - (1 - areaOut ** 2);
  return { inlet: inlet * scale, both: (inlet + outlet) * scale };
}

function warningsFor(choked: boolean, pressureRatio: number, input: LiquidSizing): SizingWarning[] {
  const warnings: SizingWarning[] = [];
  const { incipientCavitation, outletKpaAbs, vapourKpaAbs } = input;
  if (choked) warnings.push({ code: 'choked', message: 'Flow is choked: lowering the outlet pressure further passes no more.' });
  if (outletKpaAbs <= vapourKpaAbs)
    warnings.push({ code: 'flashing', message: 'The outlet is below the vapour pressure: the liquid flashes.' });
  else if (incipientCavitation !== undefined && pressureRatio >= incipientCavitation)
    warnings.push({ code: 'cavitation', message: 'The pressure ratio is at or above the one at which this valve begins to cavitate.' });
  return warnings;
}

function faultIn(input: LiquidSizing): SizingError | null {
  const { inletKpaAbs, outletKpaAbs, vapourKpaAbs, recoveryFactor, reducers, ...rest } = input;
  const quantities = { ...rest, ...reducers, inletKpaAbs, outletKpaAbs, vapourKpaAbs };
  const positive = Object.entries(quantities).filter(([, value]) => value !== undefined);
  const bad = positive.find(([, value]) => !(Number.isFinite(value) && value > 0));
  if (bad) return { code: 'not-positive', message: `${bad[0]} must be a number above 0.`, path: bad[0] };
  if (!(outletKpaAbs < inletKpaAbs))
    return { code: 'no-drop', message: 'The outlet pressure must be below the inlet pressure.', path: 'outletKpaAbs' };
  if (vapourKpaAbs >= inletKpaAbs)
    return { code: 'inlet-flashes', message: 'The inlet pressure is not above the vapour pressure.', path: 'inletKpaAbs' };
  if (!(recoveryFactor > 0 && recoveryFactor <= 1))
    return { code: 'recovery-factor', message: 'F_L must be above 0 and at most 1.', path: 'recoveryFactor' };
  if (reducers && reducers.valveMm > Math.min(reducers.pipeInMm, reducers.pipeOutMm)) {
    const message = 'The valve is larger than its pipe: the piping factor holds for reducers down to the valve only.';
    return { code: 'valve-larger-than-pipe', message, path: 'reducers.valveMm' };
  }
  return null;
}
