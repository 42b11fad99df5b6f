/** B02: the unloading valve is piloted from the low-pressure side of the check. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { openAlways, type Passing, waysFrom } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { below, statement, writable } from '../fixes/sheet.ts';
import { neighbours, takeOut, writtenAt } from '../fixes/places.ts';
import type { Fix, Rule, RuleContext } from '../rule.ts';
import { pumpsBeside, sameSide } from './high-low.ts';
import { relatedTo } from './pump-guard.ts';

/** A damping orifice in the pilot line changes nothing of the side it senses. */
const sensed: Passing = (edge) => (edge.kind === 'throttle' && edge.class === 'always' ? 0 : sameSide(edge));

interface Behind {
  readonly check: Component;
  /** The pump or store on the high-pressure side, and its port. */
  readonly high: Component;
}

/** What lies behind a check on the unloading valve's line and keeps its pressure when the pump is unloaded. */
function behindCheck(graph: Graph, net: string): Behind | undefined {
  const near = new Set(pumpsBeside(graph, net).map((p) => p.id));
  for (const way of waysFrom(graph, net, openAlways).values()) {
    const edge = way.edges.find((e) => e.kind === 'check');
    const check = edge === undefined ? undefined : graph.component(edge.component);
    if (check === undefined) continue;
    for (const ref of graph.net(way.net)?.ports ?? []) {
      const component = graph.component(ref.component);
      if (component === undefined || near.has(component.id) || ref.port !== 'P') continue;
      if (component.kind === 'pump' || component.kind === 'accumulator') return { check, high: component };
    }
  }
  return undefined;
}

function move(context: RuleContext, graph: Graph, unloading: Component, high: Component): Fix | undefined {
  const pilots = writtenAt(graph.circuit, unloading.id, 'X');
  const pilot = pilots[0];
  if (!writable(context, unloading) || pilots.length !== 1 || pilot === undefined) return undefined;
  const title = `Take the pilot of ${unloading.id} from ${high.id}.P, behind the check`;
  const other = pilot.line.stations.find((_, i) => i !== pilot.station);
  if (pilot.line.stations.length === 2 && neighbours(pilot) === 1 && other !== undefined) {
    const { uri, start } = other.places[0]!.origin;
    const end = other.places[other.places.length - 1]!.origin.end;
    if (other.places.length > 1) return undefined;
    return { title, safe: false, changes: [{ uri, start, end, text: `${high.id}.P` }] };
  }
  if (neighbours(pilot) < 2) return undefined;
  return {
    title,
    safe: false,
    changes: [
      ...takeOut([pilot]),
      below(context, pilot.line.origin, [statement(context, pilot.line.origin, 'pilot', `${high.id}.P to ${unloading.id}.X`)]),
    ],
  };
}

export const B02: Rule = {
  code: 'B02',
  name: 'hl-pilot-wrong-side',
  title: 'Unloading valve piloted from its own side of the check',
  severity: 'error',
  why: 'As soon as it opens, its own pilot pressure is gone and it closes again: it chatters and never stays unloaded.',
  ground: 'high-low circuit with two pumps, fluid power textbooks',
  mend: 'Take the pilot from the high-pressure side of the check.',
  needs: 'topology',
  page: `
The unloading valve's X is on the same side of the check as its P, and behind that check lies what must pilot it: the high-pressure pump or an
accumulator.

Stays clean: X on the high-pressure line; an unloading valve with neither behind a check (it then acts as a plain relief, which is no guard).`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('unloading').flatMap((unloading) => {
      const net = graph.netAt(unloading.id, 'P')?.id;
      const pilot = graph.netAt(unloading.id, 'X')?.id;
      if (net === undefined || pilot === undefined || !(pilot === net || waysFrom(graph, net, sensed).has(pilot))) return [];
      const behind = behindCheck(graph, net);
      if (behind === undefined) return [];
      const { check, high } = behind;
      const at = writtenAt(graph.circuit, unloading.id, 'X')[0];
      return [
        tell(B02, {
          what: `${unloading.id}.X is on the low-pressure side of ${check.id}: when ${unloading.id} opens, its pilot pressure falls to that of the reservoir and it closes again. It must sense the pressure at ${high.id}.P.`,
          origin: at?.place.origin ?? unloading.nameOrigin,
          place: unloading.id,
          related: [
            relatedTo(check, `${check.id} parts the two sides`),
            relatedTo(high, `${high.id} keeps the pressure that must hold ${unloading.id} open`),
          ],
          fixes: [move(context, graph, unloading, high)],
        }),
      ];
    });
  },
};
