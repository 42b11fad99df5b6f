/** Runs in time against closed solutions; events, contacts, gas charges. */
import {
  compile,
  type LoadState,
  type NetworkSpec,
  solveSteady,
  type SteadyRequest,
  Transient,
  type TransientOptions,
  type WatchTerm,
} from '@oilway/engine';
import { describe, expect, it } from 'vitest';

const tank = { storage: 1, fixed: 0 };

function start(
  spec: Partial<NetworkSpec>,
  values: readonly number[],
  request: Partial<SteadyRequest> = {},
  options: TransientOptions = {},
): Transient {
  const net = compile({ nodes: [tank], elements: [], actuators: [], gas: [], ...spec, parameters: values.length });
  net.parameters.set(values);
  const whole = { positions: net.spec.actuators.map(() => 0), ...request };
  return new Transient(net, whole, solveSteady(net, whole), options);
}
const term = (of: WatchTerm['of'], index: number, weight = 1): WatchTerm => ({ of, index, weight });
const rising = (threshold: number, ...terms: WatchTerm[]) => ({ terms, threshold, edge: 'rising' as const });
const falling = (threshold: number, ...terms: WatchTerm[]) => ({ terms, threshold, edge: 'falling' as const });
const load = (over: Partial<LoadState>): LoadState => ({ fixed: [], resistOut: [], resistIn: [], friction: 0, ...over });

