/** Steady states through the engine's own laws, against figures worked by hand or published; contacts, charges and diagnoses. */
import {
  compile,
  type ElementSpec,
  type LoadState,
  type NetworkSpec,
  problemsOf,
  solveSteady,
  type SteadyRequest,
  type SteadyResult,
} from '@oilway/engine';
import { describe, expect, it } from 'vitest';
import { compression, CompressionTable } from '../../packages/engine/charge.ts';
import { churchill } from '../../packages/engine/laws/line.ts';
import { root } from '../../packages/engine/smooth.ts';

/** K of a passage that passes `flow` L/min at `drop` bar. */
const k = (flow: number, drop: number): number => flow / 60 / root(drop / 10, 0.01);
const LPM = 60;

function solve(spec: Partial<NetworkSpec> & { values?: readonly number[] }, request: Partial<SteadyRequest> = {}): SteadyResult {
  const net = compile({
    nodes: [{ storage: 1, fixed: 0 }],
    elements: [],
    actuators: [],
    gas: [],
    ...spec,
    parameters: spec.values?.length ?? 0,
  });
  net.parameters.set(spec.values ?? []);
  const result = solveSteady(net, { positions: net.spec.actuators.map(() => 0.1), ...request });
  expect(result.converged).toBe(true);
  return result;
}
const tank = { storage: 1, fixed: 0 };
const node = { storage: 1e-3 };
const pump = (p: number, litresPerMinute: number, running: number): ElementSpec => ({
  type: 'pump',
  tag: 1,
  s: 0,
  p,
  qth: litresPerMinute / 60,
  leak: 0,
  running,
});

