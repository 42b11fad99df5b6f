/** A state run on in time from one of its variants: drift, sag, bleeding down. */
import type { Setting, Solution } from '../assembly/machine.ts';
import { noOil } from './charge.ts';
import { gasExponent } from './run.ts';
import type { Plant } from './scene.ts';
import type { StudiedState } from './states.ts';

export interface StateRun {
  /** Variant's label. */
  readonly label: string;
  readonly setting: Setting;
  readonly samples: readonly { readonly time: number; readonly solution: Solution }[];
  readonly failed?: string;
}
export interface StateRuns {
  readonly runs: readonly StateRun[];
  /** Variants there are. */
  readonly all: number;
}

/** At most so many variants of a state are run on for one requirement. */
const MOST = 24;
/** The first second, in which compressed oil settles, is not motion. */
export const SETTLING = 1;

export class StateRunner {
  readonly #plant: Plant;
  readonly #known = new Map<string, StateRun>();

  constructor(plant: Plant) {
    this.#plant = plant;
  }
  /** Runs the variants of a state for a time; `leakage` with leakage and without load friction. `charged`: accumulators begin full. */
  run(states: readonly StudiedState[], duration: number, leakage: boolean): StateRuns {
    const wanted: { label: string; setting: Setting; solution: Solution; key: string }[] = [];
    let all = 0;
    for (const state of states) {
      for (const [index, setting] of state.settings.entries()) {
        const variant = state.result.variants[index];
        const solution = state.solutions[index];
        if (!variant || !solution || variant.accumulators === 'empty') continue;
        all += 1;
        const key = JSON.stringify([setting, duration, leakage]);
        if (wanted.some((one) => one.key === key)) continue;
        wanted.push({ label: [state.result.id, variant.label].filter((one) => one !== '').join(': '), setting, solution, key });
      }
    }
    // What presses most on an actuator is run first.
    wanted.sort((a, b) => burden(b.setting) - burden(a.setting));
    const runs = wanted.slice(0, MOST).map((one) => {
      const known = this.#known.get(one.key);
      if (known) return known;
      const run = this.#once(one.label, one.setting, one.solution, duration, leakage);
      this.#known.set(one.key, run);
      return run;
    });
    return { runs, all: wanted.length > MOST ? all : runs.length };
  }

  #once(label: string, setting: Setting, solution: Solution, duration: number, leakage: boolean): StateRun {
    const plant = this.#plant;
    const samples: { time: number; solution: Solution }[] = [];
    const run = plant.machine.start({ ...setting, leakage, oil: setting.oil ?? noOil(plant) }, solution);
    const began = run.time;
    samples.push({ time: 0, solution: run.now() });
    let failed: string | undefined;
    const gas = plant.at.accumulators.length > 0;
    while (run.time - began < duration - 1e-9 && failed === undefined && !plant.cancelled()) {
      const into = run.time - began;
      // Stops where settling ends, so that there is a sample to count from: steps may be long where little changes.
      const settles = into < SETTLING - 1e-9 && duration > SETTLING;
      const next = settles ? SETTLING : gas ? Math.min(duration, nextChange(into)) : duration;
      const report = run.advance(began + next, [], (time, now) => samples.push({ time: time - began, solution: now }));
      failed = report.failed;
      if (samples.at(-1)!.time < run.time - began - 1e-9) samples.push({ time: run.time - began, solution: run.now() });
      if (gas && !settles) run.gasExponent(gasExponent(run.time - began));
      if (run.time - began <= into) break;
    }
    return { label, setting, samples, ...(failed === undefined ? {} : { failed }) };
  }
}

function nextChange(into: number): number {
  for (let at = 60; at <= 180; at += 20) if (into < at - 1e-9) return at;
  return Number.POSITIVE_INFINITY;
}

function burden(setting: Setting): number {
  return Object.entries(setting.loads).reduce((sum, [id, load]) => {
    const x = setting.positions[id] ?? 0;
    return sum + Math.abs(load.fixed.reduce((total, one) => total + valueAt(one.at, one.force, x), 0));
  }, 0);
}
function valueAt(at: readonly number[], force: readonly number[], x: number): number {
  const right = at.findIndex((one) => one > x);
  if (right === 0) return force[0] ?? 0;
  if (right < 0) return force.at(-1) ?? 0;
  const [x0, x1] = [at[right - 1]!, at[right]!];
  return force[right - 1]! + ((force[right]! - force[right - 1]!) * (x - x0)) / (x1 - x0);
}
