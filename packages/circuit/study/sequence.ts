/** The step chain of a cycle: which lines run, when they end, which come next. Knows no pressure; asks the situation. */
import type { Action, Command, Cycle, Step } from '../model/circuit.ts';
import { holds, onlyOutside, outsideNeeds, type Situation } from './conditions.ts';
import { type Demand, demandOf, join } from './logic.ts';
import type { Lookup } from './lookup.ts';
import { si } from './read.ts';

/** A running step or meanwhile line. */
export interface Line {
  readonly step: Step;
  /** s, when it was entered. */
  readonly entered: number;
  ended?: number;
  /** Cycles that a `run` of this line goes through. */
  readonly inner?: Sequence;
}

/** What one round of the step chain did. */
export type Change =
  | { readonly did: 'entered'; readonly lines: readonly Line[] }
  | { readonly did: 'ended'; readonly line: Line }
  | { readonly did: 'finished' };

export class Sequence {
  readonly #at: Lookup;
  readonly #groups: readonly (readonly Step[])[];
  readonly cycle: Cycle;
  /** Times the groups are still to be run through. */
  #left: number;
  #index = -1;
  #lines: Line[] = [];
  finished = false;

  constructor(at: Lookup, cycle: Cycle, times = 1) {
    this.#at = at;
    this.cycle = cycle;
    this.#left = times;
    this.#groups = groupsOf(cycle);
    if (this.#groups.length === 0 || times < 1) this.finished = true;
  }

  /** Lines that run now, those of nested cycles included. */
  lines(): readonly Line[] {
    return this.#lines.filter((one) => one.ended === undefined).flatMap((one) => [one, ...(one.inner?.lines() ?? [])]);
  }
  /** Ids of steps and cycles that run now. */
  running(): ReadonlySet<string> {
    const ids = new Set<string>();
    if (!this.finished && this.#index >= 0) ids.add(this.cycle.id);
    for (const line of this.lines()) ids.add(line.step.id).add(line.step.cycle);
    return ids;
  }
  demand(): Demand {
    return join(this.lines().map((line) => demandOf(line.step.actions, line.step.id)));
  }

  /** One step change at most (order within an instant); undefined: nothing to change. */
  advance(time: number, situation: Situation): Change | undefined {
    if (this.finished) return undefined;
    if (this.#index < 0) return this.#enter(0, time);
    for (const line of this.#lines) {
      if (line.ended !== undefined) continue;
      const inner = line.inner?.advance(time, situation);
      if (inner && inner.did !== 'finished') return inner;
      if (this.#isOver(line, time, situation)) {
        line.ended = time;
        return { did: 'ended', line };
      }
    }
    if (this.#lines.some((line) => line.ended === undefined)) return undefined;
    if (this.#index + 1 < this.#groups.length) return this.#enter(this.#index + 1, time);
    this.#left -= 1;
    if (this.#left > 0) return this.#enter(0, time);
    this.finished = true;
    return { did: 'finished' };
  }

  #enter(index: number, time: number): Change {
    this.#index = index;
    this.#lines = (this.#groups[index] ?? []).map((step) => {
      const inner = innerOf(this.#at, step.actions);
      return inner ? { step, entered: time, inner } : { step, entered: time };
    });
    return { did: 'entered', lines: this.#lines };
  }

  #isOver(line: Line, time: number, situation: Situation): boolean {
    const { step } = line;
    const lasted = step.lasts === undefined || time - line.entered >= step.lasts - 1e-9;
    if (step.until) return lasted && holds(this.#at, step.until, situation) === true;
    if (step.lasts !== undefined) return lasted;
    return time - line.entered >= settlingTime(this.#at, step.actions) - 1e-9 && (line.inner?.finished ?? true);
  }
}

/** A step with its meanwhile lines. */
export function groupsOf(cycle: Cycle): readonly (readonly Step[])[] {
  const groups: Step[][] = [];
  for (const step of cycle.steps) {
    const last = groups.at(-1);
    if (step.beside !== undefined && last) last.push(step);
    else groups.push([step]);
  }
  return groups;
}

function innerOf(at: Lookup, actions: readonly Action[]): Sequence | undefined {
  const run = actions.find((one) => one.does === 'run');
  const cycle = run ? at.cycle(run.cycle) : undefined;
  return run && cycle && !runsItself(at, cycle, new Set()) ? new Sequence(at, cycle, run.times) : undefined;
}
/** A cycle that runs itself, directly or through others, has no end: it is not entered. */
function runsItself(at: Lookup, cycle: Cycle, seen: ReadonlySet<string>): boolean {
  if (seen.has(cycle.id)) return true;
  const within = new Set(seen).add(cycle.id);
  return cycle.steps.some((step) =>
    step.actions.some((one) => {
      const next = one.does === 'run' ? at.cycle(one.cycle) : undefined;
      return next !== undefined && runsItself(at, next, within);
    }),
  );
}

/** Time after entry until ramps (and the shift of levers) are over, s. */
export function settlingTime(at: Lookup, actions: readonly Action[]): number {
  let longest = 0;
  for (const action of actions) {
    if (action.does === 'energise') for (const command of action.commands) longest = Math.max(longest, rampTime(command));
    if (action.does === 'shift') longest = Math.max(longest, takes(at, action.valve));
  }
  return longest;
}
export function rampTime(command: Command): number {
  return command.over ?? 0;
}
/** Shifting time of a valve, s; 50 ms unless said. */
export function takes(at: Lookup, valve: string): number {
  const component = at.component(valve);
  return (component ? si(component, 'takes') : undefined) ?? 0.05;
}

/** Next time at which the chain changes by itself (for, ramps, shifts, `at most`), s; Infinity: none. */
export function nextTimer(at: Lookup, lines: readonly Line[], time: number): number {
  let next = Number.POSITIVE_INFINITY;
  const take = (t: number) => {
    if (t > time + 1e-9 && t < next) next = t;
  };
  for (const { step, entered } of lines) {
    if (step.lasts !== undefined) take(entered + step.lasts);
    if (step.atMost !== undefined) take(entered + step.atMost);
    take(entered + settlingTime(at, step.actions));
  }
  return next;
}

/** A line that has passed its time limit. */
export function late(lines: readonly Line[], time: number): Line | undefined {
  return lines.find(({ step, entered }) => step.atMost !== undefined && time - entered >= step.atMost - 1e-9);
}

/**
 * Outside switches as the running lines and the interlocks of their coils need them.
 * `pressed`: what `until` waits for happens at once. `held`: a push button, whose release alone would end it, stays pressed. `free`: interlocks only.
 */
export function outsideFor(
  at: Lookup,
  lines: readonly Line[],
  demand: Demand,
  untils: 'pressed' | 'held' | 'free',
): ReadonlyMap<string, boolean> {
  const needs = new Map<string, boolean>();
  if (untils === 'held') {
    for (const { step } of lines) {
      if (step.until && onlyOutside(at, step.until)) for (const [id, on] of outsideNeeds(at, step.until)) needs.set(id, !on);
    }
  }
  for (const lock of at.circuit.interlocks) {
    if (!lock.coils.some((coil) => demand.coils.some((one) => one.live.coil === coil))) continue;
    for (const [id, on] of outsideNeeds(at, lock.needs)) needs.set(id, on);
  }
  if (untils === 'pressed') {
    for (const { step } of lines) if (step.until) for (const [id, on] of outsideNeeds(at, step.until)) needs.set(id, on);
  }
  return needs;
}
