/** What a step waits for, with the value it stands at: "PS1 at 138 of 145 bar". */
import type { Dimension } from '@oilway/quantity';
import type { Body, Solution } from '../assembly/machine.ts';
import type { Condition } from '../model/circuit.ts';
import { holds, type Situation } from './conditions.ts';
import { atomContact, switchContact } from './contacts.ts';
import { sourceOf, valueIn } from './quantities.ts';
import type { Plant } from './scene.ts';
import { list, say, sayAgainst, sayPlace } from './words.ts';

/** Atoms that keep a condition from being true, in words. */
export function waitingFor(plant: Plant, condition: Condition | undefined, situation: Situation, solution: Solution): string {
  if (!condition) return '';
  const open = missing(plant, condition, situation);
  return list(open.map((atom) => atomWords(plant, atom, solution)));
}

/** Bodies whose place is waited for, and the way each would have to go. */
export function bodiesWaitedFor(
  plant: Plant,
  condition: Condition | undefined,
  situation: Situation,
  solution: Solution,
): readonly { readonly body: Body; readonly direction: -1 | 1 }[] {
  if (!condition) return [];
  return missing(plant, condition, situation).flatMap((atom) => {
    const component = 'of' in atom ? plant.at.component(atom.of) : undefined;
    const contact = component?.kind === 'switch' ? switchContact(plant, component) : atomContact(plant, atom);
    if (contact?.source.what !== 'position') return [];
    const { source, test } = contact;
    const body = plant.bodies.find((one) => one.id === source.body);
    const x = solution.positions[source.body];
    if (!body || x === undefined) return [];
    const target = test.is === 'inside' ? (x < test.from ? test.from : test.to) : test.is === 'above' ? test.rises : x;
    return target === x ? [] : [{ body, direction: target > x ? (1 as const) : (-1 as const) }];
  });
}

function missing(plant: Plant, condition: Condition, situation: Situation): readonly Condition[] {
  if (holds(plant.at, condition, situation) === true) return [];
  if (condition.op === 'and' || condition.op === 'or') return condition.items.flatMap((one) => missing(plant, one, situation));
  return [condition];
}

function atomWords(plant: Plant, atom: Condition, solution: Solution): string {
  const { circuit } = plant;
  if (atom.op === 'compare') {
    const source = sourceOf(plant, atom.of, atom.value.dimension);
    const value = valueIn(plant, source, solution);
    if (value === undefined) return atom.of;
    const { value: stands, bound } = sayAgainst(circuit, value, atom.value.si, atom.value.dimension);
    return `${atom.of} at ${unitOnce(stands, bound)}`;
  }
  if (atom.op !== 'state') return atom.op === 'running' ? atom.of : 'a condition that is not resolved';
  if (atom.is === 'extended' || atom.is === 'retracted') {
    const contact = atomContact(plant, atom);
    const value = contact ? valueIn(plant, contact.source, solution) : undefined;
    const rotating = contact?.source.what === 'position' && contact.source.rotating;
    return value === undefined
      ? `${atom.of} ${atom.is}`
      : `${atom.of} ${atom.is}, it stands at ${sayPlace(circuit, value, rotating === true)}`;
  }
  const component = plant.at.component(atom.of);
  if (component?.kind !== 'switch') return `${atom.of} ${atom.is}`;
  const contact = switchContact(plant, component);
  const value = valueIn(plant, contact.source, solution);
  if (value === undefined) return `${atom.of} ${atom.is}`;
  if (contact.source.what === 'position') {
    const place = sayPlace(circuit, value, contact.source.rotating);
    if (contact.test.is !== 'inside') return `${atom.of}, ${place}`;
    return `${atom.of}, ${contact.source.body} at ${place}, it switches from ${sayPlace(circuit, contact.test.from, contact.source.rotating)} to ${sayPlace(circuit, contact.test.to, contact.source.rotating)}`;
  }
  const dimension: Dimension = contact.source.what === 'pressure' ? 'pressure' : contact.source.what === 'level' ? 'volume' : 'temperature';
  if (contact.test.is !== 'above') return `${atom.of}, ${say(circuit, value, dimension)}`;
  const wantsOn = (atom.is === 'on') !== contact.inverted;
  const { value: stands, bound } = sayAgainst(circuit, value, wantsOn ? contact.test.rises : contact.test.falls, dimension);
  return `${atom.of} at ${unitOnce(stands, bound)}`;
}

/** `138 bar`, `145 bar` -> `138 of 145 bar`. */
export function unitOnce(value: string, bound: string): string {
  const [number, ...unit] = value.split(' ');
  return unit.length > 0 && bound.endsWith(` ${unit.join(' ')}`) ? `${number} of ${bound}` : `${value} of ${bound}`;
}
