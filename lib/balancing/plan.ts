import type { NetworkDocument } from '@/lib/hydraulics/types';
import { diagnose, type Diagnosis } from './diagnose';
import { fitLoop } from './fit-loop';
import { mostTellingReading, type WhatIsUnknown } from './most-telling-reading';
import { predictSettings, type Prediction } from './predict-settings';
import { nextProportionalStep, type ProportionalAdvice } from './proportional';
import { siteHistory, standsForFit, type SiteRecord } from './site-history';

export interface PlanInput {
  /** The loop as issued. */
  document: NetworkDocument;
  records: SiteRecord[];
  /** Part of design flow within which a terminal is to end. */
  tolerance: number;
}

/** What the readings so far lead to, by both ways of going on. */
export interface Plan {
  proportional: ProportionalAdvice;
  /** Null before anything was read. */
  predicted: PredictedPlan | null;
}

export interface PredictedPlan extends Prediction {
  unknown: WhatIsUnknown;
  diagnoses: Diagnosis[];
  /** How far each reading of the last stand is from the fitted loop, in standard deviations; the farthest first. */
  farthest: { link: string; shown: number; expected: number; quantity: 'dropKpa' | 'flowLs'; deviations: number }[];
  readingsUsed: number;
  /** Readings that were left out because the loop was changed around them. */
  readingsLeftOut: number;
  isConverged: boolean;
}

const LISTED = 5;

/** Works out what to do next from everything that was read and set. Takes seconds on a large loop: to be run beside the page. */
export function planFrom({ document, records, tolerance }: PlanInput): Plan {
  const history = siteHistory(document, records);
  const proportional = nextProportionalStep({ document: history.document, events: history.events, tolerance });
  const { rounds, leftOut } = standsForFit(history);
  const used = rounds.reduce((sum, { readings }) => sum + readings.length, 0);
  if (used === 0) return { proportional, predicted: null };
  const fitted = fitLoop(history.document, rounds);
  return {
    proportional,
    predicted: {
      ...predictSettings(fitted, tolerance),
      unknown: mostTellingReading(fitted),
      diagnoses: diagnose(fitted),
      farthest: fitted.readings
        .map(({ reading, expected, deviations }) => ({
          link: reading.link,
          quantity: reading.quantity,
          shown: reading.value,
          expected,
          deviations: Math.abs(deviations),
        }))
        .sort((a, b) => b.deviations - a.deviations)
        .slice(0, LISTED),
      readingsUsed: used,
      readingsLeftOut: leftOut,
      isConverged: fitted.converged,
    },
  };
}
