/** The directed graph of a circuit: nets are nodes, ways through components are edges. Made from the text alone, no figures. */
import type { Circuit, Component, Net, PortRef } from '@oilway/circuit';
import { EDGES, type EdgeSpec } from './edges.ts';

export interface Edge extends EdgeSpec {
  /** Component, or the piece of pipe where two nets are parted by a pipe with a loss of its own. */
  readonly component: string;
  readonly kind: Component['kind'] | 'pipe';
  /** Net ids. */
  readonly source: string;
  readonly target: string;
}

export interface Graph {
  readonly circuit: Circuit;
  readonly edges: readonly Edge[];
  component(id: string): Component | undefined;
  ofKind(...kinds: readonly Component['kind'][]): readonly Component[];
  net(id: string): Net | undefined;
  /** The net at a port; undefined where nothing is joined. A port left open or plugged has a net of its own. */
  netAt(component: string, port: string): Net | undefined;
  from(net: string): readonly Edge[];
  to(net: string): readonly Edge[];
}

const made = new WeakMap<Circuit, Graph>();

/** The graph of a circuit; made once. */
export function graphOf(circuit: Circuit): Graph {
  const known = made.get(circuit);
  if (known !== undefined) return known;
  const graph = build(circuit);
  made.set(circuit, graph);
  return graph;
}

function build(circuit: Circuit): Graph {
  const components = new Map(circuit.components.map((c) => [c.id, c]));
  const nets = new Map(circuit.nets.map((n) => [n.id, n]));
  const at = new Map<string, Net>();
  for (const net of circuit.nets) for (const ref of net.ports) at.set(key(ref), net);
  const edges: Edge[] = [];
  for (const component of circuit.components) {
    for (const spec of EDGES[component.kind](component)) {
      const source = at.get(`${component.id}.${spec.from}`);
      const target = at.get(`${component.id}.${spec.to}`);
      if (source === undefined || target === undefined || source.id === target.id) continue;
      edges.push({ ...spec, component: component.id, kind: component.kind, source: source.id, target: target.id });
    }
  }
  for (const piece of circuit.pieces) {
    const [a, b] = piece.nets;
    if (a === b) continue;
    const pipe = { class: 'always' as const, component: piece.id, kind: 'pipe' as const, from: '', to: '' };
    edges.push({ ...pipe, source: a, target: b }, { ...pipe, source: b, target: a });
  }
  return {
    circuit,
    edges,
    component: (id) => components.get(id),
    ofKind: (...kinds) => circuit.components.filter((c) => kinds.includes(c.kind)),
    net: (id) => nets.get(id),
    netAt: (component, port) => at.get(`${component}.${port}`),
    ...adjacency(edges),
  };
}

function adjacency(edges: readonly Edge[]): Pick<Graph, 'from' | 'to'> {
  const out = new Map<string, Edge[]>();
  const into = new Map<string, Edge[]>();
  const push = (map: Map<string, Edge[]>, net: string, edge: Edge) => {
    const list = map.get(net);
    if (list === undefined) map.set(net, [edge]);
    else list.push(edge);
  };
  for (const edge of edges) {
    push(out, edge.source, edge);
    push(into, edge.target, edge);
  }
  return { from: (net) => out.get(net) ?? [], to: (net) => into.get(net) ?? [] };
}

function key(ref: PortRef): string {
  return `${ref.component}.${ref.port}`;
}
