/** Seeded generator of nasty networks: closed volumes, valves that fight, stalled and runaway bodies, missing reliefs, everything at once. */
import type { ActuatorSpec, ElementSpec, GasSpec, GasState, LoadState, NetworkSpec, NodeSpec } from '@oilway/engine';

/** mulberry32: small, repeatable. */
export function random(seed: number): () => number {
  let a = seed >>> 0;
  return () => {
    a = (a + 0x6d2b79f5) >>> 0;
    let t = a;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

export interface Net {
  readonly spec: NetworkSpec;
  readonly parameters: readonly number[];
  readonly positions: readonly number[];
  readonly loads: readonly LoadState[];
  readonly gas: readonly GasState[];
  readonly locked: readonly boolean[];
}

export function nastyNet(seed: number): Net {
  const next = random(seed);
  const between = (low: number, high: number): number => low + (high - low) * next();
  const log = (low: number, high: number): number => low * (high / low) ** next();
  const chance = (share: number): boolean => next() < share;
  const count = 3 + Math.floor(next() * 22);
  const nodes: NodeSpec[] = [{ storage: 1, fixed: 0 }];
  for (let i = 1; i < count; i++) nodes.push({ storage: log(1e-5, 5e-3), ...(chance(0.1) ? { ceiling: between(10, 40) } : {}) });
  const pick = (): number => Math.floor(next() * count);
  const inner = (): number => 1 + Math.floor(next() * (count - 1));
  const two = (): [number, number] => {
    const a = pick();
    let b = pick();
    if (a === b) b = (a + 1) % count;
    return [a, b];
  };
  const parameters: number[] = [];
  const parameter = (value: number): number => parameters.push(value) - 1;
  const opening = (): number => parameter(chance(0.4) ? 0 : chance(0.6) ? 1 : next());
  const elements: ElementSpec[] = [];
  const actuators: ActuatorSpec[] = [];
  const bodies = Math.floor(next() * 4);
  for (let a = 0; a < bodies; a++) {
    const area = log(0.3, 30);
    const motor = chance(0.2);
    const chambers = chance(0.25)
      ? [{ node: inner(), area }]
      : [
          { node: inner(), area },
          { node: inner(), area: -area * (motor ? 1 : between(0.3, 1)) },
        ];
    actuators.push({
      tag: a,
      chambers: motor ? chambers.map((chamber) => ({ ...chamber, area: chamber.area * 1e-3 })) : chambers,
      low: motor ? Number.NEGATIVE_INFINITY : 0,
      high: motor ? Number.POSITIVE_INFINITY : 0.5,
      mass: log(0.01, 5) * (motor ? 1e-6 : 1),
      ...(motor && chance(0.5) ? { pressureFriction: area * 1e-4 } : {}),
    });
  }
  const parts = count + Math.floor(next() * count);
  for (let e = 0; e < parts; e++) {
    const [a, b] = two();
    const k = log(0.05, 3);
    const kind = Math.floor(next() * 16);
    const tag = e;
    if (kind <= 3) elements.push({ type: 'path', tag, a, b, k, ...(chance(0.7) ? { opening: opening() } : {}) });
    else if (kind <= 5) elements.push({ type: 'check', tag, a, b, k, crack: chance(0.3) ? 0 : between(0.01, 0.5) });
    else if (kind === 6) {
      const high = parameter(between(1, 12));
      const low = parameter(parameters[high]! * between(0.6, 0.95));
      elements.push({
        type: 'piloted',
        tag,
        a,
        b,
        k,
        pilots: [
          { node: pick(), weight: 1 },
          { node: b, weight: -1 },
        ],
        set: high,
        band: parameter(between(0.05, 1)),
        bit: parameter(chance(0.5) ? 1 : 0),
        setWhenOn: low,
        oneWay: false,
      });
    } else if (kind === 7) {
      const ratio = between(0, 8);
      elements.push({
        type: 'piloted',
        tag,
        a,
        b,
        k,
        pilots: [
          { node: a, weight: 1 },
          { node: pick(), weight: ratio },
          { node: b, weight: -1 - ratio },
        ],
        set: parameter(between(1, 25)),
        band: parameter(between(0.05, 2)),
        oneWay: chance(0.7),
      });
    } else if (kind === 8) {
      elements.push({
        type: 'piloted',
        tag,
        a,
        b,
        k,
        pilots: [
          { node: b, weight: -1 },
          { node: 0, weight: 1 },
        ],
        set: parameter(-between(0.5, 15)),
        band: parameter(between(0.1, 1)),
        oneWay: true,
      });
    } else if (kind === 9) {
      elements.push({
        type: 'relief',
        tag,
        p: inner(),
        t: chance(0.8) ? 0 : pick(),
        ref: 0,
        ...(chance(0.2) ? { x: pick() } : {}),
        set: parameter(between(0.5, 30)),
        vented: 0.4,
        override: between(0.03, 0.3),
        qN: log(0.2, 3),
        k: log(0.5, 5),
      });
    } else if (kind === 10) elements.push({ type: 'regulator', tag, a, b, set: parameter(log(0.001, 0.5)), needs: between(0.3, 1.2) });
    else if (kind === 11) elements.push({ type: 'laminar', tag, a, b, g: log(1e-5, 1e-2) });
    else if (kind === 12)
      elements.push({
        type: 'line',
        tag,
        a,
        b,
        bore: between(0.006, 0.03),
        length: between(0.2, 10),
        roughness: 1.5e-6,
        minor: between(0, 5),
        nu: log(1e-5, 3e-4),
        rho: 870,
      });
    else if (kind === 13) {
      const c = pick();
      if (c === a || c === b) continue;
      const which = next();
      if (which < 0.3)
        elements.push({
          type: 'gearDivider',
          tag,
          p: a,
          a: b,
          b: c,
          share: [1, between(0.5, 2)],
          g: [0.001, 0.001],
          friction: chance(0.5) ? 0.6 : 0,
          qN: 0.5,
        });
      else if (which < 0.5)
        elements.push({
          type: 'spoolDivider',
          tag,
          p: a,
          a: b,
          b: c,
          share: [1, 1],
          error: 0.05,
          drop: 0.8,
          qN: 0.5,
          combines: chance(0.5),
        });
      else if (which < 0.7) elements.push({ type: 'shuttle', tag, a, b, c, k: 2 });
      else if (which < 0.85) elements.push({ type: 'bypassRegulator', tag, a, b, t: c, set: parameter(log(0.01, 0.5)), needs: 0.6 });
      else elements.push({ type: 'intensifier', tag, p: a, a: b, t: c, ratio: between(1.5, 6) });
    } else if (kind === 14) elements.push({ type: 'compensatedEdge', tag, a, b, k, opening: opening(), limit: log(0.05, 1) });
    else if (bodies > 0 && chance(0.7)) {
      const actuator = Math.floor(next() * bodies);
      if (Number.isFinite(actuators[actuator]!.high)) {
        if (chance(0.5)) elements.push({ type: 'camPath', tag, a, b, k, actuator, at: [0.1, 0.2], opening: [1, 0] });
        else
          elements.push({
            type: 'cushion',
            tag,
            a,
            b,
            actuator,
            end: chance(0.5) ? 'extended' : 'retracted',
            length: 0.03,
            kMin: 0.003,
            kFree: k,
          });
      }
    }
  }
  const pumps = 1 + Math.floor(next() * 3);
  for (let k = 0; k < pumps; k++) {
    const p = inner();
    const qth = log(0.05, 2);
    const compensated = chance(0.3);
    elements.push({
      type: 'pump',
      tag: 1000 + k,
      s: chance(0.9) ? 0 : pick(),
      p,
      qth,
      leak: chance(0.2) ? 0 : qth * between(0.001, 0.005),
      running: parameter(chance(0.85) ? 1 : 0),
      ...(compensated
        ? { compensator: { set: parameter(between(5, 25)), band: parameter(between(0.3, 1)), smallest: chance(0.3) ? 0.2 : 0 } }
        : {}),
      ...(compensated && chance(0.4) ? { sensing: { ls: pick(), margin: 2 } } : {}),
    });
    if (chance(0.85))
      elements.push({
        type: 'relief',
        tag: 2000 + k,
        p,
        t: 0,
        ref: 0,
        set: parameter(between(5, 30)),
        vented: 0.4,
        override: 0.1,
        qN: 2,
        k: 3,
      });
  }
  const gas: GasSpec[] = [];
  const charges: GasState[] = [];
  if (chance(0.3)) {
    const volume = log(0.2, 30);
    gas.push({ tag: 0, node: inner(), volume, precharge: between(1, 12) });
    charges.push(chance(0.3) ? 'empty' : volume * between(0.05, 0.6));
  }
  const loads = actuators.map((actuator): LoadState => {
    const size = actuator.chambers[0]!.area * 10;
    const at = (force: number) =>
      Number.isFinite(actuator.high)
        ? [{ at: [0, 0.2, 0.2, 0.5], force: [force, force, force * 1.5, force * 2] }]
        : [{ at: [0], force: [force] }];
    return {
      fixed: chance(0.6) ? at(between(-size, size)) : [],
      resistOut: chance(0.3) ? at(between(0, size)) : [],
      resistIn: chance(0.2) ? at(between(0, size)) : [],
      friction: chance(0.8) ? between(0, size * 0.1) : 0,
    };
  });
  const positions = actuators.map((actuator) =>
    Number.isFinite(actuator.high) ? (chance(0.2) ? 0 : chance(0.2) ? 0.5 : between(0.01, 0.49)) : 0,
  );
  const spec: NetworkSpec = {
    nodes,
    elements,
    actuators,
    gas,
    parameters: parameters.length,
    ...(chance(0.3) ? { oil: { bulk: 1400, air: 0.005, exponent: 1.4 } } : {}),
  };
  return { spec, parameters, positions, loads, gas: charges, locked: actuators.map(() => chance(0.1)) };
}
