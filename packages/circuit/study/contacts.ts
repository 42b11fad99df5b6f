/** Contacts: switches with their two thresholds, and the comparisons written in conditions, as things that are on or off. */
import type { Solution, Watch } from '../assembly/machine.ts';
import type { Component, Condition } from '../model/circuit.ts';
import type { Position } from './coils.ts';
import type { Lookup } from './lookup.ts';
import { bodyOf, type Scene, type Source, sourceOf, valueIn, watchOf } from './quantities.ts';
import { flag, range, si, valueNamed } from './read.ts';
import { say, sayPlace } from './words.ts';

export interface Contact {
  /** Switch id, or the comparison with its SI value: `XT1 above 0.5`. */
  readonly key: string;
  /** A comparison as read aloud: `XT1 above 500 mm`. */
  readonly words?: string;
  readonly source: Source;
  /** `above`: on at q >= rises, off at q <= falls. `inside`: on within from..to. `stands`: the valve stands there. */
  readonly test:
    | { readonly is: 'above'; readonly rises: number; readonly falls: number; readonly atStart: boolean }
    | { readonly is: 'inside'; readonly from: number; readonly to: number }
    | { readonly is: 'stands'; readonly position: Position }
    | { readonly is: 'outside' }
    | { readonly is: 'unknown' };
  /** Current flows when the test is false (`broken`, `below`). */
  readonly inverted: boolean;
}

const HALF_MM = 0.5e-3;
const HALF_DEG = (0.5 * Math.PI) / 180;
/** `at` of a pressure: +- 0.5 bar. */
const HALF_BAR = 0.5e5;
const spread = (dimension: string) => (dimension === 'length' ? HALF_MM : dimension === 'angle' ? HALF_DEG : HALF_BAR);

/** `extended`, `retracted`: within 0.5 mm, or 0.2 % of the stroke where that is more. */
export function stopTolerance(stroke: number, rotating: boolean): number {
  return Math.max(rotating ? HALF_DEG : HALF_MM, 0.002 * stroke);
}

export function switchContact(scene: Scene, component: Component): Contact {
  const source = sourceOf(scene, component.id);
  const inverted = flag(component, 'broken');
  const key = component.id;
  if (source.what === 'outside') return { key, source, test: { is: 'outside' }, inverted };
  if (source.what === 'unknown') return { key, source, test: { is: 'unknown' }, inverted };
  if (source.what === 'stand') {
    const place = valueNamed(component, 'at');
    const name = place?.type === 'place' ? place.word : undefined;
    const position = name === 'open' ? 'a' : name === 'closed' ? 'b' : name;
    return position === 'a' || position === 'b' || position === 'centre'
      ? { key, source, test: { is: 'stands', position }, inverted }
      : { key, source, test: { is: 'unknown' }, inverted };
  }
  const between = range(component, 'from');
  if (between)
    return {
      key,
      source,
      test: { is: 'inside', from: Math.min(between.from, between.to), to: Math.max(between.from, between.to) },
      inverted,
    };
  const place = valueNamed(component, 'at');
  if (place?.type === 'place' && place.q) {
    const half = spread(place.q.dimension);
    return { key, source, test: { is: 'inside', from: place.q.si - half, to: place.q.si + half }, inverted };
  }
  const rises = si(component, 'rises');
  const falls = si(component, 'falls');
  if (rises === undefined && falls === undefined) return { key, source, test: { is: 'unknown' }, inverted };
  return {
    key,
    source,
    test: { is: 'above', rises: (rises ?? falls)!, falls: (falls ?? rises)!, atStart: rises === undefined },
    inverted,
  };
}

export function compareKey(of: string, is: string, value: number): string {
  return `${of} ${is} ${value}`;
}

