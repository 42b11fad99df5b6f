/** Quick ways through a circuit: component by id, net of a port, step by id. Built once a study. */
import type { Circuit, Coil, Component, Cycle, Net, Step } from '../model/circuit.ts';
import { reference } from './read.ts';

export interface Lookup {
  readonly circuit: Circuit;
  component(id: string): Component | undefined;
  coil(id: string): Coil | undefined;
  step(id: string): Step | undefined;
  cycle(id: string): Cycle | undefined;
  net(id: string): Net | undefined;
  /** Net a port is joined to. */
  netOf(component: string, port: string): string | undefined;
  /** Ports of a component that are joined, in text order of the nets. */
  portsOf(component: string): readonly { readonly port: string; readonly net: string }[];
  /** Nets on the other side of pieces with a loss of their own. */
  beyond(net: string): readonly { readonly piece: string; readonly net: string }[];
  ofKind(...kinds: readonly string[]): readonly Component[];
  readonly drives: readonly Component[];
  readonly accumulators: readonly Component[];
  /** Cylinders, motors, semi-rotary actuators. */
  readonly actuators: readonly Component[];
  readonly steps: readonly Step[];
  /** Pumps turned by a drive. */
  pumpsOf(drive: string): readonly Component[];
}

export function lookup(circuit: Circuit): Lookup {
  const components = new Map(circuit.components.map((one) => [one.id, one]));
  const coils = new Map(circuit.coils.map((one) => [one.id, one]));
  const nets = new Map(circuit.nets.map((one) => [one.id, one]));
  const cycles = new Map(circuit.cycles.map((one) => [one.id, one]));
  const steps = circuit.cycles.flatMap((one) => one.steps);
  const byStep = new Map(steps.map((one) => [one.id, one]));
  const ports = new Map<string, { port: string; net: string }[]>();
  const netAt = new Map<string, string>();
  for (const net of circuit.nets) {
    for (const { component, port } of net.ports) {
      const key = `${component}.${port}`;
      if (netAt.has(key)) continue;
      netAt.set(key, net.id);
      const list = ports.get(component) ?? [];
      list.push({ port, net: net.id });
      ports.set(component, list);
    }
  }
  const beyond = new Map<string, { piece: string; net: string }[]>();
  for (const piece of circuit.pieces) {
    const [a, b] = piece.nets;
    if (a === b) continue;
    beyond.set(a, [...(beyond.get(a) ?? []), { piece: piece.id, net: b }]);
    beyond.set(b, [...(beyond.get(b) ?? []), { piece: piece.id, net: a }]);
  }
  const ofKind = (...kinds: readonly string[]) => circuit.components.filter((one) => kinds.includes(one.kind));
  return {
    circuit,
    component: (id) => components.get(id),
    coil: (id) => coils.get(id),
    step: (id) => byStep.get(id),
    cycle: (id) => cycles.get(id),
    net: (id) => nets.get(id),
    netOf: (component, port) => netAt.get(`${component}.${port}`),
    portsOf: (component) => ports.get(component) ?? [],
    beyond: (net) => beyond.get(net) ?? [],
    ofKind,
    drives: ofKind('drive'),
    accumulators: ofKind('accumulator'),
    actuators: ofKind('cylinder', 'motor', 'rotary'),
    steps,
    pumpsOf: (drive) => ofKind('pump').filter((one) => reference(one, 'driven')?.id === drive),
  };
}

/** All assignments: one choice of each list. The first list turns slowest. */
export function product<T>(lists: readonly (readonly T[])[]): T[][] {
  return lists.reduce<T[][]>((rows, list) => rows.flatMap((row) => list.map((item) => [...row, item])), [[]]);
}
