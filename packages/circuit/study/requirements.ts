/** Every `require` of the circuit with its verdict, worst value, margin and words. */
import type { Dimension } from '@oilway/quantity';
import type { Condition, Measure, Requirement } from '../model/circuit.ts';
import { conditionWords, holds, type Situation } from './conditions.ts';
import { atoms, closed } from './contacts.ts';
import type { Asked, Bounded } from './measures/asked.ts';
import { flow, loss, power, pressure } from './measures/hydraulic.ts';
import { loading, temperature, time, volume } from './measures/machine.ts';
import { drift, force, position, speed } from './measures/motion.ts';
import type { Observed } from './measures/observed.ts';
import { searchLogic } from './never.ts';
import { type Facts, type Place, placesOf } from './places.ts';
import { StateRunner } from './state-runs.ts';
import { judgeStill } from './still.ts';
import type { RequirementResult } from './study.ts';
import type { Trace } from './trace.ts';
import { judge, type Verdict } from './verdict.ts';
import { unknownBehind } from './unknown.ts';
import { unitOnce } from './waiting.ts';
import { list, say, sayAgainst, sayPlace } from './words.ts';

export function requirementResults(facts: Facts): readonly RequirementResult[] {
  const runner = new StateRunner(facts.plant);
  return facts.plant.circuit.requirements.map((one) => {
    if (facts.plant.cancelled()) return undecided(one, 'the study was stopped');
    if (one.form === 'never') return never(facts, one);
    const unknown = unknownBehind(facts, one);
    if (unknown !== undefined) return undecided(one, unknown);
    if (one.form === 'still') return judgeStill(facts, one, runner);
    return bounded(facts, one, runner);
  });
}

function undecided(requirement: Requirement, why: string): RequirementResult {
  return { id: requirement.id, verdict: 'undecidable', at: '', words: `cannot be decided: ${why}`, origin: requirement.origin };
}

const PLACED: Readonly<Partial<Record<Measure, (asked: Asked, place: Place) => Observed>>> = {
  speed,
  force,
  torque: force,
  pressure,
  power,
  flow,
  loss,
  position,
  volume,
  drift,
};
const WHOLE: Readonly<Partial<Record<Measure, (asked: Asked) => readonly Observed[]>>> = { loading, temperature, time };

function bounded(facts: Facts, requirement: Bounded, runner: StateRunner): RequirementResult {
  const { plant } = facts;
  const named = requirement.where.places !== undefined;
  const asked: Asked = { plant, facts, requirement, runner, named };
  const whole = WHOLE[requirement.measure];
  const placed = PLACED[requirement.measure];
  let observed: readonly Observed[];
  if (whole) observed = whole(asked);
  else {
    const { places, missing } = placesOf(facts, requirement.where);
    if (missing.length > 0) return undecided(requirement, `${list(missing)} is not studied`);
    if (places.length === 0) return undecided(requirement, 'the file has no cycle: name a state');
    observed = placed ? places.map((one) => placed(asked, one)) : [];
  }
  const doubtful = chattersIn(facts, requirement);
  const verdict = judge(
    requirement.bound,
    observed,
    dimensionOf(facts, requirement),
    named,
    requirement.measure === 'drift' || requirement.measure === 'position' ? undefined : requirement.lasts,
  );
  const judged: Verdict =
    doubtful !== undefined && verdict.verdict === 'met' ? { ...verdict, verdict: 'undecidable', why: doubtful } : verdict;
  return told(
    facts,
    requirement,
    judged,
    observed.flatMap((one) => one.notes ?? []),
  );
}

/** A run in which a contact chatters decides nothing about what rests on it. */
function chattersIn(facts: Facts, requirement: Bounded): string | undefined {
  const ran = facts.rans.find(
    (one) =>
      one.chattering.length > 0 &&
      (!requirement.where.places ||
        requirement.where.places.some((place) => place === one.cycle.id || place.startsWith(`${one.cycle.id}.`))),
  );
  return ran ? `${ran.chattering[0]} chatters in ${ran.cycle.id}` : undefined;
}

function dimensionOf(facts: Facts, requirement: Bounded): Dimension {
  const { bound } = requirement;
  const q = bound.is === 'between' ? bound.low : bound.value;
  if (q.dimension !== 'ratio' || requirement.measure === 'loading') return q.dimension;
  return facts.plant.at.component(requirement.of) ? q.dimension : 'ratio';
}

function told(facts: Facts, requirement: Bounded, verdict: Verdict, notes: readonly string[]): RequirementResult {
  const dimension = dimensionOf(facts, requirement);
  const subject = subjectWords(requirement);
  const at = verdict.worst?.at ?? '';
  const figures = verdict.amount === undefined ? '' : figureWords(facts, requirement, verdict, verdict.amount, dimension);
  let words: string;
  if (verdict.verdict === 'undecidable') words = `cannot be decided: ${verdict.why ?? 'no figure'}`;
  else {
    words = `${subject} ${figures}${at ? ` in ${at}` : ''}`;
    if (verdict.verdict === 'met' && verdict.margin !== undefined && Math.abs(verdict.margin) <= 1e-3 && requirement.bound.is !== 'reaches')
      words += ', just met';
    if (verdict.why) words += ` (${verdict.why})`;
  }
  if (notes.length > 0) words += ` (${list([...new Set(notes)].slice(0, 2))})`;
  return {
    id: requirement.id,
    verdict: verdict.verdict,
    ...(verdict.amount === undefined ? {} : { worst: { value: verdict.amount, dimension } }),
    ...(verdict.margin === undefined ? {} : { margin: verdict.margin }),
    at,
    words,
    origin: requirement.origin,
  };
}

