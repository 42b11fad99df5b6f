/** Places of a requirement: steps (cycles stand for theirs) and machine states, with their points and samples. */
import type { Body } from '../assembly/machine.ts';
import type { Requirement, Where } from '../model/circuit.ts';
import type { Ran } from './cycle.ts';
import type { Plant } from './scene.ts';
import type { StudiedState } from './states.ts';
import { type Passage, passagesOf, samplesOf } from './steps.ts';
import type { CycleResult, Point, StepResult, Study } from './study.ts';
import type { Sample } from './trace.ts';
import { say, sayPlace } from './words.ts';

/** All that requirements are decided from. */
export interface Facts {
  readonly plant: Plant;
  readonly rans: readonly Ran[];
  readonly steps: readonly StepResult[];
  readonly states: readonly StudiedState[];
  readonly cycles: readonly CycleResult[];
  readonly heat: Study['heat'];
}

export interface StepPlace {
  readonly is: 'step';
  readonly id: string;
  readonly result: StepResult;
  readonly passages: readonly Passage[];
}
export interface StatePlace {
  readonly is: 'state';
  readonly id: string;
  readonly states: readonly StudiedState[];
}
export type Place = StepPlace | StatePlace;

const STATES = ['REST', 'OFF', 'STOP', 'IDLE'];

export function placesOf(facts: Facts, where: Where): { readonly places: readonly Place[]; readonly missing: readonly string[] } {
  const names = where.places ?? facts.plant.circuit.cycles.map((one) => one.id);
  const places: Place[] = [];
  const missing: string[] = [];
  for (const name of names) {
    if (STATES.includes(name)) {
      const states = statesNamed(facts, name);
      if (states.length > 0) places.push({ is: 'state', id: name, states });
      else missing.push(name);
      continue;
    }
    const ids = stepsNamed(facts, name, 0);
    if (ids.length === 0) missing.push(name);
    for (const id of ids) {
      const result = facts.steps.find((one) => one.id === id);
      if (result && !places.some((one) => one.id === id)) places.push({ is: 'step', id, result, passages: passagesOf(facts.rans, id) });
    }
  }
  return { places, missing };
}

/** STOP means from every step and from rest; IDLE where it is no other than REST is REST. */
function statesNamed(facts: Facts, name: string): readonly StudiedState[] {
  const found = facts.states.filter((one) => one.result.state === name);
  return found.length > 0 || name !== 'IDLE' ? found : facts.states.filter((one) => one.result.state === 'REST');
}

function stepsNamed(facts: Facts, name: string, depth: number): readonly string[] {
  const { at } = facts.plant;
  if (at.step(name)) return [name];
  const cycle = at.cycle(name);
  if (!cycle || depth > 8) return [];
  return cycle.steps.flatMap((step) => [
    step.id,
    ...step.actions.flatMap((one) => (one.does === 'run' ? stepsNamed(facts, one.cycle, depth + 1) : [])),
  ]);
}

/** The actuator whose range or direction is meant: the one named, else the circuit's only one. */
export function rangeBody(plant: Plant, requirement: Requirement & { readonly of: string }): Body | undefined {
  const own = plant.bodies.find((one) => one.actuators.includes(requirement.of));
  if (own) return own;
  return plant.bodies.length === 1 ? plant.bodies[0] : undefined;
}

/** Slack of a range's ends, m: less than the distance at which points stand beside a knot. */
const END = 1e-9;

/** Points of a step that a requirement's range and direction select. */
export function selectedPoints(where: Where, body: Body | undefined, points: readonly Point[]): readonly Point[] {
  if (!where.range && !where.direction) return points;
  if (!body) return [];
  return points.filter((point) => {
    const one = point.actuators.find((actuator) => actuator.id === body.actuators[0]);
    return (
      one !== undefined &&
      inside(where, one.position) &&
      inDirection(where, one.velocity !== 0 && one.direction === 0 ? Math.sign(one.velocity) : one.direction, one.velocity)
    );
  });
}
/** Samples of a run that range and direction select, outside the shifting of valves. */
export function selectedSamples<T extends Sample>(where: Where, body: Body | undefined, samples: readonly T[]): readonly T[] {
  if (!where.range && !where.direction) return samples;
  if (!body) return [];
  return samples.filter(({ solution }) => {
    const v = solution.velocities[body.id] ?? 0;
    return inside(where, solution.positions[body.id] ?? 0) && inDirection(where, Math.sign(v), v);
  });
}
function inside(where: Where, x: number): boolean {
  if (!where.range) return true;
  const low = Math.min(where.range.from.si, where.range.to.si);
  const high = Math.max(where.range.from.si, where.range.to.si);
  return x >= low - END && x <= high + END;
}
function inDirection(where: Where, direction: number, velocity: number): boolean {
  if (!where.direction) return true;
  const sign = where.direction === 'extending' ? 1 : -1;
  return Math.abs(velocity) > 5e-5 ? velocity * sign > 0 : direction * sign > 0;
}

/** Whether a step passes the named range at all, in the named direction. */
export function passesRange(where: Where, body: Body | undefined, place: StepPlace): boolean {
  if (!where.range) return true;
  if (!body) return false;
  const samples = place.passages.flatMap(({ trace, span }) => trace.between(span.from, span.to));
  return selectedSamples(where, body, samples).length > 0 || selectedPoints(where, body, place.result.points).length > 0;
}

export function stepSamples(place: StepPlace): readonly (Sample & { readonly since: number })[] {
  return samplesOf(place.passages, place.id);
}

/** "Drill.Out at 315 mm, 4.20 s". */
export function placeWords(
  plant: Plant,
  place: string,
  body: Body | undefined,
  position: number | undefined,
  time: number | undefined,
): string {
  // The angle of a shaft that turns on and on says nothing.
  const where =
    position === undefined || !body || !Number.isFinite(body.stroke)
      ? place
      : `${place} at ${sayPlace(plant.circuit, position, body.type === 'rotating')}`;
  return time === undefined ? where : `${where}, ${say(plant.circuit, time, 'time')}`;
}
