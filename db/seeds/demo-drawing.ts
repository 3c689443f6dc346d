import { fluidProperties } from '@/lib/hydraulics/fluids';
import type { ChosenValve, Drawing, DrawingPipe, Equipment, PipeEnd, Port, TerminalUnit } from '@/lib/network/drawing';
import { genericPump } from '@/lib/network/generate/generic-pump';

/** What the demo's two loops are told apart by. Loads, lengths and coils are invented. */
export interface DemoLoop {
  service: 'chilled' | 'hot';
  /** Tag of the terminals before storey and number, e.g. FC. */
  unitTag: string;
  sourceTag: string;
  risers: string[];
  unitsPerBranch: number;
  /** kW of each terminal of a branch, near to far; every riser varies it a little. */
  loadsKw: number[];
  coilDropKpa: number;
  fluid: Drawing['fluid'];
}

export const chilledLoop: DemoLoop = {
  service: 'chilled',
  unitTag: 'FC',
  sourceTag: 'CH',
  risers: ['A', 'B', 'C'],
  unitsPerBranch: 4,
  loadsKw: [4.2, 3.6, 5.0, 3.2],
  coilDropKpa: 18,
  fluid: { medium: 'water', massFraction: 0, supplyC: 6, returnC: 12 },
};

export const hotLoop: DemoLoop = {
  service: 'hot',
  unitTag: 'HC',
  sourceTag: 'BO',
  risers: ['A', 'B', 'C'],
  unitsPerBranch: 3,
  loadsKw: [12.0, 9.0, 11.0],
  coilDropKpa: 9,
  fluid: { medium: 'water', massFraction: 0, supplyC: 80, returnC: 60 },
};

const storeys = [
  { id: 'storey-2', name: 'Level 2', elevationM: 8, top: 0, height: 320 },
  { id: 'storey-1', name: 'Level 1', elevationM: 4, top: 320, height: 320 },
  { id: 'storey-0', name: 'Plant room', elevationM: 0, top: 640, height: 320 },
];

/** Where things stand on the sheet, px. */
const sheet = {
  riserX: 520,
  riserStep: 80,
  unitStep: 120,
  firstUnit: 150,
  supplyY: 50,
  unitY: 155,
  returnY: 260,
  mainSupplyY: 720,
  mainReturnY: 860,
};

/** Stands in until `sizeDemo` knows the flow that each valve carries. */
const noValve: ChosenValve = {
  name: '',
  kvTable: [
    { setting: 0.5, kv: 1 },
    { setting: 4, kv: 400 },
  ],
  settingTurns: null,
  isLocked: false,
};

