import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { waterProperties } from '@/lib/hydraulics/water';
import { solve } from '@/lib/hydraulics/solve';
import { balance } from '@/lib/hydraulics/balance';
import { calculatedPart } from '@/lib/network/calculated-part';
import { drawingToDocument } from '@/lib/network/drawing-to-document';
import { figuresOfDrawing } from '@/lib/network/drawing-figures';
import { adoptSettings } from '@/lib/network/adopt-settings';
import { genericValves } from '@/lib/network/valve-families';
import { authorityWorking, designFlowOfLoad, designPairWorking, digits, pipeWorking, valveWorking } from '@/lib/network/working';
import { ladder } from '../../make/drawing';

const fluid = { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 } as const;

const solvedLadder = (flowsLs: number[]) => {
  const drawing = ladder(flowsLs);
  const document = drawingToDocument(drawing, 'ladder').document!;
  return { drawing, solve: solve(document), balance: balance(document) };
};

describe('the working of a figure', () => {
  it('gives the flow that carries a load: 4.2 kW over 6 K is 0.167 L/s of chilled water', () => {
    const found = designFlowOfLoad(4.2, fluid);
    if ('refused' in found) throw new Error(found.refused);
    const { densityKgM3, specificHeatKJKgK } = waterProperties(9);
    expect(found.flowLs).toBeCloseTo((4.2 / (densityKgM3 * specificHeatKJKgK * 6)) * 1000, 12);
    expect(found.flowLs).toBeCloseTo(0.167, 3);
    expect(found.working.inputs.map(({ name }) => name)).toContain('Density ρ at 9 °C');
  });

  it('says why no flow follows from a load', () => {
    expect(designFlowOfLoad(4.2, { ...fluid, returnC: 6 })).toMatchObject({ refused: expect.stringContaining('same temperature') });
    expect(designFlowOfLoad(4.2, { ...fluid, supplyC: 150, returnC: 130 })).toMatchObject({ refused: expect.stringContaining('0 to 120') });
  });

  it('repeats the drops that the solver found, of pipes, valves and coils', () => {
    const { drawing, solve: solved, balance: balanced } = solvedLadder([0.2, 0.3, 0.25]);
    const figures = figuresOfDrawing(drawing, { solve: solved, balance: balanced }, 'drawn')!;
    for (const pipe of drawing.pipes) {
      const solution = figures.pipes.get(pipe.id)!;
      const drop = pipeWorking(pipe, solution, figures.fluid).find(({ title }) => title === 'Drop');
      if (drop) expect(Number.parseFloat(drop.result)).toBeCloseTo(Math.abs(solution.dropKpa), 3);
      else expect(solution.flowLs).toBeCloseTo(0, 9);
    }
    for (const unit of drawing.equipment) {
      if (unit.kind !== 'terminalUnit') continue;
      const { parts, flowLs } = figures.pieces.get(unit.id)!;
      const coil = designPairWorking('', { designFlowLs: unit.designFlowLs!, designDropKpa: unit.coilDropKpa! }, flowLs!);
      expect(Number.parseFloat(coil.result)).toBeCloseTo(parts.coil!.dropKpa, 2);
      const control = valveWorking('', unit.controlValve!.kvs!, flowLs!, figures.fluid.densityKgM3);
      expect(Number.parseFloat(control.result)).toBeCloseTo(parts.control!.dropKpa, 2);
    }
  });

  it('writes four digits, without an exponent where a person would write none', () => {
    expect([0, 1234.56, 0.00123456, 0.0000012345, 12].map(digits)).toEqual(['0', '1235', '0.001235', '1.234e-6', '12']);
  });
});

