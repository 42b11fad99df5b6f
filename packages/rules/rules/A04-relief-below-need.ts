/** A04: the setting that limits the pressure is below what a step needs. */
import { type ActuatorPoint, type Point, read } from '@oilway/circuit';
import { openAlways, waysFrom, waysTo } from '../graph/reach.ts';
import { graphOf, type Graph } from '../graph/graph.ts';
import { pressureAt } from '../figures.ts';
import { tell } from '../finding.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { setTo } from '../fixes/setting.ts';
import { round, spreads } from '../fixes/values.ts';
import { ratingOf } from '../graph/rating.ts';
import { against, show } from '../words.ts';
import { type Limit, limitOfNet } from './limits.ts';
import { hasArrived, pressesOnPart } from './pressing.ts';
import { relatedTo } from './pump-guard.ts';

/** Common practice: a relief stands at least 5 % above what the work needs. */
const MARGIN = 1.05;

/** True where the pressure stands at the setting, or within 5 % of it: else something other than the setting makes it weak. */
function atLimit(graph: Graph, point: Point, limit: Limit): boolean {
  const net = graph.netAt(limit.by.id, limit.by.kind === 'reducing' ? 'A' : 'P')?.id;
  const pressure = net === undefined ? undefined : pressureAt(point, net);
  return pressure !== undefined && pressure * MARGIN >= limit.set;
}

/** True where a relief of the actuator's own line, commanded by a coil, lifts: it holds the force down on purpose. */
function heldBack(graph: Graph, point: Point, net: string): boolean {
  const onward = waysFrom(graph, net, openAlways);
  return graph
    .ofKind('relief')
    .some((r) => read.has(r, 'coil') && point.lifting.includes(r.id) && onward.has(graph.netAt(r.id, 'P')?.id ?? ''));
}

interface Short {
  readonly step: string;
  readonly point: Point;
  readonly actuator: ActuatorPoint;
  readonly limit: Limit;
}

function shortfalls(context: RuleContext, graph: Graph): Short[] {
  const found: Short[] = [];
  for (const step of context.study?.steps ?? []) {
    for (const point of step.points) {
      if (!point.solved) continue;
      for (const actuator of point.actuators) {
        const { available, needed, direction } = actuator;
        if (direction === 0 || available === undefined || available <= 0 || needed <= 0 || hasArrived(actuator)) continue;
        if (available >= needed * MARGIN || pressesOnPart(graph, actuator) || actuator.limitedBy.some((l) => l.words.startsWith('no path')))
          continue;
        const kind = graph.component(actuator.id)?.kind;
        const port = kind === 'cylinder' ? (direction > 0 ? 'cap' : 'rod') : direction > 0 ? 'A' : 'B';
        const net = graph.netAt(actuator.id, port);
        const limit = net === undefined || heldBack(graph, point, net.id) ? undefined : limitOfNet(graph, net.id);
        if (limit !== undefined && atLimit(graph, point, limit)) found.push({ step: step.id, point, actuator, limit });
      }
    }
  }
  return found;
}

/** True where everything at this pressure is rated for it, with the override of a relief. */
function bears(graph: Graph, net: string, set: number): boolean {
  const nets = [...waysTo(graph, net, openAlways).keys(), ...waysFrom(graph, net, spreads).keys()];
  return nets.every((n) => (ratingOf(graph, n)?.value ?? Infinity) >= set * 1.1);
}

function say(context: RuleContext, graph: Graph, short: Short): Finding {
  const { actuator, limit, point, step } = short;
  const { circuit } = context;
  const dimension = graph.component(actuator.id)?.kind === 'cylinder' ? 'force' : 'torque';
  const { value, bound } = against(circuit, actuator.available ?? 0, actuator.needed, dimension);
  const enough = round(circuit, (limit.set * MARGIN * actuator.needed) / (actuator.available ?? 1), 'pressure', 'up');
  const stalls = actuator.shortBy !== undefined || (actuator.available ?? 0) < actuator.needed;
  const at = dimension === 'force' ? ` at ${show(circuit, actuator.position, 'length')}` : '';
  const name = limit.by.kind === 'pump' ? 'compensator' : 'set';
  const property = limit.by.properties.find((p) => p.name === name);
  const net = graph.netAt(limit.by.id, limit.by.kind === 'reducing' ? 'A' : 'P')?.id;
  // Raising a compensator asks for its relief to follow; parts that bear no more ask for a larger cylinder.
  const raise =
    net !== undefined && limit.by.kind !== 'pump' && bears(graph, net, enough.si) ? setTo(context, limit.by, name, enough.text) : undefined;
  return tell(A04, {
    what: `${limit.by.id} (${show(circuit, limit.set, 'pressure', limit.unit)}) is set too low for ${step}: ${actuator.id} ${stalls ? 'stalls' : 'has hardly anything to spare'}${at}, it presses with ${value} of ${bound} needed. It takes about ${enough.text}.`,
    origin: property?.origin ?? limit.by.nameOrigin,
    place: limit.by.id,
    state: step,
    fixes: [raise],
    related: [
      ...(graph.component(actuator.id) === undefined
        ? []
        : [relatedTo(graph.component(actuator.id)!, `${actuator.id} in ${step}, ${point.label}`)]),
    ],
  });
}

export const A04: Rule = {
  code: 'A04',
  name: 'relief-below-need',
  title: 'Relief set below what the work needs',
  severity: 'warning',
  why: 'The actuator stalls under load while the pump heats the oil over the relief.',
  ground: 'force balance p x A; margin of the relief over the working pressure, fluid power textbooks and common practice',
  mend: 'Raise the setting (within the ratings) or choose a larger cylinder.',
  needs: 'computed',
  page: `
At every steady point of every step the force the actuator would press with, if it were held, is compared with loads plus friction. Less than 5 % more is told
at the setting that limits the pressure there: the relief, the compensator, or the reducing valve in between; the worst point of the worst step.

Stays clean: a clamp or press that stands on its part (a table of force over position) at the setting on purpose; end stops; steps in which the way is closed.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    const worst = new Map<string, Short>();
    const lack = (s: Short) => (s.actuator.available ?? 0) / s.actuator.needed;
    for (const short of shortfalls(context, graph)) {
      const known = worst.get(short.limit.by.id);
      if (known === undefined || lack(short) < lack(known)) worst.set(short.limit.by.id, short);
    }
    return [...worst.values()].map((short) => say(context, graph, short));
  },
};
