import { kvForFlow } from './valve-coefficient';

export type Characteristic = 'linear' | 'equalPercentage' | 'quickOpening';

export const DEFAULT_RANGEABILITY = 50;

/**
 * Kv at a stroke over Kv full open (0 to 1), the inherent characteristic. `opening` 0 to 1; `rangeability` above 1.
 * Linear: h. Equal percentage: R^(h-1); its leak 1/R at h = 0 is not shown, since a real valve closes. Quick opening: sqrt(h), one convention of several.
 * Source: IEC 60534-1 terms; check table 5.6 in the tests.
 */
export function inherentRatio(characteristic: Characteristic, opening: number, rangeability = DEFAULT_RANGEABILITY): number {
  if (opening <= 0) return 0;
  switch (characteristic) {
    case 'linear':
      return opening;
    case 'equalPercentage':
      return rangeability ** (opening - 1);
    case 'quickOpening':
      return Math.sqrt(opening);
  }
}

/** Stroke (0 to 1) that gives a ratio of Kv to Kv full open (0 to 1): the inverse of `inherentRatio`; 0 for an equal-percentage ratio at or below 1/R. */
export function openingForRatio(characteristic: Characteristic, ratio: number, rangeability = DEFAULT_RANGEABILITY): number {
  switch (characteristic) {
    case 'linear':
      return ratio;
    case 'equalPercentage':
      return Math.max(0, 1 + Math.log(ratio) / Math.log(rangeability));
    case 'quickOpening':
      return ratio * ratio;
  }
}

/** Authority: differential pressure across the valve full open over that across it shut, i.e. over valve plus rest of the circuit. kPa, both 0 or more, not both 0. */
export function authority(valveDropKpa: number, restOfCircuitDropKpa: number): number {
  return valveDropKpa / (valveDropKpa + restOfCircuitDropKpa);
}

/** Drop across the open valve (kPa) that gives an authority (0 to below 1) against the rest of its circuit (kPa). */
export function dropForAuthorityKpa(authorityRatio: number, restOfCircuitDropKpa: number): number {
  return (restOfCircuitDropKpa * authorityRatio) / (1 - authorityRatio);
}

/** Kv full open that gives an authority (above 0, below 1) at a design flow (L/s); case V7 in the tests. */
export function kvsForAuthority(authorityRatio: number, restOfCircuitDropKpa: number, designFlowLs: number, densityKgM3?: number): number {
  return kvForFlow(designFlowLs, dropForAuthorityKpa(authorityRatio, restOfCircuitDropKpa), densityKgM3);
}

/** Customary reading of an authority: 0.5 and more good, 0.25 to 0.5 fair, below that control is unstable near the seat. */
export function authorityGrade(authorityRatio: number): 'good' | 'fair' | 'unstable' {
  if (authorityRatio >= 0.5) return 'good';
  return authorityRatio >= 0.25 ? 'fair' : 'unstable';
}

/**
 * Installed flow over full-open flow at a Kv ratio (0 to 1) and an authority (above 0, up to 1), the whole circuit under a constant
 * differential pressure: q = 1 / sqrt(1 - N + N / phi²).
 */
export function installedFlowRatio(ratio: number, authorityRatio: number): number {
  return 1 / Math.sqrt(1 - authorityRatio + authorityRatio / (ratio * ratio));
}
