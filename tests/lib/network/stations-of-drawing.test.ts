import { expect, it } from 'vitest';
import type { BalanceResult } from '@/lib/hydraulics/types';
import type { Drawing } from '@/lib/network/drawing';
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

const balance: Pick<BalanceResult, 'valves' | 'pumps'> = {
  valves: [
    { id: 'FC-1:balancing', flowLs: 0.2, dropKpa: 7.9, kv: 2.56, setting: 2.6, state: 'throttled', wantedKv: 2.56 },
    { id: 'BV-1', flowLs: 0.5, dropKpa: 4, kv: 9, setting: 3.5, state: 'throttled', wantedKv: 9 },
  ],
  pumps: [{ id: 'P-1', flowLs: 0.6, requiredHeadM: 8, speed: 0.9, shaftKw: null }],
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
