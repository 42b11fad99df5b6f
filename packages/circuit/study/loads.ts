/** Load statements of the circuit as forces over position on one body: in a step, and as the load cases of a machine state. */
import type { Body, BodyLoad, ForceOverPosition } from '../assembly/machine.ts';
import type { Load } from '../model/circuit.ts';
import type { LoadValue, Property } from '../model/value.ts';
import type { Lookup } from './lookup.ts';
import { si, valueNamed } from './read.ts';

/** Standard acceleration of free fall, m/s2 (ISO 80000-3). */
const G = 9.80665;

const SIGN: Readonly<Record<string, -1 | 1>> = { inward: -1, backward: -1, outward: 1, forward: 1 };

export const NO_LOAD: BodyLoad = { fixed: [], resistOut: [], resistIn: [], friction: 0 };

/** A force as written over position (N or N.m over m or rad), without sign. */
export function forceOver(value: LoadValue): ForceOverPosition {
  const knots = value.table
    ? value.table.map((knot) => ({ at: knot.at.si, force: knot.value.si }))
    : [{ at: 0, force: value.constant?.si ?? 0 }];
  if (!value.range) return { at: knots.map((knot) => knot.at), force: knots.map((knot) => knot.force) };
  const from = Math.min(value.range.from.si, value.range.to.si);
  const to = Math.max(value.range.from.si, value.range.to.si);
  const whole: ForceOverPosition = { at: knots.map((knot) => knot.at), force: knots.map((knot) => knot.force) };
  const inside = knots.filter((knot) => knot.at > from && knot.at < to);
  return {
    at: [from, from, ...inside.map((knot) => knot.at), to, to],
    force: [0, forceAt(whole, from), ...inside.map((knot) => knot.force), forceAt(whole, to), 0],
  };
}

/** Force at a position; at a jump the larger magnitude (the ends of a range belong to it). */
export function forceAt(over: ForceOverPosition, x: number): number {
  const { at, force } = over;
  const last = at.length - 1;
  if (last < 0) return 0;
  let best: number | undefined;
  for (let i = 0; i <= last; i += 1) {
    if (at[i] === x && (best === undefined || Math.abs(force[i]!) > Math.abs(best))) best = force[i]!;
  }
  if (best !== undefined) return best;
  if (x < at[0]!) return force[0]!;
  if (x > at[last]!) return force[last]!;
  const right = at.findIndex((one) => one > x);
  const [x0, x1] = [at[right - 1]!, at[right]!];
  return force[right - 1]! + ((force[right]! - force[right - 1]!) * (x - x0)) / (x1 - x0);
}

/** Sum of the fixed forces on a body, + outward / forward. */
export function netFixed(load: BodyLoad, x: number): number {
  return load.fixed.reduce((sum, one) => sum + forceAt(one, x), 0);
}

/** Loads against a motion in `direction` and the load's friction: what a step needs there. N or N.m; negative where the load drives. */
export function needed(load: BodyLoad, x: number, direction: -1 | 1): number {
  const resist = direction > 0 ? load.resistOut : load.resistIn;
  return -direction * netFixed(load, x) + resist.reduce((sum, one) => sum + forceAt(one, x), 0) + load.friction;
}

/** Positions at which a load changes its slope or jumps. */
export function loadKnots(load: BodyLoad): readonly number[] {
  const all = [...load.fixed, ...load.resistOut, ...load.resistIn].flatMap((one) => (one.at.length > 1 ? one.at : []));
  return [...new Set(all)].sort((a, b) => a - b);
}

/** Weight of the body's mass along the rod, + outward. Mass counts once; attitude is that of the actuator. */
function weight(at: Lookup, load: Load): number {
  const mass = si(load, 'mass');
  const actuator = load.actuators[0] ? at.component(load.actuators[0]) : undefined;
  if (mass === undefined || actuator?.kind !== 'cylinder') return 0;
  const attitude = valueNamed(actuator, 'attitude');
  return attitude?.type === 'attitude' ? -mass * G * Math.sin(attitude.angle) : 0;
}

interface Entry {
  readonly property: Property;
  readonly value: LoadValue;
}
function entries(load: Load, names: readonly string[]): Entry[] {
  return load.properties.flatMap((one) =>
    names.includes(one.name) && one.value.type === 'load' ? [{ property: one, value: one.value }] : [],
  );
}
const scaled = (over: ForceOverPosition, by: number): ForceOverPosition => ({ at: over.at, force: over.force.map((one) => one * by) });
const constant = (force: number): ForceOverPosition => ({ at: [0], force: [force] });
const FIXED = ['inward', 'outward', 'forward', 'backward'];

/** Load statements that act on a body. */
export function loadsOn(at: Lookup, body: Body): readonly Load[] {
  return at.circuit.loads.filter((load) => load.actuators.some((one) => body.actuators.includes(one)));
}

