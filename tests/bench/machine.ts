/**
 * A machine tool of about thirty components for measurements: two pumps with unloading, a feed cylinder with traverse cam, a lift with
 * counterbalance, a clamp behind a reducing valve and a pilot check, a spindle motor, an accumulator. `copies` of it stand beside each other.
 */
import type { ActuatorSpec, ElementSpec, GasSpec, LoadState, NetworkSpec, NodeSpec, Transient, TransientWatch } from '@oilway/engine';

export const COMPONENTS = 30;
const BODIES = 4;

/** Parameters of one copy that the cycle moves. */
interface Commands {
  readonly feedOut: number;
  readonly feedIn: number;
  readonly liftUp: number;
  readonly liftDown: number;
  readonly clamp: number;
  readonly release: number;
  readonly turn: number;
  readonly lifted: number;
}
export interface Machine {
  readonly spec: NetworkSpec;
  readonly values: readonly number[];
  readonly commands: readonly Commands[];
  readonly positions: readonly number[];
  readonly loads: readonly LoadState[];
  readonly lowNode: number;
  readonly highNode: number;
}

const root = (d: number): number => d / (d * d + 1e-4) ** 0.25;
/** K of a passage from flow (L/min) at drop (bar). */
const k = (flow: number, drop: number): number => flow / 60 / root(drop / 10);