describe('closed solutions', () => {
  it('a volume bleeding through a laminar gap falls exponentially', () => {
    // p = 10 exp(-t g/C), g 0.002 L/s/MPa, C 0.001 L/MPa.
    const run = start(
      {
        nodes: [tank, { storage: 1e-3 }, { storage: 1, fixed: 10 }],
        elements: [
          { type: 'laminar', tag: 1, a: 1, b: 0, g: 0.002 },
          { type: 'path', tag: 2, a: 2, b: 1, k: 1, opening: 0 },
        ],
      },
      [1],
      {},
      { tolerance: 1e-6, dynamics: true, floor: 0 },
    );
    const from = run.pressures[1]!;
    run.set(0, 0);
    const at = run.advance(5, [falling(1, term('pressure', 1))]);
    expect(at.fired).toEqual([0]);
    expect(at.time).toBeCloseTo(0.5 * Math.log(from), 3);
    expect(Math.abs(run.pressures[1]! - 1)).toBeLessThan(1e-6);
  });
  it('a volume bleeding through an orifice reaches a pressure in the time that quadrature gives', () => {
    // C dp/dt = -K p/(p^2 + 0.01^2)^(1/4): t = (C/K) times the integral of (p^2 + 1e-4)^(1/4)/p from 1 MPa to the start, by Simpson's rule.
    const [c, k] = [2e-3, 4e-3];
    const run = start(
      {
        nodes: [tank, { storage: c }, { storage: 1, fixed: 24 }],
        elements: [
          { type: 'path', tag: 1, a: 1, b: 0, k },
          { type: 'path', tag: 2, a: 2, b: 1, k: 1, opening: 0 },
        ],
      },
      [1],
      {},
      { floor: 0 },
    );
    const from = run.pressures[1]!;
    run.set(0, 0);
    const at = run.advance(60, [falling(1, term('pressure', 1))]);
    expect(at.fired).toEqual([0]);
    const n = 2000;
    const width = (from - 1) / n;
    let sum = 0;
    for (let i = 0; i <= n; i++) {
      const p = 1 + i * width;
      sum += ((i === 0 || i === n ? 1 : i % 2 === 1 ? 4 : 2) * (p * p + 1e-4) ** 0.25) / p;
    }
    const exact = ((c / k) * sum * width) / 3;
    expect(Math.abs(at.time / exact - 1)).toBeLessThan(2e-3);
  });
  it('an accumulator filled at a constant flow follows p V^n, ideal and with its oil in balance', () => {
    for (const exponent of [1, 1.4]) {
      const run = start(
        {
          nodes: [tank, { storage: 1e-6 }],
          elements: [{ type: 'pump', tag: 1, s: 0, p: 1, qth: 0.1, leak: 0, running: 0 }],
          gas: [{ tag: 2, node: 1, volume: 10, precharge: 5 }],
        },
        [1],
        { gas: [0.5], gasExponent: exponent },
        { floor: 0 },
      );
      run.advance(20);
      const charge = run.gas()[0]!;
      expect(charge).not.toBe('empty');
      if (charge === 'empty') continue;
      expect(charge.oil).toBeCloseTo(2.5, 4);
      expect(charge.pressure).toBeCloseTo(5 * (10 / (10 - charge.oil)) ** exponent, 8);
    }
  });
  it('a rod fed by a constant flow runs at flow over area and stops at its stop', () => {
    const run = start(
      {
        nodes: [tank, { storage: 1e-5 }, { storage: 1e-5 }],
        elements: [
          { type: 'pump', tag: 1, s: 0, p: 1, qth: 0.2, leak: 0, running: 0 },
          { type: 'relief', tag: 2, p: 1, t: 0, ref: 0, set: 1, vented: 0.4, override: 0.1, qN: 1, k: 3 },
          { type: 'path', tag: 3, a: 2, b: 0, k: 1 },
        ],
        actuators: [
          {
            tag: 4,
            chambers: [
              { node: 1, area: 2 },
              { node: 2, area: -1 },
            ],
            low: 0,
            high: 0.3,
            mass: 1,
          },
        ],
      },
      [0, 16],
      { loads: [load({ friction: 0.5 })] },
      { floor: 0 },
    );
    run.ramp(0, 0, 1, 1, 1);
    const report = run.advance(6, [rising(0.1, term('position', 0)), rising(0.2, term('position', 0))]);
    expect(report.fired).toEqual([0]);
    const first = report.time;
    const second = run.advance(6, [rising(0.1, term('position', 0)), rising(0.2, term('position', 0))]);
    expect(second.fired).toEqual([1]);
    expect(second.time - first).toBeCloseTo(1, 4);
    expect(Math.abs(run.positions[0]! - 0.2)).toBeLessThan(2e-7);
    const stop = run.advance(6);
    expect(stop.happened.map((h) => h.what)).toEqual(['stop reached']);
    expect(stop.happened[0]!.time - second.time).toBeCloseTo(1, 4);
    expect(run.positions[0]).toBe(0.3);
    // Against the stop the relief lifts: 16 MPa and its share of the override.
    expect(run.pressures[1]!).toBeCloseTo(16 + 0.2 * 1.6, 3);
    expect(run.now().stopForces[0]!).toBeCloseTo(-(2 * run.pressures[1]! - 0.5), 2);
  });
  it('a mass on an oil spring swings with sqrt(k/m), with inertia', () => {
    // Area 1e-3 m2, C 1e-3 L/MPa: k = A^2/C = 1 kN/mm = 1000 kN/m; m 1 t: omega 31.62 rad/s.
    const run = start(
      {
        nodes: [tank, { storage: 1e-3 }],
        elements: [],
        actuators: [{ tag: 1, chambers: [{ node: 1, area: 1 }], low: -1, high: 1, mass: 1 }],
      },
      [],
      { loads: [load({ fixed: [{ at: [0], force: [-5] }] })] },
      { dynamics: true, tolerance: 1e-6, floor: 0 },
    );
    run.setLoads(0, load({ fixed: [{ at: [0], force: [-6] }] }));
    const half = run.advance(1, [rising(0, term('velocity', 0))]);
    expect(half.time).toBeCloseTo(Math.PI / Math.sqrt(1000), 3);
    expect(run.positions[0]!).toBeCloseTo(-0.002, 5);
  });
});

