/** Which coils are live: asked for by steps and `while` lines, held back by interlocks, and what two voices on one valve lead to. */
import type { Stand } from '../assembly/machine.ts';
import type { Action, Command, Interlock, While } from '../model/circuit.ts';
import type { Origin } from '../model/origin.ts';
import { finalLive, isDetent, type Live, sameLive, settingBy, sprung, standBy } from './coils.ts';
import { holds, type Situation } from './conditions.ts';
import type { Lookup } from './lookup.ts';
import { flag } from './read.ts';
import { list } from './words.ts';

/** A coil asked for, by whom. */
export interface Asked {
  readonly live: Live;
  readonly command: Command;
  /** Step id, or `while` for a standing line. */
  readonly by: string;
}
/** What the running steps ask for, before while lines, interlocks and emergency. */
export interface Demand {
  readonly coils: readonly Asked[];
  readonly levers: readonly { readonly valve: string; readonly to: Stand['position']; readonly by: string }[];
  /** Drives stopped while the step lasts. */
  readonly stops: readonly string[];
}
export const NOTHING: Demand = { coils: [], levers: [], stops: [] };

export interface TwoVoices {
  readonly coils: readonly string[];
  readonly words: string;
  readonly origin: Origin;
}
export interface Dropped {
  readonly coil: string;
  readonly by: Interlock;
  readonly step: string;
}
export interface Control {
  /** Coil -> as live. */
  readonly live: ReadonlyMap<string, Live>;
  readonly dropped: readonly Dropped[];
  readonly twoVoices: readonly TwoVoices[];
  readonly levers: Demand['levers'];
  readonly stops: readonly string[];
  /** Valves that stand as sprung because two voices ask for them. */
  readonly disputed: readonly string[];
}

export function demandOf(actions: readonly Action[], by: string): Demand {
  return {
    coils: actions.flatMap((one) =>
      one.does === 'energise' ? one.commands.map((command) => ({ live: finalLive(command), command, by })) : [],
    ),
    levers: actions.flatMap((one) => (one.does === 'shift' ? [{ valve: one.valve, to: one.to, by }] : [])),
    stops: actions.flatMap((one) => (one.does === 'stop' ? one.drives : [])),
  };
}
export function join(demands: readonly Demand[]): Demand {
  return {
    coils: demands.flatMap((one) => one.coils),
    levers: demands.flatMap((one) => one.levers),
    stops: demands.flatMap((one) => one.stops),
  };
}

/** How the control is decided: a stop kills while lines; a stuck coil ignores interlocks. */
export interface Mode {
  readonly whileLines?: boolean;
  readonly interlocks?: boolean;
}

/** While lines and interlocks may look at coils: settled by repetition from how the coils stood. */
export function decide(at: Lookup, demand: Demand, situation: Situation, mode: Mode = {}): Control {
  let control = once(at, demand, situation, mode);
  for (let round = 0; round < 20; round += 1) {
    const before = control.live;
    const next = once(at, demand, { ...bind(situation), live: (coil) => before.has(coil) }, mode);
    if (sameSet(before, next.live)) return next;
    control = next;
  }
  return control;
}
function bind(situation: Situation): Situation {
  return { contact: (key) => situation.contact(key), live: (coil) => situation.live(coil), running: (id) => situation.running(id) };
}
function sameSet(one: ReadonlyMap<string, Live>, other: ReadonlyMap<string, Live>): boolean {
  if (one.size !== other.size) return false;
  return [...one].every(([coil, live]) => {
    const there = other.get(coil);
    return there !== undefined && sameLive(live, there);
  });
}

export function liveWhiles(at: Lookup, situation: Situation): readonly While[] {
  return at.circuit.whiles.filter((one) => holds(at, one.when, situation) === true);
}

