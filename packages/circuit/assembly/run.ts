/** A run of the machine in time. */
import type { Network, SteadyResult } from '@oilway/engine';
import type { Assembled } from './assembled.ts';
import type { MachineOptions, MachineRun, Setting, Solution } from './machine.ts';

export function startRun(_assembled: Assembled, _network: Network, _setting: Setting, _at: Solution, _near: SteadyResult | undefined, _options: MachineOptions): MachineRun {
  throw new Error('runs in time come with the engine part that integrates');
}
