/**
 * Measures the core; part of `npm run bench`. Figures depend on the machine; targets are what was asked of it. Never fails.
 */
import { compile, type Network, solveSteady, type SteadyRequest, Transient } from '@oilway/engine';
import { COMPONENTS, type Machine, machine, runCycle } from './machine.ts';
import { emit, median, row, spent } from './rows.ts';

function prepared(copies: number): { made: Machine; net: Network; request: SteadyRequest } {
  const made = machine(copies);
  const net = compile(made.spec);
  net.parameters.set(made.values);
  return { made, net, request: { positions: made.positions, loads: made.loads, gas: made.spec.gas.map(() => 'empty' as const) } };
}

/** One cycle from its network to its end: processor time, ms. */
function cycle(copies: number): number {
  const { made, net, request } = prepared(copies);
  const began = spent();
  const start = solveSteady(net, request);
  const run = new Transient(net, request, start);
  const failed = runCycle(made, run);
  const used = spent() - began;
  if (failed) throw new Error(failed);
  return used;
}
const cycles = (copies: number, count: number): number[] => Array.from({ length: count }, () => cycle(copies));

emit(row('cycle of 28 s, first in a process', [cycle(1)], 'ms', { target: 40 }));
cycles(1, 10);
const warm = cycles(1, 25);
emit(row('cycle of 28 s, warm', warm, 'ms', { target: 10 }));

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
  const zeros: number[] = [];
  const neighbour: number[] = [];
  const positions = made.positions.map((x, i) => (Number.isFinite(made.spec.actuators[i]!.high) ? 0.03 : x));
  for (let round = 0; round < 60; round++) {
    for (const state of states) {
      net.parameters.set(made.values);
      for (const parameter of state) net.parameters[parameter] = 1;
      // Too short for the clock of the processor: by the wall, the median of many.
      let began = performance.now();
      const result = solveSteady(net, { ...request, positions });
      if (round > 20) zeros.push(performance.now() - began);
      began = performance.now();
      solveSteady(net, { ...request, positions: positions.map((x) => x + 1e-4), start: result });
      if (round > 20) neighbour.push(performance.now() - began);
    }
  }
  emit(row(`steady from zeros, ${COMPONENTS} components`, zeros, 'ms', { target: 0.2 }));
  emit(row('steady from a neighbour', neighbour, 'ms', { target: 0.02 }));
}
for (const [copies, target, count] of [
  [8, 9, 5],
  [32, 40, 3],
] as const) {
  const one = median(warm);
  const ratios = cycles(copies, count).map((ms) => ms / one);
  emit(row(`cycle of ${copies} copies against one`, ratios, 'x', { target }));
}