function once(at: Lookup, demand: Demand, situation: Situation, mode: Mode): Control {
  const standing = mode.whileLines === false ? [] : liveWhiles(at, situation).map((one) => demandOf([one.action], 'while'));
  const asked = join([demand, ...standing]);
  const twoVoices: TwoVoices[] = [];
  const inText = [...asked.coils].sort((a, b) => a.command.origin.start - b.command.origin.start);
  const chosen = new Map<string, Asked>();
  for (const one of inText) {
    const first = chosen.get(one.live.coil);
    if (!first) chosen.set(one.live.coil, one);
    else if (!sameLive(first.live, one.live)) {
      twoVoices.push({
        coils: [one.live.coil],
        words: `${one.live.coil} is asked for with two different commands (${first.by} and ${one.by})`,
        origin: one.command.origin,
      });
    }
  }
  const dropped: Dropped[] = [];
  const live = new Map<string, Live>();
  for (const [coil, one] of chosen) {
    const failing =
      mode.interlocks === false
        ? undefined
        : at.circuit.interlocks.find((lock) => lock.coils.includes(coil) && holds(at, lock.needs, situation) !== true);
    if (failing) dropped.push({ coil, by: failing, step: one.by });
    else live.set(coil, one.live);
  }
  const disputed = opposed(at, live, chosen, twoVoices);
  return { live, dropped, twoVoices, levers: asked.levers, stops: asked.stops, disputed };
}

/** Both coils of one valve live, or a % command on a valve that only switches. */
function opposed(at: Lookup, live: ReadonlyMap<string, Live>, chosen: ReadonlyMap<string, Asked>, into: TwoVoices[]): string[] {
  const byValve = new Map<string, string[]>();
  for (const [coil, one] of live) {
    const component = at.component(at.coil(coil)?.component ?? '');
    if (component?.kind !== 'directional') continue;
    byValve.set(component.id, [...(byValve.get(component.id) ?? []), coil]);
    if (one.ratio !== undefined && Math.abs(one.ratio - 1) > 1e-12 && !flag(component, 'proportional')) {
      into.push({
        coils: [coil],
        words: `${coil} is commanded in %, but ${component.id} is not proportional`,
        origin: chosen.get(coil)!.command.origin,
      });
    }
  }
  const disputed: string[] = [];
  for (const [valve, coils] of byValve) {
    if (coils.length < 2) continue;
    disputed.push(valve);
    into.push({
      coils,
      words: `${list(coils)} of ${valve} are live together: ${valve} is computed as sprung`,
      origin: chosen.get(coils[1]!)!.command.origin,
    });
  }
  return disputed;
}

/** Where every directional valve stands. `detents`: where detented valves stood; cam valves are left to the machine. */
export function standsOf(at: Lookup, control: Control, detents: Readonly<Record<string, Stand['position']>>): Record<string, Stand> {
  const stands: Record<string, Stand> = {};
  for (const valve of at.ofKind('directional')) {
    const rest = isDetent(valve) ? (detents[valve.id] ?? 'a') : sprung(valve);
    const camOnly = valve.properties.some((one) => one.value.type === 'cam') && !valve.properties.some((one) => one.value.type === 'coil');
    if (rest !== undefined && !camOnly) stands[valve.id] = { position: rest };
  }
  for (const lever of control.levers) stands[lever.valve] = { position: lever.to };
  for (const live of control.live.values()) {
    const moved = standBy(at, live);
    if (moved && !control.disputed.includes(moved.valve)) stands[moved.valve] = moved.stand;
  }
  return stands;
}

/** Settings commanded by live coils, by coil, SI. */
export function commandsOf(at: Lookup, control: Control): Record<string, number> {
  const commands: Record<string, number> = {};
  for (const [coil, live] of control.live) {
    const setting = settingBy(at, live);
    if (setting !== undefined) commands[coil] = setting;
  }
  return commands;
}

/** Detented valves after a control has stood: those it moved stay there. */
export function detentsAfter(
  at: Lookup,
  control: Control,
  before: Readonly<Record<string, Stand['position']>>,
): Record<string, Stand['position']> {
  const stands = standsOf(at, control, before);
  const after: Record<string, Stand['position']> = {};
  for (const valve of at.ofKind('directional').filter(isDetent)) {
    const stand = stands[valve.id];
    if (stand) after[valve.id] = stand.position;
  }
  return after;
}
