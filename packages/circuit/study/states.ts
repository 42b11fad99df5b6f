/** Machine states: OFF, REST, IDLE, STOP from every step and from rest, every coil alone, every manual function. */
import type { Setting, Solution, Stand } from '../assembly/machine.ts';
import type { Action, Condition } from '../model/circuit.ts';
import { type Charge, empty } from './charge.ts';
import { greatest, isDetent } from './coils.ts';
import { atoms, closed } from './contacts.ts';
import type { Situation } from './conditions.ts';
import type { Ran } from './cycle.ts';
import { type Control, decide, demandOf, type Demand, detentsAfter, NOTHING } from './logic.ts';
import { movingIn } from './motion.ts';
import { pointOf } from './point.ts';
import { flag } from './read.ts';
import type { Plant } from './scene.ts';
import { outsideFor } from './sequence.ts';
import { settingOf } from './setting.ts';
import type { StateName, StateResult, Variant } from './study.ts';
import { allDetents, type Choice, type Factors, variantsOf } from './variants.ts';

/** What the cycles leave behind for the states: oil when charged, ends of steps, detents and oil after each step. */
export interface Heritage {
  readonly charged: Charge;
  /** Body -> positions in which steps end. */
  readonly ends: Readonly<Record<string, readonly number[]>>;
  /** Step -> detents as it left them. */
  readonly detents: ReadonlyMap<string, Readonly<Record<string, Stand['position']>>>;
  readonly left?: Charge;
}

/** A state with the settings of its variants, so that it can be run on in time. */
export interface StudiedState {
  readonly result: StateResult;
  readonly settings: readonly Setting[];
  readonly solutions: readonly Solution[];
}

const DEAD: Situation = { contact: () => undefined, live: () => false, running: () => false };

export function heritageOf(plant: Plant, rans: readonly Ran[], charged: Charge): Heritage {
  const ends: Record<string, number[]> = {};
  const detents = new Map<string, Readonly<Record<string, Stand['position']>>>();
  let left: Charge | undefined;
  const valves = plant.at
    .ofKind('directional')
    .filter(isDetent)
    .map((one) => one.id);
  for (const { counted } of rans) {
    for (const trace of counted) {
      for (const span of trace.spans) {
        const last = trace.lastBy(span.to);
        if (!last) continue;
        for (const [id, x] of Object.entries(last.solution.positions)) {
          const known = ends[id] ?? [];
          if (!known.some((one) => Math.abs(one - x) < 1e-4)) ends[id] = [...known, x];
        }
        const stands = trace.snapshotAt(span.to, true)?.setting.valves ?? {};
        detents.set(span.id, Object.fromEntries(valves.flatMap((id) => (stands[id] ? [[id, stands[id].position]] : []))));
      }
      const last = trace.samples.at(-1)?.solution;
      if (last) left = { oil: last.oil, gasPressures: last.gasPressures ?? {} };
    }
  }
  return { charged, ends, detents, ...(left === undefined ? {} : { left }) };
}

export function studyStates(plant: Plant, heritage: Heritage): readonly StudiedState[] {
  const states: StudiedState[] = [];
  const both = accumulatorsBoth(plant, heritage);
  const drives = plant.at.drives.map((one) => one.id);
  const detents = allDetents(plant);
  const rest = decide(plant.at, NOTHING, DEAD, { whileLines: false });
  const add = (state: StudiedState | undefined) => {
    if (state && !plant.cancelled()) states.push(state);
  };
  add(studied(plant, heritage, { id: 'REST', state: 'REST' }, () => rest, { detents, accumulators: both }));
  add(studied(plant, heritage, { id: 'OFF', state: 'OFF' }, () => rest, { detents, accumulators: both, standing: [drives] }));
  const idle = idleLines(plant);
  if (idle)
    add(studied(plant, heritage, { id: 'IDLE', state: 'IDLE' }, 'idle', { detents, accumulators: leftOil(plant, heritage) ?? both }));
  for (const from of ['', ...plant.at.steps.map((one) => one.id)]) add(stopFrom(plant, heritage, from, detents));
  for (const coil of plant.circuit.coils) add(coilState(plant, heritage, coil.id, detents));
  for (const cycle of plant.circuit.cycles.filter((one) => one.mode === 'manual')) {
    for (const step of cycle.steps.filter((one) => one.beside === undefined)) {
      const actions = [step, ...cycle.steps.filter((one) => one.beside === step.id)].flatMap((one) => one.actions);
      add(
        studied(
          plant,
          heritage,
          { id: `manual ${step.id}`, state: 'MANUAL', of: step.id },
          manualControl(plant, step.id, demandOf(actions, step.id)),
          { detents, accumulators: charged(plant, heritage) },
        ),
      );
    }
  }
  return states;
}

