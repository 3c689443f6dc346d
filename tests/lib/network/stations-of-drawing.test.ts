import { expect, it } from 'vitest';
import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Drawing } from '@/lib/network/drawing';
import { flowFromDrop } from '@/lib/commissioning/reading-flow';
import { stationsOfDrawing } from '@/lib/network/stations-of-drawing';
import { drawing, pump, tee, unit, valve } from '../../make/drawing';

const onStorey = (piece: Drawing['equipment'][number], storeyId: string, x: number) => ({ ...piece, storeyId, x });
const branchValve = {
  kind: 'balancingValve' as const,
  id: 'BV-1',
  tag: 'BV-1',
  storeyId: 'one',
  x: 5,
  y: 0,
  rotation: 0 as const,
  isMirrored: false,
  valve: valve(10),
};

const loop: Drawing = {
  ...drawing(
    [
      onStorey(unit('FC-2', 0.3), 'one', 20),
      onStorey(unit('FC-1', 0.2), 'one', 10),
      onStorey(unit('FC-0', 0.1), 'ground', 90),
      branchValve,
      tee('T-1'),
      pump('P-1'),
    ],
    [],
  ),
  storeys: [
    { id: 'one', name: 'Level 1', elevationM: 4, top: 0, height: 100 },
    { id: 'ground', name: 'Ground', elevationM: 0, top: 100, height: 100 },
  ],
};

const balance: Pick<BalanceResult, 'valves' | 'pumps' | 'solution'> = {
  valves: [
    { id: 'FC-1:balancing', flowLs: 0.2, dropKpa: 7.9, kv: 2.56, setting: 2.6, state: 'throttled', wantedKv: 2.56 },
    { id: 'BV-1', flowLs: 0.5, dropKpa: 4, kv: 9, setting: 3.5, state: 'throttled', wantedKv: 9 },
  ],
  pumps: [{ id: 'P-1', flowLs: 0.6, requiredHeadM: 8, speed: 0.9, shaftKw: null }],
  solution: {
    ...{
      converged: true,
      method: 'hardy-cross',
      iterations: 1,
      residuals: { continuityLs: 0, loopPa: 0 },
      nodes: [],
      pumps: [],
      warnings: [],
    },
    fluid: { densityKgM3: 999.6, viscosityMPaS: 1.35, specificHeatKJKgK: 4.19 },
    links: [{ id: 'FS-1', flowLs: -0.5, dropKpa: -2 }],
  },
};

it('stations come in walking order: the pump, then storey by storey from the lowest, a branch before its terminals, left to right', () => {
  const stations = stationsOfDrawing(loop, balance as BalanceResult);
  expect(stations.map(({ tag, kind, walkingOrder }) => `${walkingOrder} ${kind} ${tag}`)).toEqual([
    '1 pump P-1',
    '2 terminal FC-0',
    '3 branch BV-1',
    '4 terminal FC-1',
    '5 terminal FC-2',
  ]);
});

it('a station carries what the balance asks of it', () => {
  const byTag = new Map(stationsOfDrawing(loop, balance as BalanceResult).map((station) => [station.tag, station]));
  expect(byTag.get('FC-1')).toMatchObject({
    storey: 'Level 1',
    designFlowLs: 0.2,
    settingTurns: 2.6,
    expectedDropKpa: 7.9,
    valveName: 'Test valve Kvs 2.5',
  });
  expect(byTag.get('BV-1')).toMatchObject({ designFlowLs: 0.5, settingTurns: 3.5 });
  expect(byTag.get('P-1')).toMatchObject({ designFlowLs: 0.6, kvTable: null, settingTurns: null });
});

it('a measuring orifice is a station of its branch, read at the one setting that it has', () => {
  const orifice = { ...branchValve, kind: 'flowStation' as const, id: 'FS-1', tag: 'FS-1', signalKv: 12, lossKv: 20 };
  const stations = stationsOfDrawing({ ...loop, equipment: [...loop.equipment, orifice] }, balance as BalanceResult);
  const found = stations.find(({ tag }) => tag === 'FS-1')!;
  expect(found).toMatchObject({ kind: 'branch', storey: 'Level 1', designFlowLs: 0.5, settingTurns: 1 });
  // (36 · 0.5 / 12)² kPa by the signal's Kv, at 999.6 kg/m³: 2.249 kPa.
  expect(found.expectedDropKpa).toBeCloseTo(2.2491, 3);
  const read = flowFromDrop({ kvTable: found.kvTable, settingTurns: 1, dropKpa: found.expectedDropKpa!, densityKgM3: 999.6 });
  expect(read).toMatchObject({ ok: true, kv: 12 });
  expect(read.ok && read.flowLs).toBeCloseTo(0.5, 6);
});
