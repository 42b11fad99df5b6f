/** Events of the valves themselves in a run: unloading lifted, burst shut, piloted valves that gain or lose their pilot pressure. */
import type { Network, Transient, TransientWatch } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import type { Memory, PilotedValve } from './assembly.ts';
import type { Setting, Stand } from './machine.ts';
import { STAYS } from './settle.ts';
import { fromMPa, toLitresPerSecond, toMPa } from './units.ts';

/** Below this, MPa, a threshold counts as passed at once. */
const PAST = 1e-9;

export type Internal =
  | { readonly what: 'bit'; readonly of: string; readonly to: boolean; readonly words: string; readonly watch: TransientWatch }
  | { readonly what: 'valve'; readonly of: string; readonly stand: Stand; readonly words: string; readonly watch: TransientWatch };

export class InternalEvents {
  readonly #assembled: Assembled;
  readonly #network: Network;

  constructor(assembled: Assembled, network: Network) {
    this.#assembled = assembled;
    this.#network = network;
  }

  /** Pilot pressure a valve sees, Pa. */
  pilot(v: PilotedValve, pressures: Float64Array): number {
    return fromMPa((pressures[v.pilot] ?? 0) - (pressures[v.drain] ?? 0));
  }

  /** All events that can come next, as watches. */
  armed(setting: Setting, wanted: Readonly<Record<string, Stand>>, frozen: (id: string) => boolean): readonly Internal[] {
    const events: Internal[] = [];
    for (const m of this.#assembled.memories) {
      if (frozen(m.component)) continue;
      const event = this.#ofMemory(m, setting.bits[m.component] === true);
      if (event !== undefined) events.push(event);
    }
    for (const v of this.#assembled.piloted) {
      if (!frozen(v.component)) events.push(...this.#ofValve(v, setting, wanted));
    }
    return events;
  }

  /** Those already past their threshold. */
  due(setting: Setting, wanted: Readonly<Record<string, Stand>>, engine: Transient, idle: (id: string) => boolean): readonly Internal[] {
    const due: Internal[] = [];
    const pressures = engine.pressures;
    const flows = this.#assembled.memories.some((m) => m.kind === 'shut') ? engine.now(false) : undefined;
    const value = (watch: TransientWatch): number =>
      watch.terms.reduce((sum, t) => {
        if (t.of === 'pressure') return sum + t.weight * (pressures[t.index] ?? 0);
        return t.of === 'flow' && flows !== undefined ? sum + t.weight * (flows.flows[t.index] ?? 0) : sum;
      }, 0);
    for (const event of this.armed(setting, wanted, idle)) {
      const past = (event.watch.edge === 'rising' ? 1 : -1) * (value(event.watch) - event.watch.threshold);
      if (past > PAST) due.push(event);
    }
    return due;
  }

  #ofMemory(m: Memory, on: boolean): Internal | undefined {
    if (m.kind === 'held') return undefined;
    if (m.kind === 'lifted') {
      const terms = [
        { of: 'pressure' as const, index: m.pilot, weight: 1 },
        { of: 'pressure' as const, index: m.drain, weight: -1 },
      ];
      return on
        ? {
            what: 'bit',
            of: m.component,
            to: false,
            words: `${m.component} has closed`,
            watch: { terms, threshold: toMPa(m.closes), edge: 'falling' },
          }
        : {
            what: 'bit',
            of: m.component,
            to: true,
            words: `${m.component} has lifted`,
            watch: { terms, threshold: toMPa(m.set + m.band), edge: 'rising' },
          };
    }
    if (on) {
      const terms = [
        { of: 'pressure' as const, index: m.v, weight: 1 },
        { of: 'pressure' as const, index: m.c, weight: -1 },
      ];
      return {
        what: 'bit',
        of: m.component,
        to: false,
        words: `${m.component} opens again`,
        watch: { terms, threshold: 0, edge: 'rising' },
      };
    }
    const spec = this.#assembled.specs[m.element];
    const terminal = this.#network.laws[m.element]?.nodes.indexOf(m.c) ?? 0;
    if (spec === undefined) return undefined;
    const index = (this.#network.flowStart[m.element] ?? 0) + Math.max(0, terminal);
    return {
      what: 'bit',
      of: m.component,
      to: true,
      words: `${m.component} has shut`,
      watch: { terms: [{ of: 'flow', index, weight: 1 }], threshold: toLitresPerSecond(m.closes), edge: 'rising' },
    };
  }

  #ofValve(v: PilotedValve, setting: Setting, wanted: Readonly<Record<string, Stand>>): readonly Internal[] {
    const rest = this.#assembled.valves.find((x) => x.component === v.component)?.rest ?? 'centre';
    const stands = setting.valves[v.component]?.position ?? rest;
    const asked = wanted[v.component] ?? { position: rest };
    const terms = [
      { of: 'pressure' as const, index: v.pilot, weight: 1 },
      { of: 'pressure' as const, index: v.drain, weight: -1 },
    ];
    if (asked.position !== rest && stands !== asked.position) {
      return [
        {
          what: 'valve',
          of: v.component,
          stand: asked,
          words: `${v.component} shifts to ${asked.position}`,
          watch: { terms, threshold: toMPa(v.needs), edge: 'rising' },
        },
      ];
    }
    if (stands !== rest) {
      return [
        {
          what: 'valve',
          of: v.component,
          stand: { position: rest },
          words: `${v.component} goes back for lack of pilot pressure`,
          watch: { terms, threshold: toMPa(STAYS * v.needs), edge: 'falling' },
        },
      ];
    }
    return [];
  }
}
