/** A bound requirement with all it is decided from. */
import type { Requirement } from '../../model/circuit.ts';
import type { Facts } from '../places.ts';
import type { Plant } from '../scene.ts';
import type { StateRunner } from '../state-runs.ts';

export type Bounded = Extract<Requirement, { readonly form: 'bound' }>;

export interface Asked {
  readonly plant: Plant;
  readonly facts: Facts;
  readonly requirement: Bounded;
  readonly runner: StateRunner;
  /** The place was named (not every step of every cycle). */
  readonly named: boolean;
}
