/** What keeps the pressure of a net within bounds: reliefs with a way to the reservoir, reliefs inside pumps, the open reservoir itself. */
import { type Component, read } from '@oilway/circuit';
import type { Graph } from './graph.ts';
import { once } from './once.ts';
import { openAlways, type Passing, type Way, waysFrom } from './reach.ts';

export interface Guard {
  /** Relief, pump (relief inside) or reservoir. */
  readonly component: Component;
  readonly what: 'relief' | 'inside' | 'reservoir';
  /** Net it guards at. */
  readonly net: string;
}

export interface Discharge {
  readonly ok: boolean;
  /** Why not, for people: "RV1.T is plugged". */
  readonly why?: string;
  readonly cause?: 'open' | 'plugged' | 'closable' | 'cooler' | 'none';
  /** The way, or the way that would be there if nothing were closed. */
  readonly way?: Way;
}

/** Whether what a relief lets out reaches a reservoir by ways that nothing can close (a cooler only with a check beside it). */
function dischargeOf(graph: Graph, relief: Component): Discharge {
  const net = graph.netAt(relief.id, 'T');
  if (net === undefined || (net.open === true && net.plugged === undefined))
    return { ok: false, cause: 'open', why: `${relief.id}.T is open` };
  if (net.plugged !== undefined) return { ok: false, cause: 'plugged', why: `${relief.id}.T is plugged` };
  const free: Passing = (e) => (e.kind === 'cooler' ? undefined : openAlways(e));
  const away = toReservoir(graph, net.id, free);
  if (away !== undefined) return { ok: true, way: away };
  const cooled = toReservoir(graph, net.id, openAlways);
  if (cooled !== undefined) {
    const cooler = cooled.edges.find((e) => e.kind === 'cooler')?.component ?? 'the cooler';
    return { ok: false, cause: 'cooler', way: cooled, why: `what it lets out must pass ${cooler}, which has no check valve beside it` };
  }
  const closed = toReservoir(graph, net.id, (e) => (e.class === 'never' && e.shut !== true ? undefined : e.class === 'always' ? 0 : 1));
  if (closed !== undefined) {
    const words = closed.edges.flatMap((e) => (e.class !== 'always' && e.words !== undefined ? [e.words] : [])).join('; ');
    return { ok: false, cause: 'closable', way: closed, why: `its way to the reservoir can be closed: ${words}` };
  }
  return { ok: false, cause: 'none', why: `${relief.id}.T leads to no reservoir` };
}

/** The easiest way from a net to a reservoir. */
export function toReservoir(graph: Graph, net: string, passing: Passing): Way | undefined {
  let best: Way | undefined;
  for (const [id, way] of waysFrom(graph, net, passing)) {
    if (graph.net(id)?.reservoir !== undefined && (best === undefined || way.cost < best.cost)) best = way;
  }
  return best;
}

export interface Guards {
  readonly guards: readonly Guard[];
  /** Reliefs whose discharge is not sure. */
  readonly rejected: readonly { readonly relief: Component; readonly net: string; readonly why: Discharge }[];
}

/** All guards of the circuit that work, and the reliefs that do not. */
export const guardsOf = once((graph: Graph): Guards => {
  const guards: Guard[] = [];
  const rejected: { relief: Component; net: string; why: Discharge }[] = [];
  for (const relief of graph.ofKind('relief')) {
    const net = graph.netAt(relief.id, 'P');
    if (net === undefined || net.open === true || net.plugged !== undefined) continue;
    const discharge = dischargeOf(graph, relief);
    if (discharge.ok) guards.push({ component: relief, what: 'relief', net: net.id });
    else rejected.push({ relief, net: net.id, why: discharge });
  }
  for (const pump of graph.ofKind('pump')) {
    const net = graph.netAt(pump.id, 'P');
    if (net !== undefined && read.has(pump, 'reliefs')) guards.push({ component: pump, what: 'inside', net: net.id });
  }
  return { guards, rejected };
});

export interface Reached {
  readonly guard: Guard;
  readonly way: Way;
}

/** Guards reached from a net, easiest first; a reservoir counts where nothing on the way can be closed. */
export function guardsReached(graph: Graph, net: string, passing: Passing): readonly Reached[] {
  const ways = waysFrom(graph, net, passing);
  const found: Reached[] = [];
  for (const guard of guardsOf(graph).guards) {
    const way = ways.get(guard.net);
    if (way !== undefined) found.push({ guard, way });
  }
  for (const [id, way] of ways) {
    const reservoir = graph.net(id)?.reservoir;
    const component = reservoir === undefined ? undefined : graph.component(reservoir);
    // A throttle to the reservoir is no guard: it carries the pump's flow only at a drop that nobody has set as a limit.
    if (component !== undefined && way.edges.every((e) => e.class === 'always' && e.kind !== 'throttle')) {
      found.push({ guard: { component, what: 'reservoir', net: id }, way });
    }
  }
  return found.sort((a, b) => a.way.cost - b.way.cost || a.way.edges.length - b.way.edges.length);
}
