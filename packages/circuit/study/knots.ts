/** Places on a stroke at which something changes: loads, cams, cushions, stages, position switches, ends of required ranges. */
import type { Body, BodyLoad, ForceOverPosition } from '../assembly/machine.ts';
import { loadKnots } from './loads.ts';
import type { Plant } from './scene.ts';

export interface Knot {
  readonly at: number;
  readonly words: string;
  /** Solved just before and just after; else once. */
  readonly sides: 'both' | 'before' | 'after';
}

export function knotsOf(plant: Plant, body: Body, load: BodyLoad): readonly Knot[] {
  const found: Knot[] = [];
  for (const one of body.knots) found.push({ at: one.at, words: one.words, sides: 'both' });
  for (const at of loadKnots(load)) found.push({ at, words: 'load', sides: jumps(load, at) ? 'both' : 'after' });
  for (const contact of plant.contacts) {
    if (contact.source.what !== 'position' || contact.source.body !== body.id) continue;
    const ends = contact.test.is === 'inside' ? [contact.test.from, contact.test.to] : contact.test.is === 'above' ? [contact.test.rises, contact.test.falls] : [];
    for (const at of ends) if (Number.isFinite(at)) found.push({ at, words: contact.key, sides: 'both' });
  }
  for (const at of requiredEnds(plant, body)) found.push({ at, words: 'required range', sides: 'both' });
  return merged(found);
}

/** Ends of ranges that requirements name for this body (or for the only actuator). */
function requiredEnds(plant: Plant, body: Body): readonly number[] {
  return plant.circuit.requirements.flatMap((one) => {
    if (one.form === 'never' || !one.where.range) return [];
    const own = body.actuators.includes(one.of);
    const only = !plant.at.actuators.some((part) => part.id === one.of) && plant.bodies.length === 1;
    return own || only ? [one.where.range.from.si, one.where.range.to.si] : [];
  });
}

function jumps(load: BodyLoad, x: number): boolean {
  const jump = (over: ForceOverPosition) => over.at.some((one, index) => one === x && over.at[index + 1] === x && over.force[index] !== over.force[index + 1]);
  return [...load.fixed, ...load.resistOut, ...load.resistIn].some(jump);
}

/** Knots at one place become one. */
function merged(knots: readonly Knot[]): readonly Knot[] {
  const sorted = [...knots].sort((a, b) => a.at - b.at);
  const result: Knot[] = [];
  for (const one of sorted) {
    const last = result.at(-1);
    if (last && one.at - last.at < 2e-6) {
      const words = last.words.split(', ').includes(one.words) ? last.words : `${last.words}, ${one.words}`;
      result[result.length - 1] = { at: last.at, words, sides: last.sides === one.sides ? last.sides : 'both' };
    } else result.push(one);
  }
  return result;
}

/** Knots strictly between two places, in the order they are passed. */
export function passed(knots: readonly Knot[], from: number, to: number): readonly Knot[] {
  const [low, high] = from < to ? [from, to] : [to, from];
  const inside = knots.filter((one) => one.at > low + 2e-6 && one.at < high - 2e-6);
  return from <= to ? inside : [...inside].reverse();
}
