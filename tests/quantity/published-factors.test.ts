/** The unit table against published conversion factors. */
import { inUnit, parseQuantity, unitOf } from '@oilway/quantity';
import { describe, expect, it } from 'vitest';

/**
 * NIST Special Publication 811 (2008), Appendix B.8 "Factors for units listed alphabetically": seven figures, SI value of one unit.
 * The figures are from memory of that table.
 */
const SP811: readonly (readonly [symbol: string, si: number, entry: string])[] = [
  ['in', 2.54e-2, 'inch'],
  ['ft', 3.048e-1, 'foot'],
  ['um', 1e-6, 'micron'],
  ['in2', 6.4516e-4, 'square inch'],
  ['ft2', 9.290304e-2, 'square foot'],
  ['in3', 1.638706e-5, 'cubic inch'],
  ['ft3', 2.831685e-2, 'cubic foot'],
  ['gal', 3.785412e-3, 'gallon (U.S.)'],
  ['UKgal', 4.54609e-3, 'gallon [Canadian and U.K. (Imperial)]'],
  ['qt', 9.463529e-4, 'quart (U.S. liquid)'],
  ['L', 1e-3, 'liter'],
  ['gpm', 6.30902e-5, 'gallon (U.S.) per minute'],
  ['ft3/min', 4.719474e-4, 'cubic foot per minute'],
  ['ft3/s', 2.831685e-2, 'cubic foot per second'],
  ['in3/min', 2.731177e-7, 'cubic inch per minute'],
  ['lb', 4.535924e-1, 'pound (avoirdupois)'],
  ['oz', 2.834952e-2, 'ounce (avoirdupois)'],
  ['slug', 1.45939e1, 'slug'],
  ['ton', 9.071847e2, 'ton, short (2000 lb)'],
  ['t', 1e3, 'tonne'],
  ['lbf', 4.448222, 'pound-force'],
  ['klbf', 4.448222e3, 'kip (1000 lbf)'],
  ['tonf', 8.896443e3, 'ton-force (2000 lbf)'],
  ['kgf', 9.80665, 'kilogram-force'],
  ['psi', 6.894757e3, 'pound-force per square inch'],
  ['ksi', 6.894757e6, 'ksi'],
  ['bar', 1e5, 'bar'],
  ['mbar', 1e2, 'millibar'],
  ['kgf/cm2', 9.80665e4, 'kilogram-force per square centimeter'],
  ['inHg', 3.386389e3, 'inch of mercury, conventional'],
  ['lbf.in', 1.129848e-1, 'pound-force inch'],
  ['lbf.ft', 1.355818, 'pound-force foot'],
  ['kgf.m', 9.80665, 'kilogram-force meter'],
  ['Btu', 1.055056e3, 'British thermal unit (IT)'],
  ['Wh', 3.6e3, 'watt hour'],
  ['kWh', 3.6e6, 'kilowatt hour'],
  ['hp', 7.456999e2, 'horsepower (550 ft.lbf/s)'],
  ['PS', 7.354988e2, 'horsepower (metric)'],
  ['Btu/h', 2.930711e-1, 'British thermal unit (IT) per hour'],
  ['lb.ft2', 4.214011e-2, 'pound foot squared'],
  ['lb.in2', 2.926397e-4, 'pound inch squared'],
  ['lb/ft3', 1.601846e1, 'pound per cubic foot'],
  ['lb/in3', 2.76799e4, 'pound per cubic inch'],
  ['lb/gal', 1.198264e2, 'pound per gallon (U.S.)'],
  ['cSt', 1e-6, 'centistokes'],
  ['St', 1e-4, 'stokes'],
  ['ft2/s', 9.290304e-2, 'square foot per second'],
  ['in/s', 2.54e-2, 'inch per second'],
  ['ft/s', 3.048e-1, 'foot per second'],
  ['ft/min', 5.08e-3, 'foot per minute'],
  ['km/h', 2.777778e-1, 'kilometer per hour'],
  ['ft/s2', 3.048e-1, 'foot per second squared'],
  ['rpm', 1.047198e-1, 'revolution per minute'],
  ['rev', 6.283185, 'revolution'],
  ['deg', 1.745329e-2, 'degree (angle)'],
  ['lbf/in', 1.751268e2, 'pound-force per inch'],
  ['lbf/ft', 1.45939e1, 'pound-force per foot'],
  ['R', 5.555556e-1, 'degree Fahrenheit (temperature interval)'],
];

describe('units against NIST SP 811, Appendix B.8 (from memory)', () => {
  it.each(SP811)('%s is %d in SI: %s', (symbol, si) => {
    const halfOfTheSeventhFigure = 0.5 * 10 ** (Math.floor(Math.log10(si)) - 6);
    expect(Math.abs((unitOf(symbol)?.factor ?? 0) - si)).toBeLessThanOrEqual(halfOfTheSeventhFigure * 1.0001);
  });
});

/** Pairs printed in trade literature; the tolerance is half a unit of the last printed figure. */
const PAIRS: readonly (readonly [text: string, unit: string, printed: number, within: number, source: string])[] = [
  ['1 bar', 'psi', 14.5038, 5e-5, 'six-figure value of many trade tables (from memory)'],
  ['1 gal', 'in3', 231, 1e-9, 'definition of the US gallon, NIST Handbook 44 Appendix C (from memory)'],
  ['1 hp', 'kW', 0.7457, 5e-5, 'NIST SP 811 B.8'],
  ['1 hp', 'Btu/h', 2544.43, 5e-3, '2544.43 Btu/h of trade tables (from memory)'],
  ['212 degF', 'degC', 100, 1e-9, 'definition of the scales: water boils'],
  ['32 degF', 'degC', 0, 1e-9, 'definition of the scales: ice melts'],
  ['-40 degF', 'degC', -40, 1e-9, 'the two scales meet'],
  ['0 bara', 'bar', -1.01325, 1e-12, 'standard atmosphere, ISO 2533'],
  ['14.6959 psia', 'psi', 0, 1e-4, 'standard atmosphere in psi (from memory)'],
  ['600 L/min', 'm3/h', 36, 1e-9, 'definition'],
  ['1 cm3/rad', 'cm3/rev', 2 * Math.PI, 1e-9, 'definition'],
  ['1 in3/rev', 'cm3/rev', 16.387064, 1e-9, 'definition'],
];

describe('printed pairs', () => {
  it.each(PAIRS)('%s in %s is %d', (text, unit, printed, within) => {
    const q = parseQuantity(text);
    if (!q.ok) throw new Error(q.problem);
    const value = inUnit(q.value, unit);
    if (!value.ok) throw new Error(value.problem);
    expect(Math.abs(value.value - printed)).toBeLessThanOrEqual(within);
  });
});

describe('laws between units (definitions, no source needed)', () => {
  const si = (text: string) => {
    const q = parseQuantity(text);
    if (!q.ok) throw new Error(q.problem);
    return q.value.si;
  };
  it('bar times L/min is kW times 600', () => {
    expect((si('1 bar') * si('1 L/min')) / si('1 kW')).toBeCloseTo(1 / 600, 15);
  });
  it('psi times gpm is hp times 550 x 12 x 60 / 231', () => {
    expect(si('1 hp') / (si('1 psi') * si('1 gpm')) / ((550 * 12 * 60) / 231)).toBeCloseTo(1, 12);
  });
  it('hp is lbf.in times rpm over 63025 (five printed figures)', () => {
    expect(si('1 hp') / (si('1 lbf.in') * si('1 rpm'))).toBeCloseTo(63025.4, 1);
  });
});
