/** Steady points of a step: entry, just before and after every knot passed, end. Each is one solution with positions given. */
import type { Body, Setting, Solution } from '../assembly/machine.ts';
import { NO_LOAD } from './loads.ts';
import { besidesOnWay, knotsOf, passed } from './knots.ts';
import { moves } from './motion.ts';
import { pointOf } from './point.ts';
import type { Plant } from './scene.ts';
import type { Point } from './study.ts';
import type { Sample, Snapshot, Trace } from './trace.ts';
import { sayPlace } from './words.ts';

/** So far from a stop a rod counts as not there yet, m or rad. */
const OFF_STOP = 1e-4;
/** Displacement that counts as motion of a step, m or rad. */
const MOVED = 1e-4;

type Direction = -1 | 0 | 1;

/** A point to be solved: what is set, where, in which directions. */
interface Wanted {
  readonly label: string;
  readonly time: number | undefined;
  readonly setting: Setting;
  readonly begun: Readonly<Record<string, boolean>>;
  /** The run at that place: pressures of closed volumes are those it left there. */
  readonly sample?: Sample;
}

/** Points of one passage of a step in a run. */
export function pointsInRun(plant: Plant, trace: Trace, step: string, from: number, to: number): readonly Point[] {
  // A step that ends at once moves nothing: its coils were never live.
  if (to - from < 1e-9) return [];
  const samples = trace.between(from, to).filter((one) => one.lines.includes(step) || one.time <= from + 1e-9);
  const [first, last] = [samples[0], samples.at(-1)];
  const snapshot = trace.snapshotAt(from, false);
  if (!first || !last || !snapshot) return [];
  const shift: Record<string, number> = {};
  for (const body of plant.bodies) shift[body.id] = (last.solution.positions[body.id] ?? 0) - (first.solution.positions[body.id] ?? 0);
  const entry = settingAt(snapshot, first);
  const directions = directionsOf(plant, entry, shift, first.solution, wentIn(samples, shift));
  const wanted: Wanted[] = [{ label: 'entry', time: from, setting: entry, begun: {}, sample: first }];
  for (const body of plant.bodies) {
    if (!Number.isFinite(body.stroke) || Math.abs(shift[body.id] ?? 0) < MOVED) continue;
    wanted.push(...knotPoints(plant, trace, body, samples, entry));
  }
  const closing = trace.snapshotAt(last.time, true) ?? snapshot;
  if (last !== first && last.time > first.time + 1e-9) {
    for (const body of plant.bodies) wanted.push(...beforeStop(plant, trace, body, shift[body.id] ?? 0, samples));
    const begun = Object.fromEntries(plant.bodies.map((one) => [one.id, true]));
    wanted.push({ label: 'end', time: last.time, setting: settingAt(closing, last), begun, sample: last });
  }
  wanted.sort((a, b) => (a.time ?? 0) - (b.time ?? 0));
  return solveAll(plant, wanted, directions);
}

function settingAt(snapshot: Snapshot, sample: Sample): Setting {
  return { ...snapshot.setting, ...stored(sample), positions: sample.solution.positions };
}

/** What the run has stored at a place: oil and gas pressure of accumulators, memory bits. */
function stored(sample: Sample): Pick<Setting, 'oil' | 'bits' | 'gasPressures'> {
  const { oil, bits, gasPressures } = sample.solution;
  return { oil, bits, ...(gasPressures === undefined ? {} : { gasPressures }) };
}

/** Displacement below this share of the stroke may be oil that is compressed or let down: then the pressing counts, not the way. */
const SMALL_WAY = 0.02;

/** Directions in which a step moves its bodies: as they went; a body that only settled goes as it would without its load. */
function directionsOf(
  plant: Plant,
  entry: Setting,
  shift: Readonly<Record<string, number>>,
  near: Solution,
  went: (body: Body) => boolean,
): Record<string, Direction> {
  const result: Record<string, Direction> = {};
  for (const body of plant.bodies) result[body.id] = went(body) ? (Math.sign(shift[body.id] ?? 0) as Direction) : 0;
  const standing = plant.bodies.filter((one) => !went(one)).map((one) => one.id);
  if (standing.length === 0) return result;
  const pushed = pushedWays(plant, entry, standing, near);
  for (const id of standing) result[id] = pushed[id] ?? 0;
  return result;
}

