/** F05: a sequence or reducing valve whose spring chamber is not drained to the reservoir. */
import type { Component, Net } from '@oilway/circuit';
import { read } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { toReservoir } from '../graph/guards.ts';
import { openAlways, spreadable, wayWords } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { toReservoirLine } from '../fixes/lines.ts';
import { unplug } from '../fixes/plug.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { relatedTo } from './pump-guard.ts';

function internallyDrained(graph: Graph, valve: Component): Finding[] {
  const outlet = graph.netAt(valve.id, 'A')?.id;
  if (outlet === undefined || toReservoir(graph, outlet, openAlways) !== undefined) return [];
  const word = valve.properties.find((p) => p.name === 'internal');
  return [
    tell(F05, {
      what: `${valve.id} drains internally into ${valve.id}.A, which is under pressure when what stands behind it works: that pressure adds to its setting.`,
      severity: 'warning',
      origin: word?.origin ?? valve.nameOrigin,
      place: valve.id,
      mend: 'Drain it externally: take out `internal drain` and lead Y to the reservoir.',
    }),
  ];
}

function drained(context: RuleContext, graph: Graph, valve: Component): Finding[] {
  const net = graph.netAt(valve.id, 'Y');
  const place = { place: valve.id, hidesAt: [{ code: 'H14', place: `${valve.id}.Y` }] };
  if (net === undefined || (net.open === true && net.plugged === undefined)) {
    const what = `${valve.id}.Y is not joined: without a drain the pressure in the spring chamber adds to its setting and ${valve.id} sticks.`;
    return [tell(F05, { ...place, what, origin: valve.nameOrigin, fixes: [toReservoirLine(context, valve, 'Y', 'drain')] })];
  }
  if (net.plugged !== undefined) {
    const what = `${valve.id}.Y is plugged: the oil that leaks into the spring chamber cannot leave, and ${valve.id} sticks.`;
    return [tell(F05, { ...place, what, origin: net.plugged, fixes: [unplug(context, valve, 'Y', net.plugged, 'drain')] })];
  }
  return blocked(graph, valve, net, place);
}

function blocked(graph: Graph, valve: Component, net: Net, place: { readonly place: string }): Finding[] {
  const free = toReservoir(graph, net.id, openAlways);
  if (free === undefined) {
    const way = toReservoir(graph, net.id, spreadable);
    const closing = way?.edges.find((e) => e.class !== 'always');
    const why = closing?.words ?? 'it leads to no reservoir';
    const on = closing === undefined ? undefined : graph.component(closing.component);
    return [
      tell(F05, {
        ...place,
        what: `The drain ${valve.id}.Y has no sure way to the reservoir: ${why}.`,
        origin: valve.nameOrigin,
        related: on === undefined ? [] : [relatedTo(on, `${on.id} stands in the drain of ${valve.id}`)],
      }),
    ];
  }
  const adds = free.edges.find((e) => e.kind === 'check' || e.kind === 'throttle' || e.kind === 'filter');
  const on = adds === undefined ? undefined : graph.component(adds.component);
  if (on === undefined) return [];
  return [
    tell(F05, {
      ...place,
      what: `The drain ${valve.id}.Y goes through ${wayWords(free)}: every bar of back pressure there adds to the setting of ${valve.id}.`,
      severity: 'warning',
      origin: valve.nameOrigin,
      related: [relatedTo(on, `${on.id} stands in the drain of ${valve.id}`)],
    }),
  ];
}

export const F05: Rule = {
  code: 'F05',
  name: 'drain-external-required',
  title: 'Valve without its external drain',
  severity: 'error',
  why: 'The spring chamber of a sequence or reducing valve must stand at reservoir pressure, or its setting is not what it says.',
  ground: 'sequence and reducing valves are drained externally, fluid power textbooks; ISO 4413, drains',
  mend: 'Lead Y to the reservoir by a drain line of its own.',
  needs: 'topology',
  page: `
Y of a reducing valve and of a sequence valve without \`internal drain\` must reach a reservoir through ways that nothing can close. Error: Y left
open, plugged, behind something that can close, leading nowhere. Warning: a check, throttle or filter in the drain (back pressure adds to the setting);
\`internal drain\` of a sequence valve whose A goes to a consumer.

Stays clean: a drain line of its own, shared drain lines, \`internal drain\` with A to the reservoir; reliefs and unloading valves, which drain into
their T.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('sequence', 'reducing').flatMap((valve) => {
      const joined = ['P', 'A'].some((port) => {
        const net = graph.netAt(valve.id, port);
        return net !== undefined && net.open !== true;
      });
      if (!joined) return [];
      return read.word(valve, 'internal') === 'drain' ? internallyDrained(graph, valve) : drained(context, graph, valve);
    });
  },
};
