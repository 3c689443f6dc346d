import { describe, expect, it } from 'vitest';
import { annualLossKwh, powerBreakdown } from '@/lib/hydraulics/energy';
import type { NetworkLink } from '@/lib/hydraulics/types';

const FLUID = { densityKgM3: 1000, viscosityMPaS: 1, specificHeatKJKgK: 4.2 };

/** Constructed loop N11, balanced: mains 10, 20, 50 and coils 80, 222.2, 625 kPa/(L/s)², valves 15, 10, 3 kPa, pump 45 kPa at 1 L/s. */
const N11: [id: string, kind: 'pump' | 'terminal' | 'balancingValve' | 'resistance', flowLs: number, dropKpa: number][] = [
  ['PU', 'pump', 1, -45],
  ['M1', 'resistance', 1, 10],
  ['M2', 'resistance', 0.5, 5],
  ['M3', 'resistance', 0.2, 2],
  ['T1', 'terminal', 0.5, 20],
  ['V1', 'balancingValve', 0.5, 15],
  ['T2', 'terminal', 0.3, 20],
  ['V2', 'balancingValve', 0.3, 10],
  ['T3', 'terminal', 0.2, 25],
  ['V3', 'balancingValve', 0.2, 3],
];

function breakdownOf(rows: typeof N11, nodes: { id: string; inflowLs?: number; elevationM?: number; pressureKpa: number }[] = []) {
  const curve = [0, 1, 2].map((flowLs) => ({ flowLs, headM: 6 - flowLs }));
  // A breakdown reads the kinds alone; each link still carries what its kind needs.
  const link = (id: string, kind: (typeof N11)[number][1]): NetworkLink => {
    const ends = { id, from: 'A', to: 'B' };
    if (kind === 'pump') return { ...ends, kind, curve };
    if (kind === 'balancingValve') return { ...ends, kind, kvTable: [] };
    return kind === 'terminal' ? { ...ends, kind, designFlowLs: 1, designDropKpa: 1 } : { ...ends, kind, kv: 1 };
  };
  const links = rows.map(([id, , flowLs, dropKpa]) => ({ id, flowLs, dropKpa }));
  const solved = nodes.map(({ id, pressureKpa }) => ({ id, pressureKpa, headM: 0 }));
  return powerBreakdown({ nodes, links: rows.map(([id, kind]) => link(id, kind)) }, { links, nodes: solved, fluid: FLUID });
}

describe('where the pump’s power goes', () => {
  it('sums over the balanced loop N11 to the 45 W of its pump', () => {
    const power = breakdownOf(N11);
    expect(power.pumpsKw).toBeCloseTo(0.045, 12);
    expect(power.lostKw).toBeCloseTo(0.045, 12);
    expect(power.imbalanceKw).toBeCloseTo(0, 12);
    expect(power.boundaryKw).toBe(0);
    expect(power.lostByKind.balancingValve).toBeCloseTo(0.0075 + 0.003 + 0.0006, 12);
    expect(power.lostByKind.terminal).toBeCloseTo(0.01 + 0.006 + 0.005, 12);
    expect(power.lostByKind.resistance).toBeCloseTo(0.01 + 0.0025 + 0.0004, 12);
    expect(power.lostByKind.pump).toBeUndefined();
    expect(power.links.map((link) => link.id)).toEqual(N11.slice(1).map(([id]) => id));
    expect(breakdownOf([['V', 'balancingValve', 0, 30]]).links).toEqual([{ id: 'V', kind: 'balancingValve', lostKw: 0 }]);
    expect(power.links[4]).toEqual({ id: 'V1', kind: 'balancingValve', lostKw: expect.closeTo(0.0075, 12) });
  });

  it('counts a reversed flow as the loss it is', () => {
    expect(breakdownOf([['M', 'resistance', -0.5, -5]]).lostKw).toBeCloseTo(0.0025, 12);
  });

  it('counts a pump that is driven past its curve among the losses, and an idle one among neither', () => {
    const power = breakdownOf([
      ['PU1', 'pump', 2, -50],
      ['PU2', 'pump', 2, 10],
      ['PU3', 'pump', 0, -60],
      ['M', 'resistance', 2, 40],
    ]);
    expect(power.pumpsKw).toBeCloseTo(0.1, 12);
    expect(power.lostByKind.pump).toBeCloseTo(0.02, 12);
    expect(power.links.map((link) => link.id)).toEqual(['PU2', 'M']);
    expect(power.imbalanceKw).toBeCloseTo(0, 12);
  });

  it('counts what inflows bring at the piezometric pressure', () => {
    const ends = [
      { id: 'A', inflowLs: 2, elevationM: 10, pressureKpa: 50 },
      { id: 'B', inflowLs: -2, pressureKpa: 20 },
      { id: 'C', elevationM: 7, pressureKpa: 90 },
    ];
    const dropKpa = 50 + 98.0665 - 20;
    const power = breakdownOf([['P', 'resistance', 2, dropKpa]], ends);
    expect(power.boundaryKw).toBeCloseTo(0.002 * dropKpa, 12);
    expect(power.imbalanceKw).toBeCloseTo(0, 12);
  });

  it('costs at the meter the loss over the efficiency of pump, motor and drive', () => {
    expect(annualLossKwh(0.5, 0.5, 4000)).toBe(4000);
  });
});
