/** Whether what a requirement asks for rests on something unknown, in the places it names. */
import type { Requirement } from '../model/circuit.ts';
import { netAsked } from './measures/hydraulic.ts';
import { type Facts, type Place, placesOf } from './places.ts';
import type { Point } from './study.ts';

/** The reason ("V2 has no `passes`"), or undefined where all it rests on is known. */
export function unknownBehind(facts: Facts, requirement: Requirement): string | undefined {
  const { plant } = facts;
  if (requirement.form === 'never') return undefined;
  // Without one of its loads a machine moves otherwise: nothing is decided by it.
  for (const load of plant.circuit.loads) {
    for (const { value } of load.properties) if (value.type === 'unknown') return `load of ${load.actuators.join(', ')}: ${value.why}`;
  }
  if (Object.keys(plant.machine.notComputed).length === 0) return undefined;
  const direct = plant.circuit.unknown[requirement.of] ?? plant.machine.notComputed[requirement.of];
  if (direct !== undefined) return direct;
  const keys = keysOf(facts, requirement);
  const whole = requirement.form === 'bound' && ['time', 'loading', 'temperature'].includes(requirement.measure);
  const { places } = placesOf(facts, whole && !requirement.where.places ? wholeOf(facts, requirement.of) : requirement.where);
  for (const point of places.flatMap(pointsOf)) {
    for (const key of keys) if (point.notComputed[key] !== undefined) return point.notComputed[key];
  }
  return undefined;
}

/** A time is that of its own step or cycle; other whole measures take every cycle. */
function wholeOf(facts: Facts, of: string) {
  return facts.plant.at.step(of) || facts.plant.at.cycle(of) ? { places: [of] } : {};
}

/** Components and nets whose figures the requirement takes. */
function keysOf(facts: Facts, requirement: Exclude<Requirement, { readonly form: 'never' }>): readonly string[] {
  const { plant } = facts;
  const component = plant.at.component(requirement.of);
  const outlets = (pumps: readonly { readonly id: string }[]) => pumps.flatMap((one) => plant.at.netOf(one.id, 'P') ?? []);
  if (requirement.form === 'bound' && requirement.measure === 'pressure') {
    const found = netAsked(plant, requirement.of, requirement.port);
    return 'net' in found ? [found.net] : [];
  }
  if (component?.kind === 'drive') return outlets(plant.at.pumpsOf(component.id));
  if (component?.kind === 'pump') return outlets([component]);
  if (component?.kind === 'reservoir') return outlets(plant.at.ofKind('pump'));
  if (!component) return plant.at.actuators.map((one) => one.id);
  return [component.id, ...plant.at.portsOf(component.id).map((one) => one.net)];
}

function pointsOf(place: Place): readonly Point[] {
  return place.is === 'step' ? place.result.points : place.states.flatMap((one) => one.result.variants.map((variant) => variant.point));
}
