import { fluidProperties, type FluidSpecification } from '@/lib/hydraulics/fluids';

/** Density (kg/m³) and specific heat (kJ/kgK) of a revision's fluid at the loop's mean temperature. */
export function loopFluid(fluid: FluidSpecification): { densityKgM3: number; specificHeatKJKgK: number } {
  const found = fluidProperties(fluid);
  // The revision was solved with this fluid before it was issued, so its properties are known.
  if (!found.ok) throw new Error(`The fluid of an issued revision is out of range: ${found.error.message}`);
  const { densityKgM3, specificHeatKJKgK } = found.properties;
  return { densityKgM3, specificHeatKJKgK };
}
