import type { ChosenValve, Drawing } from './drawing';
import { genericValves } from './valve-families';

export type OfferedValve = Pick<ChosenValve, 'name' | 'kvTable' | 'stepTurns'>;

/** The balancing valves that a cell can take: those of the drawing, the catalogue's and the generic ones, each by a name of its own. */
export interface ValveOffer {
  names: readonly string[];
  named: (name: string) => OfferedValve | null;
  /** The name a valve of the drawing goes by: its own, numbered where another table bears the same. */
  nameOf: (valve: ChosenValve) => string;
}

/**
 * All balancing valves of a drawing, and those of the organisation's catalogue; two of one name but different tables are told
 * apart by a number behind the name. Those of the drawing are named first, so that the catalogue renames nothing that is drawn.
 */
export function valveOfferOf(drawing: Drawing, catalogue: readonly OfferedValve[] = []): ValveOffer {
  const byName = new Map<string, OfferedValve>(genericValves.map(({ name, kvTable }) => [name, { name, kvTable }]));
  const nameByTable = new Map<string, string>(genericValves.map((valve) => [keyOf(valve), valve.name]));
  const others: string[] = [];
  const offer = (valve: OfferedValve) => {
    if (valve.name === '' || nameByTable.has(keyOf(valve))) return;
    let name = valve.name;
    for (let count = 2; byName.has(name); count++) name = `${valve.name} (${count})`;
    byName.set(name, valve);
    nameByTable.set(keyOf(valve), name);
    others.push(name);
  };
  for (const piece of drawing.equipment) {
    const valve = piece.kind === 'terminalUnit' ? piece.balancingValve : piece.kind === 'balancingValve' ? piece.valve : null;
    if (valve) offer(valve);
  }
  catalogue.forEach(offer);
  return {
    names: [...others, ...genericValves.map(({ name }) => name)],
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
