/**
 * Solves a small dense system by elimination with row exchanges; both arguments are overwritten, the second with the answer.
 * A column without a usable pivot leaves its unknown at 0.
 */
export function solveDense(rows: Float64Array[], right: Float64Array): Float64Array {
  const n = right.length;
  for (let k = 0; k < n; k++) {
    let best = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(rows[i][k]) > Math.abs(rows[best][k])) best = i;
    [rows[k], rows[best]] = [rows[best], rows[k]];
    [right[k], right[best]] = [right[best], right[k]];
    if (Math.abs(rows[k][k]) < 1e-12) continue;
    for (let i = k + 1; i < n; i++) {
      const factor = rows[i][k] / rows[k][k];
      if (factor === 0) continue;
      for (let j = k; j < n; j++) rows[i][j] -= factor * rows[k][j];
      right[i] -= factor * right[k];
    }
  }
  for (let k = n - 1; k >= 0; k--) {
    let sum = right[k];
    for (let j = k + 1; j < n; j++) sum -= rows[k][j] * right[j];
    right[k] = Math.abs(rows[k][k]) < 1e-12 ? 0 : sum / rows[k][k];
  }
  return right;
}
