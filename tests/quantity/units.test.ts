/** Properties of the unit table and of its spellings. */
import {
  DIMENSIONS,
  fromSi,
  inUnit,
  matchUnit,
  nearestUnit,
  parseQuantity,
  quantity,
  SI_UNIT,
  toSi,
  UNIT_SPELLINGS,
  unitOf,
  UNITS,
  unitsOf,
} from '@oilway/quantity';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const anyUnit = fc.constantFrom(...UNITS);
const anyNumber = fc.double({ min: -1e6, max: 1e6, noNaN: true });
const closeTo = (a: number, b: number, scale: number) => Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(b), scale);

describe('unit table', () => {
  it('has a unit of every dimension and a factor above zero in every row', () => {
    for (const dimension of DIMENSIONS) expect(unitsOf(dimension).length, dimension).toBeGreaterThan(0);
    for (const unit of UNITS) {
      expect(unit.factor, unit.symbol).toBeGreaterThan(0);
      expect(unit.about.length, unit.symbol).toBeGreaterThan(3);
    }
  });
  it('names no two units by one spelling', () => {
    const seen = new Map<string, string>();
    for (const unit of UNITS) {
      for (const spelling of [unit.symbol, ...unit.aliases]) {
        expect(seen.get(spelling), `${spelling} of ${unit.symbol}`).toBeUndefined();
        seen.set(spelling, unit.symbol);
      }
    }
    for (const { spelling, unit } of UNIT_SPELLINGS) expect(seen.get(spelling) ?? unit.symbol, spelling).toBe(unit.symbol);
  });
  it('offers the unit behind SI figures in every dimension it names', () => {
    for (const dimension of DIMENSIONS) {
      const unit = unitOf(SI_UNIT[dimension]);
      if (unit?.dimension === dimension) expect(unit.factor).toBe(1);
    }
  });
  it('brings every unit to SI and back', () => {
    fc.assert(
      fc.property(anyUnit, anyNumber, (unit, value) =>
        closeTo(fromSi(toSi(value, unit), unit), value, 1 + Math.abs(unit.offset / unit.factor)),
      ),
      { numRuns: 2000 },
    );
  });
  it('converts between every pair of units of one dimension and back', () => {
    for (const a of UNITS) {
      for (const b of unitsOf(a.dimension)) {
        const there = inUnit({ si: toSi(7.25, a), dimension: a.dimension }, b.symbol);
        if (!there.ok) throw new Error(there.problem);
        const back = inUnit({ si: toSi(there.value, b), dimension: b.dimension }, a.symbol);
        if (!back.ok) throw new Error(back.problem);
        expect(closeTo(back.value, 7.25, 1 + Math.abs(a.offset / a.factor)), `${a.symbol} ${b.symbol}`).toBe(true);
      }
    }
  });
  it('refuses every unit of another dimension', () => {
    for (const a of UNITS) {
      for (const b of UNITS) expect(inUnit({ si: 1, dimension: a.dimension }, b.symbol).ok).toBe(a.dimension === b.dimension);
    }
  });
  it('says which gallon and which horsepower is meant', () => {
    for (const symbol of ['gal', 'gpm', 'gal/h']) expect(unitOf(symbol)?.about).toContain('US');
    expect(unitOf('hp')?.about).toContain('550');
    expect(unitOf('PS')?.about).toContain('metric');
  });
});

