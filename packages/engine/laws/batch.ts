/**
 * The two commonest kinds, passages and checks, evaluated and stamped in one loop each over typed arrays: the same laws as path.ts and
 * check.ts (a test compares them), without the general gathering.
 */
import type { CheckSpec, PathSpec } from '../network.ts';
import { positive, positiveSlope, root, rootSlope } from '../smooth.ts';
import { DELTA, EPS } from '../tolerances.ts';

export class Batch {
  readonly count: number;
  private readonly oneWay: boolean;
  private readonly a: Int32Array;
  private readonly b: Int32Array;
  private readonly rowA: Int32Array;
  private readonly rowB: Int32Array;
  /** Head difference and crack, taken off the pressure difference. */
  private readonly off: Float64Array;
  private readonly crack: Float64Array;
  readonly k: Float64Array;
  private readonly opening: Int32Array;
  /** Slots: row a by a and b, row b by a and b. */
  private readonly slots: Int32Array;

  /** `rows` and `slots` of each element as the compiled network numbers them: two rows, four slots. */
  constructor(specs: readonly (PathSpec | CheckSpec)[], oneWay: boolean, rows: ArrayLike<number>, slots: ArrayLike<number>) {
    this.count = specs.length;
    this.oneWay = oneWay;
    this.a = Int32Array.from(specs, (spec) => spec.a);
    this.b = Int32Array.from(specs, (spec) => spec.b);
    this.rowA = Int32Array.from(specs, (_, i) => rows[2 * i]!);
    this.rowB = Int32Array.from(specs, (_, i) => rows[2 * i + 1]!);
    this.off = Float64Array.from(specs, (spec) => (spec.heads?.[0] ?? 0) - (spec.heads?.[1] ?? 0));
    this.crack = Float64Array.from(specs, (spec) => (spec.type === 'check' ? spec.crack : 0));
    this.k = Float64Array.from(specs, (spec) => spec.k);
    this.opening = Int32Array.from(specs, (spec) => spec.opening ?? -1);
    this.slots = Int32Array.from(slots);
  }

  /** Adds flows to the residual and slopes to the Jacobian, with the leakage floor. */
  stamp(p: Float64Array, parameters: Float64Array, blend: number, floor: number, r: Float64Array, j: Float64Array): void {
    const { a, b, off, crack, k, opening, slots, rowA, rowB, oneWay } = this;
    const delta = DELTA * blend;
    const eps = EPS * blend;
    for (let i = 0, s = 0; i < this.count; i++, s += 4) {
      const across = p[a[i]!]! - p[b[i]!]! - off[i]!;
      const at = opening[i]!;
      const size = at < 0 ? k[i]! : k[i]! * parameters[at]!;
      let q = floor * across;
      let g = floor;
      if (size > 0) {
        if (!oneWay) {
          q += size * root(across, delta);
          g += size * rootSlope(across, delta);
        } else {
          const d = across - crack[i]!;
          if (d > 0) {
            const excess = positive(d, eps);
            q += size * root(excess, delta);
            g += size * rootSlope(excess, delta) * positiveSlope(d, eps);
          }
        }
      }
      r[rowA[i]!]! -= q;
      r[rowB[i]!]! += q;
      j[slots[s]!]! -= g;
      j[slots[s + 1]!]! += g;
      j[slots[s + 2]!]! += g;
      j[slots[s + 3]!]! -= g;
    }
  }
}
