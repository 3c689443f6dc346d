import { GrowingList } from '../growing-list';
import { minimumDegree, type Pattern } from './minimum-degree';

/** Entries of factors, and multiplications to make them, beyond which they cost more than they save. */
export const MOST_FILL = 8_000_000;
export const MOST_WORK = 600_000_000;
/** Fill over entries up to which the order given is kept. */
const GOOD_FILL = 1.25;

/**
 * A sparse symmetric positive definite matrix, factorised as L D Lᵀ row by row (T. Davis, Algorithm 849, ACM TOMS 2005).
 * Order, pattern and all memory are settled once; `factorize` and `solve` allocate nothing.
 * Values are put in through `diagonal[i]` and `value[slot(i, j)]`, in the numbering of the caller.
 */
export class SparseLdl {
  readonly size: number;
  readonly diagonal: Float64Array;
  readonly value: Float64Array;
  /** Entries of L below its diagonal. */
  readonly fill: number;

  private readonly order: Int32Array;
  private readonly place: Int32Array;
  private readonly rowStart: Int32Array;
  private readonly rowColumn: Int32Array;
  private readonly columnStart: Int32Array;
  private readonly columnRow: Int32Array;
  private readonly filled: Int32Array;
  private readonly pathStart: Int32Array;
  private readonly path: Int32Array;
  private readonly lower: Float64Array;
  /** One over each pivot. */
  private readonly inverse: Float64Array;
  private readonly row: Float64Array;

  /** In the order of least degree. Null where L would have more than `mostFill` entries or take more than `mostWork` multiplications. */
  static of(pattern: Pattern, mostFill: number, mostWork: number): SparseLdl | null {
    const factors = new SparseLdl(pattern, minimumDegree(pattern), mostFill);
    return factors.fill > mostFill || factors.work() > mostWork ? null : factors;
  }

  /** In the order given. Null where L would have more than `GOOD_FILL` times the entries of the matrix. */
  static inOrder(pattern: Pattern): SparseLdl | null {
    const mostFill = (GOOD_FILL * pattern.index.length) / 2;
    const factors = new SparseLdl(
      pattern,
      Int32Array.from({ length: pattern.size }, (_, k) => k),
      mostFill,
    );
    return factors.fill > mostFill ? null : factors;
  }

  private constructor(pattern: Pattern, order: Int32Array, mostFill: number) {
    const n = pattern.size;
    this.size = n;
    this.order = order;
    this.place = new Int32Array(n);
    for (let k = 0; k < n; k++) this.place[order[k]] = k;
    ({ start: this.rowStart, column: this.rowColumn } = this.rowsOf(pattern));
    this.diagonal = new Float64Array(n);
    this.value = new Float64Array(this.rowColumn.length);

    // Row k of L is what the elimination tree reaches from the entries of row k (J. Liu 1990), each place after those below it.
    const parent = new Int32Array(n).fill(-1);
    const flag = new Int32Array(n);
    const columnCount = new Int32Array(n);
    const climb = new Int32Array(n);
    const reached = new Int32Array(n);
    const path = new GrowingList(4 * n);
    this.pathStart = new Int32Array(n + 1);
    for (let k = 0; k < n && path.length <= mostFill; k++) {
      flag[k] = k;
      let top = n;
      for (let p = this.rowStart[k]; p < this.rowStart[k + 1]; p++) {
        let length = 0;
        for (let i = this.rowColumn[p]; flag[i] !== k; i = parent[i]) {
          if (parent[i] === -1) parent[i] = k;
          flag[i] = k;
          columnCount[i]++;
          climb[length++] = i;
        }
        while (length > 0) reached[--top] = climb[--length];
      }
      while (top < n) path.push(reached[top++]);
      this.pathStart[k + 1] = path.length;
    }
    this.path = path.toArray();
    this.columnStart = new Int32Array(n + 1);
    for (let i = 0; i < n; i++) this.columnStart[i + 1] = this.columnStart[i] + columnCount[i];
    this.fill = path.length;
    this.columnRow = new Int32Array(this.fill);
    this.lower = new Float64Array(this.fill);
    this.filled = new Int32Array(n);
    this.inverse = new Float64Array(n);
    this.row = new Float64Array(n);
  }

  /** Where the entry (i, j), i ≠ j, of the caller's numbering goes in `value`; it must be in the pattern. */
  slot(i: number, j: number): number {
    const row = Math.max(this.place[i], this.place[j]);
    const column = Math.min(this.place[i], this.place[j]);
    for (let p = this.rowStart[row]; p < this.rowStart[row + 1]; p++) if (this.rowColumn[p] === column) return p;
    throw new RangeError(`(${i}, ${j}) is not in the pattern`);
  }

  private work(): number {
    let work = 0;
    for (let i = 0; i < this.size; i++) work += (this.columnStart[i + 1] - this.columnStart[i]) ** 2 / 2;
    return work;
  }

  factorize(): void {
    const { size, order, diagonal, value, rowStart, rowColumn, columnStart, columnRow, filled, pathStart, path, lower, inverse, row } =
      this;
    for (let k = 0; k < size; k++) {
      const own = diagonal[order[k]];
      let d = own;
      for (let p = rowStart[k]; p < rowStart[k + 1]; p++) row[rowColumn[p]] = value[p];
      filled[k] = columnStart[k];
      for (let t = pathStart[k]; t < pathStart[k + 1]; t++) {
        const i = path[t];
        const y = row[i];
        row[i] = 0;
        const end = filled[i];
        for (let p = columnStart[i]; p < end; p++) row[columnRow[p]] -= lower[p] * y;
        const l = y * inverse[i];
        d -= l * y;
        columnRow[end] = k;
        lower[end] = l;
        filled[i] = end + 1;
      }
      // Rounding can eat a pivot where walls meet near-frictionless loops; the step then only grows less exact.
      inverse[k] = 1 / (d > own * 1e-14 ? d : own * 1e-14 + 1e-300);
    }
  }

  /** Solves M x = b with the last factors; x may be b. */
  solve(b: Float64Array, x: Float64Array): void {
    const { size, order, columnStart, columnRow, lower, inverse, row } = this;
    for (let k = 0; k < size; k++) row[k] = b[order[k]];
    for (let k = 0; k < size; k++) {
      const y = row[k];
      for (let p = columnStart[k]; p < columnStart[k + 1]; p++) row[columnRow[p]] -= lower[p] * y;
    }
    for (let k = size - 1; k >= 0; k--) {
      let y = row[k] * inverse[k];
      for (let p = columnStart[k]; p < columnStart[k + 1]; p++) y -= lower[p] * row[columnRow[p]];
      row[k] = y;
    }
    for (let k = 0; k < size; k++) {
      x[order[k]] = row[k];
      row[k] = 0;
    }
  }

  /** The lower triangle by rows, in the order of elimination. */
  private rowsOf({ size, start, index }: Pattern) {
    const rows = new Int32Array(size + 1);
    const { place } = this;
    for (let i = 0; i < size; i++) for (let p = start[i]; p < start[i + 1]; p++) if (place[index[p]] < place[i]) rows[place[i] + 1]++;
    for (let k = 0; k < size; k++) rows[k + 1] += rows[k];
    const next = rows.slice(0, size);
    const column = new Int32Array(rows[size]);
    for (let i = 0; i < size; i++)
      for (let p = start[i]; p < start[i + 1]; p++) if (place[index[p]] < place[i]) column[next[place[i]]++] = place[index[p]];
    return { start: rows, column };
  }
}
