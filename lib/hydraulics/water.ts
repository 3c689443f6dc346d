/**
 * Liquid water by the open formulations of IAPWS:
 * R7-97(2012) Industrial Formulation 1997, equation 7 (region 1) and equation 30 (saturation line);
 * R12-08 viscosity without its critical enhancement (as recommended for industrial use);
 * R15-11 thermal conductivity, also without (it is small so far from the critical point).
 */

export const WATER_MIN_C = 0;
export const WATER_MAX_C = 120;
/** Pressure at which liquid properties are stated unless another is given: keeps water liquid up to 133 °C, typical of a closed loop. */
export const WATER_PRESSURE_KPA_ABS = 300;
/** Critical pressure of water, kPa absolute (IAPWS R2-83). */
export const WATER_CRITICAL_PRESSURE_KPA = 22064;

export type WaterProperties = {
  densityKgM3: number;
  viscosityMPaS: number;
  specificHeatKJKgK: number;
  vapourPressureKpa: number;
  conductivityWMK: number;
};

const GAS_CONSTANT_KJ_KGK = 0.461526;
const CRITICAL_TEMPERATURE_K = 647.096;
const CRITICAL_DENSITY_KGM3 = 322;

/** [I, J, n] of IF97 table 2: gamma = sum n (7.1 - p/16.53)^I (1386/T - 1.222)^J. */
const REGION_1: readonly (readonly [number, number, number])[] = [
  [0, -2, 0.14632971213167],
  [0, -1, -0.84548187169114],
  [0, 0, -0.3756360367204e1],
  [0, 1, 0.33855169168385e1],
  [0, 2, -0.95791963387872],
  [0, 3, 0.15772038513228],
  [0, 4, -0.16616417199501e-1],
  [0, 5, 0.81214629983568e-3],
  [1, -9, 0.28319080123804e-3],
  [1, -7, -0.60706301565874e-3],
  [1, -1, -0.18990068218419e-1],
  [1, 0, -0.32529748770505e-1],
  [1, 1, -0.21841717175414e-1],
  [1, 3, -0.5283835796993e-4],
  [2, -3, -0.47184321073267e-3],
  [2, 0, -0.30001780793026e-3],
  [2, 1, 0.47661393906987e-4],
  [2, 3, -0.44141845330846e-5],
  [2, 17, -0.72694996297594e-15],
  [3, -4, -0.31679644845054e-4],
  [3, 0, -0.28270797985312e-5],
  [3, 6, -0.85205128120103e-9],
  [4, -5, -0.22425281908e-5],
  [4, -2, -0.65171222895601e-6],
  [4, 10, -0.14341729937924e-12],
  [5, -8, -0.40516996860117e-6],
  [8, -11, -0.12734301741641e-8],
  [8, -6, -0.17424871230634e-9],
  [21, -29, -0.68762131295531e-18],
  [23, -31, 0.14478307828521e-19],
  [29, -38, 0.26335781662795e-22],
  [30, -39, -0.11947622640071e-22],
  [31, -40, 0.18228094581404e-23],
  [32, -41, -0.93537087292458e-25],
];

/** Density (kg/m³) and isobaric specific heat (kJ/kg K) of liquid water at an absolute temperature and pressure; IF97 region 1. */
export function liquidWater(temperatureK: number, pressureMpaAbs: number): { densityKgM3: number; specificHeatKJKgK: number } {
  const tau = 1386 / temperatureK;
  const pi = pressureMpaAbs / 16.53;
  const a = 7.1 - pi;
  const b = tau - 1.222;
  let gammaPi = 0;
  let gammaTauTau = 0;
  for (const [i, j, n] of REGION_1) {
    gammaPi -= n * i * a ** (i - 1) * b ** j;
    gammaTauTau += n * a ** i * j * (j - 1) * b ** (j - 2);
  }
  const specificVolumeM3Kg = (pi * gammaPi * GAS_CONSTANT_KJ_KGK * temperatureK) / (pressureMpaAbs * 1000);
  return { densityKgM3: 1 / specificVolumeM3Kg, specificHeatKJKgK: -GAS_CONSTANT_KJ_KGK * tau * tau * gammaTauTau };
}

