/** Conditions of the control as true, false or not known. */
import type { Condition } from '../model/circuit.ts';
import { compareKey } from './contacts.ts';
import type { Lookup } from './lookup.ts';
import { flag } from './read.ts';

/** How everything that a condition can name stands. */
export interface Situation {
  /** Contact by key: switch id, `XT1 above 0.5`, `C1 extended`. Undefined: not known. */
  contact(key: string): boolean | undefined;
  live(coil: string): boolean;
  /** A step or cycle runs. */
  running(id: string): boolean;
}

export function holds(at: Lookup, condition: Condition, situation: Situation): boolean | undefined {
  switch (condition.op) {
    case 'and':
      return fold(
        condition.items.map((one) => holds(at, one, situation)),
        false,
      );
    case 'or':
      return fold(
        condition.items.map((one) => holds(at, one, situation)),
        true,
      );
    case 'state': {
      if (condition.is === 'extended' || condition.is === 'retracted') return situation.contact(`${condition.of} ${condition.is}`);
      const on = at.coil(condition.of) ? situation.live(condition.of) : situation.contact(condition.of);
      return on === undefined ? undefined : on === (condition.is === 'on');
    }
    case 'compare':
      return situation.contact(compareKey(condition.of, condition.is, condition.value.si));
    case 'running':
      return situation.running(condition.of);
    case 'unknown':
      return undefined;
  }
}

/** `decides`: the value that decides the whole at once (false for and, true for or). */
function fold(values: readonly (boolean | undefined)[], decides: boolean): boolean | undefined {
  if (values.some((one) => one === decides)) return decides;
  return values.some((one) => one === undefined) ? undefined : !decides;
}

/** Whether an atom is an outside switch: a button or guard that the study takes as it is needed. */
export function isOutside(at: Lookup, atom: Condition): boolean {
  if (atom.op !== 'state') return false;
  const component = at.component(atom.of);
  return component?.kind === 'switch' && flag(component, 'outside');
}

/** Outside switches as a condition needs them. An alternative that needs none leaves the others alone. */
export function outsideNeeds(at: Lookup, condition: Condition): ReadonlyMap<string, boolean> {
  const needs = new Map<string, boolean>();
  collect(at, condition, needs);
  return needs;
}
function collect(at: Lookup, condition: Condition, into: Map<string, boolean>): void {
  if (condition.op === 'and') for (const item of condition.items) collect(at, item, into);
  if (condition.op === 'or') {
    if (condition.items.every((item) => touchesOutside(at, item))) {
      const first = condition.items[0];
      if (first) collect(at, first, into);
    }
  }
  if (condition.op === 'state' && isOutside(at, condition)) into.set(condition.of, condition.is === 'on');
}
function touchesOutside(at: Lookup, condition: Condition): boolean {
  if (condition.op === 'and' || condition.op === 'or') return condition.items.some((item) => touchesOutside(at, item));
  return isOutside(at, condition);
}

/** Whether only outside switches decide a condition (a push button released). */
export function onlyOutside(at: Lookup, condition: Condition): boolean {
  if (condition.op === 'and' || condition.op === 'or') return condition.items.every((item) => onlyOutside(at, item));
  return isOutside(at, condition);
}

/** The condition as read aloud: `PS1 on and XT1 above 500 mm`. */
export function conditionWords(condition: Condition, figure: (si: number, dimension: string) => string): string {
  switch (condition.op) {
    case 'and':
    case 'or':
      return condition.items
        .map((one) => (one.op === 'and' || one.op === 'or' ? `(${conditionWords(one, figure)})` : conditionWords(one, figure)))
        .join(` ${condition.op} `);
    case 'state':
      return `${condition.of} ${condition.is}`;
    case 'compare':
      return `${condition.of} ${condition.is} ${figure(condition.value.si, condition.value.dimension)}`;
    case 'running':
      return condition.of;
    case 'unknown':
      return 'something unresolved';
  }
}
