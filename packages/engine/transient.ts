/** A run in time: adaptive steps, located events, rigid stops. Quasi-static (forces balance at every instant) unless `dynamics`. */
import { type Charge, chargeOil, Storage } from './charge.ts';
import type { Network } from './compile.ts';
import { diagnose } from './diagnosis.ts';
import { Events } from './events.ts';
import { chargeOf, GAS_EXPONENT } from './gas.ts';
import type { GasCurve, LoadState } from './network.ts';
import { Ramps } from './ramps.ts';
import { resultOf } from './report.ts';
import { System } from './residual.ts';
import type {
  ActuatorContact,
  AdvanceReport,
  GasState,
  SteadyRequest,
  SteadyResult,
  TransientOptions,
  TransientStatistics,
  TransientWatch,
} from './results.ts';
import { type StepTolerance, Stepper } from './step.ts';
import { ATMOSPHERE, FLOOR_TIME } from './tolerances.ts';

/** First step after a jump, s: below the rise time of a small pressurised volume. */
const FIRST_STEP = 2e-4;
const PATIENCE = 3;
/** Least step: below it nothing in a machine changes. */
const LEAST_STEP = 1e-12;
const GROWTH = 5;
const SHRINK = 0.2;
const SAFETY = 0.9;
/** Net force, MPa of the scaled balance, above which a contact is left at once. */
const LEAVES = 1e-9;
/** A knot crossed this often, each time within a millisecond of the last, holds the body when the forces on both sides press towards it. */
const CROSSINGS = 4;
const NO_TIME = 1e-3;
/** Most steps and Newton iterations in one `advance`: a hundred times what a machine cycle takes, a second or two. */
const MAX_STEPS = 20_000;
const MAX_ITERATIONS = 400_000;

/**
 * Pressures where inertia is off: 0.02 bar and a thousandth a step. They need care of their own: how long a rod waits for pressure, and when a
 * pressure switch falls, follow from them alone. Where inertia is on: multiples of the relative tolerance.
 */
const QUASI_STATIC = { pressure: 0.002, pressureRelative: 1e-3 };
const DYNAMIC = { pressure: 3, pressureRelative: 3 };

type Happening = AdvanceReport['happened'][number];

export class Transient {
  readonly network: Network;
  /** Values in force now; change them with `set` and `ramp`. */
  readonly parameters: Float64Array;
  time = 0;
  private readonly sys: System;
  private readonly storage: Storage;
  private readonly ramps = new Ramps();
  private readonly stepper: Stepper;
  private readonly events: Events;
  private readonly contacts: ActuatorContact[];
  private readonly freeStops: readonly boolean[];
  private readonly maxStep: number;
  private readonly maxSteps: number;
  private h = FIRST_STEP;
  private stale = true;
  /** Steps that did not converge lately; many make the stepper patient. */
  private trouble = 0;
  private before: Float64Array = new Float64Array(0);
  private readonly counts = { steps: 0, rejected: 0, events: 0 };
  private readonly crossed: { knot: number; time: number; count: number }[];

