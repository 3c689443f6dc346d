import { answersAt, direction, expectLoop } from './expected-loop';
import type { FittedLoop } from './fit-loop';
import { fittedDocument } from './fit/fitted-document';
import { dot } from './fit/gaussian';
import { ReadingScale } from './fit/reading-scale';
import type { LoopReading } from './readings';

export interface TellingReading {
  link: string;
  quantity: LoopReading['quantity'];
  /** Share of the summed variance of all terminals' flows that it would be expected to take away. */
  varianceReduction: number;
  expected: number;
}

export interface UnknownFlow {
  link: string;
  /** One standard deviation of its flow after all readings. */
  spreadPercent: number;
}

export interface WhatIsUnknown {
  /** Terminals whose flow is known worse than the limit asked for. */
  terminals: UnknownFlow[];
  /** The one further reading that would tell most, and the next best; empty where no reading can tell more. */
  readings: TellingReading[];
}

const MOST_LISTED = 5;
/** A flow meter of its own, without the valve's chart: 2 % of the flow (clamp-on meters claim 1 to 3 %). */
const DIRECT_FLOW_RELATIVE = 0.02;

/**
 * What the readings leave unknown, and the reading with the largest expected variance reduction over all terminals' flows: another drop across a
 * balancing valve or pump, or a flow measured directly. On the fit's linear model a reading a with error variance 1 takes cov(t, a)² / (var(a) + 1)
 * from each flow t.
 */
export function mostTellingReading(fitted: FittedLoop, limitPercent = 3): WhatIsUnknown {
  const { document, unknowns, values, rounds, posterior } = fitted;
  const stands = rounds[rounds.length - 1]?.settings ?? {};
  const loop = expectLoop(fittedDocument(document, unknowns, values, null), stands, []);
  const watched = document.links.flatMap((link, at) => (['terminal', 'balancingValve', 'pump'].includes(link.kind) ? [at] : []));
  const answers = answersAt(fitted, loop, watched).map((answer, w) => ({ ...answer, link: document.links[watched[w]] }));

  const flows = answers.flatMap(({ link, flowLs, flowPerUnknown }) => {
    if (link.kind !== 'terminal' || Math.abs(flowLs) < 1e-6) return [];
    const along = direction(fitted, flowPerUnknown, flowLs);
    const seen = posterior.seen(along);
    return [{ link: link.id, along, seen, variance: Math.max(dot(along, along) - dot(seen, seen), 0) }];
  });
  const total = flows.reduce((sum, flow) => sum + flow.variance, 0);

  const readings = answers.flatMap(({ link, flowLs, dropKpa, flowPerUnknown, dropPerUnknown }): TellingReading[] => {
    const asFlow = link.kind === 'terminal';
    const value = asFlow ? Math.abs(flowLs) : Math.abs(dropKpa);
    if (value < 1e-6 || total <= 0) return [];
    const quantity = asFlow ? 'flowLs' : 'dropKpa';
    const scale = new ReadingScale({
      link: link.id,
      quantity,
      value,
      meter: '',
      ...(asFlow ? { flowRelative: DIRECT_FLOW_RELATIVE } : {}),
    });
    const along = direction(fitted, asFlow ? flowPerUnknown : dropPerUnknown, 1).map(
      (each) => each * scale.slope(value) * Math.sign(asFlow ? flowLs : dropKpa),
    );
    const seen = posterior.seen(along);
    const variance = Math.max(dot(along, along) - dot(seen, seen), 0);
    const taken = flows.reduce((sum, flow) => sum + (dot(flow.along, along) - dot(flow.seen, seen)) ** 2 / (variance + 1), 0);
    return [{ link: link.id, quantity, varianceReduction: taken / total, expected: value }];
  });
  readings.sort((a, b) => b.varianceReduction - a.varianceReduction);
  const unknown = flows
    .map(({ link, variance }) => ({ link, spreadPercent: 100 * Math.sqrt(variance) }))
    .filter((flow) => flow.spreadPercent > limitPercent);
  return { terminals: unknown.sort((a, b) => b.spreadPercent - a.spreadPercent), readings: readings.slice(0, MOST_LISTED) };
}
