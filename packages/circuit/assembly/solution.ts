/** From the engine's result to a solution in SI and names. */
import { magnitude, type Network, type SteadyResult } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import { translate } from './diagnosis.ts';
import type { Setting, Solution, Stand } from './machine.ts';
import { chargeIn, forceAt, ofBody, positionOf } from './setting.ts';
import { fromKilo, fromLitresPerSecond, fromMPa, toMPa } from './units.ts';

/** Pressure difference below which friction that grows with it is rounded, MPa (as in the engine). */
const DELTA = 0.01;

/** Where bodies and gas charges stand: m or rad by body index, oil m3 and absolute pressure Pa by accumulator index. */
export interface Standing {
  readonly positions: readonly number[];
  readonly oil: readonly { readonly oil: number; readonly pressure: number }[];
}
export const standingOf = (assembled: Assembled, setting: Setting): Standing => ({
  positions: assembled.bodies.map((b) => positionOf(b, setting)),
  oil: assembled.gases.map((g) => chargeIn(g, setting)),
});

export function solutionOf(
  assembled: Assembled,
  network: Network,
  setting: Setting,
  result: SteadyResult,
  standing: Standing = standingOf(assembled, setting),
  parameters: Float64Array = network.parameters,
): Solution {
  const pressures: Record<string, number> = {};
  for (const [net, node] of assembled.nodeOf) pressures[net] = fromMPa(result.pressures[node] ?? 0);
  const flows = flowsOf(assembled, network, standing, result);
  const openings: Record<string, number> = {};
  for (const o of assembled.openings) openings[o.component] = result.openings[o.element] ?? 0;
  const lifting = assembled.liftings.filter((l) => terminalFlow(result, l.element, 0) > l.above).map((l) => l.component);

  const velocities: Record<string, number> = {};
  const positions: Record<string, number> = {};
  const forces: Record<string, number> = {};
  const stopForces: Record<string, number> = {};
  assembled.bodies.forEach((body, i) => {
    const x = standing.positions[i] ?? 0;
    const v = result.velocities[i] ?? 0;
    velocities[body.id] = v;
    positions[body.id] = x;
    const locked = result.contacts[i] === 'locked';
    const pressed = (result.pressureForces[i] ?? 0) + (body.spring === undefined ? 0 : forceAt(body.spring, x));
    stopForces[body.id] = fromKilo(result.stopForces[i] ?? 0);
    const own = ownFriction(assembled, i, result);
    if (locked) {
      // What it would press with against a stop: friction takes its part of the force there is.
      forces[body.id] = Math.sign(pressed) * Math.max(0, Math.abs(fromKilo(pressed)) - own);
      return;
    }
    const load = ofBody(setting.loads, body);
    const total = own + (load?.friction ?? 0);
    const friction = sealAsResist(assembled, i, setting, x, v, fromKilo(result.frictionForces[i] ?? 0), own, total);
    forces[body.id] = fromKilo(pressed + (result.stopForces[i] ?? 0)) + friction;
  });

  const shaft: Record<string, number> = {};
  for (const pump of assembled.pumps) {
    const spec = assembled.specs[pump.element];
    if (spec?.type !== 'pump') continue;
    const dp = (result.pressures[spec.p] ?? 0) - (result.pressures[spec.s] ?? 0);
    const running = setting.drives[pump.drive] !== false;
    // Flow through the pumping chambers: what leaves at P and what leaks back. 1 MPa x 1 L/s = 1 kW.
    const displaced = running ? Math.max(0, -portFlow(network, result, pump.element, spec.p) + spec.leak * dp) : 0;
    const watts = fromKilo((displaced * Math.max(0, dp)) / pump.mechanical);
    shaft[pump.component] = watts;
    shaft[pump.drive] = (shaft[pump.drive] ?? 0) + watts;
  }
  const oil: Record<string, number> = {};
  const gasPressures: Record<string, number> = {};
  assembled.gases.forEach((g, i) => {
    oil[g.component] = standing.oil[i]?.oil ?? 0;
    gasPressures[g.component] = standing.oil[i]?.pressure ?? g.precharge;
  });
  const stands: Record<string, Stand> = {};
  for (const v of assembled.valves) stands[v.component] = setting.valves[v.component] ?? { position: v.rest };
  const bits: Record<string, boolean> = {};
  for (const m of assembled.memories) bits[m.component] = setting.bits[m.component] === true;

  const diagnosis = translate(assembled, result.diagnosis, result, parameters, stands);
  const undetermined: Record<string, { low: number; high: number }> = {};
  for (const d of diagnosis) if (d.kind === 'CLOSED VOLUME') for (const net of d.nets) undetermined[net] = { low: d.low, high: d.high };
  return {
    solved: result.converged,
    pressures,
    undetermined,
    flows,
    openings,
    lifting,
    velocities,
    positions,
    forces,
    stopForces,
    shaft,
    oil,
    gasPressures,
    stands,
    bits,
    diagnosis,
    remarks: [],
    iterations: result.iterations,
  };
}

export const terminalFlow = (result: SteadyResult, element: number, terminal: number): number =>
  result.flows[(result.elementStart[element] ?? 0) + terminal] ?? 0;

/** Flow into an element at the terminal that lies at a node, L/s. */
export function portFlow(network: Network, result: SteadyResult, element: number, node: number): number {
  const law = network.laws[element];
  if (law === undefined) return 0;
  const t = law.nodes.indexOf(node);
  return t >= 0 && t < law.terminals ? terminalFlow(result, element, t) : 0;
}

