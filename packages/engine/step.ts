/**
 * One step in time: singly diagonally implicit Runge-Kutta of two stages and second order, L-stable and stiffly accurate
 * (gamma = 1 - 1/sqrt 2; Alexander, SIAM J. Numer. Anal. 14 (1977) 1006). Positions are eliminated: x = x* + gamma h v.
 * The error is estimated from the slopes at 0, gamma and 1, passed once through the factored matrix for pressures so that fast modes
 * which have died do not count.
 */
import type { Storage } from './charge.ts';
import type { Network } from './compile.ts';
import type { Ramps } from './ramps.ts';
import type { System } from './residual.ts';
import { PRESSURE_CAP } from './tolerances.ts';

const GAMMA = 1 - Math.SQRT1_2;
/**
 * Weights of the slopes at 0, gamma, 1 that estimate the local error. All that sum to zero and kill straight lines are multiples of one
 * another; these are right for y' = lambda y (the stages are of first order), and several times too large for a mere integral of time.
 */
const B1 = (1 / 6 - GAMMA + (GAMMA * GAMMA) / 2) / (GAMMA * GAMMA * (GAMMA - 1));
const E1 = B1 - (1 - GAMMA);
const E2 = 0.5 - B1 * GAMMA - GAMMA;
const E0 = -E1 - E2;
/** Newton in a stage: converged below this relative change; most iterations, and when shorter steps have failed too. */
const STAGE_TIGHT = 1e-5;
const STAGE_ITERATIONS = 8;
const PATIENT_ITERATIONS = 25;
/** A turning body without stops is followed to this many times the tolerance: 0.001 rad where a rod is followed to 0.01 mm. */
const ENDLESS = 100;
/** Widening of blends on the way to a stage that is not reached directly. */
const SOFT_BLEND = 10;
/** Weight of a way (m, rad) against a relative change: 1e-10 m is converged. */
const WAY = 1e3;

export interface StepTolerance {
  readonly position: number;
  readonly positionRelative: number;
  readonly pressure: number;
  readonly pressureRelative: number;
  readonly velocity: number;
}

export class Stepper {
  readonly sys: System;
  readonly storage: Storage;
  private readonly net: Network;
  private readonly ramps: Ramps;
  private readonly dynamics: boolean;
  private readonly tolerance: StepTolerance;
  /** State at the start of the step. */
  readonly y0: Float64Array;
  readonly x0: Float64Array;
  /** Slopes at the start: of stored volumes and speeds; valid when `smooth`. */
  private readonly k0: Float64Array;
  smooth = false;
  /** State at the end of the trial. */
  readonly y1: Float64Array;
  readonly x1: Float64Array;
  private readonly kg: Float64Array;
  private readonly k1: Float64Array;
  private readonly ya: Float64Array;
  private readonly base: Float64Array;
  private readonly s0: Float64Array;
  private readonly xb: Float64Array;
  private readonly d: Float64Array;
  private readonly keep: Float64Array;
  /** Inertia of rows: bodies (scaled) and lines; 0: algebraic. */
  private readonly inertia: Float64Array;
  newtons = 0;
  private patient = false;
  private limits = true;
  /** Weighted error of the last trial; <= 1 is accepted. */
  error = 0;

  constructor(sys: System, storage: Storage, ramps: Ramps, dynamics: boolean, tolerance: StepTolerance) {
    const { net } = sys;
    const n = net.size;
    this.sys = sys;
    this.net = net;
    this.storage = storage;
    this.ramps = ramps;
    this.dynamics = dynamics;
    this.tolerance = tolerance;
    this.y0 = new Float64Array(n);
    this.y1 = new Float64Array(n);
    this.ya = new Float64Array(n);
    this.k0 = new Float64Array(n);
    this.kg = new Float64Array(n);
    this.k1 = new Float64Array(n);
    this.base = new Float64Array(n);
    this.s0 = new Float64Array(n);
    this.d = new Float64Array(n);
    this.keep = new Float64Array(n);
    this.x0 = new Float64Array(sys.x.length);
    this.x1 = new Float64Array(sys.x.length);
    this.xb = new Float64Array(sys.x.length);
    this.inertia = new Float64Array(n);
    if (dynamics) {
      net.spec.actuators.forEach((actuator, a) => {
        this.inertia[net.firstVelocity + a] = actuator.mass / net.forceScale[a]!;
      });
      net.spec.elements.forEach((element, e) => {
        if (element.type !== 'line') return;
        const area = (Math.PI * element.bore * element.bore) / 4;
        this.inertia[net.ownOf[e]!] = (element.rho * element.length * 1e-9) / area;
      });
    }
  }

