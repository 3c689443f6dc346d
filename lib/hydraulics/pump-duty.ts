import { GRAVITY_MS2 } from './links/law';

/**
 * Power, speed and suction of a pump. Flow in L/s, head in m, pressures in kPa, density in kg/m³, power in kW, efficiencies as fractions.
 * Check values: cases P5 to P7 and P13 to P15 in the tests.
 */

export const ATMOSPHERE_KPA = 101.325;

/** Power given to the water: rho g Q H. */
export function hydraulicPowerKw(flowLs: number, headM: number, densityKgM3: number): number {
  return (densityKgM3 * GRAVITY_MS2 * flowLs * headM) / 1e6;
}

/** Power given to, or lost by, water that passes a pressure difference: Q dp (1 L/s at 1 kPa is 1 W). */
export function pressurePowerKw(flowLs: number, dropKpa: number): number {
  return (flowLs * dropKpa) / 1000;
}

/** Power at the pump's shaft; efficiency above 0, up to 1. */
export function shaftPowerKw(hydraulicKw: number, pumpEfficiency: number): number {
  return hydraulicKw / pumpEfficiency;
}

/** Power drawn from the mains; motor and drive efficiency above 0, up to 1 (drive 1: none). */
export function electricalPowerKw(shaftKw: number, motorEfficiency: number, driveEfficiency = 1): number {
  return shaftKw / (motorEfficiency * driveEfficiency);
}

export type Duty = { flowLs: number; headM: number; shaftKw: number };

/**
 * The duty that corresponds to another speed: Q ~ n, H ~ n², P ~ n³ (affinity laws, constant efficiency). It lies on the new operating point
 * only where the whole head is friction that grows with Q²; with static head or a pressure set point the loop must be solved again.
 */
export function dutyAtSpeed({ flowLs, headM, shaftKw }: Duty, speedRatio: number): Duty {
  return { flowLs: flowLs * speedRatio, headM: headM * speedRatio ** 2, shaftKw: shaftKw * speedRatio ** 3 };
}

/** What the suction side is measured against: vapour pressure (kPa absolute) and density of the liquid there; air pressure defaults to sea level. */
export type SuctionLiquid = { densityKgM3: number; vapourKpaAbs: number; atmosphereKpa?: number };

/** Net positive suction head available (m) from the gauge pressure at the suction flange and the velocity there: (p - pv) / (rho g) + v² / 2g. */
export function suctionHeadAvailableM(suctionGaugeKpa: number, liquid: SuctionLiquid, velocityMs = 0): number {
  const { densityKgM3, vapourKpaAbs, atmosphereKpa = ATMOSPHERE_KPA } = liquid;
  const pressureM = ((suctionGaugeKpa + atmosphereKpa - vapourKpaAbs) * 1000) / (densityKgM3 * GRAVITY_MS2);
  return pressureM + velocityMs ** 2 / (2 * GRAVITY_MS2);
}

/** The same from a vessel: gauge pressure on its surface, its level above the pump (m, below 0 when it must lift) and the loss between them (m). */
export function suctionHeadFromVesselM(surfaceGaugeKpa: number, levelAbovePumpM: number, lossM: number, liquid: SuctionLiquid): number {
  return suctionHeadAvailableM(surfaceGaugeKpa, liquid) + levelAbovePumpM - lossM;
}

/** Whether the suction head available is enough: at least the pump's required NPSH times a margin ratio the designer chooses (often 1.1 to 1.3). */
export function suctionCheck(
  availableM: number,
  requiredM: number,
  marginRatio: number,
): { enough: boolean; neededM: number; spareM: number } {
  const neededM = requiredM * marginRatio;
  return { enough: availableM >= neededM, neededM, spareM: availableM - neededM };
}

/** Energy used in a year, kWh: each part of the year with its hours and its electrical power. */
export function annualEnergyKwh(profile: readonly { hours: number; electricalKw: number }[]): number {
  return profile.reduce((sum, part) => sum + part.hours * part.electricalKw, 0);
}
