import type { GenerateOptions, ScheduledTerminal } from './scheduled-terminal';
import { storeysLowestFirst } from './storey-order';

/** What one riser feeds on one storey: branches that leave the riser side by side, their terminals from near to far. */
export interface Floor {
  /** Counted from the lowest storey of the building, 0. */
  storey: number;
  branches: ScheduledTerminal[][];
}

export interface Riser {
  name: string;
  /** The lowest first. */
  floors: Floor[];
}

export interface Building {
  /** Names, the lowest first. */
  storeys: string[];
  /** As the schedule first names them, the nearest to the pump first. */
  risers: Riser[];
}

/** Which terminals stand on which branch of which riser. Terminals keep the order of the schedule, which is taken as near to far. */
export function buildingOf(terminals: ScheduledTerminal[], { mostOnBranch }: Pick<GenerateOptions, 'mostOnBranch'>): Building {
  const storeys = storeysLowestFirst(terminals.map(({ storey }) => storey));
  const storeyNumber = new Map(storeys.map((name, number) => [name, number]));
  const byRiser = new Map<string, Map<number, ScheduledTerminal[]>>();
  for (const terminal of terminals) {
    const floors = byRiser.get(terminal.riser) ?? new Map<number, ScheduledTerminal[]>();
    byRiser.set(terminal.riser, floors);
    const storey = storeyNumber.get(terminal.storey)!;
    const units = floors.get(storey);
    if (units) units.push(terminal);
    else floors.set(storey, [terminal]);
  }
  const risers = [...byRiser].map(([name, floors]) => ({
    name,
    floors: [...floors].sort(([a], [b]) => a - b).map(([storey, units]) => ({ storey, branches: evenly(units, mostOnBranch) })),
  }));
  return { storeys, risers };
}

/** As few parts as keep each to the most, their lengths one apart at most. */
function evenly<T>(items: T[], most: number): T[][] {
  const parts = Math.ceil(items.length / most);
  return Array.from({ length: parts }, (_, k) =>
    items.slice(Math.round((k * items.length) / parts), Math.round(((k + 1) * items.length) / parts)),
  );
}

export const flowOf = (terminals: ScheduledTerminal[]): number => terminals.reduce((sum, { designFlowLs }) => sum + designFlowLs, 0);
export const flowOfRiser = ({ floors }: Riser): number => flowOf(floors.flatMap(({ branches }) => branches.flat()));