function charged(plant: Plant, heritage: Heritage): NonNullable<Factors['accumulators']> {
  return plant.at.accumulators.length === 0 ? [{ oil: {}, as: 'none' }] : [{ ...heritage.charged, as: 'charged' }];
}
function accumulatorsBoth(plant: Plant, heritage: Heritage): NonNullable<Factors['accumulators']> {
  return plant.at.accumulators.length === 0 ? [{ oil: {}, as: 'none' }] : [...charged(plant, heritage), { ...empty(plant), as: 'empty' }];
}
function leftOil(plant: Plant, heritage: Heritage): NonNullable<Factors['accumulators']> | undefined {
  return plant.at.accumulators.length > 0 && heritage.left ? [{ ...heritage.left, as: 'charged' }] : undefined;
}

/** Whether a while line can be true without a cycle. */
function idleLines(plant: Plant): boolean {
  return plant.circuit.whiles.some((one) => can(plant, one.when));
}
/** Whether some stand of switches makes a condition true while no step or cycle runs. */
function can(plant: Plant, condition: Condition): boolean {
  switch (condition.op) {
    case 'and':
      return condition.items.every((one) => can(plant, one));
    case 'or':
      return condition.items.some((one) => can(plant, one));
    case 'running':
    case 'unknown':
      return false;
    default:
      return true;
  }
}

function stopFrom(
  plant: Plant,
  heritage: Heritage,
  step: string,
  all: readonly Record<string, Stand['position']>[],
): StudiedState | undefined {
  const { emergency } = plant.circuit;
  const left = step === '' ? undefined : heritage.detents.get(step);
  const detented = plant.at.ofKind('directional').some(isDetent);
  const { control, detents } = stopControl(plant, step === '' ? {} : (left ?? {}));
  const drives = plant.at.drives.map((one) => one.id);
  const stopped = emergency?.actions.flatMap((one) => (one.does === 'stop' ? one.drives : [])) ?? [];
  const standing = emergency ? [stopped] : drives.length > 0 ? [drives, []] : [[]];
  const id = step === '' ? 'STOP' : `STOP from ${step}`;
  return studied(plant, heritage, { id, state: 'STOP', ...(step === '' ? {} : { of: step }) }, () => control, {
    detents: detented ? (left ? [detents] : all) : [{}],
    accumulators: charged(plant, heritage),
    standing,
  });
}

/** What an emergency stop keeps alive, its interlocks heeded. */
export function stopControl(
  plant: Plant,
  detents: Readonly<Record<string, Stand['position']>>,
): { readonly control: Control; readonly detents: Record<string, Stand['position']> } {
  const kept = (plant.circuit.emergency?.actions ?? []).filter((one: Action) => one.does !== 'stop');
  const demand = demandOf(kept, 'emergency');
  const pressed = outsideFor(plant.at, [], demand, 'free');
  const situation: Situation = { contact: (key) => pressed.get(key), live: () => false, running: () => false };
  const control = decide(plant.at, demand, situation, { whileLines: false });
  return { control, detents: detentsAfter(plant.at, control, detents) };
}

