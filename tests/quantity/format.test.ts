/** Figures as shown. */
import {
  displayUnit,
  format,
  formatAgainst,
  formatNumber,
  parseQuantity,
  roundHalfAway,
  UNITS,
  toSi,
  type FormatOptions,
} from '@oilway/quantity';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const shown = (text: string, options: FormatOptions = {}) => {
  const q = parseQuantity(text);
  if (!q.ok) throw new Error(q.problem);
  return format(q.value.si, q.value.dimension, options);
};

describe('three significant digits and the exceptions', () => {
  it.each<[string, string, FormatOptions?]>([
    ['183.24 bar', '183 bar'],
    ['16.14 bar', '16.1 bar'],
    ['4.40 bar', '4.4 bar'],
    ['9.96 bar', '10.0 bar'],
    ['0.04 bar', '0.0 bar'],
    ['-0.05 bar', '-0.1 bar'],
    ['14000 bar', '14000 bar'],
    ['4.234 s', '4.23 s'],
    ['0.05 s', '0.05 s'],
    ['12.34 s', '12.3 s'],
    ['1.75 s', '1.75 s', { units: { time: 'min' } }],
    ['90 s', '1.50 min', { units: { time: 'min' } }],
    ['30 s', '0.500 min', { unit: 'min' }],
    ['57.34 L/min', '57.3 L/min'],
    ['0.018 L/min', '0.0180 L/min'],
    ['4.203 kW', '4.20 kW'],
    ['315.4 mm', '315 mm', { position: true }],
    ['3.4 mm', '3 mm', { position: true }],
    ['0.8 mm', '0.800 mm'],
    ['1450 rpm', '1450 rpm'],
    ['0 L/min', '0 L/min'],
    ['45 degC', '45.0 °C'],
    ['72.5 K', '72.5 K'],
    ['36 R', '20.0 K'],
    ['0 bara', '-1.0 bar'],
    ['-0.2 bar', '0.8 bara', { absolute: true }],
    ['-0.2 bar', '11.8 psia', { absolute: true, display: 'us' }],
    ['20 K', '36.0 R', { display: 'us' }],
    ['45 degC', '113 °F', { display: 'us' }],
    ['100 bar', '1450 psi', { display: 'us' }],
    ['4.4 bar', '63.8 psi', { display: 'us' }],
    ['100 bar', '10.0 MPa', { units: { pressure: 'MPa' } }],
    ['100 bar', '100 bar', { units: { pressure: 'MPa' }, unit: 'bar' }],
    ['2 bar', '0.20 MPa', { unit: 'MPa' }],
    ['1.11 m2', '1.11 m2'],
    ['31.2 cm2', '31.2 cm2'],
    ['1.11 m2', '11100 cm2', { units: { area: 'cm2' } }],
    ['15 ft2', '15.0 ft2', { display: 'us' }],
    ['100 mm', '3.94 in', { units: { pressure: 'psi' } }],
    ['100 mm', '100 mm', { units: { pressure: 'psi' }, display: 'metric' }],
  ])('%s is shown as %s', (text, expected, options) => {
    expect(shown(text, options ?? {})).toBe(expected);
  });
  it('never prints a number that is none', () => {
    expect(format(Number.NaN, 'flow')).toBe('not computed');
    expect(format(Number.POSITIVE_INFINITY, 'flow')).not.toContain('NaN');
  });
  it('keeps a written absolute unit for input only', () => {
    expect(displayUnit('pressure', { unit: 'bara' }).symbol).toBe('bar');
  });
  it('gives the number alone for tables', () => {
    expect(formatNumber(183.2e5, 'pressure')).toBe('183');
  });
});

describe('rounding', () => {
  it.each([
    [1.005, 2, 1.01],
    [-1.005, 2, -1.01],
    [2.5, 0, 3],
    [-2.5, 0, -3],
    [0.125, 2, 0.13],
    [1234.5, -1, 1230],
    [1235, -1, 1240],
    [8.345, 2, 8.35],
  ])('%d to %d decimals is %d', (value, decimals, expected) => {
    expect(roundHalfAway(value, decimals)).toBe(expected);
  });
  it('is odd: the same size on both sides of zero', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1e9, noNaN: true }),
        fc.integer({ min: -3, max: 6 }),
        (x, d) => roundHalfAway(-x, d) === -roundHalfAway(x, d),
      ),
    );
  });
  it('reads back within half a unit of the third figure, in every unit', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...UNITS.filter((unit) => unit.offset === 0)),
        fc.double({ min: 12, max: 9e5, noNaN: true }),
        (unit, value) => {
          const text = format(toSi(value, unit), unit.dimension, { unit: unit.symbol });
          const back = parseFloat(text);
          return (
            Math.abs(back - value) <= 0.5 * 10 ** (Math.floor(Math.log10(value)) - 2) * 1.0001 + (unit.dimension === 'pressure' ? 0.5 : 0)
          );
        },
      ),
    );
  });
});

describe('a value beside its bound', () => {
  it.each([
    [9.996, 10, '9.996 bar', '10 bar'],
    [179.96, 180, '179.96 bar', '180 bar'],
    [183.2, 180, '183 bar', '180 bar'],
    [180, 180, '180 bar', '180 bar'],
  ])('%d of %d bar', (value, bound, a, b) => {
    expect(formatAgainst(value * 1e5, bound * 1e5, 'pressure')).toEqual({ value: a, bound: b });
  });
  it('always tells two different values apart, on the right side', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 1e3, noNaN: true }), fc.double({ min: 1e-9, max: 0.5, noNaN: true }), (bound, less) => {
        const pair = formatAgainst((bound - less) * 1e5, bound * 1e5, 'pressure');
        return parseFloat(pair.value) < parseFloat(pair.bound);
      }),
    );
  });
});
