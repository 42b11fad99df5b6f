/** Pressures that the settings of a circuit allow: of a pump by its guards, of a net by what feeds it. */
import { type Component, read } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import { guardsReached } from '../graph/guards.ts';
import { openAlways, waysTo } from '../graph/reach.ts';
import { pumpFlowTo } from '../graph/flow.ts';
import { spreads } from '../fixes/values.ts';

export interface Limit {
  /** What sets it. */
  readonly by: Component;
  /** Pa: nominal setting; less and more its tolerance; with override at the flow of all pumps. */
  readonly set: number;
  readonly lowest: number;
  readonly highest: number;
  readonly unit: string;
}

function tolerance(component: Component, name: string): { readonly set: number; readonly band: number; readonly unit: string } | undefined {
  const value = component.properties.find((p) => p.name === name)?.value;
  return value?.type === 'quantity' ? { set: value.q.si, band: value.plusMinus ?? 0, unit: value.q.unit } : undefined;
}

/** The setting of a component with its tolerance; undefined where none is given. */
export function settingOf(
  component: Component,
  name = 'set',
): { readonly set: number; readonly lowest: number; readonly highest: number; readonly unit: string } | undefined {
  const t = tolerance(component, name);
  return t === undefined ? undefined : { set: t.set, lowest: t.set - t.band, highest: t.set + t.band, unit: t.unit };
}

/** Relief line of semantics: set + override is reached at the flow of `passes`, in proportion; the band is at least 0.5 bar. */
export function withOverride(relief: Component, set: number, flow: number): number {
  const passes = read.flowAt(relief, 'passes');
  if (passes === undefined || passes.flow <= 0) return set;
  return set + (Math.max((read.si(relief, 'override') ?? 0.1) * set, 0.5e5) * flow) / passes.flow;
}

/** The lowest limit of what a pump can build up: its sure reliefs, the relief inside, its compensator. */
export function limitOfPump(graph: Graph, pump: Component): Limit | undefined {
  const outlet = graph.netAt(pump.id, 'P');
  if (outlet === undefined) return undefined;
  const limits: Limit[] = [];
  for (const { guard } of guardsReached(graph, outlet.id, openAlways)) {
    const setting =
      guard.what === 'relief' ? settingOf(guard.component) : guard.what === 'inside' ? settingOf(guard.component, 'reliefs') : undefined;
    if (setting === undefined) continue;
    const flow = pumpFlowTo(graph, guard.net);
    const highest = guard.what === 'relief' ? withOverride(guard.component, setting.highest, flow) : setting.highest * 1.1;
    limits.push({ by: guard.component, ...setting, highest });
  }
  const compensator = settingOf(pump, 'compensator');
  if (compensator !== undefined) limits.push({ by: pump, ...compensator });
  return limits.sort((a, b) => a.set - b.set)[0];
}

/**
 * The pressure a net can be given by the pumps: the highest of the limits of those that reach it at full pressure, or the setting of a
 * reducing valve where all come through one. Undefined where a feeder has no known limit, or a load, an intensifier, a divider or an
 * accumulator's gas may raise it beyond.
 */
export function limitOfNet(graph: Graph, net: string): Limit | undefined {
  const full = waysTo(graph, net, spreads);
  const raises = (component: Component, ports: readonly string[]) =>
    ports.some((port) => full.has(graph.netAt(component.id, port)?.id ?? ''));
  if (graph.ofKind('intensifier').some((c) => raises(c, ['A'])) || graph.ofKind('divider').some((c) => raises(c, ['A', 'B'])))
    return undefined;
  const direct = graph.ofKind('pump').filter((pump) => full.has(graph.netAt(pump.id, 'P')?.id ?? ''));
  if (direct.length > 0) {
    const limits = direct.map((pump) => limitOfPump(graph, pump));
    if (limits.some((l) => l === undefined)) return undefined;
    return (limits as Limit[]).sort((a, b) => b.set - a.set)[0];
  }
  const reducers = graph.ofKind('reducing').filter((r) => full.has(graph.netAt(r.id, 'A')?.id ?? ''));
  const settings = reducers.flatMap((r) => {
    const s = settingOf(r);
    return s === undefined ? [] : [{ by: r, ...s, highest: s.highest * 1.05 }];
  });
  return reducers.length === 0 || settings.length < reducers.length ? undefined : settings.sort((a, b) => b.set - a.set)[0];
}
