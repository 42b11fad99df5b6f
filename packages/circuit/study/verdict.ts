/** From what was observed to met, missed or undecidable. What cannot be decided is never a pass. */
import type { Dimension } from '@oilway/quantity';
import type { Bound } from '../model/circuit.ts';
import type { Observed, Value } from './measures/observed.ts';

/** A bound is met within 0.1 % of itself. */
const NEAR = 1e-3;
/** degC of a bound in K: a share of a temperature is one of its degrees. */
const ZERO = 273.15;

export interface Verdict {
  readonly verdict: 'met' | 'missed' | 'undecidable';
  readonly worst?: Value;
  readonly amount?: number;
  /** `reaches`: the place begins below the bound. */
  readonly rising?: boolean;
  /** Bound that the worst value is nearest to. */
  readonly against?: number;
  readonly margin?: number;
  readonly why?: string;
}

/** Share of the bound by which a value is on its good side. */
export function marginOf(amount: number, bound: number, side: 'least' | 'most', dimension: Dimension): number {
  const scale = Math.abs(dimension === 'temperature' ? bound - ZERO : bound);
  const left = side === 'least' ? amount - bound : bound - amount;
  if (scale < 1e-12) return left === 0 ? 0 : left > 0 ? 1 : -1;
  return left / scale;
}

export function judge(
  bound: Bound,
  observed: readonly Observed[],
  dimension: Dimension,
  named: boolean,
  lasts: number | undefined,
): Verdict {
  const places = named ? observed : observed.filter((one) => one.values.length > 0 || one.problems.length > 0);
  // Where no place was named, those that do not pass the range are not meant.
  const meant = named ? places : places.filter((one) => one.values.length > 0);
  const problems = (named || meant.length === 0 ? places : meant).flatMap((one) => one.problems);
  if (bound.is === 'reaches') return reaches(bound, meant, problems, lasts);
  if (lasts !== undefined) return lasting(bound, meant, problems, dimension, lasts);
  return within(bound, meant, problems, dimension);
}

function within(
  bound: Exclude<Bound, { is: 'reaches' }>,
  places: readonly Observed[],
  problems: readonly string[],
  dimension: Dimension,
): Verdict {
  let worst: { value: Value; amount: number; against: number; margin: number } | undefined;
  let unsure: Value | undefined;
  for (const value of places.flatMap((one) => one.values)) {
    const bad = score(bound, value, dimension, 'bad');
    const good = score(bound, value, dimension, 'good');
    // The value is not determined and its range straddles the bound.
    if (bad.margin < -NEAR && good.margin >= -NEAR && value.low !== value.high) unsure = value;
    const counted = value.low !== value.high && bad.margin < -NEAR && good.margin >= -NEAR ? good : bad;
    if (!worst || counted.margin < worst.margin) worst = { value, ...counted };
  }
  const shown = worst ? { worst: worst.value, amount: worst.amount, against: worst.against, margin: worst.margin } : {};
  // A miss that was seen stays a miss, whatever else could not be decided.
  if (worst && worst.margin < -NEAR) return { verdict: 'missed', ...shown };
  if (problems.length > 0) return { verdict: 'undecidable', ...shown, why: problems[0]! };
  if (unsure) return { verdict: 'undecidable', worst: unsure, why: `the pressure is not determined at ${unsure.at}` };
  if (!worst) return { verdict: 'undecidable', why: 'nothing to be measured in the places named' };
  return { verdict: 'met', ...shown };
}

function score(
  bound: Exclude<Bound, { is: 'reaches' }>,
  value: Value,
  dimension: Dimension,
  side: 'bad' | 'good',
): { readonly amount: number; readonly against: number; readonly margin: number } {
  if (bound.is === 'between') {
    const low = score({ is: 'least', value: bound.low }, value, dimension, side);
    const high = score({ is: 'most', value: bound.high }, value, dimension, side);
    return low.margin < high.margin ? low : high;
  }
  const amount = (bound.is === 'least') === (side === 'bad') ? value.low : value.high;
  const against = bound.value.si;
  return { amount, against, margin: marginOf(amount, against, bound.is, dimension) };
}

