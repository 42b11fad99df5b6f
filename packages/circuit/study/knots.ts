/** Places on a stroke at which something changes: loads, cams, cushions, stages, position switches, ends of required ranges. */
import type { Body, BodyLoad, ForceOverPosition } from '../assembly/machine.ts';
import { loadKnots } from './loads.ts';
import type { Plant } from './scene.ts';

/** Just before and just after a knot, m. */
const BESIDE = 1e-6;
/** Places closer than this are one, m. */
const NEAR = 2e-6;

export interface Knot {
  readonly at: number;
  readonly words: string;
  /**
   * `both`: solved just before and just after. `once`: nothing jumps there. `above`, `below`: on that side only, whatever the direction.
   * `control`: both where the control changes there, else once.
   */
  readonly sides: 'both' | 'once' | 'above' | 'below' | 'control';
}

export function knotsOf(plant: Plant, body: Body, load: BodyLoad): readonly Knot[] {
  const found: Knot[] = [];
  for (const one of body.knots) found.push({ at: one.at, words: one.words, sides: 'both' });
  for (const at of loadKnots(load)) found.push({ at, words: 'load', sides: jumps(load, at) ? 'both' : 'once' });
  for (const contact of plant.contacts) {
    if (contact.source.what !== 'position' || contact.source.body !== body.id) continue;
    const ends =
      contact.test.is === 'inside'
        ? [contact.test.from, contact.test.to]
        : contact.test.is === 'above'
          ? [contact.test.rises, contact.test.falls]
          : [];
    for (const at of ends) if (Number.isFinite(at)) found.push({ at, words: contact.words ?? contact.key, sides: 'control' });
  }
  for (const { low, high } of requiredRanges(plant, body)) {
    found.push({ at: low, words: 'required range', sides: 'above' }, { at: high, words: 'required range', sides: 'below' });
  }
  // At the ends of the stroke nothing lies beyond.
  return merged(found.filter((one) => !Number.isFinite(body.stroke) || (one.at > NEAR && one.at < body.stroke - NEAR)));
}

/** Ranges that requirements name for this body (or for the only actuator). */
function requiredRanges(plant: Plant, body: Body): readonly { readonly low: number; readonly high: number }[] {
  return plant.circuit.requirements.flatMap((one) => {
    if (one.form === 'never' || !one.where.range) return [];
    const own = body.actuators.includes(one.of);
    const only = !plant.at.actuators.some((part) => part.id === one.of) && plant.bodies.length === 1;
    const { from, to } = one.where.range;
    return own || only ? [{ low: Math.min(from.si, to.si), high: Math.max(from.si, to.si) }] : [];
  });
}

function jumps(load: BodyLoad, x: number): boolean {
  const jump = (over: ForceOverPosition) =>
    over.at.some((one, index) => one === x && over.at[index + 1] === x && over.force[index] !== over.force[index + 1]);
  return [...load.fixed, ...load.resistOut, ...load.resistIn].some(jump);
}

/** Knots at one place become one. */
function merged(knots: readonly Knot[]): readonly Knot[] {
  const sorted = [...knots].sort((a, b) => a.at - b.at);
  const result: Knot[] = [];
  for (const one of sorted) {
    const last = result.at(-1);
    if (last && one.at - last.at < NEAR) {
      const words = last.words.split(', ').includes(one.words) ? last.words : `${last.words}, ${one.words}`;
      result[result.length - 1] = { at: last.at, words, sides: joint(last.sides, one.sides) };
    } else result.push(one);
  }
  return result;
}

function joint(one: Knot['sides'], other: Knot['sides']): Knot['sides'] {
  if (one === other) return one;
  if (one === 'once' || one === 'control') return other === 'once' ? one : other;
  return other === 'once' || other === 'control' ? one : 'both';
}

/** Places beside a knot at which it is solved, m: in the order a motion in `direction` passes them. */
export function besides(
  knot: Knot,
  direction: number,
  turns: boolean,
): readonly { readonly at: number; readonly when: 'before' | 'after' | 'at' }[] {
  const beside = (when: 'before' | 'after') => ({ at: knot.at + (when === 'before' ? -BESIDE : BESIDE) * direction, when });
  if (knot.sides === 'both' || (knot.sides === 'control' && turns)) return [beside('before'), beside('after')];
  if (knot.sides === 'above') return [{ at: knot.at + BESIDE, when: 'at' }];
  if (knot.sides === 'below') return [{ at: knot.at - BESIDE, when: 'at' }];
  return [{ at: knot.at, when: 'at' }];
}

/** Knots from one place to another, those at the two places included, in the order they are passed. */
export function passed(knots: readonly Knot[], from: number, to: number): readonly Knot[] {
  const [low, high] = from < to ? [from, to] : [to, from];
  const inside = knots.filter((one) => one.at > low - NEAR && one.at < high + NEAR);
  return from <= to ? inside : [...inside].reverse();
}

/** Places beside a knot that lie on the way from one place to another. */
export function besidesOnWay(knot: Knot, from: number, to: number, turns: boolean): ReturnType<typeof besides> {
  const direction = to >= from ? 1 : -1;
  const atStart = Math.abs(knot.at - from) <= NEAR;
  const atEnd = Math.abs(knot.at - to) <= NEAR;
  if (!atStart && !atEnd) return besides(knot, direction, turns);
  // A knot where the motion begins or ends has one side on the way; where nothing jumps, entry and end say it all.
  if (knot.sides === 'once' || knot.sides === 'control') return [];
  const when = atStart ? ('after' as const) : ('before' as const);
  const at = knot.at + (atStart ? BESIDE : -BESIDE) * direction;
  if ((knot.sides === 'above' && at < knot.at) || (knot.sides === 'below' && at > knot.at)) return [];
  return [{ at, when }];
}
