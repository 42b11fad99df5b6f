/** Damped Newton and its fall-backs on one System; every stage reports whether it converged and what it spent. */
import type { System } from './residual.ts';
import {
  ARMIJO,
  HALVINGS,
  LOOSE,
  NEWTON_ITERATIONS,
  PRESSURE_CAP,
  PSEUDO_FIRST,
  PSEUDO_ITERATIONS,
  PSEUDO_LARGEST,
  RESIDUAL,
  TIGHT,
} from './tolerances.ts';

/** Pseudo storage of the pseudo-transients, L/MPa, t per 1e-3 m2, MPa s/L: of the order of a real net, its value only sets the pseudo time. */
const PSEUDO_STORAGE = 1e-2;

/** How often a line search may end uphill, and with which share of its step. */
const STUCK = 4;
const UPHILL = 0.125;
/** Residual below which nothing more is asked, L/s, MPa. */
const POLISHED = 1e-11;
/** Most steps spent on a balance behind converged pressures. */
const MOST_POLISHING = 8;

export class Solver {
  readonly sys: System;
  iterations = 0;
  /** Largest residual of the last evaluation. */
  residual = Number.POSITIVE_INFINITY;
  /** Largest relative change of the last Newton step, for the reason of a failure. */
  change = Number.POSITIVE_INFINITY;
  private readonly d: Float64Array;
  private readonly y0: Float64Array;
  private readonly values: Float64Array;

  constructor(sys: System) {
    this.sys = sys;
    this.d = new Float64Array(sys.net.size);
    this.y0 = new Float64Array(sys.net.size);
    this.values = new Float64Array(sys.net.entries + 1);
  }

  /** Euclidean length of the residual; keeps its largest entry. */
  private length(): number {
    const { r, net } = this.sys;
    let sum = 0;
    let largest = 0;
    for (let i = 0; i < net.size; i++) {
      const value = r[i]!;
      const size = value < 0 ? -value : value;
      if (size > largest) largest = size;
      sum += value * value;
    }
    this.residual = largest;
    return Math.sqrt(sum);
  }

  /** Share of the whole step that keeps every pressure change under the cap. */
  private cap(): number {
    let largest = 0;
    for (let i = 0; i < this.sys.net.free; i++) largest = Math.max(largest, Math.abs(this.d[i]!));
    return largest > PRESSURE_CAP ? PRESSURE_CAP / largest : 1;
  }

  /** Clips every pressure change to the cap (each by itself: one volume without outlet must not hold up the rest); true when one was. */
  private clip(): boolean {
    const { d } = this;
    const free = this.sys.net.free;
    let clipped = false;
    for (let i = 0; i < free; i++) {
      if (d[i]! > PRESSURE_CAP) d[i] = PRESSURE_CAP;
      else if (d[i]! < -PRESSURE_CAP) d[i] = -PRESSURE_CAP;
      else continue;
      clipped = true;
    }
    return clipped;
  }

  private largestChange(): number {
    const { y } = this.sys;
    let largest = 0;
    for (let i = 0; i < y.length; i++) {
      const size = Math.abs(this.d[i]!) / (1 + Math.abs(y[i]!));
      if (!(size <= largest)) largest = size;
    }
    return largest;
  }

  /** Newton with residual line search, from the present y. */
  newton(most = NEWTON_ITERATIONS): boolean {
    const { sys, d, y0 } = this;
    const { y } = sys;
    const n = y.length;
    sys.evaluate();
    let length = this.length();
    let polished = -1;
    let stuck = 0;
    for (let k = 0; k < most; k++) {
      this.iterations++;
      if (!Number.isFinite(length) || !sys.lu.factor(sys.j)) return false;
      sys.lu.solve(sys.r, d);
      for (let i = 0; i < n; i++) d[i] = -d[i]!;
      this.change = this.largestChange();
      if (!Number.isFinite(this.change)) return false;
      const limited = sys.limitSpeeds(y, d);
      // With widened laws the direction is worth keeping; with sharp ones a single closed volume would stop everything.
      let share = sys.blend > 1 ? this.cap() : 1;
      const clipped = share < 1 || this.clip();
      y0.set(y);
      let halvings = 0;
      for (;;) {
        for (let i = 0; i < n; i++) y[i] = y0[i]! + share * d[i]!;
        sys.evaluate();
        const now = this.length();
        if (now <= (1 - ARMIJO * share) * length || (limited && now < 1.2 * length) || (this.change < LOOSE && now < 1e-7)) {
          length = now;
          break;
        }
        if (polished >= 0 || ++halvings > HALVINGS) {
          if (polished < 0 && stuck++ < STUCK) {
            // Uphill now and then: most often the way leads over the edge of a valve that opens or shuts.
            share = UPHILL;
            for (let i = 0; i < n; i++) y[i] = y0[i]! + share * d[i]!;
            sys.evaluate();
            length = this.length();
            break;
          }
          // No better than it was: converged already, or not to be had.
          y.set(y0);
          sys.evaluate();
          this.length();
          return polished >= 0;
        }
        share *= 0.5;
      }
      if (share === 1 && !limited && !clipped && (this.change < TIGHT || (this.change < LOOSE && this.residual < RESIDUAL))) {
        // Steep passages leave a balance behind pressures that have converged: two steps more, a few where a flow is still missing.
        if (this.residual < POLISHED || ++polished >= (this.residual < RESIDUAL ? 2 : MOST_POLISHING)) return true;
      }
    }
    return false;
  }

