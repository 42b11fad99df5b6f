/** The circuit as a machine: assembled once, then set and solved as often as wanted. */
import { compile, type SteadyResult, solveSteady } from '@oilway/engine';
import type { Circuit } from '../model/circuit.ts';
import { assembleNetwork } from './assemble-network.ts';
import type { Assembled } from './assembled.ts';
import type { Machine, MachineOptions, Setting, Solution } from './machine.ts';
import { Run } from './run.ts';
import { sensitivitiesOf } from './sensitivities.ts';
import { applySetting, requestOf } from './setting.ts';
import { settleMachine } from './settle.ts';
import { brakesAt, solutionOf } from './solution.ts';

/** Most passes until brake torque and pressure agree, and the change (N.m, relative) at which they do. */
const BRAKE_PASSES = 40;
const BRAKE_CLOSE = 1e-6;

/** Assembles all components that can be computed; what cannot is named in `notComputed`. Never throws on a resolved circuit. */
export function assemble(circuit: Circuit, options: MachineOptions = {}): Machine {
  const assembled = assembleNetwork(circuit, options.temperature);
  const network = compile(assembled.spec);
  /** The engine's result behind each solution, for warm starts. */
  const results = new WeakMap<Solution, SteadyResult>();

  const solveEngine = (setting: Setting, near?: SteadyResult): { readonly result: SteadyResult; readonly brakes: readonly number[] } => {
    applySetting(assembled, setting, network.parameters);
    let brakes = brakesAt(assembled, near?.pressures);
    let result = solveSteady(network, { ...requestOf(assembled, setting, brakes), start: near });
    for (let pass = 0; assembled.brakes.length > 0 && pass < BRAKE_PASSES; pass++) {
      const now = brakesAt(assembled, result.pressures);
      const close = now.every((b, i) => Math.abs(b - (brakes[i] ?? 0)) <= BRAKE_CLOSE * (1 + Math.abs(b)));
      if (close) break;
      // Averaged after the first passes: pressure and friction of a slipping brake depend on each other.
      brakes = pass < 4 ? now : now.map((b, i) => (b + (brakes[i] ?? 0)) / 2);
      result = solveSteady(network, { ...requestOf(assembled, setting, brakes), start: result });
    }
    return { result, brakes };
  };
  const solve = (setting: Setting, near?: Solution): Solution => {
    const whole = near === undefined ? setting : { ...setting, bits: { ...near.bits, ...setting.bits } };
    const { result, brakes } = solveEngine(whole, near === undefined ? undefined : results.get(near));
    const solution = solutionOf(assembled, network, whole, result, brakes);
    results.set(solution, result);
    return solution;
  };
  const settle = (setting: Setting, near?: Solution): Solution => {
    const settled = settleMachine(assembled, solve, setting, near);
    const kept = results.get(settled.base);
    if (kept !== undefined) results.set(settled.solution, kept);
    return settled.solution;
  };
  return {
    circuit,
    bodies: assembled.bodies.map(({ id, actuators, type, stroke, begins, sealFriction, knots }) => ({
      id,
      actuators,
      type,
      stroke,
      begins,
      sealFriction,
      knots,
    })),
    assumptions: assembled.assumptions,
    notComputed: assembled.notComputed,
    heads: assembled.heads,
    temperature: assembled.oil.temperature,
    solve,
    settle,
    sensitivities: (setting, at, body) =>
      sensitivitiesOf(
        assembled,
        network,
        { ...setting, valves: { ...setting.valves, ...at.stands }, bits: { ...at.bits, ...setting.bits } },
        results.get(at),
        body,
      ),
    start: (setting, at) => {
      // The run starts from where the solution was settled: valves that did not shift, bits that turned.
      const from = { ...setting, valves: { ...setting.valves, ...at.stands }, bits: at.bits };
      applySetting(assembled, from, network.parameters);
      const start = results.get(at) ?? solveEngine(from).result;
      applySetting(assembled, from, network.parameters);
      return new Run(assembled, network, from, setting.valves, start, options.dynamics ?? false);
    },
  };
}

/** What `assemble` works with, for tests of the parts. */
export type { Assembled };