  /** Starts from a steady result at the same positions, loads and charges (those of `request`). */
  constructor(network: Network, request: SteadyRequest, start: SteadyResult, options: TransientOptions = {}) {
    const bodies = network.spec.actuators.length;
    this.network = network;
    this.sys = new System(network);
    this.parameters = Float64Array.from(network.parameters);
    this.sys.parameters = Float64Array.from(network.parameters);
    this.sys.floor = options.floor ?? FLOOR_TIME;
    this.contacts = [...start.contacts];
    this.freeStops = request.freeStops ?? [];
    const exponent = request.gasExponent ?? GAS_EXPONENT;
    const charges = network.spec.gas.map((spec, g): Charge => {
      const charge = chargeOf(spec, request.gas?.[g], exponent);
      return charge
        ? { spec, pressure: charge.pressure, volume: spec.volume - charge.oil, exponent, curve: spec.curve }
        : { spec, pressure: spec.precharge, volume: spec.volume, exponent, curve: spec.curve };
    });
    this.storage = new Storage(network, charges);
    const relative = options.tolerance ?? 1e-4;
    const tolerance: StepTolerance = {
      position: 0.1 * relative,
      positionRelative: relative,
      velocity: relative,
      ...(options.dynamics
        ? { pressure: DYNAMIC.pressure * relative, pressureRelative: DYNAMIC.pressureRelative * relative }
        : QUASI_STATIC),
    };
    this.stepper = new Stepper(this.sys, this.storage, this.ramps, options.dynamics ?? false, tolerance);
    this.events = new Events(this.sys, this.stepper, this.contacts);
    this.maxStep = options.maxStep ?? Number.POSITIVE_INFINITY;
    this.maxSteps = options.maxSteps ?? MAX_STEPS;
    this.crossed = Array.from({ length: bodies }, () => ({ knot: Number.NaN, time: -1, count: 0 }));
    this.stepper.y0.set(start.state);
    for (let a = 0; a < bodies; a++) {
      this.sys.load(a, request.loads?.[a]);
      this.sys.place(a, request.positions[a] ?? 0, request.side?.[a] ?? 1);
      this.stepper.x0[a] = this.sys.x[a]!;
      this.sys.held[a] = this.contacts[a] === 'free' ? 0 : 1;
      if (this.sys.held[a]) this.stepper.y0[network.firstVelocity + a] = 0;
    }
    // A charge without oil cannot stand above its precharge: its node starts there.
    network.spec.gas.forEach((gas, g) => {
      const unknown = network.unknownOf[gas.node]!;
      if (unknown < 0 || chargeOf(gas, request.gas?.[g], exponent)) return;
      const gauge = gas.precharge - ATMOSPHERE + (gas.head ?? 0);
      if (this.stepper.y0[unknown]! > gauge) this.stepper.y0[unknown] = gauge;
    });
  }

  get statistics(): TransientStatistics {
    return { ...this.counts, newton: this.stepper.newtons };
  }
  get positions(): Float64Array {
    return this.stepper.x0;
  }
  get pressures(): Float64Array {
    this.refresh();
    return this.sys.p;
  }

  /** Sets a parameter at once. */
  set(parameter: number, value: number): void {
    this.ramps.clear(parameter);
    if (this.parameters[parameter] === value) return;
    this.parameters[parameter] = value;
    this.jumped();
  }

  /** Ramps a parameter linearly from now-or-later `start` to `end`; before `start` it keeps its value, then jumps to `from`. */
  ramp(parameter: number, from: number, to: number, start: number, end: number): void {
    this.ramps.add(parameter, from, to, Math.max(start, this.time), end);
    if (start <= this.time && this.parameters[parameter] !== from) {
      this.parameters[parameter] = from;
      this.jumped();
    }
    this.stale = true;
    this.h = Math.min(this.h, FIRST_STEP * 10);
  }

  /** Loads of one body from now on. */
  setLoads(actuator: number, load: LoadState | undefined): void {
    const v = this.stepper.y0[this.network.firstVelocity + actuator]!;
    this.sys.load(actuator, load);
    this.sys.place(actuator, this.stepper.x0[actuator]!, v < 0 ? -1 : 1);
    this.jumped();
  }

  /** From now on p V^n = const with this n. */
  setGasExponent(exponent: number): void {
    this.refresh();
    for (const charge of this.storage.charges) {
      const oil = chargeOil(charge, this.sys.p[charge.spec.node]!).value;
      if (oil > 0 && !charge.curve) {
        charge.pressure = this.sys.p[charge.spec.node]! - (charge.spec.head ?? 0) + ATMOSPHERE;
        charge.volume = charge.spec.volume - oil;
      }
      charge.exponent = exponent;
    }
    this.stepper.smooth = false;
  }

  /** From now on a charge follows this real-gas curve; its pressure stays, so the curve must pass through the present oil and pressure. */
  setGasCurve(gas: number, curve: GasCurve | undefined): void {
    const charge = this.storage.charges[gas];
    if (!charge) return;
    charge.curve = curve;
    this.jumped();
  }

  /** Oil in each charge, L, with its absolute pressure, MPa. */
  gas(): Exclude<GasState, number>[] {
    this.refresh();
    return this.storage.charges.map((charge) => {
      const oil = chargeOil(charge, this.sys.p[charge.spec.node]!).value;
      return oil > 0 ? { oil, pressure: this.sys.p[charge.spec.node]! - (charge.spec.head ?? 0) + ATMOSPHERE } : 'empty';
    });
  }