function bodyLoad(
  at: Lookup,
  loads: readonly Load[],
  fixed: (entry: Entry) => boolean,
  resist: (entry: Entry) => boolean,
  friction: boolean,
): BodyLoad {
  const result = {
    fixed: [] as ForceOverPosition[],
    resistOut: [] as ForceOverPosition[],
    resistIn: [] as ForceOverPosition[],
    friction: 0,
  };
  for (const load of loads) {
    const heavy = weight(at, load);
    if (heavy !== 0) result.fixed.push(constant(heavy));
    for (const entry of entries(load, FIXED)) {
      if (fixed(entry)) result.fixed.push(scaled(forceOver(entry.value), SIGN[entry.property.name] ?? 1));
    }
    for (const entry of entries(load, ['resist'])) {
      if (!resist(entry)) continue;
      const over = forceOver(entry.value);
      if (entry.value.direction !== 'retracting') result.resistOut.push(over);
      if (entry.value.direction !== 'extending') result.resistIn.push(over);
    }
    if (friction) result.friction += si(load, 'friction') ?? 0;
  }
  return result;
}

/** Load in force while these steps (or meanwhile lines) run. */
export function loadInSteps(at: Lookup, body: Body, steps: readonly string[]): BodyLoad {
  const there = (entry: Entry) => !entry.value.steps || entry.value.steps.some((one) => steps.includes(one));
  return bodyLoad(at, loadsOn(at, body), there, there, true);
}

/** A load case of a machine state: greatest net inward, greatest net outward, none. */
export interface LoadCase {
  readonly name: 'inward' | 'outward' | 'none';
  readonly load: BodyLoad;
  /** First position at which the greatest net force of this case stands; undefined: everywhere alike. */
  readonly at?: number;
  /** The greatest net force, N or N.m, + outward. */
  readonly greatest: number;
}

/** Entries that may be absent: ranges, tables and those of a step. */
function optional(entry: Entry): boolean {
  return entry.value.range !== undefined || entry.value.table !== undefined || entry.value.steps !== undefined;
}

/** Cases in which a state is studied: no friction, nothing that only resists. */
export function loadCases(at: Lookup, body: Body): readonly LoadCase[] {
  const loads = loadsOn(at, body);
  const none = bodyLoad(
    at,
    loads,
    (entry) => !optional(entry),
    () => false,
    false,
  );
  const cases: LoadCase[] = [];
  for (const name of ['inward', 'outward'] as const) {
    const sign = name === 'inward' ? -1 : 1;
    const load = bodyLoad(
      at,
      loads,
      (entry) => !optional(entry) || SIGN[entry.property.name] === sign,
      () => false,
      false,
    );
    const found = greatestNet(load, body, sign);
    if (found.force * sign > 1e-9) {
      cases.push({ name, load, greatest: found.force, ...(found.at === undefined ? {} : { at: found.at }) });
    }
  }
  if (none.fixed.length === 0) cases.push({ name: 'none', load: none, greatest: 0 });
  return cases.length > 0 ? cases : [{ name: 'none', load: none, greatest: 0 }];
}

function greatestNet(load: BodyLoad, body: Body, sign: -1 | 1): { readonly force: number; readonly at?: number } {
  const knots = loadKnots(load).filter((x) => body.type === 'rotating' || (x >= 0 && x <= body.stroke));
  if (knots.length === 0) return { force: netFixed(load, body.begins) };
  let best: { force: number; at: number } = { force: netFixed(load, body.begins), at: body.begins };
  for (const x of knots) {
    const force = netFixed(load, x);
    if (force * sign > best.force * sign + 1e-9) best = { force, at: x };
  }
  return best;
}

/** The load case that asks most of what holds it; bodies that are not varied stand under it. */
export function greatestHolding(cases: readonly LoadCase[]): LoadCase {
  return cases.reduce((best, one) => (Math.abs(one.greatest) > Math.abs(best.greatest) ? one : best));
}

/** Whether the driving force of a load falls to no drive within `way` of a motion from x: the way, or undefined. */
export function relaxesWithin(load: BodyLoad, x: number, direction: -1 | 1, way: number): number | undefined {
  if (netFixed(load, x) * direction <= 0) return undefined;
  const points = [...loadKnots(load).filter((knot) => (knot - x) * direction > 0), x + direction * way]
    .filter((one) => (one - x) * direction <= way + 1e-12)
    .sort((a, b) => (a - b) * direction);
  let before = { x, force: netFixed(load, x) };
  for (const point of points) {
    const force = netFixed(load, point + direction * 1e-9);
    const arriving = netFixed(load, point - direction * 1e-9);
    for (const end of [arriving, force]) {
      if (end * direction <= 1e-9) {
        const share = before.force === end ? 1 : before.force / (before.force - end);
        return Math.abs(before.x + (point - before.x) * Math.min(1, Math.max(0, share)) - x);
      }
    }
    before = { x: point, force };
  }
  return undefined;
}
