/** Sparse factors against plain dense elimination with full row pivoting. */
import fc from 'fast-check';
import { expect, it } from 'vitest';
import { SparseLu } from '../../packages/engine/sparse/lu.ts';
import { minimumDegree } from '../../packages/engine/sparse/order.ts';
import { random } from './nets.ts';

function dense(a: number[][], b: number[]): number[] | undefined {
  const n = b.length;
  const m = a.map((row, i) => [...row, b[i]!]);
  for (let k = 0; k < n; k++) {
    let pick = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(m[i]![k]!) > Math.abs(m[pick]![k]!)) pick = i;
    if (Math.abs(m[pick]![k]!) < 1e-12) return undefined;
    [m[k], m[pick]] = [m[pick]!, m[k]!];
    for (let i = k + 1; i < n; i++) {
      const f = m[i]![k]! / m[k]![k]!;
      for (let j = k; j <= n; j++) m[i]![j]! -= f * m[k]![j]!;
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i--) {
    let sum = m[i]![n]!;
    for (let j = i + 1; j < n; j++) sum -= m[i]![j]! * x[j]!;
    x[i] = sum / m[i]![i]!;
  }
  return x;
}

/** Random sparse matrix; `diagonal` false leaves some diagonals zero, as force balances without friction do. */
function matrix(
  seed: number,
  n: number,
  density: number,
  diagonal: boolean,
): { start: Int32Array; rows: Int32Array; fill: (next: () => number) => Float64Array } {
  const next = random(seed);
  const start = new Int32Array(n + 1);
  const rows: number[] = [];
  for (let c = 0; c < n; c++) {
    for (let r = 0; r < n; r++) if ((r === c && (diagonal || next() < 0.7)) || next() < density || r === (c + 1) % n) rows.push(r);
    start[c + 1] = rows.length;
  }
  return { start, rows: Int32Array.from(rows), fill: (value) => Float64Array.from(rows, () => (value() - 0.5) * 10 ** (4 * value() - 2)) };
}

it('solves what dense elimination solves, first and with frozen pivots', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 1e9 }), fc.integer({ min: 1, max: 30 }), fc.boolean(), (seed, n, diagonal) => {
      const { start, rows, fill } = matrix(seed, n, 3 / n, diagonal);
      const next = random(seed + 1);
      const lu = new SparseLu(n, start, rows);
      for (let round = 0; round < 4; round++) {
        const values = fill(next);
        const a = Array.from({ length: n }, () => new Array<number>(n).fill(0));
        for (let c = 0; c < n; c++) for (let k = start[c]!; k < start[c + 1]!; k++) a[rows[k]!]![c]! += values[k]!;
        const b = Array.from({ length: n }, () => next() - 0.5);
        const expected = dense(a, b);
        if (!expected) continue;
        if (!lu.factor(values)) {
          expect(Math.max(...expected.map(Math.abs))).toBeGreaterThan(1e9);
          continue;
        }
        const x = new Float64Array(n);
        lu.solve(Float64Array.from(b), x);
        // Compare by residual: the matrix may be ill-conditioned, the factors must not make it worse.
        const size = Math.max(1, ...Array.from(x, Math.abs)) * Math.max(...Array.from(values, Math.abs));
        for (let i = 0; i < n; i++) {
          let sum = -b[i]!;
          for (let j = 0; j < n; j++) sum += a[i]![j]! * x[j]!;
          expect(Math.abs(sum)).toBeLessThan(1e-8 * size);
        }
      }
    }),
    { numRuns: 200 },
  );
});

it('says that a singular matrix is singular', () => {
  const lu = new SparseLu(2, Int32Array.from([0, 2, 4]), Int32Array.from([0, 1, 0, 1]));
  expect(lu.factor(Float64Array.from([1, 2, 2, 4]))).toBe(false);
  expect(lu.factor(Float64Array.from([1, 2, 2, Number.NaN]))).toBe(false);
  expect(lu.factor(Float64Array.from([1, 2, 2, 5]))).toBe(true);
});

it('keeps a chain free of fill', () => {
  const n = 50;
  const start = new Int32Array(n + 1);
  const rows: number[] = [];
  // A star: any order but hub-last fills in.
  for (let c = 0; c < n; c++) {
    if (c === 0) for (let r = 0; r < n; r++) rows.push(r);
    else rows.push(0, c);
    start[c + 1] = rows.length;
  }
  const order = minimumDegree(n, start, Int32Array.from(rows));
  expect(order.indexOf(0)).toBeGreaterThanOrEqual(n - 2);
});