export function subjectWords(requirement: Bounded): string {
  const of = requirement.port === undefined ? requirement.of : `${requirement.of}.${requirement.port}`;
  return `${of} ${requirement.measure}`;
}

/** "183 of at most 180 bar". */
function figureWords(facts: Facts, requirement: Bounded, verdict: Verdict, amount: number, dimension: Dimension): string {
  const against = verdict.against ?? amount;
  const { circuit } = facts.plant;
  const { bound } = requirement;
  const { value, bound: limit } = sayAgainst(circuit, amount, against, dimension);
  if (bound.is === 'reaches') {
    const within = bound.within === undefined ? '' : ` within ${say(circuit, bound.within, 'time')}`;
    if (verdict.verdict === 'missed')
      return `${verdict.rising === false ? 'comes down only to' : 'reaches only'} ${unitOnce(value, limit)}${within}`;
    return verdict.rising === false ? `comes down to ${limit}${within}` : `reaches ${limit}${within} (highest ${value})`;
  }
  const least = bound.is === 'least' || (bound.is === 'between' && against === bound.low.si);
  return unitOnce(value, `${least ? 'at least' : 'at most'} ${limit}`);
}

/** Violated in any instant of any run, in any steady point, or in some stand of switches. */
function never(facts: Facts, requirement: Extract<Requirement, { readonly form: 'never' }>): RequirementResult {
  const { plant } = facts;
  const condition = requirement.condition;
  const words = conditionWords(condition, (si, dimension) =>
    dimension === 'length' ? sayPlace(plant.circuit, si, false) : say(plant.circuit, si, dimension as Dimension),
  );
  if (atoms(condition).some((one) => one.op === 'unknown')) return undecided(requirement, 'the condition is not resolved');
  let unknown: string | undefined;
  for (const { counted, chattering } of facts.rans) {
    for (const trace of counted) {
      const seen = inTrace(facts, condition, trace);
      if (seen.at !== undefined) {
        return { id: requirement.id, verdict: 'missed', at: seen.at, words: `${words} is true in ${seen.at}`, origin: requirement.origin };
      }
      unknown ??= seen.unknown;
    }
    const doubtful = chattering.find((key) => atoms(condition).some((one) => 'of' in one && one.of === key));
    if (doubtful !== undefined) unknown ??= `${doubtful} chatters`;
  }
  const searched = searchLogic(plant, condition);
  if (searched.found) {
    return {
      id: requirement.id,
      verdict: 'missed',
      at: searched.found.at,
      words: `${words} can be true ${searched.found.at}`,
      origin: requirement.origin,
    };
  }
  if (unknown !== undefined) return undecided(requirement, unknown);
  if (searched.searched === 'runs only' && facts.rans.length === 0) return undecided(requirement, 'no cycle is run');
  const stopped = facts.rans.find((one) => !one.result.completed && one.cycle.mode === 'cycle');
  if (searched.searched === 'runs only' && stopped)
    return undecided(requirement, `${stopped.cycle.id} does not end: ${stopped.result.faults[0]?.words ?? 'it stops'}`);
  const how =
    searched.searched === 'all'
      ? 'in any step and any stand of the switches'
      : `in the runs (${searched.why ?? 'no more can be searched'})`;
  return { id: requirement.id, verdict: 'met', at: '', words: `${words} is never true ${how}`, origin: requirement.origin };
}

function inTrace(facts: Facts, condition: Condition, trace: Trace): { readonly at?: string; readonly unknown?: string } {
  const { plant } = facts;
  let unknown: string | undefined;
  const on = (key: string, at: number) => (trace.live.get(key) ?? []).some((one) => one.from <= at + 1e-9 && at < one.to - 1e-9);
  for (const sample of trace.samples) {
    const situation: Situation = {
      contact: (key) => {
        const contact = plant.contact(key);
        if (!contact) return undefined;
        if (plant.at.component(key)?.kind === 'switch') return contact.test.is === 'unknown' ? undefined : on(key, sample.time);
        return closed(plant, contact, sample.solution, undefined);
      },
      live: (coil) => on(coil, sample.time),
      running: (id) => sample.lines.some((one) => one === id || one.startsWith(`${id}.`)),
    };
    const true_ = holds(plant.at, condition, situation);
    if (true_ === true && sample.time < trace.end - 1e-9)
      return { at: `${sample.lines[0] ?? 'the run'}, ${say(plant.circuit, sample.time, 'time')}` };
    if (true_ === undefined) unknown ??= 'a switch of the condition is not computed';
  }
  return unknown === undefined ? {} : { unknown };
}