export function machine(copies = 1): Machine {
  const nodes: NodeSpec[] = [{ storage: 1, fixed: 0 }];
  const elements: ElementSpec[] = [];
  const actuators: ActuatorSpec[] = [];
  const gas: GasSpec[] = [];
  const values: number[] = [];
  const commands: Commands[] = [];
  const positions: number[] = [];
  const loads: LoadState[] = [];
  const node = (litres: number): number => nodes.push({ storage: 1e-9, volume: litres }) - 1;
  const parameter = (value: number): number => values.push(value) - 1;
  let tag = 0;
  const path = (a: number, b: number, flow: number, drop: number, opening?: number): void => {
    elements.push({ type: 'path', tag: tag++, a, b, k: k(flow, drop), ...(opening === undefined ? {} : { opening }) });
  };
  const check = (a: number, b: number, flow: number, drop: number, crack = 0.05): void => {
    elements.push({ type: 'check', tag: tag++, a, b, k: k(flow, drop - crack * 10), crack });
  };
  let lowNode = 0;
  let highNode = 0;
  for (let copy = 0; copy < copies; copy++) {
    const high = node(0.3);
    const low = node(0.3);
    const back = node(0.3);
    const cooled = node(0.2);
    lowNode = low;
    highNode = high;
    const on = parameter(1);
    elements.push({ type: 'pump', tag: tag++, s: 0, p: high, qth: 0.193, leak: 0.0006, running: on });
    elements.push({ type: 'pump', tag: tag++, s: 0, p: low, qth: 0.967, leak: 0.003, running: on });
    const lifted = parameter(0);
    elements.push({
      type: 'piloted',
      tag: tag++,
      a: low,
      b: back,
      k: k(80, 3),
      pilots: [
        { node: high, weight: 1 },
        { node: back, weight: -1 },
      ],
      set: parameter(4.5),
      band: parameter(0.45),
      bit: lifted,
      setWhenOn: parameter(3.8),
      oneWay: false,
    });
    check(low, high, 80, 3);
    elements.push({
      type: 'relief',
      tag: tag++,
      p: high,
      t: back,
      ref: back,
      set: parameter(16),
      vented: 0.4,
      override: 0.08,
      qN: 1.5,
      k: k(90, 6),
    });
    elements.push({
      type: 'relief',
      tag: tag++,
      p: low,
      t: back,
      ref: back,
      set: parameter(6),
      vented: 0.4,
      override: 0.1,
      qN: 1.5,
      k: k(90, 6),
    });
    // Return: filter with bypass, cooler.
    path(back, cooled, 160, 0.4);
    check(back, cooled, 160, 5, 0.2);
    path(cooled, 0, 160, 0.5);

    // Feed: 63/36 x 400, cam deceleration and flow control in the rod line.
    const feedA = node(0.3);
    const feedM = node(0.2);
    const feedB = node(0.3);
    const feedOut = parameter(0);
    const feedIn = parameter(0);
    path(high, feedA, 100, 5, feedOut);
    path(feedM, back, 100, 5, feedOut);
    path(high, feedM, 100, 5, feedIn);
    path(feedA, back, 100, 5, feedIn);
    const first = actuators.length;
    elements.push({ type: 'camPath', tag: tag++, a: feedB, b: feedM, k: k(60, 4), actuator: first, at: [0.25, 0.265], opening: [1, 0] });
    elements.push({ type: 'regulator', tag: tag++, a: feedB, b: feedM, set: parameter(0.021), needs: 0.6 });
    check(feedM, feedB, 60, 4);
    actuators.push({
      tag: first,
      chambers: [
        { node: feedA, area: 3.1172 },
        { node: feedB, area: -2.0994 },
      ],
      low: 0,
      high: 0.4,
      mass: 0.3,
    });
    positions.push(0);
    loads.push({ fixed: [], resistOut: [{ at: [0.265, 0.265, 0.35, 0.35], force: [0, 9, 9, 0] }], resistIn: [], friction: 1.2 });

    // Lift: 80/45 x 300 with 1.2 t, counterbalance on the cap side, throttle check.
    const liftA = node(0.2);
    const liftC = node(0.2);
    const liftB = node(0.3);
    const liftUp = parameter(0);
    const liftDown = parameter(0);
    path(high, liftA, 60, 5, liftUp);
    path(liftB, back, 60, 5, liftUp);
    path(high, liftB, 60, 5, liftDown);
    path(liftA, back, 60, 5, liftDown);
    elements.push({
      type: 'piloted',
      tag: tag++,
      a: liftC,
      b: liftA,
      k: k(60, 6),
      pilots: [
        { node: liftC, weight: 1 },
        { node: liftB, weight: 3 },
        { node: liftA, weight: -4 },
      ],
      set: parameter(11),
      band: parameter(1.1),
      oneWay: true,
    });
    check(liftA, liftC, 60, 3);
    actuators.push({
      tag: first + 1,
      chambers: [
        { node: liftC, area: 5.0265 },
        { node: liftB, area: -3.4361 },
      ],
      low: 0,
      high: 0.3,
      mass: 1.2,
    });
    positions.push(0);
    loads.push({ fixed: [{ at: [0], force: [-11.77] }], resistOut: [], resistIn: [], friction: 1.5 });

    // Clamp: 40/25 x 50 behind a reducing valve and a pilot check; the part is a steep table.
    const reduced = node(0.2);
    const clampA = node(0.1);
    const clampC = node(0.1);
    const clampB = node(0.1);
    const clamp = parameter(0);
    const release = parameter(0);
    elements.push({
      type: 'piloted',
      tag: tag++,
      a: high,
      b: reduced,
      k: k(40, 5),
      pilots: [
        { node: reduced, weight: -1 },
        { node: 0, weight: 1 },
      ],
      set: parameter(-5),
      band: parameter(0.25),
      oneWay: true,
    });
    path(reduced, clampA, 40, 4, clamp);
    path(clampB, back, 40, 4, clamp);
    path(reduced, clampB, 40, 4, release);
    path(clampA, back, 40, 4, release);
    check(clampA, clampC, 40, 3);
    elements.push({
      type: 'piloted',
      tag: tag++,
      a: clampC,
      b: clampA,
      k: k(40, 4),
      pilots: [
        { node: clampB, weight: 4 },
        { node: clampA, weight: -3 },
        { node: clampC, weight: -1 },
      ],
      set: parameter(0.1),
      band: parameter(0.5),
      oneWay: false,
    });
    actuators.push({
      tag: first + 2,
      chambers: [
        { node: clampC, area: 1.2566 },
        { node: clampB, area: -0.7658 },
      ],
      low: 0,
      high: 0.05,
      mass: 0.02,
    });
    positions.push(0);
    loads.push({ fixed: [{ at: [0.04, 0.041], force: [0, -20] }], resistOut: [], resistIn: [], friction: 0.3 });

    // Spindle motor 50 cm3/rev behind a flow control, fed from the accumulator line.
    const stored = node(0.3);
    const motorIn = node(0.1);
    const motorA = node(0.1);
    const turn = parameter(0);
    check(high, stored, 60, 2);
    gas.push({ tag: copy, node: stored, volume: 2.5, precharge: 3.1 });
    path(stored, motorIn, 40, 4, turn);
    elements.push({ type: 'regulator', tag: tag++, a: motorIn, b: motorA, set: parameter(0.25), needs: 0.6 });
    elements.push({ type: 'laminar', tag: tag++, a: motorA, b: back, g: 4e-4 });
    actuators.push({
      tag: first + 3,
      chambers: [
        { node: motorA, area: 0.05 / (2 * Math.PI) },
        { node: back, area: -0.05 / (2 * Math.PI) },
      ],
      low: Number.NEGATIVE_INFINITY,
      high: Number.POSITIVE_INFINITY,
      mass: 2e-5,
      pressureFriction: 0.0008,
      creep: 1e-3,
    });
    positions.push(0);
    loads.push({ fixed: [], resistOut: [{ at: [0], force: [0.012] }], resistIn: [{ at: [0], force: [0.012] }], friction: 0.001 });
    commands.push({ feedOut, feedIn, liftUp, liftDown, clamp, release, turn, lifted });
  }
  return {
    spec: { nodes, elements, actuators, gas, parameters: values.length, oil: { bulk: 1400, air: 0.005, exponent: 1.4 } },
    values,
    commands,
    positions,
    loads,
    lowNode,
    highNode,
  };
}

