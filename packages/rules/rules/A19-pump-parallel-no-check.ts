/** A19: two pumps on one line without a check each, where one of them can be without pressure while the other works. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { toReservoir } from '../graph/guards.ts';
import { asDeclared, openAlways, waysFrom, waysTo } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { checkAtOutlet } from '../fixes/check.ts';
import type { Rule } from '../rule.ts';
import { highLowUnits } from './high-low.ts';
import { relatedTo } from './pump-guard.ts';
import { driveOf } from './sources.ts';

/** A valve before the common line that leads this pump's oil to the reservoir by itself. */
function ownWayToTank(graph: Graph, outlet: string, other: string): Component | undefined {
  const common = new Set(waysFrom(graph, other, openAlways).keys());
  if (common.has(outlet)) return undefined;
  for (const net of waysFrom(graph, outlet, openAlways, (n) => common.has(n)).keys()) {
    if (common.has(net)) continue;
    for (const edge of graph.from(net)) {
      const valve = edge.kind === 'directional' ? graph.component(edge.component) : undefined;
      if (valve !== undefined && !common.has(edge.target) && toReservoir(graph, edge.target, openAlways) !== undefined) return valve;
    }
  }
  return undefined;
}

export const A19: Rule = {
  code: 'A19',
  name: 'pump-parallel-no-check',
  title: 'Two pumps joined without a check each',
  severity: 'error',
  why: 'While one pump is led to the reservoir, the oil of the other goes the same way or turns the first one.',
  ground: 'pumps in parallel, fluid power textbooks',
  mend: 'Put a check valve at the outlet of each pump, behind its own valves.',
  needs: 'topology',
  page: `
Oil of one pump can get to the outlet of another on the same drive against no check, and between that outlet and the common line a valve leads the second
pump's oil to the reservoir in one of its positions.

Stays clean: two pumps on one drive with one line and one relief (their flows add up); the right form of a two-pump unit. Pumps on two drives are told
by A10, a missing check in a two-pump unit with an unloading valve by B01.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    const units = highLowUnits(graph);
    const pumps = graph.ofKind('pump');
    return pumps.flatMap((pump) => {
      const outlet = graph.netAt(pump.id, 'P');
      if (outlet === undefined || outlet.open === true) return [];
      const into = waysTo(graph, outlet.id, asDeclared);
      for (const other of pumps) {
        const from = graph.netAt(other.id, 'P')?.id;
        if (other.id === pump.id || from === undefined || !into.has(from) || driveOf(other) !== driveOf(pump)) continue;
        if (units.some((u) => [u.low.id, u.high.id].includes(pump.id) && [u.low.id, u.high.id].includes(other.id))) continue;
        const valve = ownWayToTank(graph, outlet.id, from);
        if (valve === undefined) continue;
        return [
          tell(A19, {
            what: `No check valve at ${pump.id}.P: when ${valve.id} leads the oil of ${pump.id} to the reservoir, the oil of ${other.id} goes with it.`,
            origin: pump.nameOrigin,
            place: pump.id,
            related: [relatedTo(valve, `${valve.id} unloads ${pump.id}`), relatedTo(other, `${other.id} works on the same line`)],
            fixes: [checkAtOutlet(context, graph, pump)],
          }),
        ];
      }
      return [];
    });
  },
};
