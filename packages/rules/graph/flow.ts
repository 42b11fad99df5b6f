/** Theoretical flow of pumps, and what of it gets to a net. */
import { type Component, read } from '@oilway/circuit';
import type { Graph } from './graph.ts';
import { openAlways, waysTo } from './reach.ts';

/** Theoretical flow of a pump at its drive's speed, m3/s; undefined where either is not known. */
export function pumpFlow(graph: Graph, pump: Component): number | undefined {
  const drive = read.reference(pump, 'driven');
  const of = drive === undefined ? undefined : graph.component(drive.id);
  const displacement = read.si(pump, 'displacement');
  const speed = of === undefined ? undefined : read.si(of, 'speed');
  return displacement === undefined || speed === undefined ? undefined : displacement * speed;
}

/** Flow of all pumps whose oil can get to a net by ways that nothing can close, m3/s. */
export function pumpFlowTo(graph: Graph, net: string): number {
  const ways = waysTo(graph, net, openAlways);
  return graph.ofKind('pump').reduce((sum, pump) => {
    const outlet = graph.netAt(pump.id, 'P')?.id;
    return outlet !== undefined && ways.has(outlet) ? sum + (pumpFlow(graph, pump) ?? 0) : sum;
  }, 0);
}
