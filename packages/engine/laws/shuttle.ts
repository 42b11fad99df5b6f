/**
 * Shuttle: the higher of a, b is joined to c; within 0.1 bar of each other both, in proportion. A seat lets oil in to c freely; oil
 * comes back only while c is above both, so that nothing ever passes from one inlet to the other.
 */
import type { ShuttleSpec } from '../network.ts';
import { positive, positiveSlope, ramp, rampSlope, root, rootSlope } from '../smooth.ts';
import { BAND_EDGE, DELTA, EPS } from '../tolerances.ts';
import { headsOf, type Law, OPENING } from './law.ts';

/** Pressure difference within which both seats are open, MPa. */
const BOTH = 0.01;
/** Width in which the higher of two pressures is rounded, MPa: 0.005 bar above the true one where they are equal. */
const HIGHER = 2e-3;

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
      const [a, b, c] = [z[0]!, z[1]!, z[2]!];
      const edge = Math.min(0.5, BAND_EDGE * blend);
      const u = 0.5 + (a - b) / (2 * BOTH);
      const y = ramp(u, edge);
      const ySlope = rampSlope(u, edge) / (2 * BOTH);
      // The higher of a and b: b + d rounded.
      const width = HIGHER * blend;
      const d = a - b;
      const byA = d <= -width ? 0 : d >= width ? 1 : (d + width) / (2 * width);
      const higher = b + (d <= -width ? 0 : d >= width ? d : (d + width) ** 2 / (4 * width));
      const flow = (x: number): number => k * root(positive(x, EPS * blend), DELTA * blend);
      const slope = (x: number): number => k * rootSlope(positive(x, EPS * blend), DELTA * blend) * positiveSlope(x, EPS * blend);
      const inA = slope(a - c);
      const inB = slope(b - c);
      const back = flow(c - higher);
      const backSlope = slope(c - higher);
      out[OPENING] = y;
      out[0] = flow(a - c) - y * back;
      out[1] = flow(b - c) - (1 - y) * back;
      out[2] = -out[0]! - out[1]!;
      gradient[0] = inA - ySlope * back + y * backSlope * byA;
      gradient[1] = ySlope * back + y * backSlope * (1 - byA);
      gradient[2] = -inA - y * backSlope;
      gradient[3] = ySlope * back + (1 - y) * backSlope * byA;
      gradient[4] = inB - ySlope * back + (1 - y) * backSlope * (1 - byA);
      gradient[5] = -inB - (1 - y) * backSlope;
      for (let i = 0; i < 3; i++) gradient[6 + i] = -gradient[i]! - gradient[3 + i]!;
    },
  };
}