describe('events', () => {
  const bench = (loads: LoadState[], options: TransientOptions = {}): Transient =>
    start(
      {
        nodes: [tank, { storage: 1e-4 }, { storage: 1e-4 }, { storage: 1e-4 }],
        elements: [
          { type: 'pump', tag: 1, s: 0, p: 3, qth: 0.3, leak: 0.001, running: 0 },
          { type: 'relief', tag: 2, p: 3, t: 0, ref: 0, set: 1, vented: 0.4, override: 0.1, qN: 1, k: 3 },
          { type: 'path', tag: 3, a: 3, b: 1, k: 1, opening: 2 },
          { type: 'path', tag: 4, a: 2, b: 0, k: 1, opening: 2 },
          { type: 'path', tag: 5, a: 3, b: 2, k: 1, opening: 3 },
          { type: 'path', tag: 6, a: 1, b: 0, k: 1, opening: 3 },
        ],
        actuators: [
          {
            tag: 7,
            chambers: [
              { node: 1, area: 3 },
              { node: 2, area: -2 },
            ],
            low: 0,
            high: 0.4,
            mass: 0.5,
          },
        ],
      },
      [1, 10, 0, 0],
      { loads },
      options,
    );

  it('pressure, difference and position are located to their tolerances', () => {
    const run = bench([load({ friction: 1, resistOut: [{ at: [0.2, 0.3], force: [0, 40] }] })]);
    run.ramp(2, 0, 1, 0.5, 0.6);
    run.advance(6, [rising(0.25, term('position', 0))]);
    expect(run.positions[0]! - 0.25).toBeGreaterThanOrEqual(0);
    expect(run.positions[0]! - 0.25).toBeLessThan(2e-7);
    run.advance(12, [rising(9, term('pressure', 1))]);
    expect(run.pressures[1]! - 9).toBeGreaterThanOrEqual(0);
    expect(run.pressures[1]! - 9).toBeLessThan(2e-6);
    run.ramp(2, 1, 0, run.time, run.time);
    const report = run.advance(run.time + 2, [falling(5, term('pressure', 1), term('pressure', 2, -1))]);
    if (report.fired.length > 0) expect(Math.abs(run.pressures[1]! - run.pressures[2]! - 5)).toBeLessThan(2e-6);
    expect(report.failed).toBeUndefined();
  });
  it('a watch that is already beyond its threshold does not fire, nor twice', () => {
    const run = bench([load({ friction: 1 })]);
    run.set(2, 1);
    run.advance(5, [rising(0.1, term('position', 0))]);
    const again = run.advance(5, [rising(0.1, term('position', 0)), rising(0.05, term('position', 0))]);
    expect(again.fired).toEqual([]);
    expect(run.positions[0]).toBe(0.4);
  });
  it('a stop is left when the forces turn, not before', () => {
    const run = bench([load({ friction: 1 })]);
    run.set(2, 1);
    run.advance(5);
    expect(run.now().contacts[0]).toBe('high');
    run.ramp(2, 1, 0, 5, 5.1);
    run.ramp(3, 0, 1, 5.2, 5.3);
    const report = run.advance(12);
    expect(report.happened.map((h) => h.what)).toEqual(['stop left', 'stop reached']);
    expect(report.happened[0]!.time).toBeGreaterThan(5.2);
    expect(run.positions[0]).toBe(0);
  });
  it('a body pressed to a jump of force from both sides rests on it', () => {
    // Beyond 0.2 m it is pushed back with 60 kN, more than the relief allows.
    const run = bench([load({ friction: 1, fixed: [{ at: [0.2, 0.2], force: [0, -60] }] })]);
    run.set(2, 1);
    const report = run.advance(20);
    expect(report.failed).toBeUndefined();
    expect(run.positions[0]!).toBeCloseTo(0.2, 3);
    expect(run.statistics.steps).toBeLessThan(2000);
    expect(run.pressures[3]!).toBeGreaterThan(10);
  });
  it('the same with inertia', () => {
    const run = bench([load({ friction: 1, fixed: [{ at: [0.2, 0.2], force: [0, -60] }] })], { dynamics: true });
    run.set(2, 1);
    expect(run.advance(3).failed).toBeUndefined();
    expect(run.positions[0]!).toBeCloseTo(0.2, 2);
  });
  it('a resisting load stops a rod that cannot overcome it and never throws it back', () => {
    const run = bench([load({ friction: 1, resistOut: [{ at: [0.2, 0.2], force: [0, 60] }] })]);
    run.set(2, 1);
    run.advance(10);
    const x = run.positions[0]!;
    expect(x).toBeGreaterThanOrEqual(0.2);
    expect(x).toBeLessThan(0.201);
    run.set(2, 0);
    run.set(0, 0);
    run.advance(20);
    expect(run.positions[0]!).toBeGreaterThan(x - 2e-3);
  });
  it('says why it cannot go on, and can be asked again', () => {
    const run = bench([load({ friction: 1 })], { maxSteps: 12 });
    run.set(2, 1);
    const report = run.advance(5);
    expect(report.failed).toMatch(/more than 12 steps/);
    expect(report.time).toBeLessThan(5);
    expect(run.advance(5).time).toBeGreaterThan(report.time);
  });
});

