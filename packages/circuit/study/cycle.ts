/** Cycles and manual functions over time: start, first run, repetition until periodic, what faults. */
import type { Setting, Solution, Stand } from '../assembly/machine.ts';
import type { Cycle } from '../model/circuit.ts';
import { type Charge, charge, empty } from './charge.ts';
import { isDetent, positionsOf } from './coils.ts';
import { decide, detentsAfter, demandOf, NOTHING } from './logic.ts';
import { dutyOf, meanPower } from './duty.ts';
import { type End, Runner } from './run.ts';
import { si } from './read.ts';
import type { Plant } from './scene.ts';
import { groupsOf, Sequence } from './sequence.ts';
import { begins, loadsInSteps, settingOf } from './setting.ts';
import type { CycleResult, Fault } from './study.ts';
import { runOf, Trace } from './trace.ts';

/** At most this many runs until periodic. */
const RUNS = 30;

/** A cycle as run: what is handed on, and the raw traces that count. */
export interface Ran {
  readonly cycle: Cycle;
  readonly result: CycleResult;
  /** The settled run; all runs of `repeat N times`; the parts of a manual function. */
  readonly counted: readonly Trace[];
  readonly chattering: readonly string[];
}

type Detents = Record<string, Stand['position']>;

/** Detents as the last steps of a cycle leave them; `a` where no step moves them. */
export function detentsAtStart(plant: Plant, cycle: Cycle): Detents {
  let detents: Detents = {};
  for (const valve of plant.at.ofKind('directional').filter(isDetent)) detents[valve.id] = positionsOf(valve)[0] ?? 'a';
  const dead = { contact: () => undefined, live: () => false, running: () => false };
  for (const step of allSteps(plant, cycle, 0)) {
    const control = decide(plant.at, demandOf(step.actions, step.id), dead, { whileLines: false, interlocks: false });
    detents = detentsAfter(plant.at, control, detents);
  }
  return detents;
}
function allSteps(plant: Plant, cycle: Cycle, depth: number): readonly Cycle['steps'][number][] {
  if (depth > 8) return [];
  return cycle.steps.flatMap((step) => [
    step,
    ...step.actions.flatMap((one) => {
      const inner = one.does === 'run' ? plant.at.cycle(one.cycle) : undefined;
      return inner ? allSteps(plant, inner, depth + 1) : [];
    }),
  ]);
}

/** All drives turn, valves sprung, cylinders at `begins`: pressures as at REST. */
export function startOf(plant: Plant, detents: Detents, stored: Charge): { readonly setting: Setting; readonly solution: Solution } {
  const dead = { contact: () => undefined, live: () => false, running: () => false };
  const control = decide(plant.at, NOTHING, dead, { whileLines: false });
  const setting = settingOf(plant, { control, detents, positions: begins(plant), ...stored, loads: loadsInSteps(plant, []) });
  const solution = plant.machine.settle(setting);
  return { setting: { ...setting, bits: solution.bits }, solution };
}

export function runCycle(plant: Plant, cycle: Cycle): Ran {
  return cycle.mode === 'manual' ? runManual(plant, cycle) : runAutomatic(plant, cycle);
}

function runAutomatic(plant: Plant, cycle: Cycle): Ran {
  const first = attempt(plant, cycle, empty(plant));
  const storing = plant.at.accumulators.length > 0;
  if (first.completed || !storing || plant.cancelled()) return first.ran;
  const second = attempt(plant, cycle, charge(plant, {}));
  if (!second.completed) return first.ran;
  const short: Fault = {
    kind: 'first run short of oil',
    words: `the first run, with empty accumulators, does not end (${first.ran.result.faults[0]?.words ?? 'it stops'}); computed with them charged`,
    origin: cycle.nameOrigin,
  };
  return { ...second.ran, result: { ...second.ran.result, faults: [short, ...second.ran.result.faults] } };
}

