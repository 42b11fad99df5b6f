/**
 * Relief valve P to T. Opens at p_o = min(set + p_ref, p_x + vented); then linear: q_s = qN (p_P - p_o)/max(override p_e, 0.5 bar) with
 * p_e = min(set, p_x + vented); the fully open body is the floor: q = the smaller of q_s and path(p_P - p_T). Never backwards.
 */
import type { ReliefSpec } from '../network.ts';
import { positive, positiveSlope, root, rootSlope, smaller, smallerSlope } from '../smooth.ts';
import { DELTA, EPS, LEAST_RELIEF_BAND, MIN_EDGE } from '../tolerances.ts';
import { headsOf, type Law, OPENING, shut } from './law.ts';

export function reliefLaw(spec: ReliefSpec): Law {
  const { set, vented, override, qN, k } = spec;
  const remote = spec.x !== undefined;
  const nodes = remote ? [spec.p, spec.t, spec.ref, spec.x] : [spec.p, spec.t, spec.ref];
  const count = nodes.length;
  return {
    nodes,
    heads: headsOf(spec.heads, count),
    terminals: 2,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      const setting = parameters[set]!;
      let opens = setting + z[2]!;
      let opensByRef = 1;
      let opensByX = 0;
      let effective = setting;
      let effectiveByX = 0;
      if (remote) {
        // min(u, v) = u - positive(u - v): exact where u <= v, so a blocked X leaves the setting untouched.
        const over = opens - (z[3]! + vented);
        opensByX = positiveSlope(over, EPS * blend);
        opensByRef = 1 - opensByX;
        opens -= positive(over, EPS * blend);
        const overSet = setting - (z[3]! + vented);
        effectiveByX = positiveSlope(overSet, EPS * blend);
        effective -= positive(overSet, EPS * blend);
      }
      if (z[0]! <= opens) return shut(out, gradient, count);
      const wanted = override * effective;
      const band = Math.max(wanted, LEAST_RELIEF_BAND);
      const bandByX = wanted > LEAST_RELIEF_BAND ? override * effectiveByX : 0;
      const lift = z[0]! - opens;
      const share = positive(lift, EPS * blend) / band;
      const linear = qN * share;
      const liftSlope = (qN * positiveSlope(lift, EPS * blend)) / band;
      const d = z[0]! - z[1]!;
      const driving = positive(d, EPS * blend);
      const body = k * root(driving, DELTA * blend);
      const bodySlope = k * rootSlope(driving, DELTA * blend) * positiveSlope(d, EPS * blend);
      const q = smaller(linear, body, MIN_EDGE);
      const byLinear = smallerSlope(linear, body, MIN_EDGE);
      const byBody = smallerSlope(body, linear, MIN_EDGE);
      out[OPENING] = body > 0 ? q / body : 0;
      out[0] = q;
      out[1] = -q;
      gradient[0] = byLinear * liftSlope + byBody * bodySlope;
      gradient[1] = -byBody * bodySlope;
      gradient[2] = -byLinear * liftSlope * opensByRef;
      if (remote) gradient[3] = byLinear * (-liftSlope * opensByX - (linear / band) * bandByX);
      for (let i = 0; i < count; i++) gradient[count + i] = -gradient[i]!;
      return true;
    },
  };
}
