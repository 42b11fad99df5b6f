/**
 * End cushion: oil leaving the chamber (a to b) within L of the stop passes K = kMin + 19 kMin (s/L)^2, s = distance left;
 * elsewhere, and when entering (b to a), the free passage.
 */
import type { CushionSpec } from '../network.ts';
import { root, rootSlope } from '../smooth.ts';
import { DELTA } from '../tolerances.ts';
import { headsOf, type Law, OPENING } from './law.ts';

/** `stop`: position of the end stop it belongs to, m. */
export function cushionLaw(spec: CushionSpec, stop: number): Law {
  const { kMin, kFree, length } = spec;
  const sign = spec.end === 'extended' ? -1 : 1;
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 0,
    actuator: spec.actuator,
    floor: true,
    joins: true,
    evaluate(z, _parameters, blend, out, gradient) {
      const d = z[0]! - z[1]!;
      const left = Math.max(0, sign * (z[2]! - stop));
      const inside = d > 0 && left < length;
      let k = kFree;
      let kByX = 0;
      if (inside) {
        const share = left / length;
        const throttled = kMin + 19 * kMin * share * share;
        if (throttled < kFree) {
          k = throttled;
          kByX = left > 0 ? (sign * 38 * kMin * share) / length : 0;
        }
      }
      const q = k * root(d, DELTA * blend);
      const slope = k * rootSlope(d, DELTA * blend);
      const byX = kByX * root(d, DELTA * blend);
      out[OPENING] = kFree > 0 ? k / kFree : 0;
      out[0] = q;
      out[1] = -q;
      gradient[0] = slope;
      gradient[1] = -slope;
      gradient[2] = byX;
      gradient[3] = -slope;
      gradient[4] = slope;
      gradient[5] = -byX;
    },
  };
}
