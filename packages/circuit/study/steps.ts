/** Results of every step and manual function: steady points, time, speeds, highest and lowest pressures. */
import type { Circuit, Cycle, Step } from '../model/circuit.ts';
import type { Ran } from './cycle.ts';
import { decide, demandOf, NOTHING } from './logic.ts';
import { pointsAlone, pointsInRun } from './points.ts';
import type { Plant } from './scene.ts';
import { outsideFor } from './sequence.ts';
import { begins, loadsInSteps, settingOf } from './setting.ts';
import type { Fault, Point, StepResult } from './study.ts';
import type { Sample, Span, Trace } from './trace.ts';

/** Where a step ran: one span of one trace. */
export interface Passage {
  readonly trace: Trace;
  readonly span: Span;
}

/** A step passed more often than this in a run is solved at its first and last passages only. */
const PASSAGES = 3;

export function stepResults(plant: Plant, rans: readonly Ran[]): readonly StepResult[] {
  return plant.circuit.cycles.flatMap((cycle) => cycle.steps.map((step) => stepResult(plant, rans, cycle, step)));
}

/** All passages of a step in all runs that count. */
export function passagesOf(rans: readonly Ran[], step: string): readonly Passage[] {
  return rans.flatMap((ran) =>
    ran.counted.flatMap((trace) => trace.spans.filter((one) => one.id === step).map((span) => ({ trace, span }))),
  );
}

/** Samples of a step outside the shifting of valves, with the time since its entry. */
export function samplesOf(passages: readonly Passage[], step: string): readonly (Sample & { readonly since: number })[] {
  return passages.flatMap(({ trace, span }) =>
    trace
      .between(span.from, span.to)
      .filter((one) => one.lines.includes(step) && !one.shifting)
      .map((one) => ({ ...one, since: one.time - span.from })),
  );
}

function stepResult(plant: Plant, rans: readonly Ran[], cycle: Cycle, step: Step): StepResult {
  const passages = passagesOf(rans, step.id);
  const own = rans.find((one) => one.cycle.id === cycle.id);
  const faults: Fault[] = (own?.result.faults ?? []).filter((one) => one.step === step.id);
  const solved = passages.length > PASSAGES ? [passages[0]!, ...passages.slice(1 - PASSAGES)] : passages;
  const points =
    passages.length > 0
      ? solved.flatMap(({ trace, span }) => pointsInRun(plant, trace, step.id, span.from, span.to))
      : plant.cancelled()
        ? []
        : alone(plant, step);
  const { peaks, lows } = extremes(points, samplesOf(passages, step.id));
  const ended = faults.every((one) => one.kind !== 'time limit' && one.kind !== 'waits for ever' && one.kind !== 'no equilibrium');
  const longest = Math.max(0, ...passages.map(({ span }) => span.to - span.from));
  const entered = passages[0]?.span.from;
  return {
    id: step.id,
    cycle: cycle.id,
    points,
    ...(passages.length > 0 && ended ? { time: longest } : {}),
    ...(entered === undefined ? {} : { entered }),
    speeds: speedsOf(plant, points, passages),
    peaks,
    lows,
    faults,
  };
}

/** A step that no run reached: from `begins`, its outside switches as it needs them, pressure switches unknown taken as its interlocks need. */
function alone(plant: Plant, step: Step): readonly Point[] {
  const demand = demandOf(step.actions, step.id);
  const line = { step, entered: 0 };
  const pressed = outsideFor(plant.at, [line], demand, 'free');
  const situation = {
    contact: (key: string) => pressed.get(key) ?? true,
    live: (coil: string) => demand.coils.some((one) => one.live.coil === coil),
    running: (id: string) => id === step.id || id === step.cycle,
  };
  const control = decide(plant.at, demand, situation, { interlocks: false });
  const setting = settingOf(plant, { control, detents: {}, positions: begins(plant), loads: loadsInSteps(plant, [step.id]) });
  return pointsAlone(plant, setting, 'entry from the start position (no run reaches this step)');
}

/** With no cycle in the file: the same table for each coil alone; coils that only make the pump work are added and named. */
export function coilTables(plant: Plant, circuit: Circuit): readonly StepResult[] {
  if (circuit.cycles.length > 0) return [];
  return circuit.coils.flatMap((coil) => {
    if (plant.cancelled()) return [];
    const command = { coil: coil.id, origin: coil.origin };
    const demand = demandOf([{ does: 'energise', commands: [command], origin: coil.origin }], coil.id);
    const dead = { contact: () => undefined, live: () => false, running: () => false };
    const helpers = loaders(plant, coil.id);
    const helped = demandOf(
      [{ does: 'energise', commands: helpers.map((one) => ({ coil: one, origin: coil.origin })), origin: coil.origin }],
      coil.id,
    );
    const control = decide(plant.at, { ...demand, coils: [...demand.coils, ...helped.coils] }, dead, {
      whileLines: false,
      interlocks: false,
    });
    const setting = settingOf(plant, { control, detents: {}, positions: begins(plant), loads: loadsInSteps(plant, []) });
    const label = helpers.length > 0 ? `entry (with ${helpers.join(', ')})` : 'entry';
    const points = pointsAlone(plant, setting, label, true);
    const { peaks, lows } = extremes(points, []);
    return { id: `coil ${coil.id}`, cycle: '', points, speeds: speedsOf(plant, points, []), peaks, lows, faults: [] };
  });
}

