/** A02: the only relief of a fixed pump stands behind something that can close. */
import { graphOf, type Graph } from '../graph/graph.ts';
import { tell } from '../finding.ts';
import { addRelief, lockOpen, moveRelief, settingLike } from '../fixes/relief.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { pumpGuards, relatedTo, stakes, type PumpGuard } from './pump-guard.ts';
import { conditions } from './conditions.ts';

function judge(context: RuleContext, graph: Graph, { pump, outlet, perhaps }: PumpGuard): Finding[] {
  const reached = perhaps[0];
  if (reached === undefined) return [];
  const relief = reached.guard.component;
  const { only, else: otherwise, closing } = conditions(graph, reached);
  const byHand = reached.way.edges.every((e) => e.class === 'always' || e.byHand === true);
  const inside = reached.guard.what === 'inside' ? `the relief inside ${relief.id}` : relief.id;
  return [
    tell(A02, {
      what: `${inside} protects ${pump.id} only while ${only}; with ${otherwise} nothing limits the pressure at ${pump.id}.P: ${stakes(graph, pump, outlet)}.`,
      severity: byHand ? 'warning' : 'error',
      origin: pump.nameOrigin,
      place: pump.id,
      related: [
        ...closing.map((c) => relatedTo(c, `${c.id} stands between ${pump.id}.P and ${inside}`)),
        relatedTo(relief, `${inside} is the only relief ${pump.id} can reach`),
      ],
      fixes: [
        ...(byHand ? closing.map((c) => lockOpen(context, c)) : []),
        reached.guard.what === 'relief' ? moveRelief(context, graph, pump, relief) : undefined,
        addRelief(context, graph, pump, reached.guard.what === 'relief' ? settingLike(context, graph, outlet.id, relief) : undefined),
      ],
    }),
  ];
}

export const A02: Rule = {
  code: 'A02',
  name: 'relief-behind-valve',
  title: 'Relief can be shut off from its pump',
  severity: 'error',
  why: 'With the element between them closed, or a spool stuck half-way, the pump has no relief.',
  ground: 'ISO 4413, protection against unintended pressures',
  mend: 'Join the relief to the pump outlet, before every element that can close; a shut-off that must stay gets locked open.',
  needs: 'topology',
  page: `
The outlet of a fixed pump reaches a relief, but only through something that can close: a directional valve (a spool may stick between two
positions, so no position counts as sure), an unlocked shut-off, a quick-action coupling, a filter without bypass, a sequence or reducing
valve, a flow divider, a hose-burst valve. Error; a warning where only open shut-offs without \`locked\` stand between. A shut-off declared
closed before the only relief is an error.

Stays clean: a shut-off \`open, locked\`; a check in its free direction; a filter with bypass; a second relief that is sure. A relief behind a
check against its flow is never reached: A01.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return pumpGuards(graph, false).flatMap((guard) => (guard.sure.length > 0 ? [] : judge(context, graph, guard)));
  },
};
