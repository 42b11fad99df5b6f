/** Shuttle: the higher of a, b is joined to c; within 0.1 bar of each other both, in proportion. */
import type { ShuttleSpec } from '../network.ts';
import { ramp, rampSlope, root, rootSlope } from '../smooth.ts';
import { BAND_EDGE, DELTA } from '../tolerances.ts';
import { headsOf, type Law, OPENING } from './law.ts';

/** Pressure difference within which both seats are open, MPa. */
const BOTH = 0.01;

export function shuttleLaw(spec: ShuttleSpec): Law {
  const { k } = spec;
  return {
    nodes: [spec.a, spec.b, spec.c],
    heads: headsOf(spec.heads, 3),
    terminals: 3,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, _parameters, blend, out, gradient) {
      const edge = Math.min(0.5, BAND_EDGE * blend);
      const u = 0.5 + (z[0]! - z[1]!) / (2 * BOTH);
      const y = ramp(u, edge);
      const ySlope = rampSlope(u, edge) / (2 * BOTH);
      const fullA = k * root(z[0]! - z[2]!, DELTA * blend);
      const fullB = k * root(z[1]! - z[2]!, DELTA * blend);
      const slopeA = y * k * rootSlope(z[0]! - z[2]!, DELTA * blend);
      const slopeB = (1 - y) * k * rootSlope(z[1]! - z[2]!, DELTA * blend);
      out[OPENING] = y;
      out[0] = y * fullA;
      out[1] = (1 - y) * fullB;
      out[2] = -y * fullA - (1 - y) * fullB;
      gradient[0] = slopeA + ySlope * fullA;
      gradient[1] = -ySlope * fullA;
      gradient[2] = -slopeA;
      gradient[3] = -ySlope * fullB;
      gradient[4] = slopeB + ySlope * fullB;
      gradient[5] = -slopeB;
      for (let i = 0; i < 3; i++) gradient[6 + i] = -gradient[i]! - gradient[3 + i]!;
    },
  };
}
