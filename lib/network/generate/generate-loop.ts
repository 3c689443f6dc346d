import { fluidProperties } from '@/lib/hydraulics/fluids';
import { solve } from '@/lib/hydraulics/solve';
import type { BalanceResult, SolveResult } from '@/lib/hydraulics/types';
import { isSeriesId } from '../pipe-choice';
import type { Drawing, DrawingFluid } from '../drawing';
import type { ValveSize } from './balancing-valve-choice';
import { buildingOf } from './building';
import { drawLoop } from './draw-loop';
import type { GenerateOptions, ScheduledTerminal } from './scheduled-terminal';
import { withHigherAuthority } from './higher-authority';
import { scheduleFaults, type ScheduleFault } from './schedule-faults';
import { setValves } from './set-valves';
import { sizePipes } from './size-pipes';
import { meanFluid, solvableDocument } from './solvable-document';

/** What of a loop is not in its schedule. */
export interface LoopMake {
  service: 'chilled' | 'hot';
  fluid: DrawingFluid;
  /** Balancing valves to choose from, one or more, rising in Kv. */
  valveSizes: readonly ValveSize[];
}

export interface MadeLoop {
  ok: true;
  drawing: Drawing;
  balance: BalanceResult;
  /** As the valves stand, their settings rounded to the handwheel. */
  solution: SolveResult;
  risers: number;
  branches: number;
  otherSeries: string[];
  overLimit: string[];
  lockedValves: number;
}

/**
 * The drawing of a loop from the schedule of its terminals: storeys, risers and branches laid out, pipes sized within the limits, valves chosen to read at least
 * `minReadingKpa` at design flow (kPa), all of them set, and a generic pump for the duty found. It is a drawing like any other afterwards. Quantities are SI as
 * named; up to `MAX_SCHEDULED_TERMINALS` rows whose fields `scheduledTerminalSchema` has checked. Answers what is wrong with the schedule, row by row.
 */
export async function generateLoop(
  terminals: ScheduledTerminal[],
  options: GenerateOptions,
  { service, fluid, valveSizes }: LoopMake,
): Promise<MadeLoop | { ok: false; faults: ScheduleFault[] }> {
  const faults = scheduleFaults(terminals, options);
  const water = fluidProperties(meanFluid(fluid));
  if (!water.ok) faults.push({ path: 'fluid', message: water.error.message });
  if (faults.length || !water.ok || !isSeriesId(options.pipeSeries)) return { ok: false, faults };

  const { densityKgM3 } = water.properties;
  const { minReadingKpa, pipeSeries, maxGradientPaM, maxVelocityMs } = options;
  const building = buildingOf(terminals, options);
  const { sheet, storeys } = await drawLoop(building, { options, service, valves: { sizes: valveSizes, minReadingKpa, densityKgM3 } });
  const drawn: Drawing = {
    format: 'drawing/1',
    fluid,
    pumpExcess: 'speed',
    pipeLimits: [{ upToBoreMm: null, maxPaPerM: maxGradientPaM, maxVelocityMs }],
    storeys,
    equipment: sheet.equipment,
    pipes: sheet.pipes,
  };
  const piped = sizePipes(drawn, sheet.fittings, { series: pipeSeries, maxPaPerM: maxGradientPaM, maxVelocityMs });
  const reading = { minReadingKpa, densityKgM3 };
  const first = setValves(piped.drawing, reading);
  const set = 'unfit' in first ? first : setValves(withHigherAuthority(piped.drawing, first.balance, reading), reading);
  if ('unfit' in set) return { ok: false, faults: [{ path: 'terminals', message: set.unfit }] };
  const { drawing, balance, locked } = set;
  return {
    ok: true,
    drawing,
    balance,
    solution: solve(solvableDocument(drawing)),
    risers: building.risers.length,
    branches: building.risers.reduce((sum, { floors }) => sum + floors.reduce((count, floor) => count + floor.branches.length, 0), 0),
    otherSeries: piped.otherSeries,
    overLimit: piped.overLimit,
    lockedValves: locked,
  };
}
