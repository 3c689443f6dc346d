export type Verdict = 'low' | 'within' | 'high';

/** A tolerance band as differences from design in per cent, e.g. −10 to 10. */
export interface Band {
  lowerPercent: number;
  upperPercent: number;
}

/** Whether a flow is within its band once the uncertainty of the reading is counted. */
export type Certainty = 'yes' | 'no' | 'too-near';

/** Flow as per cent of design; both in the same unit, design above 0. */
export const percentOfDesign = (flowLs: number, designFlowLs: number): number => (100 * flowLs) / designFlowLs;

/** Where a flow stands; exactly on a limit is within. Nothing is rounded into the band. */
export function verdictOf(percent: number, { lowerPercent, upperPercent }: Band): Verdict {
  if (percent < 100 + lowerPercent) return 'low';
  return percent > 100 + upperPercent ? 'high' : 'within';
}

/**
 * Whether the whole span of a reading, flow × (1 ± uncertainty), lies in its band ("yes"), outside it ("no"), or across a limit, where
 * the reading cannot tell ("too-near").
 */
export function certaintyOf(percent: number, uncertaintyPercent: number, { lowerPercent, upperPercent }: Band): Certainty {
  const half = (percent * uncertaintyPercent) / 100;
  const [low, high] = [100 + lowerPercent, 100 + upperPercent];
  if (percent - half >= low && percent + half <= high) return 'yes';
  return percent + half < low || percent - half > high ? 'no' : 'too-near';
}
