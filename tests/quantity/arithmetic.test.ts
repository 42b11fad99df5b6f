/** Computing with quantities, and the preferred numbers. */
import {
  add,
  amountOf,
  divide,
  DIMENSIONS,
  greatest,
  least,
  multiply,
  negate,
  nextPreferred,
  parseQuantity,
  preferredValues,
  quantityOf,
  RODS_OF_BORE,
  SERIES,
  squareRoot,
  subtract,
  TUBES,
  type Amount,
  type Dimension,
  type Outcome,
  type SeriesName,
} from '@oilway/quantity';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

const amount = (text: string): Amount => {
  const q = parseQuantity(text);
  if (!q.ok) throw new Error(q.problem);
  return amountOf(q.value);
};
const value = <T>(outcome: Outcome<T>): T => {
  if (!outcome.ok) throw new Error(outcome.problem);
  return outcome.value;
};
const named = (outcome: Outcome<Amount>, expected?: Dimension) => value(quantityOf(value(outcome), expected));

describe('products and quotients find their name', () => {
  it.each<[string, '*' | '/', string, Dimension, number]>([
    ['100 bar', '*', '20 cm2', 'force', 20000],
    ['20 kN', '/', '100 bar', 'area', 2e-3],
    ['40 cm3/rev', '*', '1500 rpm', 'flow', 1e-3],
    ['60 L/min', '/', '20 cm2', 'velocity', 0.5],
    ['60 L/min', '*', '100 bar', 'power', 1e4],
    ['100 bar', '*', '62.83185307179586 cm3/rev', 'torque', 100],
    ['100 N.m', '*', '60 rpm', 'power', 100 * 2 * Math.PI],
    ['100 mm', '/', '2 s', 'velocity', 0.05],
    ['400 kg', '*', '2 m/s2', 'force', 800],
    ['2 kW', '/', '4 K', 'power/temperature', 500],
    ['100 kg', '/', '1 m3', 'density', 100],
    ['10 bar', '*', '1 L', 'energy', 1000],
    ['12 V', '*', '2 A', 'power', 24],
    ['50 mm', '*', '2', 'length', 0.1],
    ['3', '*', '50 mm', 'length', 0.15],
    ['30 mm', '/', '15 mm', 'ratio', 2],
  ])('%s %s %s', (a, sign, b, dimension, si) => {
    const q = named(sign === '*' ? multiply(amount(a), amount(b)) : divide(amount(a), amount(b)));
    expect(q.dimension).toBe(dimension);
    expect(q.si / si).toBeCloseTo(1, 12);
  });
  it('force times length is energy, or torque where torque is expected', () => {
    const product = multiply(amount('10 N'), amount('2 m'));
    expect(named(product).dimension).toBe('energy');
    expect(named(product, 'torque').dimension).toBe('torque');
    expect(named(product, 'energy').dimension).toBe('energy');
  });
  it('goes through dimensions without a name', () => {
    const squared = value(multiply(amount('3 kN'), amount('3 kN')));
    expect(quantityOf(squared)).toMatchObject({ ok: false });
    expect(named(squareRoot(squared))).toMatchObject({ dimension: 'force', si: 3000 });
    const d = named(squareRoot(value(divide(value(multiply(amount('4'), amount('50 cm2'))), amount('3.14159265358979')))));
    expect(d.dimension).toBe('length');
    expect(d.si).toBeCloseTo(0.0797885, 6);
  });
  it('a multiple keeps the unit it was written in', () => {
    expect(named(multiply(amount('1.1'), amount('160 bar')))).toMatchObject({ unit: 'bar', dimension: 'pressure' });
  });
});

