/** Numbers with units to SI and back; errors are data. */
import type { Dimension } from './dimension.ts';
import type { Quantity } from './quantity.ts';
import { matchUnit, nearestUnit, unitOf } from './spelling.ts';
import type { Unit } from './units.ts';

/** A value or the reason there is none, in words for the reader. */
export type Outcome<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly problem: string };

export function found<T>(value: T): Outcome<T> {
  return { ok: true, value };
}
export function problem(words: string): { readonly ok: false; readonly problem: string } {
  return { ok: false, problem: words };
}

/** SI value of `value` counted in `unit`. */
export function toSi(value: number, unit: Unit): number {
  return value * unit.factor + unit.offset;
}

/** `si` counted in `unit`. */
export function fromSi(si: number, unit: Unit): number {
  return (si - unit.offset) / unit.factor;
}

/** `quantity(80, 'L/min')`; the empty unit is a bare number (dimension `ratio`). */
export function quantity(value: number, unit: string): Outcome<Quantity> {
  if (!Number.isFinite(value)) return problem('not a number');
  if (unit === '') return found({ si: value, dimension: 'ratio', unit: '' });
  const known = unitOf(unit);
  if (known === undefined) return unknownUnit(unit);
  return found({ si: toSi(value, known), dimension: known.dimension, unit: known.symbol });
}

function unknownUnit(word: string): { readonly ok: false; readonly problem: string } {
  const near = nearestUnit(word);
  return problem(near === undefined ? `unknown unit ${word}` : `unknown unit ${word}, did you mean ${near.symbol}`);
}

const NUMBER = /^\s*([-−+]?)\s*(?:(\d+)\s+(\d+)\/(\d+)|(\d+)\/(\d+)|(\d+(?:\.\d+)?))\s*/;

/** A number as people write it, with its unit: `80 L/min`, `1 1/2 in`, `-0.2 bar`, `5 %`, `95`. Nothing may follow. */
export function parseQuantity(text: string): Outcome<Quantity> {
  const number = NUMBER.exec(text);
  if (number === null) return problem(`"${text.trim()}" does not begin with a number`);
  const [whole, sign, mixed, over, under, over2, under2, plain] = number;
  const denominator = Number(under ?? under2 ?? 1);
  if (denominator === 0) return problem('a fraction over zero');
  const size = Number(plain ?? mixed ?? 0) + Number(over ?? over2 ?? 0) / denominator;
  const value = sign === '-' || sign === '−' ? -size : size;
  const rest = text.slice(whole.length).trimEnd();
  if (rest === '') return quantity(value, '');
  const match = matchUnit(rest, 0);
  if (match === undefined || match.length !== rest.length) return unknownUnit(rest);
  return found({ si: toSi(value, match.unit), dimension: match.unit.dimension, unit: match.unit.symbol });
}

/** The number of `unit` in a quantity of the same dimension. */
export function inUnit(q: { readonly si: number; readonly dimension: Dimension }, unit: string): Outcome<number> {
  const known = unitOf(unit);
  if (known === undefined) return unknownUnit(unit);
  if (known.dimension !== q.dimension) return problem(`${unit} is a unit of ${known.dimension}, not of ${q.dimension}`);
  return found(fromSi(q.si, known));
}
