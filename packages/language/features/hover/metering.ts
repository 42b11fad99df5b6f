/** Which motion a throttle with a reverse check meters, in motion words: "meters C1 extending". */
import { KINDS, read, type Circuit, type Component } from '@oilway/circuit';
import { componentOf, netOf } from './places.ts';

/** Oil passes these from one side to the other without choosing a way. */
const PASSED: ReadonlySet<string> = new Set([
  'check',
  'pilotcheck',
  'counterbalance',
  'burst',
  'throttle',
  'deceleration',
  'shutoff',
  'coupling',
  'filter',
  'cooler',
  'sequence',
  'reducing',
]);
const SIGNAL: ReadonlySet<string> = new Set(['pilot', 'drain', 'vent', 'return']);

interface Reach {
  readonly actuator: Component;
  readonly port: string;
  readonly distance: number;
}

/** The nearest actuator port from a net, not through the component itself. */
function reach(circuit: Circuit, from: string, not: string): Reach | undefined {
  const seen = new Set([from]);
  let front = [from];
  for (let distance = 0; front.length > 0 && distance < 8; distance += 1) {
    const next: string[] = [];
    for (const id of front) {
      const net = circuit.nets.find((one) => one.id === id);
      for (const { component, port } of net?.ports ?? []) {
        const part = componentOf(circuit, component);
        if (!part || part.id === not) continue;
        if (part.kind === 'cylinder' || part.kind === 'motor' || part.kind === 'rotary') {
          if (port !== 'L') return { actuator: part, port, distance };
        } else if (PASSED.has(part.kind)) {
          const kind = KINDS[part.kind];
          const ports = kind.portsOf?.(part) ?? kind.ports;
          if (SIGNAL.has(ports.find((one) => one.name === port)?.role ?? '')) continue;
          for (const other of ports) {
            if (other.name === port || SIGNAL.has(other.role)) continue;
            const beyond = netOf(circuit, part.id, other.name);
            if (beyond && !beyond.reservoir && !seen.has(beyond.id)) {
              seen.add(beyond.id);
              next.push(beyond.id);
            }
          }
        }
      }
    }
    front = next;
  }
  return undefined;
}

export interface Metering {
  /** "meters C1 extending" */
  readonly words: string;
  readonly how: 'meter-in' | 'meter-out';
  readonly actuator: string;
}

/** Undefined where no actuator is near, or without a reverse check (then it meters both ways). */
export function meteringOf(circuit: Circuit, throttle: Component): Metering | undefined {
  if (throttle.kind !== 'throttle' || read.word(throttle, 'reverse') !== 'check') return undefined;
  const entry = netOf(circuit, throttle.id, 'in');
  const exit = netOf(circuit, throttle.id, 'out');
  const before = entry ? reach(circuit, entry.id, throttle.id) : undefined;
  const behind = exit ? reach(circuit, exit.id, throttle.id) : undefined;
  const out = before && (!behind || before.distance <= behind.distance);
  const found = out ? before : behind;
  if (!found) return undefined;
  // Oil that leaves the rod side, or enters the cap side, belongs to extending.
  const first = found.port === 'cap' || found.port === 'A';
  const forward = out ? !first : first;
  const words = found.actuator.kind === 'cylinder' ? (forward ? 'extending' : 'retracting') : forward ? 'forward' : 'backward';
  return { words: `meters ${found.actuator.id} ${words}`, how: out ? 'meter-out' : 'meter-in', actuator: found.actuator.id };
}