/** Coils that raise an idling pump's outlet: the pump idles with the coil alone below `idle`. */
function loaders(plant: Plant, coil: string): readonly string[] {
  const idle = plant.circuit.limits?.properties.find((one) => one.name === 'idle')?.value;
  const limit = idle?.type === 'quantity' ? idle.q.si : 2e6;
  const outlet = (coils: readonly string[]) => {
    const dead = { contact: () => undefined, live: () => false, running: () => false };
    const origin = plant.circuit.coils[0]!.origin;
    const demand =
      coils.length === 0
        ? NOTHING
        : demandOf([{ does: 'energise', commands: coils.map((one) => ({ coil: one, origin })), origin }], 'coil');
    const control = decide(plant.at, demand, dead, { whileLines: false, interlocks: false });
    // Held still: an outlet that only serves a moving cylinder would look idle.
    const setting = {
      ...settingOf(plant, { control, detents: {}, positions: begins(plant), loads: loadsInSteps(plant, []) }),
      locked: plant.bodies.map((one) => one.id),
    };
    const solution = plant.machine.settle(setting);
    return Math.max(0, ...plant.at.ofKind('pump').map((one) => solution.pressures[plant.at.netOf(one.id, 'P') ?? ''] ?? 0));
  };
  if (outlet([coil]) >= limit) return [];
  const own = plant.at.coil(coil)?.component;
  const found = plant.circuit.coils.filter(
    (one) => !plant.cancelled() && one.component !== own && outlet([one.id]) >= limit && outlet([coil, one.id]) >= limit,
  );
  // One coil a valve: two of one valve would be two voices.
  return found.filter((one, index) => found.findIndex((other) => other.component === one.component) === index).map((one) => one.id);
}

export function extremes(
  points: readonly Point[],
  samples: readonly Sample[],
): { readonly peaks: Record<string, number>; readonly lows: Record<string, number> } {
  const peaks: Record<string, number> = {};
  const lows: Record<string, number> = {};
  const take = (pressures: Readonly<Record<string, number>>, undetermined: Point['undetermined']) => {
    for (const [net, p] of Object.entries(pressures)) {
      if (net in undetermined) continue;
      if (!(peaks[net]! >= p)) peaks[net] = p;
      if (!(lows[net]! <= p)) lows[net] = p;
    }
  };
  for (const point of points) if (point.solved) take(point.pressures, point.undetermined);
  for (const { solution } of samples) take(solution.pressures, {});
  return { peaks, lows };
}

function speedsOf(plant: Plant, points: readonly Point[], passages: readonly Passage[]): StepResult['speeds'] {
  const speeds: Record<string, { low: number; high: number; mean?: number; direction: -1 | 1 }> = {};
  for (const point of points) {
    for (const one of point.actuators) {
      if (one.direction === 0 || one.atStop !== undefined || (one.velocity === 0 && one.shortBy === undefined) || !point.solved) continue;
      const speed = Math.max(0, one.velocity * one.direction);
      if (speed < 5e-5 && one.shortBy === undefined) continue;
      const found = speeds[one.id];
      if (found) {
        found.low = Math.min(found.low, speed);
        found.high = Math.max(found.high, speed);
      } else speeds[one.id] = { low: speed, high: speed, direction: one.direction };
    }
  }
  for (const body of plant.bodies) {
    const mean = meanSpeed(passages, body.id);
    for (const id of body.actuators) {
      const found = speeds[id];
      if (found && mean !== undefined) found.mean = mean;
    }
  }
  return speeds;
}

/** Distance over the time in which the body moves (waiting before and standing at a stop after are not counted). */
function meanSpeed(passages: readonly Passage[], body: string): number | undefined {
  let way = 0;
  let time = 0;
  for (const { trace, span } of passages) {
    const samples = trace.between(span.from, span.to);
    for (let i = 0; i + 1 < samples.length; i += 1) {
      const moved = Math.abs((samples[i + 1]!.solution.positions[body] ?? 0) - (samples[i]!.solution.positions[body] ?? 0));
      const lasted = samples[i + 1]!.time - samples[i]!.time;
      if (moved <= 5e-5 * lasted) continue;
      way += moved;
      time += lasted;
    }
  }
  return time > 0 ? way / time : undefined;
}