function attempt(plant: Plant, cycle: Cycle, stored: Charge): { readonly completed: boolean; readonly ran: Ran } {
  const detents = detentsAtStart(plant, cycle);
  const { setting, solution } = startOf(plant, detents, stored);
  const runner = new Runner(plant, plant.machine.start(setting, solution), setting, detents);
  const wanted = typeof cycle.repeat === 'number' ? cycle.repeat : 1;
  const settling = cycle.repeat === 'ever' || (plant.at.accumulators.length > 0 && typeof cycle.repeat !== 'number');
  const ends: End[] = [];
  const faults: Fault[] = [];
  let settled = !settling;
  let before = { solution, states: runner.switches.states() };
  for (let count = 0; count < (settling ? RUNS : wanted); count += 1) {
    const end = runner.cycle(new Sequence(plant.at, cycle));
    ends.push(end);
    for (const fault of end.faults) if (!faults.some((one) => one.words === fault.words)) faults.push(fault);
    if (!end.completed || plant.cancelled()) break;
    if (end.time <= 1e-9) {
      faults.push({ kind: 'cycle without time', words: `${cycle.id} takes no time at all`, origin: cycle.nameOrigin });
      break;
    }
    const states = runner.switches.states();
    if (settling && count > 0 && periodic(plant, before, { solution: end.solution, states }, ends.at(-2)!.time, end.time)) {
      settled = true;
      break;
    }
    before = { solution: end.solution, states };
  }
  const last = ends.at(-1)!;
  if (cycle.steps.length === 0) faults.push({ kind: 'cycle without time', words: `${cycle.id} has no steps`, origin: cycle.nameOrigin });
  if (last.completed && !settled && ends.length >= RUNS) {
    faults.push({
      kind: 'does not settle',
      words: `${cycle.id} does not settle in ${RUNS} runs; the figures are those of the last`,
      origin: cycle.nameOrigin,
    });
  }
  const counted = typeof cycle.repeat === 'number' ? ends.map((one) => one.trace) : [last.trace];
  return { completed: last.completed, ran: handOn(plant, cycle, ends, counted, faults, settled) };
}

interface Closing {
  readonly solution: Solution;
  readonly states: ReadonlyMap<string, boolean | undefined>;
}
/** Positions within 0.5 mm, oil 0.5 % of each accumulator, time 0.5 %, switches equal. Motors turn on: their angle does not count. */
function periodic(plant: Plant, before: Closing, after: Closing, timeBefore: number, time: number): boolean {
  if (Math.abs(time - timeBefore) > 0.005 * time) return false;
  for (const body of plant.bodies) {
    if (!Number.isFinite(body.stroke)) continue;
    const near = body.type === 'rotating' ? 0.0087 : 0.5e-3;
    if (Math.abs((after.solution.positions[body.id] ?? 0) - (before.solution.positions[body.id] ?? 0)) > near) return false;
  }
  for (const one of plant.at.accumulators) {
    const volume = si(one, 'volume') ?? 0;
    if (Math.abs((after.solution.oil[one.id] ?? 0) - (before.solution.oil[one.id] ?? 0)) > 0.005 * volume) return false;
  }
  return [...after.states].every(([key, state]) => before.states.get(key) === state);
}

/** Each step a push button: alone, dead when released, one after another from where the one before left the machine. */
function runManual(plant: Plant, cycle: Cycle): Ran {
  const detents = detentsAtStart(plant, cycle);
  const { setting, solution } = startOf(plant, detents, charge(plant, {}));
  const runner = new Runner(plant, plant.machine.start(setting, solution), setting, detents);
  const ends: End[] = [];
  const faults: Fault[] = [];
  for (const group of groupsOf(cycle)) {
    if (plant.cancelled()) break;
    const end = runner.cycle(new Sequence(plant.at, { ...cycle, steps: group }), { manual: true });
    ends.push(end);
    faults.push(...end.faults);
    if (end.faults.some((one) => one.kind === 'no equilibrium')) break;
    runner.release();
  }
  return handOn(
    plant,
    cycle,
    ends,
    ends.map((one) => one.trace),
    faults,
    true,
  );
}

function handOn(
  plant: Plant,
  cycle: Cycle,
  ends: readonly End[],
  counted: readonly Trace[],
  faults: readonly Fault[],
  settled: boolean,
): Ran {
  const last = ends.at(-1);
  const completed = cycle.mode === 'manual' ? ends.every((one) => one.completed) : last?.completed === true;
  const power = meanPower(
    counted,
    plant.at.ofKind('pump').map((one) => one.id),
    plant.bodies.map((one) => one.id),
  );
  const worst = Math.max(0, ...(typeof cycle.repeat === 'number' ? ends : ends.slice(-1)).map((one) => one.time));
  const trace = cycle.mode === 'manual' ? joined(ends.map((one) => one.trace)) : last?.trace;
  const result: CycleResult = {
    id: cycle.id,
    mode: cycle.mode,
    ...(trace ? { run: runOf(plant, cycle.id, trace) } : {}),
    ...(completed && cycle.mode === 'cycle' ? { time: worst } : {}),
    ...(ends[0]?.completed && cycle.mode === 'cycle' ? { firstTime: ends[0].time } : {}),
    runs: ends.length,
    settled: settled && completed,
    completed,
    faults,
    duty: dutyOf(plant, counted),
    heat: power.shaft - power.work,
    work: power.work,
  };
  return { cycle, result, counted, chattering: [...new Set(ends.flatMap((one) => one.chattering))] };
}

/** Push buttons one after another as one record, for charts. */
function joined(traces: readonly Trace[]): Trace | undefined {
  if (traces.length <= 1) return traces[0];
  const whole = new Trace();
  let offset = 0;
  for (const trace of traces) {
    whole.take(trace, offset);
    offset += trace.end;
  }
  return whole;
}
