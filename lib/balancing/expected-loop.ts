import { metresPerKpa } from '@/lib/hydraulics/links/law';
import { prepareNetwork } from '@/lib/hydraulics/prepare';
import { findFlows, type Solution } from '@/lib/hydraulics/solve';
import type { NetworkDocument, PumpLink } from '@/lib/hydraulics/types';
import type { FittedLoop } from './fit-loop';
import { dot } from './fit/gaussian';
import { type LinkAnswers, linkAnswers } from './fit/sensitivities';
import { documentAt, type LoopSettings } from './readings';

/** Drive steps: 0.1 Hz of 50 Hz. */
export const SPEED_STEP = 0.002;
const CENTRING_ROUNDS = 4;

/** The fitted loop solved at some settings. */
export interface ExpectedLoop {
  settings: LoopSettings;
  /** Natural logarithm of flow over design of each terminal asked about. */
  logRatios: Float64Array;
  network: ReturnType<typeof prepareNetwork>;
  solution: Solution;
}

/** Solves a document (fitted, round null) at settings; terminals by document position, all with flow. */
export function expectLoop(document: NetworkDocument, settings: LoopSettings, terminals: number[]): ExpectedLoop {
  const network = prepareNetwork(documentAt(document, settings));
  const solution = findFlows(network);
  const logRatios = Float64Array.from(terminals, (at) => {
    const link = document.links[at];
    const i = network.numberOf[at];
    if (link.kind !== 'terminal') throw new RangeError(`${link.id} is not a terminal`);
    return Math.log(Math.max(i < 0 ? 0 : Math.abs(solution.state.linkFlow[i]), 1e-9) / link.designFlowLs);
  });
  return { settings, logRatios, network, solution };
}

/** As `expectLoop`, at the pump speed (of all running pumps together, at most full) that brings the middle of the ratios to 1. */
export function expectCentred(document: NetworkDocument, settings: LoopSettings, terminals: number[]): ExpectedLoop {
  const pumps = document.links.filter((link): link is PumpLink => link.kind === 'pump' && (settings[link.id] ?? link.speed ?? 1) > 0);
  let here = expectLoop(document, settings, terminals);
  for (let round = 0; round < CENTRING_ROUNDS && pumps.length; round++) {
    const off = meanOf(here.logRatios);
    if (Math.abs(off) < SPEED_STEP) break;
    const speeds = pumps.map(
      (pump) =>
        [pump.id, toStep(Math.min((here.settings[pump.id] ?? pump.speed ?? 1) * Math.exp(-off), Math.max(1, pump.speed ?? 1)))] as const,
    );
    if (speeds.every(([id, speed]) => here.settings[id] === speed)) break;
    here = expectLoop(document, { ...here.settings, ...Object.fromEntries(speeds) }, terminals);
  }
  return here;
}

const toStep = (speed: number) => Number((Math.round(speed / SPEED_STEP) * SPEED_STEP).toPrecision(12));

/** Part of the ratios left out at either end, so that a few that cannot be helped do not pull the rest. */
const TRIMMED = 0.2;

/** Trimmed mean of the logarithms. */
export function meanOf(logRatios: Float64Array): number {
  if (!logRatios.length) return 0;
  const cut = Math.floor(TRIMMED * logRatios.length);
  const kept = logRatios
    .slice()
    .sort()
    .subarray(cut, logRatios.length - cut);
  return kept.reduce((sum, each) => sum + each, 0) / kept.length;
}

/** Flow (and loss, kPa) answers of links at an expected loop to the fit's unknowns, as valves newly set would stand. */
export function answersAt(fitted: FittedLoop, { network, solution }: ExpectedLoop, watched: number[]): LinkAnswers[] {
  return linkAnswers(network, solution, fitted.unknowns, ({ kind }) => kind !== 'setting', watched);
}

/** Direction of a quantity's logarithm in the fit's active unknowns, each in units of its prior deviation. */
export function direction(fitted: FittedLoop, perUnknown: Float64Array, value: number): Float64Array {
  return Float64Array.from(fitted.active, (j) => (value === 0 ? 0 : (perUnknown[j] / value) * fitted.deviations[j]));
}

/** One standard deviation of a quantity with this direction, after the readings. */
export function spreadOf(fitted: FittedLoop, along: Float64Array): number {
  const seen = fitted.posterior.seen(along);
  return Math.sqrt(Math.max(dot(along, along) - dot(seen, seen), 0));
}

export function dropAt({ network, solution }: ExpectedLoop, at: number): number {
  const i = network.numberOf[at];
  return i < 0 ? 0 : solution.state.linkLoss[i] / metresPerKpa(network.fluid.densityKgM3);
}

export function flowAt({ network, solution }: ExpectedLoop, at: number): number {
  const i = network.numberOf[at];
  return i < 0 ? 0 : solution.state.linkFlow[i];
}
