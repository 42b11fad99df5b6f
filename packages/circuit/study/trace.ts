/** The raw record of a run: every step of the integration with what was live, thinned for keeping. */
import type { Setting, Solution } from '../assembly/machine.ts';
import type { Live } from './coils.ts';
import type { Plant } from './scene.ts';
import type { Run } from './study.ts';

export interface Sample {
  /** s, from the start of this run. */
  readonly time: number;
  readonly solution: Solution;
  /** Ids of the steps and meanwhile lines that run. */
  readonly lines: readonly string[];
  /** A valve is shifting: not counted by requirements. */
  readonly shifting: boolean;
}
/** What was set on the machine from a time on. */
export interface Snapshot {
  readonly time: number;
  readonly setting: Setting;
  readonly lines: readonly string[];
}
export interface Span {
  readonly id: string;
  readonly from: number;
  readonly to: number;
}
export interface LiveSpan {
  readonly from: number;
  readonly to: number;
  readonly value: number;
}

export class Trace {
  readonly samples: Sample[] = [];
  readonly snapshots: Snapshot[] = [];
  readonly events: { time: number; words: string; of: string }[] = [];
  readonly spans: Span[] = [];
  readonly live = new Map<string, LiveSpan[]>();
  readonly #open = new Map<string, { from: number; value: number }>();
  readonly #openSteps = new Map<string, number>();
  statistics: Run['statistics'] = { steps: 0, rejected: 0, newton: 0, events: 0 };

  sample(time: number, solution: Solution, lines: readonly string[], shifting: boolean): void {
    this.samples.push({ time, solution, lines, shifting });
  }
  event(time: number, of: string, words: string): void {
    this.events.push({ time, of, words });
  }
  enter(step: string, time: number): void {
    this.#openSteps.set(step, time);
  }
  leave(step: string, time: number): void {
    const from = this.#openSteps.get(step);
    if (from === undefined) return;
    this.#openSteps.delete(step);
    this.spans.push({ id: step, from, to: time });
  }
  /** States of coils and switches at an instant; what is not named is off. */
  states(time: number, now: ReadonlyMap<string, number>): void {
    for (const [key, open] of this.#open) {
      if (now.get(key) === open.value) continue;
      this.#open.delete(key);
      if (time > open.from) this.live.set(key, [...(this.live.get(key) ?? []), { from: open.from, to: time, value: open.value }]);
    }
    for (const [key, value] of now) if (!this.#open.has(key)) this.#open.set(key, { from: time, value });
  }
  close(time: number): void {
    this.states(time, new Map());
    for (const step of [...this.#openSteps.keys()]) this.leave(step, time);
    this.spans.sort((a, b) => a.from - b.from || a.to - b.to);
  }
  /** Appends another record, later by `offset`. */
  take(other: Trace, offset: number): void {
    for (const one of other.samples) this.samples.push({ ...one, time: one.time + offset });
    for (const one of other.events) this.events.push({ ...one, time: one.time + offset });
    for (const one of other.spans) this.spans.push({ ...one, from: one.from + offset, to: one.to + offset });
    for (const [key, spans] of other.live) {
      this.live.set(key, [
        ...(this.live.get(key) ?? []),
        ...spans.map((one) => ({ ...one, from: one.from + offset, to: one.to + offset })),
      ]);
    }
    const [a, b] = [this.statistics, other.statistics];
    this.statistics = {
      steps: a.steps + b.steps,
      rejected: a.rejected + b.rejected,
      newton: a.newton + b.newton,
      events: a.events + b.events,
    };
  }
  get end(): number {
    return this.samples.at(-1)?.time ?? 0;
  }
  /** Samples from a time to another, both included. */
  between(from: number, to: number): readonly Sample[] {
    const near = 1e-9;
    let low = 0;
    let high = this.samples.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.samples[middle]!.time < from - near) low = middle + 1;
      else high = middle;
    }
    const found: Sample[] = [];
    for (let i = low; i < this.samples.length && this.samples[i]!.time <= to + near; i += 1) found.push(this.samples[i]!);
    return found;
  }
  /** The last sample not after a time. */
  lastBy(time: number): Sample | undefined {
    let low = 0;
    let high = this.samples.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if (this.samples[middle]!.time <= time + 1e-9) low = middle + 1;
      else high = middle;
    }
    return this.samples[low - 1];
  }
  /** What was set just before a time (`before`) or from it on. */
  snapshotAt(time: number, before: boolean): Snapshot | undefined {
    let found: Snapshot | undefined;
    for (const one of this.snapshots) {
      if (before ? one.time < time - 1e-9 : one.time <= time + 1e-9) found = one;
    }
    return found ?? this.snapshots[0];
  }
}