/** Ports at the terminals as the engine orders them: a pump's outlet comes first there. */
export function terminalPorts(assembled: Assembled, network: Network, element: number): readonly (string | undefined)[] {
  const ports = assembled.elements[element]?.ports ?? [];
  const spec = assembled.specs[element];
  if (spec?.type === 'pump' && spec.p !== spec.s && network.laws[element]?.nodes[0] === spec.p)
    return [ports[1], ports[0], ...ports.slice(2)];
  return ports;
}

/** Which key of `flows` each terminal, chamber and charge adds to: the same for every solution of a network. */
interface FlowKeys {
  readonly keys: readonly string[];
  /** By place in the engine's flows; -1: an inner terminal. */
  readonly ofTerminal: Int32Array;
  readonly ofChamber: Int32Array;
  readonly ofGas: Int32Array;
}
const flowKeys = new WeakMap<Network, FlowKeys>();

function flowKeysOf(assembled: Assembled, network: Network, result: SteadyResult): FlowKeys {
  const there = flowKeys.get(network);
  if (there !== undefined) return there;
  const keys: string[] = [];
  const index = new Map<string, number>();
  const of = (key: string): number => {
    const known = index.get(key);
    if (known !== undefined) return known;
    index.set(key, keys.length);
    return keys.push(key) - 1;
  };
  const ofTerminal = new Int32Array(result.flows.length).fill(-1);
  for (const [e, note] of assembled.elements.entries()) {
    const first = result.elementStart[e] ?? 0;
    if (note.words === 'line') ofTerminal[first] = of(note.component);
    else {
      for (const [t, port] of terminalPorts(assembled, network, e).entries()) {
        if (port !== undefined) ofTerminal[first + t] = of(`${note.component}.${port}`);
      }
    }
  }
  const made: FlowKeys = {
    keys,
    ofTerminal,
    ofChamber: Int32Array.from(assembled.chambers, (c) => (c.port === undefined ? -1 : of(`${c.component}.${c.port}`))),
    ofGas: Int32Array.from(assembled.gases, (g) => of(`${g.component}.P`)),
  };
  flowKeys.set(network, made);
  return made;
}

function flowsOf(assembled: Assembled, network: Network, standing: Standing, result: SteadyResult): Record<string, number> {
  const { keys, ofTerminal, ofChamber, ofGas } = flowKeysOf(assembled, network, result);
  const sums = new Float64Array(keys.length + 1);
  // Inner terminals go to a spare place past the last.
  const add = (key: number, litres: number): void => {
    const at = key < 0 ? keys.length : key;
    sums[at] = (sums[at] ?? 0) + litres;
  };
  for (let t = 0; t < ofTerminal.length; t++) add(ofTerminal[t] ?? -1, result.flows[t] ?? 0);
  for (const [i, c] of assembled.chambers.entries()) {
    add(ofChamber[i] ?? -1, areaAt(c, standing.positions[c.body] ?? 0) * (result.velocities[c.body] ?? 0));
  }
  for (let g = 0; g < ofGas.length; g++) add(ofGas[g] ?? -1, result.gasFlows[g] ?? 0);
  const flows: Record<string, number> = {};
  for (let k = 0; k < keys.length; k++) flows[keys[k] ?? ''] = fromLitresPerSecond(sums[k] ?? 0);
  return flows;
}

/** Area of a chamber at a position (telescopic: of the stage that moves there); engine units, + outward. */
export function areaAt(chamber: Assembled['chambers'][number], x: number): number {
  const { stages } = chamber;
  if (stages === undefined) return chamber.area;
  let area = stages.area[0] ?? 0;
  stages.at.forEach((at, i) => {
    if (x >= at) area = stages.area[i] ?? area;
  });
  return area;
}

/** Friction of the actuator itself (seals, motor, brake) that can act, N or N.m. */
function ownFriction(assembled: Assembled, i: number, result: SteadyResult): number {
  const body = assembled.bodies[i];
  const spec = assembled.actuators[i];
  let own = (body?.sealFriction ?? 0) + brakeTorque(assembled, i, result);
  const [first, second] = spec?.chambers ?? [];
  if (spec?.pressureFriction !== undefined && first !== undefined && second !== undefined) {
    const d = (result.pressures[first.node] ?? 0) - (result.pressures[second.node] ?? 0);
    own += fromKilo(spec.pressureFriction * magnitude(d, DELTA));
  }
  return own;
}

/** The part of the friction acting on the body that is the actuator's own, N. In states seal friction is a resistance of one direction. */
function sealAsResist(
  assembled: Assembled,
  i: number,
  setting: Setting,
  x: number,
  v: number,
  acting: number,
  own: number,
  total: number,
): number {
  const body = assembled.bodies[i];
  if (body === undefined) return 0;
  if (setting.sealFriction === 'not with load') {
    const fixed = ofBody(setting.loads, body)?.fixed ?? [];
    const pushes = fixed.reduce((sum, t) => sum + forceAt(t, x), 0);
    if (Math.abs(pushes) > 1) return v * pushes < 0 && Math.abs(v) > 3e-5 ? -Math.sign(v) * body.sealFriction : 0;
  }
  return total > 0 ? (acting * own) / total : 0;
}

/** Torque the brake of a body can hold at these pressures, N.m. */
function brakeTorque(assembled: Assembled, i: number, result: SteadyResult): number {
  const b = assembled.brakes.find((x) => x.body === i);
  if (b === undefined) return 0;
  const p = (result.pressures[b.node] ?? 0) - toMPa(assembled.heads[b.component] ?? 0);
  return b.torque * Math.min(1, Math.max(0, 1 - p / toMPa(b.opens)));
}