  /** Factors D/tau - J and solves for d with right side r (plus D (y0 - y)/tau for backward Euler). */
  private pseudoStep(tau: number, back?: Float64Array): boolean {
    const { sys, d, values } = this;
    const { net } = sys;
    for (let k = 0; k < net.entries; k++) values[k] = -sys.j[k]!;
    const weight = PSEUDO_STORAGE / tau;
    for (let i = 0; i < net.size; i++) {
      d[i] = sys.r[i]!;
      if (this.algebraic(i)) continue;
      values[net.diagonal[i]!]! += weight;
      if (back) d[i]! -= weight * (sys.y[i]! - back[i]!);
    }
    if (!sys.lu.factor(values)) return false;
    sys.lu.solve(d, d);
    return true;
  }

  /** Rows that are conditions (held bodies, held pressures), not balances. */
  private algebraic(i: number): boolean {
    const { net } = this.sys;
    const a = i - net.firstVelocity;
    if (a >= 0 && a < this.sys.held.length) return this.sys.held[a] === 1;
    return i < net.free && !Number.isNaN(this.sys.pinned[i]!);
  }

  /** Linearly implicit pseudo-transient with switched evolution relaxation, then Newton. */
  pseudoTransient(most = PSEUDO_ITERATIONS): boolean {
    const { sys, d, y0 } = this;
    const { y } = sys;
    const n = y.length;
    let tau = PSEUDO_FIRST;
    sys.evaluate();
    let length = this.length();
    let rest = 25;
    for (let k = 0; k < most; k++) {
      this.iterations++;
      y0.set(y);
      if (!Number.isFinite(length) || !this.pseudoStep(tau)) return false;
      this.clip();
      for (let i = 0; i < n; i++) y[i] = y0[i]! + d[i]!;
      sys.evaluate();
      const now = this.length();
      if (!Number.isFinite(now) || now > 100 * length) {
        y.set(y0);
        sys.evaluate();
        tau *= 0.1;
        if (tau < 1e-12) return false;
        continue;
      }
      const ratio = length / Math.max(now, 1e-300);
      tau = Math.min(PSEUDO_LARGEST, tau * Math.min(10, Math.max(0.2, ratio > 1 ? ratio * 1.2 : ratio)));
      length = now;
      if ((tau > 1 || this.residual < 1e-5) && --rest <= 0) {
        rest = 25;
        y0.set(y);
        const kept = Float64Array.from(y);
        if (this.newton()) return true;
        y.set(kept);
        sys.evaluate();
        length = this.length();
      }
      if (this.residual < RESIDUAL && tau > 1e3) return this.newton();
    }
    return this.newton();
  }

  /** Backward Euler in pseudo time, each step solved by a few Newton iterations; slow and patient. */
  backwardEuler(most: number): boolean {
    const { sys, d } = this;
    const { y } = sys;
    const n = y.length;
    const back = new Float64Array(n);
    let tau = PSEUDO_FIRST;
    const limit = this.iterations + most;
    while (this.iterations < limit) {
      back.set(y);
      let done = false;
      for (let k = 0; k < 8; k++) {
        this.iterations++;
        sys.evaluate();
        this.length();
        if (!this.pseudoStep(tau, back)) break;
        const clipped = this.clip();
        for (let i = 0; i < n; i++) y[i]! += d[i]!;
        if (!clipped && this.largestChange() < 1e-6) {
          done = true;
          break;
        }
      }
      if (!done) {
        y.set(back);
        tau *= 0.25;
        if (tau < 1e-9) return false;
        continue;
      }
      tau *= 2;
      if (tau > 10) {
        const kept = Float64Array.from(y);
        if (this.newton()) return true;
        y.set(kept);
        if (tau > PSEUDO_LARGEST) return false;
      }
    }
    return this.newton();
  }
}
