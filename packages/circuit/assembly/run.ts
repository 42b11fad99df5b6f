/** A run of the machine in time: valves that shift, memory bits that turn, loads that change, on the engine's integrator. */
import { type Network, type SteadyResult, Transient, type TransientWatch } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import type { BodyLoad, MachineRun, RunReport, Setting, Solution, Stand, Watch } from './machine.ts';
import { Charges } from './real-gas.ts';
import { type Internal, InternalEvents } from './run-events.ts';
import { applySetting, LEAKAGE_FLOOR, loadState, ofBody, requestOf } from './setting.ts';
import { crossover, type Move, proportionalMoves } from './shifting.ts';
import { solutionOf, type Standing } from './solution.ts';
import { fromLitres, fromMPa } from './units.ts';
import { engineWatch } from './watches.ts';

/** Something that turns over this often within that time (s) chatters; it is then left alone for as long. */
const CHATTER_TURNS = 6;
const CHATTER_TIME = 0.2;
/** Most internal events in one call: a run that turns without end. */
const MOST_EVENTS = 1000;

interface Happened {
  readonly time: number;
  readonly of: string;
  readonly words: string;
}

export class Run implements MachineRun {
  readonly #assembled: Assembled;
  readonly #network: Network;
  readonly #engine: Transient;
  readonly #events: InternalEvents;
  readonly #charges: Charges;
  #setting: Setting;
  /** Where each valve is told to stand; it may lack the pilot pressure to go there. */
  readonly #wanted: Record<string, Stand>;
  /** Valves on their way: when they arrive, and where. */
  readonly #shifting = new Map<string, { readonly until: number; readonly to: Stand; readonly from: number; readonly began: number }>();
  readonly #happened: Happened[] = [];
  readonly #turns = new Map<string, number[]>();
  readonly #frozen = new Map<string, number>();
  readonly #scratch: Float64Array;

