/** Metering edge behind a compensator, a to b: q = the smaller of opening x limit and opening x path(d); b to a the bare path. */
import type { CompensatedEdgeSpec } from '../network.ts';
import { root, rootSlope, smaller, smallerSlope } from '../smooth.ts';
import { DELTA, MIN_EDGE } from '../tolerances.ts';
import { headsOf, type Law, OPENING, through } from './law.ts';

export function compensatedEdgeLaw(spec: CompensatedEdgeSpec): Law {
  const { k, opening, limit } = spec;
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      const y = parameters[opening]!;
      const d = z[0]! - z[1]!;
      const edge = Math.min(0.9, MIN_EDGE * blend);
      const bare = k * root(d, DELTA * blend);
      const bareSlope = k * rootSlope(d, DELTA * blend);
      const q = d <= 0 ? bare : smaller(bare, limit, edge);
      const slope = y * bareSlope * (d <= 0 ? 1 : smallerSlope(bare, limit, edge));
      out[OPENING] = y;
      through(y * q, slope, -slope, out, gradient);
    },
  };
}
