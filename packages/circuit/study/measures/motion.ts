/** Speed, force, torque, position and drift of an actuator. */
import type { Body } from '../../assembly/machine.ts';
import { passesRange, type Place, placeWords, selectedPoints, selectedSamples, stepSamples } from '../places.ts';
import { SETTLING } from '../state-runs.ts';
import type { ActuatorPoint, Point } from '../study.ts';
import { sayPlace } from '../words.ts';
import type { Asked } from './asked.ts';
import { type Observed, type Value, value } from './observed.ts';

function actuatorBody(asked: Asked): Body | undefined {
  return asked.plant.bodies.find((one) => one.actuators.includes(asked.requirement.of));
}
function notMachine(asked: Asked, place: Place): Observed {
  return {
    place: place.id,
    values: [],
    problems: [asked.plant.machine.notComputed[asked.requirement.of] ?? `${asked.requirement.of} is not computed`],
  };
}

export function speed(asked: Asked, place: Place): Observed {
  const body = actuatorBody(asked);
  if (!body) return notMachine(asked, place);
  const { plant, requirement } = asked;
  const of = (one: ActuatorPoint | undefined) =>
    one ? Math.max(0, one.direction === 0 ? Math.abs(one.velocity) : one.velocity * one.direction) : 0;
  if (place.is === 'state') {
    return variantValues(place, (point) => of(point.actuators.find((one) => one.id === requirement.of)));
  }
  if (!passesRange(requirement.where, body, place)) return { place: place.id, values: [], problems: [notPassed(asked, body, place.id)] };
  const values: Value[] = [];
  const problems: string[] = [];
  for (const point of selectedPoints(requirement.where, body, place.result.points)) {
    const one = point.actuators.find((actuator) => actuator.id === requirement.of);
    if (!one) continue;
    if (!point.solved) {
      problems.push(`no equilibrium found at ${point.label} of ${place.id}`);
      continue;
    }
    const moving = Math.abs(one.velocity) > (body.type === 'rotating' ? 8.7e-4 : 5e-5) && one.atStop === undefined;
    if (!moving && one.shortBy === undefined) continue;
    values.push(
      value(
        placeWords(plant, place.id, body, one.position, point.time),
        moving ? of(one) : 0,
        point.time === undefined ? {} : { time: point.time },
      ),
    );
  }
  if (values.length === 0 && problems.length === 0 && asked.named) values.push(value(`${place.id}, where it does not move`, 0));
  return { place: place.id, values, problems };
}

export function force(asked: Asked, place: Place): Observed {
  const body = actuatorBody(asked);
  if (!body) return notMachine(asked, place);
  const { plant, requirement } = asked;
  if (place.is === 'state')
    return variantValues(place, (point) => Math.abs(point.actuators.find((one) => one.id === requirement.of)?.force ?? 0));
  if (!passesRange(requirement.where, body, place)) return { place: place.id, values: [], problems: [notPassed(asked, body, place.id)] };
  const values: Value[] = [];
  const problems: string[] = [];
  for (const point of selectedPoints(requirement.where, body, place.result.points)) {
    const one = point.actuators.find((actuator) => actuator.id === requirement.of);
    if (!one) continue;
    if (!point.solved) problems.push(`no equilibrium found at ${point.label} of ${place.id}`);
    else
      values.push(
        value(
          placeWords(plant, place.id, body, one.position, point.time),
          Math.abs(one.force),
          point.time === undefined ? {} : { time: point.time },
        ),
      );
  }
  if (requirement.bound.is === 'reaches' || requirement.lasts !== undefined) {
    const single = body.actuators.length === 1;
    for (const one of selectedSamples(requirement.where, body, stepSamples(place))) {
      if (!single) break;
      values.push(
        value(placeWords(plant, place.id, body, one.solution.positions[body.id], one.time), Math.abs(one.solution.forces[body.id] ?? 0), {
          since: one.since,
          run: true,
          time: one.time,
        }),
      );
    }
  }
  return { place: place.id, values, problems };
}

export function position(asked: Asked, place: Place): Observed {
  const body = actuatorBody(asked);
  if (!body) return notMachine(asked, place);
  if (place.is === 'state') {
    const { runs, all } = asked.runner.run(place.states, asked.requirement.lasts ?? SETTLING, false);
    const values = runs.map((run, series) => value(run.label, run.samples.at(-1)?.solution.positions[body.id] ?? 0, { series }));
    return { place: place.id, values, problems: failures(runs), ...some(runs.length, all) };
  }
  const values = selectedSamples(asked.requirement.where, body, stepSamples(place)).map((one) =>
    value(placeWords(asked.plant, place.id, body, one.solution.positions[body.id], one.time), one.solution.positions[body.id] ?? 0, {
      since: one.since,
      run: true,
      time: one.time,
    }),
  );
  return { place: place.id, values, problems: values.length === 0 ? [`no run reaches ${place.id}`] : [] };
}

/** Way moved by leakage within the time asked for, the worst variant; the first second is settling. */
export function drift(asked: Asked, place: Place): Observed {
  const body = actuatorBody(asked);
  if (!body) return notMachine(asked, place);
  const lasts = asked.requirement.lasts;
  if (place.is !== 'state') return { place: place.id, values: [], problems: ['drift is asked of a machine state (REST, OFF, STOP, IDLE)'] };
  if (lasts === undefined) return { place: place.id, values: [], problems: ['drift needs `for` a time'] };
  const { runs, all } = asked.runner.run(place.states, lasts + SETTLING, true);
  const values = runs.map((run, series) => {
    const settled = run.samples.filter((one) => one.time >= SETTLING - 1e-9);
    const from = settled[0]?.solution.positions[body.id] ?? 0;
    const most = Math.max(0, ...settled.map((one) => Math.abs((one.solution.positions[body.id] ?? 0) - from)));
    return value(run.label, most, { series });
  });
  return { place: place.id, values, problems: failures(runs), ...some(runs.length, all) };
}

/** One value a variant, from its point. */
export function variantValues(place: Place & { readonly is: 'state' }, of: (point: Point) => number | undefined): Observed {
  const values: Value[] = [];
  const problems: string[] = [];
  const notes: string[] = [];
  let series = 0;
  for (const { result } of place.states) {
    if (result.studied.of < result.studied.all) notes.push(`${result.studied.of} of ${result.studied.all} variants of ${result.id}`);
    for (const variant of result.variants) {
      const at = variant.label === '' ? result.id : `${result.id}: ${variant.label}`;
      if (!variant.point.solved) problems.push(`no equilibrium found in ${at}`);
      else {
        const amount = of(variant.point);
        if (amount !== undefined) values.push(value(at, amount, { series }));
      }
      series += 1;
    }
  }
  return { place: place.id, values, problems, notes };
}

export function notPassed(asked: Asked, body: Body, place: string): string {
  const { range } = asked.requirement.where;
  if (!range) return `${place} is not run`;
  const rotating = body.type === 'rotating';
  return `${place} does not pass ${sayPlace(asked.plant.circuit, range.from.si, rotating)} to ${sayPlace(asked.plant.circuit, range.to.si, rotating)}`;
}
function failures(runs: readonly { readonly label: string; readonly failed?: string }[]): string[] {
  return runs.flatMap((one) => (one.failed === undefined ? [] : [`${one.label}: ${one.failed}`]));
}
function some(of: number, all: number): { readonly notes?: readonly string[] } {
  return of < all ? { notes: [`${of} of ${all} variants run in time`] } : {};
}
