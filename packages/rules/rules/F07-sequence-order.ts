/** F07: settings in the wrong order: a sequence valve that never opens, or opens before the motion it waits for is done. */
import { type ActuatorPoint, type Component, read, type Study } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { type Passing, spreadable, waysFrom } from '../graph/reach.ts';
import { pressureAt } from '../figures.ts';
import { tell } from '../finding.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { show } from '../words.ts';
import { limitOfNet, settingOf } from './limits.ts';
import { hasArrived, pressesOnPart } from './pressing.ts';
import { relatedTo } from './pump-guard.ts';

function tooHigh(context: RuleContext, graph: Graph, valve: Component): Finding | undefined {
  const senses = read.word(valve, 'external') === 'pilot' ? 'X' : 'P';
  const net = graph.netAt(valve.id, senses);
  const setting = settingOf(valve);
  const limit = net === undefined ? undefined : limitOfNet(graph, net.id);
  if (setting === undefined || limit === undefined) return undefined;
  // Fully open 10 % above its setting.
  const open = setting.highest * 1.1;
  if (open <= limit.lowest) return undefined;
  const never = setting.set >= limit.set;
  const at = (si: number, unit: string) => show(context.circuit, si, 'pressure', unit);
  const how = never ? 'never opens' : `cannot open fully (that takes ${at(open, setting.unit)})`;
  return tell(F07, {
    what: `${valve.id} is set ${at(setting.set, setting.unit)} and ${how}: ${limit.by.id} holds the pressure at ${valve.id}.${senses} at ${at(limit.lowest, limit.unit)}.`,
    severity: never ? 'error' : 'warning',
    origin: valve.properties.find((p) => p.name === 'set')?.origin ?? valve.nameOrigin,
    place: valve.id,
    related: [relatedTo(limit.by, `set ${at(limit.set, limit.unit)}`)],
    computed: false,
  });
}

/** Actuators that take oil before the sequence valve. */
function before(graph: Graph, valve: Component): ReadonlySet<string> {
  const net = graph.netAt(valve.id, 'P')?.id;
  const withoutIt: Passing = (e) => (e.component === valve.id || e.kind === 'directional' ? undefined : spreadable(e));
  const nets = net === undefined ? [] : [...waysFrom(graph, net, withoutIt).keys()];
  return new Set(
    nets.flatMap((n) =>
      (graph.net(n)?.ports ?? [])
        .map((p) => p.component)
        .filter((id) => ['cylinder', 'motor', 'rotary'].includes(graph.component(id)?.kind ?? '')),
    ),
  );
}

/** True where an actuator has not yet done its motion: it moves, or is too weak to. */
function underWay(graph: Graph, a: ActuatorPoint): boolean {
  if (a.direction === 0 || hasArrived(a) || pressesOnPart(graph, a)) return false;
  return (Math.abs(a.velocity) > 1e-3 && Math.sign(a.velocity) === a.direction) || (a.available !== undefined && a.available < a.needed);
}

function tooEarly(context: RuleContext, study: Study, graph: Graph, valve: Component): Finding | undefined {
  const first = before(graph, valve);
  const setting = settingOf(valve);
  const inlet = graph.netAt(valve.id, 'P')?.id;
  if (first.size === 0 || inlet === undefined || setting === undefined) return undefined;
  for (const step of study.steps) {
    for (const point of step.points) {
      if (!point.solved || (point.openings[valve.id] ?? 0) < 0.02) continue;
      const still = point.actuators.find((a) => first.has(a.id) && underWay(graph, a));
      const next = point.actuators.find((a) => !first.has(a.id) && Math.abs(a.velocity) > 1e-3);
      if (still === undefined || next === undefined) continue;
      const pressure = pressureAt(point, inlet);
      const shown = (si: number) => show(context.circuit, si, 'pressure', setting.unit);
      return tell(F07, {
        what: `${valve.id} (set ${shown(setting.set)}) opens in ${step.id} before ${still.id} has done its motion${pressure === undefined ? '' : `: ${shown(pressure)} stands at ${valve.id}.P`}; ${next.id} does not wait for it.`,
        origin: valve.properties.find((p) => p.name === 'set')?.origin ?? valve.nameOrigin,
        place: valve.id,
        state: step.id,
        computed: true,
      });
    }
  }
  return undefined;
}

export const F07: Rule = {
  code: 'F07',
  name: 'sequence-order',
  title: 'Sequence valve set out of order',
  severity: 'error',
  why: 'Set too high the next motion never begins; set too low it begins before the first has done its work.',
  ground: 'sequence circuits, fluid power textbooks: working pressure of the first actuator < sequence setting < relief',
  mend: 'Set it above the working pressure of the actuator before it and well below the relief.',
  needs: 'topology',
  figures: true,
  page: `
The pressure a sequence valve senses is limited by the reliefs and compensators of the pumps that feed it, or by a reducing valve before it. Error where
its setting is not below that limit (it never opens); warning where only its opening band of 10 % is cut.

Once the steps are computed: error where it is open in a step and the next actuator moves before the
one before it has done its motion.

Stays clean: working pressure of the first actuator < setting < relief; a limit that is not known.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph
      .ofKind('sequence')
      .flatMap(
        (valve) =>
          tooHigh(context, graph, valve) ??
          (context.study === undefined ? undefined : tooEarly(context, context.study, graph, valve)) ??
          [],
      );
  },
};
