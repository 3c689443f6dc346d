/**
 * Local loss coefficients, dp = K rho v²/2, by two published methods that follow size and Reynolds number:
 * 2-K, W. B. Hooper, Chemical Engineering, 24 August 1981: K = K1/Re + Kinf (1 + 1/D), D the bore in inches;
 * 3-K, R. Darby, Chemical Engineering, July 1999: K = K1/Re + Ki (1 + Kd/D^0.3), D the nominal size in inches.
 */

export type TwoK = { k1: number; kInfinity: number };
export type ThreeK = { k1: number; ki: number; kd: number };
/** A fitting as both methods tabulate it; `threeK` is null where Darby gives none. */
export type Fitting = { name: string; twoK: TwoK; threeK: ThreeK | null };

const fitting = (name: string, [k1, kInfinity]: [number, number], darby: [number, number, number] | null): Fitting => ({
  name,
  twoK: { k1, kInfinity },
  threeK: darby && { k1: darby[0], ki: darby[1], kd: darby[2] },
});

export const fittings = {
  'elbow-90-threaded': fitting('Elbow 90°, standard, threaded', [800, 0.4], [800, 0.14, 4.0]),
  'elbow-90-welded': fitting('Elbow 90°, flanged or welded, r/D 1', [800, 0.25], [800, 0.091, 4.0]),
  'elbow-90-long-radius': fitting('Elbow 90°, long radius, r/D 1.5', [800, 0.2], [800, 0.071, 4.2]),
  'elbow-45': fitting('Elbow 45°, standard', [500, 0.2], [500, 0.071, 4.2]),
  'tee-run-threaded': fitting('Tee, straight through, threaded', [200, 0.1], [200, 0.091, 4.0]),
  'tee-run-welded': fitting('Tee, straight through, flanged or welded', [150, 0.05], [150, 0.05, 4.0]),
  'tee-branch-threaded': fitting('Tee, through the branch, threaded', [500, 0.7], [500, 0.274, 4.0]),
  'tee-branch-welded': fitting('Tee, through the branch, flanged or welded', [800, 0.8], [800, 0.28, 4.0]),
  'gate-valve': fitting('Gate valve, open', [300, 0.1], [300, 0.037, 3.9]),
  'ball-valve': fitting('Ball valve, open (2-K: bore reduced to 0.9)', [500, 0.15], [300, 0.017, 3.5]),
  'globe-valve': fitting('Globe valve, open', [1500, 4.0], [1500, 1.7, 3.6]),
  'butterfly-valve': fitting('Butterfly valve, open', [800, 0.25], null),
  'swing-check-valve': fitting('Swing check valve', [1500, 1.5], [1500, 0.46, 4.0]),
  'diaphragm-valve': fitting('Diaphragm valve, weir type', [1000, 2.0], [1000, 0.69, 4.9]),
} as const satisfies Record<string, Fitting>;

export type FittingId = keyof typeof fittings;

/** Loss coefficient by Hooper's 2-K method; bore in mm and Reynolds number, both above 0. */
export function hooperK({ k1, kInfinity }: TwoK, boreMm: number, reynolds: number): number {
  return k1 / reynolds + kInfinity * (1 + 25.4 / boreMm);
}

/** Loss coefficient by Darby's 3-K method; nominal size in inches and Reynolds number, both above 0. */
export function darbyK({ k1, ki, kd }: ThreeK, nominalInch: number, reynolds: number): number {
  return k1 / reynolds + ki * (1 + kd / nominalInch ** 0.3);
}

/**
 * Sum of the local loss coefficients of a pipe's fittings by the 2-K method, on the pipe's own velocity: the `minorK` of a pipe.
 * `counts` tells how many of each (0 or more); bore in mm, Reynolds number at design flow, both above 0.
 */
export function sumMinorK(counts: Partial<Record<FittingId, number>>, boreMm: number, reynolds: number): number {
  return (Object.keys(counts) as FittingId[]).reduce(
    (sum, id) => sum + (counts[id] ?? 0) * hooperK(fittings[id].twoK, boreMm, reynolds),
    0,
  );
}
