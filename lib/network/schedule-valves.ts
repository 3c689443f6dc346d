import { controlValveSchema, dpControllerSchema, flowLimiterSchema, type characteristics } from './drawing';
import { kindNames } from './fault';
import { yesOrNo, type CellValue, type Refusal, type ScheduleTable } from './schedule-column';
import type { ScheduledValve, ValveRow } from './schedule-rows';
import { flowNow, ofDesign, percentRange, storeyColumn, tagColumn, valveColumns } from './schedule-shared-columns';
import { characteristicOptions } from './schedule-words';

/** One that holds a set point or limits the flow has figures of its own; the others refuse them. */
const hasNo = (item: ScheduledValve, what: string): Refusal => ({
  refused: `${what} is no figure of a ${kindNames[item.kind].toLowerCase()}.`,
});

function kvOf(item: ScheduledValve): number | null {
  if (item.kind === 'controlValve' || item.kind === 'dpController') return item.kvs;
  return 'kv' in item ? item.kv : null;
}

function withKv(item: ScheduledValve, value: CellValue): ScheduledValve | Refusal {
  const kv = value as number | null;
  if (item.kind === 'controlValve' || item.kind === 'dpController') return { ...item, kvs: kv };
  if (item.kind === 'balancingValve' || item.kind === 'flowLimiter') return hasNo(item, 'Kvs');
  return { ...item, kv };
}

export const valveTable: ScheduleTable<ValveRow> = {
  key: 'valves',
  name: 'Valves',
  of: 'equipment',
  columns: [
    tagColumn('Valve'),
    { key: 'kind', head: 'Kind', kind: 'text', widthRem: 11, read: ({ item }) => kindNames[item.kind] },
    storeyColumn(),
    { key: 'design', head: 'Design flow', kind: 'quantity', quantity: 'flow', read: ({ designFlowLs }) => designFlowLs },
    flowNow(),
    ofDesign(),
    {
      key: 'kvs',
      head: 'Kvs',
      kind: 'quantity',
      quantity: 'valveCoefficient',
      range: controlValveSchema.shape.kvs,
      read: ({ item }) => kvOf(item),
      write: withKv,
    },
    {
      key: 'characteristic',
      head: 'Characteristic',
      kind: 'choice',
      widthRem: 10,
      isExtra: true,
      read: ({ item }) => (item.kind === 'controlValve' ? item.characteristic : null),
      options: ({ kind }) => (kind === 'controlValve' ? characteristicOptions : []),
      write: (item, value) =>
        item.kind === 'controlValve'
          ? { ...item, characteristic: value as (typeof characteristics)[number] }
          : hasNo(item, 'The characteristic'),
    },
    {
      key: 'opening',
      head: 'Opening',
      kind: 'number',
      unit: '%',
      decimals: 0,
      range: percentRange,
      read: ({ item }) => (item.kind === 'controlValve' ? item.opening * 100 : null),
      write: (item, value) => (item.kind === 'controlValve' ? { ...item, opening: Number(value) / 100 } : hasNo(item, 'The opening')),
    },
    {
      key: 'closed',
      head: 'Closed',
      kind: 'choice',
      read: ({ item }) => (item.kind === 'isolatingValve' ? (item.isClosed ? 'yes' : 'no') : null),
      options: ({ kind }) => (kind === 'isolatingValve' ? yesOrNo : []),
      write: (item, value) => (item.kind === 'isolatingValve' ? { ...item, isClosed: value === 'yes' } : hasNo(item, 'Closed')),
    },
    {
      key: 'setpoint',
      head: 'Set point',
      kind: 'quantity',
      quantity: 'pressure',
      range: dpControllerSchema.shape.setpointKpa,
      read: ({ item }) => (item.kind === 'dpController' ? item.setpointKpa : null),
      write: (item, value) =>
        item.kind === 'dpController' ? { ...item, setpointKpa: value as number | null } : hasNo(item, 'The set point'),
    },
    {
      key: 'limit',
      head: 'Flow limit',
      kind: 'quantity',
      quantity: 'flow',
      range: flowLimiterSchema.shape.limitLs,
      read: ({ item }) => (item.kind === 'flowLimiter' ? item.limitLs : null),
      write: (item, value) => (item.kind === 'flowLimiter' ? { ...item, limitLs: value as number | null } : hasNo(item, 'The flow limit')),
    },
    {
      key: 'minDrop',
      head: 'Least drop',
      kind: 'quantity',
      quantity: 'pressure',
      range: flowLimiterSchema.shape.minDropKpa,
      isExtra: true,
      read: ({ item }) => (item.kind === 'flowLimiter' ? item.minDropKpa : null),
      write: (item, value) =>
        item.kind === 'flowLimiter' ? { ...item, minDropKpa: value as number | null } : hasNo(item, 'The least drop'),
    },
    { key: 'dropNow', head: 'Drop now', kind: 'quantity', quantity: 'pressure', total: 'most', read: ({ dropNowKpa }) => dropNowKpa },
    ...valveColumns<ValveRow>({
      get: (item) => (item.kind === 'balancingValve' ? item.valve : undefined),
      set: (item, valve) => (item.kind === 'balancingValve' && valve ? { ...item, valve } : item),
      mayLack: false,
    }),
  ],
};
