import { create, createUnitDependencies, unitDependencies } from 'mathjs';

/**
 * Conversions by mathjs, of which only the units are loaded. Units that the trade uses and mathjs lacks, or knows with fewer
 * digits, are defined here from their exact definitions (NIST SP 811, appendix B):
 * US gallon 3.785411784 L; pound-force 4.4482216152605 N; horsepower 550 ft·lbf/s; conventional water (1000 kg/m³ at
 * g = 9.80665 m/s²) 9.80665 kPa a metre. Kv is m³/h at 1 bar and Cv US gpm at 1 psi, so Cv = 1.1561 Kv (IEC 60534-1).
 */
const math = create({ unitDependencies, createUnitDependencies });

const GALLON_M3 = 0.003785411784;
const PSI_KPA = 4.4482216152605 / 0.0254 ** 2 / 1000;
const WATER_KPA_PER_M = 9.80665;
const FOOT_M = 0.3048;
const CV_PER_KV = Math.sqrt(PSI_KPA / 100) / (GALLON_M3 * 60);

math.createUnit({
  gpm: `${(GALLON_M3 * 1000) / 60} L/s`,
  poundPerSquareInch: `${PSI_KPA} kPa`,
  metreOfWater: `${WATER_KPA_PER_M} kPa`,
  footOfWater: `${WATER_KPA_PER_M * FOOT_M} kPa`,
  footOfWaterPer100Feet: `${(WATER_KPA_PER_M * 1000) / 100} Pa/m`,
  mechanicalHorsepower: `${550 * FOOT_M * 4.4482216152605} W`,
  Kv: {},
  Cv: `${1 / CV_PER_KV} Kv`,
  turn: {},
  percentOfFull: {},
});

interface Line {
  slope: number;
  intercept: number;
}

/** mathjs reads its units anew at each call, 50 µs of it; a table of a thousand rows wants the line kept. */
const lines = new Map<string, Line>();

function lineBetween(from: string, to: string): Line {
  const key = `${from}>${to}`;
  const known = lines.get(key);
  if (known) return known;
  const at = (value: number) => math.unit(value, from).toNumber(to);
  const intercept = at(0);
  // A scale without an offset takes its factor as it is; over a wide span an offset costs no digits.
  const line = intercept === 0 ? { slope: at(1), intercept } : { slope: (at(1e6) - intercept) / 1e6, intercept };
  lines.set(key, line);
  return line;
}

/** Converts between two units of one quantity, both in the notation of mathjs. The same unit gives the very same number back. */
export function convert(value: number, from: string, to: string): number {
  if (from === to) return value;
  const { slope, intercept } = lineBetween(from, to);
  return value * slope + intercept;
}
