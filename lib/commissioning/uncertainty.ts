/**
 * The tolerance taken for a valve's Kv. An assumption, named wherever it is used: it is what makers' test standards allow for a fully
 * open valve, and a valve throttled below half is known to be worse.
 */
export const kvAssumption = {
  percent: 5,
  source: 'Assumed: ±5 % on Kv, the tolerance of BS 7350 for a fully open valve; worse when throttled below half',
} as const;

/** What an instrument's certificate says: ± per cent of the reading, and a fixed part in kPa or L/s. */
export interface Accuracy {
  accuracyPercent: number;
  accuracyAbsolute: number;
}

/** At this much the reading tells no more than that there is, or is not, a flow; a zero reading gets no larger figure. */
const LARGEST_PERCENT = 100;

/** An instrument's ± in the unit of the reading: per cent of reading plus the fixed part. */
export const instrumentError = (reading: number, { accuracyPercent, accuracyAbsolute }: Accuracy): number =>
  (accuracyPercent / 100) * Math.abs(reading) + accuracyAbsolute;

/**
 * Uncertainty of a flow read across a valve, ± per cent of the flow: u(q) = sqrt(u_Kv² + (u_dp / (2 dp))²), by the rules for
 * uncorrelated inputs (JCGM 100:2008, 5.1.2); dp enters under a root and so with half its share.
 */
export function dropUncertaintyPercent(dropKpa: number, accuracy: Accuracy, kvPercent: number = kvAssumption.percent): number {
  return held(Math.hypot(kvPercent, share(dropKpa, accuracy) / 2));
}

/** Uncertainty of a flow read directly, ± per cent of the flow: the instrument's own. */
export const flowUncertaintyPercent = (flowLs: number, accuracy: Accuracy): number => held(share(flowLs, accuracy));

function share(reading: number, accuracy: Accuracy): number {
  const error = instrumentError(reading, accuracy);
  return error === 0 ? 0 : (100 * error) / Math.abs(reading);
}

const held = (percent: number): number => Math.min(percent, LARGEST_PERCENT);
