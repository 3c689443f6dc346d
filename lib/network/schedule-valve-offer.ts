import type { ChosenValve, Drawing } from './drawing';
import { genericValves } from './valve-families';

type OfferedValve = Pick<ChosenValve, 'name' | 'kvTable' | 'stepTurns'>;

/** The balancing valves that a cell can take: those of the drawing and the generic ones, each by a name of its own. */
export interface ValveOffer {
  names: readonly string[];
  named: (name: string) => OfferedValve | null;
  /** The name a valve of the drawing goes by: its own, numbered where another table bears the same. */
  nameOf: (valve: ChosenValve) => string;
}

/** All balancing valves of a drawing; two of one name but different tables are told apart by a number behind the name. */
export function valveOfferOf(drawing: Drawing): ValveOffer {
  const byName = new Map<string, OfferedValve>(genericValves.map(({ name, kvTable }) => [name, { name, kvTable }]));
  const nameByTable = new Map<string, string>(genericValves.map((valve) => [keyOf(valve), valve.name]));
  const own: string[] = [];
  for (const piece of drawing.equipment) {
    const valve = piece.kind === 'terminalUnit' ? piece.balancingValve : piece.kind === 'balancingValve' ? piece.valve : null;
    if (!valve || valve.name === '' || nameByTable.has(keyOf(valve))) continue;
    let name = valve.name;
    for (let count = 2; byName.has(name); count++) name = `${valve.name} (${count})`;
    byName.set(name, valve);
    nameByTable.set(keyOf(valve), name);
    own.push(name);
  }
  return {
    names: [...own, ...genericValves.map(({ name }) => name)],
    named: (name) => byName.get(name) ?? null,
    nameOf: (valve) => nameByTable.get(keyOf(valve)) ?? valve.name,
  };
}

/** Where nothing is edited there is nothing to offer. */
export const noValveOffer: ValveOffer = { names: [], named: () => null, nameOf: ({ name }) => name };

const tableKeys = new WeakMap<ChosenValve['kvTable'], string>();

function keyOf({ name, kvTable }: OfferedValve): string {
  let key = tableKeys.get(kvTable);
  if (key === undefined) {
    key = JSON.stringify(kvTable.map(({ setting, kv, measuringKv }) => [setting, kv, measuringKv]));
    tableKeys.set(kvTable, key);
  }
  return `${name}\n${key}`;
}
