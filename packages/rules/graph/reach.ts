/** Where oil can get to: the easiest way from a net to every other, with the way itself as witness. */
import type { Edge, Graph } from './graph.ts';

export interface Way {
  readonly net: string;
  /** Sum of the costs of the edges. */
  readonly cost: number;
  readonly edges: readonly Edge[];
}

/** Cost of passing an edge; undefined = not passed. */
export type Passing = (edge: Edge) => number | undefined;

/** Only ways that nothing can close. */
export const openAlways: Passing = (edge) => (edge.class === 'always' ? 0 : undefined);

/** Open-always ways free, closable ones at a price: a shut-off left open by hand 1, others 1000, one that is shut 2000. */
export const ifOpened: Passing = (edge) => {
  if (edge.class === 'always') return 0;
  if (edge.class === 'closable') return edge.byHand === true ? 1 : 1000;
  return edge.shut === true ? 2000 : undefined;
};

/** Open-always ways and the paths of directional valves in any position. */
export const throughValves: Passing = (edge) => {
  if (edge.class === 'always') return 0;
  return edge.kind === 'directional' ? 1 : undefined;
};

/** Ways as they stand: open-always ones, shut-offs declared open, filters in either direction. Where oil can run back, it will. */
export const asDeclared: Passing = (edge) => (edge.class === 'always' || edge.byHand === true || edge.kind === 'filter' ? 0 : undefined);

/** Every way oil may take at one time or another: all but against a seat. */
export const spreadable: Passing = (edge) => (edge.class === 'never' && edge.shut !== true ? undefined : 0);

/**
 * Cheapest ways from `start`. A way never passes through one component twice (a valve stands in one position at a time), never on
 * from a net that ends in a reservoir (what is in the reservoir drives nothing), and never through nets named in `stop`.
 */
export function waysFrom(graph: Graph, start: string, passing: Passing, stop?: (net: string) => boolean): ReadonlyMap<string, Way> {
  return search(graph, start, passing, stop, 'from');
}

/** Cheapest ways that lead to `end`, each in the direction of the oil. */
export function waysTo(graph: Graph, end: string, passing: Passing): ReadonlyMap<string, Way> {
  return search(graph, end, passing, undefined, 'to');
}

function search(graph: Graph, start: string, passing: Passing, stop: ((net: string) => boolean) | undefined, sense: 'from' | 'to') {
  const best = new Map<string, Way>([[start, { net: start, cost: 0, edges: [] }]]);
  const open: Way[] = [best.get(start)!];
  for (;;) {
    let cheapest = 0;
    for (let i = 1; i < open.length; i++) if (open[i]!.cost < open[cheapest]!.cost) cheapest = i;
    const way = open[cheapest];
    if (way === undefined) return best;
    open[cheapest] = open[open.length - 1]!;
    open.pop();
    // A better way to the same net was found meanwhile.
    if (best.get(way.net) !== way) continue;
    if (way.net !== start && (stop?.(way.net) === true || (sense === 'from' && graph.net(way.net)?.reservoir !== undefined))) continue;
    for (const edge of sense === 'from' ? graph.from(way.net) : graph.to(way.net)) {
      const cost = passing(edge);
      if (cost === undefined || way.edges.some((e) => e.component === edge.component && e.kind !== 'pipe')) continue;
      const net = sense === 'from' ? edge.target : edge.source;
      const total = way.cost + cost;
      const known = best.get(net);
      if (known !== undefined && known.cost <= total) continue;
      const next: Way = { net, cost: total, edges: sense === 'from' ? [...way.edges, edge] : [edge, ...way.edges] };
      best.set(net, next);
      open.push(next);
    }
  }
}

/** "CV1, V1 (P to A)": the components of a way, in the direction of the oil. */
export function wayWords(way: Way): string {
  return way.edges
    .filter((e) => e.kind !== 'pipe')
    .map((e) => (e.kind === 'directional' ? `${e.component} (${e.from} to ${e.to})` : e.component))
    .join(', ');
}
