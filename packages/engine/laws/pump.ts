/**
 * Pump s to p: q = qth running stroke - g (p_P - p_S); the leak goes to l, or back to s. Stroke: 1, or by a pressure compensator
 * ramp((c - (p_P - p_ref))/band) not below `smallest`, and by load sensing ramp((p_LS + margin - p_P)/2 bar): the smaller of the two.
 */
import type { PumpSpec } from '../network.ts';
import { positive, positiveSlope, ramp, rampSlope, smaller, smallerSlope } from '../smooth.ts';
import { BAND_EDGE, EPS, MIN_EDGE } from '../tolerances.ts';
import { headsOf, type Law, MAX_INPUTS, OPENING } from './law.ts';

/** Load sensing goes from full stroke to none within 2 bar. */
const SENSING_BAND = 0.2;

export function pumpLaw(spec: PumpSpec): Law {
  const { qth, leak, running, compensator, sensing } = spec;
  const nodes = [spec.p, spec.s];
  const cased = spec.l !== undefined;
  if (spec.l !== undefined) nodes.push(spec.l);
  const terminals = nodes.length;
  const ref = cased ? 2 : 1;
  let xAt = -1;
  if (compensator?.x !== undefined) xAt = nodes.push(compensator.x) - 1;
  let lsAt = -1;
  if (sensing) lsAt = nodes.push(sensing.ls) - 1;
  const count = nodes.length;
  const strokeBy = new Float64Array(MAX_INPUTS);
  // The spec gives heads as s, p, l; the law works outlet first.
  const given = headsOf(spec.heads, count);
  const heads = [given[1]!, given[0]!, ...given.slice(2)];
  return {
    nodes,
    heads,
    terminals,
    own: 0,
    actuator: -1,
    floor: true,
    joins: false,
    evaluate(z, parameters, blend, out, gradient) {
      const edge = Math.min(0.5, BAND_EDGE * blend);
      let stroke = 1;
      strokeBy.fill(0);
      if (compensator) {
        let setting = parameters[compensator.set]!;
        let byX = 0;
        if (xAt >= 0) {
          const over = setting - (z[xAt]! + (compensator.xAdds ?? 0));
          byX = positiveSlope(over, EPS * blend);
          setting -= positive(over, EPS * blend);
        }
        const band = Math.max(parameters[compensator.band]!, 1e-6);
        const u = (setting - (z[0]! - z[ref]!)) / band;
        const y = ramp(u, edge);
        const least = compensator.smallest;
        const slope = (rampSlope(u, edge) * positiveSlope(y - least, edge)) / band;
        stroke = least + positive(y - least, edge);
        strokeBy[0] = -slope;
        strokeBy[ref]! += slope;
        if (xAt >= 0) strokeBy[xAt]! += slope * byX;
      }
      if (sensing) {
        const u = (z[lsAt]! + sensing.margin - z[0]!) / SENSING_BAND;
        const y = ramp(u, edge);
        const slope = rampSlope(u, edge) / SENSING_BAND;
        const byComp = smallerSlope(stroke, y, MIN_EDGE);
        const bySensing = smallerSlope(y, stroke, MIN_EDGE);
        stroke = smaller(stroke, y, MIN_EDGE);
        for (let i = 0; i < count; i++) strokeBy[i]! *= byComp;
        strokeBy[0]! -= bySensing * slope;
        strokeBy[lsAt]! += bySensing * slope;
      }
      const full = qth * parameters[running]!;
      const q = full * stroke;
      const back = leak * (z[0]! - z[1]!);
      out[OPENING] = stroke;
      out[0] = back - q;
      out[1] = cased ? q : q - back;
      for (let i = 0; i < count; i++) {
        gradient[i] = -full * strokeBy[i]!;
        gradient[count + i] = full * strokeBy[i]!;
      }
      gradient[0]! += leak;
      gradient[1]! -= leak;
      if (cased) {
        out[2] = -back;
        for (let i = 0; i < count; i++) gradient[2 * count + i] = 0;
        gradient[2 * count] = -leak;
        gradient[2 * count + 1] = leak;
      } else {
        gradient[count]! -= leak;
        gradient[count + 1]! += leak;
      }
    },
  };
}
