/** Load statements as forces: ranges, tables, weight by attitude, load cases, relaxing parts. */
import type { Body, Circuit } from '@oilway/circuit';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  forceAt,
  greatestHolding,
  loadCases,
  loadInSteps,
  needed,
  netFixed,
  relaxesWithin,
} from '../../../packages/circuit/study/loads.ts';
import { lookup } from '../../../packages/circuit/study/lookup.ts';
import { circuitOf, PLAIN } from './support/circuits.ts';

const body = (stroke = 0.3, begins = 0): Body => ({
  id: 'C1',
  actuators: ['C1'],
  type: 'linear',
  stroke,
  begins,
  sealFriction: 0,
  knots: [],
});
const withLoad = (load: string, more = '', text = PLAIN): Circuit => circuitOf(`${text}load C1 (${load})\n${more}`);
const CYCLE = 'cycle Go {\n  step Out energise SOL1 until LS1 on\n  step Back energise SOL2 until LS2 on\n}\n';

describe('loads in a step', () => {
  it('counts a range inside, its ends included, and nothing outside', () => {
    const load = loadInSteps(lookup(withLoad('resist 9 kN from 100 mm to 200 mm')), body(), []);
    const at = (x: number) => needed(load, x, 1);
    expect(at(0.1)).toBeCloseTo(9000);
    expect(at(0.15)).toBeCloseTo(9000);
    expect(at(0.2)).toBeCloseTo(9000);
    expect(at(0.0999)).toBe(0);
    expect(at(0.2001)).toBe(0);
  });
  it('resists only in the direction named', () => {
    const load = loadInSteps(lookup(withLoad('resist 9 kN extending, friction 250 N')), body(), []);
    expect(needed(load, 0.1, 1)).toBeCloseTo(9250);
    expect(needed(load, 0.1, -1)).toBeCloseTo(250);
  });
  it('is linear between the knots of a table and holds its end values outside', () => {
    const load = loadInSteps(lookup(withLoad('inward (100 mm: 0 kN, 200 mm: 10 kN)')), body(), []);
    expect(netFixed(load, 0.15)).toBeCloseTo(-5000);
    expect(netFixed(load, 0.3)).toBeCloseTo(-10000);
    expect(netFixed(load, 0)).toBeCloseTo(0);
  });
  it('narrows an entry to its step', () => {
    const at = lookup(withLoad('inward 5 kN in Out', CYCLE));
    expect(netFixed(loadInSteps(at, body(), ['Go.Out']), 0.1)).toBeCloseTo(-5000);
    expect(netFixed(loadInSteps(at, body(), ['Go.Back']), 0.1)).toBe(0);
  });
  it('takes weight by attitude: 1.2 t with the rod up presses inward by m g', () => {
    // 1.2 t x 9.80665 m/s2 (ISO 80000-3) = 11 768 N.
    const text = PLAIN.replace('attitude level', 'attitude rod up');
    expect(netFixed(loadInSteps(lookup(withLoad('mass 1.2 t', '', text)), body(), []), 0)).toBeCloseTo(-11767.98, 1);
    const tilted = PLAIN.replace('attitude level', 'attitude 30 deg');
    expect(netFixed(loadInSteps(lookup(withLoad('mass 1.2 t', '', tilted)), body(), []), 0)).toBeCloseTo(-5883.99, 1);
    expect(netFixed(loadInSteps(lookup(withLoad('mass 1.2 t')), body(), []), 0)).toBeCloseTo(0);
  });
});

describe('load cases of a state', () => {
  it('leaves out what only resists, and studies the unloaded case where all loads may be absent', () => {
    const cases = loadCases(lookup(withLoad('resist 9 kN, friction 1 kN')), body());
    expect(cases.map((one) => one.name)).toEqual(['none']);
    expect(cases[0]!.load.friction).toBe(0);
  });
  it('finds where a table first reaches its greatest force', () => {
    const cases = loadCases(lookup(withLoad('inward (100 mm: 0 kN, 200 mm: 10 kN, 250 mm: 10 kN)')), body());
    expect(cases.map((one) => one.name)).toEqual(['inward', 'none']);
    expect(cases[0]!.greatest).toBeCloseTo(-10000);
    expect(cases[0]!.at).toBeCloseTo(0.2);
  });
  it('keeps the weight in every case, the table present and absent', () => {
    const text = PLAIN.replace('attitude level', 'attitude rod down');
    const cases = loadCases(lookup(withLoad('mass 100 kg, inward (100 mm: 0 kN, 200 mm: 10 kN)', '', text)), body());
    expect(cases.map((one) => [one.name, Math.round(one.greatest)])).toEqual([
      ['inward', -9019],
      ['outward', 981],
    ]);
    expect(greatestHolding(cases).name).toBe('inward');
  });
});

describe('a part that springs back', () => {
  const press = loadInSteps(lookup(withLoad('inward (100 mm: 0 kN, 103 mm: 30 kN)')), body(), []);
  it('relaxes within 5 mm of the motion it drives', () => {
    expect(relaxesWithin(press, 0.103, -1, 5e-3)).toBeCloseTo(3e-3, 6);
    expect(relaxesWithin(press, 0.102, -1, 5e-3)).toBeCloseTo(2e-3, 6);
  });
  it('is no relaxing against the motion, nor over a longer way', () => {
    expect(relaxesWithin(press, 0.103, 1, 5e-3)).toBeUndefined();
    const soft = loadInSteps(lookup(withLoad('inward (100 mm: 0 kN, 150 mm: 30 kN)')), body(), []);
    expect(relaxesWithin(soft, 0.15, -1, 5e-3)).toBeUndefined();
  });
  it('is no relaxing where a weight stays behind the table', () => {
    const text = PLAIN.replace('attitude level', 'attitude rod up');
    const load = loadInSteps(lookup(withLoad('mass 50 kg, inward (100 mm: 0 kN, 103 mm: 30 kN)', '', text)), body(), []);
    expect(relaxesWithin(load, 0.103, -1, 5e-3)).toBeUndefined();
  });
});

describe('force over position', () => {
  it('never leaves the span of its knots', () => {
    const knots = fc.array(fc.tuple(fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: -1e5, max: 1e5, noNaN: true })), {
      minLength: 1,
      maxLength: 6,
    });
    fc.assert(
      fc.property(knots, fc.double({ min: -0.5, max: 1.5, noNaN: true }), (list, x) => {
        const sorted = [...list].sort((a, b) => a[0] - b[0]);
        const force = sorted.map((one) => one[1]);
        const f = forceAt({ at: sorted.map((one) => one[0]), force }, x);
        const slack = 1e-6 * Math.max(...force.map(Math.abs), 1);
        return f >= Math.min(...force) - slack && f <= Math.max(...force) + slack;
      }),
    );
  });
});