/** Ways in which bodies go with their loads taken off and their stops not holding: the way the oil pushes them. */
function pushedWays(plant: Plant, setting: Setting, ids: readonly string[], near: Solution): Record<string, Direction> {
  const loads = { ...setting.loads, ...Object.fromEntries(ids.map((id) => [id, NO_LOAD])) };
  const probe = plant.machine.solve({ ...setting, loads, free: ids }, near);
  const ways: Record<string, Direction> = {};
  for (const body of plant.bodies) {
    if (!ids.includes(body.id)) continue;
    ways[body.id] = probe.solved && moves(body, probe) ? (Math.sign(probe.velocities[body.id] ?? 0) as Direction) : 0;
  }
  return ways;
}

/** Whether a body went its way in a passage: more than settling oil moves it; a shaft still turns in the middle or at the end. */
function wentIn(samples: readonly Sample[], shift: Readonly<Record<string, number>>): (body: Body) => boolean {
  return (body) => {
    const way = Math.abs(shift[body.id] ?? 0);
    if (Number.isFinite(body.stroke)) return way > Math.max(MOVED, SMALL_WAY * body.stroke);
    const middle = samples[samples.length >> 1];
    return way > MOVED && [middle, samples.at(-1)].some((one) => one !== undefined && moves(body, one.solution));
  };
}

function knotPoints(plant: Plant, trace: Trace, body: Body, samples: readonly Sample[], entry: Setting): Wanted[] {
  const x = (one: Sample) => one.solution.positions[body.id] ?? 0;
  const [from, to] = [x(samples[0]!), x(samples.at(-1)!)];
  const direction = to > from ? 1 : -1;
  const load = entry.loads[body.id] ?? NO_LOAD;
  const wanted: Wanted[] = [];
  for (const knot of passed(knotsOf(plant, body, load), from, to)) {
    const found = samples.findIndex((one, i) => i > 0 && (x(one) - knot.at) * direction >= 0);
    const index = found < 0 ? samples.length - 1 : found;
    const [before, after] = [samples[index - 1], samples[index]];
    if (!before || !after) continue;
    const way = x(after) - x(before);
    const share = Math.abs(way) > 0 ? Math.min(1, Math.max(0, (knot.at - x(before)) / way)) : 1;
    const time = before.time + share * (after.time - before.time);
    const others = between(before, after, share);
    const begun = Object.fromEntries(
      plant.bodies.map((one) => [
        one.id,
        one.id === body.id || Math.abs((others[one.id] ?? 0) - (samples[0]!.solution.positions[one.id] ?? 0)) > MOVED,
      ]),
    );
    const [closing, opening] = [trace.snapshotAt(time, true), trace.snapshotAt(time, false)];
    const turns = closing !== undefined && opening !== undefined && closing !== opening;
    for (const side of besidesOnWay(knot, from, to, turns)) {
      // Control that changes at this very place ends the step: what comes after belongs to the next one.
      const snapshot = side.when === 'after' ? opening : time <= samples[0]!.time + 1e-9 ? opening : closing;
      if (!snapshot || (side.when === 'after' && time > samples[0]!.time + 1e-9 && !sameLines(snapshot, closing))) continue;
      const near = side.when === 'after' ? after : before;
      const place = sayPlace(plant.circuit, knot.at, body.type === 'rotating');
      const label = `${side.when === 'at' ? '' : `just ${side.when} `}${place} (${knot.words})`;
      wanted.push({
        label: plant.bodies.length > 1 ? `${body.id} ${label}` : label,
        time: time + (side.when === 'before' ? -1e-9 : side.when === 'after' ? 1e-9 : 0),
        setting: { ...snapshot.setting, ...stored(near), positions: { ...others, [body.id]: side.at } },
        begun,
        sample: near,
      });
    }
  }
  return wanted;
}

function sameLines(one: Snapshot, other: Snapshot | undefined): boolean {
  return other !== undefined && one.lines.length === other.lines.length && one.lines.every((id, index) => id === other.lines[index]);
}

function between(before: Sample, after: Sample, share: number): Record<string, number> {
  const positions: Record<string, number> = {};
  for (const [id, x] of Object.entries(before.solution.positions)) positions[id] = x + share * ((after.solution.positions[id] ?? x) - x);
  return positions;
}

/** The last point with motion of a body that reaches a stop in the step. */
function beforeStop(plant: Plant, trace: Trace, body: Body, shift: number, samples: readonly Sample[]): Wanted[] {
  if (!Number.isFinite(body.stroke) || Math.abs(shift) < MOVED) return [];
  const x = (one: Sample) => one.solution.positions[body.id] ?? 0;
  const stop = shift > 0 ? body.stroke : 0;
  const reached = samples.find((one) => Math.abs(x(one) - stop) <= 1e-7);
  const snapshot = reached ? trace.snapshotAt(reached.time, true) : undefined;
  if (!reached || !snapshot) return [];
  const setting = settingAt(snapshot, reached);
  return [
    {
      label: `${plant.bodies.length > 1 ? `${body.id} ` : ''}just before the stop`,
      time: reached.time - 1e-9,
      setting: { ...setting, positions: { ...setting.positions, [body.id]: stop - Math.sign(shift) * OFF_STOP } },
      begun: { [body.id]: true },
      sample: reached,
    },
  ];
}

