/** The circuit as a machine: assembled once, then set and solved as often as wanted. */
import { compile, type Network, type SteadyResult, solveSteady } from '@oilway/engine';
import type { Circuit } from '../model/circuit.ts';
import { assembleNetwork } from './assemble-network.ts';
import type { Assembled } from './assembled.ts';
import type { Machine, MachineOptions, Setting, Solution } from './machine.ts';
import { Run } from './run.ts';
import { sensitivitiesOf } from './sensitivities.ts';
import { applySetting, requestOf } from './setting.ts';
import { settleMachine } from './settle.ts';
import { solutionOf } from './solution.ts';

interface Built {
  readonly assembled: Assembled;
  readonly network: Network;
}

/** Assembles all components that can be computed; what cannot is named in `notComputed`. Never throws on a resolved circuit. */
export function assemble(circuit: Circuit, options: MachineOptions = {}): Machine {
  const build = (leakage: boolean): Built => {
    const assembled = assembleNetwork(circuit, options.temperature, leakage);
    return { assembled, network: compile(assembled.spec) };
  };
  const tight = build(false);
  // Leakage edges double the network and count in few studies: made when first asked for. Nodes and bodies are the same.
  let leaking: Built | undefined;
  const builtFor = (setting: Setting): Built => {
    if (setting.leakage !== true) return tight;
    leaking ??= build(true);
    return leaking;
  };
  /** The engine's result behind each solution, for warm starts. */
  const results = new WeakMap<Solution, SteadyResult>();

  const solveEngine = (setting: Setting, near?: SteadyResult): SteadyResult => {
    const { assembled, network } = builtFor(setting);
    applySetting(assembled, setting, network.parameters);
    return solveSteady(network, { ...requestOf(assembled, setting), start: near });
  };
  const solve = (setting: Setting, near?: Solution): Solution => {
    const whole = near === undefined ? setting : { ...setting, bits: { ...near.bits, ...setting.bits } };
    const { assembled, network } = builtFor(setting);
    const result = solveEngine(whole, near === undefined ? undefined : results.get(near));
    const solution = solutionOf(assembled, network, whole, result);
    results.set(solution, result);
    return solution;
  };
  const settle = (setting: Setting, near?: Solution): Solution => {
    const settled = settleMachine(builtFor(setting).assembled, solve, setting, near);
    const kept = results.get(settled.base);
    if (kept !== undefined) results.set(settled.solution, kept);
    return settled.solution;
  };
  return {
    circuit,
    bodies: tight.assembled.bodies.map(({ id, actuators, type, stroke, begins, sealFriction, knots }) => ({
      id,
      actuators,
      type,
      stroke,
      begins,
      sealFriction,
      knots,
    })),
    assumptions: tight.assembled.assumptions,
    notComputed: tight.assembled.notComputed,
    heads: tight.assembled.heads,
    temperature: tight.assembled.oil.temperature,
    solve,
    settle,
    sensitivities: (setting, at, body) => {
      const { assembled, network } = builtFor(setting);
      const settled = { ...setting, valves: { ...setting.valves, ...at.stands }, bits: { ...at.bits, ...setting.bits } };
      return sensitivitiesOf(assembled, network, settled, results.get(at), body);
    },
    start: (setting, at) => {
      // The run starts from where the solution was settled: valves that did not shift, bits that turned.
      const from = { ...setting, valves: { ...setting.valves, ...at.stands }, bits: at.bits };
      const { assembled, network } = builtFor(setting);
      const start = results.get(at) ?? solveEngine(from);
      return new Run(assembled, network, from, setting.valves, start, options.dynamics ?? false);
    },
  };
}
