/** Two-pump units as rules B01 to B06 see them: which pump is unloaded, by which valve, beside which other pump. */
import type { Component } from '@oilway/circuit';
import type { Edge, Graph } from '../graph/graph.ts';
import { openAlways, type Passing, spreadable, throughValves, type Way, waysFrom, waysTo } from '../graph/reach.ts';
import { once } from '../graph/once.ts';
import { pumpFlow } from '../graph/flow.ts';

export interface HighLow {
  readonly unloading: Component;
  /** Net of the unloading valve's P. */
  readonly net: string;
  /** The pump it unloads. */
  readonly low: Component;
  readonly high: Component;
  /** The way by which oil of the high-pressure pump gets to the unloading valve, where there is one (B01, B06). */
  readonly escapeWay?: Way;
  /** Check on the way from the low-pressure pump to the high-pressure line, where there is one. */
  readonly joining?: Edge;
}

/** Both ways open, nothing but pipe and what behaves like pipe. */
export const sameSide: Passing = (edge) =>
  edge.class === 'always' && ['pipe', 'shutoff', 'filter', 'cooler'].includes(edge.kind) ? 0 : undefined;

function outlet(graph: Graph, pump: Component): string | undefined {
  const net = graph.netAt(pump.id, 'P');
  return net === undefined || net.open === true ? undefined : net.id;
}

/** Pumps whose outlet is on the unloading valve's own side. */
export function pumpsBeside(graph: Graph, net: string): readonly Component[] {
  const side = waysTo(graph, net, sameSide);
  return graph.ofKind('pump').filter((pump) => side.has(outlet(graph, pump) ?? ''));
}

/** True where the pilot senses a store behind a check that no pump feeds but over that check: then all pumps unload on purpose. */
function unloadsAll(graph: Graph, net: string, unloading: Component, others: readonly Component[]): boolean {
  const pilot = graph.netAt(unloading.id, 'X');
  if (pilot === undefined || pilot.id === net) return false;
  const way = waysFrom(graph, net, openAlways).get(pilot.id);
  if (way === undefined || !way.edges.some((e) => e.kind === 'check')) return false;
  return others.every((pump) => {
    const id = outlet(graph, pump);
    return id === undefined || id === net || !waysFrom(graph, id, throughValves, (n) => n === net).has(pilot.id);
  });
}

export const highLowUnits = once((graph: Graph): readonly HighLow[] => {
  const units: HighLow[] = [];
  const throughAll = new Map<string, ReadonlyMap<string, Way>>();
  const through = (from: string) => {
    const ways = throughAll.get(from) ?? waysFrom(graph, from, throughValves);
    throughAll.set(from, ways);
    return ways;
  };
  for (const unloading of graph.ofKind('unloading')) {
    const net = graph.netAt(unloading.id, 'P');
    if (net === undefined || net.open === true) continue;
    const beside = [...pumpsBeside(graph, net.id)].sort((a, b) => (pumpFlow(graph, b) ?? 0) - (pumpFlow(graph, a) ?? 0));
    const low = beside[0];
    if (low === undefined) continue;
    const onward = waysFrom(graph, net.id, openAlways);
    const others = graph.ofKind('pump').filter((p) => p.id !== low.id);
    if (unloadsAll(graph, net.id, unloading, others)) continue;
    for (const high of others) {
      const from = outlet(graph, high);
      if (from === undefined) continue;
      const escapeWay = through(from).get(net.id);
      const joining = joiningCheck(graph, onward, from);
      if (escapeWay === undefined && joining === undefined) continue;
      units.push({
        unloading,
        net: net.id,
        low,
        high,
        ...(escapeWay === undefined ? {} : { escapeWay }),
        ...(joining === undefined ? {} : { joining }),
      });
    }
  }
  return units;
});

/** The check over which the low-pressure oil joins the high-pressure line. */
function joiningCheck(graph: Graph, onward: ReadonlyMap<string, Way>, high: string): Edge | undefined {
  const checked = (id: string) => onward.get(id)?.edges.find((e) => e.kind === 'check');
  const direct = checked(high);
  if (direct !== undefined || onward.size === 1) return direct;
  for (const id of waysFrom(graph, high, openAlways).keys()) {
    const check = checked(id);
    if (check !== undefined) return check;
  }
  return undefined;
}

/**
 * The check on the escape that merely faces the wrong way: its inlet is on the high-pressure side, and nothing on the unloading valve's
 * side uses oil but by way of it.
 */
export function wrongWayCheck(graph: Graph, unit: HighLow): Component | undefined {
  const edge = unit.escapeWay?.edges.find((e) => e.kind === 'check');
  if (edge === undefined) return undefined;
  const withoutIt: Passing = (e) => (e.component === edge.component ? undefined : spreadable(e));
  for (const id of waysFrom(graph, unit.net, withoutIt).keys()) {
    const uses = graph.net(id)?.ports.some((p) => {
      const kind = graph.component(p.component)?.kind;
      return kind === 'cylinder' || kind === 'motor' || kind === 'rotary' || (kind === 'directional' && p.port === 'P');
    });
    if (uses === true) return undefined;
  }
  return graph.component(edge.component);
}
