/** `require never ..`: looked for in the runs, and, where only switches, coils and steps are named, in every assignment of switches. */
import type { Condition, Cycle, Step } from '../model/circuit.ts';
import { holds, type Situation } from './conditions.ts';
import { atoms, type Contact } from './contacts.ts';
import { decide, type Demand, demandOf, join, NOTHING } from './logic.ts';
import { product } from './lookup.ts';
import type { Plant } from './scene.ts';
import { groupsOf } from './sequence.ts';
import { list } from './words.ts';

/** More assignments than this are not gone through. */
const MOST = 65536;

export interface Breach {
  /** "in Drill.Out with PS1 off". */
  readonly at: string;
}
export type Searched =
  | { readonly found: Breach }
  | { readonly found?: undefined; readonly searched: 'all' | 'runs only'; readonly why?: string };

/** Whether a condition is decided by switches, coils and steps alone. */
export function logicOnly(plant: Plant, condition: Condition): boolean {
  return atoms(condition).every(
    (one) =>
      one.op === 'running' ||
      (one.op === 'state' &&
        one.is !== 'extended' &&
        one.is !== 'retracted' &&
        (plant.at.coil(one.of) !== undefined || plant.at.component(one.of)?.kind === 'switch')),
  );
}

export function searchLogic(plant: Plant, condition: Condition): Searched {
  if (!logicOnly(plant, condition)) return { searched: 'runs only', why: 'it names positions or sensors' };
  const relevant = relevantContacts(plant, condition);
  const assignments = assignmentsOf(relevant);
  if (assignments === undefined) return { searched: 'runs only', why: `more than ${MOST} stands of switches` };
  for (const { name, demand, running } of situations(plant)) {
    for (const states of assignments) {
      const base: Situation = { contact: (key) => states.get(key), live: () => false, running: (id) => running.has(id) };
      const control = decide(plant.at, demand, base);
      const situation: Situation = { ...base, live: (coil) => control.live.has(coil) };
      if (holds(plant.at, condition, situation) === true) return { found: { at: breachWords(name, states, relevant) } };
    }
  }
  return { searched: 'all' };
}

function breachWords(name: string, states: ReadonlyMap<string, boolean>, relevant: readonly Contact[]): string {
  const stands = relevant.map((one) => `${one.key} ${states.get(one.key) ? 'on' : 'off'}`);
  return stands.length > 0 ? `${name} with ${list(stands)}` : name;
}

/** Switches that the condition, interlocks and while lines look at; comparisons in those count as switches of their own. */
function relevantContacts(plant: Plant, condition: Condition): readonly Contact[] {
  const looked = [condition, ...plant.circuit.interlocks.map((one) => one.needs), ...plant.circuit.whiles.map((one) => one.when)].flatMap(
    atoms,
  );
  const keys = new Set<string>();
  for (const atom of looked) {
    if (atom.op === 'state') keys.add(atom.is === 'extended' || atom.is === 'retracted' ? `${atom.of} ${atom.is}` : atom.of);
    if (atom.op === 'compare') keys.add(`${atom.of} ${atom.is} ${atom.value.si}`);
  }
  return plant.contacts.filter((one) => keys.has(one.key));
}

/** What may be asked for at once: every step with its meanwhile lines (any of those may have ended), every push button, nothing. */
function situations(plant: Plant): readonly { readonly name: string; readonly demand: Demand; readonly running: ReadonlySet<string> }[] {
  const found: { name: string; demand: Demand; running: ReadonlySet<string> }[] = [
    { name: 'without a step', demand: NOTHING, running: new Set() },
  ];
  for (const cycle of plant.circuit.cycles) for (const group of groupsOf(cycle)) found.push(...groupSituations(plant, cycle, group));
  return found;
}
function groupSituations(plant: Plant, cycle: Cycle, group: readonly Step[]) {
  const subsets =
    group.length > 4
      ? [group]
      : product(group.map((one) => [[one], []] as const))
          .map((row) => row.flat())
          .filter((one) => one.length > 0);
  return subsets.map((steps) => {
    const outer = plant.circuit.cycles.filter((one) =>
      one.steps.some((step) => step.actions.some((action) => action.does === 'run' && action.cycle === cycle.id)),
    );
    const running = new Set([cycle.id, ...steps.map((one) => one.id), ...outer.map((one) => one.id)]);
    return { name: `in ${list(steps.map((one) => one.id))}`, demand: join(steps.map((one) => demandOf(one.actions, one.id))), running };
  });
}

/** Stands of contacts that can be together: those on one quantity are taken from its intervals, outside switches are free. */
export function assignmentsOf(contacts: readonly Contact[]): readonly ReadonlyMap<string, boolean>[] | undefined {
  const groups = new Map<string, Contact[]>();
  for (const one of contacts) {
    const key = one.source.what === 'outside' || one.source.what === 'unknown' ? one.key : JSON.stringify(one.source);
    groups.set(key, [...(groups.get(key) ?? []), one]);
  }
  const choices = [...groups.values()].map(together);
  if (choices.reduce((count, one) => count * one.length, 1) > MOST) return undefined;
  return product(choices).map((row) => new Map(row.flat()));
}

type Stands = readonly (readonly [string, boolean])[];

function together(contacts: readonly Contact[]): readonly Stands[] {
  const limits = new Set<number>();
  for (const { test } of contacts) {
    if (test.is === 'above') limits.add(test.rises).add(test.falls);
    if (test.is === 'inside') limits.add(test.from).add(test.to);
  }
  const sorted = [...limits].filter(Number.isFinite).sort((a, b) => a - b);
  const values =
    sorted.length === 0
      ? [0]
      : [sorted[0]! - 1, ...sorted.flatMap((one, index) => [one, index + 1 < sorted.length ? (one + sorted[index + 1]!) / 2 : one + 1])];
  const seen = new Map<string, Stands>();
  for (const value of values) {
    for (const row of product(contacts.map((one) => possible(one, value).map((on) => [one.key, on] as const))))
      seen.set(JSON.stringify(row), row);
  }
  return [...seen.values()];
}

/** How a contact can stand at a value: between its two thresholds either way. */
function possible(contact: Contact, value: number): readonly boolean[] {
  const { test, inverted } = contact;
  const turn = (on: boolean) => on !== inverted;
  if (test.is === 'above') {
    if (value >= test.rises) return [turn(true)];
    return value <= test.falls ? [turn(false)] : [true, false];
  }
  if (test.is === 'inside') return [turn(value >= test.from && value <= test.to)];
  return [true, false];
}
