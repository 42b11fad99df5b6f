/**
 * Three worked circuits. Steady states: SciPy 1.17 `root` (residual below 1e-14) on the same equations; event times: SciPy 1.17 `solve_ivp`
 * Radau, rtol 1e-9, atol 1e-11, with the kinks of ramps and cams as interval ends and rigid stops.
 */
import { solveSteady, Transient, type TransientWatch } from '@oilway/engine';
import { describe, expect, it } from 'vitest';
import { oneCylinder, type Reference, traverseAndFeed, twoPumps } from './reference.ts';

const passes = (threshold: number, edge: 'rising' | 'falling'): TransientWatch => ({
  terms: [{ of: 'position', index: 0, weight: 1 }],
  threshold,
  edge,
});

describe.each([
  ['one cylinder', oneCylinder],
  ['two pumps', twoPumps],
  ['traverse and feed', traverseAndFeed],
])('%s, steady at 0.1 m', (_name, make) => {
  const reference: Reference = make();
  for (const which of ['extend', 'retract'] as const) {
    const expected = reference[which];
    if (!expected) continue;
    it(which, () => {
      reference.net.parameters.set(which === 'extend' ? [1, 0] : [0, 1]);
      const result = solveSteady(reference.net, { positions: [0.1] });
      expect(result.converged).toBe(true);
      expected.pressures.forEach((p, i) => {
        expect(Math.abs(result.pressures[i + 1]! - p)).toBeLessThan(1e-6 * Math.max(1, p));
      });
      expect(Math.abs(result.velocities[0]! / expected.velocity - 1)).toBeLessThan(1e-6);
      expect(result.diagnosis).toEqual([]);
    });
  }
});

/** Starts without pressure at the retracted stop and opens "extend" within 20 ms. */
function started(make: () => Reference, tolerance?: number): Transient {
  const { net } = make();
  const request = { positions: [0], floor: 0 };
  const steady = solveSteady(net, request);
  const run = new Transient(
    net,
    request,
    { ...steady, state: new Float64Array(steady.state.length) },
    { dynamics: true, floor: 0, ...(tolerance ? { tolerance } : {}) },
  );
  run.ramp(0, 0, 1, 0, 0.02);
  return run;
}
const near = (time: number, expected: number, share = 2e-4): void => {
  expect(Math.abs(time / expected - 1)).toBeLessThan(share);
};

describe('with inertia, event times', () => {
  it('one cylinder: out, against the stop, back', () => {
    const run = started(oneCylinder);
    const out = run.advance(4, [passes(0.45, 'rising')]);
    near(out.time, 2.88861224);
    const stop = run.advance(4).happened.find((h) => h.what === 'stop reached');
    near(stop!.time, 3.20753649);
    expect(run.positions[0]).toBe(0.5);
    run.ramp(0, 1, 0, 4, 4.02);
    run.ramp(1, 0, 1, 4, 4.02);
    const back = run.advance(8, [passes(0.05, 'falling')]);
    expect(back.happened.map((h) => h.what)).toEqual(['stop left']);
    near(back.happened[0]!.time, 4.019014998615217);
    near(back.time, 5.79580046);
    // Settled by then: the steady state of the same command.
    const pressures = [15.08313062, 2.08083333, 14.66762985, 0.28715762];
    pressures.forEach((p, i) => {
      expect(Math.abs(run.pressures[i + 1]! - p)).toBeLessThan(1e-3);
    });
  });
  it('two pumps: traverse, then pressing against a spring', () => {
    const run = started(twoPumps);
    near(run.advance(9, [passes(0.3, 'rising')]).time, 3.89857272);
    near(run.advance(9, [passes(0.38, 'rising')]).time, 8.02954365);
    const pressures = [10.219109, 0.638038111, 10.1964721, 0.0112456821];
    pressures.forEach((p, i) => {
      expect(Math.abs(run.pressures[i + 1]! - p)).toBeLessThan(1e-3);
    });
  });
  it('traverse and feed: over the cam', () => {
    const run = started(traverseAndFeed);
    near(run.advance(12, [passes(0.3, 'rising')]).time, 1.58731405);
    near(run.advance(12, [passes(0.32, 'rising')]).time, 1.70422312);
    near(run.advance(12, [passes(0.4, 'rising')]).time, 9.86216224);
  });
  it('comes nearer with a tighter tolerance', () => {
    const error = (tolerance: number): number => {
      const run = started(oneCylinder, tolerance);
      return Math.abs(run.advance(4, [passes(0.45, 'rising')]).time - 2.88861224);
    };
    expect(error(1e-6)).toBeLessThan(1e-6 * 2.89);
  });
});
