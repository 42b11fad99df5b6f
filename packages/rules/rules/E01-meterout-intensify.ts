/** E01: metering the oil that leaves the rod side raises its pressure above what is rated there. */
import type { Component, Point } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { type Passing, waysFrom } from '../graph/reach.ts';
import { type Rating, ratingOf } from '../graph/rating.ts';
import { pressureAt } from '../figures.ts';
import { tell } from '../finding.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { format } from '@oilway/quantity';
import { against, show } from '../words.ts';
import { relatedTo } from './pump-guard.ts';

interface Over {
  readonly state: string;
  readonly label: string;
  readonly position: number | undefined;
  readonly pressure: number;
  readonly cap: number | undefined;
  readonly net: string;
  readonly rating: Rating;
}

/** From the rod port up to the metering element: everything that is under the same pressure. */
const upToMeter: Passing = (e) => (e.class === 'always' && e.kind !== 'throttle' && e.kind !== 'filter' ? 0 : undefined);

/** The throttle or deceleration valve that the rod's oil must pass. */
function meterAt(graph: Graph, nets: ReadonlySet<string>): Component | undefined {
  for (const net of nets) {
    for (const edge of graph.from(net)) {
      const metering = (edge.kind === 'throttle' && edge.from === 'in') || (edge.kind === 'deceleration' && edge.from === 'in');
      if (metering) return graph.component(edge.component);
    }
  }
  return undefined;
}

function highest(context: RuleContext, graph: Graph, cylinder: Component, nets: ReadonlySet<string>): Over | undefined {
  const cap = graph.netAt(cylinder.id, 'cap')?.id;
  const steps = (context.study?.steps ?? []).flatMap((s) => s.points.map((point) => ({ state: s.id, point, label: point.label })));
  const states = (context.study?.states ?? []).flatMap((s) => s.variants.map((v) => ({ state: s.id, point: v.point, label: v.label })));
  // What a declared step does is told before what a stuck coil would do.
  return worst(graph, cylinder, nets, steps, cap) ?? worst(graph, cylinder, nets, states, cap);
}

interface Solved {
  readonly state: string;
  readonly point: Point;
  readonly label: string;
}

function worst(
  graph: Graph,
  cylinder: Component,
  nets: ReadonlySet<string>,
  points: readonly Solved[],
  cap: string | undefined,
): Over | undefined {
  let found: Over | undefined;
  for (const { state, point, label } of points) {
    if (!point.solved) continue;
    const actuator = point.actuators.find((a) => a.id === cylinder.id);
    if (actuator !== undefined && actuator.velocity < 0) continue;
    for (const net of nets) {
      const pressure = pressureAt(point, net);
      const rating = ratingOf(graph, net);
      const opposite = cap === undefined ? undefined : pressureAt(point, cap);
      // Above the other side: intensified, not merely pumped up.
      if (pressure === undefined || rating === undefined || pressure <= rating.value * 1.001 || pressure <= (opposite ?? 0)) continue;
      if (found === undefined || pressure - rating.value > found.pressure - found.rating.value) {
        found = { state, label, position: actuator?.position, pressure, cap: opposite, net, rating };
      }
    }
  }
  return found;
}

function say(context: RuleContext, cylinder: Component, meter: Component, over: Over): Finding {
  const { circuit } = context;
  const { value, bound } = against(circuit, over.pressure, over.rating.value, 'pressure', over.rating.unit);
  const position =
    over.position === undefined
      ? undefined
      : format(over.position, 'length', { display: circuit.display, units: circuit.units, position: true });
  const where = position === undefined || over.label.includes(position) ? over.label : `${over.label}, ${position}`;
  const from = over.cap === undefined ? '' : ` with ${show(circuit, over.cap, 'pressure', over.rating.unit)} at ${cylinder.id}.cap`;
  return tell(E01, {
    what: `${meter.id} meters the oil out of ${cylinder.id}.rod: ${value} stand there in ${over.state} (${where})${from}; ${over.rating.of} is rated ${bound}.`,
    origin: meter.nameOrigin,
    place: `${cylinder.id}.rod`,
    state: over.state,
    related: [
      relatedTo(cylinder, `the annulus of ${cylinder.id} is smaller than its bore: pressure rises by the ratio of the areas`),
      { message: `rated ${bound}`, origin: over.rating.origin },
    ],
    hides: ['H01'],
  });
}

export const E01: Rule = {
  code: 'E01',
  name: 'meterout-intensify',
  title: 'Metering out raises the rod side above its rating',
  severity: 'error',
  why: 'With little load, the pressure on the cap side comes out on the smaller rod side multiplied: seals, tube or hose give way.',
  ground: 'force balance p cap x A cap = p rod x A annulus + F; ISO 4413, pressure intensification',
  mend: 'Lower the pressure on the cap side, choose parts with a higher rating, meter in, or guard the rod side by a relief.',
  needs: 'computed',
  page: `
In every steady point of every step and in every state the pressure from the rod port up to the element that meters its oil (throttle, deceleration valve) is compared
with the lowest \`rated\` there. Told at the worst point: usually the one without load, before or after the work.

Stays clean: a rating above the intensified pressure; a relief on the rod side; meter-in; parts without a rating (nothing is guessed).`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('cylinder').flatMap((cylinder) => {
      const rod = graph.netAt(cylinder.id, 'rod')?.id;
      if (rod === undefined) return [];
      const nets = new Set(waysFrom(graph, rod, upToMeter).keys());
      const meter = meterAt(graph, nets);
      const over = meter === undefined ? undefined : highest(context, graph, cylinder, nets);
      return meter === undefined || over === undefined ? [] : [say(context, cylinder, meter, over)];
    });
  },
};
