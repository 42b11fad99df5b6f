/** The one residual: flow balance at every node, force balance of every body, own equations of elements, with the Jacobian. */
import type { Network } from './compile.ts';
import { MAX_INPUTS, MAX_OUTPUTS, OPENING } from './laws/law.ts';
import type { LoadState } from './network.ts';
import {
  magnitude,
  magnitudeSlope,
  onset,
  onsetSlope,
  ramp,
  rampSlope,
  resisting,
  resistingSlope,
  sliding,
  slidingSlope,
} from './smooth.ts';
import { SparseLu } from './sparse/lu.ts';
import { cellOf, insideOf, lineAt, sortedKnots, sumAt } from './tables.ts';
import {
  BAND_EDGE,
  CEILING_ONSET,
  DELTA,
  FICTITIOUS,
  FLOOR_PRESSURE,
  FLOOR_STEADY,
  LEAST_DAMPING,
  RUNAWAY,
  SUPPLY_ONSET,
} from './tolerances.ts';

/** Stiffness of a soft stop against v, in MPa s/m of the scaled balance: only where rigid stops contradict each other. */
const SOFT_STOP = 1e6;

/** A network with the state in which it is being evaluated. `y` holds the unknowns; `r` and `j` what `evaluate` found. */
export class System {
  readonly net: Network;
  readonly lu: SparseLu;
  readonly y: Float64Array;
  /** Node pressures, fixed ones included. */
  readonly p: Float64Array;
  /** Sum of inflow, force balances over area (MPa), own equations; one spare row for fixed nodes. */
  readonly r: Float64Array;
  readonly j: Float64Array;
  parameters: Float64Array;
  /** Positions and d position/d velocity (0 in a steady solve, gamma h in a step). */
  readonly x: Float64Array;
  xv = 0;
  floor = FLOOR_STEADY;
  blend = 1;
  /** Bodies whose balance is replaced by v = 0. */
  readonly held: Uint8Array;
  /** -1, 1: a soft stop against inward, outward motion. */
  readonly soft: Int8Array;
  /** Net force (pressure + fixed loads, no friction) at the last evaluation, kN. */
  readonly net0: Float64Array;
  /** Node unknown -> pressure it is held at; NaN: free. */
  readonly pinned: Float64Array;
  /** Inflow found at pinned nodes. */
  readonly pinnedFlow: Float64Array;
  // Tables of each body in its present cell, as lines through `ref`.
  readonly knots: Float64Array[];
  readonly cell: Int32Array;
  readonly ref: Float64Array;
  readonly fixed0: Float64Array;
  readonly fixed1: Float64Array;
  readonly out0: Float64Array;
  readonly out1: Float64Array;
  readonly in0: Float64Array;
  readonly in1: Float64Array;
  readonly friction: Float64Array;
  readonly area: Float64Array;
  /** Unit of speed of each body: 1 m/s, or 1000 rad/s where no stop ends the way. */
  private readonly speed: Float64Array;
  private readonly loads: (LoadState | undefined)[];
  private readonly z = new Float64Array(MAX_INPUTS);
  readonly out = new Float64Array(MAX_OUTPUTS);
  readonly gradient = new Float64Array(MAX_INPUTS * MAX_OUTPUTS);
  private readonly own = new Float64Array(3);
  private anyPinned = false;

