/** What can end a step early: knots of a body's way, stops left, watches. Each is a function that becomes positive when it happens. */
import { chargeOil } from './charge.ts';
import type { System } from './residual.ts';
import type { ActuatorContact, TransientWatch } from './results.ts';
import type { Stepper } from './step.ts';
import { EVENT_OTHER, EVENT_POSITION, EVENT_PRESSURE } from './tolerances.ts';

export class Events {
  private readonly sys: System;
  private readonly stepper: Stepper;
  readonly contacts: ActuatorContact[];
  watches: readonly TransientWatch[] = [];
  /** Three a body (knot above, knot below, contact), then the watches. */
  values: Float64Array = new Float64Array(0);
  private flows: Float64Array;
  /** Fixed force that comes in on the upper side of the knot a body is pinned at, kN. */
  readonly jump: Float64Array;
  /** Area that comes in there, by chamber, 1e-3 m2 (stages of a telescopic cylinder). */
  readonly areaJump: Float64Array;

  constructor(sys: System, stepper: Stepper, contacts: ActuatorContact[]) {
    this.sys = sys;
    this.stepper = stepper;
    this.contacts = contacts;
    this.flows = new Float64Array(sys.net.flowRows.length);
    this.jump = new Float64Array(contacts.length);
    this.areaJump = new Float64Array(sys.net.chamberNodes.length);
  }

  get count(): number {
    return 3 * this.contacts.length + this.watches.length;
  }

  /** Evaluates all at a state (y in sys.y as last evaluated, positions x). */
  evaluate(x: Float64Array, into: Float64Array): void {
    const { sys, contacts } = this;
    for (let a = 0; a < contacts.length; a++) {
      const contact = contacts[a]!;
      const knots = sys.knots[a]!;
      const cell = sys.cell[a]!;
      const moves = contact === 'free';
      into[3 * a] = moves && cell < knots.length ? x[a]! - knots[cell]! : -1;
      into[3 * a + 1] = moves && cell > 0 ? knots[cell - 1]! - x[a]! : -1;
      const net = sys.net0[a]! / sys.net.forceScale[a]!;
      into[3 * a + 2] =
        contact === 'low'
          ? net
          : contact === 'high'
            ? -net
            : contact === 'pinned'
              ? Math.max(net + this.jumpOf(a) / sys.net.forceScale[a]!, -net)
              : -1;
    }
    const first = 3 * contacts.length;
    this.watches.forEach((watch, w) => {
      into[first + w] = (watch.edge === 'rising' ? 1 : -1) * (this.valueOf(watch, x) - watch.threshold);
    });
  }

  /** Force that comes in on the upper side of the knot a body is pinned at, at the present pressures, kN. */
  jumpOf(a: number): number {
    const { net, p } = this.sys;
    let force = this.jump[a]!;
    for (let c = net.chamberStart[a]!; c < net.chamberStart[a + 1]!; c++) {
      if (this.areaJump[c] !== 0) force += this.areaJump[c]! * (p[net.chamberNodes[c]!]! - net.chamberHeads[c]!);
    }
    return force;
  }

  valueOf(watch: TransientWatch, x: Float64Array): number {
    const { sys } = this;
    let sum = 0;
    let flowsKnown = false;
    for (const term of watch.terms) {
      let value = 0;
      if (term.of === 'pressure') value = sys.p[term.index]!;
      else if (term.of === 'position') value = x[term.index]!;
      else if (term.of === 'velocity') value = sys.held[term.index] ? 0 : sys.y[sys.net.firstVelocity + term.index]!;
      else if (term.of === 'oil') {
        const charge = this.stepper.storage.charges[term.index];
        if (charge) value = chargeOil(charge, sys.p[charge.spec.node]!).value;
      } else {
        if (!flowsKnown) sys.flows(this.flows);
        flowsKnown = true;
        value = this.flows[term.index]!;
      }
      sum += term.weight * value;
    }
    return sum;
  }

  /** How far past its crossing an event may be left. */
  toleranceOf(e: number): number {
    const bodies = 3 * this.contacts.length;
    if (e < bodies) return e % 3 === 2 ? EVENT_PRESSURE : EVENT_POSITION;
    const watch = this.watches[e - bodies]!;
    const of = watch.terms[0]?.of;
    const size = Math.abs(watch.terms[0]?.weight ?? 1) || 1;
    return size * (of === 'pressure' ? EVENT_PRESSURE : of === 'position' ? EVENT_POSITION : EVENT_OTHER);
  }
}