  /** `setting` as the solution was settled; `asked` the stands asked for, which piloted valves may not have reached. */
  constructor(
    assembled: Assembled,
    network: Network,
    setting: Setting,
    asked: Readonly<Record<string, Stand>>,
    start: SteadyResult,
    dynamics: boolean,
  ) {
    this.#assembled = assembled;
    this.#network = network;
    // The law alone holds a pilot-operated check from here on: what stands shut stays shut by continuity.
    const bits = { ...setting.bits };
    for (const m of assembled.memories) if (m.kind === 'held') bits[m.component] = false;
    this.#setting = { ...setting, bits };
    this.#wanted = { ...setting.valves, ...asked };
    this.#scratch = new Float64Array(assembled.parameters.length);
    applySetting(assembled, this.#setting, network.parameters);
    this.#engine = new Transient(network, requestOf(assembled, this.#setting), start, {
      dynamics,
      ...(setting.leakage === true ? { floor: LEAKAGE_FLOOR } : {}),
    });
    this.#charges = new Charges(assembled);
    this.#charges.exponent(this.#engine, setting.gasExponent ?? 1.4);
    this.#events = new InternalEvents(assembled, network);
  }

  get time(): number {
    return this.#engine.time;
  }
  get statistics(): MachineRun['statistics'] {
    return this.#engine.statistics;
  }

  now(): Solution {
    return this.#solution(this.#engine.now());
  }

  #solution(result: SteadyResult): Solution {
    const gas = this.#engine.gas();
    const standing: Standing = {
      // Events are located a hair past a stop; the body stands on it.
      positions: this.#assembled.bodies.map((b, i) => {
        const x = this.#engine.positions[i] ?? 0;
        return b.stroke === Number.POSITIVE_INFINITY ? x : Math.min(Math.max(x, 0), b.stroke);
      }),
      oil: this.#assembled.gases.map((g, i) => {
        const at = gas[i];
        return at === undefined || at === 'empty'
          ? { oil: 0, pressure: g.precharge }
          : { oil: fromLitres(at.oil), pressure: fromMPa(at.pressure) };
      }),
    };
    const solution = solutionOf(this.#assembled, this.#network, this.#setting, result, standing, this.#engine.parameters);
    const held = this.#assembled.memories.filter((m) => m.kind === 'held' && (solution.openings[m.component] ?? 0) <= 0);
    return held.length === 0
      ? solution
      : { ...solution, bits: { ...solution.bits, ...Object.fromEntries(held.map((m) => [m.component, true])) } };
  }

  /** Parameters a setting means, in a scratch array. */
  #parameters(setting: Setting): Float64Array {
    applySetting(this.#assembled, setting, this.#scratch);
    return this.#scratch;
  }

  shift(valve: string, to: Stand, ramp?: { readonly over: number; readonly from?: number }): void {
    this.#wanted[valve] = to;
    const piloted = this.#assembled.piloted.find((v) => v.component === valve);
    const note = this.#assembled.valves.find((v) => v.component === valve);
    if (note === undefined) return;
    if (piloted !== undefined && to.position !== note.rest && this.#setting.valves[valve]?.position !== to.position) {
      const seen = this.#events.pilot(piloted, this.#engine.pressures);
      if (seen < piloted.needs) {
        this.#happened.push({ time: this.time, of: valve, words: `${valve} cannot shift: ${bar(seen)} of ${bar(piloted.needs)} bar` });
        return;
      }
    }
    this.#move(valve, to, ramp);
  }

  #move(valve: string, to: Stand, ramp?: { readonly over: number; readonly from?: number }): void {
    const note = this.#assembled.valves.find((v) => v.component === valve);
    if (note === undefined) return;
    const going = this.#shifting.get(valve);
    const present = going?.to ?? this.#setting.valves[valve] ?? { position: note.rest };
    if (ramp === undefined && present.position === to.position && (present.opening ?? 1) === (to.opening ?? 1)) return;
    const now = this.time;
    const takes = ramp?.over ?? note.takes;
    const until = now + takes;
    const at = (stand: Stand): Float64Array =>
      Float64Array.from(this.#parameters({ ...this.#setting, valves: { ...this.#setting.valves, [valve]: stand } }));
    let moves: readonly Move[];
    let from = 0;
    if (note.proportional) {
      const signed = signOf(note.rest, to) * (to.position === note.rest ? 0 : (to.opening ?? 1));
      from = ramp?.from === undefined ? this.#commandNow(valve, note.rest) : signOf(note.rest, to) * ramp.from;
      moves = proportionalMoves(note, from, signed, now, until, at);
    } else {
      moves = crossover(note.parameters, this.#engine.parameters, at(to), now, until);
    }
    for (const m of moves) {
      if (m.end <= m.start) this.#engine.set(m.parameter, m.to);
      else this.#engine.ramp(m.parameter, m.from, m.to, m.start, m.end);
    }
    if (takes <= 0) {
      this.#shifting.delete(valve);
      this.#arrive(valve, to);
    } else this.#shifting.set(valve, { until, to, from, began: now });
  }

  /** Signed command of a proportional valve now: + towards a. */
  #commandNow(valve: string, rest: Stand['position']): number {
    const value = (stand: Stand | undefined): number =>
      stand === undefined || stand.position === rest ? 0 : signOf(rest, stand) * (stand.opening ?? 1);
    const going = this.#shifting.get(valve);
    if (going === undefined) return value(this.#setting.valves[valve]);
    const share = going.until > going.began ? Math.min(1, (this.time - going.began) / (going.until - going.began)) : 1;
    return going.from + share * (value(going.to) - going.from);
  }

  #arrive(valve: string, stand: Stand): void {
    this.#setting = { ...this.#setting, valves: { ...this.#setting.valves, [valve]: stand } };
  }

  command(coil: string, to: number | undefined, ramp?: { readonly over: number; readonly from?: number }): void {
    const before = Float64Array.from(this.#parameters(this.#setting));
    const commands: Record<string, number> = { ...this.#setting.commands };
    delete commands[coil];
    const withValue = (value: number | undefined): Setting => ({
      ...this.#setting,
      commands: value === undefined ? commands : { ...commands, [coil]: value },
    });
    const after = Float64Array.from(this.#parameters(withValue(to)));
    const start = ramp?.from === undefined ? undefined : Float64Array.from(this.#parameters(withValue(ramp.from)));
    for (let p = 0; p < after.length; p++) {
      const target = after[p] ?? 0;
      if (target === (before[p] ?? 0) && (start === undefined || start[p] === target)) continue;
      if (ramp === undefined || to === undefined || !(ramp.over > 0)) this.#engine.set(p, target);
      else this.#engine.ramp(p, start?.[p] ?? this.#engine.parameters[p] ?? 0, target, this.time, this.time + ramp.over);
    }
    this.#setting = withValue(to);
  }

  drive(id: string, on: boolean): void {
    this.#change({ ...this.#setting, drives: { ...this.#setting.drives, [id]: on } });
  }

  /** Goes over to a setting at once: every parameter that means something else. */
  #change(setting: Setting): void {
    const before = Float64Array.from(this.#parameters(this.#setting));
    const after = this.#parameters(setting);
    for (let p = 0; p < after.length; p++) if (after[p] !== before[p]) this.#engine.set(p, after[p] ?? 0);
    this.#setting = setting;
  }

  load(body: string, load: BodyLoad): void {
    const i = this.#assembled.bodies.findIndex((b) => b.id === body || b.actuators.includes(body));
    const note = this.#assembled.bodies[i];
    if (note === undefined) return;
    this.#setting = { ...this.#setting, loads: { ...this.#setting.loads, [note.id]: load } };
    this.#loads(i);
  }

  #loads(i: number): void {
    const note = this.#assembled.bodies[i];
    if (note === undefined) return;
    const x = this.#engine.positions[i] ?? 0;
    this.#engine.setLoads(i, loadState(note, ofBody(this.#setting.loads, note), this.#setting, x));
  }

  gasExponent(n: number): void {
    this.#charges.exponent(this.#engine, n);
    this.#setting = { ...this.#setting, gasExponent: n };
  }

  advance(until: number, watches: readonly Watch[], onStep?: (time: number, solution: Solution) => void): RunReport {
    const own = watches.map((w) => engineWatch(this.#assembled, w, this.#setting));
    // Where the bodies stood at each step: what happened there is put into words afterwards.
    const trail = new Map<number, Float64Array>();
    const step = (time: number): void => {
      trail.set(time, Float64Array.from(this.#engine.positions));
      onStep?.(time, this.#solution(this.#engine.now(false)));
    };
    for (let count = 0; ; count++) {
      if (count > MOST_EVENTS) return this.#report([], `more than ${MOST_EVENTS} valve events without end`);
      const turned = this.#turnNow();
      const internal = this.#events.armed(this.#setting, this.#wanted, (id) => this.#isFrozen(id) || this.#shifting.has(id));
      const stop = Math.min(until, ...this.#appointments());
      const report = this.#engine.advance(stop, [...own, ...internal.map((i): TransientWatch => i.watch)], step);
      for (const h of report.happened) this.#note(h, trail.get(h.time) ?? this.#engine.positions);
      trail.clear();
      this.#arrivals();
      if (report.failed !== undefined) return this.#report([], report.failed);
      const mine = report.fired.filter((f) => f < own.length);
      for (const f of report.fired) {
        const event = internal[f - own.length];
        if (event !== undefined) this.#act(event);
      }
      if (mine.length > 0) return this.#report(mine);
      if (this.time >= until - 1e-12 && !turned) return this.#report([]);
    }
  }

  #report(fired: readonly number[], failed?: string): RunReport {
    const happened = this.#happened.splice(0);
    return { time: this.time, fired, happened, ...(failed === undefined ? {} : { failed }) };
  }

  /** Times at which something of our own ends: a valve arrives, a frozen bit thaws. */
  #appointments(): number[] {
    return [...[...this.#shifting.values()].map((s) => s.until), ...this.#frozen.values()].filter((t) => t > this.time + 1e-12);
  }

  #arrivals(): void {
    for (const [valve, going] of [...this.#shifting]) {
      if (going.until > this.time + 1e-12) continue;
      this.#shifting.delete(valve);
      this.#arrive(valve, going.to);
    }
    for (const [id, until] of [...this.#frozen]) if (until <= this.time + 1e-12) this.#frozen.delete(id);
  }

  #isFrozen(id: string): boolean {
    return (this.#frozen.get(id) ?? 0) > this.time + 1e-12;
  }

  /** What is already past its threshold turns now: a watch fires only on crossing. True when something turned. */
  #turnNow(): boolean {
    let any = false;
    for (let pass = 0; pass < 4; pass++) {
      const due = this.#events.due(this.#setting, this.#wanted, this.#engine, (id) => this.#isFrozen(id) || this.#shifting.has(id));
      if (due.length === 0) break;
      for (const event of due) this.#act(event);
      any = true;
    }
    return any;
  }

  #act(event: Internal): void {
    const turns = [...(this.#turns.get(event.of) ?? []).filter((t) => t > this.time - CHATTER_TIME), this.time];
    this.#turns.set(event.of, turns);
    if (turns.length > CHATTER_TURNS) {
      this.#frozen.set(event.of, this.time + CHATTER_TIME);
      this.#turns.delete(event.of);
      this.#happened.push({ time: this.time, of: event.of, words: `${event.of} chatters` });
      return;
    }
    this.#happened.push({ time: this.time, of: event.of, words: event.words });
    if (event.what === 'bit') this.#change({ ...this.#setting, bits: { ...this.#setting.bits, [event.of]: event.to } });
    else this.#move(event.of, event.stand);
  }

  #note(
    h: { readonly time: number; readonly actuator: number; readonly what: 'stop reached' | 'stop left' | 'knot' },
    positions: Float64Array,
  ): void {
    const body = this.#assembled.bodies[h.actuator];
    if (body === undefined) return;
    const x = positions[h.actuator] ?? 0;
    if (h.what === 'knot') {
      for (const k of body.knots) if (Math.abs(k.at - x) < 1e-5) this.#happened.push({ time: h.time, of: body.id, words: k.words });
      return;
    }
    const end = x > body.stroke / 2 ? 'extended' : 'retracted';
    this.#happened.push({
      time: h.time,
      of: body.id,
      words: h.what === 'stop reached' ? `${body.id} reaches its stop, ${end}` : `${body.id} leaves its stop`,
    });
  }
}

const signOf = (rest: Stand['position'], to: Stand): number =>
  to.position === rest ? 0 : to.position === 'b' && rest === 'centre' ? -1 : 1;
const bar = (pa: number): string => (Math.abs(pa) < 1e6 ? (pa / 1e5).toFixed(1) : (pa / 1e5).toFixed(0));
