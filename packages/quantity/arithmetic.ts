/** Computing with quantities in `let` expressions: dimensions are multiplied and divided through their exponents, and named again at the end. */
import { type Dimension, DIMENSIONS } from './dimension.ts';
import { found, problem, type Outcome } from './convert.ts';
import type { Quantity } from './quantity.ts';

/** Exponents of length, mass, time, temperature, angle, current. */
type Exponents = readonly [number, number, number, number, number, number];

/** A value on its way through an expression: it may have a dimension that has no name (force times force). */
export interface Amount {
  /** SI */
  readonly si: number;
  readonly exponents: Exponents;
  /** The name it is known by; absent where only the exponents are known. */
  readonly dimension?: Dimension;
  /** Kept while the value is still one in that unit. */
  readonly unit: string;
}

const EXPONENTS: Readonly<Record<Dimension, Exponents>> = {
  ratio: [0, 0, 0, 0, 0, 0],
  length: [1, 0, 0, 0, 0, 0],
  area: [2, 0, 0, 0, 0, 0],
  volume: [3, 0, 0, 0, 0, 0],
  angle: [0, 0, 0, 0, 1, 0],
  time: [0, 0, 1, 0, 0, 0],
  velocity: [1, 0, -1, 0, 0, 0],
  acceleration: [1, 0, -2, 0, 0, 0],
  rotation: [0, 0, -1, 0, 1, 0],
  displacement: [3, 0, 0, 0, -1, 0],
  flow: [3, 0, -1, 0, 0, 0],
  pressure: [-1, 1, -2, 0, 0, 0],
  force: [1, 1, -2, 0, 0, 0],
  // Work per angle, so that torque times rotation is power and pressure times displacement is torque.
  torque: [2, 1, -2, 0, -1, 0],
  energy: [2, 1, -2, 0, 0, 0],
  power: [2, 1, -3, 0, 0, 0],
  mass: [0, 1, 0, 0, 0, 0],
  inertia: [2, 1, 0, 0, 0, 0],
  density: [-3, 1, 0, 0, 0, 0],
  viscosity: [2, 0, -1, 0, 0, 0],
  temperature: [0, 0, 0, 1, 0, 0],
  'temperature difference': [0, 0, 0, 1, 0, 0],
  'power/temperature': [2, 1, -3, -1, 0, 0],
  stiffness: [0, 1, -2, 0, 0, 0],
  voltage: [2, 1, -3, 0, 0, -1],
  current: [0, 0, 0, 0, 0, 1],
};
const ANGLE = 4;

function same(a: Exponents, b: Exponents, evenWithoutAngle = false): boolean {
  return a.every((exponent, i) => exponent === b[i] || (evenWithoutAngle && i === ANGLE));
}

/** Names of exponents; temperature stands for a difference here, a point is only made by adding to a point. */
function namesOf(exponents: Exponents, evenWithoutAngle: boolean): readonly Dimension[] {
  return DIMENSIONS.filter((name) => name !== 'temperature' && same(EXPONENTS[name], exponents, evenWithoutAngle));
}

function amount(si: number, exponents: Exponents, dimension?: Dimension, unit = ''): Amount {
  return dimension === undefined ? { si, exponents, unit } : { si, exponents, dimension, unit };
}

/** A quantity as the start of an expression. */
export function amountOf(q: Quantity): Amount {
  return amount(q.si, EXPONENTS[q.dimension], q.dimension, q.unit);
}

/**
 * The quantity an expression gives. `expected`, the dimension the place in the text takes, decides where one product has two names:
 * force times length is energy unless torque is expected.
 */
export function quantityOf(a: Amount, expected?: Dimension): Outcome<Quantity> {
  if (!Number.isFinite(a.si)) return problem('the expression has no finite value');
  if (a.dimension !== undefined && (expected === undefined || expected === a.dimension)) {
    return found({ si: a.si, dimension: a.dimension, unit: a.unit });
  }
  if (
    expected !== undefined &&
    expected !== 'temperature' &&
    a.dimension !== 'temperature' &&
    same(EXPONENTS[expected], a.exponents, true)
  ) {
    return found({ si: a.si, dimension: expected, unit: a.unit });
  }
  if (a.dimension !== undefined) return found({ si: a.si, dimension: a.dimension, unit: a.unit });
  const name = namesOf(a.exponents, false)[0] ?? namesOf(a.exponents, true)[0];
  if (name === undefined) return problem(`the expression is no quantity of the trade (${spell(a.exponents)})`);
  return found({ si: a.si, dimension: name, unit: a.unit });
}

function spell(exponents: Exponents): string {
  const symbols = ['m', 'kg', 's', 'K', 'rad', 'A'];
  const parts = exponents.flatMap((exponent, i) => (exponent === 0 ? [] : [`${symbols[i]}${exponent === 1 ? '' : exponent}`]));
  return parts.length === 0 ? '1' : parts.join('.');
}

