/**
 * Heat carried by water. Flow L/s, temperatures °C, power kW, density kg/m³, specific heat kJ/(kg K).
 * One density and specific heat serve a whole loop, so streams mix in proportion to their flows. Check values: cases T1, T7, T8.
 */
export type HeatCapacity = { densityKgM3: number; specificHeatKJKgK: number };

/** kW that 1 L/s carries per kelvin. */
export function capacityKwPerLsK({ densityKgM3, specificHeatKJKgK }: HeatCapacity): number {
  return (densityKgM3 / 1000) * specificHeatKJKgK;
}

/** Heat given up between two temperatures (below 0: taken up): rho cp Q (T in - T out). */
export function heatGivenKw(flowLs: number, inC: number, outC: number, fluid: HeatCapacity): number {
  return flowLs * capacityKwPerLsK(fluid) * (inC - outC);
}

/** Flow that carries a load at a temperature difference (not 0; signs are ignored). */
export function flowForLoadLs(loadKw: number, differenceK: number, fluid: HeatCapacity): number {
  return Math.abs(loadKw / differenceK) / capacityKwPerLsK(fluid);
}

export type Stream = { flowLs: number; temperatureC: number };

/** Temperature of streams (flows 0 or more) brought together; null when none of them flows. */
export function mixedTemperatureC(streams: readonly Stream[]): number | null {
  const total = streams.reduce((sum, stream) => sum + stream.flowLs, 0);
  if (total <= 0) return null;
  return streams.reduce((sum, stream) => sum + stream.flowLs * stream.temperatureC, 0) / total;
}

export type DecouplerState = {
  /** From supply to return when above 0; from return to supply, raising the secondary's temperature, when below. */
  bypassFlowLs: number;
  secondarySupplyC: number;
  primaryReturnC: number;
};

/** Temperatures either side of a decoupler, from the primary's supply and the secondary's return. Both flows above 0. */
export function decouplerState(primary: Stream, secondary: Stream): DecouplerState {
  const bypassFlowLs = primary.flowLs - secondary.flowLs;
  const mixed = (main: Stream, mainFlowLs: number, other: Stream) =>
    (main.temperatureC * mainFlowLs + other.temperatureC * Math.abs(bypassFlowLs)) / (mainFlowLs + Math.abs(bypassFlowLs));
  return {
    bypassFlowLs,
    secondarySupplyC: bypassFlowLs < 0 ? mixed(primary, primary.flowLs, secondary) : primary.temperatureC,
    primaryReturnC: bypassFlowLs > 0 ? mixed(secondary, secondary.flowLs, primary) : secondary.temperatureC,
  };
}
