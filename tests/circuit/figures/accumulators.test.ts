/** Worked figures 23 and 24: nitrogen charges, absolute pressures. */
import { oilAt, prechargeAt } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { HEAD, toBar } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

const ATM = 101325;
const gauge = (bar: number) => bar * 1e5 + ATM;

// Derived from p V^n = const with absolute pressures (independent script); formula: Sullivan, Fluid Power, 4th ed., p. 298.
test('23 10 L, 90 bar, oil between 100 and 200 bar: 4.482 L isothermal, 3.604 L at 1.4', () => {
  const between = (n: number) => oilAt(0.01, gauge(90), gauge(200), n) - oilAt(0.01, gauge(90), gauge(100), n);
  expect(between(1) * 1e3).toBeCloseTo(4.482, 3);
  expect(between(1.4) * 1e3).toBeCloseTo(3.604, 3);
});

test('24 precharge 50 bar at 20 degC in oil of 45 degC: 54.35 bar; 0.5 L between 56 and 70 bar: 95.7 and 71.1 cm3', () => {
  const p0 = prechargeAt(50e5, 293.15, 318.15);
  expect((p0 - ATM) / 1e5).toBeCloseTo(54.35, 2);
  const between = (n: number) => oilAt(0.5e-3, p0, gauge(70), n) - oilAt(0.5e-3, p0, gauge(56), n);
  expect(between(1) * 1e6).toBeCloseTo(95.7, 1);
  expect(between(1.4) * 1e6).toBeCloseTo(71.1, 1);
});

test('a charge with that oil in holds its line at that pressure', () => {
  const m = machineOf(`${HEAD}accumulator ACC1 (bladder, volume 10 L, precharge 90 bar at 45 degC, gas nitrogen)
shutoff BV1 (closed)
working ACC1 to BV1 to R1`);
  expect(toBar(m.solve({ ...blank, oil: { ACC1: oilAt(0.01, gauge(90), gauge(200), 1) } }).pressures['ACC1.P'])).toBeCloseTo(200, 3);
  const cold = m.solve({ ...blank, oil: { ACC1: 0.002 }, gasPressures: { ACC1: gauge(100) } });
  expect(toBar(cold.pressures['ACC1.P'])).toBeCloseTo(100, 3);
  expect(m.solve({ ...blank, oil: { ACC1: 'empty' } }).undetermined['ACC1.P']).toBeDefined();
});
