import { fluidProperties } from '@/lib/hydraulics/fluids';
import { GRAVITY_MS2 } from '@/lib/hydraulics/links/law';
import { hydraulicPowerKw } from '@/lib/hydraulics/pump-duty';
import type { DrawingFluid, DrawingPipe } from './drawing';
import type { PipeSolution } from './drawing-figures';
import { sizeSource } from './pipe-choice';

/** How a figure came about: its formula, the same with its numbers, each input with unit, and where the law comes from. */
export interface Working {
  title: string;
  formula: string;
  numbers: string;
  inputs: { name: string; value: string }[];
  result: string;
  source: string;
}

/** Four significant digits, without an exponent where that can be. */
export function digits(value: number): string {
  if (!Number.isFinite(value) || value === 0) return String(value === 0 ? 0 : value);
  const rounded = Number(value.toPrecision(4));
  return Math.abs(rounded) >= 1e-4 && Math.abs(rounded) < 1e7 ? String(rounded) : rounded.toExponential();
}

const fluidSources: Record<DrawingFluid['medium'], string> = {
  water: 'IAPWS-IF97 at 300 kPa absolute',
  'propylene-glycol': 'Melinder 2010, propylene glycol and water',
  'ethylene-glycol': 'Melinder 2010, ethylene glycol and water',
};

export interface DesignFlow {
  flowLs: number;
  working: Working;
}

/**
 * Flow that carries a load (kW, above 0) between supply and return temperature: Q = P / (ρ c ΔT), L/s, with density and
 * specific heat at the mean temperature. Null with the reason where the temperatures are equal or out of the property data.
 */
export function designFlowOfLoad(loadKw: number, fluid: DrawingFluid): DesignFlow | { refused: string } {
  const { medium, massFraction, supplyC, returnC } = fluid;
  const differenceK = Math.abs(supplyC - returnC);
  if (differenceK === 0) return { refused: 'Supply and return have the same temperature, so no flow can carry the load.' };
  const temperatureC = (supplyC + returnC) / 2;
  const found = fluidProperties(medium === 'water' ? { medium, temperatureC } : { medium, massFraction, temperatureC });
  if (!found.ok) return { refused: found.error.message };
  const { densityKgM3, specificHeatKJKgK } = found.properties;
  const flowLs = (loadKw / (densityKgM3 * specificHeatKJKgK * differenceK)) * 1000;
  return {
    flowLs,
    working: {
      title: 'Design flow from load',
      formula: 'Q = P / (ρ · c · ΔT)',
      numbers: `${digits(loadKw)} / (${digits(densityKgM3)} · ${digits(specificHeatKJKgK)} · ${digits(differenceK)}) · 1000`,
      inputs: [
        { name: 'Load P', value: `${digits(loadKw)} kW` },
        { name: 'Supply less return ΔT', value: `${digits(differenceK)} K` },
        { name: `Density ρ at ${digits(temperatureC)} °C`, value: `${digits(densityKgM3)} kg/m³` },
        { name: `Specific heat c at ${digits(temperatureC)} °C`, value: `${digits(specificHeatKJKgK)} kJ/(kg K)` },
      ],
      result: `${digits(flowLs)} L/s`,
      source: `Energy balance. Properties: ${fluidSources[medium]}.`,
    },
  };
}

/** Drop of a pipe: Darcy-Weisbach with the local losses, kPa. */
export function pipeWorking(pipe: DrawingPipe, solution: PipeSolution, fluid: { densityKgM3: number; viscosityMPaS: number }): Working[] {
  const { frictionFactor, velocityMs, reynolds, dropKpa, flowLs } = solution;
  if (pipe.lengthM === null || pipe.boreMm === null || pipe.roughnessMm === null || frictionFactor === null || reynolds === null) return [];
  const boreM = pipe.boreMm / 1000;
  return [
    {
      title: 'Velocity',
      formula: 'v = 4 Q / (π d²)',
      numbers: `4 · ${digits(Math.abs(flowLs) / 1000)} / (π · ${digits(boreM)}²)`,
      inputs: [
        { name: 'Flow Q', value: `${digits(Math.abs(flowLs))} L/s` },
        { name: 'Bore d', value: `${digits(pipe.boreMm)} mm` },
      ],
      result: `${digits(velocityMs)} m/s`,
      source: `Continuity. ${sizeSource(pipe)}`,
    },
    {
      title: 'Drop',
      formula: 'Δp = (f · L / d + ΣK) · ρ v² / 2',
      numbers: `(${digits(frictionFactor)} · ${digits(pipe.lengthM)} / ${digits(boreM)} + ${digits(pipe.minorK)}) · ${digits(fluid.densityKgM3)} · ${digits(velocityMs)}² / 2 / 1000`,
      inputs: [
        { name: 'Friction factor f', value: digits(frictionFactor) },
        { name: 'Reynolds number', value: digits(reynolds) },
        { name: 'Roughness', value: `${digits(pipe.roughnessMm)} mm` },
        { name: 'Length L', value: `${digits(pipe.lengthM)} m` },
        { name: 'Local losses ΣK', value: digits(pipe.minorK) },
        { name: 'Density ρ', value: `${digits(fluid.densityKgM3)} kg/m³` },
        { name: 'Viscosity', value: `${digits(fluid.viscosityMPaS)} mPa s` },
      ],
      result: `${digits(Math.abs(dropKpa))} kPa`,
      source: `Darcy–Weisbach; f is ${reynolds < 2000 ? '64 / Re (laminar)' : reynolds > 4000 ? 'Colebrook–White' : 'between 64 / Re and Colebrook–White (Re 2000 to 4000)'}.`,
    },
  ];
}