function coilState(plant: Plant, heritage: Heritage, coil: string, detents: Factors['detents']): StudiedState | undefined {
  const origin = plant.at.coil(coil)!.origin;
  const signed = plant.at.coil(coil)?.side === undefined && proportional(plant, coil);
  const controls = (signed ? [1, -1] : [1]).map((ratio) => {
    const asked = { live: { ...greatest(coil), ratio }, command: { coil, origin }, by: 'coil' };
    return decide(plant.at, { coils: [asked], levers: [], stops: [] }, DEAD, { whileLines: false, interlocks: false });
  });
  const parts = controls.map((control) =>
    studied(plant, heritage, { id: `coil ${coil}`, state: 'COIL', of: coil }, () => control, {
      detents: detents ?? [{}],
      accumulators: charged(plant, heritage),
    }),
  );
  const [first, second] = parts;
  if (!first || !second) return first;
  return {
    result: {
      ...first.result,
      variants: [
        ...first.result.variants.map((one) => marked(one, '+100 %')),
        ...second.result.variants.map((one) => marked(one, '-100 %')),
      ],
      studied: { of: first.result.studied.of + second.result.studied.of, all: first.result.studied.all + second.result.studied.all },
    },
    settings: [...first.settings, ...second.settings],
    solutions: [...first.solutions, ...second.solutions],
  };
}
function marked(variant: Variant, command: string): Variant {
  return { ...variant, label: variant.label ? `${command}, ${variant.label}` : command };
}
function proportional(plant: Plant, coil: string): boolean {
  const component = plant.at.component(plant.at.coil(coil)?.component ?? '');
  return component?.kind === 'directional' && flag(component, 'proportional');
}

/** A push button: its coils and the while lines, interlocks hold, outside switches as it needs them, pressure switches as solved. */
function manualControl(plant: Plant, step: string, demand: Demand): (contacts: Contacts) => Control {
  const pressed = outsideFor(plant.at, [], demand, 'free');
  const cycle = plant.at.step(step)?.cycle;
  return (contacts) => {
    const situation: Situation = {
      contact: (key) => pressed.get(key) ?? contacts(key),
      live: () => false,
      running: (id) => id === step || id === cycle,
    };
    return decide(plant.at, demand, situation);
  };
}

type Contacts = (key: string) => boolean | undefined;
type ControlOf = (contacts: Contacts) => Control;

function studied(
  plant: Plant,
  heritage: Heritage,
  named: { readonly id: string; readonly state: StateName | 'COIL' | 'MANUAL'; readonly of?: string },
  control: ControlOf | 'idle',
  factors: Factors,
): StudiedState | undefined {
  const selection = variantsOf(plant, factors, heritage.ends);
  const variants: Variant[] = [];
  const settings: Setting[] = [];
  const solutions: Solution[] = [];
  const known = new Set<string>();
  let near: Solution | undefined;
  let all = selection.all;
  for (const choice of selection.chosen) {
    if (plant.cancelled()) break;
    const controls =
      control === 'idle'
        ? outsideWays(plant).map(
            (pressed): ControlOf =>
              (contacts) =>
                idleControl(plant, (key) => pressed.get(key) ?? contacts(key)),
          )
        : [control];
    for (const one of controls) {
      const { setting, solution, note } = settled(plant, choice, one, near);
      if (solution.solved) near = solution;
      // A bit taken as lifted that falls back by itself is the variant without it.
      if (choice.lifted.length > 0 && !choice.lifted.every((id) => solution.bits[id] === true)) {
        all -= 1;
        continue;
      }
      const key = JSON.stringify([
        choice.detents,
        choice.accumulators,
        choice.standing,
        choice.positions,
        choice.loads,
        setting.valves,
        solution.bits,
      ]);
      if (known.has(key)) {
        all -= 1;
        continue;
      }
      known.add(key);
      const point = pointOf(plant, setting, solution, { label: choice.label || named.id });
      variants.push({
        label: choice.label,
        detents: choice.detents,
        accumulators: choice.accumulators,
        drivesOn: plant.at.drives.map((drive) => drive.id).filter((id) => setting.drives[id] === true),
        point: note ? { ...point, remarks: [...point.remarks, note] } : point,
        moving: movingIn(plant, solution, setting.loads),
      });
      settings.push(setting);
      solutions.push(solution);
    }
  }
  return { result: { ...named, variants, studied: { of: variants.length, all: Math.max(all, variants.length) } }, settings, solutions };
}

