/** Steady state at given positions: a cascade of solvers, with end stops as rigid contacts around it. */
import type { Network } from './compile.ts';
import { diagnose } from './diagnosis.ts';
import { chargeOf, GAS_EXPONENT } from './gas.ts';
import { Solver } from './newton.ts';
import { System } from './residual.ts';
import type { ActuatorContact, EngineDiagnosis, SteadyRequest, SteadyResult, SteadyStage } from './results.ts';
import { resultOf } from './report.ts';
import { ATMOSPHERE, FLOOR_STEADY, SMOOTHING, STEADY_BUDGET } from './tolerances.ts';

/** Distance within which a body stands at its stop, m or rad. */
const AT_STOP = 1e-6;
/** The floor of a continuation stage, as a multiple of floor and blend. */
const CONTINUED_FLOOR = 10;
/** Net force towards freedom below which a contact is kept, MPa of the scaled balance. */
const LEAVES = 1e-9;

const solvers = new WeakMap<Network, Solver>();

/** The solver of a network is kept: its factors' pattern and pivots serve the next solve. */
function solverOf(net: Network): Solver {
  let solver = solvers.get(net);
  if (!solver) {
    solver = new Solver(new System(net));
    solvers.set(net, solver);
  }
  return solver;
}

/** Puts a system where a request says: positions, loads, charges; contacts are left to the caller. */
export function prepare(sys: System, request: SteadyRequest): void {
  const { net } = sys;
  sys.xv = 0;
  sys.floor = request.floor ?? FLOOR_STEADY;
  sys.parameters = net.parameters;
  sys.soft.fill(0);
  for (let a = 0; a < net.spec.actuators.length; a++) {
    sys.load(a, request.loads?.[a]);
    sys.place(a, request.positions[a] ?? 0, request.side?.[a] ?? 1);
  }
  sys.unpinAll();
  net.spec.gas.forEach((gas, g) => {
    const charge = chargeOf(gas, request.gas?.[g], request.gasExponent ?? GAS_EXPONENT);
    const unknown = net.unknownOf[gas.node]!;
    if (!charge || unknown < 0) return;
    const gauge = charge.pressure - ATMOSPHERE + (gas.head ?? 0);
    // Two charges at one node: the higher stands, as it would close the other's path at once.
    const before = sys.pinned[unknown]!;
    if (Number.isNaN(before) || gauge > before) sys.pin(unknown, gauge);
  });
}

/**
 * Solves the network at given positions, loads and charges. Never throws and never returns NaN: when nothing converges the
 * result says so (`converged` false, NO EQUILIBRIUM) and holds the best state found.
 */