/** Contact of a comparison or of `extended`/`retracted`; undefined for atoms that need none (coil, switch, running). */
export function atomContact(scene: Scene, atom: Condition): Contact | undefined {
  if (atom.op === 'compare') {
    const key = compareKey(atom.of, atom.is, atom.value.si);
    const words = `${atom.of} ${atom.is} ${atom.value.dimension === 'length' ? sayPlace(scene.at.circuit, atom.value.si, false) : say(scene.at.circuit, atom.value.si, atom.value.dimension)}`;
    const source = sourceOf(scene, atom.of, atom.value.dimension);
    if (source.what === 'unknown' || source.what === 'outside' || source.what === 'stand')
      return { key, source, test: { is: 'unknown' }, inverted: false };
    const x = heldInRange(scene.at, atom.of, atom.value.si);
    if (atom.is === 'at') {
      const half = spread(atom.value.dimension);
      return { key, words, source, test: { is: 'inside', from: x - half, to: x + half }, inverted: false };
    }
    return { key, words, source, test: { is: 'above', rises: x, falls: x, atStart: false }, inverted: atom.is === 'below' };
  }
  if (atom.op === 'state' && (atom.is === 'extended' || atom.is === 'retracted')) {
    const body = bodyOf(scene, atom.of);
    const key = `${atom.of} ${atom.is}`;
    if (!body) return { key, source: { what: 'unknown', why: `${atom.of} is not computed` }, test: { is: 'unknown' }, inverted: false };
    const source: Source = { what: 'position', body: body.id, rotating: body.type === 'rotating', stroke: body.stroke };
    const near = stopTolerance(body.stroke, body.type === 'rotating');
    const test =
      atom.is === 'extended'
        ? { is: 'inside' as const, from: body.stroke - near, to: Number.POSITIVE_INFINITY }
        : { is: 'inside' as const, from: Number.NEGATIVE_INFINITY, to: near };
    return { key, source, test, inverted: false };
  }
  return undefined;
}

/** A sensor answers the ends of its range outside it: thresholds are compared with the held value. */
function heldInRange(at: Lookup, id: string, threshold: number): number {
  const sensor = at.component(id);
  const span = sensor?.kind === 'sensor' ? range(sensor, 'range') : undefined;
  if (!span) return threshold;
  if (threshold > span.to) return Number.POSITIVE_INFINITY;
  if (threshold < span.from) return Number.NEGATIVE_INFINITY;
  return threshold;
}

/** Every atom of a condition. */
export function atoms(condition: Condition): readonly Condition[] {
  return condition.op === 'and' || condition.op === 'or' ? condition.items.flatMap(atoms) : [condition];
}

/** Every contact that the control, its conditions and requirements look at. */
export function contactsOf(scene: Scene, conditions: readonly Condition[]): readonly Contact[] {
  const found = new Map<string, Contact>();
  for (const component of scene.at.ofKind('switch')) found.set(component.id, switchContact(scene, component));
  for (const atom of conditions.flatMap(atoms)) {
    const contact = atomContact(scene, atom);
    if (contact && !found.has(contact.key)) found.set(contact.key, contact);
  }
  return [...found.values()];
}

/** Slack that keeps a contact from turning back at the very threshold it was located at. */
function slack(source: Source): number {
  return source.what === 'position' ? 1e-7 : source.what === 'pressure' ? 1 : source.what === 'level' ? 1e-9 : 1e-6;
}

/** Whether current flows, from a value of its source and how it stood before. Undefined: not known. */
export function closed(scene: Scene, contact: Contact, solution: Solution, before: boolean | undefined): boolean | undefined {
  const { test, source, inverted } = contact;
  if (test.is === 'unknown') return undefined;
  if (test.is === 'outside') return before ?? false;
  const turn = (on: boolean) => on !== inverted;
  if (test.is === 'stands') {
    const stand = source.what === 'stand' ? solution.stands[source.valve] : undefined;
    return stand === undefined ? before : turn(stand.position === test.position);
  }
  const value = valueIn(scene, source, solution);
  if (value === undefined) return before;
  const was = before === undefined ? undefined : before !== inverted;
  const near = slack(source);
  if (test.is === 'inside') {
    const wide = was === true ? near : 0;
    return turn(value >= test.from - wide && value <= test.to + wide);
  }
  if (was === true) return turn(!(value < test.falls - near || (test.falls < test.rises && value <= test.falls)));
  if (was === false) return turn(value >= test.rises);
  if (value >= test.rises) return turn(true);
  if (value <= test.falls) return turn(false);
  return turn(test.atStart);
}

/** Watches that tell when a contact turns over, from how it stands now. */
export function watches(
  scene: Scene,
  contact: Contact,
  solution: Solution,
  now: boolean | undefined,
): readonly { readonly watch: Watch; readonly becomes: boolean }[] {
  const { test, source, inverted } = contact;
  if (now === undefined || (test.is !== 'above' && test.is !== 'inside')) return [];
  const on = now !== inverted;
  const make = (threshold: number, edge: 'rising' | 'falling') => {
    const watch = Number.isFinite(threshold) ? watchOf(source, threshold, edge) : undefined;
    return watch ? [{ watch, becomes: !now }] : [];
  };
  if (test.is === 'above') return on ? make(test.falls, 'falling') : make(test.rises, 'rising');
  if (on) return [...make(test.to, 'rising'), ...make(test.from, 'falling')];
  const value = valueIn(scene, source, solution) ?? 0;
  return value < (test.from + test.to) / 2 || !Number.isFinite(test.to) ? make(test.from, 'rising') : make(test.to, 'falling');
}
