/** One run of a cycle over time: the control and the machine, instant by instant (order: switches, interlocks and while lines, one step change, valves). */
import type { BodyLoad, MachineRun, Setting, Solution, Stand } from '../assembly/machine.ts';
import type { Command } from '../model/circuit.ts';
import type { Origin } from '../model/origin.ts';
import { firstLive, settingBy, standBy } from './coils.ts';
import { onlyOutside, type Situation } from './conditions.ts';
import { type Control, decide, detentsAfter, NOTHING } from './logic.ts';
import { whyItStands } from './limits.ts';
import { loadInSteps } from './loads.ts';
import { moves, STILL_FLOW } from './motion.ts';
import type { Plant } from './scene.ts';
import { late, type Line, nextTimer, outsideFor, type Sequence, takes } from './sequence.ts';
import { settingOf } from './setting.ts';
import type { Fault } from './study.ts';
import { type Armed, Switches } from './switches.ts';
import { liveValue, Trace } from './trace.ts';
import { bodiesWaitedFor, waitingFor } from './waiting.ts';
import { say } from './words.ts';

/** At most this many step changes in one instant. */
const CHANGES = 100;
/** More events in one run than this is chatter. */
const EVENTS = 1000;
/** A run without a limit ends after an hour of machine time. */
const HOUR = 3600;
/** A manual step that only an outside switch ends runs until nothing moves, at most this long. */
const PUSHED = 60;
/** Without a timer the run looks up this often whether anything still moves, s. */
const LOOK = 1;
/** Pressures that change less than this in that time stand, Pa. */
const STEADY = 5e3;

export interface End {
  readonly completed: boolean;
  /** s, of this run. */
  readonly time: number;
  readonly trace: Trace;
  readonly faults: readonly Fault[];
  readonly detents: Readonly<Record<string, Stand['position']>>;
  readonly solution: Solution;
  readonly chattering: readonly string[];
}

export interface RunOptions {
  /** Push button: ends when nothing moves where only an outside switch would end it. */
  readonly manual?: boolean;
}

/** A machine that runs one cycle after another; the control's memory goes on between them. */
export class Runner {
  readonly #plant: Plant;
  readonly #run: MachineRun;
  readonly switches: Switches;
  #detents: Record<string, Stand['position']>;
  #stands: Readonly<Record<string, Stand>>;
  #commands: Readonly<Record<string, number>> = {};
  #drives: Readonly<Record<string, boolean>>;
  #loads = new Map<string, string>();
  #control: Control;
  /** Step and coil: it was live there. */
  readonly #livedIn = new Set<string>();
  /** As last set. */
  #setting: Setting;
  #shiftingUntil = 0;
  #gasFrom = 0;
  #gas = 1.4;

  constructor(plant: Plant, run: MachineRun, start: Setting, detents: Readonly<Record<string, Stand['position']>>, switches?: Switches) {
    this.#plant = plant;
    this.#run = run;
    this.#detents = { ...detents };
    this.#stands = start.valves;
    this.#drives = start.drives;
    this.#setting = start;
    this.switches = switches ?? new Switches(plant);
    this.#control = decide(plant.at, NOTHING, { contact: () => undefined, live: () => false, running: () => false }, { whileLines: false });
    for (const [id, load] of Object.entries(start.loads)) this.#loads.set(id, JSON.stringify(load));
    this.switches.read(run.now(), run.time);
  }

