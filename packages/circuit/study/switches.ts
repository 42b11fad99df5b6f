/** How all contacts stand, kept between solutions: hysteresis, outside switches, chatter. */
import type { Solution, Watch } from '../assembly/machine.ts';
import { closed, type Contact, watches } from './contacts.ts';
import type { Plant } from './scene.ts';

export interface Armed {
  readonly watch: Watch;
  readonly contact: Contact;
  readonly becomes: boolean;
}

/** Turns of one contact within this time (s) that count as chatter. */
const CHATTER_TIME = 0.2;
const CHATTER_TURNS = 6;

export class Switches {
  readonly #plant: Plant;
  readonly #states = new Map<string, boolean | undefined>();
  readonly #turns = new Map<string, number[]>();
  readonly #frozen = new Map<string, number>();
  /** Contacts that chattered, for doubt about what rests on them. */
  readonly chattering = new Set<string>();

  constructor(plant: Plant, states?: ReadonlyMap<string, boolean | undefined>) {
    this.#plant = plant;
    for (const [key, state] of states ?? []) this.#states.set(key, state);
  }
  state(key: string): boolean | undefined {
    const contact = this.#plant.contact(key);
    if (contact?.test.is === 'outside') return (this.#states.get(key) ?? false) !== contact.inverted;
    return this.#states.get(key);
  }
  states(): ReadonlyMap<string, boolean | undefined> {
    return new Map(this.#states);
  }
  /** Outside switches as needed now; `needed` says whether current must flow. */
  press(needed: ReadonlyMap<string, boolean>): boolean {
    let changed = false;
    for (const [key, on] of needed) {
      const contact = this.#plant.contact(key);
      const pressed = on !== (contact?.inverted ?? false);
      if (this.#states.get(key) !== pressed) changed = true;
      this.#states.set(key, pressed);
    }
    return changed;
  }
  /** Reads every contact from a solution; returns those that turned over. */
  read(solution: Solution, time: number, fired: readonly Armed[] = []): readonly { readonly key: string; readonly on: boolean }[] {
    const turned: { key: string; on: boolean }[] = [];
    for (const contact of this.#plant.contacts) {
      if (contact.test.is === 'outside') continue;
      const until = this.#frozen.get(contact.key);
      if (until !== undefined && time < until) continue;
      const before = this.#states.get(contact.key);
      const forced = fired.find((one) => one.contact.key === contact.key);
      const now = forced ? forced.becomes : closed(this.#plant, contact, solution, before);
      this.#states.set(contact.key, now);
      if (before !== undefined && now !== undefined && before !== now) {
        turned.push({ key: contact.key, on: now });
        this.#count(contact.key, time);
      }
    }
    return turned;
  }
  #count(key: string, time: number): void {
    const recent = [...(this.#turns.get(key) ?? []).filter((one) => time - one <= CHATTER_TIME), time];
    this.#turns.set(key, recent);
    if (recent.length > CHATTER_TURNS) {
      this.chattering.add(key);
      this.#frozen.set(key, time + CHATTER_TIME);
      this.#turns.set(key, []);
    }
  }
  /** When the earliest frozen contact is read again, s. */
  thaw(time: number): number {
    return Math.min(Number.POSITIVE_INFINITY, ...[...this.#frozen.values()].filter((one) => one > time));
  }
  /** Watches for all that can turn over. */
  arm(solution: Solution, time: number): readonly Armed[] {
    return this.#plant.contacts.flatMap((contact) => {
      if ((this.#frozen.get(contact.key) ?? 0) > time) return [];
      return watches(this.#plant, contact, solution, this.#states.get(contact.key)).map((one) => ({ ...one, contact }));
    });
  }
}
