/** B03: the unloading valve opens too late (not below the relief) or too early (while the approach still needs its oil). */
import type { Study } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { tell } from '../finding.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { show } from '../words.ts';
import { type HighLow, highLowUnits } from './high-low.ts';
import { limitOfPump, settingOf } from './limits.ts';
import { relatedTo } from './pump-guard.ts';
import { driveOf } from './sources.ts';

function tooHigh(context: RuleContext, graph: Graph, unit: HighLow): Finding | undefined {
  const opens = settingOf(unit.unloading);
  const limit = limitOfPump(graph, unit.high);
  if (opens === undefined || limit === undefined) return undefined;
  // Fully open 10 % above its setting.
  const open = opens.highest * 1.1;
  if (open <= limit.lowest) return undefined;
  const never = opens.set >= limit.set;
  const at = (si: number, unit: string) => show(context.circuit, si, 'pressure', unit);
  const how = never ? `never opens` : `does not open fully (that takes ${at(open, opens.unit)})`;
  return tell(B03, {
    what: `${unit.unloading.id} is set ${at(opens.set, opens.unit)} and ${how}: ${limit.by.id} holds the pressure at ${at(limit.lowest, limit.unit)}. ${unit.low.id} works against full pressure all the time.`,
    severity: never ? 'error' : 'warning',
    origin: unit.unloading.properties.find((p) => p.name === 'set')?.origin ?? unit.unloading.nameOrigin,
    place: unit.unloading.id,
    related: [relatedTo(limit.by, `set ${at(limit.set, limit.unit)}`)],
    // A valve that never opens overloads the drive: one cause.
    ...(never ? { hidesAt: [{ code: 'B04', place: driveOf(unit.low) ?? '' }] } : {}),
    computed: false,
  });
}

/** Steps in which something moves, and whether the low-pressure oil helps in any of them. */
function tooLow(context: RuleContext, study: Study, unit: HighLow): Finding | undefined {
  const moving = study.steps
    .flatMap((s) => s.points.map((p) => ({ step: s.id, point: p })))
    .filter(({ point }) => point.solved && point.actuators.some((a) => a.velocity !== 0));
  if (moving.length === 0) return undefined;
  const openings = moving.map(({ point }) => point.openings[unit.unloading.id]);
  if (openings.some((o) => o === undefined || o < 0.99)) return undefined;
  const set = settingOf(unit.unloading);
  const steps = [...new Set(moving.map((m) => m.step))];
  return tell(B03, {
    what: `${unit.unloading.id} is open in every step that moves (${steps.join(', ')}): the oil of ${unit.low.id} never reaches an actuator.${set === undefined ? '' : ` It opens at ${show(context.circuit, set.set, 'pressure', set.unit)}, below what the approach needs.`}`,
    severity: 'warning',
    origin: unit.unloading.properties.find((p) => p.name === 'set')?.origin ?? unit.unloading.nameOrigin,
    place: unit.unloading.id,
    computed: true,
  });
}

export const B03: Rule = {
  code: 'B03',
  name: 'hl-unload-not-lowest',
  title: 'Unloading valve not set between approach and relief',
  severity: 'error',
  why: 'Set above the relief it never unloads and the motor carries both pumps at full pressure; set below the approach it takes the fast oil away.',
  ground: 'high-low circuit with two pumps, fluid power textbooks: unloading at about 1.5 times the approach pressure',
  mend: 'Set it above the pressure of the approach and well below the relief.',
  needs: 'topology',
  figures: true,
  page: `
The unloading valve of a two-pump unit is fully open 10 % above its setting. If that is above what the high-pressure pump can reach (its relief, less
tolerance, or its compensator): error where the setting itself is not below it, warning where only the opening band is cut.

Once the steps are computed: a warning where the valve stands open in every step that moves, so that the low-pressure oil never helps.

Stays clean: a setting between the two; one that opens only in the working part of the stroke.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return highLowUnits(graph).flatMap((unit) => {
      if (unit.escapeWay !== undefined) return [];
      return tooHigh(context, graph, unit) ?? (context.study === undefined ? undefined : tooLow(context, context.study, unit)) ?? [];
    });
  },
};