  /** The present state as a result; `withDiagnosis` false leaves the diagnosis out (cheaper). */
  now(withDiagnosis = true): SteadyResult {
    this.refresh();
    const { sys } = this;
    const result = resultOf(sys, this.contacts, this.contacts);
    const gasFlows = new Float64Array(this.storage.charges.length);
    this.storage.charges.forEach((charge, g) => {
      const i = this.network.unknownOf[charge.spec.node]!;
      if (i < 0) return;
      this.storage.at(i, sys.y[i]!);
      gasFlows[g] = (sys.r[i]! * chargeOil(charge, sys.y[i]!).slope) / this.storage.slope;
    });
    const whole = { ...result, gasFlows };
    return {
      ...whole,
      converged: true,
      how: 'newton',
      iterations: this.stepper.newtons,
      residual: 0,
      diagnosis: withDiagnosis ? diagnose(sys, whole) : [],
    };
  }

  private jumped(): void {
    this.stale = true;
    this.stepper.restart();
    this.h = Math.min(this.h, FIRST_STEP);
  }

  /** Evaluates the system at the present state. */
  private refresh(): void {
    const { sys, stepper } = this;
    sys.parameters.set(this.parameters);
    sys.y.set(stepper.y0);
    sys.x.set(stepper.x0);
    sys.xv = 0;
    sys.evaluate();
  }

  /**
   * Integrates to `until` or to the first watch, whichever comes first. A watch fires when its value crosses the threshold;
   * one already beyond does not. Several at one instant are all in `fired`.
   */
  advance(until: number, watches: readonly TransientWatch[] = [], onStep?: (time: number) => void): AdvanceReport {
    const { events, stepper } = this;
    const happened: Happening[] = [];
    events.watches = watches;
    if (events.values.length !== events.count) {
      events.values = new Float64Array(events.count);
      this.before = new Float64Array(events.count);
    }
    const report = (fired: number[], failed?: string): AdvanceReport => ({
      time: this.time,
      fired,
      happened,
      ...(failed ? { failed } : {}),
    });
    let failures = 0;
    let refused = false;
    const begun = stepper.newtons;
    this.stale = true;
    for (let count = 0; this.time < until - LEAST_STEP; count++) {
      if (count >= this.maxSteps) return report([], `more than ${this.maxSteps} steps: it changes without end`);
      if (stepper.newtons - begun > MAX_ITERATIONS) return report([], `more than ${MAX_ITERATIONS} iterations: it changes without end`);
      if (this.stale) this.prepare(happened);
      const edge = Math.min(until, this.ramps.next(this.time));
      let h = Math.min(this.h, this.maxStep);
      const left = edge - this.time;
      if (h > left * 0.999) h = left;
      else if (2 * h > left) h = 0.5 * left;
      if (!this.trial(h, this.trouble > PATIENCE)) {
        this.counts.rejected++;
        refused = true;
        this.trouble++;
        this.h = 0.25 * h;
        stepper.smooth = false;
        if (++failures > 60 || this.h < LEAST_STEP) return report([], 'no solution in time: the equations do not converge');
        continue;
      }
      if (stepper.error > 1 && h > 1e-9) {
        this.counts.rejected++;
        this.h = h * Math.max(SHRINK, SAFETY * stepper.error ** (-1 / 3));
        refused = true;
        continue;
      }
      let fired = this.fired();
      let taken = h;
      if (fired.length > 0) {
        taken = this.locate(h);
        if (taken === 0) {
          this.counts.rejected++;
          this.h = 0.1 * h;
          stepper.smooth = false;
          if (++failures > 60 || this.h < LEAST_STEP) return report([], 'no solution in time at an event: the equations do not converge');
          continue;
        }
        fired = this.fired();
      }
      failures = 0;
      this.trouble = Math.max(0, this.trouble - 0.3);
      const grown = taken * Math.min(refused ? 1 : GROWTH, Math.max(SHRINK, SAFETY * Math.max(stepper.error, 1e-6) ** (-1 / 3)));
      refused = false;
      this.commit(taken, edge);
      if (taken === h || grown > this.h) this.h = grown;
      onStep?.(this.time);
      if (fired.length > 0) {
        this.counts.events += fired.length;
        const seen = this.handle(fired, happened);
        if (seen.length > 0) return report(seen);
      }
    }
    return report([]);
  }

