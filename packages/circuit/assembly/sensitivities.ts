/** What limits a speed: d ln v / d ln s for every setting and size of the circuit at a solved point. */
import { type Network, type SteadyResult, solveSteady } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import type { Limitation } from './assembly.ts';
import type { Setting } from './machine.ts';
import { applySetting, requestOf } from './setting.ts';

export interface Sensitivity {
  readonly of: string;
  readonly words: string;
  readonly share: number;
}

/** Relative change of a setting: far above the solver's closeness (1e-8), small against any band. */
const CHANGE = 1e-3;
/** Speed below which nothing is said, m/s or rad/s: no motion, friction creeps within it. */
const STILL = 5e-5;
/** Shares below this are left out. */
const LEAST = 5e-3;

/** Parameter that scales a size of an element: a path's opening scales its `passes`, a pump's speed its displacement. */
function scaleOf(assembled: Assembled, target: Limitation['targets'][number]): number | undefined {
  if ('parameter' in target) return target.parameter;
  const spec = assembled.specs[target.element];
  if (spec === undefined) return undefined;
  if (spec.type === 'pump') return spec.running;
  if (spec.type === 'path' || spec.type === 'check' || spec.type === 'compensatedEdge') return spec.opening;
  if (spec.type === 'camPath') return spec.factor;
  return undefined;
}

/** By changing one after the other a little and solving again from the solved point; in descending order. `at` must be of this setting. */
export function sensitivitiesOf(
  assembled: Assembled,
  network: Network,
  setting: Setting,
  at: SteadyResult | undefined,
  body: string,
): readonly Sensitivity[] {
  const i = assembled.bodies.findIndex((b) => b.id === body || b.actuators.includes(body));
  if (i < 0 || at === undefined) return [];
  const request = requestOf(assembled, setting);
  applySetting(assembled, setting, network.parameters);
  // Once more with nothing changed: the point the changes are measured against.
  const base = solveSteady(network, { ...request, start: at });
  const v = base.velocities[i] ?? 0;
  if (!base.converged || Math.abs(v) < STILL) return [];
  const found: Sensitivity[] = [];
  for (const limitation of assembled.limitations) {
    const parameters = limitation.targets.flatMap((t) => scaleOf(assembled, t) ?? []).filter((p) => (network.parameters[p] ?? 0) !== 0);
    if (parameters.length === 0) continue;
    const before = parameters.map((p) => network.parameters[p] ?? 0);
    parameters.forEach((p, k) => {
      network.parameters[p] = (before[k] ?? 0) * (1 + CHANGE);
    });
    const changed = solveSteady(network, { ...request, start: base });
    parameters.forEach((p, k) => {
      network.parameters[p] = before[k] ?? 0;
    });
    const w = changed.velocities[i] ?? 0;
    if (!changed.converged || w * v <= 0) continue;
    const share = Math.log(w / v) / Math.log(1 + CHANGE);
    if (Math.abs(share) >= LEAST) found.push({ of: limitation.component, words: limitation.words, share });
  }
  return found.sort((x, y) => Math.abs(y.share) - Math.abs(x.share));
}
