/**
 * Sensible output of a water coil at another water flow than design, by effectiveness and number of transfer units (NTU), from its design point.
 * Wet cooling coils do not follow it: use the maker's table there. Temperatures °C, power kW, capacity rates kW/K.
 * Source: effectiveness relations as in any heat-transfer text; part load UA from film resistances, water h ~ v^0.8.
 */
export type Arrangement = 'counterflow' | 'parallel' | 'crossflow';

export type CoilDesign = {
  /** Heat given by the water to the air (heating above 0, cooling below 0). */
  loadKw: number;
  waterInC: number;
  waterOutC: number;
  airInC: number;
  airOutC: number;
  arrangement?: Arrangement;
  /** Share of the thermal resistance on the water side at design flow, 0 to 1; 0 keeps UA constant. */
  waterResistanceShare?: number;
};

export const DEFAULT_WATER_RESISTANCE_SHARE = 0.3;
/** Turbulent film in a tube (Dittus-Boelter). */
const WATER_FILM_EXPONENT = 0.8;

export type CoilModel = {
  waterKwK: number;
  airKwK: number;
  designUaKwK: number;
  arrangement: Arrangement;
  waterResistanceShare: number;
};
export type CoilError = { code: 'not-a-coil' | 'not-reachable'; message: string };
export type CoilState = { loadKw: number; waterOutC: number; airOutC: number; effectiveness: number };

/** Effectiveness from NTU (0 or more) and the ratio of the smaller to the larger capacity rate (0 to 1). Crossflow: both streams unmixed. */
export function effectiveness(arrangement: Arrangement, ntu: number, ratio: number): number {
  if (ntu <= 0) return 0;
  // As the ratio goes to 0 every arrangement becomes 1 - exp(-NTU); as it goes to 1 the counterflow form is 0/0.
  if (ratio < 1e-9) return 1 - Math.exp(-ntu);
  if (arrangement === 'parallel') return (1 - Math.exp(-ntu * (1 + ratio))) / (1 + ratio);
  if (arrangement === 'crossflow') return 1 - Math.exp((ntu ** 0.22 / ratio) * Math.expm1(-ratio * ntu ** 0.78));
  if (1 - ratio < 1e-9) return ntu / (1 + ntu);
  const decay = Math.exp(-ntu * (1 - ratio));
  return (1 - decay) / (1 - ratio * decay);
}

/** NTU that gives an effectiveness, or null where the arrangement cannot reach it. */
export function ntuFor(arrangement: Arrangement, target: number, ratio: number): number | null {
  let high = 1;
  while (effectiveness(arrangement, high, ratio) < target) {
    high *= 2;
    if (high > 1e4) return null;
  }
  let low = 0;
  for (let step = 0; step < 100; step++) {
    const middle = (low + high) / 2;
    if (effectiveness(arrangement, middle, ratio) < target) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** UA and capacity rates from the design point. Errors: temperatures that do not fit the load's direction, or a duty the arrangement cannot do. */
export function coilFromDesign(design: CoilDesign): { ok: true; coil: CoilModel } | { ok: false; error: CoilError } {
  const { loadKw, waterInC, waterOutC, airInC, airOutC, arrangement = 'counterflow' } = design;
  const waterKwK = loadKw / (waterInC - waterOutC);
  const airKwK = loadKw / (airOutC - airInC);
  const valid = waterKwK > 0 && airKwK > 0 && Number.isFinite(waterKwK) && Number.isFinite(airKwK) && loadKw / (waterInC - airInC) > 0;
  if (!valid)
    return { ok: false, error: { code: 'not-a-coil', message: 'Water and air must exchange the load from the warmer to the colder.' } };
  const smaller = Math.min(waterKwK, airKwK);
  const ntu = ntuFor(arrangement, loadKw / (smaller * (waterInC - airInC)), smaller / Math.max(waterKwK, airKwK));
  if (ntu === null) {
    const message = 'No surface in this flow arrangement reaches these leaving temperatures.';
    return { ok: false, error: { code: 'not-reachable', message } };
  }
  const waterResistanceShare = design.waterResistanceShare ?? DEFAULT_WATER_RESISTANCE_SHARE;
  return { ok: true, coil: { waterKwK, airKwK, designUaKwK: ntu * smaller, arrangement, waterResistanceShare } };
}

/**
 * The coil at a ratio of design water flow (0 or more; 0 gives no output) with the entering temperatures of the moment, air flow as designed.
 * Check values: table 3.3 (output against flow) and the swapped-connections row of the fault table, in the tests.
 */
export function coilAtFlow(coil: CoilModel, flowRatio: number, waterInC: number, airInC: number): CoilState {
  if (flowRatio <= 0) return { loadKw: 0, waterOutC: airInC, airOutC: airInC, effectiveness: 0 };
  const waterKwK = coil.waterKwK * flowRatio;
  const share = coil.waterResistanceShare;
  const uaKwK = coil.designUaKwK / (share * flowRatio ** -WATER_FILM_EXPONENT + 1 - share);
  const smaller = Math.min(waterKwK, coil.airKwK);
  const reached = effectiveness(coil.arrangement, uaKwK / smaller, smaller / Math.max(waterKwK, coil.airKwK));
  const loadKw = reached * smaller * (waterInC - airInC);
  return { loadKw, waterOutC: waterInC - loadKw / waterKwK, airOutC: airInC + loadKw / coil.airKwK, effectiveness: reached };
}