  constructor(net: Network) {
    const bodies = net.spec.actuators.length;
    this.net = net;
    this.lu = new SparseLu(net.size, net.start, net.rows, net.order);
    this.y = new Float64Array(net.size);
    this.p = Float64Array.from(net.fixedPressures);
    this.r = new Float64Array(net.size + 1);
    this.j = new Float64Array(net.entries + 1);
    this.parameters = net.parameters;
    this.x = new Float64Array(bodies);
    this.held = new Uint8Array(bodies);
    this.soft = new Int8Array(bodies);
    this.net0 = new Float64Array(bodies);
    this.pinned = new Float64Array(net.size).fill(Number.NaN);
    this.pinnedFlow = new Float64Array(net.size);
    this.knots = [...net.knots];
    this.cell = new Int32Array(bodies);
    this.ref = new Float64Array(bodies);
    this.fixed0 = new Float64Array(bodies);
    this.fixed1 = new Float64Array(bodies);
    this.out0 = new Float64Array(bodies);
    this.out1 = new Float64Array(bodies);
    this.in0 = new Float64Array(bodies);
    this.in1 = new Float64Array(bodies);
    this.friction = new Float64Array(bodies);
    this.area = new Float64Array(net.chamberNodes.length);
    this.speed = Float64Array.from(net.endless, (endless) => (endless ? 1000 : 1));
    this.loads = new Array<LoadState | undefined>(bodies).fill(undefined);
    for (let a = 0; a < bodies; a++) this.enter(a, 0);
  }

  /** Loads of a body; its knots are its own and those of the loads. The cell must be set again (`place`). */
  load(a: number, load: LoadState | undefined): void {
    if (this.loads[a] === load) return;
    this.loads[a] = load;
    const own = this.net.knots[a]!;
    this.knots[a] = load
      ? sortedKnots([
          ...own,
          ...load.fixed.flatMap((t) => t.at),
          ...load.resistOut.flatMap((t) => t.at),
          ...load.resistIn.flatMap((t) => t.at),
        ])
      : own;
    this.friction[a] = load?.friction ?? 0;
  }

  /** Puts a body at x; on a knot `side` decides, at a stop always the side inside the stroke. */
  place(a: number, x: number, side: -1 | 1 = 1): void {
    const { low, high } = this.net.spec.actuators[a]!;
    this.x[a] = x;
    this.enter(a, cellOf(this.knots[a]!, x, x >= high - 1e-9 ? -1 : x <= low + 1e-9 ? 1 : side));
  }

  /** Makes a cell the present one: all tables become lines. */
  enter(a: number, cell: number): void {
    const spec = this.net.spec.actuators[a]!;
    const inside = insideOf(this.knots[a]!, cell);
    const load = this.loads[a];
    this.cell[a] = cell;
    this.ref[a] = inside;
    const fixed = sumAt(load?.fixed ?? [], inside);
    const spring = spec.spring ? lineAt(spec.spring.at, spec.spring.force, inside) : { value: 0, slope: 0 };
    this.fixed0[a] = fixed.value + spring.value;
    this.fixed1[a] = fixed.slope + spring.slope;
    const resistOut = sumAt(load?.resistOut ?? [], inside);
    this.out0[a] = resistOut.value;
    this.out1[a] = resistOut.slope;
    const resistIn = sumAt(load?.resistIn ?? [], inside);
    this.in0[a] = resistIn.value;
    this.in1[a] = resistIn.slope;
    spec.chambers.forEach((chamber, i) => {
      let area = chamber.area;
      const steps = chamber.areaSteps;
      // Telescopic: the area of the stage in whose range the body is.
      if (steps) for (let s = 0; s < steps.at.length; s++) if (inside >= steps.at[s]!) area = steps.area[s]!;
      this.area[this.net.chamberStart[a]! + i] = area;
    });
  }

  pin(unknown: number, pressure: number): void {
    this.pinned[unknown] = pressure;
    this.anyPinned ||= !Number.isNaN(pressure);
  }
  unpinAll(): void {
    this.pinned.fill(Number.NaN);
    this.anyPinned = false;
  }