describe('the figures of a drawing', () => {
  it('are at design flow as balanced, and name the index unit', () => {
    const { drawing, solve: solved, balance: balanced } = solvedLadder([0.2, 0.3, 0.25]);
    const figures = figuresOfDrawing(drawing, { solve: solved, balance: balanced }, 'balanced')!;
    const units = drawing.equipment.filter(({ kind }) => kind === 'terminalUnit');
    for (const { id } of units) expect(figures.pieces.get(id)!.percentOfDesign).toBeCloseTo(100, 1);
    expect(units.filter(({ id }) => figures.pieces.get(id)!.isIndex)).toHaveLength(1);
    expect(figures.pieces.get('P-1')!.pump!.headM).toBeGreaterThan(0);
  });

  it('reach design flow as drawn once the settings are adopted and the pump runs at the speed they were found for', () => {
    const { drawing, balance: balanced } = solvedLadder([0.2, 0.3, 0.25]);
    const { drawing: adopted, count } = adoptSettings(drawing, balanced.valves);
    expect(count).toBe(3);
    const slowed = {
      ...adopted,
      equipment: adopted.equipment.map((piece) => (piece.kind === 'pump' ? { ...piece, speed: balanced.pumps[0].speed } : piece)),
    };
    const result = solve(drawingToDocument(slowed, '').document!);
    for (const terminal of balanced.terminals) {
      const flowLs = result.links.find(({ id }) => id === terminal.id)!.flowLs;
      expect(Math.abs(flowLs / terminal.designFlowLs - 1)).toBeLessThan(0.01);
    }
    expect(adoptSettings(adopted, balanced.valves).count).toBe(0);
  });

  it('leave a locked valve where it stands', () => {
    const { drawing, balance: balanced } = solvedLadder([0.2, 0.3]);
    const locked = {
      ...drawing,
      equipment: drawing.equipment.map((piece) =>
        piece.kind === 'terminalUnit' && piece.balancingValve
          ? { ...piece, balancingValve: { ...piece.balancingValve, isLocked: true, settingTurns: 2 } }
          : piece,
      ),
    };
    expect(adoptSettings(locked, balanced.valves)).toEqual({ drawing: locked, count: 0 });
  });
});

describe('what a calculation depends on', () => {
  it('is untouched by layout, and touched by every length and elevation', () => {
    const drawing = ladder([0.2]);
    const moved = {
      ...drawing,
      equipment: drawing.equipment.map((piece) => ({ ...piece, x: 7, y: 9, rotation: 90 as const, isMirrored: true })),
      pipes: drawing.pipes.map((pipe) => ({ ...pipe, bends: [{ x: 1, y: 1 }] })),
    };
    expect(calculatedPart(moved)).toBe(calculatedPart(drawing));
    expect(calculatedPart({ ...drawing, pipes: drawing.pipes.map((pipe) => ({ ...pipe, lengthM: 6 })) })).not.toBe(calculatedPart(drawing));
    expect(calculatedPart({ ...drawing, storeys: [{ id: 's', name: '', elevationM: 3, top: 0, height: 1 }] })).not.toBe(
      calculatedPart(drawing),
    );
  });
});

describe('the generic balancing valves', () => {
  it('grow with size and with every turn, from half a turn to fully open at Kvs', () => {
    fc.assert(
      fc.property(fc.constantFrom(...genericValves), ({ kvTable, kvs, turns }) => {
        expect(kvTable[0].setting).toBe(0.5);
        expect(kvTable.at(-1)).toEqual({ setting: turns, kv: kvs });
        for (let i = 1; i < kvTable.length; i++) expect(kvTable[i].kv).toBeGreaterThan(kvTable[i - 1].kv);
      }),
    );
    const kvs = genericValves.map((valve) => valve.kvs);
    expect(kvs).toEqual([...kvs].sort((a, b) => a - b));
    expect(genericValves.map(({ nominal }) => nominal)).toEqual([
      'DN15',
      'DN20',
      'DN25',
      'DN32',
      'DN40',
      'DN50',
      'DN65',
      'DN80',
      'DN100',
      'DN125',
      'DN150',
      'DN200',
      'DN250',
      'DN300',
      'DN350',
      'DN400',
    ]);
  });
});

it('authority opens as the share of the valve in the differential of its branch', () => {
  // 0.2 L/s is 0.72 m³/h; through Kvs 2.5 at 999.8 kg/m³ that costs (0.72 / 2.5)² · 0.9998 · 100 = 8.2927 kPa, of 20.73 kPa a share of 0.4.
  const working = authorityWorking(2.5, 0.2, 999.8, 0.4);
  expect(working.inputs).toContainEqual({ name: 'Δp valve, fully open', value: '8.293 kPa' });
  expect(working.inputs).toContainEqual({ name: 'Δp branch, out of the solved circuit', value: '20.73 kPa' });
  expect(working.result).toBe('0.4');
});
