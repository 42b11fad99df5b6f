/** B06: the check between the two pumps is there, but faces the wrong way. */
import type { Component } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { tell } from '../finding.ts';
import { isMiddle, replace, writtenAt } from '../fixes/places.ts';
import { writable } from '../fixes/sheet.ts';
import type { Fix, Rule, RuleContext } from '../rule.ts';
import { highLowUnits, wrongWayCheck } from './high-low.ts';
import { relatedTo } from './pump-guard.ts';

function turn(context: RuleContext, graph: Graph, check: Component): Fix | undefined {
  const inlet = writtenAt(graph.circuit, check.id, 'in');
  const outlet = writtenAt(graph.circuit, check.id, 'out');
  if (!writable(context, check) || [...inlet, ...outlet].some(isMiddle)) return undefined;
  return {
    title: `Turn ${check.id} round`,
    safe: false,
    changes: [...inlet.map((w) => replace(w, `${check.id}.out`)), ...outlet.map((w) => replace(w, `${check.id}.in`))],
  };
}

export const B06: Rule = {
  code: 'B06',
  name: 'hl-check-orientation',
  title: 'Check between the two pumps faces the wrong way',
  severity: 'error',
  why: 'The low-pressure oil never joins, and the high-pressure oil runs out through the unloading valve.',
  ground: 'high-low circuit with two pumps, fluid power textbooks',
  mend: 'Turn the check round: free from the low-pressure pump to the high-pressure line.',
  needs: 'topology',
  page: `
As B01, but the way by which the high-pressure oil escapes leads through a check valve in its free direction, and nothing on the unloading
valve's side uses oil but by way of that check: it faces the wrong way. It is told here alone; B01 and what follows from it (no relief in
reach of the low-pressure pump) are not repeated.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return highLowUnits(graph).flatMap((unit) => {
      const check = wrongWayCheck(graph, unit);
      if (check === undefined) return [];
      const { low, high, unloading } = unit;
      return [
        tell(B06, {
          what: `${check.id} lets oil through from ${high.id} to ${low.id}, and must from ${low.id} to ${high.id}: as it stands the oil of ${low.id} never joins and that of ${high.id} escapes through ${unloading.id}.`,
          origin: check.nameOrigin,
          place: check.id,
          related: [relatedTo(unloading, `${unloading.id} unloads ${low.id}`), relatedTo(high, `${high.id} is the high-pressure pump`)],
          fixes: [turn(context, graph, check)],
          hidesAt: [
            { code: 'B01', place: unloading.id },
            { code: 'B02', place: unloading.id },
            ...['A01', 'A02', 'A09', 'A10', 'A19'].map((code) => ({ code, place: low.id })),
            ...['A10', 'A19'].map((code) => ({ code, place: high.id })),
          ],
        }),
      ];
    });
  },
};