describe('spellings', () => {
  it.each([
    ['in^2', 'in2'],
    ['in²', 'in2'],
    ['m³/h', 'm3/h'],
    ['kg·m²', 'kg.m2'],
    ['kg⋅m^2', 'kg.m2'],
    ['N·m', 'N.m'],
    ['l/min', 'L/min'],
    ['\u00b5m', 'um'],
    ['\u03bcm', 'um'],
    ['\u00b5s', 'us'],
    ['°C', 'degC'],
    ['°F', 'degF'],
    ['°', 'deg'],
    ['cc/rev', 'cm3/rev'],
    ['cm³/rev', 'cm3/rev'],
    ['lpm', 'L/min'],
    ['mm²/s', 'mm2/s'],
    ['lbf·ft', 'lbf.ft'],
    ['barg', 'bar'],
    ['psig', 'psi'],
  ])('%s is %s', (spelling, symbol) => {
    expect(unitOf(spelling)?.symbol).toBe(symbol);
    expect(matchUnit(`${spelling} rest`, 0)?.length).toBe(spelling.length);
  });
  it('matches every spelling as a whole before each sign that may follow', () => {
    for (const { spelling, unit } of UNIT_SPELLINGS) {
      for (const after of ['', ' ', ',', ')', '\n', '+', '"', ':']) {
        expect(matchUnit(`12 ${spelling}${after}`, 3), spelling + after).toEqual({ unit, length: spelling.length });
      }
    }
  });
  it('matches no unit at the start of a longer word', () => {
    for (const { spelling } of UNIT_SPELLINGS) {
      if (spelling.endsWith('%')) continue;
      const match = matchUnit(`${spelling}zq`, 0);
      if (match !== undefined) expect(`${spelling}zq`[match.length]).toMatch(/[/*.·⋅^]/);
    }
    for (const word of ['motor', 'minutes', 'hot', 'step', 'inward', 'N1', 'm_1', 'm4', 'm⁴', 'N.x', 'Kelvin'])
      expect(matchUnit(word, 0), word).toBeUndefined();
  });
  it('leaves a division by a name alone', () => {
    expect(matchUnit('L/Q1', 0)).toMatchObject({ length: 1, unit: { symbol: 'L' } });
    expect(matchUnit('L/min', 0)).toMatchObject({ length: 5, unit: { symbol: 'L/min' } });
  });
  it.each([
    ['baar', 'bar'],
    ['Bar', 'bar'],
    ['l/mn', 'L/min'],
    ['gmp', 'gpm'],
    ['kn', 'kN'],
    ['cm3/rv', 'cm3/rev'],
    ['mm/sec', 'mm/s'],
    ['degc', 'degC'],
    ['RPM', 'rpm'],
    ['Mpa', 'MPa'],
    ['KW', 'kW'],
    ['mm/S', 'mm/s'],
  ])('%s is taken for %s mistyped', (word, symbol) => {
    expect(nearestUnit(word)?.symbol).toBe(symbol);
  });
  it('guesses nothing where nothing is near, and keeps to the dimension asked for', () => {
    expect(nearestUnit('furlong')).toBeUndefined();
    expect(nearestUnit('bat', 'pressure')?.symbol).toBe('bar');
    expect(nearestUnit('bat', 'flow')).toBeUndefined();
  });
  it('never fails on any text', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme' }), fc.nat(20), (text, offset) => {
        const match = matchUnit(text, offset);
        nearestUnit(text);
        if (match !== undefined) expect(unitOf(text.slice(offset, offset + match.length))).toBe(match.unit);
      }),
    );
  });
});

describe('quantities as written', () => {
  it.each([
    ['80 L/min', 80e-3 / 60, 'flow', 'L/min'],
    ['3/4 in', 0.75 * 0.0254, 'length', 'in'],
    ['1 1/2 in', 1.5 * 0.0254, 'length', 'in'],
    ['-0.2 bar', -20000, 'pressure', 'bar'],
    ['5 %', 0.05, 'ratio', '%'],
    ['95', 95, 'ratio', ''],
    ['1.4 GPa', 1.4e9, 'pressure', 'GPa'],
    ['45 °C', 318.15, 'temperature', 'degC'],
    ['0.25 kW/K', 250, 'power/temperature', 'kW/K'],
    ['120 cm3/rad', 120e-6, 'displacement', 'cm3/rad'],
  ])('%s', (text, si, dimension, unit) => {
    const q = parseQuantity(text);
    if (!q.ok) throw new Error(q.problem);
    expect(q.value.si).toBeCloseTo(si, 10);
    expect(q.value).toMatchObject({ dimension, unit });
  });
  it('says what is wrong otherwise', () => {
    expect(parseQuantity('3 baar')).toEqual({ ok: false, problem: 'unknown unit baar, did you mean bar' });
    expect(parseQuantity('fast')).toMatchObject({ ok: false });
    expect(parseQuantity('1/0 in')).toMatchObject({ ok: false });
    expect(parseQuantity('3 bar bar')).toMatchObject({ ok: false });
    expect(quantity(Number.NaN, 'bar')).toMatchObject({ ok: false });
    expect(quantity(1, 'furlong')).toEqual({ ok: false, problem: 'unknown unit furlong' });
  });
});
