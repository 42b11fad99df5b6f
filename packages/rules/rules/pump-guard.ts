/** What A01, A02 and A07 share: whether, and by what way, a pump's outlet reaches something that limits its pressure. */
import { type Component, type Net, read } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import { guardsOf, guardsReached, type Reached } from '../graph/guards.ts';
import { ifOpened, openAlways, type Passing, waysFrom } from '../graph/reach.ts';
import { ratingOf } from '../graph/rating.ts';
import { pumpFlow } from '../graph/flow.ts';
import type { Related } from '../rule.ts';
import { show } from '../words.ts';

export interface PumpGuard {
  readonly pump: Component;
  readonly outlet: Net;
  /** Guards reached by ways that nothing can close. */
  readonly sure: readonly Reached[];
  /** Guards reached only if something stands open, easiest first. */
  readonly perhaps: readonly Reached[];
}

/** Pumps with something joined to their outlet (an outlet without a line is H14's). */
export function pumpGuards(graph: Graph, compensated: boolean): readonly PumpGuard[] {
  return graph.ofKind('pump').flatMap((pump) => {
    const outlet = graph.netAt(pump.id, 'P');
    if (outlet === undefined || read.has(pump, 'compensator') !== compensated) return [];
    if (outlet.open === true && outlet.plugged === undefined) return [];
    const sure = guardsReached(graph, outlet.id, openAlways);
    return [
      {
        pump,
        outlet,
        sure,
        perhaps: sure.length > 0 ? [] : guardsReached(graph, outlet.id, ifOpened).filter((r) => r.guard.what !== 'reservoir'),
      },
    ];
  });
}

const anyWay: Passing = (edge) => ifOpened(edge) ?? 10000;

/** A relief that stands where the oil of the pump cannot get to it, and what stops it. */
export function reliefBehindSeat(
  graph: Graph,
  outlet: string,
): { readonly relief: Component; readonly seat: Component; readonly words: string } | undefined {
  const ways = waysFrom(graph, outlet, anyWay);
  const behind = guardsOf(graph)
    .guards.flatMap((guard) => {
      const way = ways.get(guard.net);
      return way === undefined || guard.what !== 'relief' ? [] : [{ guard, way }];
    })
    .sort((a, b) => a.way.cost - b.way.cost)[0];
  const edge = behind?.way.edges.find((e) => e.class === 'never');
  const seat = edge === undefined ? undefined : graph.component(edge.component);
  if (behind === undefined || edge === undefined || seat === undefined) return undefined;
  return { relief: behind.guard.component, seat, words: edge.words ?? '' };
}

/** "58.0 L/min", and what is rated lowest there: the figures that say how bad it is. */
export function stakes(graph: Graph, pump: Component, outlet: Net): string {
  const flow = pumpFlow(graph, pump);
  const rating = ratingOf(graph, outlet.id);
  const parts = [
    ...(flow === undefined ? [] : [`it delivers ${show(graph.circuit, flow, 'flow')} whatever stands in the way`]),
    ...(rating === undefined
      ? ['no rating is declared there']
      : [`the weakest part there (${rating.of}) is rated ${show(graph.circuit, rating.value, 'pressure', rating.unit)}`]),
  ];
  return parts.join('; ');
}

export function relatedTo(component: Component, message: string): Related {
  return { message, origin: component.nameOrigin };
}
