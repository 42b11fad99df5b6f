/**
 * Three worked circuits with laws of their own (hyperbolic blends, viscous friction), to be solved independently: the expected figures are
 * those of SciPy 1.17 on the same equations. Units MPa, L/s, 1e-3 m2, kN, m, s, t.
 */
import { type ActuatorSpec, compile, type CustomSpec, type Network, type NodeSpec } from '@oilway/engine';

const sq = (d: number) => d / (d * d + 1e-4) ** 0.25;
const sqSlope = (d: number) => (0.5 * d * d + 1e-4) / (d * d + 1e-4) ** 1.25;
const pos = (z: number) => (z + Math.sqrt(z * z + 1e-6)) / 2;
const posSlope = (z: number) => 0.5 * (1 + z / Math.sqrt(z * z + 1e-6));

type Two = (d: number, parameters: Float64Array) => [q: number, slope: number];

/** Element between a and b whose flow depends on the pressure across it. */
function two(a: number, b: number, law: Two): CustomSpec {
  return {
    type: 'custom',
    tag: 0,
    nodes: [a, b],
    terminals: 2,
    evaluate(z, parameters, flows, gradient) {
      const [q, slope] = law(z[0]! - z[1]!, parameters);
      flows[0] = q;
      flows[1] = -q;
      gradient.set([slope, -slope, -slope, slope]);
    },
  };
}
export const orifice = (a: number, b: number, k: number, opening = -1): CustomSpec =>
  two(a, b, (d, p) => {
    const y = opening < 0 ? k : k * p[opening]!;
    return [y * sq(d), y * sqSlope(d)];
  });
const relief = (a: number, b: number, set: number): CustomSpec => two(a, b, (d) => [pos(d - set), posSlope(d - set)]);
const check = (a: number, b: number, k: number, crack: number): CustomSpec =>
  two(a, b, (d) => [k * sq(pos(d - crack)), k * sqSlope(pos(d - crack)) * posSlope(d - crack)]);

/** Pump from tank into `p`: Q - leak p. */
const pump = (p: number, q: number, leak: number): CustomSpec => ({
  type: 'custom',
  tag: 0,
  nodes: [p],
  terminals: 1,
  evaluate(z, _parameters, flows, gradient) {
    flows[0] = leak * z[0]! - q;
    gradient[0] = leak;
  },
});

function cylinder(
  a: number,
  b: number,
  size: { areaA: number; areaB: number; stroke: number; mass: number; friction: number; damping: number },
  load?: (x: number) => [number, number],
): ActuatorSpec {
  return {
    tag: 0,
    chambers: [
      { node: a, area: size.areaA },
      { node: b, area: -size.areaB },
    ],
    low: 0,
    high: size.stroke,
    mass: size.mass,
    force(x, v, out) {
      const s = v * v + 1e-6;
      const [f, slope] = load ? load(x) : [0, 0];
      out[0] = (-size.friction * v) / Math.sqrt(s) - size.damping * v - f;
      out[1] = -slope;
      out[2] = (-size.friction * 1e-6) / (s * Math.sqrt(s)) - size.damping;
    },
  };
}
const node = (storage: number): NodeSpec => ({ storage });

/** Parameter 0 opens the paths of "extend", 1 those of "retract". */
export interface Reference {
  readonly net: Network;
  readonly extend: { readonly pressures: readonly number[]; readonly velocity: number };
  readonly retract?: { readonly pressures: readonly number[]; readonly velocity: number };
}

/** Nodes: P, A, B, R. */
export function oneCylinder(): Reference {
  const net = compile({
    nodes: [{ storage: 1, fixed: 0 }, node(7e-4), node(1e-3), node(1e-3), node(3e-4)],
    elements: [
      pump(1, 0.5, 0.002),
      relief(1, 0, 15),
      orifice(1, 2, 0.6, 0),
      orifice(3, 4, 0.6, 0),
      orifice(1, 3, 0.6, 1),
      orifice(2, 4, 0.6, 1),
      orifice(4, 0, 1.5),
    ],
    actuators: [cylinder(2, 3, { areaA: 3.117, areaB: 1.5, stroke: 0.5, mass: 0.5, friction: 15, damping: 2 })],
    gas: [],
    parameters: 2,
  });
  return {
    net,
    extend: { pressures: [5.662968389, 4.999553273, 0.180239066, 0.026296291], velocity: 0.156777041 },
    retract: { pressures: [15.083130621, 2.080833325, 14.66762985, 0.287157616], velocity: -0.257800074 },
  };
}