  /** Forgets the slopes: after a jump of anything. */
  restart(): void {
    this.smooth = false;
  }

  /** Tries a step of length h from (y0, x0) at `time`; false: no convergence (`patient` tries harder). Leaves (y1, x1) and `error`. */
  trial(time: number, h: number, patient = false): boolean {
    this.patient = patient;
    const { sys, net, storage, y0, y1, ya, x0, x1, xb, base, s0, kg, k1 } = this;
    const n = net.size;
    const gh = GAMMA * h;
    const bodies = x0.length;
    for (let a = 0; a < bodies; a++) xb[a] = x0[a]! + gh * y0[net.firstVelocity + a]!;
    storage.setPositions(xb, sys.area);
    for (let i = 0; i < n; i++) {
      sys.y[i] = y0[i]!;
      s0[i] = this.stored(i, y0[i]!);
    }
    base.set(s0);
    xb.set(x0);
    if (!this.stage(time + gh, gh) && !(patient && this.softened(time + gh, gh, y0))) return false;
    ya.set(sys.y);
    for (let i = 0; i < n; i++) {
      kg[i] = (this.stored(i, ya[i]!) - s0[i]!) / gh;
      base[i] = s0[i]! + (1 - GAMMA) * h * kg[i]!;
      sys.y[i] = ya[i]!;
    }
    for (let a = 0; a < bodies; a++) xb[a] = x0[a]! + (1 - GAMMA) * h * ya[net.firstVelocity + a]!;
    if (!this.stage(time + h, gh) && !(patient && this.softened(time + h, gh, ya))) return false;
    y1.set(sys.y);
    x1.set(sys.x);
    for (let i = 0; i < n; i++) k1[i] = (this.stored(i, y1[i]!) - base[i]!) / gh;
    sys.observe();
    this.error = this.estimate(h);
    return Number.isFinite(this.error);
  }

  /** Takes the trial as the new state. */
  accept(): void {
    const { y0, y1, x0, x1, k0, k1 } = this;
    y0.set(y1);
    x0.set(x1);
    k0.set(k1);
    this.smooth = true;
  }

  /** Differential content of a row: stored volume of a node, momentum of a body or line; 0 where algebraic. */
  private stored(i: number, value: number): number {
    if (i < this.net.free) {
      this.storage.at(i, value);
      return this.storage.value;
    }
    return this.inertia[i]! * value;
  }

  /** A stage by way of softened laws, from `start`: valves that open and close in turn are met half-way. */
  private softened(time: number, gh: number, start: Float64Array): boolean {
    const { sys } = this;
    sys.y.set(start);
    sys.blend = SOFT_BLEND;
    const near = this.stage(time, gh);
    sys.blend = 1;
    if (near && this.stage(time, gh)) return true;
    // A body that slips with its friction nearly full is found by plain Newton steps.
    sys.y.set(start);
    this.limits = false;
    const plain = this.stage(time, gh);
    this.limits = true;
    return plain;
  }

