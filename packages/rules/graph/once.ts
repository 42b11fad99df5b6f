/** What follows from a graph alone is worked out once, however many rules ask for it. */
import type { Graph } from './graph.ts';

export function once<T>(compute: (graph: Graph) => T): (graph: Graph) => T {
  const known = new WeakMap<Graph, { readonly value: T }>();
  return (graph) => {
    const one = known.get(graph) ?? { value: compute(graph) };
    known.set(graph, one);
    return one.value;
  };
}