describe('gas', () => {
  const fed = (options: Partial<SteadyRequest>): Transient =>
    start(
      {
        nodes: [tank, { storage: 1e-5 }],
        elements: [
          { type: 'pump', tag: 1, s: 0, p: 1, qth: 0.2, leak: 0, running: 0 },
          { type: 'relief', tag: 2, p: 1, t: 0, ref: 0, set: 1, vented: 0.4, override: 0.1, qN: 1, k: 3 },
          { type: 'path', tag: 3, a: 1, b: 0, k: 0.05, opening: 2 },
        ],
        gas: [{ tag: 3, node: 1, volume: 4, precharge: 4 }],
      },
      [1, 12, 0],
      options,
      { floor: 0 },
    );
  it('an empty charge takes oil from its precharge on; oil can be watched', () => {
    const run = fed({ gas: ['empty'], gasExponent: 1 });
    const report = run.advance(60, [rising(1, term('oil', 0))]);
    expect(report.fired).toEqual([0]);
    expect(report.time).toBeCloseTo(5, 1);
    const charge = run.gas()[0]!;
    expect(charge !== 'empty' && charge.oil).toBeCloseTo(1, 6);
    expect(run.now().gasFlows[0]!).toBeCloseTo(0.2, 3);
  });
  it('emptied, it lets its node fall', () => {
    const run = fed({ gas: [1] });
    run.set(0, 0);
    run.set(2, 1);
    const report = run.advance(200, [falling(0.2, term('pressure', 1))]);
    expect(report.fired).toEqual([0]);
    expect(run.gas()[0]).toBe('empty');
  });
  it('a change of the exponent changes neither oil nor pressure', () => {
    const run = fed({ gas: [1], gasExponent: 1.4 });
    run.advance(1);
    const before = run.gas()[0]!;
    run.setGasExponent(1);
    const after = run.gas()[0]!;
    if (before === 'empty' || after === 'empty') throw new Error('holds oil');
    expect(after.oil).toBeCloseTo(before.oil, 9);
    expect(after.pressure).toBeCloseTo(before.pressure, 9);
    run.advance(3);
    const later = run.gas()[0]!;
    if (later === 'empty') throw new Error('holds oil');
    expect(later.pressure * (4 - later.oil)).toBeCloseTo(after.pressure * (4 - after.oil), 6);
  });
});

it('chambers store by position: a long column of oil gives more when it is decompressed', () => {
  const given = (x: number): number => {
    const run = start(
      {
        nodes: [tank, { storage: 1e-9, volume: 0.1 }],
        elements: [{ type: 'path', tag: 1, a: 1, b: 0, k: 0.05, opening: 0 }],
        actuators: [{ tag: 3, chambers: [{ node: 1, area: 10 }], low: 0, high: 1, mass: 1 }],
        oil: { bulk: 1400, air: 0, exponent: 1.4 },
      },
      [0],
      { positions: [x], loads: [load({ fixed: [{ at: [0], force: [-100] }] })], locked: [false] },
      { floor: 0 },
    );
    // 10 MPa carried; when the load goes the rod stays where the friction of the new load holds it.
    run.setLoads(0, load({ friction: 200 }));
    const before = run.pressures[1]!;
    expect(before).toBeCloseTo(10, 3);
    run.set(0, 1);
    run.advance(0.02);
    return before - run.pressures[1]!;
  };
  // C dp/dt = -0.05 sqrt(p) with C = (0.1 + 10 x)/1400: sqrt(p) falls by 0.05 t/(2 C).
  for (const x of [0.1, 0.9]) {
    const left = Math.sqrt(10) - (0.05 * 0.02 * 1400) / (2 * (0.1 + 10 * x));
    expect(Math.abs(given(x) - (10 - left * left))).toBeLessThan(0.02);
  }
});
