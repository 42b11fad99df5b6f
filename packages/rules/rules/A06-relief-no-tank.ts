/** A06: what a relief lets out has no sure way to the reservoir. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { type Discharge, guardsOf } from '../graph/guards.ts';
import { ifOpened, openAlways, waysFrom } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { toReservoirLine } from '../fixes/lines.ts';
import { unplug } from '../fixes/plug.ts';
import type { Fix, Rule, RuleContext } from '../rule.ts';
import { list } from '../words.ts';
import { relatedTo } from './pump-guard.ts';

/** A relief from one working line to the other is made so on purpose: it guards against its load, not the pump. */
function crossPort(graph: Graph, relief: Component, why: Discharge): boolean {
  const net = graph.netAt(relief.id, 'T');
  return why.cause !== 'open' && why.cause !== 'plugged' && net?.functions.includes('working') === true;
}

function mend(context: RuleContext, graph: Graph, relief: Component, why: Discharge): readonly (Fix | undefined)[] {
  if (why.cause === 'open') return [toReservoirLine(context, relief, 'T', 'return')];
  const plugged = graph.netAt(relief.id, 'T')?.plugged;
  return plugged === undefined ? [] : [unplug(context, relief, 'T', plugged, 'return')];
}

export const A06: Rule = {
  code: 'A06',
  name: 'relief-no-tank',
  title: 'Relief without a free way to the reservoir',
  severity: 'error',
  why: 'A relief lifts against the pressure behind it: with its outlet blocked it protects nothing.',
  ground: 'ISO 4413, protection against unintended pressures',
  mend: 'Give the relief a return line of its own to the reservoir.',
  needs: 'topology',
  page: `
Every relief's T is followed to the reservoir through ways that nothing can close. It is an error where T is plugged or left open, leads to no
reservoir, or passes a directional valve, a shut-off, a quick-action coupling, a filter without bypass, or a cooler with no check beside it.

Stays clean: a return filter with bypass; a cooler with a check beside it; a relief between the two lines of an actuator (T on a \`working\` line),
which guards against the load and is no guard of the pump.

The pumps that have only this relief are not reported again (A01, A02).`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return guardsOf(graph).rejected.flatMap(({ relief, net, why }) => {
      if (crossPort(graph, relief, why)) return [];
      const pumps = graph.ofKind('pump').filter((pump) => {
        const outlet = graph.netAt(pump.id, 'P');
        return outlet !== undefined && waysFrom(graph, outlet.id, ifOpened).has(net);
      });
      // Where something closable stands before the relief too, A02 remains to be said once the outlet is mended.
      const sure = pumps.filter((pump) => waysFrom(graph, graph.netAt(pump.id, 'P')?.id ?? '', openAlways).has(net));
      const closing = (why.way?.edges ?? []).flatMap((e) =>
        e.class === 'always' && e.kind !== 'cooler' ? [] : (graph.component(e.component) ?? []),
      );
      const whom = pumps.length > 0 ? `; ${list(pumps.map((p) => p.id))} can build up pressure without limit` : '';
      return [
        tell(A06, {
          what: `${relief.id} has no sure way to the reservoir: ${why.why ?? ''}${whom}.`,
          origin: relief.nameOrigin,
          place: relief.id,
          related: closing.map((c) => relatedTo(c, `${c.id} stands between ${relief.id}.T and the reservoir`)),
          fixes: mend(context, graph, relief, why),
          hidesAt: [
            ...pumps.map((p) => ({ code: 'A01', place: p.id })),
            ...sure.flatMap((p) => ['A02', 'A07'].map((code) => ({ code, place: p.id }))),
            { code: 'H14', place: `${relief.id}.T` },
          ],
        }),
      ];
    });
  },
};