  /** Residual and Jacobian at `y`. */
  evaluate(): void {
    const { net, y, p, r, j, z, out, gradient, x, xv, floor, blend, parameters } = this;
    const { laws, general, inputStart, inputNodes, inputHeads, slotStart, slots, flowStart, flowRows, ownOf, nodeOf } = net;
    r.fill(0);
    j.fill(0);
    for (let i = 0; i < net.free; i++) p[nodeOf[i]!] = y[i]!;

    for (const batch of net.batches) batch.stamp(p, parameters, blend, floor, r, j);
    for (let k = 0; k < general.length; k++) {
      const e = general[k]!;
      const law = laws[e]!;
      const first = inputStart[e]!;
      const pressures = inputStart[e + 1]! - first;
      for (let i = 0; i < pressures; i++) z[i] = p[inputNodes[first + i]!]! - inputHeads[first + i]!;
      let inputs = pressures;
      const own = ownOf[e]!;
      if (own >= 0) z[inputs++] = y[own]!;
      if (law.actuator >= 0) z[inputs++] = x[law.actuator]!;
      const open = law.evaluate(z, parameters, blend, out, gradient);
      const terminals = law.terminals;
      if (open === false && !law.floor) continue;
      if (law.floor) {
        for (let t = 1; t < terminals; t++) {
          const leak = floor * (z[0]! - z[t]!);
          out[0]! += leak;
          out[t]! -= leak;
          gradient[0]! += floor;
          gradient[t]! -= floor;
          gradient[t * inputs]! -= floor;
          gradient[t * inputs + t]! += floor;
        }
      }
      const outputs = own >= 0 ? terminals + 1 : terminals;
      if (law.actuator >= 0) for (let o = 1; o <= outputs; o++) gradient[o * inputs - 1]! *= xv;
      const flow = flowStart[e]!;
      for (let t = 0; t < terminals; t++) r[flowRows[flow + t]!]! -= out[t]!;
      let s = slotStart[e]!;
      const stop = terminals * inputs;
      for (let g = 0; g < stop; g++) j[slots[s++]!]! -= gradient[g]!;
      if (own >= 0) {
        r[own]! += out[terminals]!;
        for (let g = stop; g < stop + inputs; g++) j[slots[s++]!]! += gradient[g]!;
      }
    }

    this.limits();
    for (let a = 0; a < x.length; a++) this.body(a);
    if (this.anyPinned) this.pins();
  }

  /** Fictitious outlet above the ceiling, supply below the floor pressure; grounds of separate parts. */
  private limits(): void {
    const { net, y, r, j } = this;
    for (let i = 0; i < net.free; i++) {
      const p = y[i]!;
      const ceiling = net.ceilings[net.nodeOf[i]!]!;
      if (p > ceiling) {
        r[i]! -= FICTITIOUS * onset(p - ceiling, CEILING_ONSET);
        j[net.diagonal[i]!]! -= FICTITIOUS * onsetSlope(p - ceiling, CEILING_ONSET);
      } else if (p < FLOOR_PRESSURE) {
        r[i]! += FICTITIOUS * onset(FLOOR_PRESSURE - p, SUPPLY_ONSET);
        j[net.diagonal[i]!]! -= FICTITIOUS * onsetSlope(FLOOR_PRESSURE - p, SUPPLY_ONSET);
      }
    }
    for (let k = 0; k < net.grounded.length; k++) {
      const i = net.unknownOf[net.grounded[k]!]!;
      r[i]! -= this.floor * y[i]!;
      j[net.diagonal[i]!]! -= this.floor;
    }
  }

