/**
 * Aqueous propylene and ethylene glycol: the polynomials of Å. Melinder, "Properties of Secondary Working Fluids for
 * Indirect Systems", IIR 2010, with the coefficients of the open CoolProp collection (MPG.json, MEG.json).
 * property = sum_ij c_ij (T - Tb)^i (x - xb)^j, T in K, x the MASS fraction of glycol in the mixture; viscosity = exp(1000 sum).
 * A site refractometer often reads volume per cent, and inhibited commercial fluids differ: state which one was meant.
 */

export type GlycolMedium = 'propylene-glycol' | 'ethylene-glycol';

export const GLYCOL_MAX_MASS_FRACTION = 0.6;
/** Upper limit of the stored collection; the original publication's own limit was not readable. */
export const GLYCOL_MAX_C = 100;
/** Above this the collection is used outside what could be checked: results carry a caution. */
export const GLYCOL_CAUTION_C = 60;

export type GlycolProperties = {
  densityKgM3: number;
  viscosityMPaS: number;
  specificHeatKJKgK: number;
  conductivityWMK: number;
};

type Coefficients = {
  baseTemperatureK: number;
  baseFraction: number;
  density: number[][];
  specificHeat: number[][];
  conductivity: number[][];
  logViscosity: number[][];
  freezing: number[];
};

const COEFFICIENTS: Record<GlycolMedium, Coefficients> = {
  'propylene-glycol': {
    baseTemperatureK: 305.8583,
    baseFraction: 0.307031,
    density: [
      [1018, 76.04, -24.98, -155.0, -113.1, 234.2],
      [-0.5406, -0.945, 0.27, 2.829, -2.221],
      [-2.666e-3, 5.541e-3, -4.018e-3, -7.175e-3],
      [1.347e-5, -1.343e-5, 3.376e-5],
    ],
    specificHeat: [
      [3882, -1304, -1598, 353.9, 5000, -4959],
      [2.699, 5.07, 0.9534, 31.02, -71.35],
      [-1.659e-3, -4.752e-3, 0.1167, -0.295],
      [-1.032e-5, 1.522e-4, -4.87e-4],
    ],
    conductivity: [
      [0.4513, -0.4795, 0.2076, -0.09083, -0.05952, 0.2104],
      [7.955e-4, -1.678e-3, 1.563e-3, -2.518e-3, -3.605e-3],
      [3.482e-8, 8.941e-6, -4.615e-5, 6.543e-5],
      [-5.966e-9, 1.493e-8, 9.897e-8],
    ],
    logViscosity: [
      [6.837e-4, 3.328e-3, 5.453e-4, -3.9e-3, -1.587e-3, 3.564e-2],
      [-3.045e-5, -3.984e-5, -8.6e-7, 1.054e-4, 4.475e-5],
      [2.525e-7, 4.332e-7, -1.593e-7, -1.589e-6],
      [-1.399e-9, -1.86e-9, -4.465e-10],
    ],
    freezing: [259.9, -66.31, -109.4, -228.3, -340.9, 146.5],
  },
  'ethylene-glycol': {
    baseTemperatureK: 304.878,
    baseFraction: 0.308462,
    density: [
      [1034, 131.1, 0.749, -106.2, -96.23, 489.1],
      [-0.4781, -0.6876, 0.7855, 1.229, -7.211],
      [-2.692e-3, 4.805e-3, -3.995e-3, -1.153e-2],
      [4.725e-6, 1.69e-6, 4.982e-5],
    ],
    specificHeat: [
      [3737, -1799, -993.3, 2610, 1537, -16180],
      [2.93, 10.46, 3.516, -1.189, -42.72],
      [-4.675e-3, -4.147e-2, 5.109e-2, -0.1643],
      [-1.389e-5, 1.847e-5, -7.138e-4],
    ],
    conductivity: [
      [0.472, -0.4286, 0.1747, 0.03017, -0.1322, 0.2678],
      [8.903e-4, -1.473e-3, 6.814e-4, -2.412e-3, 2.555e-3],
      [-1.058e-6, 1.059e-5, -3.612e-5, 4.004e-5],
      [-2.789e-9, -1.142e-8, 2.365e-8],
    ],
    logViscosity: [
      [4.705e-4, 2.471e-3, 3.328e-5, 1.659e-3, 3.089e-3, -1.865e-2],
      [-2.55e-5, -1.171e-5, 1.086e-5, 3.157e-6, 1.831e-5],
      [1.782e-7, 1.052e-7, 1.051e-7, 4.063e-7],
      [-7.669e-10, -1.634e-9, -6.475e-9],
    ],
    freezing: [257.9, -80.8, -133.4, -72.93, 100.6, 11.4],
  },
};

function polynomial(rows: number[][], deltaK: number, deltaFraction: number): number {
  return rows.reduce((sum, row, i) => sum + deltaK ** i * row.reduce((inner, c, j) => inner + c * deltaFraction ** j, 0), 0);
}

/** Freezing point (first ice) of the mixture, °C; mass fraction 0 to 0.6. Melinder 2010. */
export function glycolFreezingPointC(medium: GlycolMedium, massFraction: number): number {
  const { freezing, baseFraction } = COEFFICIENTS[medium];
  return polynomial([freezing], 0, massFraction - baseFraction) - 273.15;
}

/**
 * Properties of the mixture at `temperatureC` and `massFraction` (above 0, up to 0.6); ranges are checked by `fluidProperties`.
 * The polynomials do not meet pure water at zero glycol (density 0.1 % low, viscosity up to 1.4 % off): use water there.
 */
export function glycolProperties(medium: GlycolMedium, massFraction: number, temperatureC: number): GlycolProperties {
  const c = COEFFICIENTS[medium];
  const deltaK = temperatureC + 273.15 - c.baseTemperatureK;
  const deltaFraction = massFraction - c.baseFraction;
  return {
    densityKgM3: polynomial(c.density, deltaK, deltaFraction),
    viscosityMPaS: Math.exp(1000 * polynomial(c.logViscosity, deltaK, deltaFraction)),
    specificHeatKJKgK: polynomial(c.specificHeat, deltaK, deltaFraction) / 1000,
    conductivityWMK: polynomial(c.conductivity, deltaK, deltaFraction),
  };
}