/** Saturation (vapour) pressure of water, MPa absolute, 273.15 to 647.096 K; IF97 equation 30. */
export function saturationPressureMpa(temperatureK: number): number {
  const theta = temperatureK - 0.23855557567849 / (temperatureK - 0.65017534844798e3);
  const a = theta * theta + 0.11670521452767e4 * theta - 0.72421316703206e6;
  const b = -0.17073846940092e2 * theta * theta + 0.1202082470247e5 * theta - 0.32325550322333e7;
  const c = 0.1491510861353e2 * theta * theta - 0.48232657361591e4 * theta + 0.40511340542057e6;
  return ((2 * c) / (-b + Math.sqrt(b * b - 4 * a * c))) ** 4;
}

/** H_ij of R12-08 table 2 (rows i, columns j). */
const VISCOSITY_H = [
  [0.520094, 0.222531, -0.281378, 0.161913, -0.0325372, 0, 0],
  [0.0850895, 0.999115, -0.906851, 0.257399, 0, 0, 0],
  [-1.08374, 1.88797, -0.772479, 0, 0, 0, 0],
  [-0.289555, 1.26613, -0.489837, 0, 0.0698452, 0, -0.00435673],
  [0, 0, -0.25704, 0, 0, 0.00872102, 0],
  [0, 0.120573, 0, 0, 0, 0, -0.000593264],
];

/** L_ij of R15-11 table 2 (rows i, columns j). */
const CONDUCTIVITY_L = [
  [1.60397357, -0.646013523, 0.111443906, 0.102997357, -0.0504123634, 0.00609859258],
  [2.33771842, -2.78843778, 1.53616167, -0.463045512, 0.0832827019, -0.00719201245],
  [2.19650529, -4.54580785, 3.55777244, -1.40944978, 0.275418278, -0.0205938816],
  [-1.21051378, 1.60812989, -0.621178141, 0.0716373224],
  [-2.720337, 4.57586331, -3.18369245, 1.1168348, -0.19268305, 0.012913842],
];

/** exp(rho sum_ij c_ij (1/T - 1)^i (rho - 1)^j) in reduced quantities: the finite-density factor both transport releases share. */
function densityFactor(coefficients: number[][], reducedT: number, reducedRho: number): number {
  const sum = coefficients.reduce(
    (total, row, i) => total + (1 / reducedT - 1) ** i * row.reduce((inner, c, j) => inner + c * (reducedRho - 1) ** j, 0),
    0,
  );
  return Math.exp(reducedRho * sum);
}

/** sqrt(T) / sum c_i T^-i in reduced temperature: the dilute-gas factor both transport releases share. */
function diluteGasFactor(coefficients: number[], reducedT: number): number {
  return Math.sqrt(reducedT) / coefficients.reduce((sum, c, i) => sum + c / reducedT ** i, 0);
}

/** Dynamic viscosity of water, mPa s, from temperature (K) and density (kg/m³); IAPWS R12-08, no critical enhancement. */
export function waterViscosityMPaS(temperatureK: number, densityKgM3: number): number {
  const t = temperatureK / CRITICAL_TEMPERATURE_K;
  const dilute = 100 * diluteGasFactor([1.67752, 2.20462, 0.6366564, -0.241605], t);
  return dilute * densityFactor(VISCOSITY_H, t, densityKgM3 / CRITICAL_DENSITY_KGM3) * 1e-3;
}

/** Thermal conductivity of water, W/(m K), from temperature (K) and density (kg/m³); IAPWS R15-11, no critical enhancement. */
export function waterConductivityWMK(temperatureK: number, densityKgM3: number): number {
  const t = temperatureK / CRITICAL_TEMPERATURE_K;
  const dilute = diluteGasFactor([2.443221e-3, 1.323095e-2, 6.770357e-3, -3.454586e-3, 4.096266e-4], t);
  return dilute * densityFactor(CONDUCTIVITY_L, t, densityKgM3 / CRITICAL_DENSITY_KGM3) * 1e-3;
}

/**
 * Properties of liquid water at `temperatureC` (0 to 120 °C, not checked here: `fluidProperties` does) and
 * `pressureKpaAbs` (absolute, above the vapour pressure; default 300). Vapour pressure is absolute.
 */
export function waterProperties(temperatureC: number, pressureKpaAbs = WATER_PRESSURE_KPA_ABS): WaterProperties {
  const temperatureK = temperatureC + 273.15;
  const { densityKgM3, specificHeatKJKgK } = liquidWater(temperatureK, pressureKpaAbs / 1000);
  return {
    densityKgM3,
    viscosityMPaS: waterViscosityMPaS(temperatureK, densityKgM3),
    specificHeatKJKgK,
    vapourPressureKpa: saturationPressureMpa(temperatureK) * 1000,
    conductivityWMK: waterConductivityWMK(temperatureK, densityKgM3),
  };
}
