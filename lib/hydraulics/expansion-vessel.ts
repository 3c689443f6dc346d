import { GRAVITY_MS2 } from './links/law';
import { ATMOSPHERE_KPA } from './pump-duty';

/**
 * Expansion vessel with a diaphragm, and the pressures to charge and fill it to. Volumes in L, pressures in kPa GAUGE unless named absolute.
 * The form is that of EN 12828; its numbers could not be read in the standard itself and are customary values from memory, as the
 * `source` of each rule says: they are defaults for the designer to confirm or change, never a clause to quote.
 */
export type Rule = { value: number; unit: string; source: string };

const FROM_MEMORY = 'customary value in the form of EN 12828, from memory: confirm against the edition in force';

export const vesselRules = {
  /** Water kept in the vessel when cold, as a fraction of the system's volume, but at least `minimumReserveL`. */
  reserveFraction: { value: 0.005, unit: 'of system volume', source: FROM_MEMORY },
  minimumReserveL: { value: 3, unit: 'L', source: FROM_MEMORY },
  /** Charge pressure above the static height. */
  chargeMarginKpa: { value: 30, unit: 'kPa', source: FROM_MEMORY },
  /** Final pressure below the safety valve: the larger of this and `safetyMarginFraction` of its setting. */
  safetyMarginKpa: { value: 50, unit: 'kPa', source: FROM_MEMORY },
  safetyMarginFraction: { value: 0.1, unit: 'of the safety valve setting', source: FROM_MEMORY },
  /** The standard's round figure for atmospheric pressure. */
  atmosphereKpa: { value: 100, unit: 'kPa', source: FROM_MEMORY },
} as const satisfies Record<string, Rule>;

/** Growth of the water as a fraction of its cold volume: rho cold / rho hot - 1, both from `fluidProperties`. Source: definition. */
export function expansionFraction(coldDensityKgM3: number, hotDensityKgM3: number): number {
  return coldDensityKgM3 / hotDensityKgM3 - 1;
}

/**
 * Charge (initial) pressure p0: static height above the vessel (m) plus a margin, plus what the vapour pressure (kPa absolute) at the
 * hottest point has above the atmosphere (matters above 100 °C). Source: see `vesselRules.chargeMarginKpa`.
 */
export function chargePressureKpa(
  staticHeightM: number,
  densityKgM3: number,
  vapourKpaAbs = 0,
  marginKpa: number = vesselRules.chargeMarginKpa.value,
): number {
  return (densityKgM3 * GRAVITY_MS2 * staticHeightM) / 1000 + marginKpa + Math.max(0, vapourKpaAbs - ATMOSPHERE_KPA);
}

/** Final pressure pe a safety valve allows: its setting less the larger of 50 kPa and 10 %. Source: see `vesselRules`. */
export function finalPressureKpa(safetyValveKpa: number): number {
  return safetyValveKpa - Math.max(vesselRules.safetyMarginKpa.value, vesselRules.safetyMarginFraction.value * safetyValveKpa);
}

export type VesselInput = {
  systemVolumeL: number;
  expansionFraction: number;
  chargeKpa: number;
  finalKpa: number;
  /** Water reserve; default the larger of 0.5 % of the system and 3 L. */
  reserveL?: number;
};
export type Vessel = {
  expansionL: number;
  reserveL: number;
  /** Share of the vessel that can take water: (pe - p0) / (pe + atmosphere). */
  acceptance: number;
  vesselL: number;
  /** Cold fill pressure that puts the reserve into a vessel of exactly this size. */
  minimumFillKpa: number;
};
export type VesselError = { code: 'not-positive' | 'final-not-above-charge'; message: string; path: string };

/**
 * Smallest vessel: VN = (Ve + reserve)(pe + atmosphere) / (pe - p0). Errors are values: a quantity that is not above 0 (charge and reserve may
 * be 0), or a final pressure not above the charge. Check values: cases T4 and T5 in the tests.
 */
export function sizeExpansionVessel(input: VesselInput): { ok: true; vessel: Vessel } | { ok: false; error: VesselError } {
  const { systemVolumeL, expansionFraction: fraction, chargeKpa, finalKpa } = input;
  const reserveL = input.reserveL ?? Math.max(vesselRules.reserveFraction.value * systemVolumeL, vesselRules.minimumReserveL.value);
  const error = faultIn(input, reserveL);
  if (error) return { ok: false, error };
  const expansionL = fraction * systemVolumeL;
  const acceptance = (finalKpa - chargeKpa) / (finalKpa + vesselRules.atmosphereKpa.value);
  const vesselL = (expansionL + reserveL) / acceptance;
  const minimumFillKpa = fillPressureKpa(vesselL, chargeKpa, reserveL);
  return { ok: true, vessel: { expansionL, reserveL, acceptance, vesselL, minimumFillKpa } };
}

/** Pressure of a vessel of a given size once it holds some water (below its size): the gas follows p V = constant from its charge. */
export function fillPressureKpa(vesselL: number, chargeKpa: number, waterL: number): number {
  const atmosphere = vesselRules.atmosphereKpa.value;
  return ((chargeKpa + atmosphere) * vesselL) / (vesselL - waterL) - atmosphere;
}

/**
 * The other published form, for a closed diaphragm tank: V = Vs ((v2/v1 - 1) - 3 alpha dT) / (1 - P1/P2), crediting the pipes' own growth and
 * keeping no reserve. Pressures kPa ABSOLUTE, alpha the pipe's linear expansion per K (steel 11.7e-6). Source: ASHRAE, from memory. Case T6.
 */
export function diaphragmTankL(input: {
  systemVolumeL: number;
  expansionFraction: number;
  pipeExpansionPerK: number;
  temperatureRiseK: number;
  fillKpaAbs: number;
  finalKpaAbs: number;
}): number {
  const net = input.expansionFraction - 3 * input.pipeExpansionPerK * input.temperatureRiseK;
  return (input.systemVolumeL * net) / (1 - input.fillKpaAbs / input.finalKpaAbs);
}

function faultIn(input: VesselInput, reserveL: number): VesselError | null {
  const { systemVolumeL, expansionFraction: fraction, finalKpa, chargeKpa } = input;
  const above = Object.entries({ systemVolumeL, expansionFraction: fraction, finalKpa }).find(
    ([, value]) => !(Number.isFinite(value) && value > 0),
  );
  if (above) return { code: 'not-positive', message: `${above[0]} must be a number above 0.`, path: above[0] };
  const below = Object.entries({ chargeKpa, reserveL }).find(([, value]) => !(Number.isFinite(value) && value >= 0));
  if (below) return { code: 'not-positive', message: `${below[0]} must be 0 or more.`, path: below[0] };
  if (finalKpa > chargeKpa) return null;
  return {
    code: 'final-not-above-charge',
    message: 'The final pressure must be above the charge pressure: raise the safety valve or lower the charge.',
    path: 'finalKpa',
  };
}
