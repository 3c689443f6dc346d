/** A function of one number that never falls: `evaluate(x)` leaves its value and slope at x. */
export interface RisingFunction {
  value: number;
  slope: number;
  evaluate(x: number): void;
}

const MOST_TRIES = 80;

/**
 * Moves from 0, where the function is `atZero`, to a place where its value is small: first to `x`, and if the value there is still outside
 * ±`enough`, by Newton steps kept inside the bracket of its sign change. From beyond a wall a Newton step lands on the
 * wall's foot, which halving would only creep up to. Answers x; the function stands evaluated there.
 */
export function moveTowardsRoot(of: RisingFunction, atZero: number, x: number, enough: number): number {
  let low = x > 0 ? 0 : -Infinity;
  let high = x > 0 ? Infinity : 0;
  if (atZero === 0) low = high = 0;
  for (let tries = 0; ; tries++) {
    of.evaluate(x);
    // A first step that has not yet reached the root has done its part, however much is left.
    const isShort = tries === 0 && of.value < 0 === atZero < 0 && Math.abs(of.value) <= Math.abs(atZero);
    if (isShort || Math.abs(of.value) <= enough || tries === MOST_TRIES) return x;
    if (of.value > 0) high = Math.min(high, x);
    else low = Math.max(low, x);
    const newton = x - of.value / of.slope;
    if (newton > low && newton < high) x = newton;
    else if (low > -Infinity && high < Infinity) x = (low + high) / 2;
    else return x;
  }
}
