/** Throttling passage: q = y K d/(d^2 + delta^2)^(1/4), both ways. Turbulent orifice with a laminar core of 0.1 bar. */
import type { PathSpec } from '../network.ts';
import { root, rootSlope } from '../smooth.ts';
import { DELTA } from '../tolerances.ts';
import { headsOf, type Law, OPENING, through } from './law.ts';

export function pathLaw(spec: PathSpec): Law {
  const { k } = spec;
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
      const d = z[0]! - z[1]!;
      const y = opening < 0 ? 1 : parameters[opening]!;
      const slope = y * k * rootSlope(d, DELTA * blend);
      out[OPENING] = y;
      through(y * k * root(d, DELTA * blend), slope, -slope, out, gradient);
    },
  };
}