const RAMP = 0.03;

/** The cycle, 28 s: clamp, lift, spindle, traverse and feed, back, lower, release. Ends of steps by position or pressure, the last by time. */
export function runCycle(made: Machine, run: Transient): string | undefined {
  const go = (name: keyof Commands, to: number): void => {
    for (const of of made.commands) run.ramp(of[name], run.parameters[of[name]]!, to, run.time, run.time + RAMP);
  };
  const at = (body: number, threshold: number, edge: 'rising' | 'falling'): TransientWatch => ({
    terms: [{ of: 'position', index: body, weight: 1 }],
    threshold,
    edge,
  });
  const bit = (value: number): TransientWatch => ({
    terms: [{ of: 'pressure', index: made.highNode, weight: 1 }],
    threshold: value > 0 ? 4.95 : 3.8,
    edge: value > 0 ? 'rising' : 'falling',
  });
  const until = (time: number, watch?: TransientWatch): string | undefined => {
    const limit = run.time + time;
    while (run.time < limit - 1e-9) {
      const now = run.parameters[made.commands[0]!.lifted]! > 0.5 ? 1 : 0;
      const report = run.advance(limit, watch ? [bit(1 - now), watch] : [bit(1 - now)]);
      if (report.failed) return report.failed;
      if (report.fired.includes(0)) for (const of of made.commands) run.set(of.lifted, 1 - now);
      if (report.fired.includes(1)) return undefined;
    }
    return undefined;
  };
  const steps: { readonly set: Partial<Record<keyof Commands, number>>; readonly until: () => string | undefined }[] = [
    { set: {}, until: () => until(1) },
    { set: { clamp: 1 }, until: () => until(2) },
    { set: { liftUp: 1 }, until: () => until(6, at(1, 0.25, 'rising')) },
    { set: { liftUp: 0, turn: 1 }, until: () => until(1) },
    { set: { feedOut: 1 }, until: () => until(16, at(0, 0.36, 'rising')) },
    { set: { feedOut: 0 }, until: () => until(0.5) },
    { set: { feedIn: 1 }, until: () => until(5, at(0, 0.001, 'falling')) },
    { set: { feedIn: 0, turn: 0, liftDown: 1 }, until: () => until(6, at(1, 0.001, 'falling')) },
    { set: { liftDown: 0, clamp: 0, release: 1 }, until: () => until(1) },
    { set: { release: 0 }, until: () => until(Math.max(0.1, 28 - run.time)) },
  ];
  for (const step of steps) {
    for (const [name, to] of Object.entries(step.set)) go(name as keyof Commands, to);
    const failed = step.until();
    if (failed) return failed;
  }
  return undefined;
}
export const bodiesOf = (made: Machine): number => made.positions.length / BODIES;
