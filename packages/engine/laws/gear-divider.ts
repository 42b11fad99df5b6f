/**
 * Gear divider: sections on one shaft. Its unknown is the displaced flow n (L/s); q_i = n share_i + g_i (p_P - p_i); torque balance
 * p_P = sum share_i p_i + friction (n/qN)|n/qN|. Combines backwards; a blocked outlet intensifies by 1/share.
 */
import type { GearDividerSpec } from '../network.ts';
import { headsOf, type Law, OPENING } from './law.ts';

export function gearDividerLaw(spec: GearDividerSpec): Law {
  const total = spec.share[0] + spec.share[1];
  const sa = spec.share[0] / total;
  const sb = spec.share[1] / total;
  const [ga, gb] = spec.g;
  const loss = spec.qN > 0 ? spec.friction / (spec.qN * spec.qN) : 0;
  return {
    nodes: [spec.p, spec.a, spec.b],
    heads: headsOf(spec.heads, 3),
    terminals: 3,
    own: 1,
    actuator: -1,
    floor: false,
    joins: true,
    evaluate(z, _parameters, _blend, out, gradient) {
      const p = z[0]!;
      const a = z[1]!;
      const b = z[2]!;
      const n = z[3]!;
      const qa = n * sa + ga * (p - a);
      const qb = n * sb + gb * (p - b);
      out[OPENING] = 1;
      out[0] = qa + qb;
      out[1] = -qa;
      out[2] = -qb;
      out[3] = p - sa * a - sb * b - loss * n * Math.abs(n);
      gradient.set([ga + gb, -ga, -gb, 1, -ga, ga, 0, -sa, -gb, 0, gb, -sb, 1, -sa, -sb, -2 * loss * Math.abs(n)]);
    },
  };
}
