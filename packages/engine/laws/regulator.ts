/**
 * Compensated flow control a to b: the setting from the pressure it needs on, below it an orifice through that point,
 * rounded over 1 % of the setting. b to a: the same orifice, unregulated.
 */
import type { RegulatorSpec } from '../network.ts';
import { capped, cappedSlope, root, rootSlope } from '../smooth.ts';
import { DELTA, REGULATOR_EDGE } from '../tolerances.ts';
import { headsOf, type Law, OPENING, through } from './law.ts';

export function regulatorLaw(spec: RegulatorSpec): Law {
  const { set, needs } = spec;
  const atNeeds = root(needs, DELTA);
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, parameters, blend, out, gradient) {
      const setting = parameters[set]!;
      const d = z[0]! - z[1]!;
      const edge = Math.min(0.9, REGULATOR_EDGE * blend);
      const u = root(d, DELTA * blend) / atNeeds;
      const slope = (setting * cappedSlope(u, edge) * rootSlope(d, DELTA * blend)) / atNeeds;
      // Share of the orifice that the compensator leaves open.
      out[OPENING] = setting <= 0 ? 0 : u > 1 ? 1 / u : 1;
      through(setting * capped(u, edge), slope, -slope, out, gradient);
    },
  };
}
