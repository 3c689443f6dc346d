import { z } from 'zod';
import { valveStateNames } from './schedule-words';
import type { ChosenValve, Equipment } from './drawing';
import { yesOrNo, type RowOf, type ScheduleColumn } from './schedule-column';
import type { ScheduledSetting } from './schedule-rows';

type EquipmentRow = RowOf<Equipment> & { storey: string };

/** The tag, which names the row. Two pieces may share one only until the fault is mended on the Drawing. */
export const tagColumn = <Row extends EquipmentRow>(head: string): ScheduleColumn<Row> => ({
  key: 'tag',
  head,
  kind: 'text',
  longest: 40,
  widthRem: 9,
  read: ({ tag }) => tag,
  write: (item, value) => (value ? { ...item, tag: String(value) } : { refused: 'Every row needs a tag.' }),
});

/** Follows from where the piece stands on the drawing. */
export const storeyColumn = <Row extends RowOf<unknown> & { storey: string }>(): ScheduleColumn<Row> => ({
  key: 'storey',
  head: 'Storey',
  kind: 'text',
  widthRem: 8,
  read: ({ storey }) => storey || null,
});

export const flowNow = <Row extends RowOf<unknown> & { flowLs: number | null }>(total?: 'sum'): ScheduleColumn<Row> => ({
  key: 'flow',
  head: 'Flow now',
  kind: 'quantity',
  quantity: 'flow',
  total,
  read: ({ flowLs }) => flowLs,
});

export const ofDesign = <Row extends RowOf<unknown> & { percentOfDesign: number | null }>(): ScheduleColumn<Row> => ({
  key: 'percent',
  head: 'Of design',
  kind: 'number',
  unit: '%',
  decimals: 1,
  total: 'mean',
  read: ({ percentOfDesign }) => percentOfDesign,
});

/** Per cent of full of what is stored as a fraction. */
export const percentRange = z.number().min(0).max(100);

const NO_VALVE = 'none';
const noValve: ChosenValve = { name: '', kvTable: [], settingTurns: null, isLocked: false };

interface ValveOf<Row extends RowOf<unknown>> {
  /** The row's balancing valve; undefined where its kind has none to choose. */
  get: (item: Row['item']) => ChosenValve | null | undefined;
  set: (item: Row['item'], valve: ChosenValve | null) => Row['item'];
  /** A terminal unit may go without. */
  mayLack: boolean;
}

/** Which balancing valve, where it stands, whether it stays so, and what the balance asks of it. */
export function valveColumns<Row extends RowOf<unknown> & ScheduledSetting>({ get, set, mayLack }: ValveOf<Row>): ScheduleColumn<Row>[] {
  const none = { refused: 'There is no balancing valve here; choose one first.' };
  return [
    {
      key: 'valve',
      head: 'Balancing valve',
      kind: 'choice',
      widthRem: 14,
      read: ({ item, valveName }) => valveName || (mayLack && get(item) === null ? NO_VALVE : null),
      options: (item, { valves }) => {
        if (get(item) === undefined) return [];
        const names = valves.names.map((name): [string, string] => [name, name]);
        return mayLack ? [[NO_VALVE, 'none'], ...names] : names;
      },
      write: (item, value, { valves }) => {
        if (value === NO_VALVE && mayLack) return set(item, null);
        const before = get(item);
        // The same valve again stays where it stands.
        if (before && valves.nameOf(before) === value) return item;
        const chosen = valves.named(String(value));
        if (!chosen) return { refused: `There is no valve “${String(value)}”.` };
        const { name, kvTable, stepTurns } = chosen;
        return set(item, { ...(before ?? noValve), name, kvTable, settingTurns: null, stepTurns });
      },
    },
    {
      key: 'stands',
      head: 'Stands at',
      kind: 'quantity',
      quantity: 'setting',
      read: ({ standsTurns }) => standsTurns,
      emptyWord: ({ item }) => (get(item) ? 'open' : ''),
      write: (item, value) => {
        const valve = get(item);
        if (!valve) return none;
        const [first, last] = [valve.kvTable[0]?.setting, valve.kvTable.at(-1)?.setting];
        if (value !== null && (first === undefined || last === undefined || Number(value) < first || Number(value) > last)) {
          return { refused: first === undefined ? 'Its table of settings is empty.' : `From ${first} to ${last} turns, or open.` };
        }
        return set(item, { ...valve, settingTurns: value === null ? null : Number(value) });
      },
    },
    {
      key: 'locked',
      head: 'Stays so',
      kind: 'choice',
      isExtra: true,
      read: ({ item }) => lockedWord(get(item)),
      options: (item) => (get(item) ? yesOrNo : []),
      write: (item, value) => {
        const valve = get(item);
        return valve ? set(item, { ...valve, isLocked: value === 'yes' }) : none;
      },
    },
    { key: 'setting', head: 'Setting', kind: 'quantity', quantity: 'setting', read: ({ settingTurns }) => settingTurns },
    { key: 'kv', head: 'Kv at setting', kind: 'quantity', quantity: 'valveCoefficient', isExtra: true, read: ({ kv }) => kv },
    { key: 'valveDrop', head: 'Valve drop', kind: 'quantity', quantity: 'pressure', read: ({ dropKpa }) => dropKpa },
    { key: 'state', head: 'State', kind: 'text', widthRem: 11, read: ({ state }) => (state ? valveStateNames[state] : null) },
  ];
}

const lockedWord = (valve: ChosenValve | null | undefined) => (valve ? (valve.isLocked ? 'yes' : 'no') : null);
