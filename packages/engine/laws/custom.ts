/** An element whose law the caller supplies. It has no leakage floor and no opening. */
import type { CustomSpec } from '../network.ts';
import { headsOf, type Law, OPENING } from './law.ts';

export function customLaw(spec: CustomSpec): Law {
  const { evaluate } = spec;
  return {
    nodes: spec.nodes,
    heads: headsOf(spec.heads, spec.nodes.length),
    terminals: spec.terminals,
    own: 0,
    actuator: spec.actuator ?? -1,
    floor: false,
    joins: true,
    always: true,
    evaluate(z, parameters, _blend, out, gradient) {
      out[OPENING] = 1;
      evaluate(z, parameters, out, gradient);
    },
  };
}
