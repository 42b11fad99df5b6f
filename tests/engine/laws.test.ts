/** Every element law: derivatives against differences, volume balance, passivity, monotony, and the declared point met exactly. */
import type { ActuatorSpec, CheckSpec, ElementSpec, PathSpec } from '@oilway/engine';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Batch } from '../../packages/engine/laws/batch.ts';
import { lawOf } from '../../packages/engine/laws/index.ts';
import { inputsOf, type Law, MAX_INPUTS, MAX_OUTPUTS, outputsOf } from '../../packages/engine/laws/law.ts';

const rod: ActuatorSpec = { tag: 0, chambers: [], low: 0, high: 0.5, mass: 0 };
/** Parameters: 0 and 1 settings (MPa), 2 band, 3 share 0..1, 4 flow setting, 5 bit, 6 on/off. */
const specs: Record<string, ElementSpec> = {
  path: { type: 'path', tag: 0, a: 0, b: 1, k: 0.7, opening: 3 },
  check: { type: 'check', tag: 0, a: 0, b: 1, k: 0.7, crack: 0.05 },
  laminar: { type: 'laminar', tag: 0, a: 0, b: 1, g: 0.01, factor: 3 },
  unloading: {
    type: 'piloted',
    tag: 0,
    a: 0,
    b: 1,
    k: 1,
    pilots: [
      { node: 2, weight: 1 },
      { node: 1, weight: -1 },
    ],
    set: 0,
    band: 2,
    bit: 5,
    setWhenOn: 1,
    oneWay: false,
  },
  counterbalance: {
    type: 'piloted',
    tag: 0,
    a: 0,
    b: 1,
    k: 1,
    pilots: [
      { node: 0, weight: 1 },
      { node: 2, weight: 3 },
      { node: 1, weight: -4 },
    ],
    set: 0,
    band: 2,
    oneWay: true,
  },
  relief: { type: 'relief', tag: 0, p: 0, t: 1, ref: 2, set: 0, vented: 0.4, override: 0.08, qN: 1.5, k: 2 },
  'remote relief': { type: 'relief', tag: 0, p: 0, t: 1, ref: 1, x: 2, set: 0, vented: 0.4, override: 0.08, qN: 1.5, k: 2 },
  regulator: { type: 'regulator', tag: 0, a: 0, b: 1, set: 4, needs: 0.6 },
  'bypass regulator': { type: 'bypassRegulator', tag: 0, a: 0, b: 1, t: 2, set: 4, needs: 0.6 },
  'compensated edge': { type: 'compensatedEdge', tag: 0, a: 0, b: 1, k: 1, opening: 3, limit: 0.4 },
  cam: { type: 'camPath', tag: 0, a: 0, b: 1, k: 0.7, actuator: 0, at: [0.1, 0.2, 0.3], opening: [1, 0.6, 0] },
  cushion: { type: 'cushion', tag: 0, a: 0, b: 1, actuator: 0, end: 'extended', length: 0.3, kMin: 0.01, kFree: 1 },
  'fixed pump': { type: 'pump', tag: 0, s: 0, p: 1, qth: 1, leak: 0.003, running: 6 },
  'compensated pump': {
    type: 'pump',
    tag: 0,
    s: 0,
    p: 1,
    l: 2,
    qth: 1,
    leak: 0.003,
    running: 6,
    compensator: { set: 0, band: 2, smallest: 0.2 },
  },
  'sensing pump': {
    type: 'pump',
    tag: 0,
    s: 0,
    p: 1,
    qth: 1,
    leak: 0.003,
    running: 6,
    compensator: { set: 0, band: 2, smallest: 0, x: 3, xAdds: 2 },
    sensing: { ls: 2, margin: 2 },
  },
  line: { type: 'line', tag: 0, a: 0, b: 1, bore: 0.012, length: 1.5, roughness: 2e-5, minor: 1.5, nu: 32e-6, rho: 870 },
  'gear divider': { type: 'gearDivider', tag: 0, p: 0, a: 1, b: 2, share: [1, 2], g: [0.001, 0.002], friction: 0.6, qN: 0.5 },
  'spool divider': { type: 'spoolDivider', tag: 0, p: 0, a: 1, b: 2, share: [1, 1], error: 0.05, drop: 0.6, qN: 0.5, combines: false },
  combiner: { type: 'spoolDivider', tag: 0, p: 0, a: 1, b: 2, share: [1, 2], error: 0.05, drop: 0.6, qN: 0.5, combines: true },
  intensifier: { type: 'intensifier', tag: 0, p: 0, a: 1, t: 2, ratio: 3 },
  shuttle: { type: 'shuttle', tag: 0, a: 0, b: 1, c: 2, k: 5 },
};

function evaluate(law: Law, z: ArrayLike<number>, parameters: Float64Array, blend = 1): { out: Float64Array; gradient: Float64Array } {
  const out = new Float64Array(MAX_OUTPUTS);
  const gradient = new Float64Array(MAX_INPUTS * MAX_OUTPUTS).fill(Number.NaN);
  const inputs = new Float64Array(MAX_INPUTS);
  inputs.set(Array.from(z));
  law.evaluate(inputs, parameters, blend, out, gradient);
  return { out, gradient };
}

