import { densityAt, effectiveBulk } from '@oilway/circuit';
import { expect, test } from 'vitest';

const close = (value: number, expected: number, relative: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(relative);

// Derived from 1/K = sum of shares over stiffness, air polytropic, n = 1.4, absolute pressure (independent script).
test.each([
  [1.5, 0.01, 10, 0.4832],
  [1.5, 0.01, 50, 1.324],
  [1.5, 0.01, 100, 1.441],
  [1.5, 0.05, 50, 0.886],
  [1.5, 0.05, 100, 1.238],
  [1.5, 0.005, 50, 1.407],
])('oil of %d GPa with a share of %d air at %d bar absolute: %d GPa', (k, air, p, expected) => {
  close(effectiveBulk(k * 1e9, air, p * 1e5) / 1e9, expected, 0.002);
});

// Worked figure: bulk 14000 bar, air 0.5 %, n 1.4, at 10, 50, 100 bar gauge.
test('stiffness of oil with half a percent of air', () => {
  const at = (bar: number) => effectiveBulk(1.4e9, 0.005, bar * 1e5 + 101325) / 1e5;
  close(at(10), 7655, 1e-4);
  close(at(50), 13210, 1e-4);
  close(at(100), 13745, 1e-4);
});

// Rabie, Fluid Power Engineering, p. 37: 7e-4 1/K.
test('density falls by 0.7 per mille a kelvin', () => {
  close(densityAt(870, 313.15, 323.15), 870 / 1.007, 1e-12);
  expect(densityAt(870, 313.15, 313.15)).toBe(870);
});