/** Drop of a valve or another piece with a flow coefficient (m³/h at 1 bar), kPa. */
export function valveWorking(title: string, kv: number, flowLs: number, densityKgM3: number): Working {
  const flowM3h = Math.abs(flowLs) * 3.6;
  return {
    title,
    formula: 'Δp = (Q / Kv)² · ρ / 1000 bar',
    numbers: `(${digits(flowM3h)} / ${digits(kv)})² · ${digits(densityKgM3)} / 1000 · 100`,
    inputs: [
      { name: 'Flow Q', value: `${digits(flowM3h)} m³/h` },
      { name: 'Kv', value: `${digits(kv)} m³/h` },
      { name: 'Density ρ', value: `${digits(densityKgM3)} kg/m³` },
    ],
    result: `${digits((flowM3h / kv) ** 2 * (densityKgM3 / 1000) * 100)} kPa`,
    source: 'Valve law of IEC 60534-2-1 for liquids without choking.',
  };
}

/** Drop of a coil or source from its design pair, kPa. */
export function designPairWorking(title: string, pair: { designFlowLs: number; designDropKpa: number }, flowLs: number): Working {
  const { designFlowLs, designDropKpa } = pair;
  return {
    title,
    formula: 'Δp = Δp design · (Q / Q design)²',
    numbers: `${digits(designDropKpa)} · (${digits(Math.abs(flowLs))} / ${digits(designFlowLs)})²`,
    inputs: [
      { name: 'Drop at design flow', value: `${digits(designDropKpa)} kPa` },
      { name: 'Design flow', value: `${digits(designFlowLs)} L/s` },
      { name: 'Flow Q', value: `${digits(Math.abs(flowLs))} L/s` },
    ],
    result: `${digits(designDropKpa * (flowLs / designFlowLs) ** 2)} kPa`,
    source: 'Turbulent loss, quadratic in flow, through the design point.',
  };
}

/** Power that a pump gives to the water, kW. */
export function pumpWorking(flowLs: number, headM: number, densityKgM3: number): Working {
  return {
    title: 'Hydraulic power',
    formula: 'P = ρ · g · Q · H',
    numbers: `${digits(densityKgM3)} · ${GRAVITY_MS2} · ${digits(flowLs / 1000)} · ${digits(headM)} / 1000`,
    inputs: [
      { name: 'Flow Q', value: `${digits(flowLs)} L/s` },
      { name: 'Head H on the curve at this flow', value: `${digits(headM)} m` },
      { name: 'Density ρ', value: `${digits(densityKgM3)} kg/m³` },
    ],
    result: `${digits(hydraulicPowerKw(flowLs, headM, densityKgM3))} kW`,
    source: 'Head: the curve as typed, a smooth monotone line through its points; other speeds by the affinity laws.',
  };
}

/**
 * Authority of a control valve: its drop fully open at design flow (L/s) over the differential across the branch that it controls, both at design
 * flow. The differential is the one that the solved circuit has there.
 */
export function authorityWorking(kvs: number, designFlowLs: number, densityKgM3: number, authority: number): Working {
  const flowM3h = designFlowLs * 3.6;
  const valveKpa = (flowM3h / kvs) ** 2 * (densityKgM3 / 1000) * 100;
  return {
    title: 'Authority of the control valve',
    formula: 'N = Δp valve / Δp branch, with Δp valve = (Q / Kvs)² · ρ / 1000 bar',
    numbers: `(${digits(flowM3h)} / ${digits(kvs)})² · ${digits(densityKgM3)} / 1000 · 100 / ${digits(valveKpa / authority)}`,
    inputs: [
      { name: 'Design flow Q', value: `${digits(flowM3h)} m³/h` },
      { name: 'Kvs of the valve, fully open', value: `${digits(kvs)} m³/h` },
      { name: 'Density ρ', value: `${digits(densityKgM3)} kg/m³` },
      { name: 'Δp valve, fully open', value: `${digits(valveKpa)} kPa` },
      { name: 'Δp branch, out of the solved circuit', value: `${digits(valveKpa / authority)} kPa` },
    ],
    result: digits(authority),
    source: 'Definition of valve authority; valve law of IEC 60534-2-1 for liquids without choking.',
  };
}
