/** B01: the oil of the high-pressure pump can escape through the unloading valve of the low-pressure pump. */
import { graphOf, type Graph } from '../graph/graph.ts';
import { wayWords } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { checkAtOutlet } from '../fixes/check.ts';
import { checkInJoint } from '../fixes/joint.ts';
import { replace, writtenAt } from '../fixes/places.ts';
import { pumpFlow } from '../graph/flow.ts';
import type { Rule, RuleContext } from '../rule.ts';
import { show } from '../words.ts';
import { read } from '@oilway/circuit';
import { type HighLow, highLowUnits, wrongWayCheck } from './high-low.ts';
import { relatedTo } from './pump-guard.ts';

/** Where the low-pressure pump is joined to the rest: the characters a person would look at. */
function joint(graph: Graph, unit: HighLow) {
  const places = writtenAt(graph.circuit, unit.low.id, 'P');
  const high = graph.netAt(unit.high.id, 'P');
  const shared = places.find((p) => p.line.pieces.some((id) => high?.pieces.includes(id)));
  return (shared ?? places[0])?.place.origin ?? unit.low.nameOrigin;
}

function fix(context: RuleContext, graph: Graph, unit: HighLow) {
  // The pilot must sense the high-pressure side; where it is taken from the low-pressure pump's port it moves along.
  const pilots = writtenAt(graph.circuit, unit.low.id, 'P').filter((w) => w.line.function === 'pilot');
  const moved = pilots.map((w) => replace(w, `${unit.high.id}.P`));
  return (
    (moved.length === 0 ? checkInJoint(context, graph, unit.low) : undefined) ??
    checkAtOutlet(context, graph, unit.low, [unit.unloading], moved)
  );
}

export const B01: Rule = {
  code: 'B01',
  name: 'hl-no-check',
  title: 'No check valve between low- and high-pressure pump',
  severity: 'error',
  why: 'When the unloading valve opens, the oil of the high-pressure pump goes to the reservoir with the rest: full pressure is never reached.',
  ground: 'high-low circuit with two pumps, fluid power textbooks',
  mend: 'Put a check valve between the low-pressure pump with its unloading valve and the high-pressure line.',
  needs: 'topology',
  page: `
An unloading valve stands at the outlet of one pump, and oil of another pump can get to it: through lines, checks in their free direction, and
directional valves in any position.

Stays clean: a check from the low-pressure pump to the high-pressure line, also where the high-pressure pump has no check of its own; two
pumps that are unloaded together on purpose (the pilot senses an accumulator behind a common check). A check that faces the wrong way is B06.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return highLowUnits(graph).flatMap((unit) => {
      const { low, high, unloading, escapeWay } = unit;
      if (escapeWay === undefined || wrongWayCheck(graph, unit) !== undefined) return [];
      const opens = read.si(unloading, 'set');
      const flow = pumpFlow(graph, high);
      const by = wayWords(escapeWay);
      const figures = [
        flow === undefined ? '' : `, ${show(context.circuit, flow, 'flow')},`,
        opens === undefined ? '' : ` as soon as ${unloading.id} opens at ${show(context.circuit, opens, 'pressure')}`,
      ];
      return [
        tell(B01, {
          what: `No check valve between ${low.id} and ${high.id}: the oil of ${high.id}${figures[0]} escapes${by === '' ? '' : ` by way of ${by}`} through ${unloading.id} to the reservoir${figures[1]}.`,
          origin: joint(graph, unit),
          place: unloading.id,
          related: [
            relatedTo(unloading, `${unloading.id} unloads ${low.id}`),
            relatedTo(high, `${high.id} must keep its pressure when ${low.id} is unloaded`),
          ],
          fixes: [fix(context, graph, unit)],
          hides: ['B02'],
          hidesAt: [low, high].flatMap((p) => ['A10', 'A19'].map((code) => ({ code, place: p.id }))),
        }),
      ];
    });
  },
};
