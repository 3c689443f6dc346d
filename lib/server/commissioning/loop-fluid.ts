import { fluidProperties, type FluidSpecification } from '@/lib/hydraulics/fluids';

/** Density of a revision's fluid at the loop's mean temperature, kg/m³. */
export function densityOf(fluid: FluidSpecification): number {
  const found = fluidProperties(fluid);
  // The revision was solved with this fluid before it was issued, so its properties are known.
  if (!found.ok) throw new Error(`The fluid of an issued revision is out of range: ${found.error.message}`);
  return found.properties.densityKgM3;
}
