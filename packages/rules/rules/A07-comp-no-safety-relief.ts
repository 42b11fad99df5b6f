/** A07: a pump with a compensator and no relief that is sure. */
import { type Component, read } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { ratingOf } from '../graph/rating.ts';
import { spreadable, waysFrom } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import { addRelief } from '../fixes/relief.ts';
import { round, type Setting } from '../fixes/values.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { list, show } from '../words.ts';
import { conditions } from './conditions.ts';
import { settingOf } from './limits.ts';
import { type PumpGuard, pumpGuards, relatedTo, reliefBehindSeat } from './pump-guard.ts';

/** Actuators with people near or under them that the pump drives. */
function watched(graph: Graph, outlet: string): readonly string[] {
  const nets = waysFrom(graph, outlet, spreadable);
  const driven = new Set([...nets.keys()].flatMap((n) => (graph.net(n)?.ports ?? []).map((p) => p.component)));
  return graph.circuit.loads
    .filter((l) => ['near', 'under'].includes(read.word(l, 'people') ?? ''))
    .flatMap((l) => l.actuators.filter((a) => driven.has(a)));
}

/** 15 % above the compensator (common practice: 10 to 20 %), where the parts bear it. */
function above(graph: Graph, pump: Component, outlet: string): Setting | undefined {
  const compensator = settingOf(pump, 'compensator');
  if (compensator === undefined) return undefined;
  const set = round(graph.circuit, compensator.set * 1.15, 'pressure', 'up');
  const rating = ratingOf(graph, outlet);
  return rating !== undefined && set.si * 1.1 > rating.value ? undefined : { ...set, reason: '15 % above the compensator' };
}

function judge(context: RuleContext, graph: Graph, { pump, outlet, perhaps }: PumpGuard): Finding[] {
  const reached = perhaps[0];
  const compensator = settingOf(pump, 'compensator');
  const set = compensator === undefined ? '' : ` (${show(context.circuit, compensator.set, 'pressure', compensator.unit)})`;
  const people = watched(graph, outlet.id);
  const alone = `only the compensator of ${pump.id}${set} limits the pressure at ${pump.id}.P: stuck, nothing does`;
  const behind = reached === undefined ? reliefBehindSeat(graph, outlet.id) : undefined;
  const how = reached === undefined ? undefined : conditions(graph, reached);
  const what =
    how !== undefined && reached !== undefined
      ? `${reached.guard.component.id} protects ${pump.id} only while ${how.only}; with ${how.else} ${alone}`
      : `No relief can be reached from ${pump.id}.P${behind === undefined ? '' : ` (${behind.relief.id} stands behind ${behind.seat.id}, against its flow)`}: ${alone}`;
  const setting = above(graph, pump, outlet.id);
  return [
    tell(A07, {
      what: `${what}.${people.length > 0 ? ` People are near ${list(people)}.` : ''}`,
      severity: people.length > 0 ? 'error' : 'warning',
      origin: pump.nameOrigin,
      place: pump.id,
      related: (how?.closing ?? []).map((c) => relatedTo(c, `${c.id} stands between ${pump.id}.P and the relief`)),
      fixes: [setting === undefined ? undefined : addRelief(context, graph, pump, setting)],
    }),
  ];
}

export const A07: Rule = {
  code: 'A07',
  name: 'comp-no-safety-relief',
  title: 'Compensated pump without a relief',
  severity: 'warning',
  why: 'A compensator answers late to a sudden stop and can stick: then the pump works against whatever stands in the way.',
  ground: 'ISO 4413, protection against unintended pressures; pumps with pressure compensator, trade practice',
  mend: 'Join a relief to the pump outlet, set 10 to 20 % above the compensator, before any element that can close.',
  needs: 'topology',
  page: `
As A01 and A02, for pumps with a \`compensator\`: no relief in reach, or only through something that can close. Warning; error where people are near or
under an actuator that the pump drives.

Stays clean: a relief that nothing can shut off from the pump; \`reliefs\` inside it.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return pumpGuards(graph, true).flatMap((guard) => (guard.sure.length > 0 ? [] : judge(context, graph, guard)));
  },
};
