/** A quantity as written: value in SI, the unit kept for display. */
import type { Dimension } from './dimension.ts';

export interface Quantity {
  /** Value in the SI unit of the dimension; pressure gauge, temperature absolute K. */
  readonly si: number;
  readonly dimension: Dimension;
  /** Unit as written ("bar"); empty for a bare number or a computed value. */
  readonly unit: string;
}
