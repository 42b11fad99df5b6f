/** L07: a pressure switch whose threshold is never reached, or is already passed when its step begins. */
import { type Component, type Condition, read, type Step, type Study } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { openAlways, spreadable, waysTo } from '../graph/reach.ts';
import { pressureAt } from '../figures.ts';
import { tell } from '../finding.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { against, show } from '../words.ts';
import { limitOfNet } from './limits.ts';
import { relatedTo } from './pump-guard.ts';
import { carriedLoads } from './sources.ts';

interface Threshold {
  /** Pa. */
  readonly value: number;
  readonly unit: string;
  readonly net: string;
}

function thresholdOf(graph: Graph, pressureSwitch: Component): Threshold | undefined {
  const net = graph.netAt(pressureSwitch.id, 'P');
  const value = (pressureSwitch.properties.find((p) => p.name === 'rises') ?? pressureSwitch.properties.find((p) => p.name === 'falls'))
    ?.value;
  if (net === undefined || net.open === true || value?.type !== 'quantity' || value.q.dimension !== 'pressure') return undefined;
  return { value: value.q.si, unit: value.q.unit, net: net.id };
}

/** True where a load or the other chamber can raise the pressure above what the pumps give: only figures can tell. */
function mayBeRaised(graph: Graph, net: string): boolean {
  const sides = new Set(waysTo(graph, net, openAlways).keys());
  const carried = carriedLoads(graph).some((c) => c.fixed && sides.has(graph.netAt(c.actuator.id, c.port)?.id ?? ''));
  return carried || graph.ofKind('cylinder').some((c) => sides.has(graph.netAt(c.id, 'rod')?.id ?? ''));
}

function aboveSettings(context: RuleContext, graph: Graph, one: Component, at: Threshold): Finding | undefined {
  const limit = limitOfNet(graph, at.net);
  if (limit === undefined || at.value <= limit.lowest || mayBeRaised(graph, at.net)) return undefined;
  const shown = (si: number, unit: string) => show(context.circuit, si, 'pressure', unit);
  const never = at.value > limit.highest;
  const how = never
    ? `${limit.by.id} holds it at ${shown(limit.highest, limit.unit)} at most`
    : `${limit.by.id} opens from ${shown(limit.lowest, limit.unit)}, so it is reached only while oil goes over ${limit.by.id}`;
  return tell(L07, {
    what: `${one.id} switches at ${shown(at.value, at.unit)}${never ? ', which is never reached' : ''}: ${how}.`,
    severity: never ? 'error' : 'warning',
    origin: threshold(one)?.origin ?? one.nameOrigin,
    place: one.id,
    related: [relatedTo(limit.by, `${limit.by.id} limits the pressure at ${one.id}`)],
    computed: false,
  });
}

function threshold(one: Component) {
  return one.properties.find((p) => p.name === 'rises') ?? one.properties.find((p) => p.name === 'falls');
}

/** True where the step can only end with the switch on. */
function needsOn(condition: Condition | undefined, id: string): boolean {
  if (condition === undefined) return false;
  if (condition.op === 'state') return condition.of === id && condition.is === 'on';
  return condition.op === 'and' && condition.items.some((c) => needsOn(c, id));
}

/** Without a pump that reaches it the switch is not set wrong: something else is missing. */
function fed(graph: Graph, net: string): boolean {
  const ways = waysTo(graph, net, spreadable);
  return graph.ofKind('pump').some((pump) => ways.has(graph.netAt(pump.id, 'P')?.id ?? ''));
}

function inSteps(context: RuleContext, study: Study, graph: Graph, one: Component, at: Threshold): Finding | undefined {
  if (read.has(one, 'broken') || !fed(graph, at.net)) return undefined;
  const steps = new Map<string, Step>(context.circuit.cycles.flatMap((c) => c.steps.map((s) => [s.id, s] as const)));
  for (const result of study.steps) {
    const step = steps.get(result.id);
    if (!needsOn(step?.until, one.id) || result.points.length === 0 || result.points.some((p) => !p.solved)) continue;
    const highest = Math.max(
      result.peaks[at.net] ?? 0,
      ...result.points.map((p) => p.pressures[at.net] ?? p.undetermined[at.net]?.high ?? 0),
    );
    const common = {
      origin: threshold(one)?.origin ?? one.nameOrigin,
      place: one.id,
      state: result.id,
      related: [{ message: `${result.id} waits for ${one.id}`, origin: step!.until!.origin }],
      computed: true,
    };
    // The run itself must have waited in vain: a step that nobody got to says nothing.
    const inVain = result.faults.some((f) => f.step === result.id && (f.kind === 'time limit' || f.kind === 'waits for ever'));
    if (inVain && highest < at.value * 0.999) {
      const { value, bound } = against(context.circuit, highest, at.value, 'pressure', at.unit);
      return tell(L07, {
        ...common,
        what: `${result.id} waits for ${one.id} at ${bound}, but the pressure there reaches ${value} at most.`,
      });
    }
    const entry = result.points[0]!;
    const begin = pressureAt(entry, at.net);
    const only = step?.until?.op === 'state' && step.lasts === undefined;
    if (only && begin !== undefined && begin >= at.value && entry.actuators.some((a) => a.velocity !== 0)) {
      return tell(L07, {
        ...common,
        severity: 'warning',
        what: `${one.id} (${show(context.circuit, at.value, 'pressure', at.unit)}) is on as soon as ${result.id} begins: ${show(context.circuit, begin, 'pressure', at.unit)} stands there while ${entry.actuators.find((a) => a.velocity !== 0)!.id} still moves.`,
      });
    }
  }
  return undefined;
}

export const L07: Rule = {
  code: 'L07',
  name: 'pressure-switch-order',
  title: 'Pressure switch set out of order',
  severity: 'error',
  why: 'A step that waits for it never ends, or ends before the work is done.',
  ground: 'order of pressure settings, fluid power textbooks: working pressure < switch < relief',
  mend: 'Set the switch below the relief or compensator and above the pressure of the motion before it.',
  needs: 'topology',
  figures: true,
  page: `
The threshold (\`rises\`, else \`falls\`) is compared with what limits the pressure there: the reliefs with override and compensators of the pumps that feed it,
or a reducing valve. Error above the highest of it; warning between the setting (less tolerance) and that, where it is reached only while oil goes
over the relief.

Once the steps are computed: error where a step can end only with the switch on and the pressure there never gets so high; warning where it is on as
soon as the step begins.

Stays clean: a threshold below the relief; a switch on a chamber that a weight, a fixed force or the other chamber can raise (only figures can tell); level,
temperature and filter switches.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return graph.ofKind('switch').flatMap((one) => {
      const at = thresholdOf(graph, one);
      if (at === undefined) return [];
      return (
        aboveSettings(context, graph, one, at) ??
        (context.study === undefined ? undefined : inSteps(context, context.study, graph, one, at)) ??
        []
      );
    });
  },
};