  private body(a: number): void {
    const { net, y, p, r, j, xv } = this;
    const spec = net.spec.actuators[a]!;
    const row = net.firstVelocity + a;
    const v = y[row]!;
    const scale = 1 / net.forceScale[a]!;
    const from = this.x[a]! - this.ref[a]!;
    const diagonal = net.diagonal[row]!;
    const first = net.chamberStart[a]!;
    const end = net.chamberStart[a + 1]!;
    let force = this.fixed0[a]! + this.fixed1[a]! * from;
    let slope = xv * this.fixed1[a]!;
    for (let c = first; c < end; c++) {
      const area = this.area[c]!;
      const node = net.chamberNodes[c]!;
      force += area * (p[node]! - net.chamberHeads[c]!);
      const at = net.unknownOf[node]!;
      r[at < 0 ? net.size : at]! -= area * v;
      j[net.chamberFlowSlot[c]!]! -= area;
    }
    if (spec.force) {
      spec.force(this.x[a]!, v, this.own);
      force += this.own[0]!;
      slope += xv * this.own[1]! + this.own[2]!;
    }
    this.net0[a] = force;
    if (this.held[a]) {
      r[row] = v;
      j[diagonal] = 1;
      return;
    }
    const v0 = net.creep[a]! * this.blend;
    let coulomb = this.friction[a]!;
    const perPressure = spec.pressureFriction ?? 0;
    if (perPressure > 0 && end - first >= 2) {
      const d = p[net.chamberNodes[first]!]! - p[net.chamberNodes[first + 1]!]!;
      coulomb += perPressure * magnitude(d, DELTA);
      const by = perPressure * magnitudeSlope(d, DELTA) * sliding(v, v0) * scale;
      j[net.chamberForceSlot[first]!]! -= by;
      j[net.chamberForceSlot[first + 1]!]! += by;
    }
    const { brake } = spec;
    if (brake) {
      const c = first + brake.chamber;
      const u = (p[net.chamberNodes[c]!]! - net.chamberHeads[c]!) / brake.opens;
      const edge = Math.min(0.5, BAND_EDGE * this.blend);
      coulomb += brake.torque * (1 - ramp(u, edge));
      j[net.chamberForceSlot[c]!]! += (brake.torque / brake.opens) * rampSlope(u, edge) * sliding(v, v0) * scale;
    }
    if (coulomb > 0) {
      force -= coulomb * sliding(v, v0);
      slope -= coulomb * slidingSlope(v, v0);
    }
    if (v > 0) {
      const resist = this.out0[a]! + this.out1[a]! * from;
      force -= resist * resisting(v, v0);
      slope -= resist * resistingSlope(v, v0) + xv * this.out1[a]! * resisting(v, v0);
    } else {
      const resist = this.in0[a]! + this.in1[a]! * from;
      force += resist * resisting(-v, v0);
      slope -= resist * resistingSlope(-v, v0) - xv * this.in1[a]! * resisting(-v, v0);
    }
    // Losses in ports grow with the square of speed: an unloaded body that nothing throttles stays finite.
    const fast = RUNAWAY / (this.speed[a]! * this.speed[a]!);
    const size = v < 0 ? -v : v;
    let scaled = force * scale - LEAST_DAMPING * v - fast * v * size;
    let scaledSlope = slope * scale - LEAST_DAMPING - 2 * fast * size;
    if (this.soft[a]! * v > 0) {
      scaled -= SOFT_STOP * v;
      scaledSlope -= SOFT_STOP;
    }
    r[row] = scaled;
    j[diagonal]! += scaledSlope;
    for (let c = first; c < end; c++) j[net.chamberForceSlot[c]!]! += this.area[c]! * scale;
  }

  /**
   * Shortens a Newton change d of the speeds where it would jump over the steep part of friction or of a resisting load: it ends in that
   * part, from where the next change sees the slope. True when something was shortened.
   */
  limitSpeeds(y: Float64Array, d: Float64Array): boolean {
    const { net } = this;
    let limited = false;
    for (let a = 0; a < this.held.length; a++) {
      if (this.held[a]) continue;
      const i = net.firstVelocity + a;
      const v = y[i]!;
      const to = v + d[i]!;
      const v0 = 1.5 * net.creep[a]! * this.blend;
      let stop = to;
      const coulomb =
        this.friction[a]! > 0 ||
        (net.spec.actuators[a]!.pressureFriction ?? 0) > 0 ||
        net.spec.actuators[a]!.brake !== undefined ||
        net.spec.actuators[a]!.force !== undefined;
      if (to > v) {
        if (v < -v0 * 1.01 && stop > -v0 && this.in0[a]! > 0) stop = -v0;
        else if (v < -1e-12 && stop > 0 && coulomb) stop = 0;
        else if (v < v0 * 0.99 && stop > v0 && this.out0[a]! > 0) stop = v0;
      } else {
        if (v > v0 * 1.01 && stop < v0 && this.out0[a]! > 0) stop = v0;
        else if (v > 1e-12 && stop < 0 && coulomb) stop = 0;
        else if (v > -v0 * 0.99 && stop < -v0 && this.in0[a]! > 0) stop = -v0;
      }
      if (stop !== to) {
        d[i] = stop - v;
        limited = true;
      }
    }
    return limited;
  }

