/** Loading of a drive, oil temperature, time of a step or cycle, volumes. */
import { level } from '../quantities.ts';
import type { Place } from '../places.ts';
import { placeWords, selectedSamples, rangeBody, stepSamples } from '../places.ts';
import { si } from '../read.ts';
import { say } from '../words.ts';
import type { Asked } from './asked.ts';
import { variantValues } from './motion.ts';
import { type Observed, value } from './observed.ts';

/** max(rms / power, highest / (power x peak)) over cycles; highest / power in a state. */
export function loading(asked: Asked): readonly Observed[] {
  const { plant, requirement, facts } = asked;
  const drive = plant.at.component(requirement.of);
  const power = drive ? si(drive, 'power') : undefined;
  if (!drive || power === undefined || !(power > 0)) {
    return [{ place: requirement.of, values: [], problems: [`${requirement.of} has no \`power\``] }];
  }
  const peak = si(drive, 'peak') ?? 1;
  const names = requirement.where.places;
  const observed: Observed[] = [];
  for (const cycle of facts.cycles) {
    const duty = cycle.duty[drive.id];
    if (!duty || (names && !names.includes(cycle.id)) || cycle.run === undefined) continue;
    const worst = Math.max(duty.rms / power, duty.highest / (power * peak));
    const how =
      duty.rms / power >= duty.highest / (power * peak)
        ? `rms ${say(plant.circuit, duty.rms, 'power')}`
        : `highest ${say(plant.circuit, duty.highest, 'power')}`;
    observed.push({
      place: cycle.id,
      values: [value(`${cycle.id}, ${how}`, worst)],
      problems: cycle.completed || cycle.mode === 'manual' ? [] : [`${cycle.id} does not end: ${cycle.faults[0]?.words ?? 'it stops'}`],
    });
  }
  for (const name of names ?? []) {
    const states = facts.states.filter((one) => one.result.state === name);
    if (states.length > 0) {
      observed.push(variantValues({ is: 'state', id: name, states }, (point) => (point.power[drive.id] ?? 0) / power));
      continue;
    }
    const step = facts.steps.find((one) => one.id === name);
    if (step) {
      const highest = Math.max(0, ...step.points.map((one) => one.power[drive.id] ?? 0));
      observed.push({
        place: name,
        values: [value(name, highest / (power * peak))],
        problems: step.points.length === 0 ? [`${name} is not computed`] : [],
      });
    }
  }
  return observed.length > 0 ? observed : [{ place: requirement.of, values: [], problems: ['no cycle is run: name a state'] }];
}

/** Steady oil temperature of the cycles' (or states') balance. */
export function temperature(asked: Asked): readonly Observed[] {
  const { requirement, facts } = asked;
  const names = requirement.where.places ?? facts.cycles.filter((one) => one.mode === 'cycle').map((one) => one.id);
  if (names.length === 0) return [{ place: requirement.of, values: [], problems: ['no cycle is run: name a state'] }];
  return names.map((name) => {
    const cycle = facts.cycles.find((one) => one.id === name);
    const found = facts.heat[`${name} ${requirement.of}`] ?? facts.heat[name];
    if (!found) return { place: name, values: [], problems: [`no heat balance of ${name}`] };
    const problems = cycle && !cycle.completed ? [`${name} does not end: ${cycle.faults[0]?.words ?? 'it stops'}`] : [];
    return { place: name, values: [value(name, found.temperature.value)], problems };
  });
}

export function time(asked: Asked): readonly Observed[] {
  const { requirement, facts } = asked;
  const step = facts.steps.find((one) => one.id === requirement.of);
  const cycle = facts.cycles.find((one) => one.id === requirement.of);
  if (step) {
    const known = step.time;
    return [
      {
        place: step.id,
        values: known === undefined ? [] : [value(step.id, known)],
        problems: known === undefined ? [step.faults[0]?.words ?? `no run ends ${step.id}`] : [],
      },
    ];
  }
  if (!cycle) return [{ place: requirement.of, values: [], problems: [`${requirement.of} is no step or cycle that is run`] }];
  const known = cycle.time;
  return [
    {
      place: cycle.id,
      values: known === undefined ? [] : [value(cycle.id, known)],
      problems: known === undefined ? [`${cycle.id} does not end: ${cycle.faults[0]?.words ?? 'it stops'}`] : [],
    },
  ];
}

/** Oil in an accumulator, or content of a reservoir. */
export function volume(asked: Asked, place: Place): Observed {
  const { plant, requirement } = asked;
  const component = plant.at.component(requirement.of);
  const body = rangeBody(plant, requirement);
  if (place.is === 'state') {
    if (component?.kind !== 'accumulator')
      return { place: place.id, values: [], problems: ['the content of a reservoir is asked of a step or cycle'] };
    return variantValues(place, (point) => point.oil[requirement.of]);
  }
  const values = selectedSamples(requirement.where, body, stepSamples(place)).flatMap((one) => {
    const amount = component?.kind === 'reservoir' ? level(plant, component.id, one.solution) : one.solution.oil[requirement.of];
    return amount === undefined
      ? []
      : [value(placeWords(plant, place.id, undefined, undefined, one.time), amount, { since: one.since, run: true, time: one.time })];
  });
  return { place: place.id, values, problems: values.length === 0 ? [`no run reaches ${place.id}`] : [] };
}