  /** Contacts that must be left at once, and the event values at the start of the next step. */
  private prepare(happened: Happening[]): void {
    const { events, sys } = this;
    sys.parameters.set(this.parameters);
    this.ramps.apply(this.time, this.parameters, true);
    this.ramps.trim(this.time);
    if (this.parameters.some((value, i) => value !== sys.parameters[i])) this.jumped();
    this.refresh();
    events.evaluate(this.stepper.x0, this.before);
    let left = false;
    for (let a = 0; a < this.contacts.length; a++) {
      if (this.before[3 * a + 2]! <= LEAVES) continue;
      this.leave(a, happened);
      left = true;
    }
    if (left) {
      sys.evaluate();
      events.evaluate(this.stepper.x0, this.before);
    }
    this.stale = false;
  }

  private leave(a: number, happened: Happening[]): void {
    const { sys, events } = this;
    if (this.contacts[a] === 'pinned') {
      const outward = sys.net0[a]! + events.jumpOf(a) > -sys.net0[a]!;
      if (outward) sys.enter(a, sys.cell[a]! + 1);
      this.crossed[a]!.count = 0;
    } else happened.push({ time: this.time, actuator: a, what: 'stop left' });
    this.contacts[a] = 'free';
    sys.held[a] = 0;
  }

  private trial(h: number, patient = false): boolean {
    if (!this.stepper.trial(this.time, h, patient)) return false;
    this.events.evaluate(this.stepper.x1, this.events.values);
    return true;
  }

  /** Events that happened between `before` and `values`. */
  private fired(): number[] {
    const { values } = this.events;
    const fired: number[] = [];
    for (let e = 0; e < values.length; e++) if (values[e]! >= 0 && this.before[e]! < 0) fired.push(e);
    // A body that stands exactly on a knot and goes back over it, or a contact that is about to be left.
    for (let e = 0; e < 3 * this.contacts.length; e++) {
      if (this.before[e]! >= 0 && values[e]! > this.events.toleranceOf(e) && values[e]! > this.before[e]! && !fired.includes(e))
        fired.push(e);
    }
    return fired;
  }

  /**
   * Finds the step at which the first event has just happened (Illinois, each trial a whole step from the start). Where a trial does not
   * converge, the longest step without event is taken instead; 0: there is none.
   */
  private locate(h: number): number {
    const { events } = this;
    let low = 0;
    let high = h;
    const atLow = Float64Array.from(this.before);
    const atHigh = Float64Array.from(events.values);
    let fired = this.fired();
    let last = 0;
    for (let k = 0; k < 60; k++) {
      let event = fired[0]!;
      let guess = Number.POSITIVE_INFINITY;
      let done = true;
      for (const e of fired) {
        if (atHigh[e]! > events.toleranceOf(e)) done = false;
        const from = Math.min(atLow[e]!, 0);
        const at = low + ((high - low) * -from) / Math.max(atHigh[e]! - from, 1e-300);
        if (at < guess) {
          guess = at;
          event = e;
        }
      }
      if (done || high - low < 1e-13 * Math.max(1, this.time)) break;
      // Aim a little past the crossing, so that the answer lies on its far side.
      const past = (0.5 * events.toleranceOf(event) * (high - low)) / Math.max(atHigh[event]! - Math.min(atLow[event]!, 0), 1e-300);
      let at = Math.min(high - 1e-3 * (high - low), Math.max(low + 1e-3 * (high - low), guess + past));
      if (k > 20 && k % 3 === 0) at = 0.5 * (low + high);
      if (!this.trial(at)) {
        at = 0.5 * (low + high);
        if (!this.trial(at)) return low > 0 && this.trial(low) ? low : 0;
      }
      const now = this.fired();
      if (now.length > 0) {
        high = at;
        fired = now;
        atHigh.set(events.values);
        if (last > 0) atLow[event]! *= 0.5;
        last = 1;
      } else {
        low = at;
        atLow.set(events.values);
        if (last < 0) atHigh[event]! *= 0.5;
        last = -1;
      }
    }
    if (this.trial(high)) return high;
    return low > 0 && this.trial(low) ? low : 0;
  }