function nameOf(a: Amount): string {
  return a.dimension ?? namesOf(a.exponents, false)[0] ?? spell(a.exponents);
}

function computed(si: number, exponents: Exponents, dimension: Dimension | undefined, unit: string): Outcome<Amount> {
  return Number.isFinite(si) ? found(amount(si, exponents, dimension, unit)) : problem('the expression has no finite value');
}

/** Adds (sign 1) or subtracts (sign -1). Temperature: point ± difference is a point, point - point a difference. */
function combine(a: Amount, b: Amount, sign: 1 | -1): Outcome<Amount> {
  const what = sign === 1 ? 'add' : 'subtract';
  const unit = a.unit === b.unit ? a.unit : a.unit || b.unit;
  const si = a.si + sign * b.si;
  const pointA = a.dimension === 'temperature';
  const pointB = b.dimension === 'temperature';
  if (pointA || pointB) {
    if (pointA && pointB)
      return sign === -1
        ? computed(si, a.exponents, 'temperature difference', '')
        : problem('two temperatures cannot be added: one must be a difference in K');
    const other = pointA ? b : a;
    if (!same(other.exponents, EXPONENTS.temperature)) return problem(`cannot ${what} ${nameOf(b)} and ${nameOf(a)}`);
    if (pointB && sign === -1) return problem('a temperature cannot be subtracted from a difference');
    return computed(si, a.exponents, 'temperature', pointA ? a.unit : b.unit);
  }
  if (same(a.exponents, b.exponents)) return computed(si, a.exponents, a.dimension ?? b.dimension, unit);
  // Torque and energy, rotation and a plain frequency differ by the angle only.
  if (same(a.exponents, b.exponents, true) && a.exponents.some((e, i) => i !== ANGLE && e !== 0)) {
    const named = a.dimension === undefined ? b : a;
    return computed(si, named.exponents, named.dimension, unit);
  }
  return problem(`cannot ${what} ${nameOf(b)} ${sign === 1 ? 'to' : 'from'} ${nameOf(a)}`);
}

export function add(a: Amount, b: Amount): Outcome<Amount> {
  return combine(a, b, 1);
}
export function subtract(a: Amount, b: Amount): Outcome<Amount> {
  return combine(a, b, -1);
}

function product(a: Amount, b: Amount, power: 1 | -1): Outcome<Amount> {
  if (a.dimension === 'temperature' || b.dimension === 'temperature') {
    return problem('a temperature is a point on a scale and cannot be multiplied or divided: use a difference in K');
  }
  if (power === -1 && b.si === 0) return problem('division by zero');
  const exponents = a.exponents.map((exponent, i) => exponent + power * (b.exponents[i] ?? 0)) as unknown as Exponents;
  const si = power === 1 ? a.si * b.si : a.si / b.si;
  const plain = (x: Amount) => x.dimension === 'ratio';
  if (plain(b)) return computed(si, exponents, a.dimension, a.unit);
  if (power === 1 && plain(a)) return computed(si, exponents, b.dimension, b.unit);
  const names = namesOf(exponents, false);
  return computed(si, exponents, names.length === 1 ? names[0] : undefined, '');
}

export function multiply(a: Amount, b: Amount): Outcome<Amount> {
  return product(a, b, 1);
}
export function divide(a: Amount, b: Amount): Outcome<Amount> {
  return product(a, b, -1);
}

export function negate(a: Amount): Outcome<Amount> {
  if (a.dimension === 'temperature') return problem('write a temperature below zero as a number: -20 degC');
  return found({ ...a, si: -a.si });
}

/** The square root; exponents are halved (an area's root is a length). */
export function squareRoot(a: Amount): Outcome<Amount> {
  if (a.dimension === 'temperature') return problem('a temperature has no square root');
  if (a.si < 0) return problem('the square root of a negative value');
  const exponents = a.exponents.map((exponent) => exponent / 2) as unknown as Exponents;
  const names = namesOf(exponents, false);
  const whole = exponents.every(Number.isInteger);
  return computed(Math.sqrt(a.si), exponents, whole && names.length === 1 ? names[0] : undefined, '');
}

function pick(items: readonly Amount[], better: (a: number, b: number) => boolean): Outcome<Amount> {
  let best = items[0];
  if (best === undefined) return problem('min and max take at least one value');
  for (const item of items) {
    const alike = same(item.exponents, best.exponents) && (item.dimension === 'temperature') === (best.dimension === 'temperature');
    if (!alike) return problem(`cannot compare ${nameOf(item)} with ${nameOf(best)}`);
    if (better(item.si, best.si)) best = item;
  }
  return found(best);
}
/** The least of values of one dimension. */
export function least(items: readonly Amount[]): Outcome<Amount> {
  return pick(items, (a, b) => a < b);
}
/** The greatest of values of one dimension. */
export function greatest(items: readonly Amount[]): Outcome<Amount> {
  return pick(items, (a, b) => a > b);
}