  /** Newton on one stage: base + gamma h (right side) = stored; bodies at xb + gamma h v. */
  private stage(time: number, gh: number): boolean {
    const { sys, net, d, keep } = this;
    const { y, lu } = sys;
    const n = y.length;
    this.ramps.apply(time, sys.parameters, false);
    let norm = this.evaluate(gh);
    const patient = this.patient;
    const most = patient ? PATIENT_ITERATIONS : STAGE_ITERATIONS;
    for (let k = 0; k < most; k++) {
      this.newtons++;
      if (!Number.isFinite(norm) || !lu.factor(sys.j)) return false;
      lu.solve(sys.r, d);
      for (let i = 0; i < n; i++) d[i] = -d[i]!;
      const limited = this.limits && sys.limitSpeeds(y, d);
      let change = 0;
      for (let i = 0; i < n; i++) {
        let size = Math.abs(d[i]!) / (1 + Math.abs(y[i]!));
        // In a very short step a speed or flow counts by the way it makes: it is ill-determined and harmless.
        if (i >= net.firstVelocity) size = Math.min(size, Math.abs(d[i]!) * gh * WAY);
        if (!(size <= change)) change = size;
      }
      if (!Number.isFinite(change)) return false;
      if (change < STAGE_TIGHT && !limited) {
        // What is left is of second order in the change: no need to look again.
        for (let i = 0; i < n; i++) y[i] = y[i]! + d[i]!;
        this.place(gh);
        return true;
      }
      keep.set(y);
      let largest = 0;
      for (let i = 0; i < net.free; i++) {
        const size = d[i]! < 0 ? -d[i]! : d[i]!;
        if (size > largest) largest = size;
      }
      const cap = largest > PRESSURE_CAP ? PRESSURE_CAP / largest : 1;
      let share = cap;
      for (let halvings = 0; ; halvings++) {
        for (let i = 0; i < n; i++) y[i] = keep[i]! + share * d[i]!;
        const now = this.evaluate(gh);
        if (now < norm || (limited && (patient || now < 10 * norm)) || change < 1e-4 || halvings >= (patient ? 10 : 6)) {
          norm = now;
          break;
        }
        share *= 0.5;
      }
    }
    return false;
  }

  /** Positions that belong to the speeds of a stage. */
  private place(gh: number): void {
    const { sys, net, xb } = this;
    for (let a = 0; a < xb.length; a++) sys.x[a] = xb[a]! + gh * (sys.held[a] ? 0 : sys.y[net.firstVelocity + a]!);
  }

  /** Stage residual and Jacobian into sys.r, sys.j; returns the length of the residual. */
  private evaluate(gh: number): number {
    const { sys, net, storage, base, inertia } = this;
    const { r, j, y, x } = sys;
    const over = 1 / gh;
    sys.xv = gh;
    this.place(gh);
    sys.evaluate();
    let sum = storage.stamp(y, base, over, r, j);
    for (let i = net.free; i < net.size; i++) {
      const mass = inertia[i]!;
      if (mass > 0 && !(i < net.firstVelocity + x.length && sys.held[i - net.firstVelocity])) {
        r[i]! -= (mass * y[i]! - base[i]!) * over;
        j[net.diagonal[i]!]! -= mass * over;
      }
      sum += r[i]! * r[i]!;
    }
    return Math.sqrt(sum);
  }

  /** Largest weighted error of positions, stored oil and (loosely, or tightly with inertia) pressures and speeds. */
  private estimate(h: number): number {
    const { net, sys, d, y0, y1, ya, k0, kg, k1, x0, x1, tolerance, inertia } = this;
    const over = 1 / (GAMMA * h);
    const e0 = this.smooth ? E0 : 0;
    // Without slopes at the start: what the two stages differ by.
    const e1 = this.smooth ? E1 : E1 + E0;
    let worst = 0;
    for (let a = 0; a < x0.length; a++) {
      const v = net.firstVelocity + a;
      const error = Math.abs(h * (e0 * y0[v]! + e1 * ya[v]! + E2 * y1[v]!));
      // Relative to the position, of a turning motor to what one step turns.
      const scale = Math.max(Math.min(Math.abs(x1[a]!), 1), Math.abs(x1[a]! - x0[a]!));
      const size = error / (tolerance.position * (net.endless[a] ? ENDLESS : 1) + tolerance.positionRelative * scale);
      if (size > worst) worst = size;
    }
    for (let i = 0; i < net.size; i++) {
      const differential = i < net.free || inertia[i]! > 0;
      d[i] = differential ? -h * over * (e0 * k0[i]! + e1 * kg[i]! + E2 * k1[i]!) : 0;
      if (i >= net.firstVelocity && i < net.firstVelocity + x0.length && sys.held[i - net.firstVelocity]) d[i] = 0;
    }
    sys.lu.solve(d, d);
    for (let i = 0; i < net.free; i++) {
      const size = Math.abs(d[i]!) / (tolerance.pressure + tolerance.pressureRelative * Math.abs(y1[i]!));
      if (!(size <= worst)) worst = size;
    }
    if (this.dynamics) {
      for (let i = net.firstVelocity; i < net.size; i++) {
        if (inertia[i] === 0) continue;
        const size = Math.abs(d[i]!) / (tolerance.velocity + tolerance.positionRelative * Math.abs(y1[i]!));
        if (!(size <= worst)) worst = size;
      }
    }
    return worst;
  }
}