/** The pieces and pipes of a demo loop; sizes, valves and the pump are chosen afterwards by `sizeDemo`. */
export function drawDemo(loop: DemoLoop): Drawing {
  const equipment: Equipment[] = [];
  const pipes: DrawingPipe[] = [];
  const place = (id: string, tag: string, storeyId: string, x: number, y: number, rotation: Equipment['rotation'] = 0) => ({
    id,
    tag,
    storeyId,
    x,
    y,
    rotation,
    isMirrored: false,
  });
  const tee = (id: string, storeyId: string, x: number, y: number) => equipment.push({ ...place(id, '', storeyId, x, y), kind: 'tee' });
  const pipe = (from: string, to: string, lengthM: number, circuit: 'supply' | 'return', minorK = 1) =>
    pipes.push({
      id: `pipe-${pipes.length + 1}`,
      from: end(from),
      to: end(to),
      circuit,
      lengthM,
      series: null,
      nominal: null,
      boreMm: null,
      roughnessMm: null,
      minorK,
      bends: [],
    });

  const { supplyC, returnC } = loop.fluid;
  const water = fluidProperties({ medium: 'water', temperatureC: (supplyC + returnC) / 2 });
  if (!water.ok) throw new Error(water.error.message);
  const { densityKgM3, specificHeatKJKgK } = water.properties;
  /** Energy balance: Q = P / (ρ c ΔT). */
  const flowOf = (loadKw: number) => Number(((loadKw * 1000) / (densityKgM3 * specificHeatKJKgK * Math.abs(supplyC - returnC))).toFixed(3));

  const branchWidth = sheet.firstUnit + sheet.unitStep * loop.unitsPerBranch + sheet.riserStep;
  let total = 0;
  loop.risers.forEach((riser, r) => {
    const x0 = sheet.riserX + r * branchWidth;
    const isLast = r === loop.risers.length - 1;
    if (!isLast) {
      tee(`main-s-${riser}`, 'storey-0', x0, sheet.mainSupplyY);
      tee(`main-r-${riser}`, 'storey-0', x0 + 60, sheet.mainReturnY);
    }
    // Supply goes up on the left, return comes down on the right of each riser.
    const level1 = storeys[1]!;
    tee(`riser-s-${riser}`, level1.id, x0, level1.top + sheet.supplyY);
    tee(`riser-r-${riser}`, level1.id, x0 + 60, level1.top + sheet.returnY);
    equipment.push({ ...place(`rv-${riser}`, `RV-${riser}`, 'storey-0', x0 + 60, 790, 90), kind: 'balancingValve', valve: noValve });
    pipe(
      r === 0 ? 'source.out' : `main-s-${loop.risers[r - 1]}.e`,
      isLast ? `riser-s-${riser}.s` : `main-s-${riser}.w`,
      r === 0 ? 6 : 14,
      'supply',
      2,
    );
    if (!isLast) pipe(`main-s-${riser}.n`, `riser-s-${riser}.s`, 4, 'supply');
    pipe(`riser-r-${riser}.s`, `rv-${riser}.in`, 3, 'return');
    pipe(`rv-${riser}.out`, isLast ? `main-r-${loop.risers[r - 1]}.e` : `main-r-${riser}.n`, isLast ? 15 : 1, 'return');
    if (!isLast) pipe(`main-r-${riser}.w`, r === 0 ? 'main-tee.e' : `main-r-${loop.risers[r - 1]}.e`, r === 0 ? 6 : 14, 'return', 2);

    for (const [storey, level] of [
      [1, level1],
      [2, storeys[0]!],
    ] as const) {
      const key = `${riser}${storey}`;
      const [supplyY, returnY] = [level.top + sheet.supplyY, level.top + sheet.returnY];
      equipment.push({
        ...place(`bv-${key}`, `BV-${storey}${riser}`, level.id, x0 + 100, returnY, 180),
        kind: 'balancingValve',
        valve: noValve,
      });
      for (let k = 0; k < loop.unitsPerBranch; k++) {
        const x = x0 + sheet.firstUnit + k * sheet.unitStep;
        const number = r * loop.unitsPerBranch + k + 1;
        const loadKw = Number((loop.loadsKw[k % loop.loadsKw.length]! * (1 + 0.08 * (r - 1))).toFixed(2));
        const unit: TerminalUnit = {
          ...place(
            `unit-${key}-${k + 1}`,
            `${loop.unitTag}-${storey}.${String(number).padStart(2, '0')}`,
            level.id,
            x,
            level.top + sheet.unitY,
          ),
          kind: 'terminalUnit',
          room: `${storey}.${String(10 + number)}`,
          loadKw,
          designFlowLs: flowOf(loadKw),
          coilDropKpa: loop.coilDropKpa,
          strainerKv: 6.3,
          controlValve: { kvs: 1.6, characteristic: 'equalPercentage', opening: 1 },
          balancingValve: noValve,
        };
        equipment.push(unit);
        total += unit.designFlowLs!;
        const isEnd = k === loop.unitsPerBranch - 1;
        if (!isEnd) {
          tee(`s-${key}-${k + 1}`, level.id, x, supplyY);
          tee(`r-${key}-${k + 1}`, level.id, x, returnY);
        }
        const [before, after] =
          k === 0 ? [storey === 1 ? `riser-s-${riser}.e` : `riser-s-${riser}.n`, `bv-${key}.in`] : [`s-${key}-${k}.e`, `r-${key}-${k}.e`];
        const run = k === 0 ? (storey === 1 ? 5 : 9) : 4.5;
        pipe(before, isEnd ? `${unit.id}.in` : `s-${key}-${k + 1}.w`, run, 'supply');
        pipe(isEnd ? `${unit.id}.out` : `r-${key}-${k + 1}.w`, after, run, 'return');
        if (!isEnd) {
          pipe(`s-${key}-${k + 1}.s`, `${unit.id}.in`, 1.5, 'supply');
          pipe(`${unit.id}.out`, `r-${key}-${k + 1}.n`, 1.5, 'return');
        }
      }
      pipe(`bv-${key}.out`, storey === 1 ? `riser-r-${riser}.e` : `riser-r-${riser}.n`, storey === 1 ? 2 : 6, 'return');
    }
  });

  const plant = 'storey-0';
  equipment.push(
    { ...place('vessel', 'EV-1', plant, 60, 800), kind: 'expansionVessel', gaugePressureKpa: 180 },
    {
      ...place('pump', 'P-1', plant, 150, sheet.mainSupplyY),
      kind: 'pump',
      ...genericPump(6, 40),
      speed: 1,
      hasNonReturn: true,
    },
    { ...place('check', 'NRV-1', plant, 250, sheet.mainSupplyY), kind: 'checkValve', kv: 100 },
    {
      ...place('source', `${loop.sourceTag}-1`, plant, 350, sheet.mainSupplyY),
      kind: 'source',
      sourceKind: loop.service === 'chilled' ? 'chiller' : 'boiler',
      designFlowLs: Number(total.toFixed(3)),
      designDropKpa: loop.service === 'chilled' ? 35 : 15,
    },
  );
  tee('main-tee', plant, 90, sheet.mainReturnY);
  pipe('main-tee.n', 'pump.in', 3, 'return', 2);
  pipe('pump.out', 'check.in', 1, 'supply');
  pipe('check.out', 'source.in', 1.5, 'supply');
  pipe('vessel.in', 'main-tee.w', 2, 'return');
  return { format: 'drawing/1', fluid: loop.fluid, pumpExcess: 'speed', storeys, equipment, pipes };
}

function end(text: string): PipeEnd {
  const [equipmentId, port] = text.split('.') as [string, Port];
  return { equipmentId, port };
}
