/** Worked figures 14 to 18 and 32: orifices, paths, checks, flow controls, a hose. */
import { expect, test } from 'vitest';
import { delivers, HEAD, holds, toBar, toLpm } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

test.each([
  [0.6, 100, 1.595],
  [1.5, 180, 13.37],
  [2, 50, 12.53],
])('14 orifice %d mm at %d bar: %d L/min', (d, bar, expected) => {
  const s = machineOf(`${HEAD}${holds('p', bar, 20, 20 - expected, 'OR1.in')}
throttle OR1 (orifice ${d} mm)
working OR1.out to R1`).settle(blank);
  expect(Math.abs(toLpm(s.flows['OR1.in']) / expected - 1)).toBeLessThan(1e-3);
});

test.each([
  [39.78, 2.2],
  [4.013, 0.05],
])('15 path 60 L/min at 5 bar: %d L/min at %d bar', (flow, bar) => {
  const s = machineOf(`${HEAD}${delivers('P1', flow, 'BV1.A')}
shutoff BV1 (open, passes 60 L/min at 5 bar)
working BV1.B to R1`).settle(blank);
  expect(Math.abs(toBar(s.pressures['P1.P']) / bar - 1)).toBeLessThan(1e-3);
});

test('16 check, crack 0.5, 80 L/min at 3 bar in all: 1.785 bar at 57.3 L/min', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 57.3, 'CV1.in')}
check CV1 (crack 0.5 bar, passes 80 L/min at 3 bar)
working CV1.out to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(1.785, 3);
});

test('17 compensated 9 L/min needing 6 bar, at 2 bar: 5.196 L/min', () => {
  const s = machineOf(`${HEAD}${holds('p', 2, 20, 14.804, 'FC1.in')}
throttle FC1 (set 9 L/min, compensated, needs 6 bar)
working FC1.out to R1`).settle(blank);
  expect(toLpm(s.flows['FC1.in'])).toBeCloseTo(5.196, 2);
});

test('18 set 1.8 L/min not compensated, at 24 bar: 3.6 L/min', () => {
  const s = machineOf(`${HEAD}${holds('p', 24, 20, 16.4, 'FC1.in')}
throttle FC1 (set 1.8 L/min)
working FC1.out to R1`).settle(blank);
  expect(toLpm(s.flows['FC1.in'])).toBeCloseTo(3.6, 2);
});

test('32 hose 12 mm, 1.5 m, 23 L/min, 32 mm2/s: laminar, 0.315 bar', () => {
  const s = machineOf(`${HEAD.replace('grade 46', 'grade 32').replace('45 degC', '40 degC')}${delivers('P1', 23, 'BV1.A')}
shutoff BV1 (open)
working BV1.B to R1 (hose, bore 12 mm, length 1.5 m)`).settle(blank);
  expect(toBar(s.pressures['BV1.B'])).toBeCloseTo(0.315, 2);
});
