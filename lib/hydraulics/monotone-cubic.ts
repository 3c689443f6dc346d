/** Points of a curve, x rising; y and slope at each. */
export interface MonotoneCubic {
  x: Float64Array;
  y: Float64Array;
  slope: Float64Array;
}

/**
 * The piecewise cubic through points that never overshoots them: where the points fall, so does the curve (F. N. Fritsch and
 * R. E. Carlson 1980; slopes by the weighted harmonic mean of Fritsch and Butland 1984, ends by their three-point formula).
 * `x` strictly rising, two points or more.
 */
export function monotoneCubic(x: number[], y: number[]): MonotoneCubic {
  const n = x.length;
  const slope = new Float64Array(n);
  const h = (i: number) => x[i + 1] - x[i];
  const secant = (i: number) => (y[i + 1] - y[i]) / h(i);
  if (n === 2) slope.fill(secant(0));
  else {
    for (let i = 1; i < n - 1; i++) {
      const before = secant(i - 1);
      const after = secant(i);
      if (before * after <= 0) continue;
      const w1 = 2 * h(i) + h(i - 1);
      const w2 = h(i) + 2 * h(i - 1);
      slope[i] = (w1 + w2) / (w1 / before + w2 / after);
    }
    slope[0] = endSlope(h(0), h(1), secant(0), secant(1));
    slope[n - 1] = endSlope(h(n - 2), h(n - 3), secant(n - 2), secant(n - 3));
  }
  return { x: Float64Array.from(x), y: Float64Array.from(y), slope };
}

function endSlope(h0: number, h1: number, secant0: number, secant1: number): number {
  const slope = ((2 * h0 + h1) * secant0 - h0 * secant1) / (h0 + h1);
  if (Math.sign(slope) !== Math.sign(secant0)) return 0;
  if (Math.sign(secant0) !== Math.sign(secant1) && Math.abs(slope) > 3 * Math.abs(secant0)) return 3 * secant0;
  return slope;
}

/** Value and slope left by `evaluateCubic`. */
export const cubicAt = { value: 0, slope: 0 };

/** Value and slope at `at`, left in `cubicAt`; straight on past either end with the end's slope. */
export function evaluateCubic(curve: MonotoneCubic, at: number): void {
  const { x, y, slope } = curve;
  const last = x.length - 1;
  if (at <= x[0] || at >= x[last]) {
    const end = at <= x[0] ? 0 : last;
    cubicAt.value = y[end] + slope[end] * (at - x[end]);
    cubicAt.slope = slope[end];
    return;
  }
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (x[middle] <= at) low = middle;
    else high = middle;
  }
  const h = x[high] - x[low];
  const t = (at - x[low]) / h;
  const rise = y[high] - y[low];
  const c2 = 3 * rise - h * (2 * slope[low] + slope[high]);
  const c3 = h * (slope[low] + slope[high]) - 2 * rise;
  cubicAt.value = y[low] + t * (h * slope[low] + t * (c2 + t * c3));
  cubicAt.slope = slope[low] + (t * (2 * c2 + 3 * c3 * t)) / h;
}
