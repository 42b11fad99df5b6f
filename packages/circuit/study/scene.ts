/** All that a study works with: circuit, machine, contacts, and how often the machine was asked. */
import type { Body, Machine } from '../assembly/machine.ts';
import type { Circuit, Condition, Requirement } from '../model/circuit.ts';
import { type Contact, contactsOf } from './contacts.ts';
import { lookup, type Lookup } from './lookup.ts';
import type { Scene } from './quantities.ts';
import type { Assumption } from './study.ts';

export interface Plant extends Scene {
  readonly at: Lookup;
  readonly circuit: Circuit;
  readonly machine: Machine;
  readonly bodies: readonly Body[];
  readonly temperature: number;
  readonly contacts: readonly Contact[];
  readonly contact: (key: string) => Contact | undefined;
  /** The study's own assumptions; added to while it runs. */
  readonly assumptions: Assumption[];
  cancelled(): boolean;
}

export function plantOf(circuit: Circuit, machine: Machine, cancelled: () => boolean = () => false): Plant {
  const scene: Scene = { at: lookup(circuit), bodies: machine.bodies, heads: machine.heads, temperature: machine.temperature };
  const contacts = contactsOf(scene, conditionsOf(circuit));
  const byKey = new Map(contacts.map((one) => [one.key, one]));
  return { ...scene, circuit, machine, contacts, contact: (key) => byKey.get(key), assumptions: [], cancelled };
}

export function conditionsOf(circuit: Circuit): readonly Condition[] {
  return [
    ...circuit.cycles.flatMap((cycle) => cycle.steps.flatMap((step) => (step.until ? [step.until] : []))),
    ...circuit.whiles.map((one) => one.when),
    ...circuit.interlocks.map((one) => one.needs),
    ...circuit.requirements.flatMap((one: Requirement) => (one.form === 'never' ? [one.condition] : [])),
  ];
}
