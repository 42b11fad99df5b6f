/**
 * Sparse LU for one pattern and many matrices (left-looking, Gilbert and Peierls 1988). The first factorization chooses pivots, the diagonal
 * where it is at least PIVOT_SHARE of its column; later ones run over the frozen pattern, and choose anew when a pivot has become small.
 */
import { PIVOT_SHARE, PIVOT_STALE } from '../tolerances.ts';
import { minimumDegree } from './order.ts';

export class SparseLu {
  readonly n: number;
  private readonly start: Int32Array;
  private readonly rows: Int32Array;
  /** Column order. */
  private readonly order: Int32Array;
  /** Row -> pivot step. */
  private readonly stepOf: Int32Array;
  private rowOf: Int32Array;
  private chosen = false;
  // Factors by column: L below the unit diagonal, U above it; row numbers are pivot steps.
  private lStart: Int32Array;
  private lRows: Int32Array = new Int32Array(0);
  private lValues: Float64Array = new Float64Array(0);
  private uStart: Int32Array;
  private uRows: Int32Array = new Int32Array(0);
  private uValues: Float64Array = new Float64Array(0);
  /** Pattern of the matrix in pivot steps, per ordered column. */
  private aRows: Int32Array;
  private readonly diagonal: Float64Array;
  private readonly work: Float64Array;
  /** How often pivots were chosen. */
  choices = 0;

  constructor(n: number, start: Int32Array, rows: Int32Array, order?: Int32Array) {
    this.n = n;
    this.start = start;
    this.rows = rows;
    this.order = order ?? minimumDegree(n, start, rows);
    this.stepOf = new Int32Array(n).fill(-1);
    this.rowOf = new Int32Array(n);
    this.lStart = new Int32Array(n + 1);
    this.uStart = new Int32Array(n + 1);
    this.aRows = new Int32Array(rows.length);
    this.diagonal = new Float64Array(n);
    this.work = new Float64Array(n);
  }

  /** Factors; false: the matrix is singular to working precision. */
  factor(values: Float64Array): boolean {
    if (this.chosen && this.refactor(values)) return true;
    return this.choose(values);
  }

  private refactor(values: Float64Array): boolean {
    const { n, start, order, aRows, lStart, lRows, lValues, uStart, uRows, uValues, diagonal, work } = this;
    for (let k = 0; k < n; k++) {
      const c = order[k]!;
      for (let q = start[c]!, end = start[c + 1]!; q < end; q++) work[aRows[q]!] = values[q]!;
      for (let q = uStart[k]!, end = uStart[k + 1]!; q < end; q++) {
        const row = uRows[q]!;
        const u = work[row]!;
        work[row] = 0;
        uValues[q] = u;
        if (u !== 0) for (let s = lStart[row]!, stop = lStart[row + 1]!; s < stop; s++) work[lRows[s]!]! -= lValues[s]! * u;
      }
      const pivot = work[k]!;
      work[k] = 0;
      let largest = 0;
      const inverse = 1 / pivot;
      for (let q = lStart[k]!, end = lStart[k + 1]!; q < end; q++) {
        const row = lRows[q]!;
        const value = work[row]!;
        work[row] = 0;
        const size = value < 0 ? -value : value;
        if (size > largest) largest = size;
        lValues[q] = value * inverse;
      }
      const size = pivot < 0 ? -pivot : pivot;
      if (!(size > PIVOT_STALE * largest) || !(size > 0) || size === Number.POSITIVE_INFINITY) {
        work.fill(0);
        return false;
      }
      diagonal[k] = inverse;
    }
    return true;
  }

  /** Full factorization with choice of pivots; fixes the pattern for `refactor`. */
  private choose(values: Float64Array): boolean {
    const { n, start, rows, order, stepOf, diagonal } = this;
    this.choices++;
    this.chosen = false;
    stepOf.fill(-1);
    const x = new Float64Array(n);
    const mark = new Int32Array(n).fill(-1);
    const lr: number[] = [];
    const lv: number[] = [];
    const ur: number[] = [];
    const uv: number[] = [];
    const lStart = new Int32Array(n + 1);
    const uStart = new Int32Array(n + 1);
    const stack: number[] = [];
    for (let k = 0; k < n; k++) {
      const c = order[k]!;
      const reached: number[] = [];
      // Rows reached from the column's entries through the columns of L found so far.
      for (let q = start[c]!; q < start[c + 1]!; q++) {
        stack.push(rows[q]!);
        while (stack.length > 0) {
          const row = stack.pop()!;
          if (mark[row] === k) continue;
          mark[row] = k;
          reached.push(row);
          const step = stepOf[row]!;
          if (step >= 0) for (let s = lStart[step]!; s < lStart[step + 1]!; s++) if (mark[lr[s]!] !== k) stack.push(lr[s]!);
        }
      }
      for (const row of reached) x[row] = 0;
      for (let q = start[c]!; q < start[c + 1]!; q++) x[rows[q]!]! += values[q]!;
      const above = reached.filter((row) => stepOf[row]! >= 0).sort((a, b) => stepOf[a]! - stepOf[b]!);
      for (const row of above) {
        const step = stepOf[row]!;
        const u = x[row]!;
        ur.push(step);
        uv.push(u);
        if (u !== 0) for (let s = lStart[step]!; s < lStart[step + 1]!; s++) x[lr[s]!]! -= lv[s]! * u;
      }
      const below = reached.filter((row) => stepOf[row]! < 0);
      let largest = 0;
      let pick = -1;
      for (const row of below) {
        const size = Math.abs(x[row]!);
        if (size > largest) {
          largest = size;
          pick = row;
        }
      }
      if (pick < 0 || !(largest > 0) || !Number.isFinite(largest)) return false;
      if (mark[c] === k && stepOf[c]! < 0 && Math.abs(x[c]!) >= PIVOT_SHARE * largest) pick = c;
      const pivot = x[pick]!;
      stepOf[pick] = k;
      this.rowOf[k] = pick;
      diagonal[k] = 1 / pivot;
      for (const row of below) {
        if (row === pick) continue;
        lr.push(row);
        lv.push(x[row]! / pivot);
      }
      lStart[k + 1] = lr.length;
      uStart[k + 1] = ur.length;
    }
    this.lStart = lStart;
    this.uStart = uStart;
    this.lRows = Int32Array.from(lr, (row) => stepOf[row]!);
    this.lValues = Float64Array.from(lv);
    this.uRows = Int32Array.from(ur);
    this.uValues = Float64Array.from(uv);
    for (let q = 0; q < rows.length; q++) this.aRows[q] = stepOf[rows[q]!]!;
    this.chosen = true;
    return true;
  }

  /** Solves with the last factors; `b` and `x` may be the same array. */
  solve(b: Float64Array, x: Float64Array): void {
    const { n, rowOf, order, lStart, lRows, lValues, uStart, uRows, uValues, diagonal, work } = this;
    for (let k = 0; k < n; k++) work[k] = b[rowOf[k]!]!;
    for (let k = 0; k < n; k++) {
      const value = work[k]!;
      if (value !== 0) for (let q = lStart[k]!, end = lStart[k + 1]!; q < end; q++) work[lRows[q]!]! -= lValues[q]! * value;
    }
    for (let k = n - 1; k >= 0; k--) {
      const value = work[k]! * diagonal[k]!;
      work[k] = value;
      if (value !== 0) for (let q = uStart[k]!, end = uStart[k + 1]!; q < end; q++) work[uRows[q]!]! -= uValues[q]! * value;
    }
    for (let k = 0; k < n; k++) {
      x[order[k]!] = work[k]!;
      work[k] = 0;
    }
  }
}
