/** A01: a fixed pump whose outlet reaches nothing that limits its pressure. */
import { graphOf } from '../graph/graph.ts';
import { tell } from '../finding.ts';
import { addRelief } from '../fixes/relief.ts';
import type { Rule } from '../rule.ts';
import { pumpGuards, relatedTo, reliefBehindSeat, stakes } from './pump-guard.ts';

export const A01: Rule = {
  code: 'A01',
  name: 'pump-no-relief',
  title: 'Fixed pump without a relief',
  severity: 'error',
  why: 'A fixed pump pushes its oil out whatever stands in the way: line, pump or shaft gives way first.',
  ground: 'ISO 4413, protection against unintended pressures',
  mend: 'Join a pressure-relief valve to the pump outlet, before any element that can close, with a free way to the reservoir.',
  needs: 'topology',
  page: `
From the outlet of every pump without a compensator the ways are followed that oil can take: through lines, checks in their free
direction, throttles, locked shut-offs, filters with bypass; and, as second choice, through everything that could stand open. If no
pressure-relief valve with a sure way to the reservoir is met either way, the pump has no relief.

Counts as protection: a \`relief\` reached that way, also **through a check towards another pump's line**; \`reliefs\` inside the pump; a line
that leads to the reservoir with nothing in it that can close. Does not count: an unloading valve, a sequence valve, a pressure switch, a
throttle to the reservoir, a relief behind a check that faces the other way, a relief whose T reaches no reservoir (told as A06 at
the relief).

A relief that is there but can be shut off is A02. A pump with a compensator is judged by A07.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return pumpGuards(graph, false).flatMap(({ pump, outlet, sure, perhaps }) => {
      if (sure.length > 0 || perhaps.length > 0) return [];
      const behind = reliefBehindSeat(graph, outlet.id);
      const why =
        behind === undefined
          ? 'no relief can be reached from it'
          : `${behind.relief.id} stands behind ${behind.seat.id}, against its flow (${behind.words})`;
      return [
        tell(A01, {
          what: `Nothing limits the pressure at ${pump.id}.P, in any state: ${why}; ${stakes(graph, pump, outlet)}.`,
          origin: pump.nameOrigin,
          place: pump.id,
          related:
            behind === undefined
              ? []
              : [
                  relatedTo(behind.seat, `${behind.seat.id} stands between ${pump.id} and ${behind.relief.id}`),
                  relatedTo(behind.relief, `${behind.relief.id} cannot be reached from ${pump.id}.P`),
                ],
          fixes: [addRelief(context, graph, pump)],
          hides: ['A02', 'A03', 'A04', 'A05', 'A06'],
        }),
      ];
    });
  },
};