function solveAll(plant: Plant, wanted: readonly Wanted[], directions: Readonly<Record<string, Direction>>): readonly Point[] {
  const points: Point[] = [];
  const held = new Map<string, Solution>();
  let near: Solution | undefined;
  for (const one of wanted) {
    if (plant.cancelled()) break;
    const solution = plant.machine.settle(one.setting, near);
    near = solution.solved ? solution : near;
    const setting = { ...one.setting, bits: solution.bits };
    const point = pointOf(plant, setting, solution, {
      label: one.label,
      directions,
      forces: true,
      held,
      ...(one.time === undefined ? {} : { time: Math.max(0, one.time) }),
    });
    const actuators = point.actuators.map((actuator) => stalledOnly(plant, actuator, one, setting, solution));
    points.push({ ...left(point, one.sample), actuators });
  }
  return points;
}

/** A volume that a step closes keeps the pressure that the run left in it. */
function left(point: Point, sample: Sample | undefined): Point {
  if (!sample || Object.keys(point.undetermined).length === 0) return point;
  const pressures = { ...point.pressures };
  for (const net of Object.keys(point.undetermined)) pressures[net] = sample.solution.pressures[net] ?? pressures[net] ?? 0;
  return { ...point, pressures, undetermined: {} };
}

/** An actuator whose turn has not come yet, or that the oil does not push any more, is not stalled. */
function stalledOnly(
  plant: Plant,
  actuator: Point['actuators'][number],
  at: Wanted,
  setting: Setting,
  solution: Solution,
): Point['actuators'][number] {
  if (actuator.shortBy === undefined) return actuator;
  const body = plant.bodies.find((one) => one.actuators.includes(actuator.id));
  const turn = at.label === 'end' || (body !== undefined && at.begun[body.id] === true);
  if (turn && body && pushedWays(plant, setting, [body.id], solution)[body.id] === actuator.direction) return actuator;
  const { shortBy: _waiting, ...rest } = actuator;
  return rest;
}

/**
 * Points without a run: from given positions all the way in the direction the entry moves; other bodies stand at entry.
 * `turn`: a body that begins at the stop it is pushed to begins at the other one.
 */
export function pointsAlone(plant: Plant, given: Setting, entryLabel: string, turn = false): readonly Point[] {
  const found = directionsOf(plant, given, {}, plant.machine.settle(given), () => false);
  const positions = { ...given.positions };
  for (const body of plant.bodies) {
    const direction = found[body.id] ?? 0;
    const x = positions[body.id] ?? body.begins;
    if (turn && direction !== 0 && Number.isFinite(body.stroke) && x === (direction > 0 ? body.stroke : 0))
      positions[body.id] = direction > 0 ? 0 : body.stroke;
  }
  const setting = { ...given, positions };
  const wanted: Wanted[] = [
    { label: entryLabel, time: undefined, setting, begun: Object.fromEntries(plant.bodies.map((one) => [one.id, true])) },
  ];
  for (const body of plant.bodies) {
    const direction = found[body.id] ?? 0;
    if (direction === 0 || !Number.isFinite(body.stroke)) continue;
    const from = setting.positions[body.id] ?? body.begins;
    const to = direction > 0 ? body.stroke : 0;
    const own = plant.bodies.length > 1 ? `${body.id} ` : '';
    const places: { readonly at: number; readonly label: string }[] = [];
    for (const knot of passed(knotsOf(plant, body, setting.loads[body.id] ?? NO_LOAD), from, to)) {
      const words = `${sayPlace(plant.circuit, knot.at, body.type === 'rotating')} (${knot.words})`;
      for (const side of besidesOnWay(knot, from, to, false))
        places.push({ at: side.at, label: side.when === 'at' ? words : `just ${side.when} ${words}` });
    }
    const middle = body.stroke / 2;
    if ((middle - from) * direction > 2e-6) places.push({ at: middle, label: 'mid-stroke' });
    if (Math.abs(to - from) > 2 * OFF_STOP) places.push({ at: to - OFF_STOP * direction, label: 'just before the stop' });
    places.sort((a, b) => (a.at - b.at) * direction);
    for (const place of places) {
      wanted.push({
        label: own + place.label,
        time: undefined,
        setting: { ...setting, positions: { ...setting.positions, [body.id]: place.at } },
        begun: { [body.id]: true },
      });
    }
  }
  return solveAll(plant, wanted, found);
}
