/** Below this Reynolds number flow is laminar, f = 64 / Re. */
export const LAMINAR_RE = 2000;
/** Above this Reynolds number the Colebrook-White law holds. */
export const TURBULENT_RE = 4000;

const HALF_LN10 = Math.LN10 / 2;
const LAMINAR_F = 64 / LAMINAR_RE;
/** ln(10) / 5.02, from the 2.51 of the Colebrook-White law written with natural logarithms. */
const RE_SCALE = Math.LN10 / 5.02;

/** Nearer than this to the answer one of Clamond's steps, which multiplies correct digits by four, reaches rounding. */
const ONE_STEP = 1e-3;

/**
 * Solves Colebrook-White, 1/sqrt(f) = -2 log10(e/3.7 + 2.51/(Re sqrt(f))) (C. F. Colebrook 1939), to rounding: with F = ln(10)/(2 sqrt(f)) and
 * R = Re · ln(10)/5.02 the law is F + ln(x + F) = ln(R), x = R e/3.7, and a step of D. Clamond (Ind. Eng. Chem. Res. 2009, 48(7), 3665)
 * or two reach 1e-15. Answers F. `guess` is F of a neighbouring flow, or 0; it changes the work, not the answer.
 */
function colebrookF(R: number, x: number, guess: number): number {
  let F = guess > 0 ? guess : Math.log(R) - 0.2;
  for (;;) {
    const sum = x + F;
    const E = (F + Math.log(sum / R)) / (1 + sum);
    F -= ((1 + sum + 0.5 * E) * E * sum) / (1 + sum + E * (1 + E / 3));
    if (E < ONE_STEP && E > -ONE_STEP) return F;
    // Far guesses (a pipe that was at rest) can leave the law's domain; start afresh then.
    if (!(F > 0)) F = Math.log(R) - 0.2;
  }
}

/**
 * What `frictionOf` leaves behind: the Darcy factor, its logarithmic slope d ln f / d ln Re, and a guess for the next flow in the same pipe.
 * One object, so that the iteration allocates nothing.
 */
export const friction = { factor: 0, logSlope: 0, guess: 0 };

/**
 * Darcy friction factor and its logarithmic slope, left in `friction`: 64/Re below Re 2000, Colebrook-White above 4000, and
 * between them the cubic in Re that meets both in value and slope, so that the head loss is continuous, smooth and rising.
 * `reynolds` above 0; `relativeRoughness` = roughness over bore, 0 to 0.1; `guess` from an earlier call for the same pipe.
 */
export function frictionOf(reynolds: number, relativeRoughness: number, guess = 0): void {
  if (reynolds <= LAMINAR_RE) {
    friction.guess = 0;
    friction.factor = 64 / reynolds;
    friction.logSlope = -1;
    return;
  }
  if (reynolds >= TURBULENT_RE) {
    const R = RE_SCALE * reynolds;
    const x = (relativeRoughness / 3.7) * R;
    const F = colebrookF(R, x, guess);
    const root = HALF_LN10 / F;
    friction.guess = F;
    friction.factor = root * root;
    // From F + ln(x + F) = ln(R), x and R going with Re: dF/d ln Re = F / (1 + x + F), and f goes with F to the power -2.
    friction.logSlope = -2 / (1 + x + F);
    return;
  }
  const R = RE_SCALE * TURBULENT_RE;
  const x = (relativeRoughness / 3.7) * R;
  const F = colebrookF(R, x, guess);
  friction.guess = F;
  const turbulent = (HALF_LN10 / F) ** 2;
  const turbulentSlope = (turbulent * -2) / (1 + x + F) / TURBULENT_RE;
  const span = TURBULENT_RE - LAMINAR_RE;
  const t = (reynolds - LAMINAR_RE) / span;
  const a = -LAMINAR_F / LAMINAR_RE;
  const rise = turbulent - LAMINAR_F;
  // Cubic Hermite: f = f2 + span a t + (3 rise - span (2a + b)) t² + (span (a + b) - 2 rise) t³.
  const c2 = 3 * rise - span * (2 * a + turbulentSlope);
  const c3 = span * (a + turbulentSlope) - 2 * rise;
  friction.factor = LAMINAR_F + t * (span * a + t * (c2 + t * c3));
  friction.logSlope = ((span * a + t * (2 * c2 + 3 * c3 * t)) / span) * (reynolds / friction.factor);
}

/** Darcy friction factor alone; see `frictionOf`. */
export function frictionFactor(reynolds: number, relativeRoughness: number): number {
  frictionOf(reynolds, relativeRoughness);
  return friction.factor;
}
