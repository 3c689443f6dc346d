/**
 * Loss coefficients of an equal-bore tee or wye from the ratio of the branch's flow to the combined flow (0 to 1),
 * all referred to the velocity of the combined leg: dp = K rho v²/2. A coefficient may be below 0: the faster stream drags the other.
 * Source: Technical Paper 410 (2009 on), chapter 2, for a branch of the run's own bore.
 */
export type TeeLoss = { run: number; branch: number };

/** Two streams joining in a 90° tee. */
export function convergingTee90(branchRatio: number): TeeLoss {
  const r = branchRatio;
  const c = r <= 0.4 ? 0.9 * (1 - r) : 0.55;
  return { run: 1.55 * r - r * r, branch: c * (1 + r * r - 2 * (1 - r) ** 2) };
}

/** One stream dividing in a 45° wye. */
export function divergingWye45(branchRatio: number): TeeLoss {
  const r = branchRatio;
  const m = (r <= 0.5 ? 2 : 0.3) * (2 * r - 1);
  const g = r <= 0.6 ? 1 - 0.6 * r : 0.6;
  return { run: m * r * r, branch: g * (1 + r * r - 2 * r * Math.SQRT1_2) };
}
