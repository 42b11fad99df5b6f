/** A10: oil of an accumulator, of a pump on another drive or of a carried load can run back through a pump that stands still. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { asDeclared, type Way, waysTo, wayWords } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { checkAtOutlet } from '../fixes/check.ts';
import type { Related, Rule } from '../rule.ts';
import { list } from '../words.ts';
import { highLowUnits } from './high-low.ts';
import { relatedTo } from './pump-guard.ts';
import { carriedLoads, driveOf } from './sources.ts';

interface Source {
  readonly words: string;
  readonly related: Related;
}

function sourcesOf(graph: Graph, pump: Component, ways: ReadonlyMap<string, Way>): Source[] {
  const found: Source[] = [];
  const by = (net: string) => {
    const words = wayWords(ways.get(net)!);
    return words === '' ? '' : ` through ${words}`;
  };
  for (const store of graph.ofKind('accumulator')) {
    const net = graph.netAt(store.id, 'P')?.id;
    if (net !== undefined && ways.has(net))
      found.push({
        words: `accumulator ${store.id}${by(net)}`,
        related: relatedTo(store, `${store.id} keeps its pressure when ${pump.id} stops`),
      });
  }
  const units = highLowUnits(graph);
  for (const other of graph.ofKind('pump')) {
    const net = graph.netAt(other.id, 'P')?.id;
    if (other.id === pump.id || net === undefined || !ways.has(net) || driveOf(other) === driveOf(pump)) continue;
    if (units.some((u) => u.low.id === other.id && u.high.id === pump.id)) continue;
    found.push({
      words: `${other.id} (driven by ${driveOf(other) ?? 'another drive'})${by(net)}`,
      related: relatedTo(other, `${other.id} may run while ${pump.id} stands`),
    });
  }
  for (const carried of carriedLoads(graph)) {
    const net = graph.netAt(carried.actuator.id, carried.port)?.id;
    if (net === undefined || !ways.has(net)) continue;
    const place = `${carried.actuator.id}.${carried.port}`;
    found.push({
      words: `the load on ${place}${by(net)}`,
      related: { message: `this load presses on the oil at ${place}`, origin: carried.load.origin },
    });
  }
  return found;
}

export const A10: Rule = {
  code: 'A10',
  name: 'no-outlet-check',
  title: 'No check valve at the pump outlet',
  severity: 'error',
  why: 'When the drive stops, the oil runs back and turns the pump the wrong way round; what was stored or held is lost.',
  ground: 'ISO 4413, control of stored energy and of movements; accumulator practice',
  mend: 'Put a check valve at the pump outlet.',
  needs: 'topology',
  page: `
Another source (an accumulator, a pump on another drive, a chamber that carries a load) reaches the pump's outlet as the circuit
stands (shut-offs as declared, filters in either direction), and no check stops it.

Stays clean: a check between them; two pumps on one drive (A19 judges them); the high-pressure pump of a two-pump unit, to whose line
the low-pressure pump joins over its check; a load behind a directional valve.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('pump').flatMap((pump) => {
      const outlet = graph.netAt(pump.id, 'P');
      if (outlet === undefined || outlet.open === true) return [];
      const sources = sourcesOf(graph, pump, waysTo(graph, outlet.id, asDeclared));
      if (sources.length === 0) return [];
      return [
        tell(A10, {
          what: `No check valve at ${pump.id}.P: with the drive stopped, oil from ${list(sources.map((s) => s.words))} runs back through ${pump.id}.`,
          origin: pump.nameOrigin,
          place: pump.id,
          state: 'OFF',
          related: sources.map((s) => s.related),
          fixes: [checkAtOutlet(context, graph, pump)],
        }),
      ];
    });
  },
};
