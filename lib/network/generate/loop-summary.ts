import { kvAtSetting } from '@/lib/hydraulics/links/balancing-valve';
import { pipeSeries } from '@/lib/hydraulics/pipe-series';
import type { Drawing } from '../drawing';
import { unitLinkId } from '../drawing-to-document';
import { isSeriesId } from '../pipe-choice';
import { readingKpa } from './balancing-valve-choice';
import type { MadeLoop } from './generate-loop';
import type { GenerateOptions } from './scheduled-terminal';
import { LARGE_SERIES } from './size-pipes';

/** What was made, for a person to judge before the drawing is opened. */
export interface LoopSummary {
  terminals: number;
  storeys: number;
  risers: number;
  branches: number;
  pipes: number;
  balancingValves: number;
  pumpFlowLs: number;
  pumpHeadM: number;
  /** Tag of the terminal whose circuit needs the most head. */
  indexTag: string | null;
  /** Lowest and highest flow of a terminal with the settings in place, per cent of design. */
  lowestPercent: number;
  highestPercent: number;
  /** The lowest differential that any balancing valve reads at its design flow. */
  lowestReadingKpa: number;
  /** What the designer should look at, a sentence each. */
  notes: string[];
}

/** The figures of a loop that was generated, and what of it a designer should look at. */
export function loopSummary(made: MadeLoop, options: GenerateOptions): LoopSummary {
  const { drawing, balance, solution } = made;
  const units = drawing.equipment.filter((piece) => piece.kind === 'terminalUnit');
  const flow = new Map(solution.links.map(({ id, flowLs }) => [id, flowLs]));
  const percents = units.map(({ id, designFlowLs }) => (100 * flow.get(unitLinkId(id, 'coil'))!) / designFlowLs!);
  const readings = readingsAtDesign(made);
  const tagOf = new Map(drawing.equipment.map(({ id, tag }) => [id, tag]));
  return {
    terminals: units.length,
    storeys: drawing.storeys.length - 1,
    risers: made.risers,
    branches: made.branches,
    pipes: drawing.pipes.length,
    balancingValves: readings.length,
    pumpFlowLs: balance.pumps[0].flowLs,
    pumpHeadM: balance.pumps[0].requiredHeadM,
    indexTag: tagOf.get(balance.indexTerminal?.split(':')[0] ?? '') ?? null,
    lowestPercent: percents.reduce((a, b) => Math.min(a, b)),
    highestPercent: percents.reduce((a, b) => Math.max(a, b)),
    lowestReadingKpa: readings.reduce((a, b) => Math.min(a, b), Infinity),
    notes: notesOf(made, options, readings),
  };
}

/** What each balancing valve reads at its design flow where it now stands, kPa. */
export function readingsAtDesign({ drawing, balance, solution }: Pick<MadeLoop, 'drawing' | 'balance' | 'solution'>): number[] {
  const designFlow = new Map(balance.valves.map(({ id, flowLs }) => [id, flowLs]));
  return valvesOf(drawing).map(({ id, valve: { kvTable, settingTurns } }) => {
    const last = kvTable.at(-1)!;
    const kv = settingTurns === null ? last.kv : kvAtSetting(kvTable, settingTurns);
    return readingKpa({ ...last, kv }, Math.abs(designFlow.get(id) ?? 0), solution.fluid.densityKgM3);
  });
}

const valvesOf = ({ equipment }: Drawing) =>
  equipment.flatMap((piece) => {
    if (piece.kind === 'balancingValve') return [{ id: piece.id, valve: piece.valve }];
    return piece.kind === 'terminalUnit' && piece.balancingValve
      ? [{ id: unitLinkId(piece.id, 'balancing'), valve: piece.balancingValve }]
      : [];
  });

function notesOf({ balance, otherSeries, overLimit, lockedValves }: MadeLoop, options: GenerateOptions, readings: number[]): string[] {
  const { minReadingKpa, pipeSeries: series, maxVelocityMs, maxGradientPaM } = options;
  const notes = ['The pump’s curve is generic and made for the duty: choose the pump that will be bought.'];
  if (otherSeries.length && isSeriesId(series))
    notes.push(
      `${many(otherSeries.length, 'pipe is', 'pipes are')} too large for ${pipeSeries[series].name}, and of ${pipeSeries[LARGE_SERIES].name} instead.`,
    );
  if (overLimit.length)
    notes.push(
      `${many(overLimit.length, 'pipe has', 'pipes have')} the largest size there is and still more than ${maxVelocityMs} m/s or ${maxGradientPaM} Pa/m: divide the loop.`,
    );
  if (lockedValves)
    notes.push(
      `${many(lockedValves, 'balancing valve is', 'balancing valves are')} locked short of fully open: further open, the flow could not be read at ${minReadingKpa} kPa.`,
    );
  const low = readings.filter((reading) => reading < minReadingKpa * LEAST_PART).length;
  if (low)
    notes.push(
      `${many(low, 'balancing valve reads', 'balancing valves read')} less than ${minReadingKpa} kPa at design flow: choose smaller ones.`,
    );
  const tooLarge = balance.warnings.filter(({ code }) => code === 'valve-too-large').length;
  if (tooLarge)
    notes.push(`${many(tooLarge, 'balancing valve passes', 'balancing valves pass')} too much at the lowest setting: choose smaller ones.`);
  return notes;
}

/** A setting rounded to the handwheel may read a hair less. */
const LEAST_PART = 0.99;

const many = (count: number, one: string, more: string) => (count === 1 ? `One ${one}` : `${count} ${more}`);
