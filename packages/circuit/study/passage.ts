/** Which ports of a component are joined by open oil in a solution. */
import type { Solution } from '../assembly/machine.ts';
import type { Component } from '../model/circuit.ts';
import type { Lookup } from './lookup.ts';
import { flag, valueOf, word } from './read.ts';

type Pair = readonly [string, string];

/** Flow that shows a valve to be open, m3/s (0.002 L/min). */
const SEEN = 0.002 / 60000;

export function openPairs(at: Lookup, component: Component, solution: Solution): readonly Pair[] {
  const flowing = (port: string) => Math.abs(solution.flows[`${component.id}.${port}`] ?? 0) > SEEN;
  const opening = solution.openings[component.id];
  switch (component.kind) {
    case 'directional': {
      const stand = solution.stands[component.id];
      return stand ? pathsIn(component, stand.position) : [];
    }
    case 'shutoff':
      return flag(component, 'open') ? [['A', 'B']] : [];
    case 'relief':
    case 'unloading':
      return flowing('P') ? [['P', 'T']] : [];
    case 'check':
      return flowing('in') ? [['in', 'out']] : [];
    case 'pilotcheck':
    case 'counterbalance':
    case 'burst':
      return flowing('C') || (opening ?? 0) > 1e-3 ? [['V', 'C']] : [];
    case 'sequence':
    case 'reducing':
      return flowing('A') || (opening ?? 0) > 1e-3 ? [['P', 'A']] : [];
    case 'deceleration':
      return flowing('in') || (opening ?? 0) > 1e-3 ? [['in', 'out']] : [];
    case 'cylinder':
    case 'motor':
    case 'rotary':
    case 'pump':
    case 'accumulator':
    case 'intensifier':
      return [];
    default: {
      const ports = at.portsOf(component.id).map((one) => one.port);
      return ports.slice(1).map((port) => [ports[0]!, port] as const);
    }
  }
}

const FOUR: Readonly<Record<string, readonly Pair[]>> = {
  a: [['P', 'A'], ['B', 'T']],
  b: [['P', 'B'], ['A', 'T']],
  closed: [],
  open: [['P', 'T'], ['P', 'A'], ['P', 'B']],
  tandem: [['P', 'T']],
  float: [['A', 'T'], ['B', 'T']],
};

/** Paths of a position as declared, else those usual for the shape. */
export function pathsIn(valve: Component, position: 'a' | 'b' | 'centre'): readonly Pair[] {
  const written = valueOf(valve, position);
  if (written?.type === 'position') {
    if (written.paths.length > 0 || written.word === undefined) return written.paths.map((one) => [one.from, one.to] as const);
    return FOUR[written.word] ?? [];
  }
  if (position === 'centre') return FOUR[word(valve, 'centre') ?? 'closed'] ?? [];
  const ports = valve.shape?.ports ?? 4;
  if (ports === 2) return position === 'a' ? [['P', 'A']] : [];
  if (ports === 3) return position === 'a' ? [['P', 'A']] : [['A', 'T']];
  return FOUR[position] ?? [];
}
