import type { NetworkDocument } from '@/lib/hydraulics/types';
import { answersAt, direction, dropAt, type ExpectedLoop, expectCentred, flowAt, spreadOf } from './expected-loop';
import type { FittedLoop } from './fit-loop';
import { fittedDocument } from './fit/fitted-document';
import { balanceWithin } from './reachable-targets';
import { type LoopSettings, settingIn } from './readings';
import { expectedOutside, touchUp, WORTH_A_CHANGE } from './touch-up';

/** A valve (turns) or pump (speed ratio) as it stands and as it should, with what will be seen there; spreads are one standard deviation. */
export interface PredictedSetting {
  link: string;
  kind: 'balancingValve' | 'pump';
  from: number;
  setting: number;
  isChanged: boolean;
  expectedFlowLs: number;
  expectedDropKpa: number;
  flowSpreadPercent: number;
  dropSpreadPercent: number;
}

export interface PredictedTerminal {
  link: string;
  flowLs: number;
  percentOfDesign: number;
  spreadPercent: number;
}

export interface Prediction {
  settings: PredictedSetting[];
  terminals: PredictedTerminal[];
  /** Terminals that cannot have their design flow as they are, and what part of it they can have. */
  heldBack: { link: string; reachablePercent: number }[];
  /** Expected number of the other terminals outside tolerance. */
  expectedOutside: number;
}

/** More expected terminals out of tolerance than this part, and the whole loop is set anew without a look at touching it up. */
const ANEW = 0.5;
const REACHED = 0.97;

/**
 * All settings and the pump speed at once, from the fitted loop: as proportional balancing would end on it, or, where most of it is within
 * tolerance (a part of design flow, default 0.05), the fewest further changes. Settings are rounded to the valve's
 * step; a valve that does not seem to stand where it was noted is to be set again.
 */
export function predictSettings(fitted: FittedLoop, tolerance = 0.05): Prediction {
  const document = fittedDocument(fitted.document, fitted.unknowns, fitted.values, null);
  const stands = fitted.rounds[fitted.rounds.length - 1]?.settings ?? {};
  const blocked = new Set(fitted.faults.flatMap(({ cause, link }) => (cause === 'blocked' ? [link] : [])));
  const suspected = new Set(document.links.flatMap((link) => (link.kind === 'terminal' && blocked.has(link.id) ? [link.id] : [])));
  const balanced = balanceWithin(document, suspected);
  const heldBack = [...balanced.reachable]
    .filter(([, part]) => part < REACHED)
    .map(([link, part]) => ({ link, reachablePercent: part < 0.01 ? 0 : 100 * part }));
  const excepted = new Set(heldBack.map(({ link }) => link));
  const terminals = document.links.flatMap((link, at) =>
    link.kind === 'terminal' && link.closed !== true && !excepted.has(link.id) ? [at] : [],
  );

  const asIs = expectCentred(document, stands, terminals);
  const spreads = ratioSpreads(fitted, asIs, terminals);
  const anew = () =>
    touchUp(document, expectCentred(document, { ...stands, ...balanced.settings }, terminals), terminals, spreads, tolerance);
  let expected: ExpectedLoop;
  if (expectedOutside(asIs.logRatios, spreads, tolerance) > ANEW * terminals.length) {
    expected = anew();
  } else {
    const price = (loop: ExpectedLoop) =>
      expectedOutside(loop.logRatios, spreads, tolerance) + WORTH_A_CHANGE * changes(document, stands, loop.settings);
    expected = [touchUp(document, asIs, terminals, spreads, tolerance), anew()].reduce((a, b) => (price(b) < price(a) ? b : a));
  }
  return {
    settings: predictedSettings(fitted, document, expected, stands),
    terminals: predictedTerminals(fitted, document, expected),
    heldBack,
    expectedOutside: expectedOutside(expected.logRatios, ratioSpreads(fitted, expected, terminals), tolerance),
  };
}

function ratioSpreads(fitted: FittedLoop, expected: ExpectedLoop, terminals: number[]): Float64Array {
  const answers = answersAt(fitted, expected, terminals);
  return Float64Array.from(answers, ({ flowLs, flowPerUnknown }) => spreadOf(fitted, direction(fitted, flowPerUnknown, flowLs)));
}

function predictedSettings(
  fitted: FittedLoop,
  document: NetworkDocument,
  expected: ExpectedLoop,
  stands: LoopSettings,
): PredictedSetting[] {
  const watched = document.links.flatMap((link, at) => (link.kind === 'balancingValve' || link.kind === 'pump' ? [at] : []));
  const answers = answersAt(fitted, expected, watched);
  const misSet = misSetNow(fitted);
  const meterOf = new Map(fitted.readings.map(({ reading }) => [reading.link, reading.meter]));
  return watched.map((at, w): PredictedSetting => {
    const link = document.links[at];
    if (link.kind !== 'balancingValve' && link.kind !== 'pump') throw new RangeError(`${link.id} has no setting`);
    const from = link.kind === 'pump' ? (stands[link.id] ?? link.speed ?? 1) : settingIn(stands, link);
    const setting = expected.settings[link.id] ?? from;
    const { flowLs, dropKpa, flowPerUnknown, dropPerUnknown } = answers[w];
    const meter = fitted.unknowns.findIndex(({ kind, id }) => kind === 'meter' && id === meterOf.get(link.id));
    const alongDrop = direction(fitted, dropPerUnknown, dropKpa);
    const active = fitted.active.indexOf(meter);
    if (active >= 0) alongDrop[active] = 2 * fitted.deviations[meter];
    return {
      link: link.id,
      kind: link.kind,
      from,
      setting,
      isChanged: Math.abs(setting - from) > 1e-9 || misSet.has(link.id),
      expectedFlowLs: flowAt(expected, at),
      expectedDropKpa: Math.abs(dropAt(expected, at)) * Math.exp(meter >= 0 ? 2 * fitted.values[meter] : 0),
      flowSpreadPercent: 100 * spreadOf(fitted, direction(fitted, flowPerUnknown, flowLs)),
      dropSpreadPercent: 100 * spreadOf(fitted, alongDrop),
    };
  });
}

/** Valves that do not seem to stand where they were noted: they are set again even to the same setting. */
function misSetNow({ accepted, unknowns, rounds }: FittedLoop): Set<string> {
  const acting = accepted.filter(
    ({ cause, unknown }) => cause === 'mis-set' && unknown !== null && unknowns[unknown].rounds[rounds.length - 1],
  );
  return new Set(acting.map(({ unknown }) => unknowns[unknown!].id));
}

const changes = (document: NetworkDocument, before: LoopSettings, after: LoopSettings) =>
  document.links.filter((link) => link.kind === 'balancingValve' && settingIn(before, link) !== settingIn(after, link)).length;

function predictedTerminals(fitted: FittedLoop, document: NetworkDocument, expected: ExpectedLoop): PredictedTerminal[] {
  const watched = document.links.flatMap((link, at) => (link.kind === 'terminal' ? [at] : []));
  const spreads = ratioSpreads(fitted, expected, watched);
  return watched.flatMap((at, w): PredictedTerminal[] => {
    const link = document.links[at];
    if (link.kind !== 'terminal') return [];
    const flowLs = flowAt(expected, at);
    return [{ link: link.id, flowLs, percentOfDesign: (100 * flowLs) / link.designFlowLs, spreadPercent: 100 * spreads[w] }];
  });
}