describe('sums', () => {
  it('keep to one dimension', () => {
    expect(named(add(amount('10 mm'), amount('1 in'))).si).toBeCloseTo(0.0354, 12);
    expect(add(amount('10 mm'), amount('1 bar'))).toMatchObject({ ok: false, problem: 'cannot add pressure to length' });
    expect(subtract(amount('10 L/min'), amount('1 bar'))).toMatchObject({ ok: false, problem: 'cannot subtract pressure from flow' });
  });
  it('know temperature points from differences', () => {
    expect(named(subtract(amount('60 degC'), amount('20 degC')))).toMatchObject({ dimension: 'temperature difference', si: 40 });
    expect(named(add(amount('20 degC'), amount('15 K')))).toMatchObject({ dimension: 'temperature', si: 308.15, unit: 'degC' });
    expect(named(add(amount('15 K'), amount('20 degC')))).toMatchObject({ dimension: 'temperature', si: 308.15 });
    expect(add(amount('20 degC'), amount('15 degC')).ok).toBe(false);
    expect(subtract(amount('15 K'), amount('20 degC')).ok).toBe(false);
    expect(add(amount('20 degC'), amount('1 bar')).ok).toBe(false);
    expect(multiply(amount('20 degC'), amount('2')).ok).toBe(false);
    expect(negate(amount('20 degC')).ok).toBe(false);
    expect(squareRoot(amount('20 degC')).ok).toBe(false);
  });
});

describe('no value is ever not a number', () => {
  it('says why instead', () => {
    expect(divide(amount('1 bar'), amount('0 bar'))).toMatchObject({ ok: false, problem: 'division by zero' });
    expect(squareRoot(value(negate(amount('1 m2'))))).toMatchObject({ ok: false });
    expect(least([])).toMatchObject({ ok: false });
    expect(greatest([amount('1 bar'), amount('1 mm')])).toMatchObject({ ok: false });
    const huge = amountOf({ si: 1e300, dimension: 'ratio', unit: '' });
    expect(multiply(huge, huge)).toMatchObject({ ok: false });
  });
  it('min and max pick', () => {
    expect(named(least([amount('1 bar'), amount('2 psi'), amount('3 bar')])).unit).toBe('psi');
    expect(named(greatest([amount('1 bar'), amount('2 psi'), amount('3 bar')])).si).toBe(3e5);
  });
  it('dividing what was multiplied gives it back, in every dimension', () => {
    const usual = DIMENSIONS.filter((name) => name !== 'temperature');
    fc.assert(
      fc.property(fc.constantFrom(...usual), fc.constantFrom(...usual), fc.double({ min: 0.01, max: 1e4, noNaN: true }), (a, b, si) => {
        const x = amountOf({ si, dimension: a, unit: '' });
        const y = amountOf({ si: 3, dimension: b, unit: '' });
        const back = named(divide(value(multiply(x, y)), y), a);
        return back.dimension === a && Math.abs(back.si / si - 1) < 1e-12;
      }),
    );
  });
});

describe('preferred numbers', () => {
  it('ascend, and their second choices are members', () => {
    for (const name of Object.keys(SERIES) as SeriesName[]) {
      const all = preferredValues(name);
      expect([...all].sort((a, b) => a - b)).toEqual(all);
      const series = SERIES[name];
      for (const second of 'second' in series ? series.second : []) expect(all).toContain(second);
    }
  });
  it('the next one up is the least that suffices', () => {
    expect(nextPreferred('bore', 64)).toBe(80);
    expect(nextPreferred('bore', 63)).toBe(63);
    expect(nextPreferred('bore', 81, { firstChoiceOnly: true })).toBe(100);
    expect(nextPreferred('bore', 501)).toBeUndefined();
    expect(nextPreferred('motorMetric', 4.2)).toBe(5.5);
    expect(nextPreferred('motorUs', 11.7)).toBe(15);
    expect(nextPreferred('r10', 31.6)).toBe(40);
    expect(nextPreferred('r5', 0.017)).toBe(0.025);
    expect(nextPreferred('r10', 900)).toBe(1000);
    expect(nextPreferred('r10', -1)).toBeUndefined();
    expect(nextPreferred('bore', Number.NaN)).toBeUndefined();
  });
  it('R10 steps by the tenth root of ten, to the rounding of ISO 3 (1.3 %)', () => {
    preferredValues('r10').forEach((step, i) => {
      expect(Math.abs(step / 10 ** (i / 10) - 1)).toBeLessThan(0.013);
    });
  });
  it('usual rods and bores are members of their series', () => {
    for (const [bore, rods] of Object.entries(RODS_OF_BORE)) {
      expect(preferredValues('bore')).toContain(Number(bore));
      for (const rod of rods) expect(preferredValues('rod')).toContain(rod);
    }
    for (const tube of TUBES) expect(tube.outside).toBeGreaterThan(2 * tube.wall);
  });
});
