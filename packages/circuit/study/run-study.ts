/** The study of a circuit: cycles over time, states, steps, requirements, heat, assumptions. Pure; the same circuit gives the same study. */
import { assemble } from '../assembly/assemble.ts';
import type { Machine } from '../assembly/machine.ts';
import type { Circuit } from '../model/circuit.ts';
import { noticed } from './assumed.ts';
import { charge } from './charge.ts';
import { type Ran, runCycle } from './cycle.ts';
import { heatOf } from './heat.ts';
import { spread } from './not-computed.ts';
import type { Facts } from './places.ts';
import { requirementResults } from './requirements.ts';
import { plantOf, type Plant } from './scene.ts';
import { heritageOf, studyStates } from './states.ts';
import { coilTables, extremes, stepResults } from './steps.ts';
import type { Point, StateResult, Study } from './study.ts';

export interface StudyOptions {
  /** Asked between solves: true stops; what was not reached is missing and requirements are undecidable. */
  readonly cancelled?: () => boolean;
  /** A machine already assembled (another temperature, tests). */
  readonly machine?: Machine;
  /** Milliseconds; for `spent` only. */
  readonly clock?: () => number;
}

export function study(circuit: Circuit, options: StudyOptions = {}): Study {
  const clock = options.clock ?? (() => 0);
  const began = clock();
  const machine = options.machine ?? assemble(circuit);
  const plant = plantOf(circuit, machine, options.cancelled);
  const rans = circuit.cycles.flatMap((one): readonly Ran[] => (plant.cancelled() ? [] : [runCycle(plant, one)]));
  const steps = [...stepResults(plant, rans), ...coilTables(plant, circuit)].map((one) => ({
    ...one,
    points: one.points.map((point) => spread(plant, point)),
  }));
  const highest = highestPressures(
    rans,
    steps.flatMap((one) => one.points),
  );
  const heritage = heritageOf(plant, rans, charge(plant, rans.length > 0 ? highest : {}));
  const states = studyStates(plant, heritage).map((one) => ({ ...one, result: bounded(plant, one.result, highest) }));
  const cycles = rans.map((one) => one.result);
  const heat = heatOf(plant, rans, states);
  const facts: Facts = { plant, rans, steps, states, cycles, heat };
  const requirements = requirementResults(facts);
  return {
    uri: circuit.uri,
    states: states.map((one) => one.result),
    steps,
    cycles,
    requirements,
    assumptions: [...machine.assumptions, ...noticed(plant, heat, cycles)],
    heat,
    spent: clock() - began,
    notComputed: machine.notComputed,
  };
}

function highestPressures(rans: readonly Ran[], points: readonly Point[]): Readonly<Record<string, number>> {
  const { peaks } = extremes(
    points,
    rans.flatMap((one) => one.counted.flatMap((trace) => trace.samples.filter((sample) => !sample.shifting))),
  );
  return peaks;
}

/** A closed volume can be at no more than the highest pressure of any step that leads to it, cut where a valve lets it out. */
function bounded(plant: Plant, state: StateResult, highest: Readonly<Record<string, number>>): StateResult {
  return {
    ...state,
    variants: state.variants.map((variant) => {
      const undetermined: Record<string, { low: number; high: number }> = {};
      for (const [net, span] of Object.entries(variant.point.undetermined)) {
        const reached = highest[net];
        undetermined[net] = { low: span.low, high: reached === undefined ? span.high : Math.max(span.low, Math.min(span.high, reached)) };
      }
      return { ...variant, point: spread(plant, { ...variant.point, undetermined }) };
    }),
  };
}
