/**
 * Measures the core: `npm run bench` or `node --experimental-strip-types tests/bench/engine.ts`. Figures depend on the machine;
 * targets are what was asked of it. Prints a table, never fails.
 */
import { compile, type Network, solveSteady, type SteadyRequest, Transient } from '@oilway/engine';
import { type Machine, machine, runCycle } from './machine.ts';

interface Row {
  readonly what: string;
  readonly value: number;
  readonly unit: string;
  readonly target: number;
}
const rows: Row[] = [];
const median = (values: number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]!;

function prepared(copies: number): { made: Machine; net: Network; request: SteadyRequest } {
  const made = machine(copies);
  const net = compile(made.spec);
  net.parameters.set(made.values);
  return { made, net, request: { positions: made.positions, loads: made.loads, gas: made.spec.gas.map(() => 'empty' as const) } };
}

function cycle(copies: number): { ms: number; cpu: number; statistics: string } {
  const { made, net, request } = prepared(copies);
  const began = performance.now();
  const cpu = process.cpuUsage();
  const start = solveSteady(net, request);
  const run = new Transient(net, request, start);
  const failed = runCycle(made, run);
  const used = process.cpuUsage(cpu);
  if (failed) throw new Error(failed);
  return { ms: performance.now() - began, cpu: (used.user + used.system) / 1000, statistics: JSON.stringify(run.statistics) };
}

const firstCycle = cycle(1);
rows.push({ what: 'cycle of 28 s, first in the process (cpu)', value: firstCycle.cpu, unit: 'ms', target: 40 });
const cycles = Array.from({ length: 25 }, () => cycle(1));
rows.push({ what: 'cycle of 28 s, warm (wall)', value: median(cycles.map((c) => c.ms)), unit: 'ms', target: 10 });
const base = Math.min(...cycles.map((c) => c.ms));

{
  const { made, net, request } = prepared(1);
  const commands = made.commands[0]!;
  const states = [
    [],
    [commands.feedOut],
    [commands.feedIn],
    [commands.liftUp],
    [commands.liftDown],
    [commands.clamp],
    [commands.release],
    [commands.turn],
  ];
  const cold: number[] = [];
  const warm: number[] = [];
  const positions = made.positions.map((x, i) => (Number.isFinite(made.spec.actuators[i]!.high) ? 0.03 : x));
  for (let round = 0; round < 60; round++) {
    for (const state of states) {
      net.parameters.set(made.values);
      for (const parameter of state) net.parameters[parameter] = 1;
      let began = performance.now();
      const result = solveSteady(net, { ...request, positions });
      if (round > 20) cold.push(performance.now() - began);
      began = performance.now();
      solveSteady(net, { ...request, positions: positions.map((x) => x + 1e-4), start: result });
      if (round > 20) warm.push(performance.now() - began);
    }
  }
  rows.push({ what: 'steady from zeros, 30 components (median)', value: median(cold), unit: 'ms', target: 0.2 });
  rows.push({ what: 'steady from a neighbour', value: median(warm), unit: 'ms', target: 0.02 });
}
for (const [copies, target] of [
  [8, 9],
  [32, 40],
] as const) {
  const ratio = Math.min(...Array.from({ length: 5 }, () => cycle(copies).ms)) / base;
  rows.push({ what: `cycle of ${copies} copies against one`, value: ratio, unit: 'x', target });
}
for (const row of rows) {
  const verdict = row.value <= row.target ? 'reached' : 'missed';
  console.log(
    `${row.what.padEnd(46)} ${row.value.toPrecision(3).padStart(8)} ${row.unit.padEnd(3)} target ${String(row.target).padEnd(5)} ${verdict}`,
  );
}
console.log('cycle:', firstCycle.statistics);
