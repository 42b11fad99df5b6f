/** Which ports of a component are joined by open oil in a solution. */
import type { Solution } from '../assembly/machine.ts';
import { positionsOf } from '../kinds/directional-positions.ts';
import type { Component } from '../model/circuit.ts';
import type { Lookup } from './lookup.ts';
import { flag } from './read.ts';

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

/** Paths of a position. */
export function pathsIn(valve: Component, position: 'a' | 'b' | 'centre'): readonly Pair[] {
  return positionsOf(valve).paths[position].map((one) => [one.from, one.to] as const);
}