  cycle(sequence: Sequence, options: RunOptions = {}): End {
    const plant = this.#plant;
    const trace = new Trace();
    const began = this.#run.time;
    const faults: Fault[] = [];
    const before = { ...this.#run.statistics };
    let fired: readonly Armed[] = [];
    let events = 0;
    let completed = false;
    let looked: Solution | undefined;
    this.#gasFrom = began;
    this.switches.chattering.clear();
    for (;;) {
      const time = this.#run.time - began;
      const now = this.#run.now();
      const instant = this.#instant(sequence, time, now, fired, trace, faults, options.manual === true);
      if (instant === 'finished') {
        completed = true;
        break;
      }
      if (instant === 'fault' || plant.cancelled()) break;
      const lines = sequence.lines();
      const tooLate = late(lines, time);
      if (tooLate) {
        faults.push(this.#fault('time limit', tooLate, time, now, this.#situation(sequence)));
        break;
      }
      const timer = nextTimer(plant.at, lines, time);
      const armed = this.switches.arm(now, this.#run.time);
      const shift = this.#shiftingUntil > this.#run.time + 1e-9 ? this.#shiftingUntil - began : Number.POSITIVE_INFINITY;
      const target = Math.min(timer, shift, this.#nextGas() - began, this.switches.thaw(this.#run.time) - began, HOUR);
      const looking = !Number.isFinite(timer) || options.manual === true;
      const until = looking ? Math.min(target, time + LOOK) : target;
      const ids = lines.map((one) => one.step.id);
      if (trace.samples.length === 0 || events === 0) trace.sample(time, now, ids, this.#shiftingUntil > this.#run.time);
      const report = this.#run.advance(
        began + until,
        armed.map((one) => one.watch),
        (at, solution) => trace.sample(at - began, solution, ids, at <= this.#shiftingUntil + 1e-9),
      );
      const after = this.#run.now();
      if (trace.end < this.#run.time - began - 1e-9)
        trace.sample(this.#run.time - began, after, ids, this.#run.time <= this.#shiftingUntil + 1e-9);
      for (const one of report.happened) {
        trace.event(one.time - began, one.of, one.words);
        if (one.words.endsWith(' chatters')) this.switches.chattering.add(one.of);
      }
      fired = report.fired.flatMap((index) => armed[index] ?? []);
      events += 1 + report.happened.length;
      if (report.failed !== undefined) {
        faults.push(this.#plain('no equilibrium', report.failed, lines, this.#run.time - began));
        break;
      }
      if (events > EVENTS) {
        faults.push(this.#plain('chatters', `more than ${EVENTS} events in one run`, lines, this.#run.time - began));
        break;
      }
      const stood = looking && fired.length === 0 && looked !== undefined && this.#standsStill(looked, after);
      looked = fired.length === 0 ? after : undefined;
      if (this.#run.time - began >= HOUR - 1e-6) {
        faults.push(this.#plain('waits for ever', 'the run was ended after 1 h of machine time', lines, HOUR));
        break;
      }
      if (options.manual && (stood || this.#run.time - began >= PUSHED) && lines.every((one) => pushed(plant, one))) {
        completed = true;
        break;
      }
      if (stood && !Number.isFinite(timer) && !Number.isFinite(shift)) {
        const line = lines[0];
        if (line) faults.push(this.#fault('waits for ever', line, this.#run.time - began, after, this.#situation(sequence)));
        break;
      }
    }
    const time = this.#run.time - began;
    const solution = this.#run.now();
    if (trace.end < time - 1e-9 || trace.samples.length === 0) trace.sample(time, solution, [], false);
    trace.close(time);
    const spent = this.#run.statistics;
    trace.statistics = {
      steps: spent.steps - before.steps,
      rejected: spent.rejected - before.rejected,
      newton: spent.newton - before.newton,
      events: spent.events - before.events,
    };
    for (const key of this.switches.chattering) {
      faults.push(this.#plain('chatters', `${key} turns over more than 6 times in 0.2 s`, [], time, this.#originOf(key)));
    }
    return { completed, time, trace, faults, detents: this.#detents, solution, chattering: [...this.switches.chattering] };
  }

  /** Everything dead, as between push buttons; a moment for the valves to come back. */
  release(): void {
    this.#apply(decide(this.#plant.at, NOTHING, this.#situation(undefined), { whileLines: true }), [], 0, new Trace());
    this.#run.advance(this.#run.time + 1, []);
    this.switches.read(this.#run.now(), this.#run.time);
  }

  #situation(sequence: Sequence | undefined, control: Control = this.#control): Situation {
    const running = sequence?.running() ?? new Set<string>();
    return {
      contact: (key) => this.switches.state(key),
      live: (coil) => control.live.has(coil),
      running: (id) => running.has(id),
    };
  }

  #instant(
    sequence: Sequence,
    time: number,
    now: Solution,
    fired: readonly Armed[],
    trace: Trace,
    faults: Fault[],
    manual: boolean,
  ): 'goes on' | 'finished' | 'fault' {
    const { at } = this.#plant;
    for (const turned of this.switches.read(now, this.#run.time, fired))
      trace.event(time, turned.key, turnedWords(this.#plant, turned.key, turned.on));
    let control = this.#control;
    for (let change = 0; ; change += 1) {
      if (change > CHANGES) {
        faults.push(
          this.#plain(
            'cycle without time',
            `more than ${CHANGES} step changes in one instant`,
            sequence.lines(),
            time,
            sequence.cycle.origin,
          ),
        );
        return 'fault';
      }
      const demand = sequence.demand();
      this.switches.press(outsideFor(at, sequence.lines(), demand, manual ? 'held' : 'pressed'));
      const ends = this.#situation(sequence, control);
      const did = sequence.advance(time, ends);
      if (!did) {
        // A button that a step waits for was pressed above; the interlocks of the coils that stay need theirs.
        this.switches.press(outsideFor(at, sequence.lines(), demand, 'free'));
        control = decide(at, demand, this.#situation(sequence, control));
        break;
      }
      if (did.did === 'finished') return 'finished';
      if (did.did === 'entered') {
        for (const line of did.lines) {
          trace.enter(line.step.id, time);
          trace.event(time, line.step.id, `${line.step.id} begins`);
        }
        this.#gasFrom = this.#run.time;
      } else {
        trace.leave(did.line.step.id, time);
        this.#neverLive(did.line, time, faults);
        trace.event(time, did.line.step.id, `${did.line.step.id} ends`);
      }
      control = decide(at, sequence.demand(), this.#situation(sequence, control));
    }
    for (const voices of control.twoVoices) {
      if (!faults.some((one) => one.kind === 'two voices' && one.words === voices.words)) {
        const step = sequence.lines()[0]?.step.id;
        faults.push({ kind: 'two voices', words: voices.words, origin: voices.origin, time, ...(step === undefined ? {} : { step }) });
      }
    }
    for (const drop of control.dropped) {
      if (this.#control.dropped.some((one) => one.coil === drop.coil) || drop.step === 'while') continue;
      trace.event(time, drop.coil, `${drop.coil} is held back by its interlock`);
    }
    this.#apply(control, sequence.lines(), time, trace);
    return 'goes on';
  }

  /** A step that ends without one of its coils ever having been live: its interlock held it back all the time. */
  #neverLive(line: Line, time: number, faults: Fault[]): void {
    if (time - line.entered < 1e-9) return;
    for (const drop of this.#control.dropped) {
      if (drop.step !== line.step.id || this.#livedIn.has(`${line.step.id} ${drop.coil}`)) continue;
      const words = `${drop.coil} is never live in ${line.step.id}: its interlock holds it back from the first to the last moment`;
      if (!faults.some((one) => one.words === words))
        faults.push({ kind: 'interlock', words, step: line.step.id, time, origin: drop.by.origin });
    }
  }

  /** Sets the machine as the control asks: valves begin to shift, settings and drives change, loads of the steps come and go. */
  #apply(control: Control, lines: readonly Line[], time: number, trace: Trace): void {
    const plant = this.#plant;
    const machineTime = this.#run.time;
    const steps = lines.map((one) => one.step.id);
    const loads: Record<string, BodyLoad> = {};
    for (const body of plant.bodies) {
      const load = loadInSteps(plant.at, body, steps);
      loads[body.id] = load;
      const text = JSON.stringify(load);
      if (this.#loads.get(body.id) !== text) {
        this.#loads.set(body.id, text);
        this.#run.load(body.id, load);
      }
    }
    const now = this.#run.now();
    const setting = settingOf(plant, { control, detents: this.#detents, positions: now.positions, oil: now.oil, bits: now.bits, loads });
    for (const [valve, stand] of Object.entries(setting.valves)) {
      const was = this.#stands[valve];
      if (was && was.position === stand.position && was.opening === stand.opening) continue;
      const ramp = this.#rampOf(control, lines, valve, time);
      this.#run.shift(valve, stand, ramp);
      if (!ramp) this.#shiftingUntil = Math.max(this.#shiftingUntil, machineTime + takes(plant.at, valve));
    }
    for (const coil of new Set([...Object.keys(setting.commands), ...Object.keys(this.#commands)])) {
      const to = setting.commands[coil];
      if (to === this.#commands[coil]) continue;
      const command = commandOf(lines, coil, time);
      const first = command ? firstLive(command) : undefined;
      const from = first ? settingBy(plant.at, first) : undefined;
      this.#run.command(coil, to, command?.over ? { over: command.over, ...(from === undefined ? {} : { from }) } : undefined);
    }
    for (const [drive, on] of Object.entries(setting.drives)) if (this.#drives[drive] !== on) this.#run.drive(drive, on);
    if (plant.at.accumulators.length > 0) this.#setGas();
    this.#detents = detentsAfter(plant.at, control, this.#detents);
    this.#stands = setting.valves;
    this.#commands = setting.commands;
    this.#drives = setting.drives;
    this.#control = control;
    this.#setting = setting;
    for (const line of lines) for (const coil of control.live.keys()) this.#livedIn.add(`${line.step.id} ${coil}`);
    const last = trace.snapshots.at(-1);
    if (last && last.time >= time - 1e-9) trace.snapshots.pop();
    trace.snapshots.push({ time, setting, lines: steps });
    const states = new Map<string, number>();
    for (const [coil, live] of control.live) states.set(coil, liveValue(live));
    for (const one of plant.at.ofKind('switch')) if (this.switches.state(one.id)) states.set(one.id, 1);
    trace.states(time, states);
  }

  #rampOf(control: Control, lines: readonly Line[], valve: string, time: number): { over: number; from?: number } | undefined {
    for (const live of control.live.values()) {
      if (standBy(this.#plant.at, live)?.valve !== valve) continue;
      const command = commandOf(lines, live.coil, time);
      if (!command?.over) return undefined;
      const first = firstLive(command);
      const from = first ? standBy(this.#plant.at, first)?.stand.opening : undefined;
      return from === undefined ? { over: command.over } : { over: command.over, from };
    }
    return undefined;
  }

  /** Gas exponent: 1.4 in the first minute of a step, falling to 1.0 at three minutes. */
  #setGas(): void {
    const n = gasExponent(this.#run.time - this.#gasFrom);
    if (Math.abs(n - this.#gas) < 1e-9) return;
    this.#gas = n;
    this.#run.gasExponent(n);
  }
  #nextGas(): number {
    if (this.#plant.at.accumulators.length === 0) return Number.POSITIVE_INFINITY;
    const into = this.#run.time - this.#gasFrom;
    for (let at = 60; at <= 180; at += 20) if (into < at - 1e-9) return this.#gasFrom + at;
    return Number.POSITIVE_INFINITY;
  }

  #standsStill(before: Solution, after: Solution): boolean {
    if (this.#plant.bodies.some((one) => moves(one, after))) return false;
    if (this.#plant.at.accumulators.some((one) => Math.abs(after.flows[`${one.id}.P`] ?? 0) > STILL_FLOW)) return false;
    return Object.keys(after.pressures).every((net) => Math.abs((after.pressures[net] ?? 0) - (before.pressures[net] ?? 0)) < STEADY);
  }

  #fault(kind: Fault['kind'], line: Line, time: number, now: Solution, situation: Situation): Fault {
    const { circuit } = this.#plant;
    const waits = waitingFor(this.#plant, line.step.until, situation, now);
    const locked = this.#control.dropped.filter((one) => one.step === line.step.id);
    const held = locked.map((one) => `${one.coil} is held back: ${waitingFor(this.#plant, one.by.needs, situation, now)}`).join('; ');
    const words =
      kind === 'time limit'
        ? `${line.step.id} is not over after ${say(circuit, line.step.atMost ?? 0, 'time')}${waits ? `: waits for ${waits}` : ''}`
        : `${line.step.id} waits for ever${waits ? ` at ${waits}` : ''}`;
    const bodies = bodiesWaitedFor(this.#plant, line.step.until, situation, now);
    const setting = {
      ...this.#setting,
      positions: now.positions,
      oil: now.oil,
      bits: now.bits,
      ...(now.gasPressures ? { gasPressures: now.gasPressures } : {}),
    };
    const stands = [
      ...new Set(bodies.map((one) => whyItStands(this.#plant, one.body, setting, now, one.direction)).filter((one) => one !== '')),
    ];
    const more = held !== '' ? held : stands.join('; ');
    return { kind, words: more ? `${words} (${more})` : words, step: line.step.id, time, origin: line.step.origin };
  }
  #plain(kind: Fault['kind'], words: string, lines: readonly Line[], time: number, origin?: Origin): Fault {
    const step = lines[0]?.step;
    const place = origin ?? step?.origin ?? { uri: this.#plant.circuit.uri, start: 0, end: 0 };
    return { kind, words: step ? `${step.id}: ${words}` : words, time, origin: place, ...(step ? { step: step.id } : {}) };
  }
  #originOf(key: string): Origin | undefined {
    return this.#plant.at.component(key.split(' ')[0] ?? '')?.nameOrigin;
  }
}

function turnedWords(plant: Plant, key: string, on: boolean): string {
  const words = plant.contact(key)?.words;
  if (words !== undefined) return on ? words : `${words}: no longer`;
  return key.includes(' ') ? (on ? key : `${key}: no longer`) : `${key} ${on ? 'on' : 'off'}`;
}

/** A step that a push button holds: no `until`, or one that only outside switches decide. */
function pushed(plant: Plant, line: Line): boolean {
  return line.step.until === undefined || onlyOutside(plant.at, line.step.until);
}

/** Command of a line that was entered in this instant: only then a ramp begins. */
function commandOf(lines: readonly Line[], coil: string, time: number): Command | undefined {
  for (const { step, entered } of lines) {
    if (Math.abs(entered - time) > 1e-9) continue;
    for (const action of step.actions) {
      const found = action.does === 'energise' ? action.commands.find((one) => one.coil === coil) : undefined;
      if (found) return found;
    }
  }
  return undefined;
}

/** Exponent of the gas after a time in one step, common practice, no source. */
export function gasExponent(time: number): number {
  if (time <= 60) return 1.4;
  return time >= 180 ? 1 : 1.4 - (0.4 * (time - 60)) / 120;
}
