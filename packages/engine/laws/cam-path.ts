/** Passage whose opening is piecewise linear in an actuator's position (cam valves). Knots are breakpoints of that actuator. */
import type { CamPathSpec } from '../network.ts';
import { positive, positiveSlope, root, rootSlope } from '../smooth.ts';
import { DELTA, EPS } from '../tolerances.ts';
import { headsOf, type Law, OPENING } from './law.ts';

export function camPathLaw(spec: CamPathSpec): Law {
  const { k, at, opening } = spec;
  const factor = spec.factor ?? -1;
  const oneWay = spec.oneWay ?? false;
  const last = at.length - 1;
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 0,
    actuator: spec.actuator,
    floor: true,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      const x = z[2]!;
      let y = last < 0 ? 1 : opening[last]!;
      let ySlope = 0;
      if (last >= 0 && x <= at[0]!) y = opening[0]!;
      else {
        for (let i = 1; i <= last; i++) {
          const from = at[i - 1]!;
          const to = at[i]!;
          if (x <= to && to > from) {
            ySlope = (opening[i]! - opening[i - 1]!) / (to - from);
            y = opening[i - 1]! + ySlope * (x - from);
            break;
          }
        }
      }
      if (factor >= 0) {
        y *= parameters[factor]!;
        ySlope *= parameters[factor]!;
      }
      const d = z[0]! - z[1]!;
      const driving = oneWay ? positive(d, EPS * blend) : d;
      const full = k * root(driving, DELTA * blend);
      const slope = y * k * rootSlope(driving, DELTA * blend) * (oneWay ? positiveSlope(d, EPS * blend) : 1);
      out[OPENING] = y;
      out[0] = y * full;
      out[1] = -y * full;
      gradient[0] = slope;
      gradient[1] = -slope;
      gradient[2] = ySlope * full;
      gradient[3] = -slope;
      gradient[4] = slope;
      gradient[5] = -ySlope * full;
    },
  };
}
