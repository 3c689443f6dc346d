import {
  GLYCOL_CAUTION_C,
  GLYCOL_MAX_C,
  GLYCOL_MAX_MASS_FRACTION,
  glycolFreezingPointC,
  glycolProperties,
  type GlycolMedium,
} from './glycol';
import { WATER_MAX_C, WATER_MIN_C, waterProperties } from './water';

/** The `fluid` of a network document. */
export type FluidSpecification =
  | { medium: 'water'; temperatureC: number }
  | { medium: GlycolMedium; temperatureC: number; massFraction: number }
  | { medium: 'custom'; densityKgM3: number; viscosityMPaS: number; specificHeatKJKgK: number; temperatureC?: number };

/** Vapour pressure is absolute; it and the freezing point are null where no source gives them. */
export type FluidProperties = {
  densityKgM3: number;
  viscosityMPaS: number;
  specificHeatKJKgK: number;
  vapourPressureKpa: number | null;
  freezingPointC: number | null;
  conductivityWMK: number | null;
};

export type FluidError = { code: FluidErrorCode; message: string; path: string };
export type FluidErrorCode = 'temperature-out-of-range' | 'mass-fraction-out-of-range' | 'below-freezing-point' | 'not-positive';
export type FluidCaution = { code: 'glycol-warm'; message: string };
export type FluidResult = { ok: true; properties: FluidProperties; cautions: FluidCaution[] } | { ok: false; error: FluidError };

/**
 * Density (kg/m³), dynamic viscosity (mPa s), specific heat (kJ/kg K), vapour pressure (kPa absolute), freezing point (°C) and
 * thermal conductivity (W/m K) of a loop's fluid.
 *
 * Ranges: water 0 to 120 °C (IAPWS-IF97, R12-08, R15-11, at 300 kPa absolute); propylene and ethylene glycol from the mixture's
 * freezing point to 100 °C, mass fraction 0 to 0.6 (Melinder 2010), water's properties where it is 0; custom: each quantity above 0.
 * Outside them the answer is an error with a code, the path of the value and the range in words; it never throws.
 */
export function fluidProperties(fluid: FluidSpecification): FluidResult {
  if (fluid.medium === 'custom') return customFluid(fluid);
  if (fluid.medium === 'water') return water(fluid.temperatureC);
  const { medium, massFraction, temperatureC } = fluid;
  if (!(massFraction >= 0 && massFraction <= GLYCOL_MAX_MASS_FRACTION)) {
    const message = `The mass fraction of glycol must be from 0 to ${GLYCOL_MAX_MASS_FRACTION}; it is ${massFraction}.`;
    return failure('mass-fraction-out-of-range', message, 'fluid.massFraction');
  }
  return massFraction === 0 ? water(temperatureC) : glycol(medium, massFraction, temperatureC);
}

function water(temperatureC: number): FluidResult {
  if (!(temperatureC >= WATER_MIN_C && temperatureC <= WATER_MAX_C)) {
    const message = `Water's temperature must be from ${WATER_MIN_C} to ${WATER_MAX_C} °C; it is ${temperatureC} °C.`;
    return failure('temperature-out-of-range', message, 'fluid.temperatureC');
  }
  return { ok: true, properties: { ...waterProperties(temperatureC), freezingPointC: 0 }, cautions: [] };
}

function glycol(medium: GlycolMedium, massFraction: number, temperatureC: number): FluidResult {
  const freezingPointC = glycolFreezingPointC(medium, massFraction);
  const range = `from its freezing point, ${freezingPointC.toFixed(2)} °C, to ${GLYCOL_MAX_C} °C`;
  const message = `The temperature of this glycol mixture must be ${range}; it is ${temperatureC} °C.`;
  if (temperatureC < freezingPointC) return failure('below-freezing-point', message, 'fluid.temperatureC');
  if (!(temperatureC <= GLYCOL_MAX_C)) return failure('temperature-out-of-range', message, 'fluid.temperatureC');
  const cautions: FluidCaution[] = [];
  if (temperatureC > GLYCOL_CAUTION_C) {
    const text = `Glycol properties above ${GLYCOL_CAUTION_C} °C could not be checked against the original publication.`;
    cautions.push({ code: 'glycol-warm', message: text });
  }
  // The publication gives no vapour pressure of the mixture.
  const properties = { ...glycolProperties(medium, massFraction, temperatureC), vapourPressureKpa: null, freezingPointC };
  return { ok: true, properties, cautions };
}

function customFluid(fluid: Extract<FluidSpecification, { medium: 'custom' }>): FluidResult {
  const { densityKgM3, viscosityMPaS, specificHeatKJKgK } = fluid;
  for (const [name, value] of Object.entries({ densityKgM3, viscosityMPaS, specificHeatKJKgK })) {
    if (!(Number.isFinite(value) && value > 0)) return failure('not-positive', `${name} must be a number above 0.`, `fluid.${name}`);
  }
  const unknown = { vapourPressureKpa: null, freezingPointC: null, conductivityWMK: null };
  return { ok: true, properties: { densityKgM3, viscosityMPaS, specificHeatKJKgK, ...unknown }, cautions: [] };
}

function failure(code: FluidErrorCode, message: string, path: string): FluidResult {
  return { ok: false, error: { code, message, path } };
}
