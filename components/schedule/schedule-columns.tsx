import type { ReactNode } from 'react';
import type { StripBand } from '@/lib/commissioning/flow-strip';
import type { PipeRow, PumpRow, ScheduledSetting, SourceRow, TerminalRow, ValveRow } from '@/lib/network/schedule-rows';
import type { Quantity } from '@/lib/units/quantities';
import { valveStateWords } from '../report/valve-state-words';
import { Deviation } from '../ui/deviation';
import { Figure, UnitName } from '../ui/figure';
import type { ScheduleColumn } from './column';

const missing = <span className="text-quiet">–</span>;

const figure = <Row,>(key: string, head: string, quantity: Quantity, value: (row: Row) => number | null): ScheduleColumn<Row> => ({
  key,
  head,
  unit: <UnitName quantity={quantity} />,
  isFigure: true,
  sortBy: value,
  show: (row) => <Figure quantity={quantity} si={value(row)} />,
});

const plain = <Row,>(
  key: string,
  head: string,
  unit: ReactNode,
  decimals: number,
  value: (row: Row) => number | null,
): ScheduleColumn<Row> => ({
  key,
  head,
  unit,
  isFigure: true,
  sortBy: value,
  show: (row) => value(row)?.toFixed(decimals) ?? missing,
});

const text = <Row,>(key: string, head: string, value: (row: Row) => string): ScheduleColumn<Row> => ({
  key,
  head,
  sortBy: value,
  show: value,
});

const ofDesign = <Row extends { percentOfDesign: number | null }>(band: StripBand): ScheduleColumn<Row> => ({
  key: 'percent',
  head: 'Of design',
  unit: '%',
  isFigure: true,
  sortBy: ({ percentOfDesign }) => percentOfDesign,
  show: ({ percentOfDesign: percent }) =>
    percent === null ? (
      missing
    ) : (
      <Deviation percent={percent} verdict={percent < band.lowerPercent ? 'low' : percent > band.upperPercent ? 'high' : 'within'} />
    ),
});

const settings = <Row extends ScheduledSetting>(): ScheduleColumn<Row>[] => [
  text('valve', 'Balancing valve', ({ valveName }) => valveName),
  {
    ...figure<Row>('stands', 'Stands at', 'setting', ({ standsTurns }) => standsTurns),
    show: ({ standsTurns, valveName }) =>
      standsTurns === null ? (
        <span className="text-quiet font-sans">{valveName ? 'open' : '–'}</span>
      ) : (
        <Figure quantity="setting" si={standsTurns} />
      ),
  },
  figure('setting', 'Setting', 'setting', ({ settingTurns }) => settingTurns),
  figure('valveDrop', 'Valve drop', 'pressure', ({ dropKpa }) => dropKpa),
  text('state', 'State', ({ state }) => (state ? valveStateWords[state] : '')),
];

export const terminalColumns = (band: StripBand): ScheduleColumn<TerminalRow>[] => [
  text('storey', 'Storey', ({ storey }) => storey),
  text('room', 'Room', ({ room }) => room),
  figure('load', 'Load', 'power', ({ loadKw }) => loadKw),
  figure('design', 'Design flow', 'flow', ({ designFlowLs }) => designFlowLs),
  figure('flow', 'Flow now', 'flow', ({ flowLs }) => flowLs),
  ofDesign(band),
  ...settings<TerminalRow>(),
  figure('unitDrop', 'Unit drop', 'pressure', ({ unitDropKpa }) => unitDropKpa),
  plain('authority', 'Authority', null, 2, ({ authority }) => authority),
  figure('circuit', 'Circuit drop', 'pressure', ({ circuitDropKpa }) => circuitDropKpa),
];

export const valveColumns = (band: StripBand): ScheduleColumn<ValveRow>[] => [
  text('storey', 'Storey', ({ storey }) => storey),
  figure('design', 'Design flow', 'flow', ({ designFlowLs }) => designFlowLs),
  figure('flow', 'Flow now', 'flow', ({ flowLs }) => flowLs),
  ofDesign(band),
  ...settings<ValveRow>(),
  figure('kv', 'Kv at setting', 'valveCoefficient', ({ kv }) => kv),
];

export const pipeColumns: ScheduleColumn<PipeRow>[] = [
  text('storey', 'Storey', ({ storey }) => storey),
  text('size', 'Size', ({ size }) => size),
  figure('bore', 'Bore', 'bore', ({ boreMm }) => boreMm),
  figure('length', 'Length', 'length', ({ lengthM }) => lengthM),
  figure('design', 'Design flow', 'flow', ({ designFlowLs }) => designFlowLs),
  figure('flow', 'Flow now', 'flow', ({ flowLs }) => flowLs),
  figure('velocity', 'Velocity', 'velocity', ({ velocityMs }) => velocityMs),
  figure('gradient', 'Friction', 'gradient', ({ paPerM }) => paPerM),
  figure('drop', 'Drop', 'pressure', ({ dropKpa }) => dropKpa),
];

export const pumpColumns: ScheduleColumn<PumpRow>[] = [
  text('storey', 'Storey', ({ storey }) => storey),
  figure('flow', 'Flow now', 'flow', ({ flowLs }) => flowLs),
  figure('head', 'Head now', 'head', ({ headM }) => headM),
  figure('design', 'Duty flow', 'flow', ({ designFlowLs }) => designFlowLs),
  figure('required', 'Duty head', 'head', ({ requiredHeadM }) => requiredHeadM),
  plain('speed', 'Duty speed', '% of full', 1, ({ requiredSpeed }) => requiredSpeed && requiredSpeed * 100),
  figure('shaft', 'Duty shaft power', 'power', ({ shaftKw }) => shaftKw),
];

const sourceKindWords: Record<SourceRow['kind'], string> = { chiller: 'chiller', boiler: 'boiler', 'heat-exchanger': 'heat exchanger' };

export const sourceColumns: ScheduleColumn<SourceRow>[] = [
  text('storey', 'Storey', ({ storey }) => storey),
  text('kind', 'Kind', ({ kind }) => sourceKindWords[kind]),
  figure('design', 'Design flow', 'flow', ({ designFlowLs }) => designFlowLs),
  figure('flow', 'Flow now', 'flow', ({ flowLs }) => flowLs),
  plain('percent', 'Of design', '%', 1, ({ percentOfDesign }) => percentOfDesign),
  figure('drop', 'Drop', 'pressure', ({ dropKpa }) => dropKpa),
];
