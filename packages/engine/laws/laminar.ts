/** Leakage path: q = g d, with an optional factor (viscosity, leakage on or off). */
import type { LaminarSpec } from '../network.ts';
import { headsOf, type Law, OPENING, through } from './law.ts';

export function laminarLaw(spec: LaminarSpec): Law {
  const { g } = spec;
  const factor = spec.factor ?? -1;
  return {
    nodes: [spec.a, spec.b],
    heads: headsOf(spec.heads, 2),
    terminals: 2,
    own: 0,
    actuator: -1,
    floor: true,
    joins: true,
    evaluate(z, parameters, _blend, out, gradient) {
      const conductance = factor < 0 ? g : g * parameters[factor]!;
      out[OPENING] = 1;
      through(conductance * (z[0]! - z[1]!), conductance, -conductance, out, gradient);
    },
  };
}
