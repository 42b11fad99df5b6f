/** Real nitrogen against the check values and the table of the reference equation (Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361). */
import {
  compile,
  gasOil,
  gasPressure,
  nitrogenCurve,
  nitrogenDensity,
  nitrogenEntropy,
  nitrogenPressure,
  solveSteady,
  Transient,
} from '@oilway/engine';
import { describe, expect, it } from 'vitest';

const MOLAR = 0.02801348;

describe('reference equation', () => {
  it('reproduces its published check point: 138.8112 K, 10065.511 mol/m3: 5.2555376 MPa, 122.81946 J/(mol K)', () => {
    const density = 10065.511 * MOLAR;
    expect(nitrogenPressure(density, 138.8112)).toBeCloseTo(5.2555376, 6);
    expect(nitrogenEntropy(density, 138.8112)).toBeCloseTo(122.81946, 4);
  });
  it.each([
    [0.1, 20, 0.9998],
    [5, 0, 0.9845],
    [10, 20, 1.0008],
    [20, 20, 1.0518],
    [20, 60, 1.0751],
    [30, 0, 1.1298],
    [40, 20, 1.2489],
  ])('Z at %d MPa and %d C', (p, celsius, z) => {
    const t = celsius + 273.15;
    const density = nitrogenDensity(p, t);
    expect(Math.abs((p * 1e6 * MOLAR) / (density * 8.31451 * t) - z)).toBeLessThan(1e-4);
  });
});

describe('a 10 L charge, 90 bar at 20 C', () => {
  const at = 0.101325;
  const spec = { tag: 0, node: 1, volume: 10, precharge: 9 + at };
  it('takes 4.260 L isothermally between 100 and 200 bar (ideal: 4.482 L; adiabatic ideal 3.604 L)', () => {
    const real = { ...spec, curve: nitrogenCurve(10, 9 + at, 293.15) };
    expect(gasOil(real, 20 + at) - gasOil(real, 10 + at)).toBeCloseTo(4.26, 3);
    expect(gasOil(spec, 20 + at, 1) - gasOil(spec, 10 + at, 1)).toBeCloseTo(4.482, 3);
    expect(gasOil(spec, 20 + at, 1.4) - gasOil(spec, 10 + at, 1.4)).toBeCloseTo(3.604, 3);
    expect(gasPressure(real, gasOil(real, 17))).toBeCloseTo(17, 6);
  });
  it('gives 2.189 L isentropically from 200 to 100 bar', () => {
    const curve = nitrogenCurve(10, 9 + at, 293.15, 20 + at);
    const real = { ...spec, curve };
    expect(gasOil(real, 20 + at) - gasOil(real, 10 + at)).toBeCloseTo(2.189, 2);
  });
  it('does the same in a run', () => {
    const curve = nitrogenCurve(10, 9 + at, 293.15);
    const net = compile({
      nodes: [{ storage: 1, fixed: 0 }, { storage: 1e-6 }],
      elements: [{ type: 'pump', tag: 1, s: 0, p: 1, qth: 0.1, leak: 0, running: 0 }],
      actuators: [],
      gas: [{ ...spec, curve }],
      parameters: 1,
    });
    net.parameters.set([1]);
    const request = { positions: [], gas: [gasOil({ ...spec, curve }, 10 + at)] };
    const run = new Transient(net, request, solveSteady(net, request), { floor: 0 });
    const report = run.advance(100, [{ terms: [{ of: 'pressure', index: 1, weight: 1 }], threshold: 20, edge: 'rising' }]);
    expect(report.time).toBeCloseTo(42.6, 1);
  });
});