describe('valves at flow (oil as declared, tank at 0 bar)', () => {
  it('relief: set 160 bar, override 10 %, passes 100 L/min at 5 bar; 60 L/min, T at 2 bar: 171.6 bar', () => {
    const result = solve({
      nodes: [tank, node, { storage: 1, fixed: 0.2 }],
      elements: [
        pump(1, 60, 0),
        { type: 'relief', tag: 2, p: 1, t: 2, ref: 2, set: 1, vented: 0.4, override: 0.1, qN: 100 / 60, k: k(100, 5) },
      ],
      values: [1, 16],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(171.6, 3);
  });
  it('vented relief: set 160, override 8 %, vented 4, passes 90 L/min at 6 bar, X at 0, 69.6 L/min: 4 bar and its share of the least band', () => {
    const result = solve({
      nodes: [tank, node],
      elements: [
        pump(1, 69.6, 0),
        { type: 'relief', tag: 2, p: 1, t: 0, ref: 0, x: 0, set: 1, vented: 0.4, override: 0.08, qN: 1.5, k: k(90, 6) },
      ],
      values: [1, 16],
    });
    // 8 % of 4 bar is less than the least band of 0.5 bar; the open body asks 6 (69.6/90)^2 = 3.59 bar only.
    expect(result.pressures[1]! * 10).toBeCloseTo(4 + (0.5 * 69.6) / 90, 2);
  });
  it('check: crack 0.5 bar, passes 80 L/min at 3 bar in total; 57.3 L/min: 1.785 bar', () => {
    const result = solve({
      nodes: [tank, node],
      elements: [pump(1, 57.3, 0), { type: 'check', tag: 2, a: 1, b: 0, k: k(80, 2.5), crack: 0.05 }],
      values: [1],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(1.785, 3);
  });
  it('sequence: set 80, band 8, passes 20 L/min at 4 bar, A at 66 bar, 11.2 L/min: P 82.22 bar, opening 0.278', () => {
    const result = solve({
      nodes: [tank, node, { storage: 1, fixed: 6.6 }],
      elements: [
        pump(1, 11.2, 0),
        { type: 'piloted', tag: 2, a: 1, b: 2, k: k(20, 4), pilots: [{ node: 1, weight: 1 }], set: 1, band: 2, oneWay: true },
      ],
      values: [1, 8, 0.8],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(82.22, 2);
    expect(result.openings[1]!).toBeCloseTo(0.278, 3);
  });
  it('reducing: set 70, band 3.5, passes 80 L/min at 6, P 160; 20 L/min drawn: A 69.77 bar', () => {
    const result = solve({
      nodes: [tank, { storage: 1, fixed: 16 }, node],
      elements: [
        {
          type: 'piloted',
          tag: 1,
          a: 1,
          b: 2,
          k: k(80, 6),
          pilots: [
            { node: 2, weight: -1 },
            { node: 0, weight: 1 },
          ],
          set: 0,
          band: 1,
          oneWay: true,
        },
        { type: 'regulator', tag: 2, a: 2, b: 0, set: 2, needs: 0.6 },
      ],
      values: [-7, 0.35, 20 / 60],
    });
    expect(result.pressures[2]! * 10).toBeCloseTo(69.77, 2);
  });
  it('reducing into a dead end: stands at its setting, does not creep', () => {
    const result = solve({
      nodes: [tank, { storage: 1, fixed: 16 }, node],
      elements: [
        {
          type: 'piloted',
          tag: 1,
          a: 1,
          b: 2,
          k: 1,
          pilots: [
            { node: 2, weight: -1 },
            { node: 0, weight: 1 },
          ],
          set: 0,
          band: 1,
          oneWay: true,
        },
        { type: 'path', tag: 2, a: 2, b: 0, k: 1, opening: 2 },
      ],
      values: [-5, 0.25, 0],
    });
    expect(result.pressures[2]!).toBeGreaterThan(4.98);
    expect(result.pressures[2]!).toBeLessThan(5.005);
  });
  it('compensated control: 9 L/min from 6 bar on, 5.196 L/min at 2 bar', () => {
    const at = (bar: number): number =>
      solve({
        nodes: [tank, { storage: 1, fixed: bar / 10 }],
        elements: [{ type: 'regulator', tag: 1, a: 1, b: 0, set: 0, needs: 0.6 }],
        values: [9 / 60],
      }).flows[0]! * LPM;
    expect(at(6)).toBeCloseTo(9, 3);
    expect(at(60)).toBeCloseTo(9, 2);
    // 9 sqrt(2/6); the laminar core takes a thousandth at so small a drop.
    expect(at(2)).toBeCloseTo((9 * root(0.2, 0.01)) / root(0.6, 0.01), 3);
    expect(Math.abs(at(2) - 5.196)).toBeLessThan(0.005);
  });
  it('pressure compensator: 56 cm3 at 1450 rpm, 140 bar, 3 % band: 58.0 L/min at 137 bar', () => {
    const result = solve({
      nodes: [tank, { storage: 1, fixed: 13.7 }],
      elements: [{ type: 'pump', tag: 1, s: 0, p: 1, qth: 81.2 / 60, leak: 0, running: 0, compensator: { set: 1, band: 2, smallest: 0 } }],
      values: [1, 14, 0.42],
    });
    expect(-result.flows[0]! * LPM).toBeCloseTo(58.0, 2);
  });
  it('load sensing: 20 bar over LS 90 bar at 60 % stroke: 108.8 bar', () => {
    const result = solve({
      nodes: [tank, node, { storage: 1, fixed: 9 }],
      elements: [
        { type: 'pump', tag: 1, s: 0, p: 1, qth: 1, leak: 0, running: 0, sensing: { ls: 2, margin: 2 } },
        { type: 'regulator', tag: 2, a: 1, b: 0, set: 1, needs: 0.6 },
      ],
      values: [1, 0.6],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(108.8, 2);
    expect(result.openings[0]).toBeCloseTo(0.6, 3);
  });
  it('gear divider: 1:1, error 2 %, passes 25 L/min at 6; 20.3 L/min, A 100, B 60 bar: P 83.96 bar, A 10.05, B 10.25 L/min', () => {
    const g = ((0.02 * 25 * 0.5) / 60 / 50) * 10;
    const result = solve({
      nodes: [tank, node, { storage: 1, fixed: 10 }, { storage: 1, fixed: 6 }],
      elements: [pump(1, 20.3, 0), { type: 'gearDivider', tag: 2, p: 1, a: 2, b: 3, share: [1, 1], g: [g, g], friction: 0.6, qN: 25 / 60 }],
      values: [1],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(83.96, 1);
    expect(-result.flows[result.elementStart[1]! + 1]! * LPM).toBeCloseTo(10.05, 1);
    expect(-result.flows[result.elementStart[1]! + 2]! * LPM).toBeCloseTo(10.25, 1);
  });
  it('hose: bore 12 mm, 1.5 m, 23 L/min, 32 mm2/s, 870 kg/m3: 0.315 bar (Hagen-Poiseuille)', () => {
    const result = solve({
      nodes: [tank, node],
      elements: [
        pump(1, 23, 0),
        { type: 'line', tag: 2, a: 1, b: 0, bore: 0.012, length: 1.5, roughness: 2e-5, minor: 0, nu: 32e-6, rho: 870 },
      ],
      values: [1],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(0.315, 3);
  });
  it('head: a tap 10 m above the level stands 0.0853 bar/m below the net', () => {
    const head = 0.00853 * 10;
    const result = solve({
      nodes: [tank, node],
      elements: [pump(1, 10, 0), { type: 'path', tag: 2, a: 1, b: 0, k: k(10, 5), heads: [head, 0] }],
      values: [1],
    });
    expect(result.pressures[1]! * 10).toBeCloseTo(5 + head * 10, 3);
  });
});

describe('formulas', () => {
  it('Churchill: smooth pipe, Re 500 .. 1e5 (Churchill 1977, evaluated)', () => {
    for (const [re, f] of [
      [500, 0.128],
      [2000, 0.03204],
      [3000, 0.04297],
      [4000, 0.04059],
      [1e4, 0.031],
      [1e5, 0.01787],
    ] as const)
      expect(Math.abs(churchill(re, 0).f / f - 1)).toBeLessThan(3e-4);
    expect(Math.abs(churchill(1e5, 1e-4).f - 0.018463)).toBeLessThan(2e-6);
    // Colebrook, relative roughness 0.001: 0.0222 at Re 1e5 and 0.0199 at 1e6, within a per cent.
    expect(Math.abs(churchill(1e5, 1e-3).f / 0.0222 - 1)).toBeLessThan(0.01);
    expect(Math.abs(churchill(1e6, 1e-3).f / 0.0199 - 1)).toBeLessThan(0.01);
  });
  it('stiffness of oil with air: bulk 14000 bar, 0.5 % air, n 1.4 at 10, 50, 100 bar: 7655, 13210, 13745 bar', () => {
    const oil = { bulk: 1400, air: 0.005, exponent: 1.4 };
    for (const [bar, stiffness] of [
      [10, 7655],
      [50, 13210],
      [100, 13745],
    ] as const) {
      const at = compression(oil, bar / 10);
      expect(Math.abs(10 / at.slope / stiffness - 1)).toBeLessThan(2e-4);
    }
  });
  it('stiffness from the table is that of the formula', () => {
    const oil = { bulk: 1400, air: 0.005, exponent: 1.4 };
    const table = new CompressionTable(oil);
    for (let p = -0.2; p < 110; p += 0.0137 + p * 0.01 * (p > 0 ? 1 : 0)) {
      const exact = compression(oil, p);
      table.at(p);
      expect(Math.abs(table.value - exact.value)).toBeLessThan(2e-9);
      expect(Math.abs(table.slope / exact.slope - 1)).toBeLessThan(1e-5);
    }
  });
});

describe('bodies', () => {
  const cylinder = {
    tag: 7,
    chambers: [
      { node: 1, area: 3.1172 },
      { node: 2, area: -2.0994 },
    ],
    low: 0,
    high: 0.4,
    mass: 0.3,
  };
  const load = (over: Partial<LoadState>): LoadState => ({ fixed: [], resistOut: [], resistIn: [], friction: 0, ...over });
  const fed = (values: readonly number[], request: Partial<SteadyRequest>): SteadyResult =>
    solve(
      {
        nodes: [tank, node, node, node],
        elements: [
          pump(3, 20, 0),
          { type: 'relief', tag: 2, p: 3, t: 0, ref: 0, set: 1, vented: 0.4, override: 0.1, qN: 1, k: 5 },
          { type: 'path', tag: 3, a: 3, b: 1, k: 1 },
          { type: 'path', tag: 4, a: 2, b: 0, k: 1 },
        ],
        actuators: [cylinder],
        values,
      },
      request,
    );
  it('meter-out: 1.26 L/min through a 63/36 annulus is 10.00 mm/s', () => {
    const result = solve(
      {
        nodes: [tank, { storage: 1, fixed: 16 }, node],
        elements: [{ type: 'regulator', tag: 1, a: 2, b: 0, set: 0, needs: 0.6 }],
        actuators: [cylinder],
        values: [1.26 / 60],
      },
      { loads: [load({ resistOut: [{ at: [0], force: [9] }], friction: 0.25 + 0.93517 })] },
    );
    expect(result.velocities[0]! * 1000).toBeCloseTo(10.0, 1);
    // (160 x 3117.2 - 90000 - 2500 - 9351.7)/2099.4
    expect(result.pressures[2]! * 10).toBeCloseTo(189.1, 1);
  });
  it('stalled by a resisting load: still, never driven back by it', () => {
    const stalled = fed([1, 16], { loads: [load({ resistOut: [{ at: [0], force: [100] }], friction: 1 })] });
    expect(Math.abs(stalled.velocities[0]!)).toBeLessThan(5e-5);
    const off = fed([0, 16], { loads: [load({ resistOut: [{ at: [0], force: [100] }], friction: 1 })] });
    expect(Math.abs(off.velocities[0]!)).toBeLessThan(1e-6);
  });
  it('a stop holds and says its force; free stops let go', () => {
    const held = fed([0, 16], { positions: [0], loads: [load({ fixed: [{ at: [0], force: [-20] }] })] });
    expect(held.contacts[0]).toBe('low');
    expect(held.velocities[0]).toBe(0);
    expect(held.stopForces[0]!).toBeCloseTo(20, 1);
    const free = fed([0, 16], { positions: [0], freeStops: [true], loads: [load({ fixed: [{ at: [0], force: [-20] }] })] });
    expect(free.contacts[0]).toBe('free');
    const leaving = fed([1, 16], { positions: [0], loads: [load({ friction: 1 })] });
    expect(leaving.contacts[0]).toBe('free');
    expect(leaving.velocities[0]!).toBeGreaterThan(0.05);
    const end = fed([1, 16], { positions: [0.4], loads: [load({ friction: 1 })] });
    expect(end.contacts[0]).toBe('high');
    expect(end.stopForces[0]!).toBeLessThan(-40);
  });
  it('locked: returns the force with which it presses', () => {
    const locked = fed([1, 16], { locked: [true] });
    expect(locked.velocities[0]).toBe(0);
    expect(locked.pressureForces[0]!).toBeCloseTo(3.1172 * locked.pressures[1]! - 2.0994 * locked.pressures[2]!, 9);
    expect(locked.stopForces[0]!).toBeCloseTo(-locked.pressureForces[0]!, 9);
    expect(locked.pressures[1]!).toBeGreaterThan(16);
  });
  it('tables of force: the side of a jump is chosen', () => {
    const jump = [load({ fixed: [{ at: [0.1, 0.1], force: [0, -10] }] })];
    const below = fed([1, 16], { positions: [0.1], side: [-1], loads: jump });
    const above = fed([1, 16], { positions: [0.1], side: [1], loads: jump });
    expect(below.loadForces[0]).toBeCloseTo(0, 9);
    expect(above.loadForces[0]).toBeCloseTo(-10, 9);
  });
  it('a charged accumulator gives the pressure, its flow is an outcome; empty it leaves the node free', () => {
    const gas = [{ tag: 1, node: 1, volume: 10, precharge: 9.101325 }];
    const elements: ElementSpec[] = [{ type: 'path', tag: 1, a: 1, b: 0, k: 0.1 }];
    const charged = solve({ nodes: [tank, node], elements, gas }, { gas: [4.482], gasExponent: 1 });
    // 10 L, 90 bar, 4.482 L out of 100..200 bar isothermally: at 0 to 4.482 L the pressure is 9.1013 x 10/5.518 absolute.
    expect(charged.pressures[1]!).toBeCloseTo((9.101325 * 10) / 5.518 - 0.101325, 6);
    expect(charged.gasFlows[0]!).toBeCloseTo(-0.1 * root(charged.pressures[1]!, 0.01), 4);
    const empty = solve({ nodes: [tank, node], elements, gas }, { gas: ['empty'] });
    expect(Math.abs(empty.pressures[1]!)).toBeLessThan(1e-6);
    expect(empty.gasFlows[0]).toBe(0);
  });
});

describe('diagnosis', () => {
  it('OVERPRESSURE: a pump into closed valves names flow, source and what is closed', () => {
    const result = solve({
      nodes: [tank, node],
      elements: [pump(1, 30, 0), { type: 'path', tag: 42, a: 1, b: 0, k: 1, opening: 1 }],
      values: [1, 0],
    });
    const found = result.diagnosis.find((d) => d.kind === 'OVERPRESSURE');
    expect(found).toMatchObject({ nodes: [1], sources: [1], closed: [42] });
    expect(found!.kind === 'OVERPRESSURE' && found!.flow * LPM).toBeCloseTo(30, 1);
    expect(result.pressures[1]!).toBeGreaterThan(60);
    expect(result.pressures[1]!).toBeLessThan(61.5);
  });
  it('STARVED: a cylinder pulled out by its load draws more than comes', () => {
    const result = solve(
      {
        nodes: [tank, node, node],
        elements: [
          { type: 'path', tag: 5, a: 2, b: 0, k: 1 },
          { type: 'check', tag: 6, a: 1, b: 0, k: 1, crack: 0 },
        ],
        actuators: [
          {
            tag: 7,
            chambers: [
              { node: 1, area: 3.1 },
              { node: 2, area: -2.1 },
            ],
            low: 0,
            high: 0.4,
            mass: 0.3,
          },
        ],
      },
      { loads: [{ fixed: [{ at: [0], force: [10] }], resistOut: [], resistIn: [], friction: 0.1 }] },
    );
    const found = result.diagnosis.find((d) => d.kind === 'STARVED');
    expect(found).toMatchObject({ nodes: [1], actuators: [0] });
    expect(found!.kind === 'STARVED' && found!.flow).toBeCloseTo(3.1 * result.velocities[0]!, 3);
  });
  it('CLOSED VOLUME: a line between two closed valves; not one that a load presses on', () => {
    const trapped = solve({
      nodes: [tank, node],
      elements: [{ type: 'path', tag: 1, a: 1, b: 0, k: 1, opening: 0 }],
      values: [0],
    });
    expect(trapped.diagnosis).toEqual([{ kind: 'CLOSED VOLUME', nodes: [1], closed: [1] }]);
    const carried = solve(
      {
        nodes: [tank, node],
        elements: [{ type: 'path', tag: 1, a: 1, b: 0, k: 1, opening: 0 }],
        actuators: [{ tag: 7, chambers: [{ node: 1, area: 5 }], low: 0, high: 0.4, mass: 1 }],
        values: [0],
      },
      { loads: [{ fixed: [{ at: [0], force: [-12] }], resistOut: [], resistIn: [], friction: 0 }] },
    );
    expect(carried.diagnosis).toEqual([]);
    expect(carried.pressures[1]!).toBeCloseTo(2.4, 3);
  });
});

it('says what is wrong with a network instead of computing it', () => {
  const problems = problemsOf({
    nodes: [tank],
    elements: [{ type: 'path', tag: 0, a: 0, b: 3, k: Number.NaN }],
    actuators: [{ tag: 0, chambers: [{ node: 9, area: 1 }], low: 1, high: 0, mass: 0 }],
    gas: [],
    parameters: 0,
  });
  expect(problems.map((p) => p.message)).toEqual([
    'path: a node is not in the network',
    'path: k is not a finite number',
    'a chamber is at no node',
    'its low stop lies above its high stop',
  ]);
});
