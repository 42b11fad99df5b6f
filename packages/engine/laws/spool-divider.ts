/**
 * Spool divider. Its unknown is the total flow Q; q_A : q_B = share within +- error, the lower-pressured outlet getting more (full error at
 * 100 bar apart); p_P = max(p_A, p_B) + drop (Q/qN)|Q/qN|. Below 20 % of qN the spool no longer divides and the lower outlet gets the flow.
 * Across a blocked spool leaks error x qN per 100 bar. Backwards it combines (min instead of max), or is closed.
 */
import type { SpoolDividerSpec } from '../network.ts';
import { positive, positiveSlope, ramp, rampSlope, sliding, slidingSlope } from '../smooth.ts';
import { headsOf, type Law, OPENING } from './law.ts';

/** Pressure apart at which the error is full, MPa. */
const FULL_ERROR = 10;
/** Share of qN below which it does not divide, and within which its sense of direction turns. */
const DIVIDES_FROM = 0.2;
const TURNS_WITHIN = 0.02;
/** Resistance of a spool closed to reverse flow, MPa s/L. */
const CLOSED = 1e6;
const CLOSED_EDGE = 1e-6;
/** Rounding of |p_A - p_B|, MPa. */
const APART = 1e-3;

export function spoolDividerLaw(spec: SpoolDividerSpec): Law {
  const { error, drop, combines } = spec;
  const qN = spec.qN > 0 ? spec.qN : 1;
  const sa = spec.share[0] / (spec.share[0] + spec.share[1]);
  const leak = (error * qN) / FULL_ERROR;
  return {
    nodes: [spec.p, spec.a, spec.b],
    heads: headsOf(spec.heads, 3),
    terminals: 3,
    own: 1,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, _parameters, blend, out, gradient) {
      const p = z[0]!;
      const a = z[1]!;
      const b = z[2]!;
      const q = z[3]!;
      const edge = Math.min(0.5, 0.25 * blend);
      const u = 0.5 + (b - a) / (2 * FULL_ERROR);
      const bias = 2 * ramp(u, edge) - 1;
      const biasByB = rampSlope(u, edge) / FULL_ERROR;
      const turn = sliding(q, TURNS_WITHIN * qN * blend);
      const turnSlope = slidingSlope(q, TURNS_WITHIN * qN * blend);
      const flow = Math.abs(q) / (DIVIDES_FROM * qN);
      const divides = ramp(flow, edge);
      const dividesByQ = (rampSlope(flow, edge) * Math.sign(q)) / (DIVIDES_FROM * qN);
      // While it divides: share + error x bias; else half + half x bias. Both turn over with the direction of flow.
      const lean = bias * turn;
      const dividing = sa + error * lean;
      const open = 0.5 + 0.5 * lean;
      const share = divides * dividing + (1 - divides) * open;
      const shareByLean = divides * error + (1 - divides) * 0.5;
      const shareByB = shareByLean * biasByB * turn;
      const shareByQ = shareByLean * bias * turnSlope + dividesByQ * (dividing - open);
      const qa = share * q;
      const qb = q - qa;
      const qaByQ = share + q * shareByQ;
      const qaByB = q * shareByB;
      const apart = Math.sqrt((a - b) * (a - b) + APART * APART) - APART;
      const apartByA = (a - b) / (apart + APART);
      const ratio = q / qN;
      const loss = drop * ratio * (Math.abs(ratio) + 0.01);
      const lossByQ = (drop * (2 * Math.abs(ratio) + 0.01)) / qN;
      let back = 0;
      let backByQ = 0;
      if (!combines) {
        back = CLOSED * positive(-q, CLOSED_EDGE);
        backByQ = -CLOSED * positiveSlope(-q, CLOSED_EDGE);
      }
      const leakA = leak * (p - a);
      const leakB = leak * (p - b);
      out[OPENING] = divides;
      out[0] = q + leakA + leakB;
      out[1] = -qa - leakA;
      out[2] = -qb - leakB;
      out[3] = p - 0.5 * (a + b) - 0.5 * apart * turn - loss + back;
      gradient[0] = 2 * leak;
      gradient[1] = -leak;
      gradient[2] = -leak;
      gradient[3] = 1;
      gradient[4] = -leak;
      gradient[5] = qaByB + leak;
      gradient[6] = -qaByB;
      gradient[7] = -qaByQ;
      gradient[8] = -leak;
      gradient[9] = -qaByB;
      gradient[10] = qaByB + leak;
      gradient[11] = qaByQ - 1;
      gradient[12] = 1;
      gradient[13] = -0.5 - 0.5 * apartByA * turn;
      gradient[14] = -0.5 + 0.5 * apartByA * turn;
      gradient[15] = -0.5 * apart * turnSlope - lossByQ + backByQ;
    },
  };
}
