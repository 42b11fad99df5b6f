/** A03: a relief lets the pressure rise above what the weakest part on its line is rated for. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { type Guard, guardsOf, guardsReached } from '../graph/guards.ts';
import { openAlways, waysFrom, waysTo } from '../graph/reach.ts';
import { type Rating, ratingOf } from '../graph/rating.ts';
import { pressureAt } from '../figures.ts';
import { tell } from '../finding.ts';
import { round, spreads } from '../fixes/values.ts';
import { setTo } from '../fixes/setting.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { against, show } from '../words.ts';
import { pumpFlowTo } from '../graph/flow.ts';
import { settingOf, withOverride } from './limits.ts';

/** The lowest rating among the nets that stand at this relief's pressure: not those with a lower guard of their own. */
function weakest(graph: Graph, guard: Guard): { readonly rating: Rating; readonly net: string } | undefined {
  const set = settingOf(guard.component)?.set ?? Infinity;
  // Reliefs between the two lines of an actuator count here: they keep their own line down.
  const lower = graph.ofKind('relief').flatMap((relief) => {
    const net = graph.netAt(relief.id, 'P');
    return relief.id !== guard.component.id && net !== undefined && (settingOf(relief)?.set ?? Infinity) < set ? [net.id] : [];
  });
  // Back along the free ways to the pumps it guards, and on from there to everything that is pressed by the same oil.
  const onward = waysFrom(graph, guard.net, spreads);
  const back = [...waysTo(graph, guard.net, openAlways).keys()].filter((net) => onward.has(net) || !heldLower(graph, guard, net));
  const nets = new Set([...back, ...onward.keys()]);
  let found: { rating: Rating; net: string } | undefined;
  for (const net of nets) {
    const node = graph.net(net);
    if (
      node === undefined ||
      node.reservoir !== undefined ||
      node.functions.every((f) => f === 'return' || f === 'drain' || f === 'suction')
    )
      continue;
    const free = waysFrom(graph, net, openAlways);
    if (lower.some((own) => free.has(own))) continue;
    const rating = ratingOf(graph, net);
    if (rating !== undefined && (found === undefined || rating.value < found.rating.value)) found = { rating, net };
  }
  return found;
}

/** True where another guard that is as sure lets the oil of this pump out at a lower pressure. */
function hasLowerGuard(graph: Graph, guard: Guard, pump: Component): boolean {
  const set = settingOf(guard.component)?.set ?? 0;
  const outlet = graph.netAt(pump.id, 'P')?.id;
  return (
    outlet === undefined ||
    guardsReached(graph, outlet, openAlways).some(
      (r) => r.guard.component.id !== guard.component.id && (settingOf(r.guard.component)?.set ?? Infinity) < set,
    )
  );
}

/** True for a net before the guard's own, fed by pumps that others hold lower: what rises behind the check does not come back to it. */
function heldLower(graph: Graph, guard: Guard, net: string): boolean {
  const ways = waysTo(graph, net, spreads);
  const feeding = graph.ofKind('pump').filter((pump) => ways.has(graph.netAt(pump.id, 'P')?.id ?? ''));
  return feeding.length > 0 && feeding.every((pump) => hasLowerGuard(graph, guard, pump));
}

/** Flow of the pumps whose oil leaves here: those without a lower guard that is as sure, m3/s. */
function flowOver(graph: Graph, guard: Guard): number {
  return graph.ofKind('pump').every((pump) => hasLowerGuard(graph, guard, pump)) ? 0 : pumpFlowTo(graph, guard.net);
}

function judge(context: RuleContext, graph: Graph, guard: Guard): Finding[] {
  const setting = settingOf(guard.component);
  const found = setting === undefined ? undefined : weakest(graph, guard);
  if (setting === undefined || found === undefined) return [];
  const flow = flowOver(graph, guard);
  const reached = withOverride(guard.component, setting.highest, flow) + backPressure(context, graph, guard);
  const { rating } = found;
  if (reached <= rating.value * 1.001) return [];
  const property = guard.component.properties.find((p) => p.name === 'set');
  const { value, bound } = against(context.circuit, reached, rating.value, 'pressure', rating.unit);
  const parts = [
    `set ${show(context.circuit, setting.highest, 'pressure', setting.unit)}`,
    ...(flow > 0 ? [`with override at ${show(context.circuit, flow, 'flow')}`] : []),
  ];
  return [
    tell(A03, {
      what: `${guard.component.id} lets the pressure rise to ${value} (${parts.join(' ')}); ${rating.of} is rated ${bound}.`,
      origin: property?.origin ?? guard.component.nameOrigin,
      place: guard.component.id,
      related: [{ message: `rated ${show(context.circuit, rating.value, 'pressure', rating.unit)}`, origin: rating.origin }],
      fixes: [
        setTo(context, guard.component, 'set', round(context.circuit, (rating.value * setting.set) / reached, 'pressure', 'down').text),
      ],
    }),
  ];
}

/** Highest pressure behind the relief while it lifts, Pa; 0 until the figures are there. */
function backPressure(context: RuleContext, graph: Graph, guard: Guard): number {
  const outlet = graph.netAt(guard.component.id, 'T')?.id;
  if (context.study === undefined || outlet === undefined) return 0;
  let highest = 0;
  for (const point of [
    ...context.study.steps.flatMap((s) => s.points),
    ...context.study.states.flatMap((s) => s.variants.map((v) => v.point)),
  ]) {
    if (point.solved && point.lifting.includes(guard.component.id)) highest = Math.max(highest, pressureAt(point, outlet) ?? 0);
  }
  return highest;
}

export const A03: Rule = {
  code: 'A03',
  name: 'relief-above-rating',
  title: 'Relief set above the rating of a part',
  severity: 'error',
  why: 'The part rated lowest gives way before the relief has the pressure in hand.',
  ground: 'ISO 4413, components within their rated limits',
  mend: 'Set the relief lower, or choose parts with a higher rating.',
  needs: 'topology',
  figures: true,
  page: `
Setting plus tolerance plus override at the flow of all pumps that reach the relief (plus the pressure behind it, once that is computed) is compared with
the lowest \`rated\` of ports and lines that stand at its pressure: back to the pumps, and on through directional valves, checks and shut-offs
to the actuators.

Stays clean: parts behind a reducing valve, before a check or counterbalance valve where the pumps are held lower, or with a relief of their own that is set lower; return and drain lines; parts without a declared
rating (nothing is guessed).`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return guardsOf(graph).guards.flatMap((guard) => (guard.what === 'relief' ? judge(context, graph, guard) : []));
  },
};