  private commit(h: number, edge: number): void {
    const end = this.time + h;
    const atEdge = Math.abs(end - edge) < 1e-12 * Math.max(1, Math.abs(edge));
    this.time = atEdge ? edge : end;
    this.stepper.accept();
    this.parameters.set(this.sys.parameters);
    this.counts.steps++;
    // The event values as they stand now are the start of the next step.
    const spare = this.before;
    this.before = this.events.values;
    this.events.values = spare;
    if (atEdge && this.ramps.pending) this.stale = true;
  }

  /** Acts on events of bodies; returns the watches that fired. */
  private handle(fired: readonly number[], happened: Happening[]): number[] {
    const bodies = this.contacts.length;
    const seen: number[] = [];
    for (const e of fired) {
      if (e >= 3 * bodies) seen.push(e - 3 * bodies);
      else if (e % 3 === 2) this.leave(Math.floor(e / 3), happened);
      else this.cross(Math.floor(e / 3), e % 3 === 0 ? 1 : -1, happened);
    }
    if (seen.length < fired.length) this.stale = true;
    return seen;
  }

  /** A body has passed a knot: a stop holds it, else the next cell begins. */
  private cross(a: number, direction: 1 | -1, happened: Happening[]): void {
    const { sys, network } = this;
    const spec = network.spec.actuators[a]!;
    const cell = sys.cell[a]!;
    const knot = sys.knots[a]![direction > 0 ? cell : cell - 1]!;
    const stop = Math.abs(knot - (direction > 0 ? spec.high : spec.low)) < 1e-9;
    if (stop && !(this.freeStops[a] ?? false)) {
      this.hold(a, direction > 0 ? 'high' : 'low', knot);
      happened.push({ time: this.time, actuator: a, what: 'stop reached' });
      return;
    }
    const before = sys.fixed0[a]! + sys.fixed1[a]! * (knot - sys.ref[a]!);
    const area = Float64Array.from(sys.area);
    sys.enter(a, cell + direction);
    const jump = sys.fixed0[a]! + sys.fixed1[a]! * (knot - sys.ref[a]!) - before;
    happened.push({ time: this.time, actuator: a, what: 'knot' });
    const crossed = this.crossed[a]!;
    if (crossed.knot === knot && this.time - crossed.time < NO_TIME) crossed.count++;
    else crossed.count = 1;
    crossed.knot = knot;
    crossed.time = this.time;
    // What comes in or goes out at the knot: a force, or the area of a stage under its present pressure.
    let whole = jump;
    const otherArea = area.some((size, c) => size !== sys.area[c]);
    for (let c = network.chamberStart[a]!; c < network.chamberStart[a + 1]!; c++) {
      const more = sys.area[c]! - area[c]!;
      this.events.areaJump[c] = direction * more;
      whole += more * (sys.p[network.chamberNodes[c]!]! - network.chamberHeads[c]!);
    }
    if (Math.abs(whole) > 1e-9) {
      // Forces on both sides may press towards the knot: then the body rests on it.
      const below = direction > 0 ? sys.net0[a]! : sys.net0[a]! + whole;
      const above = direction > 0 ? sys.net0[a]! + whole : sys.net0[a]!;
      if ((crossed.count >= CROSSINGS || otherArea) && below > 0 && above < 0) {
        sys.enter(a, direction > 0 ? cell : cell - 1);
        this.events.jump[a] = direction * jump;
        this.hold(a, 'pinned', knot);
      }
    }
    if (Math.abs(jump) > 1e-9 || otherArea) this.jumped();
  }

  private hold(a: number, contact: ActuatorContact, at: number): void {
    this.contacts[a] = contact;
    this.sys.held[a] = 1;
    this.stepper.x0[a] = at;
    this.stepper.y0[this.network.firstVelocity + a] = 0;
    this.jumped();
  }
}
