/** The course of a cycle over time as data: unrounded SI, every column with its unit. */
import { type Dimension, SI_UNIT } from '@oilway/quantity';
import type { Circuit, Component, CycleResult, Run, Study } from '@oilway/circuit';
import { csvField } from '../text/table.ts';

interface Column {
  readonly name: string;
  readonly of: string;
  readonly quantity: string;
  /** SI */
  readonly unit: string;
  readonly values: readonly number[];
}

type Turning = (id: string) => boolean;

/** Which actuators turn: their positions are rad, their velocities rad/s. */
export function turning(components: readonly Pick<Component, 'id' | 'kind'>[]): Turning {
  const ids = new Set(components.filter((one) => one.kind === 'motor' || one.kind === 'rotary').map((one) => one.id));
  return (id) => ids.has(id);
}

function columnsOf(run: Run, turns: Turning): readonly Column[] {
  const group = (values: Readonly<Record<string, readonly number[]>>, quantity: string, dimension: (id: string) => Dimension): Column[] =>
    Object.entries(values).map(([of, series]) => ({
      name: `${of} ${quantity}`,
      of,
      quantity,
      unit: SI_UNIT[dimension(of)],
      values: series,
    }));
  return [
    ...group(run.positions, 'position', (id) => (turns(id) ? 'angle' : 'length')),
    ...group(run.velocities, 'velocity', (id) => (turns(id) ? 'rotation' : 'velocity')),
    ...group(run.pressures, 'pressure', () => 'pressure'),
    ...group(run.flows, 'flow', () => 'flow'),
    ...group(run.power, 'power', () => 'power'),
    ...group(run.oil, 'oil', () => 'volume'),
  ];
}

function stepAt(run: Run, time: number, index: number, count: number): string {
  const last = index === count - 1;
  return run.steps
    .filter((step) => time >= step.from && (time < step.to || (last && time <= step.to)))
    .map((step) => step.id)
    .join('+');
}

function number(value: number | undefined): string {
  return value === undefined || !Number.isFinite(value) ? '' : String(value);
}

/** One head line, then a line a sample; several cycles follow each other with the union of their columns. */
export function courseCsv(cycles: readonly CycleResult[], turns: Turning = () => false): string[] {
  const tables = cycles.flatMap((cycle) =>
    cycle.run === undefined ? [] : [{ cycle: cycle.id, run: cycle.run, columns: columnsOf(cycle.run, turns) }],
  );
  const heads = new Map<string, string>();
  for (const { columns } of tables) for (const column of columns) heads.set(column.name, `${column.name} [${column.unit}]`);
  const lines = [['cycle', 'step', 'time [s]', ...heads.values()].map(csvField).join(',')];
  for (const { cycle, run, columns } of tables) {
    const byName = new Map(columns.map((column) => [column.name, column]));
    run.times.forEach((time, i) => {
      const cells = [cycle, stepAt(run, time, i, run.times.length), number(time)];
      for (const name of heads.keys()) cells.push(number(byName.get(name)?.values[i]));
      lines.push(cells.map(csvField).join(','));
    });
  }
  return lines;
}

/** JSON has no infinity: what is not finite is left out as null. */
function finite(value: number | undefined): number | null {
  return value === undefined || !Number.isFinite(value) ? null : value;
}

export function courseData(file: string, circuit: Circuit, study: Study, cycles: readonly CycleResult[]): Record<string, unknown> {
  const turns = turning(circuit.components);
  return {
    tool: 'oilway',
    file,
    circuit: circuit.name ?? null,
    units: 'SI: m, s, Pa (gauge), N, W, m3/s, rad; each column names its own',
    cycles: cycles.map((cycle) => ({
      id: cycle.id,
      mode: cycle.mode,
      time: finite(cycle.time),
      firstTime: finite(cycle.firstTime),
      runs: cycle.runs,
      settled: cycle.settled,
      completed: cycle.completed,
      faults: cycle.faults.map((fault) => ({ kind: fault.kind, words: fault.words, step: fault.step ?? null, time: finite(fault.time) })),
      duty: cycle.duty,
      heat: finite(cycle.heat),
      work: finite(cycle.work),
      steps: (cycle.run?.steps ?? []).map((step) => ({ id: step.id, from: step.from, to: step.to })),
      events: (cycle.run?.events ?? []).map((event) => ({ time: event.time, of: event.of, words: event.words })),
      times: cycle.run?.times ?? [],
      columns:
        cycle.run === undefined ? [] : columnsOf(cycle.run, turns).map((column) => ({ ...column, values: column.values.map(finite) })),
    })),
    steps: study.steps
      .filter((step) => cycles.some((cycle) => cycle.id === step.cycle))
      .map((step) => ({
        id: step.id,
        entered: finite(step.entered),
        time: finite(step.time),
        speeds: step.speeds,
        peaks: step.peaks,
        lows: step.lows,
        faults: step.faults.map((fault) => fault.words),
      })),
    requirements: study.requirements.map((one) => ({
      id: one.id,
      verdict: one.verdict,
      worst:
        one.worst === undefined
          ? null
          : { value: finite(one.worst.value), dimension: one.worst.dimension, unit: SI_UNIT[one.worst.dimension] },
      margin: finite(one.margin),
      at: one.at,
      words: one.words,
    })),
  };
}
