/** Probability that a standard normal number is below x (M. Abramowitz, I. Stegun 1964, 26.2.17; error under 7.5e-8). */
export function normalBelow(x: number): number {
  const t = 1 / (1 + 0.2316419 * Math.abs(x));
  const tail =
    Math.exp((-x * x) / 2) *
    0.3989422804014327 *
    t *
    (0.31938153 + t * (-0.356563782 + t * (1.781477937 + t * (-1.821255978 + t * 1.330274429))));
  return x > 0 ? 1 - tail : tail;
}

/** Probability that exp(mean + spread · z) is outside 1 ± tolerance. */
export function outsideTolerance(mean: number, spread: number, tolerance: number): number {
  const sd = Math.max(spread, 1e-6);
  return 1 - normalBelow((Math.log(1 + tolerance) - mean) / sd) + normalBelow((Math.log(1 - tolerance) - mean) / sd);
}