/** Pressures near each other and far apart, so that blends and saturated ranges are both met. */
const pressure = fc.oneof(
  fc.double({ min: -0.1, max: 35, noNaN: true }),
  fc.double({ min: 4.9, max: 5.6, noNaN: true }),
  fc.constantFrom(0, 5, 10),
);
const parameters = fc
  .tuple(
    fc.double({ min: 0.5, max: 20, noNaN: true }),
    fc.double({ min: 0.5, max: 5, noNaN: true }),
    fc.double({ min: 0.05, max: 2, noNaN: true }),
    fc.double({ min: 0, max: 1, noNaN: true }),
    fc.double({ min: 0.01, max: 1, noNaN: true }),
    fc.constantFrom(0, 1),
    fc.constantFrom(0, 1),
  )
  .map((values) => Float64Array.from(values));

describe.each(Object.entries(specs))('%s', (name, spec) => {
  const law = lawOf(spec, [rod]);
  const n = law.nodes.length;
  const inputs = inputsOf(law);
  const outputs = outputsOf(law);
  const point = fc.tuple(
    fc.array(pressure, { minLength: n, maxLength: n }),
    fc.double({ min: -2, max: 2, noNaN: true }),
    fc.double({ min: 0, max: 0.5, noNaN: true }),
  );
  const inputsAt = ([p, own, x]: [number[], number, number]): number[] => [
    ...p,
    ...(law.own ? [own] : []),
    ...(law.actuator >= 0 ? [x] : []),
  ];

  it('has the derivatives of its own values', () => {
    fc.assert(
      fc.property(point, parameters, fc.constantFrom(1, 10), (at, par, blend) => {
        const z = inputsAt(at);
        const { gradient } = evaluate(law, z, par, blend);
        for (let i = 0; i < inputs; i++) {
          const step = 1e-6 * Math.max(1, Math.abs(z[i]!));
          const up = z.with(i, z[i]! + step);
          const down = z.with(i, z[i]! - step);
          const high = evaluate(law, up, par, blend);
          const low = evaluate(law, down, par, blend);
          for (let o = 0; o < outputs; o++) {
            const difference = (high.out[o]! - low.out[o]!) / (2 * step);
            // C1 laws: the slope lies between those at both ends, up to the curvature inside the step.
            const ends = [low.gradient[o * inputs + i]!, gradient[o * inputs + i]!, high.gradient[o * inputs + i]!];
            const spread = Math.max(...ends) - Math.min(...ends);
            const size = Math.max(...ends.map(Math.abs), Math.abs(high.out[o]!) * 1e-3, 1e-3);
            expect(Math.abs(difference - gradient[o * inputs + i]!), `output ${o} by input ${i}`).toBeLessThan(
              spread + 2e-4 * size + (1e-9 * Math.abs(high.out[o]!)) / step,
            );
          }
        }
      }),
      { numRuns: 300 },
    );
  });

  it('neither makes nor loses oil', () => {
    fc.assert(
      fc.property(point, parameters, (at, par) => {
        const { out } = evaluate(law, inputsAt(at), par);
        let sum = 0;
        let size = 1e-12;
        for (let t = 0; t < law.terminals; t++) {
          sum += out[t]!;
          size += Math.abs(out[t]!);
        }
        expect(Math.abs(sum)).toBeLessThan(1e-12 * size + 1e-15);
      }),
    );
  });

  if (law.joins && law.terminals === 2 && !law.own) {
    it('never moves oil against the pressure', () => {
      fc.assert(
        fc.property(point, parameters, (at, par) => {
          const z = inputsAt(at);
          const { out } = evaluate(law, z, par);
          expect(out[0]! * (z[0]! - z[1]!)).toBeGreaterThanOrEqual(0);
        }),
      );
    });
  }
  if (law.joins && law.terminals === 2 && law.nodes.length === 2 && !law.own) {
    it('passes no less at a higher drop', () => {
      fc.assert(
        fc.property(point, fc.double({ min: 0, max: 5, noNaN: true }), parameters, (at, more, par) => {
          const z = inputsAt(at);
          const less = evaluate(law, z, par).out[0]!;
          const after = evaluate(law, z.with(0, z[0]! + more), par).out[0]!;
          if (name !== 'cushion' || z[0]! > z[1]!) expect(after).toBeGreaterThanOrEqual(less - 1e-12);
        }),
      );
    });
  }
});

it('passages and checks in the loop give what the laws give', () => {
  fc.assert(
    fc.property(
      pressure,
      pressure,
      parameters,
      fc.constantFrom(1, 10, 100),
      fc.constantFrom<'path' | 'check'>('path', 'check'),
      (a, b, par, blend, type) => {
        const spec = { type, tag: 0, a: 0, b: 1, k: 0.7, crack: 0.05, opening: 3, heads: [0.02, 0.01] } as PathSpec | CheckSpec;
        const law = lawOf(spec, []);
        const single = evaluate(law, [a - 0.02, b - 0.01], par, blend);
        const floor = 1e-6;
        const r = new Float64Array(3);
        const j = new Float64Array(5);
        new Batch([spec], type === 'check', [0, 1], [0, 1, 2, 3]).stamp(Float64Array.from([a, b]), par, blend, floor, r, j);
        const leak = floor * (a - b - 0.01);
        expect(Math.abs(r[0]! + single.out[0]! + leak)).toBeLessThan(1e-12);
        expect(Math.abs(r[1]! + single.out[1]! - leak)).toBeLessThan(1e-12);
        for (let i = 0; i < 4; i++) expect(Math.abs(j[i]! + single.gradient[i]! + (i % 3 === 0 ? floor : -floor))).toBeLessThan(1e-9);
      },
    ),
  );
});
