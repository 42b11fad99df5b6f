/** Sensitivities against whole solves on either side. */
import { compile, type ElementSpec, type NetworkSpec, sensitivities, solveSteady, type SteadyRequest } from '@oilway/engine';
import { expect, it } from 'vitest';

const spec = (changed: Partial<Record<'k' | 'qth', number>> = {}): NetworkSpec => ({
  nodes: [{ storage: 1, fixed: 0 }, { storage: 1e-3 }, { storage: 1e-3 }, { storage: 1e-3 }],
  elements: [
    { type: 'pump', tag: 1, s: 0, p: 1, qth: changed.qth ?? 0.6, leak: 0.002, running: 0 },
    { type: 'relief', tag: 2, p: 1, t: 0, ref: 0, set: 1, vented: 0.4, override: 0.1, qN: 1, k: 3 },
    { type: 'path', tag: 3, a: 1, b: 2, k: changed.k ?? 0.6 },
    { type: 'regulator', tag: 4, a: 3, b: 0, set: 2, needs: 0.6 },
  ] satisfies ElementSpec[],
  actuators: [
    {
      tag: 5,
      chambers: [
        { node: 2, area: 3 },
        { node: 3, area: -2 },
      ],
      low: 0,
      high: 0.4,
      mass: 1,
    },
  ],
  gas: [],
  parameters: 3,
});
const request: SteadyRequest = {
  positions: [0.1],
  loads: [{ fixed: [{ at: [0], force: [-8] }], resistOut: [], resistIn: [], friction: 1 }],
};

function answer(values: readonly number[], changed: Partial<Record<'k' | 'qth', number>> = {}): { v: number; p: number } {
  const net = compile(spec(changed));
  net.parameters.set(values);
  const result = solveSteady(net, request);
  expect(result.converged).toBe(true);
  return { v: result.velocities[0]!, p: result.pressures[1]! };
}

it.each([
  ['metered out over the relief', [1, 12, 0.1]],
  ['pump flow alone', [1, 25, 0.9]],
])('%s', (_name, values) => {
  const net = compile(spec());
  net.parameters.set(values);
  const result = solveSteady(net, request);
  const found = sensitivities(net, request, result, [
    { parameter: 1 },
    { parameter: 2 },
    { element: 0, size: 'qth' },
    { element: 2, size: 'k' },
    { element: 2, size: 'colour' },
  ]);
  expect(found).toHaveLength(4);
  const step = 1e-4;
  const differences = [
    [answer(values.with(1, values[1]! + step)), answer(values.with(1, values[1]! - step))],
    [answer(values.with(2, values[2]! + step)), answer(values.with(2, values[2]! - step))],
    [answer(values, { qth: 0.6 + step }), answer(values, { qth: 0.6 - step })],
    [answer(values, { k: 0.6 + step }), answer(values, { k: 0.6 - step })],
  ] as const;
  differences.forEach(([high, low], i) => {
    expect(Math.abs(found[i]!.velocities[0]! - (high.v - low.v) / (2 * step))).toBeLessThan(2e-4);
    expect(Math.abs(found[i]!.pressures[1]! - (high.p - low.p) / (2 * step))).toBeLessThan(2e-3 * (1 + Math.abs(found[i]!.pressures[1]!)));
  });
  // d ln v/d ln s: the control's setting alone, or the pump's flow (less its leakage) alone, governs the speed.
  const share = (i: number): number => (found[i]!.velocities[0]! * found[i]!.value) / result.velocities[0]!;
  if (values[2]! < 0.5) {
    expect(share(1)).toBeCloseTo(1, 2);
    expect(Math.abs(share(2))).toBeLessThan(0.01);
  } else {
    expect(share(2)).toBeGreaterThan(0.95);
    expect(Math.abs(share(1))).toBeLessThan(0.2);
  }
});