  /** Nodes held at a pressure: their balance becomes p - p0; what flowed in is kept. */
  private pins(): void {
    const { net, y, r, j } = this;
    for (let i = 0; i < net.free; i++) {
      const pressure = this.pinned[i]!;
      if (Number.isNaN(pressure)) continue;
      this.pinnedFlow[i] = r[i]!;
      r[i] = y[i]! - pressure;
      for (let k = net.rowStart[i]!; k < net.rowStart[i + 1]!; k++) j[net.rowSlots[k]!] = 0;
      j[net.diagonal[i]!] = 1;
    }
  }

  /** Node pressures and net forces at y and x, without the rest of an evaluation. */
  observe(): void {
    const { net, y, p } = this;
    for (let i = 0; i < net.free; i++) p[net.nodeOf[i]!] = y[i]!;
    for (let a = 0; a < this.x.length; a++) {
      let force = this.fixed0[a]! + this.fixed1[a]! * (this.x[a]! - this.ref[a]!);
      for (let c = net.chamberStart[a]!; c < net.chamberStart[a + 1]!; c++)
        force += this.area[c]! * (p[net.chamberNodes[c]!]! - net.chamberHeads[c]!);
      const own = net.spec.actuators[a]!.force;
      if (own) {
        own(this.x[a]!, y[net.firstVelocity + a]!, this.own);
        force += this.own[0]!;
      }
      this.net0[a] = force;
    }
  }

  /** Flow into every element at its terminals (and openings), at the present state. */
  flows(flows: Float64Array, openings?: Float64Array): void {
    const { net, y, p, z, out, gradient, x } = this;
    for (let e = 0; e < net.laws.length; e++) {
      const law = net.laws[e]!;
      const first = net.inputStart[e]!;
      const pressures = law.nodes.length;
      for (let i = 0; i < pressures; i++) z[i] = p[net.inputNodes[first + i]!]! - net.inputHeads[first + i]!;
      let inputs = pressures;
      if (law.own) z[inputs++] = y[net.ownOf[e]!]!;
      if (law.actuator >= 0) z[inputs] = x[law.actuator]!;
      law.evaluate(z, this.parameters, 1, out, gradient);
      for (let t = 0; t < law.terminals; t++) {
        let q = out[t]!;
        if (law.floor) {
          if (t > 0) q -= this.floor * (z[0]! - z[t]!);
          else for (let o = 1; o < law.terminals; o++) q += this.floor * (z[0]! - z[o]!);
        }
        flows[net.flowStart[e]! + t] = q;
      }
      if (openings) openings[e] = out[OPENING]!;
    }
  }

  /** Conductance between two terminals of an element at the present state, without the floor, L/s/MPa. */
  conductance(e: number, t: number, o: number): number {
    const { net, y, p, z, out, gradient, x } = this;
    const law = net.laws[e]!;
    const first = net.inputStart[e]!;
    const pressures = law.nodes.length;
    for (let i = 0; i < pressures; i++) z[i] = p[net.inputNodes[first + i]!]! - net.inputHeads[first + i]!;
    let inputs = pressures;
    if (law.own) z[inputs++] = y[net.ownOf[e]!]!;
    if (law.actuator >= 0) z[inputs++] = x[law.actuator]!;
    law.evaluate(z, this.parameters, 1, out, gradient);
    return Math.max(Math.abs(gradient[t * inputs + o]!), Math.abs(gradient[o * inputs + t]!));
  }
}
