/** What can put pressure on a net besides its own pump: stores, other pumps, chambers that carry a load. */
import { type Component, type Load, type LoadValue, read } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';

export interface Carried {
  readonly actuator: Component;
  /** The port whose oil carries it. */
  readonly port: string;
  /** N (N.m at a motor), the greatest that stands there whether it moves or not. */
  readonly force: number;
  readonly inward: boolean;
  readonly load: Load;
  readonly people: string | undefined;
  /** Weight or a force that stands everywhere, as against a table that springs back within a few millimetres. */
  readonly fixed: boolean;
}

const G = 9.80665;

function magnitude(value: LoadValue): number {
  const values = value.table?.map((knot) => Math.abs(knot.value.si)) ?? [Math.abs(value.constant?.si ?? 0)];
  return Math.max(...values);
}

/** A table that falls to nothing within its stroke (a pressed part springs back) is no load that follows. */
function follows(value: LoadValue): boolean {
  if (value.table !== undefined) return value.table.every((knot) => Math.abs(knot.value.si) > 0);
  return value.range === undefined;
}

/** Loads that stand on an actuator at rest, by the chamber that carries them. */
export function carriedLoads(graph: Graph): readonly Carried[] {
  const found: Carried[] = [];
  for (const load of graph.circuit.loads) {
    for (const id of load.actuators) {
      const actuator = graph.component(id);
      if (actuator === undefined) continue;
      const people = read.word(load, 'people');
      const share = 1 / load.actuators.length;
      for (const inward of [true, false]) {
        const entries = load.properties.flatMap((p) =>
          p.value.type === 'load' && (inward ? ['inward', 'backward'] : ['outward', 'forward']).includes(p.name) ? [p.value] : [],
        );
        const weight = weightOf(actuator, load) * (inward ? 1 : -1);
        const following = entries.filter(follows).reduce((sum, e) => sum + magnitude(e), Math.max(0, weight));
        const all = entries.reduce((sum, e) => sum + magnitude(e), Math.max(0, weight));
        if (all <= 0) continue;
        const port = actuator.kind === 'cylinder' ? (inward ? 'cap' : 'rod') : inward ? 'A' : 'B';
        found.push({ actuator, port, force: (following > 0 ? following : all) * share, inward, load, people, fixed: following > 0 });
      }
    }
  }
  return found;
}

/** Weight along the rod, N, + = inward (rod up). */
function weightOf(actuator: Component, load: Load): number {
  const attitude = actuator.properties.find((p) => p.name === 'attitude')?.value;
  const mass = read.si(load, 'mass');
  return attitude?.type === 'attitude' && mass !== undefined ? mass * G * Math.sin(attitude.angle) : 0;
}

export function driveOf(pump: Component): string | undefined {
  return read.reference(pump, 'driven')?.id;
}

/** Area of the chamber at a cylinder's port, m2; undefined where bore or rod is not known. */
export function chamberArea(cylinder: Component, port: string): number | undefined {
  const bore = read.si(cylinder, 'bore');
  if (bore === undefined) return undefined;
  const rod = read.si(cylinder, 'rod') ?? 0;
  const cap = (Math.PI / 4) * bore * bore;
  return port === 'cap' && !read.has(cylinder, 'through') ? cap : cap - (Math.PI / 4) * rod * rod;
}