export function solveSteady(net: Network, request: SteadyRequest): SteadyResult {
  const solver = solverOf(net);
  const { sys } = solver;
  const bodies = net.spec.actuators.length;
  solver.iterations = 0;
  prepare(sys, request);

  const contacts: ActuatorContact[] = [];
  const atStop: ActuatorContact[] = [];
  for (let a = 0; a < bodies; a++) {
    const { low, high } = net.spec.actuators[a]!;
    const x = sys.x[a]!;
    const stops = !(request.freeStops?.[a] ?? false);
    const at: ActuatorContact = stops && x <= low + AT_STOP ? 'low' : stops && x >= high - AT_STOP ? 'high' : 'free';
    atStop[a] = at;
    const before = request.start?.contacts[a];
    contacts[a] = request.locked?.[a] ? 'locked' : at !== 'free' && before === 'free' ? 'free' : at;
  }

  const start = request.start && request.start.state.length === net.size ? request.start.state : undefined;
  let how: SteadyStage = 'none';
  let warm = start;
  const most = 4 * bodies + 8;
  for (let pass = 0; pass < most; pass++) {
    // Contacts that go on contradicting each other are made soft: they then creep micrometres instead of turning for ever.
    const soft = pass >= 2 * bodies + 4;
    for (let a = 0; a < bodies; a++) {
      sys.soft[a] = soft && atStop[a] !== 'free' ? (atStop[a] === 'low' ? -1 : 1) : 0;
      if (soft && contacts[a] !== 'locked') contacts[a] = 'free';
      sys.held[a] = contacts[a] === 'free' ? 0 : 1;
    }
    how = cascade(solver, warm);
    if (how === 'none' || soft) break;
    warm = sys.y;
    let changed = false;
    for (let a = 0; a < bodies; a++) {
      const at = atStop[a]!;
      if (at === 'free' || contacts[a] === 'locked') continue;
      const inward = at === 'low' ? -1 : 1;
      if (contacts[a] === 'free') {
        if (sys.y[net.firstVelocity + a]! * inward > 0) {
          contacts[a] = at;
          changed = true;
        }
      } else if ((sys.net0[a]! / net.forceScale[a]!) * inward < -LEAVES) {
        contacts[a] = 'free';
        changed = true;
      }
    }
    if (!changed) break;
  }
  const converged = how !== 'none';
  const why: EngineDiagnosis[] = converged ? [] : [noEquilibrium(solver)];
  const result = resultOf(sys, contacts, atStop);
  return {
    ...result,
    converged,
    how,
    iterations: solver.iterations,
    residual: solver.residual,
    diagnosis: [...why, ...diagnose(sys, result)],
  };
}

/** The stages in turn. `start`: a neighbouring answer (may be the system's own y). */
function cascade(solver: Solver, start: Float64Array | undefined): SteadyStage {
  const { sys } = solver;
  sys.blend = 1;
  if (start) {
    if (start !== sys.y) sys.y.set(start);
    if (solver.newton()) return 'newton';
  }
  zero(sys);
  if (solver.newton()) return 'newton';
  zero(sys);
  if (continued(solver, () => solver.newton(2 * 25))) return 'smoothing';
  zero(sys);
  if (solver.pseudoTransient()) return 'pseudo-transient';
  zero(sys);
  if (continued(solver, () => solver.pseudoTransient())) return 'smoothed pseudo-transient';
  zero(sys);
  if (solver.backwardEuler(Math.max(200, STEADY_BUDGET - solver.iterations))) return 'backward Euler';
  return 'none';
}

/** One stage on laws with widened blends and a raised floor, each answer the start of the next; the last one decides. */
function continued(solver: Solver, stage: () => boolean): boolean {
  let found = false;
  const floor = solver.sys.floor;
  for (const blend of SMOOTHING) {
    solver.sys.blend = blend;
    solver.sys.floor = Math.max(floor, floor * CONTINUED_FLOOR * (blend === 1 ? 0 : blend));
    found = stage();
    if (!found && blend !== 1) continue;
  }
  solver.sys.blend = 1;
  return found;
}

/** Zeros, but held pressures at their value. */
function zero(sys: System): void {
  sys.y.fill(0);
  for (let i = 0; i < sys.net.free; i++) {
    const pressure = sys.pinned[i]!;
    if (!Number.isNaN(pressure)) sys.y[i] = pressure;
  }
}

function noEquilibrium(solver: Solver): EngineDiagnosis {
  const { sys } = solver;
  const { net } = sys;
  for (let i = 0; i < net.size; i++) if (!Number.isFinite(sys.y[i]!)) sys.y[i] = 0;
  sys.evaluate();
  let worst = 0;
  for (let i = 0; i < net.size; i++) if (Math.abs(sys.r[i]!) > Math.abs(sys.r[worst]!)) worst = i;
  const nodes = worst < net.free ? [net.nodeOf[worst]!] : [];
  solver.residual = Math.abs(sys.r[worst]!);
  const what = worst < net.free ? `${solver.residual.toPrecision(2)} L/s are left over at a node` : 'a body finds no balance of forces';
  return { kind: 'NO EQUILIBRIUM', nodes, why: `no stable equilibrium found in ${solver.iterations} iterations: ${what}` };
}
