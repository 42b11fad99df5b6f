/** What is set on the machine for a step or state: drives, stands, commands, loads, positions, oil. */
import type { BodyLoad, Setting, Stand } from '../assembly/machine.ts';
import { commandsOf, type Control, standsOf } from './logic.ts';
import { loadInSteps } from './loads.ts';
import type { Plant } from './scene.ts';

export interface Situated {
  readonly control: Control;
  readonly detents: Readonly<Record<string, Stand['position']>>;
  readonly positions: Readonly<Record<string, number>>;
  readonly oil?: Readonly<Record<string, number | 'empty'>>;
  /** Absolute gas pressures that go with the oil, Pa. */
  readonly gasPressures?: Readonly<Record<string, number>>;
  readonly bits?: Readonly<Record<string, boolean>>;
  readonly loads: Readonly<Record<string, BodyLoad>>;
  /** Drives that stand, besides those the control stops. */
  readonly standing?: readonly string[];
}

export function settingOf(plant: Plant, of: Situated): Setting {
  const off = [...(of.standing ?? []), ...of.control.stops];
  return {
    drives: Object.fromEntries(plant.at.drives.map((one) => [one.id, !off.includes(one.id)])),
    valves: standsOf(plant.at, of.control, of.detents),
    commands: commandsOf(plant.at, of.control),
    bits: of.bits ?? {},
    positions: of.positions,
    oil: of.oil ?? {},
    ...(of.gasPressures === undefined ? {} : { gasPressures: of.gasPressures }),
    loads: of.loads,
  };
}

export function begins(plant: Plant): Record<string, number> {
  return Object.fromEntries(plant.bodies.map((one) => [one.id, one.begins]));
}

/** Loads of every body while these steps run. */
export function loadsInSteps(plant: Plant, steps: readonly string[]): Record<string, BodyLoad> {
  return Object.fromEntries(plant.bodies.map((one) => [one.id, loadInSteps(plant.at, one, steps)]));
}
