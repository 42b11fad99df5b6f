/** `require C1 still ..`: no motion in any variant of a state or any steady point of a step; with `for`, nor in the run. */
import type { Body } from '../assembly/machine.ts';
import type { Requirement } from '../model/circuit.ts';
import { relaxesWithin } from './loads.ts';
import { moves } from './motion.ts';
import { type Facts, placesOf, selectedPoints, stepSamples } from './places.ts';
import { SETTLING, type StateRun, type StateRunner } from './state-runs.ts';
import type { RequirementResult } from './study.ts';
import { list, say } from './words.ts';

type Still = Extract<Requirement, { readonly form: 'still' }>;

export function judgeStill(facts: Facts, requirement: Still, runner: StateRunner): RequirementResult {
  const { plant } = facts;
  const { circuit } = plant;
  const base = { id: requirement.id, origin: requirement.origin };
  const undecided = (why: string): RequirementResult => ({ ...base, verdict: 'undecidable', at: '', words: `cannot be decided: ${why}` });
  const body = plant.bodies.find((one) => one.actuators.includes(requirement.of));
  if (!body)
    return undecided(
      plant.circuit.unknown[requirement.of] ?? plant.machine.notComputed[requirement.of] ?? `${requirement.of} is not computed`,
    );
  const { places, missing } = placesOf(facts, requirement.where);
  if (missing.length > 0) return undecided(`${list(missing)} is not studied`);
  if (places.length === 0) return undecided('the file has no cycle: name a state');
  const dimension = body.type === 'rotating' ? ('rotation' as const) : ('velocity' as const);
  const missed = (at: string, velocity: number, how: string): RequirementResult => ({
    ...base,
    verdict: 'missed',
    worst: { value: Math.abs(velocity), dimension },
    at,
    words: `${requirement.of} moves at ${say(circuit, Math.abs(velocity), dimension)} in ${at}${how}`,
  });
  const problems: string[] = [];
  const notes: string[] = [];
  for (const place of places) {
    if (place.is === 'step') {
      for (const point of selectedPoints(requirement.where, body, place.result.points)) {
        const one = point.actuators.find((actuator) => actuator.id === requirement.of);
        if (!point.solved) problems.push(`no equilibrium found at ${point.label} of ${place.id}`);
        else if (one && Math.abs(one.velocity) > (body.type === 'rotating' ? 8.7e-4 : 5e-5))
          return missed(`${place.id}, ${point.label}`, one.velocity, '');
      }
      if (requirement.lasts !== undefined) {
        const sample = stepSamples(place).find((one) => moves(body, one.solution));
        if (sample) return missed(`${place.id}, ${say(circuit, sample.time, 'time')}`, sample.solution.velocities[body.id] ?? 0, '');
      }
      if (place.result.points.length === 0) problems.push(`${place.id} is not computed`);
      continue;
    }
    let worst: { velocity: number; at: string; path: string; cause: string } | undefined;
    for (const { result } of place.states) {
      if (result.studied.of < result.studied.all) notes.push(`${result.studied.of} of ${result.studied.all} variants of ${result.id}`);
      if (result.variants.length === 0) problems.push(`${result.id} is not computed`);
      for (const variant of result.variants) {
        const at = variant.label === '' ? result.id : `${result.id}: ${variant.label}`;
        if (!variant.point.solved) problems.push(`no equilibrium found in ${at}`);
        const one = variant.moving.find((moving) => moving.id === requirement.of);
        if (!one) continue;
        if (one.relaxes !== undefined) notes.push(`relaxes ${say(circuit, one.relaxes, 'length')} in ${result.id}`);
        else if (!worst || Math.abs(one.velocity) > Math.abs(worst.velocity))
          worst = { velocity: one.velocity, at, path: one.path, cause: one.cause };
      }
    }
    if (worst) return missed(worst.at, worst.velocity, worst.path ? `, by ${worst.cause} through ${worst.path}` : '');
    if (requirement.lasts !== undefined) {
      const { runs, all } = runner.run(place.states, requirement.lasts, false);
      if (runs.length < all) notes.push(`${runs.length} of ${all} variants of ${place.id} run in time`);
      for (const run of runs) {
        if (run.failed !== undefined) problems.push(`${run.label}: ${run.failed}`);
        const moving = unsettled(body, run);
        if (moving) return missed(`${run.label}, ${say(circuit, moving.time, 'time')}`, moving.solution.velocities[body.id] ?? 0, '');
      }
    }
  }
  if (problems.length > 0) return undecided(problems[0]!);
  const extra = [...new Set(notes)].slice(0, 2);
  const where = list(requirement.where.places ?? ['every step']);
  return {
    ...base,
    verdict: 'met',
    at: '',
    words: `${requirement.of} stands still in ${where}${extra.length > 0 ? ` (${list(extra)})` : ''}`,
  };
}

/** First motion of a run that is neither a part springing back nor, in the second after it, compressed oil settling. */
function unsettled(body: Body, run: StateRun): StateRun['samples'][number] | undefined {
  let settling = SETTLING;
  for (const one of run.samples) {
    if (!moves(body, one.solution)) continue;
    const velocity = one.solution.velocities[body.id] ?? 0;
    const load = run.setting.loads[body.id];
    const relaxing =
      load !== undefined && relaxesWithin(load, one.solution.positions[body.id] ?? 0, velocity > 0 ? 1 : -1, 5e-3) !== undefined;
    if (relaxing) settling = Math.max(settling, one.time + SETTLING);
    else if (one.time > settling) return one;
  }
  return undefined;
}