/** Coils of while lines that need no cycle. */
function idleControl(plant: Plant, contacts: Contacts): Control {
  return decide(plant.at, NOTHING, { contact: contacts, live: () => false, running: () => false });
}

/** Outside switches that while lines look at, both ways (at most 6 of them). */
function outsideWays(plant: Plant): readonly ReadonlyMap<string, boolean>[] {
  const names = new Set<string>();
  for (const atom of plant.circuit.whiles.flatMap((one) => atoms(one.when))) {
    if (atom.op !== 'state') continue;
    const component = plant.at.component(atom.of);
    if (component?.kind === 'switch' && flag(component, 'outside')) names.add(component.id);
  }
  let ways: Map<string, boolean>[] = [new Map()];
  for (const name of [...names].slice(0, 6)) ways = ways.flatMap((one) => [new Map(one).set(name, false), new Map(one).set(name, true)]);
  return ways;
}

/** Solves with switches as solved: coils and contacts settle together, or hunt. */
function settled(
  plant: Plant,
  choice: Choice,
  control: ControlOf,
  start: Solution | undefined,
): { readonly setting: Setting; readonly solution: Solution; readonly note?: { of: string; words: string } } {
  const states = new Map<string, boolean | undefined>();
  let near = start;
  for (let round = 0; ; round += 1) {
    const decided = control((key) => states.get(key));
    const base = settingOf(plant, {
      control: decided,
      detents: choice.detents,
      positions: choice.positions,
      oil: choice.oil,
      ...(choice.gasPressures === undefined ? {} : { gasPressures: choice.gasPressures }),
      bits: Object.fromEntries(choice.lifted.map((id) => [id, true])),
      loads: choice.loads,
      standing: choice.standing,
    });
    const setting: Setting = { ...base, free: choice.free, leakage: false, sealFriction: 'not with load' };
    const solution = known(plant, setting, near);
    near = solution.solved ? solution : near;
    let turned: string | undefined;
    for (const contact of plant.contacts) {
      const before = states.get(contact.key);
      const now = closed(plant, contact, solution, before);
      if (now !== before) {
        if (before !== undefined) turned = contact.key;
        states.set(contact.key, now);
      }
    }
    const next = control((key) => states.get(key));
    if (sameControl(decided, next)) return { setting: { ...setting, bits: solution.bits }, solution };
    if (round >= 10) {
      const of = turned ?? 'control';
      return {
        setting: { ...setting, bits: solution.bits },
        solution,
        note: { of, words: `${of} hunts: the coils it decides turn it back` },
      };
    }
  }
}

const memory = new WeakMap<Plant, Map<string, Solution>>();

/** Equal settings are solved once: most states differ in name only. */
function known(plant: Plant, setting: Setting, near: Solution | undefined): Solution {
  const kept = memory.get(plant) ?? new Map<string, Solution>();
  memory.set(plant, kept);
  const key = JSON.stringify(setting);
  const found = kept.get(key);
  if (found) return found;
  const solution = plant.machine.settle(setting, near);
  kept.set(key, solution);
  return solution;
}

function sameControl(one: Control, other: Control): boolean {
  return one.live.size === other.live.size && [...one.live.keys()].every((coil) => other.live.has(coil));
}
