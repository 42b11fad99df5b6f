/** Mends at an accumulator: a shut-off between it and the system, a bleed to the reservoir. */
import type { Component } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import type { Fix, RuleContext } from '../rule.ts';
import { isMiddle, replace, takeOut, type Written, writtenAt } from './places.ts';
import { below, freeName, lastLine, reservoirFor, statement, writable } from './sheet.ts';
import { drop, round } from './values.ts';

/** What belongs on the accumulator's side of its shut-off: bleeds and reliefs whose other side leads to the reservoir only. */
function belongs(component: Component): boolean {
  return component.kind === 'relief' || (component.kind === 'shutoff' && component.properties.some((p) => p.name === 'closed'));
}

export function isolate(context: RuleContext, graph: Graph, store: Component): Fix | undefined {
  const { circuit } = graph;
  const places = writtenAt(circuit, store.id, 'P');
  const at = places[0];
  if (!writable(context, store) || places.length !== 1 || at === undefined || isMiddle(at)) return undefined;
  const name = freeName(circuit, 'BV');
  const beside = besideOf(graph, at, store);
  const declared = below(context, store.origin, [
    statement(
      context,
      store.origin,
      'shutoff',
      `${name} (open, locked, passes ${round(circuit, 1e-3, 'flow', 'up').text} at ${drop(circuit, 1)})`,
    ),
  ]);
  const side = at.station === 0 ? 'B' : 'A';
  const other = side === 'A' ? 'B' : 'A';
  const line = statement(context, at.line.origin, 'working', `${name}.${other} to ${[store.id, ...beside.map((b) => b.text)].join(', ')}`);
  return {
    title: `Insert shut-off ${name} (open, locked) between ${store.id} and the system`,
    safe: false,
    changes: [declared, replace(at, `${name}.${side}`), ...beside.flatMap((b) => takeOut([b.at])), below(context, at.line.origin, [line])],
  };
}

function besideOf(graph: Graph, at: Written, store: Component): { readonly at: Written; readonly text: string }[] {
  const station = at.line.stations[at.station];
  return (station?.places ?? []).flatMap((place, index) => {
    const ref = place.ports[0];
    const component = ref === undefined ? undefined : graph.component(ref.component);
    if (ref === undefined || component === undefined || component.id === store.id || !belongs(component)) return [];
    return [{ at: { line: at.line, station: at.station, index, place }, text: `${component.id}.${ref.port}` }];
  });
}

export function bleed(context: RuleContext, graph: Graph, store: Component): Fix | undefined {
  const { circuit } = graph;
  const reservoir = reservoirFor(circuit);
  const last = lastLine(circuit);
  const at = writtenAt(circuit, store.id, 'P')[0];
  if (!writable(context, store) || reservoir === undefined || last === undefined || at === undefined) return undefined;
  const name = freeName(circuit, 'BV');
  return {
    title: `Insert ${name} (closed) that bleeds ${store.id} to ${reservoir} by hand`,
    safe: false,
    changes: [
      below(context, store.origin, [
        statement(
          context,
          store.origin,
          'shutoff',
          `${name} (closed, passes ${round(circuit, 10 / 60000, 'flow', 'up').text} at ${drop(circuit, 10)}) "Bleeds ${store.id} by hand"`,
        ),
      ]),
      below(context, at.line.origin, [
        statement(context, at.line.origin, 'working', `${store.id}.P to ${name}`),
        statement(context, at.line.origin, 'return', `${name} to ${reservoir}`),
      ]),
    ],
  };
}
