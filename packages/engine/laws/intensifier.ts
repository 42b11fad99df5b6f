/**
 * Continuous double-acting intensifier of ratio r: p_A <= r (p_P - p_T) + p_T with q_A = q_P/r, q_T = q_P - q_A. As long as p_A is below p_P
 * the oil goes to A through its own check and the piston stands. The piston takes over between 0.3 and 0.2 bar below p_P, before
 * the check closes (its crack, 0.2 bar: common practice, no source), so that a dead-ended A is not left where neither gives oil. Nothing flows from A to P.
 */
import type { IntensifierSpec } from '../network.ts';
import { positive, positiveSlope, ramp, rampSlope, root, rootSlope } from '../smooth.ts';
import { BAND_EDGE, DELTA, EPS } from '../tolerances.ts';
import { headsOf, type Law, OPENING } from './law.ts';

const CRACK = 0.02;
const TAKES_OVER = 0.01;
/** "No loss": 600 L/min at 0.1 bar. */
const FREE = 10 / root(0.01, DELTA);

export function intensifierLaw(spec: IntensifierSpec): Law {
  const { ratio } = spec;
  const piston = FREE / ratio;
  return {
    nodes: [spec.p, spec.a, spec.t],
    heads: headsOf(spec.heads, 3),
    terminals: 3,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, _parameters, blend, out, gradient) {
      const [p, a, t] = [z[0]!, z[1]!, z[2]!];
      const over = p - a - CRACK;
      const q1 = FREE * root(positive(over, EPS * blend), DELTA * blend);
      const q1Slope = FREE * rootSlope(positive(over, EPS * blend), DELTA * blend) * positiveSlope(over, EPS * blend);
      const edge = Math.min(0.5, BAND_EDGE * blend);
      const u = (a - p + CRACK) / TAKES_OVER + 1;
      const gate = ramp(u, edge);
      const gateByA = rampSlope(u, edge) / TAKES_OVER;
      const d = ratio * (p - t) + t - a;
      const full = piston * root(positive(d, EPS * blend), DELTA * blend);
      const fullSlope = piston * rootSlope(positive(d, EPS * blend), DELTA * blend) * positiveSlope(d, EPS * blend);
      const q2 = gate * full;
      const q2ByP = gate * fullSlope * ratio - gateByA * full;
      const q2ByA = -gate * fullSlope + gateByA * full;
      const q2ByT = gate * fullSlope * (1 - ratio);
      out[OPENING] = gate;
      out[0] = q1 + ratio * q2;
      out[1] = -q1 - q2;
      out[2] = -(ratio - 1) * q2;
      gradient[0] = q1Slope + ratio * q2ByP;
      gradient[1] = -q1Slope + ratio * q2ByA;
      gradient[2] = ratio * q2ByT;
      gradient[3] = -q1Slope - q2ByP;
      gradient[4] = q1Slope - q2ByA;
      gradient[5] = -q2ByT;
      gradient[6] = -(ratio - 1) * q2ByP;
      gradient[7] = -(ratio - 1) * q2ByA;
      gradient[8] = -(ratio - 1) * q2ByT;
    },
  };
}
