/** What limits a speed: d ln v / d ln s for every setting and size of the circuit at a solved point. */
import { type Network, type SensitivityOf, type SteadyResult, sensitivities } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import type { Setting } from './machine.ts';
import { applySetting, requestOf } from './setting.ts';

export interface Share {
  readonly of: string;
  readonly words: string;
  readonly share: number;
}

/** Speed below which nothing is said, m/s or rad/s: no motion, friction creeps within it. */
const STILL = 5e-5;
/** Shares below this are left out. */
const LEAST = 5e-3;

/** In descending order; empty where the body stands. `at` must be the solution of this setting. */
export function sensitivitiesOf(
  assembled: Assembled,
  network: Network,
  setting: Setting,
  at: SteadyResult | undefined,
  body: string,
): readonly Share[] {
  const i = assembled.bodies.findIndex((b) => b.id === body || b.actuators.includes(body));
  const v = at?.velocities[i] ?? 0;
  if (i < 0 || at === undefined || !at.converged || Math.abs(v) < STILL) return [];
  applySetting(assembled, setting, network.parameters);
  const owners: number[] = [];
  const of: SensitivityOf[] = [];
  assembled.limitations.forEach((limitation, owner) => {
    for (const target of limitation.targets) {
      owners.push(owner);
      of.push(target);
    }
  });
  const key = (one: SensitivityOf): string => ('parameter' in one ? `p${one.parameter}` : `e${one.element} ${one.size}`);
  const byKey = new Map(sensitivities(network, requestOf(assembled, setting), at, of).map((one) => [key(one.of), one]));
  const shares = assembled.limitations.map(() => 0);
  of.forEach((one, k) => {
    const found = byKey.get(key(one));
    const owner = owners[k];
    if (found !== undefined && owner !== undefined) shares[owner] = (shares[owner] ?? 0) + ((found.velocities[i] ?? 0) * found.value) / v;
  });
  return assembled.limitations
    .map((l, k): Share => ({ of: l.component, words: l.words, share: shares[k] ?? 0 }))
    .filter((s) => Math.abs(s.share) >= LEAST)
    .sort((x, y) => Math.abs(y.share) - Math.abs(x.share));
}
