/**
 * Pressure-opened passage: y = ramp((sum w_i p_i - set)/band), q = y path(d). Unloading, sequence, counterbalance, pilot check
 * (set and weights from the balance of forces on the spool), reducing (opens as its outlet falls).
 */
import type { PilotedSpec } from '../network.ts';
import { positive, positiveSlope, ramp, rampSlope, root, rootSlope } from '../smooth.ts';
import { BAND_EDGE, DELTA, EPS } from '../tolerances.ts';
import { headsOf, type Law, OPENING, shut } from './law.ts';

export function pilotedLaw(spec: PilotedSpec): Law {
  const { k, set, band, oneWay } = spec;
  const bit = spec.bit ?? -1;
  const setWhenOn = spec.setWhenOn ?? set;
  const weights = spec.pilots.map((pilot) => pilot.weight);
  const count = 2 + weights.length;
  return {
    nodes: [spec.a, spec.b, ...spec.pilots.map((pilot) => pilot.node)],
    heads: [...headsOf(spec.heads, 2), ...spec.pilots.map((pilot) => pilot.head ?? 0)],
    terminals: 2,
    own: 0,
    actuator: -1,
    // A floor across it would fill a dead end past the pressure at which the valve has closed.
    floor: false,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      let pilot = -parameters[bit >= 0 && parameters[bit]! > 0.5 ? setWhenOn : set]!;
      for (let i = 0; i < weights.length; i++) pilot += weights[i]! * z[2 + i]!;
      if (pilot <= 0) return shut(out, gradient, count);
      const width = Math.max(parameters[band]!, 1e-6);
      const edge = Math.min(0.5, BAND_EDGE * blend);
      const y = ramp(pilot / width, edge);
      const d = z[0]! - z[1]!;
      const driving = oneWay ? positive(d, EPS * blend) : d;
      const full = k * root(driving, DELTA * blend);
      const slope = y * k * rootSlope(driving, DELTA * blend) * (oneWay ? positiveSlope(d, EPS * blend) : 1);
      const perPilot = (full * rampSlope(pilot / width, edge)) / width;
      out[OPENING] = y;
      out[0] = y * full;
      out[1] = -y * full;
      gradient[0] = slope;
      gradient[1] = -slope;
      gradient[count] = -slope;
      gradient[count + 1] = slope;
      for (let i = 0; i < weights.length; i++) {
        gradient[2 + i] = perPilot * weights[i]!;
        gradient[count + 2 + i] = -perPilot * weights[i]!;
      }
      return true;
    },
  };
}
