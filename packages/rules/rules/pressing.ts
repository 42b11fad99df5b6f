/** Actuators that stand on a part which pushes back: they have arrived, though no stop holds them. */
import type { ActuatorPoint, LoadValue } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';

/** True where the actuator presses on a part that pushes back along a table: it stands where the relief lets it, on purpose. */
export function pressesOnPart(graph: Graph, a: ActuatorPoint): boolean {
  const against = a.direction > 0 ? ['inward', 'backward'] : ['outward', 'forward'];
  return graph.circuit.loads.some(
    (load) =>
      load.actuators.includes(a.id) &&
      load.properties.some(
        (p) => p.value.type === 'load' && against.includes(p.name) && p.value.table !== undefined && within(p.value, a.position),
      ),
  );
}

function within(value: LoadValue, position: number): boolean {
  const table = value.table ?? [];
  return table.some((knot, i) => {
    const next = table[i + 1];
    return (
      next !== undefined &&
      Math.max(Math.abs(knot.value.si), Math.abs(next.value.si)) > 0 &&
      position >= knot.at.si &&
      position <= next.at.si
    );
  });
}

/** True where it stands at the stop it was to go to. */
export function hasArrived(a: ActuatorPoint): boolean {
  return a.atStop === (a.direction > 0 ? 'extended' : 'retracted');
}
