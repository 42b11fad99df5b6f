/** Which actuators move as one: a load with several actuators makes them one body. */
import { beginsAt } from '../kinds/cylinder-areas.ts';
import { si } from '../kinds/read.ts';
import type { Circuit, Component } from '../model/circuit.ts';

export interface BodyGroup {
  readonly actuators: readonly string[];
  readonly type: 'linear' | 'rotating';
  /** m or rad; Infinity for motors. */
  readonly stroke: number;
  readonly begins: number;
  /** kg or kg.m2 */
  readonly mass: number;
}

const ACTUATORS: readonly string[] = ['cylinder', 'motor', 'rotary'];
export const isActuator = (component: Component): boolean => ACTUATORS.includes(component.kind);

const strokeOf = (c: Component): number =>
  c.kind === 'cylinder' ? (si(c, 'stroke') ?? 0) : c.kind === 'rotary' ? (si(c, 'angle') ?? 0) : Number.POSITIVE_INFINITY;

/** Bodies in the order of their first actuator; only actuators that `computed` keeps. */
export function groupBodies(circuit: Circuit, computed: (component: Component) => boolean): readonly BodyGroup[] {
  const actuators = circuit.components.filter((c) => isActuator(c) && computed(c));
  const group = new Map<string, string[]>(actuators.map((c) => [c.id, [c.id]]));
  for (const load of circuit.loads) {
    const members = load.actuators.filter((id) => group.has(id));
    const first = members[0];
    if (first === undefined) continue;
    const joined = [...new Set(members.flatMap((id) => group.get(id) ?? []))];
    joined.sort((x, y) => actuators.findIndex((c) => c.id === x) - actuators.findIndex((c) => c.id === y));
    for (const id of joined) group.set(id, joined);
  }
  const bodies: BodyGroup[] = [];
  const done = new Set<string>();
  for (const actuator of actuators) {
    if (done.has(actuator.id)) continue;
    const ids = group.get(actuator.id) ?? [actuator.id];
    for (const id of ids) done.add(id);
    const members = actuators.filter((c) => ids.includes(c.id));
    const stroke = Math.min(...members.map(strokeOf));
    const loads = circuit.loads.filter((l) => l.actuators.some((id) => ids.includes(id)));
    const rotating = actuator.kind !== 'cylinder';
    bodies.push({
      actuators: ids,
      type: rotating ? 'rotating' : 'linear',
      stroke,
      begins: actuator.kind === 'cylinder' ? Math.min(beginsAt(actuator), stroke) : 0,
      mass: loads.reduce((sum, l) => sum + (si(l, rotating ? 'inertia' : 'mass') ?? 0), 0),
    });
  }
  return bodies;
}
