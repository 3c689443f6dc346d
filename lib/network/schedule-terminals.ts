import { terminalUnitSchema, type characteristics, type TerminalUnit } from './drawing';
import type { ScheduleColumn, ScheduleTable } from './schedule-column';
import type { TerminalRow } from './schedule-rows';
import { flowNow, ofDesign, percentRange, storeyColumn, tagColumn, valveColumns } from './schedule-shared-columns';
import { characteristicOptions } from './schedule-words';

const { loadKw, designFlowLs, coilDropKpa, strainerKv, controlValve } = terminalUnitSchema.shape;
const { kvs } = controlValve.unwrap().shape;

type ControlValve = NonNullable<TerminalUnit['controlValve']>;
const NO_CONTROL = 'none';
const newControl: ControlValve = { kvs: null, characteristic: 'equalPercentage', opening: 1 };
const withControl = (item: TerminalUnit, change: Partial<ControlValve>): TerminalUnit => ({
  ...item,
  controlValve: { ...(item.controlValve ?? newControl), ...change },
});

const control: ScheduleColumn<TerminalRow>[] = [
  {
    key: 'characteristic',
    head: 'Control valve',
    kind: 'choice',
    widthRem: 10,
    read: ({ item }) => item.controlValve?.characteristic ?? NO_CONTROL,
    options: () => [[NO_CONTROL, 'none'], ...characteristicOptions],
    write: (item, value) =>
      value === NO_CONTROL
        ? { ...item, controlValve: null }
        : withControl(item, { characteristic: value as (typeof characteristics)[number] }),
  },
  {
    key: 'kvs',
    head: 'Control Kvs',
    kind: 'quantity',
    quantity: 'valveCoefficient',
    range: kvs,
    read: ({ item }) => item.controlValve?.kvs ?? null,
    // A Kvs that is typed where there is no control valve fits one; nothing typed fits none.
    write: (item, value) => (value === null && !item.controlValve ? item : withControl(item, { kvs: value as number | null })),
  },
  {
    key: 'opening',
    head: 'Opening',
    kind: 'number',
    unit: '%',
    decimals: 0,
    range: percentRange,
    isExtra: true,
    read: ({ item }) => (item.controlValve ? item.controlValve.opening * 100 : null),
    write: (item, value) =>
      item.controlValve
        ? withControl(item, { opening: Number(value) / 100 })
        : { refused: 'There is no control valve here; choose one first.' },
  },
];

export const terminalTable: ScheduleTable<TerminalRow> = {
  key: 'terminals',
  name: 'Terminals',
  of: 'equipment',
  columns: [
    tagColumn('Terminal'),
    storeyColumn(),
    {
      key: 'room',
      head: 'Room',
      kind: 'text',
      widthRem: 9,
      read: ({ item }) => item.room || null,
      write: (item, value) => ({ ...item, room: String(value ?? '') }),
    },
    {
      key: 'load',
      head: 'Load',
      kind: 'quantity',
      quantity: 'power',
      range: loadKw,
      total: 'sum',
      read: ({ item }) => item.loadKw,
      write: (item, value) => ({ ...item, loadKw: value as number | null }),
    },
    {
      key: 'design',
      head: 'Design flow',
      kind: 'quantity',
      quantity: 'flow',
      range: designFlowLs,
      total: 'sum',
      read: ({ item }) => item.designFlowLs,
      write: (item, value) => ({ ...item, designFlowLs: value as number | null }),
    },
    {
      key: 'coilDrop',
      head: 'Coil drop',
      kind: 'quantity',
      quantity: 'pressure',
      range: coilDropKpa,
      read: ({ item }) => item.coilDropKpa,
      write: (item, value) => ({ ...item, coilDropKpa: value as number | null }),
    },
    flowNow('sum'),
    ofDesign(),
    ...control,
    {
      key: 'strainer',
      head: 'Strainer',
      kind: 'quantity',
      quantity: 'valveCoefficient',
      range: strainerKv,
      isExtra: true,
      read: ({ item }) => item.strainerKv,
      emptyWord: () => 'none',
      write: (item, value) => ({ ...item, strainerKv: value as number | null }),
    },
    ...valveColumns<TerminalRow>({
      get: ({ balancingValve }) => balancingValve,
      set: (item, balancingValve) => ({ ...item, balancingValve }),
      mayLack: true,
    }),
    { key: 'unitDrop', head: 'Unit drop', kind: 'quantity', quantity: 'pressure', read: ({ unitDropKpa }) => unitDropKpa },
    { key: 'authority', head: 'Authority', kind: 'number', unit: null, decimals: 2, total: 'least', read: ({ authority }) => authority },
    {
      key: 'circuit',
      head: 'Circuit drop',
      kind: 'quantity',
      quantity: 'pressure',
      total: 'most',
      read: ({ circuitDropKpa }) => circuitDropKpa,
    },
  ],
};
