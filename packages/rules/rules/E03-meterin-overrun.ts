/** E03: the speed of a load that runs ahead is metered where the oil goes in, so nothing brakes it. */
import { type Component, read } from '@oilway/circuit';
import { type Edge, graphOf, type Graph } from '../graph/graph.ts';
import { type Passing, waysFrom, waysTo } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import type { Rule } from '../rule.ts';
import { show } from '../words.ts';
import { relatedTo } from './pump-guard.ts';
import { carriedLoads } from './sources.ts';

/** A throttle in the direction in which it meters (with a reverse check the other direction is free). */
function meters(graph: Graph, edge: Edge): boolean {
  if (edge.kind !== 'throttle' || edge.to === 'T') return false;
  const throttle = graph.component(edge.component);
  return throttle !== undefined && (edge.from === 'in' || read.word(throttle, 'reverse') !== 'check');
}

/** A directional valve or a pump on the net: from here oil comes, to here it goes. */
function isValveNet(graph: Graph, net: string): boolean {
  return (graph.net(net)?.ports ?? []).some((p) => {
    const kind = graph.component(p.component)?.kind;
    return (kind === 'directional' && ['P', 'A', 'B', 'T'].includes(p.port)) || (kind === 'pump' && p.port === 'P');
  });
}

/** Between cylinder and valve: everything but directional valves and what blocks for good; a pilot-operated check is opened by its pilot. */
const alongLine: Passing = (edge) => {
  if (edge.kind === 'directional') return undefined;
  if (edge.class === 'never') return edge.kind === 'pilotcheck' ? 0 : undefined;
  return 0;
};

/** The throttle that meters everything that goes to the port; undefined where there is an unmetered way, or none. */
function meterIn(graph: Graph, net: string): Component | undefined {
  const free: Passing = (e) => (meters(graph, e) ? undefined : alongLine(e));
  if ([...waysTo(graph, net, free).keys()].some((n) => isValveNet(graph, n))) return undefined;
  for (const [id, way] of waysTo(graph, net, alongLine)) {
    const edge = isValveNet(graph, id) ? way.edges.find((e) => meters(graph, e)) : undefined;
    const throttle = edge === undefined ? undefined : graph.component(edge.component);
    if (throttle !== undefined) return throttle;
  }
  return undefined;
}

/** True where the port's oil can leave without passing a metering element or a counterbalance valve. */
function leavesFreely(graph: Graph, net: string): boolean {
  const free: Passing = (e) => (meters(graph, e) || e.kind === 'deceleration' ? undefined : alongLine(e));
  return [...waysFrom(graph, net, free).keys()].some((n) => isValveNet(graph, n) || graph.net(n)?.reservoir !== undefined);
}

export const E03: Rule = {
  code: 'E03',
  name: 'meterin-overrun',
  title: 'Meter-in on a load that runs ahead',
  severity: 'error',
  why: 'The load runs away from the oil that is let in: no speed control, and a vacuum behind the piston.',
  ground: 'meter-in and meter-out circuits, fluid power textbooks; ISO 4413, control of movements',
  mend: 'Meter the oil that leaves (turn the throttle to the other port) or hold the load with a counterbalance valve.',
  needs: 'topology',
  page: `
For every declared inward or outward force and every weight the direction is taken in which it drives the cylinder. If all oil that goes in for that motion
passes a throttle in its metering direction, and the oil that leaves meets neither a throttle, a deceleration valve nor a counterbalance valve, nothing
brakes it.

Stays clean: meter-out; meter-in against a load that resists; a counterbalance valve on the leaving side; a throttle with reverse check that
meters the other direction; a pressed part (a table that falls to nothing).`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return carriedLoads(graph).flatMap((carried) => {
      const { actuator, port, force, inward } = carried;
      if (!carried.fixed || actuator.kind !== 'cylinder') return [];
      const inlet = graph.netAt(actuator.id, port === 'cap' ? 'rod' : 'cap')?.id;
      const outlet = graph.netAt(actuator.id, port)?.id;
      const throttle = inlet === undefined ? undefined : meterIn(graph, inlet);
      if (throttle === undefined || outlet === undefined || !leavesFreely(graph, outlet)) return [];
      const way = inward ? 'retracting' : 'extending';
      return [
        tell(E03, {
          what: `${throttle.id} meters the oil into ${actuator.id}.${port === 'cap' ? 'rod' : 'cap'} while ${way}, but ${show(context.circuit, force, 'force')} of load drives ${actuator.id} that way and the oil of ${actuator.id}.${port} leaves freely: nothing brakes it.`,
          origin: throttle.nameOrigin,
          place: actuator.id,
          related: [
            { message: `this load drives ${actuator.id} ${way}`, origin: carried.load.origin },
            relatedTo(actuator, `the oil that brakes it would leave at ${actuator.id}.${port}`),
          ],
        }),
      ];
    });
  },
};
