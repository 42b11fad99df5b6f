/**
 * Where the oil comes from and where it goes: a component's neighbours by the flows of the study, with the steps in which it flows so.
 * Without a study: what the lines join. Editors show it as a call hierarchy.
 */
import { KINDS, type Circuit, type Component } from '@oilway/circuit';
import type { Analysis, Studied } from './analysis.ts';
import { componentOf, placesOf } from './hover/places.ts';
import { Show } from './hover/show.ts';

export interface Neighbour {
  readonly component: Component;
  /** "Out, Back: up to 28.9 L/min", or the ports joined where nothing is computed. */
  readonly detail: string;
}

/** Less than this is leakage, m3/s (0.005 L/min). */
const LEAKAGE = 0.005 / 60_000;

interface Joint {
  readonly own: string;
  readonly other: { readonly component: string; readonly port: string };
}

/** Ports that pipe joins to the component's own, lines with a loss of their own included. */
function joints(circuit: Circuit, id: string): Joint[] {
  const groups = new Map<string, number>(circuit.nets.map((net, index) => [net.id, index]));
  for (const piece of circuit.pieces) {
    const [a, b] = [groups.get(piece.nets[0]), groups.get(piece.nets[1])];
    if (a === undefined || b === undefined || a === b) continue;
    for (const [net, group] of groups) if (group === b) groups.set(net, a);
  }
  const found: Joint[] = [];
  for (const net of circuit.nets) {
    // Seen from the reservoir, what stands at each of its pipes is the other side.
    const own = net.reservoir === id ? [{ component: id, port: 'level' }] : net.ports.filter((port) => port.component === id);
    if (own.length === 0) continue;
    for (const other of circuit.nets) {
      if (groups.get(other.id) !== groups.get(net.id)) continue;
      // The reservoir a pipe ends in is none of the net's ports.
      if (other.reservoir !== undefined && other.reservoir !== id) {
        found.push(...own.map((one) => ({ own: one.port, other: { component: other.reservoir ?? '', port: 'level' } })));
      }
      for (const port of other.ports) if (port.component !== id) found.push(...own.map((one) => ({ own: one.port, other: port })));
    }
  }
  return found;
}

function byFlow(studied: Studied, id: string, into: boolean, joined: readonly Joint[]): Map<string, { steps: Set<string>; most: number }> {
  const found = new Map<string, { steps: Set<string>; most: number }>();
  const sign = into ? 1 : -1;
  for (const place of placesOf(studied)) {
    for (const point of place.points) {
      for (const { own, other } of joined) {
        // A reservoir has no flow of its own in the solution: what flows between it and a port is the port's.
        const at = (component: string, port: string): number => point.flows[`${component}.${port}`] ?? 0;
        const here = own === 'level' ? -sign * at(other.component, other.port) : sign * at(id, own);
        const there = other.port === 'level' ? here : -sign * at(other.component, other.port);
        if (here < LEAKAGE || there < LEAKAGE) continue;
        const one = found.get(other.component) ?? { steps: new Set<string>(), most: 0 };
        one.steps.add(place.label);
        one.most = Math.max(one.most, Math.min(here, there));
        found.set(other.component, one);
      }
    }
  }
  return found;
}

/** Neighbours that oil comes from (`into`) or goes to, in text order. */
export function neighbours(analysis: Analysis, id: string, into: boolean): Neighbour[] {
  const { circuit, studied } = analysis;
  if (!circuit) return [];
  const joined = joints(circuit, id);
  const flows = studied ? byFlow(studied, id, into, joined) : undefined;
  const show = studied ? new Show(studied.circuit) : undefined;
  return circuit.components.flatMap((component): Neighbour[] => {
    const flow = flows?.get(component.id);
    if (flow && show) return [{ component, detail: `${[...flow.steps].join(', ')}: up to ${show.figure(flow.most, 'flow')}` }];
    if (flows) return [];
    const ports = joined
      .filter((one) => one.other.component === component.id)
      .map((one) => `${one.own} with ${component.id}.${one.other.port}`);
    return ports.length > 0 ? [{ component, detail: [...new Set(ports)].join(', ') }] : [];
  });
}

/** The component under the cursor, named or by one of its ports. */
export function componentAt(analysis: Analysis, offset: number): Component | undefined {
  const here = analysis.occurrenceAt(offset);
  if (!here || !analysis.circuit) return undefined;
  const id = here.kind === 'port' ? here.id.slice(0, here.id.lastIndexOf('.')) : here.id;
  const component = componentOf(analysis.circuit, id);
  return component && (component.kind === 'reservoir' || KINDS[component.kind].ports.length > 0) ? component : undefined;
}
