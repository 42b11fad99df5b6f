/** Check valve: the passage law on what exceeds the crack pressure, a to b only; zero otherwise. */
import type { CheckSpec } from '../network.ts';
import { positive, positiveSlope, root, rootSlope } from '../smooth.ts';
import { DELTA, EPS } from '../tolerances.ts';
import { headsOf, type Law, OPENING, through } from './law.ts';

export function checkLaw(spec: CheckSpec): Law {
  const { k, crack } = spec;
  const opening = spec.opening ?? -1;
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      const d = z[0]! - z[1]! - crack;
      const y = opening < 0 ? 1 : parameters[opening]!;
      const excess = positive(d, EPS * blend);
      const slope = y * k * rootSlope(excess, DELTA * blend) * positiveSlope(d, EPS * blend);
      out[OPENING] = excess > 0 ? y : 0;
      through(y * k * root(excess, DELTA * blend), slope, -slope, out, gradient);
    },
  };
}
