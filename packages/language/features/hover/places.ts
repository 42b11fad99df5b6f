/** Where the figures of a hover stand: the steps of the cycles; without a cycle each coil alone; without coils the state at rest. */
import type { ActuatorPoint, Circuit, Component, Net, Point, StepResult } from '@oilway/circuit';
import type { Studied } from '../analysis.ts';

export interface Place {
  /** `Out`, `Drill.Out` where the short name is not unique, `SOL1`, `REST`. */
  readonly label: string;
  readonly points: readonly Point[];
  readonly step?: StepResult;
}

export function placesOf(studied: Studied): Place[] {
  const { study, circuit } = studied;
  const short = new Map<string, number>();
  for (const cycle of circuit.cycles) for (const step of cycle.steps) short.set(step.name, (short.get(step.name) ?? 0) + 1);
  const steps = study.steps.map((step): Place => {
    const name = step.id.split('.').at(-1) ?? step.id;
    return { label: short.get(name) === 1 ? name : step.id, points: step.points, step };
  });
  if (steps.length > 0) return steps;
  const coils = study.states.filter((state) => state.state === 'COIL' || state.state === 'MANUAL');
  const states = coils.length > 0 ? coils : study.states.filter((state) => state.state === 'REST');
  return states.map((state) => ({ label: state.of ?? state.id, points: state.variants.map((variant) => variant.point) }));
}

export const componentOf = (circuit: Circuit, id: string): Component | undefined => circuit.components.find((one) => one.id === id);

export function netOf(circuit: Circuit, component: string, port: string): Net | undefined {
  return circuit.nets.find((net) => net.ports.some((one) => one.component === component && one.port === port));
}

/** Pressure at a port, Pa gauge; undefined where the solution does not determine it or the port is not joined. */
export function pressureAt(circuit: Circuit, point: Point, component: string, port: string): number | undefined {
  const net = netOf(circuit, component, port);
  if (!net || point.undetermined[net.id] !== undefined) return undefined;
  return point.pressures[net.id];
}

/** Flow into the component at a port, m3/s. */
export const flowInto = (point: Point, component: string, port: string): number | undefined => point.flows[`${component}.${port}`];

export const actuatorAt = (point: Point, id: string): ActuatorPoint | undefined => point.actuators.find((one) => one.id === id);

/** Least and greatest of what was found; undefined where nothing was. */
export function extent(values: readonly (number | undefined)[]): { readonly low: number; readonly high: number } | undefined {
  const found = values.filter((value): value is number => value !== undefined && Number.isFinite(value));
  return found.length === 0 ? undefined : { low: Math.min(...found), high: Math.max(...found) };
}

/** Slower than this is leakage, not motion: 0.05 mm/s, 0.05 deg/s (in SI). */
export const STILL = { velocity: 5e-5, rotation: (0.05 * Math.PI) / 180 } as const;

/** The item with the greatest value. Of those alike within a thousandth the first: what is shown must not hop with the last digit of a solution. */
export function greatest<T>(items: readonly T[], value: (item: T) => number | undefined): T | undefined {
  let best: T | undefined;
  let most = Number.NEGATIVE_INFINITY;
  for (const item of items) {
    const one = value(item);
    if (one === undefined || Number.isNaN(one) || (best !== undefined && one <= most + 1e-3 * Math.abs(most))) continue;
    best = item;
    most = one;
  }
  return best;
}
