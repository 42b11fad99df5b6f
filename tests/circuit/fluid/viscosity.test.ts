import { midpointOfGrade, viscosityAt100, viscosityBy, viscosityIndex, viscosityOf, walther } from '@oilway/circuit';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { referenceOils } from '../../../packages/circuit/fluid/viscosity-index.ts';

const C = 273.15;
const close = (value: number, expected: number, relative: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(relative);

// Published spreadsheet for ASTM D341: (32 mm2/s, 40 degC), (5.4, 100 degC) with T = degC + 273.
test('Walther line through two points', () => {
  const line = walther(32, 313, 5.4, 373);
  close(line.a, 9.5259, 1e-4);
  close(line.b, 3.7449, 1e-4);
  close(viscosityBy(line, 353), 8.5, 0.01);
});

// Worked examples of ASTM D2270 / ISO 2909, clauses 5.1.4, 6.1.4 (1) and (2); the third from memory.
test('viscosity index: the examples of the standard', () => {
  close(referenceOils(8.86).l, 119.94, 5e-4);
  close(referenceOils(8.86).h, 69.48, 5e-4);
  expect(Math.round(viscosityIndex(73.3, 8.86) ?? 0)).toBe(92);
  expect(Math.round(viscosityIndex(22.83, 5.05) ?? 0)).toBe(156);
  expect(Math.round(viscosityIndex(53.47, 7.8) ?? 0)).toBe(111);
  expect(viscosityIndex(5, 1.9)).toBeUndefined();
});

// Derived from the table of ASTM D2270 by an independent script.
test.each([
  [15, 3.41],
  [22, 4.294],
  [32, 5.362],
  [46, 6.76],
  [68, 8.731],
  [100, 11.384],
  [150, 15.02],
])('grade %d of index 100 has %d mm2/s at 100 degC', (grade, expected) => close(viscosityAt100(grade, 100), expected, 0.002));

// Derived from ASTM D341 and D2270 by an independent script (T = degC + 273.15).
test.each([
  [32, 20, 86.79],
  [32, 50, 21.45],
  [46, 0, 584.9],
  [46, 20, 134.5],
  [46, 50, 29.92],
  [46, 60, 20.56],
  [46, 80, 11.05],
  [68, 20, 214.1],
  [68, 50, 42.91],
  [68, 60, 28.71],
])('grade %d, index 100, at %d degC: %d mm2/s', (grade, t, expected) => close(viscosityOf(grade, 100, t + C), expected, 0.005));

// ISO 3448: mid-points that are not the name.
test('mid-points of ISO 3448', () => {
  expect([2, 3, 5, 7, 10, 46].map(midpointOfGrade)).toEqual([2.2, 3.2, 4.6, 6.8, 10, 46]);
});

test('the equation form above the table meets it at 20 and the printed range at 70 mm2/s', () => {
  for (const y of [20, 22, 28, 40, 55, 70]) {
    const below = referenceOils(y - 1e-6);
    const above = referenceOils(y + 1e-6);
    close(above.l, below.l, 1e-3);
    close(above.h, below.h, 1e-3);
  }
});

test('grade and index give the index back', () => {
  fc.assert(
    fc.property(
      fc.constantFrom(15, 22, 32, 46, 68, 100, 150, 220, 320, 460, 680, 1000),
      fc.integer({ min: 0, max: 220 }),
      (grade, index) => {
        const back = viscosityIndex(grade, viscosityAt100(grade, index));
        expect(Math.abs((back ?? Number.NaN) - index)).toBeLessThan(0.01);
      },
    ),
  );
});

test('viscosity falls with temperature, for every grade', () => {
  fc.assert(
    fc.property(
      fc.constantFrom(2, 5, 10, 32, 68, 320),
      fc.integer({ min: 50, max: 160 }),
      fc.double({ min: 255, max: 390, noNaN: true }),
      (grade, index, t) => {
        expect(viscosityOf(grade, index, t + 2)).toBeLessThan(viscosityOf(grade, index, t));
      },
    ),
  );
});
