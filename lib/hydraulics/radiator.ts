/**
 * Radiators and convectors by the exponent of EN 442: output ~ (logarithmic mean temperature difference)^n. Temperatures °C.
 * Check values: cases T2 and the radiator column of table 3.3 in the tests.
 */
export const DEFAULT_RADIATOR_EXPONENT = 1.3;

/** Logarithmic mean of the differences to the room at supply and return; both above room temperature (0 otherwise). */
export function logMeanDifferenceK(supplyC: number, returnC: number, roomC: number): number {
  const first = supplyC - roomC;
  const last = returnC - roomC;
  if (first <= 0 || last <= 0) return 0;
  const ratio = first / last;
  // Next to equal differences the quotient is 0/0; the arithmetic mean is then exact to 1e-13.
  return Math.abs(ratio - 1) < 1e-6 ? (first + last) / 2 : (first - last) / Math.log(ratio);
}

export type RadiatorDesign = { supplyC: number; returnC: number; roomC: number; exponent?: number };

/** Output over design output at other temperatures. */
export function outputFactor(design: RadiatorDesign, supplyC: number, returnC: number, roomC: number): number {
  const exponent = design.exponent ?? DEFAULT_RADIATOR_EXPONENT;
  const nominal = logMeanDifferenceK(design.supplyC, design.returnC, design.roomC);
  return (logMeanDifferenceK(supplyC, returnC, roomC) / nominal) ** exponent;
}

/**
 * Output over design output at a ratio of design water flow (above 0): the return temperature at which the water's loss equals the radiator's
 * output, found by bisection to 1e-12 of the difference to the room. Design supply must be above return, return above room, supply now above room.
 */
export function outputAtFlow(
  design: RadiatorDesign,
  flowRatio: number,
  supplyC = design.supplyC,
  roomC = design.roomC,
): { factor: number; returnC: number } {
  const designDrop = design.supplyC - design.returnC;
  let low = roomC;
  let high = supplyC;
  for (let step = 0; step < 60; step++) {
    const returnC = (low + high) / 2;
    const waterFactor = (flowRatio * (supplyC - returnC)) / designDrop;
    if (waterFactor > outputFactor(design, supplyC, returnC, roomC)) low = returnC;
    else high = returnC;
  }
  const returnC = (low + high) / 2;
  return { factor: outputFactor(design, supplyC, returnC, roomC), returnC };
}
