/** What a live coil does: where its valve then stands, or which setting it commands. */
import type { Stand } from '../assembly/machine.ts';
import { positionsOf as valvePositions, type Side, sideOfCoil } from '../kinds/directional-positions.ts';
import type { Command, Component } from '../model/circuit.ts';
import type { Lookup } from './lookup.ts';
import { flag, flowAt, si } from './read.ts';

/** A coil as live: 1 = fully; a proportional command as a signed ratio; a setting commanded directly in SI. */
export interface Live {
  readonly coil: string;
  /** Ratio, -1..1; 1 where nothing was said. */
  readonly ratio?: number;
  /** Directly in the dimension of the setting, SI. */
  readonly setting?: number;
}

export type Position = Side;

/** The value a command ends with (its ramp over). */
export function finalLive(command: Command): Live {
  return liveOf(command.coil, command.to ?? command.at);
}
/** The value a command jumps to where `from` is written; undefined: it ramps from where it stands. */
export function firstLive(command: Command): Live | undefined {
  return command.from ? liveOf(command.coil, command.from) : undefined;
}
function liveOf(coil: string, q: Command['at']): Live {
  if (q === undefined) return { coil, ratio: 1 };
  return q.dimension === 'ratio' ? { coil, ratio: q.si } : { coil, setting: q.si };
}

export function sameLive(one: Live, other: Live): boolean {
  const near = (a: number | undefined, b: number | undefined) =>
    a === b || (a !== undefined && b !== undefined && Math.abs(a - b) < 1e-9 * Math.max(1, Math.abs(a)));
  return one.coil === other.coil && near(one.ratio, other.ratio) && near(one.setting, other.setting);
}

/** Positions a directional valve has. */
export function positionsOf(valve: Component): readonly Position[] {
  return valvePositions(valve).sides;
}
export function isDetent(valve: Component): boolean {
  return valve.kind === 'directional' && valvePositions(valve).detent;
}
/** The sprung position; undefined for a detent. */
export function sprung(valve: Component): Position | undefined {
  const { rest, detent } = valvePositions(valve);
  return detent ? undefined : rest;
}

/** Words for a stand: 2/2 valves are open or closed. */
export function standWords(valve: Component, stand: Stand): string {
  if (valve.shape?.ports === 2 && stand.position !== 'centre') {
    const position = valveJoins(valve, stand.position) ? 'open' : 'closed';
    return stand.opening === undefined ? position : `${position} at ${percent(stand.opening)}`;
  }
  return stand.opening === undefined ? stand.position : `${stand.position} at ${percent(stand.opening)}`;
}
function valveJoins(valve: Component, position: Position): boolean {
  return valvePositions(valve).paths[position].length > 0;
}
function percent(ratio: number): string {
  return `${Math.round(ratio * 1000) / 10} %`;
}

/** The position the coil moves its valve to, and how far (proportional). Undefined: the coil commands a setting. */
export function standBy(at: Lookup, live: Live): { readonly valve: string; readonly stand: Stand } | undefined {
  const coil = at.coil(live.coil);
  const valve = coil ? at.component(coil.component) : undefined;
  if (!coil || valve?.kind !== 'directional') return undefined;
  const ratio = live.ratio ?? 1;
  const rest = sprung(valve);
  // A single signed command: + is a, - is b.
  const position: Position = coil.side === undefined && ratio < 0 ? 'b' : sideOfCoil(valve, coil.side);
  if (!flag(valve, 'proportional')) return { valve: valve.id, stand: { position } };
  if (Math.abs(ratio) < 1e-12) return { valve: valve.id, stand: { position: rest ?? 'centre' } };
  return { valve: valve.id, stand: { position, opening: Math.min(1, Math.abs(ratio)) } };
}

/** The setting a coil commands, SI of that setting; undefined where it moves a valve. */
export function settingBy(at: Lookup, live: Live): number | undefined {
  const coil = at.coil(live.coil);
  const component = coil ? at.component(coil.component) : undefined;
  if (!component || component.kind === 'directional') return undefined;
  if (live.setting !== undefined) return live.setting;
  const set = si(component, 'set') ?? (component.kind === 'throttle' ? (flowAt(component, 'passes') ? 1 : undefined) : undefined);
  return set === undefined ? undefined : set * Math.abs(live.ratio ?? 1);
}

/** A coil at its greatest command. */
export function greatest(coil: string): Live {
  return { coil, ratio: 1 };
}