export function liveValue(live: Live): number {
  return live.setting ?? live.ratio ?? 1;
}

/** Samples kept of a run for charts. */
const KEPT = 400;

/** Indices of the samples to keep: ends, both sides of events, and where a curve bends most between them. */
export function thin(trace: Trace, plant: Plant): readonly number[] {
  const { samples } = trace;
  if (samples.length <= KEPT) return samples.map((_, index) => index);
  const must = new Set<number>([0, samples.length - 1]);
  let next = 0;
  for (const time of [...new Set(trace.events.map((one) => one.time))].sort((a, b) => a - b)) {
    while (next < samples.length && samples[next]!.time < time - 1e-9) next += 1;
    if (next > 0) must.add(next - 1);
    if (next < samples.length) must.add(next);
  }
  const nets = Object.keys(samples[0]!.solution.pressures);
  const bends = samples.map((_, index) => ({ index, bend: bend(samples, index, plant, nets) }));
  bends.sort((a, b) => b.bend - a.bend);
  for (const { index } of bends) {
    if (must.size >= KEPT) break;
    must.add(index);
  }
  return [...must].sort((a, b) => a - b);
}

/** How far a sample lies off the line between its neighbours, in shares of 10 bar and 1 % of a stroke, weighted by time. */
function bend(samples: readonly Sample[], index: number, plant: Plant, nets: readonly string[]): number {
  const [before, here, after] = [samples[index - 1], samples[index], samples[index + 1]];
  if (!before || !here || !after) return Number.POSITIVE_INFINITY;
  const span = after.time - before.time;
  const share = span > 0 ? (here.time - before.time) / span : 0.5;
  const off = (a: number | undefined, b: number | undefined, c: number | undefined) =>
    Math.abs((b ?? 0) - (a ?? 0) - ((c ?? 0) - (a ?? 0)) * share);
  const [p, q, r] = [before.solution.pressures, here.solution.pressures, after.solution.pressures];
  let most = 0;
  for (const net of nets) most = Math.max(most, off(p[net], q[net], r[net]) / 1e6);
  for (const body of plant.bodies) {
    const scale = Number.isFinite(body.stroke) ? body.stroke / 100 : 1;
    most = Math.max(
      most,
      off(before.solution.positions[body.id], here.solution.positions[body.id], after.solution.positions[body.id]) / scale,
    );
  }
  return most + span * 0.01;
}

/** The run as it is handed on. */
export function runOf(plant: Plant, cycle: string, trace: Trace): Run {
  const kept = thin(trace, plant).map((index) => trace.samples[index]!);
  // Every solution of a run has the same keys: the first names them.
  const series = <T>(
    pick: (solution: Solution) => Readonly<Record<string, T>>,
    keep: (key: string) => boolean = () => true,
  ): Record<string, T[]> => {
    const first = kept[0];
    const rows = kept.map((one) => pick(one.solution));
    const keys = first ? Object.keys(pick(first.solution)).filter(keep) : [];
    return Object.fromEntries(keys.map((key) => [key, rows.map((one) => one[key] as T)]));
  };
  const shown = new Set(
    plant.circuit.components
      .filter((one) => ['pump', 'relief', 'cylinder', 'motor', 'rotary', 'accumulator'].includes(one.kind))
      .map((one) => one.id),
  );
  const flows = series(
    (one) => one.flows,
    (key) => shown.has(key.slice(0, Math.max(0, key.lastIndexOf('.')))),
  );
  const power = Object.fromEntries(
    plant.at.drives.map((drive) => [drive.id, kept.map((one) => drivePower(plant, drive.id, one.solution))]),
  );
  const velocities = series((one) => one.velocities);
  return {
    cycle,
    times: kept.map((one) => one.time),
    positions: byActuator(
      plant,
      series((one) => one.positions),
    ),
    velocities: byActuator(plant, velocities),
    pressures: series((one) => one.pressures),
    flows,
    power,
    oil: series((one) => one.oil),
    events: trace.events,
    steps: trace.spans,
    live: Object.fromEntries(trace.live),
    statistics: trace.statistics,
  };
}

function byActuator<T>(plant: Plant, series: Record<string, T>): Record<string, T> {
  return Object.fromEntries(
    plant.bodies.flatMap((body) => (series[body.id] === undefined ? [] : body.actuators.map((id) => [id, series[body.id]!] as const))),
  );
}

export function drivePower(plant: Plant, drive: string, solution: Solution): number {
  return plant.at.pumpsOf(drive).reduce((sum, pump) => sum + (solution.shaft[pump.id] ?? 0), 0);
}
