/** How pressures and speeds of a solved state answer to a setting or size: implicit differentiation, one extra solve each. */
import type { Network } from './compile.ts';
import { lawOf } from './laws/index.ts';
import { inputsOf, type Law, MAX_INPUTS, MAX_OUTPUTS, outputsOf } from './laws/law.ts';
import type { ElementSpec } from './network.ts';
import { System } from './residual.ts';
import type { Sensitivity, SensitivityOf, SteadyRequest, SteadyResult } from './results.ts';
import { prepare } from './steady.ts';

/** Relative (for small values absolute) change of a value for the difference quotient of the residual. */
const CHANGE = 1e-6;

/**
 * d(pressures, velocities)/ds at `result` (converged, of `request`) for each s: J dy/ds = -dr/ds, with dr/ds as a central difference.
 * A size that the element does not have, or that is not a number, gives no entry; a singular state gives none at all.
 */
export function sensitivities(net: Network, request: SteadyRequest, result: SteadyResult, of: readonly SensitivityOf[]): Sensitivity[] {
  if (!result.converged) return [];
  const sys = new System(net);
  prepare(sys, request);
  for (let a = 0; a < sys.held.length; a++) sys.held[a] = result.contacts[a] === 'free' ? 0 : 1;
  sys.y.set(result.state);
  sys.parameters = Float64Array.from(net.parameters);
  sys.evaluate();
  if (!sys.lu.factor(sys.j)) return [];
  const found: Sensitivity[] = [];
  for (const one of of) {
    const change = 'parameter' in one ? byParameter(sys, one.parameter) : bySize(sys, one.element, one.size);
    if (!change) continue;
    const d = change.slope;
    for (let i = 0; i < d.length; i++) d[i] = -d[i]!;
    sys.lu.solve(d, d);
    const pressures = new Float64Array(net.spec.nodes.length);
    for (let i = 0; i < net.free; i++) pressures[net.nodeOf[i]!] = d[i]!;
    const velocities = d.slice(net.firstVelocity, net.firstVelocity + sys.held.length);
    found.push({ of: one, value: change.value, pressures, velocities });
  }
  return found;
}

interface Change {
  readonly value: number;
  readonly slope: Float64Array;
}

function byParameter(sys: System, parameter: number): Change | undefined {
  const value = sys.parameters[parameter];
  if (value === undefined) return undefined;
  const step = CHANGE * Math.max(Math.abs(value), 1e-3);
  sys.parameters[parameter] = value + step;
  sys.evaluate();
  const slope = sys.r.slice(0, sys.net.size);
  sys.parameters[parameter] = value - step;
  sys.evaluate();
  for (let i = 0; i < slope.length; i++) slope[i] = (slope[i]! - sys.r[i]!) / (2 * step);
  sys.parameters[parameter] = value;
  return { value, slope };
}

function bySize(sys: System, e: number, size: string): Change | undefined {
  const { net } = sys;
  const spec = net.spec.elements[e];
  if (!spec) return undefined;
  const value = (spec as unknown as Readonly<Record<string, unknown>>)[size];
  if (typeof value !== 'number') return undefined;
  const step = CHANGE * Math.max(Math.abs(value), 1e-3);
  const changed = (to: number): Float64Array => {
    const law = lawOf({ ...spec, [size]: to } as ElementSpec, net.spec.actuators);
    return outputs(sys, e, law);
  };
  const high = changed(value + step);
  const low = changed(value - step);
  const slope = new Float64Array(net.size);
  const law = net.laws[e]!;
  for (let o = 0; o < outputsOf(law); o++) {
    const by = (high[o]! - low[o]!) / (2 * step);
    if (o >= law.terminals) slope[net.ownOf[e]!]! += by;
    else {
      const row = net.unknownOf[law.nodes[o]!]!;
      if (row >= 0) slope[row]! -= by;
    }
  }
  // A held pressure answers to nothing.
  for (let i = 0; i < net.free; i++) if (!Number.isNaN(sys.pinned[i]!)) slope[i] = 0;
  return { value, slope };
}

/** Outputs of a law in the place of element e at the present state. */
function outputs(sys: System, e: number, law: Law): Float64Array {
  const { net } = sys;
  const z = new Float64Array(MAX_INPUTS);
  const out = new Float64Array(MAX_OUTPUTS);
  law.nodes.forEach((node, i) => {
    z[i] = sys.p[node]! - law.heads[i]!;
  });
  let at = law.nodes.length;
  if (law.own) z[at++] = sys.y[net.ownOf[e]!]!;
  if (law.actuator >= 0) z[at] = sys.x[law.actuator]!;
  law.evaluate(z, sys.parameters, 1, out, new Float64Array(inputsOf(law) * MAX_OUTPUTS));
  return out;
}