/** The value crosses the bound from whichever side the place begins, within a time of the entry where one is named. */
function reaches(
  bound: Extract<Bound, { is: 'reaches' }>,
  places: readonly Observed[],
  problems: readonly string[],
  lasts: number | undefined,
): Verdict {
  const target = bound.value.si;
  const near = NEAR * Math.abs(target);
  if (places.length === 0 || places.every((one) => one.values.length === 0))
    return { verdict: 'undecidable', why: problems[0] ?? 'nothing to be measured in the places named' };
  let shown: { worst: Value; amount: number; rising: boolean } | undefined;
  for (const place of places) {
    for (const series of new Set(place.values.map((one) => one.series))) {
      const values = place.values.filter((one) => one.series === series);
      const ordered = [...values].sort((a, b) => (a.time ?? a.since ?? 0) - (b.time ?? b.since ?? 0));
      const first = ordered[0];
      if (!first) continue;
      const below = first.low <= target;
      const inTime = ordered.filter((one) => bound.within === undefined || one.since === undefined || one.since <= bound.within + 1e-9);
      const best = inTime.reduce((a, b) => ((below ? b.high > a.high : b.low < a.low) ? b : a), inTime[0] ?? first);
      const amount = below ? best.high : best.low;
      const got = below ? amount >= target - near : amount <= target + near;
      const margin = (below ? amount - target : target - amount) / Math.max(1e-12, Math.abs(target));
      if (!got) {
        if (problems.length > 0) return { verdict: 'undecidable', worst: best, amount, against: target, margin, why: problems[0]! };
        return { verdict: 'missed', worst: best, amount, against: target, margin, rising: below };
      }
      if (lasts !== undefined && longest(ordered, (one) => (below ? one.high >= target - near : one.low <= target + near)) < lasts - 1e-6) {
        return { verdict: 'missed', worst: best, amount, against: target, margin, why: 'not held without break for the time asked' };
      }
      const crossing = inTime.find((one) => (below ? one.high >= target - near : one.low <= target + near)) ?? best;
      if (!shown || (below ? amount < shown.amount : amount > shown.amount)) shown = { worst: crossing, amount, rising: below };
    }
  }
  if (problems.length > 0) return { verdict: 'undecidable', why: problems[0]! };
  return shown
    ? { verdict: 'met', ...shown, against: target, margin: Math.abs(shown.amount - target) / Math.max(1e-12, Math.abs(target)) }
    : { verdict: 'undecidable', why: 'nothing to be measured' };
}

/** A bound held without break for a time somewhere in the place. */
function lasting(
  bound: Exclude<Bound, { is: 'reaches' }>,
  places: readonly Observed[],
  problems: readonly string[],
  dimension: Dimension,
  lasts: number,
): Verdict {
  for (const place of places) {
    let best = 0;
    for (const series of new Set(place.values.map((one) => one.series))) {
      const ordered = place.values.filter((one) => one.series === series && one.since !== undefined);
      best = Math.max(
        best,
        longest(ordered, (one) => score(bound, one, dimension, 'bad').margin >= -NEAR),
      );
    }
    if (best < lasts - 1e-6) {
      const plain = within(bound, [place], [], dimension);
      const why = `held for ${Math.round(best * 100) / 100} s without break, ${lasts} s are asked for`;
      return problems.length > 0 ? { verdict: 'undecidable', why: problems[0]! } : { ...plain, verdict: 'missed', why };
    }
  }
  if (places.length === 0 || problems.length > 0)
    return { verdict: 'undecidable', why: problems[0] ?? 'nothing to be measured in the places named' };
  const plain = within(bound, places, [], dimension);
  return { ...plain, verdict: 'met' };
}

/** Longest unbroken time in which values of a run hold, s. */
function longest(values: readonly Value[], good: (one: Value) => boolean): number {
  let from: number | undefined;
  let best = 0;
  for (const one of values) {
    if (one.since === undefined || !good(one)) {
      if (one.since !== undefined) from = undefined;
      continue;
    }
    if (from === undefined || one.since < from) from = one.since;
    best = Math.max(best, one.since - from);
  }
  return best;
}
