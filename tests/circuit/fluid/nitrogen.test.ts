/** Nitrogen as a real gas, against the equation's own check values and figures computed from it by an independent script. */
import { nitrogenEntropy, nitrogenPressure, nitrogenZ, realOilAt, realPrechargeAt, realYield } from '@oilway/circuit';
import { expect, test } from 'vitest';

const gauge = (bar: number) => bar * 1e5 + 101325;
const near = (value: number, expected: number, share: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(share);

// Span et al., J. Phys. Chem. Ref. Data 29 (2000) 1361: saturated vapour near the critical point.
test('the check point of the equation', () => {
  near(nitrogenPressure(138.8112, 10065.511) / 1e6, 5.2555376, 1e-7);
  near(nitrogenEntropy(138.8112, 10065.511), 122.81946, 1e-7);
});

// Z at 0, 20, 30, 40, 50, 60 degC, absolute pressure in bar.
test.each([
  [1, [0.9995, 0.9998, 0.9998, 0.9999, 1.0, 1.0]],
  [50, [0.9845, 0.994, 0.9977, 1.001, 1.0038, 1.0063]],
  [100, [0.9848, 1.0008, 1.0071, 1.0125, 1.0172, 1.0213]],
  [200, [1.0338, 1.0518, 1.059, 1.0652, 1.0705, 1.0751]],
  [300, [1.1298, 1.1401, 1.1442, 1.1478, 1.1508, 1.1533]],
  [400, [1.2495, 1.2489, 1.2485, 1.248, 1.2473, 1.2466]],
])('compressibility at %d bar', (bar, values) => {
  [0, 20, 30, 40, 50, 60].forEach((c, i) => {
    expect(Math.abs(nitrogenZ(c + 273.15, bar * 1e5) - (values[i] ?? 0))).toBeLessThan(6e-5);
  });
});

// 10 L, precharge 90 bar, between 100 and 200 bar at 20 degC: 4.260 L slowly; 2.189 L quickly, the gas ends at -33 degC.
test('what a charge gives, slowly and quickly', () => {
  const slowly = realOilAt(0.01, gauge(90), gauge(200), 293.15) - realOilAt(0.01, gauge(90), gauge(100), 293.15);
  near(slowly * 1e3, 4.26, 1e-3);
  const quickly = realYield(0.01, gauge(90), gauge(200), gauge(100), 293.15);
  near(quickly.oil * 1e3, 2.189, 1e-3);
  expect(quickly.temperature - 273.15).toBeCloseTo(-33.4, 1);
});

// 90 bar at 20 degC read at 50 degC: 101.27 bar (ideal 99.3).
test('precharge over temperature', () => {
  near((realPrechargeAt(gauge(90), 293.15, 323.15) - 101325) / 1e5, 101.27, 1e-4);
});
