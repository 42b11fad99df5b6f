/** Piecewise linear tables over position, and the cells between all knots of one body, in which every table is one straight line. */
import type { ForceTable } from './network.ts';

/** Value of a table whose segment is found at `inside` (strictly between knots), extended to `x`, and its slope; end values hold outside. */
export function lineAt(at: readonly number[], value: readonly number[], inside: number): { value: number; slope: number } {
  const last = at.length - 1;
  if (last < 0) return { value: 0, slope: 0 };
  if (inside <= at[0]!) return { value: value[0]!, slope: 0 };
  if (inside >= at[last]!) return { value: value[last]!, slope: 0 };
  for (let i = 1; i <= last; i++) {
    if (inside <= at[i]! && at[i]! > at[i - 1]!) {
      const slope = (value[i]! - value[i - 1]!) / (at[i]! - at[i - 1]!);
      return { value: value[i - 1]! + slope * (inside - at[i - 1]!), slope };
    }
  }
  return { value: value[last]!, slope: 0 };
}

/** Sum of tables as one line through (`inside`, value). */
export function sumAt(tables: readonly ForceTable[], inside: number): { value: number; slope: number } {
  let value = 0;
  let slope = 0;
  for (const table of tables) {
    const line = lineAt(table.at, table.force, inside);
    value += line.value;
    slope += line.slope;
  }
  return { value, slope };
}

/** Knots closer than this are one, m or rad. */
export const KNOT_APART = 1e-9;

/** Sorted, without doubles, only finite ones. */
export function sortedKnots(positions: Iterable<number>): Float64Array {
  const sorted = [...positions].filter((x) => Number.isFinite(x)).sort((a, b) => a - b);
  const knots: number[] = [];
  for (const x of sorted) if (knots.length === 0 || x - knots[knots.length - 1]! > KNOT_APART) knots.push(x);
  return Float64Array.from(knots);
}

/** Cell of a position: number of knots below it; on a knot the side decides. */
export function cellOf(knots: Float64Array, x: number, side: -1 | 1): number {
  let cell = 0;
  while (cell < knots.length && (x > knots[cell]! + KNOT_APART || (side > 0 && x >= knots[cell]! - KNOT_APART))) cell++;
  return cell;
}

/** A position strictly inside a cell. */
export function insideOf(knots: Float64Array, cell: number): number {
  if (knots.length === 0) return 0;
  if (cell <= 0) return knots[0]! - 1;
  if (cell >= knots.length) return knots[knots.length - 1]! + 1;
  return 0.5 * (knots[cell - 1]! + knots[cell]!);
}
