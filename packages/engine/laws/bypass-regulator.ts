/**
 * Three-port flow control: a to b as an orifice of `set` at `needs`; the spool lets the excess go from a to t so that
 * p_a = p_b + needs, opening fully within a tenth of `needs` (at least 0.5 bar) above that.
 */
import type { BypassRegulatorSpec } from '../network.ts';
import { positive, positiveSlope, ramp, rampSlope, root, rootSlope } from '../smooth.ts';
import { BAND_EDGE, DELTA, EPS } from '../tolerances.ts';
import { headsOf, type Law, OPENING } from './law.ts';

/** Fully open spool where the caller says nothing: 20 L/s at 1 MPa. */
const OPEN_SPOOL = 20;

export function bypassRegulatorLaw(spec: BypassRegulatorSpec): Law {
  const { set, needs } = spec;
  const kBypass = spec.kBypass ?? OPEN_SPOOL;
  const atNeeds = root(needs, DELTA);
  const band = Math.max(0.1 * needs, 0.05);
  return {
    nodes: [spec.a, spec.b, spec.t],
    heads: headsOf(spec.heads, 3),
    terminals: 3,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      const setting = parameters[set]!;
      const d = z[0]! - z[1]!;
      const q = (setting * root(d, DELTA * blend)) / atNeeds;
      const slope = (setting * rootSlope(d, DELTA * blend)) / atNeeds;
      const edge = Math.min(0.5, BAND_EDGE * blend);
      const y = ramp((d - needs) / band, edge);
      const ySlope = rampSlope((d - needs) / band, edge) / band;
      const toTank = z[0]! - z[2]!;
      const driving = positive(toTank, EPS * blend);
      const full = kBypass * root(driving, DELTA * blend);
      const byTank = y * kBypass * rootSlope(driving, DELTA * blend) * positiveSlope(toTank, EPS * blend);
      out[OPENING] = y;
      out[0] = q + y * full;
      out[1] = -q;
      out[2] = -y * full;
      gradient[0] = slope + ySlope * full + byTank;
      gradient[1] = -slope - ySlope * full;
      gradient[2] = -byTank;
      gradient[3] = -slope;
      gradient[4] = slope;
      gradient[5] = 0;
      gradient[6] = -ySlope * full - byTank;
      gradient[7] = ySlope * full;
      gradient[8] = byTank;
    },
  };
}