/** Nodes: high, low, A, B, R (filter to tank). */
export function twoPumps(): Reference {
  const unloading: CustomSpec = {
    type: 'custom',
    tag: 0,
    nodes: [2, 0, 1],
    terminals: 2,
    evaluate(z, _parameters, flows, gradient) {
      // clamp of (pilot - 5)/0.5, both corners smoothed over 0.01.
      const u = (z[2]! - 5) / 0.5;
      const corner = (w: number): [number, number] => [(w + Math.sqrt(w * w + 1e-4)) / 2, 0.5 * (1 + w / Math.sqrt(w * w + 1e-4))];
      const [low, lowSlope] = corner(u);
      const [high, highSlope] = corner(u - 1);
      const y = low - high;
      const slope = (lowSlope - highSlope) / 0.5;
      const d = z[0]! - z[1]!;
      flows[0] = y * sq(d);
      flows[1] = -y * sq(d);
      gradient.set([y * sqSlope(d), -y * sqSlope(d), slope * sq(d), -y * sqSlope(d), y * sqSlope(d), -slope * sq(d)]);
    },
  };
  const net = compile({
    nodes: [{ storage: 1, fixed: 0 }, node(7e-4), node(7e-4), node(1e-3), node(1e-3), node(3e-4)],
    elements: [
      pump(1, 0.15, 0.0005),
      pump(2, 0.8, 0.002),
      unloading,
      check(2, 1, 1, 0.03),
      relief(1, 0, 20),
      relief(2, 0, 8),
      orifice(1, 3, 1, 0),
      orifice(4, 5, 1, 0),
      orifice(1, 4, 1, 1),
      orifice(3, 5, 1, 1),
      orifice(5, 0, 2),
    ],
    actuators: [
      cylinder(3, 4, { areaA: 12.27, areaB: 5.91, stroke: 0.4, mass: 1, friction: 5, damping: 5 }, (x) => [
        1500 * pos(x - 0.3),
        1500 * posSlope(x - 0.3),
      ]),
    ],
    gas: [],
    parameters: 2,
  });
  return {
    net,
    extend: { pressures: [1.457445088, 2.120754126, 0.564309153, 0.260156054, 0.052721908], velocity: 0.077019485 },
    retract: { pressures: [5.076732139, 5.297000436, 1.833739974, 4.736276525, 0.366850153], velocity: -0.09870727 },
  };
}

/** Nodes: P, A, M, B, R. */
export function traverseAndFeed(): Reference {
  const regulated: CustomSpec = {
    type: 'custom',
    tag: 0,
    nodes: [4, 3],
    terminals: 2,
    evaluate(z, _parameters, flows, gradient) {
      const d = z[0]! - z[1]!;
      const q = 0.05 * sq(d);
      const slope = 0.05 * sqSlope(d);
      // The smaller of orifice and setting 0.02, smoothed over 1 % of it.
      const e = 0.0002;
      const w = q - 0.02;
      const over = (w + Math.sqrt(w * w + e * e)) / 2;
      const by = 1 - 0.5 * (1 + w / Math.sqrt(w * w + e * e));
      flows[0] = q - over;
      flows[1] = -flows[0];
      gradient.set([by * slope, -by * slope, -by * slope, by * slope]);
    },
  };
  const cam: CustomSpec = {
    type: 'custom',
    tag: 0,
    nodes: [4, 3],
    terminals: 2,
    actuator: 0,
    evaluate(z, _parameters, flows, gradient) {
      const d = z[0]! - z[1]!;
      const y = Math.min(1, Math.max(0, (0.32 - z[2]!) / 0.02));
      const slope = y > 0 && y < 1 ? -1 / 0.02 : 0;
      flows[0] = 0.7 * y * sq(d);
      flows[1] = -flows[0];
      gradient.set([0.7 * y * sqSlope(d), -0.7 * y * sqSlope(d), 0.7 * slope * sq(d)]);
      gradient.set([-0.7 * y * sqSlope(d), 0.7 * y * sqSlope(d), -0.7 * slope * sq(d)], 3);
    },
  };
  const net = compile({
    nodes: [{ storage: 1, fixed: 0 }, node(7e-4), node(1e-3), node(3e-4), node(1e-3), node(3e-4)],
    elements: [
      pump(1, 0.6, 0.002),
      relief(1, 0, 10),
      orifice(1, 2, 0.8, 0),
      orifice(3, 5, 0.8, 0),
      orifice(1, 3, 0.8, 1),
      orifice(2, 5, 0.8, 1),
      orifice(5, 0, 1.5),
      regulated,
      cam,
      check(3, 4, 0.8, 0.05),
    ],
    actuators: [cylinder(2, 4, { areaA: 3.117, areaB: 2.1, stroke: 0.45, mass: 0.3, friction: 8, damping: 2 })],
    gas: [],
    parameters: 2,
  });
  return { net, extend: { pressures: [3.651670881, 3.102690323, 0.320900206, 0.614712838, 0.071556221], velocity: 0.190149701 } };
}
