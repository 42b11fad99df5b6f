/** Lowest declared rating on a net: of the ports and of the pipe. */
import type { Component, Origin, Property } from '@oilway/circuit';
import type { Graph } from './graph.ts';

export interface Rating {
  /** Pa gauge. */
  readonly value: number;
  /** "C1", "C1.rod", "the line": what is rated so low. */
  readonly of: string;
  /** Unit as written. */
  readonly unit: string;
  readonly origin: Origin;
}

/** `rated T 160 bar` of a port, else the general `rated` of the component. */
function portRating(component: Component, port: string): Rating | undefined {
  const rated = (p: Property) => p.name === 'rated' && p.value.type === 'quantity';
  const own = component.properties.find((p) => rated(p) && p.port === port);
  const general = own ?? component.properties.find((p) => rated(p) && p.port === undefined);
  if (general?.value.type !== 'quantity') return undefined;
  const { q } = general.value;
  return { value: q.si, of: own === undefined ? component.id : `${component.id}.${port}`, unit: q.unit, origin: general.origin };
}

/** The weakest part of a net; undefined where nothing on it has a declared rating. */
export function ratingOf(graph: Graph, net: string): Rating | undefined {
  const node = graph.net(net);
  if (node === undefined) return undefined;
  let lowest: Rating | undefined;
  const take = (rating: Rating | undefined) => {
    if (rating !== undefined && (lowest === undefined || rating.value < lowest.value)) lowest = rating;
  };
  for (const ref of node.ports) {
    const component = graph.component(ref.component);
    if (component !== undefined) take(portRating(component, ref.port));
  }
  for (const id of node.pieces) {
    const piece = graph.circuit.pieces.find((p) => p.id === id);
    if (piece?.rated !== undefined) take({ value: piece.rated, of: 'the line', unit: '', origin: piece.origin });
  }
  return lowest;
}
