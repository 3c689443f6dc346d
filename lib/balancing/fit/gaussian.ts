/**
 * A linear Gaussian model in the space of its readings: readings = A u + noise, u standard normal, noise of variance `noise`. With fewer
 * readings than unknowns all is had from S = A Aᵀ + noise and its Cholesky factor (A. Tarantola, B. Valette 1982; C. Rodgers 2000, m-form).
 */
export class Gaussian {
  private readonly factor: Float64Array[];

  /** `damping` 0 is Gauss-Newton; more of it (K. Levenberg 1944, D. Marquardt 1963) counts the priors for 1 + damping. */
  constructor(
    private readonly rows: Float64Array[],
    noise: ArrayLike<number>,
    private readonly damping = 0,
    gram = gramOf(rows),
  ) {
    this.factor = gram.map((row, m) => {
      const own = row.slice();
      own[m] += (1 + damping) * noise[m];
      return own;
    });
    cholesky(this.factor);
  }

  /** S⁻¹ b. */
  solve(b: ArrayLike<number>): Float64Array {
    const x = this.whiten(b);
    for (let i = x.length - 1; i >= 0; i--) {
      x[i] /= this.factor[i][i];
      const row = this.factor[i];
      for (let k = 0; k < i; k++) x[k] -= row[k] * x[i];
    }
    return x;
  }

  /** L⁻¹ b, of S = L Lᵀ. */
  whiten(b: ArrayLike<number>): Float64Array {
    const x = Float64Array.from(b);
    for (let i = 0; i < x.length; i++) {
      const row = this.factor[i];
      let sum = x[i];
      for (let k = 0; k < i; k++) sum -= row[k] * x[k];
      x[i] = sum / row[i];
    }
    return x;
  }

  /** The damped posterior covariance times a vector of unknowns. */
  covarianceTimes(g: Float64Array): Float64Array {
    const taken = transposeTimes(this.rows, this.solve(this.rows.map((row) => dot(row, g))), g.length);
    return g.map((each, j) => (each - taken[j]) / (1 + this.damping));
  }

  /** How the readings see a direction of unknowns: L⁻¹ A a. Posterior covariance of a and b = a · b - seen(a) · seen(b). */
  seen(direction: Float64Array): Float64Array {
    return this.whiten(this.rows.map((row) => dot(row, direction)));
  }
}

export function dot(a: Float64Array, b: Float64Array): number {
  // Four sums at once: most of a fit's time is spent here.
  let [s0, s1, s2, s3] = [0, 0, 0, 0];
  let k = 0;
  for (; k + 3 < a.length; k += 4) {
    s0 += a[k] * b[k];
    s1 += a[k + 1] * b[k + 1];
    s2 += a[k + 2] * b[k + 2];
    s3 += a[k + 3] * b[k + 3];
  }
  for (; k < a.length; k++) s0 += a[k] * b[k];
  return s0 + s1 + s2 + s3;
}

export function transposeTimes(rows: Float64Array[], weights: ArrayLike<number>, length: number): Float64Array {
  const sum = new Float64Array(length);
  rows.forEach((row, m) => {
    const weight = weights[m];
    for (let j = 0; j < length; j++) sum[j] += weight * row[j];
  });
  return sum;
}

/** Unknowns that are not held at zero. */
export function activeUnknowns(deviations: ArrayLike<number>): Int32Array {
  const active: number[] = [];
  for (let j = 0; j < deviations.length; j++) if (deviations[j] > 0) active.push(j);
  return Int32Array.from(active);
}

/** Their columns, each in units of its deviation. */
export function activeColumns(rows: Float64Array[], deviations: ArrayLike<number>, active: Int32Array): Float64Array[] {
  return rows.map((row) => {
    const columns = new Float64Array(active.length);
    for (let k = 0; k < active.length; k++) columns[k] = row[active[k]] * deviations[active[k]];
    return columns;
  });
}

/** Lower half of A Aᵀ, two rows by two: most of a fit's time is spent here, and each value fetched then serves twice. */
export function gramOf(rows: Float64Array[]): Float64Array[] {
  const n = rows.length;
  const gram = rows.map((_, m) => new Float64Array(m + 1));
  const length = n ? rows[0].length : 0;
  for (let m = 0; m < n; m += 2) {
    const a = rows[m];
    const b = rows[Math.min(m + 1, n - 1)];
    for (let k = 0; k <= m; k += 2) {
      const c = rows[k];
      const d = rows[Math.min(k + 1, n - 1)];
      let [ac, ad, bc, bd] = [0, 0, 0, 0];
      for (let j = 0; j < length; j++) {
        ac += a[j] * c[j];
        ad += a[j] * d[j];
        bc += b[j] * c[j];
        bd += b[j] * d[j];
      }
      gram[m][k] = ac;
      if (k + 1 <= m) gram[m][k + 1] = ad;
      if (m + 1 < n) {
        gram[m + 1][k] = bc;
        gram[m + 1][k + 1] = bd;
      }
    }
  }
  return gram;
}

function cholesky(rows: Float64Array[]): void {
  for (let i = 0; i < rows.length; i++) {
    const row = rows[i];
    for (let j = 0; j <= i; j++) {
      const other = rows[j];
      let sum = row[j];
      for (let k = 0; k < j; k++) sum -= row[k] * other[k];
      row[j] = i === j ? Math.sqrt(Math.max(sum, 1e-12)) : sum / other[j];
    }
  }
}
