/** C01: no shut-off between an accumulator and the system. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { type Passing, waysFrom, waysTo } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { isolate } from '../fixes/accumulator.ts';
import type { Rule } from '../rule.ts';
import { byName, list } from '../words.ts';
import { relatedTo } from './pump-guard.ts';

/** Any way at all, in either direction, but for a shut-off. */
const withoutShutoff: Passing = (edge) => (edge.kind === 'shutoff' ? undefined : 0);

/** Pumps and actuators that stay joined to the accumulator whatever is shut off. */
function systemOf(graph: Graph, store: Component): readonly Component[] {
  const net = graph.netAt(store.id, 'P');
  if (net === undefined || net.open === true) return [];
  const nets = new Set([...waysFrom(graph, net.id, withoutShutoff).keys(), ...waysTo(graph, net.id, withoutShutoff).keys()]);
  const found = graph.circuit.components.filter((c) => {
    const ports =
      c.kind === 'pump'
        ? ['P']
        : c.kind === 'cylinder'
          ? ['cap', 'rod']
          : c.kind === 'motor' || c.kind === 'rotary'
            ? ['A', 'B']
            : c.kind === 'brake'
              ? ['P']
              : [];
    return ports.some((port) => nets.has(graph.netAt(c.id, port)?.id ?? ''));
  });
  // Pumps first: they fill it.
  return found.sort((a, b) => Number(b.kind === 'pump') - Number(a.kind === 'pump') || byName(a.id, b.id));
}

export const C01: Rule = {
  code: 'C01',
  name: 'acc-no-isolation',
  title: 'Accumulator without a shut-off',
  severity: 'error',
  why: 'It cannot be parted from the system: whoever opens a fitting or changes a valve meets its stored oil.',
  ground: 'ISO 4413, gas-loaded accumulators; EN 14359',
  mend: 'Put a shut-off valve between the accumulator and the system, with bleed and relief on the accumulator side.',
  needs: 'topology',
  page: `
From the accumulator every way is followed in either direction, through every component but shut-off valves. If a pump or an actuator is met, nothing
parts the accumulator from the system.

Stays clean: a \`shutoff\`, locked or not, in every way to the system; bleeds and reliefs on the accumulator's side that lead to the reservoir only.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('accumulator').flatMap((store) => {
      const system = systemOf(graph, store);
      if (system.length === 0) return [];
      return [
        tell(C01, {
          what: `No shut-off between ${store.id} and the system: ${store.id} stays joined to ${list(system.map((c) => c.id))}.`,
          origin: store.nameOrigin,
          place: store.id,
          state: 'OFF',
          related: system.slice(0, 3).map((c) => relatedTo(c, `${c.id} cannot be parted from ${store.id}`)),
          fixes: [isolate(context, graph, store)],
        }),
      ];
    });
  },
};
