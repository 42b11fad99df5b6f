/** From a solved system to the result a caller reads. */
import type { System } from './residual.ts';
import type { ActuatorContact, SteadyResult } from './results.ts';
import { magnitude, onset, ramp, resisting, sliding } from './smooth.ts';
import { BAND_EDGE, CEILING_ONSET, DELTA, FICTITIOUS, FLOOR_PRESSURE, SUPPLY_ONSET } from './tolerances.ts';

export type Reported = Omit<SteadyResult, 'converged' | 'how' | 'iterations' | 'residual' | 'diagnosis'>;

/** Copies everything; the system may be used again. `y` must be the state last evaluated. */
export function resultOf(sys: System, contacts: readonly ActuatorContact[], atStop: readonly ActuatorContact[]): Reported {
  const { net } = sys;
  const bodies = net.spec.actuators.length;
  const flows = new Float64Array(net.flowRows.length);
  const openings = new Float64Array(net.laws.length);
  sys.flows(flows, openings);
  const velocities = new Float64Array(bodies);
  const pressureForces = new Float64Array(bodies);
  const frictionForces = new Float64Array(bodies);
  const loadForces = new Float64Array(bodies);
  const stopForces = new Float64Array(bodies);
  const shown = [...contacts];
  for (let a = 0; a < bodies; a++) {
    const v = sys.held[a] ? 0 : sys.y[net.firstVelocity + a]!;
    const from = sys.x[a]! - sys.ref[a]!;
    const first = net.chamberStart[a]!;
    let force = 0;
    for (let c = first; c < net.chamberStart[a + 1]!; c++) force += sys.area[c]! * (sys.p[net.chamberNodes[c]!]! - net.chamberHeads[c]!);
    pressureForces[a] = force;
    const v0 = net.creep[a]!;
    let coulomb = sys.friction[a]!;
    const perPressure = net.spec.actuators[a]!.pressureFriction ?? 0;
    if (perPressure > 0 && net.chamberStart[a + 1]! - first >= 2) {
      const d = sys.p[net.chamberNodes[first]!]! - sys.p[net.chamberNodes[first + 1]!]!;
      coulomb += perPressure * magnitude(d, DELTA);
    }
    const { brake } = net.spec.actuators[a]!;
    if (brake) {
      const c = first + brake.chamber;
      coulomb += brake.torque * (1 - ramp((sys.p[net.chamberNodes[c]!]! - net.chamberHeads[c]!) / brake.opens, BAND_EDGE));
    }
    let load = sys.net0[a]! - force;
    if (v > 0) load -= (sys.out0[a]! + sys.out1[a]! * from) * resisting(v, v0);
    if (v < 0) load += (sys.in0[a]! + sys.in1[a]! * from) * resisting(-v, v0);
    loadForces[a] = load;
    velocities[a] = v;
    if (contacts[a] === 'locked') stopForces[a] = -(force + load);
    else if (sys.held[a]) {
      const net0 = force + load;
      frictionForces[a] = -Math.sign(net0) * Math.min(Math.abs(net0), coulomb);
      stopForces[a] = -(net0 + frictionForces[a]!);
    } else {
      frictionForces[a] = -coulomb * sliding(v, v0);
      if (sys.soft[a] !== 0 && sys.soft[a]! * v > 0) {
        stopForces[a] = -(force + load + frictionForces[a]!);
        velocities[a] = 0;
        shown[a] = atStop[a]!;
      }
    }
  }
  const gasFlows = new Float64Array(net.spec.gas.length);
  const given = new Set<number>();
  net.spec.gas.forEach((gas, g) => {
    const unknown = net.unknownOf[gas.node]!;
    if (unknown < 0 || Number.isNaN(sys.pinned[unknown]!) || given.has(unknown)) return;
    given.add(unknown);
    gasFlows[g] = sys.pinnedFlow[unknown]!;
  });
  const fictitious = new Float64Array(net.spec.nodes.length);
  for (let i = 0; i < net.free; i++) {
    const p = sys.y[i]!;
    const node = net.nodeOf[i]!;
    fictitious[node] = FICTITIOUS * (onset(FLOOR_PRESSURE - p, SUPPLY_ONSET) - onset(p - net.ceilings[node]!, CEILING_ONSET));
  }
  for (const node of net.grounded) fictitious[node]! -= sys.floor * sys.p[node]!;
  return {
    pressures: Float64Array.from(sys.p),
    flows,
    elementStart: net.flowStart,
    openings,
    velocities,
    pressureForces,
    frictionForces,
    loadForces,
    stopForces,
    contacts: shown,
    gasFlows,
    fictitious,
    state: Float64Array.from(sys.y),
  };
}
