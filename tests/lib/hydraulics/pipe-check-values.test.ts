import { describe, expect, it } from 'vitest';
import { fluidProperties, type FluidSpecification } from '@/lib/hydraulics/fluids';
import { frictionFactor } from '@/lib/hydraulics/friction';
import { boreAreaM2, reynoldsPerLs } from '@/lib/hydraulics/links/pipe';

const water = (temperatureC: number): FluidSpecification => ({ medium: 'water', temperatureC });
const glycol = (medium: 'propylene-glycol' | 'ethylene-glycol', massFraction: number): FluidSpecification => ({
  medium,
  massFraction,
  temperatureC: 6,
});

describe('friction of a fluid in a pipe', () => {
  // Computed with scipy from IAPWS and Melinder properties and the exact Colebrook equation: bore mm, L/s, roughness mm; Re, f, Pa/m.
  it.each<[string, FluidSpecification, number, number, number, number, number, number]>([
    ['DN50 medium steel, water 75 °C', water(75), 53.1, 2, 0.046, 123_861, 0.02127, 159.28],
    ['DN50 medium steel, water 6 °C', water(6), 53.1, 2, 0.046, 32_598, 0.0253, 194.29],
    ['DN25 schedule 40, water 10 °C', water(10), 26.64, 0.3, 0.045, 10_979, 0.03272, 177.84],
    ['copper 22 mm, water 75 °C', water(75), 20.2, 0.2, 0.0015, 32_560, 0.02325, 218.5],
    ['DN100 schedule 40, water 6 °C', water(6), 102.26, 15, 0.045, 126_951, 0.01946, 317.45],
    ['DN150 schedule 40, water 6 °C', water(6), 154.08, 40, 0.045, 224_680, 0.01744, 260.43],
    ['PEX 20 x 2, water 45 °C', water(45), 16, 0.05, 0.007, 6_613, 0.0351, 67.18],
    ['copper 15 mm, water 6 °C, laminar', water(6), 13.6, 0.02, 0.0015, 1_273, 0.05028, 35.04],
    ['DN100, 30 % propylene glycol', glycol('propylene-glycol', 0.3), 102.26, 15, 0.045, 36_180, 0.02374, 398.71],
    ['DN100, 30 % ethylene glycol', glycol('ethylene-glycol', 0.3), 102.26, 15, 0.045, 56_759, 0.0219, 372.52],
    ['DN25, 35 % propylene glycol, laminar', glycol('propylene-glycol', 0.35), 26.64, 0.15, 0.045, 1_101, 0.05812, 81.74],
  ])('%s', (_, fluid, boreMm, flowLs, roughnessMm, reynolds, factor, paPerM) => {
    const result = fluidProperties(fluid);
    if (!result.ok) throw new Error(result.error.message);
    const re = flowLs * reynoldsPerLs(boreMm, result.properties);
    const f = frictionFactor(re, roughnessMm / boreMm);
    const velocityMs = flowLs / 1000 / boreAreaM2(boreMm);
    expect(re).toBeCloseTo(reynolds, 0);
    expect(f).toBeCloseTo(factor, 5);
    expect(((f / (boreMm / 1000)) * result.properties.densityKgM3 * velocityMs ** 2) / 2).toBeCloseTo(paPerM, 2);
  });
});
