/** B04: the drive of a two-pump unit is too small for one of its two corners. */
import { read } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { tell } from '../finding.ts';
import { pumpFlow } from '../graph/flow.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { against, show } from '../words.ts';
import { type HighLow, highLowUnits } from './high-low.ts';
import { limitOfPump, settingOf } from './limits.ts';
import { relatedTo } from './pump-guard.ts';
import { driveOf } from './sources.ts';

/** Mechanical efficiency of a pump where none is declared (default of the kind). */
const MECHANICAL = 0.92;

interface Corner {
  readonly power: number;
  readonly words: string;
  /** W the drive may give here. */
  readonly allowed: number;
}

function corners(context: RuleContext, graph: Graph, unit: HighLow, power: number, peak: number): Corner[] {
  const low = pumpFlow(graph, unit.low);
  const high = pumpFlow(graph, unit.high);
  const opens = settingOf(unit.unloading);
  const limit = limitOfPump(graph, unit.high);
  if (low === undefined || high === undefined) return [];
  const shaft = (pressure: number, flow: number, pump: typeof unit.low) => (pressure * flow) / (read.si(pump, 'mechanical') ?? MECHANICAL);
  const idle = read.flowAt(unit.unloading, 'passes');
  const unloaded = idle === undefined || idle.flow <= 0 ? 0 : idle.drop * (low / idle.flow) ** 2;
  const { circuit } = context;
  const found: Corner[] = [];
  if (opens !== undefined) {
    // Passed within a moment when the valve opens: a declared short-time rating counts.
    found.push({
      power: shaft(opens.set, low, unit.low) + shaft(opens.set, high, unit.high),
      words: `both pumps (${show(circuit, low + high, 'flow')}) at ${show(circuit, opens.set, 'pressure', opens.unit)}, just before ${unit.unloading.id} opens`,
      allowed: power * peak,
    });
  }
  if (limit !== undefined) {
    found.push({
      power: shaft(limit.set, high, unit.high) + shaft(unloaded, low, unit.low),
      words: `${unit.high.id} (${show(circuit, high, 'flow')}) at ${show(circuit, limit.set, 'pressure', limit.unit)} of ${limit.by.id}, ${unit.low.id} unloaded`,
      allowed: power,
    });
  }
  return found;
}

function judge(context: RuleContext, graph: Graph, unit: HighLow): Finding[] {
  const drive = graph.component(driveOf(unit.low) ?? '');
  if (drive === undefined || driveOf(unit.high) !== drive.id || unit.escapeWay !== undefined) return [];
  const power = read.si(drive, 'power');
  if (power === undefined) return [];
  const worst = corners(context, graph, unit, power, read.si(drive, 'peak') ?? 1).sort(
    (a, b) => b.power / b.allowed - a.power / a.allowed,
  )[0];
  if (worst === undefined || worst.power <= worst.allowed * 1.001) return [];
  const unitOf = drive.properties.find((p) => p.name === 'power')?.value;
  const { value, bound } = against(
    context.circuit,
    worst.power,
    worst.allowed,
    'power',
    unitOf?.type === 'quantity' ? unitOf.q.unit : undefined,
  );
  return [
    tell(B04, {
      what: `${drive.id} gives ${bound}, the two pumps need ${value}: ${worst.words}.`,
      origin: drive.properties.find((p) => p.name === 'power')?.origin ?? drive.nameOrigin,
      place: drive.id,
      related: [relatedTo(unit.unloading, `${unit.unloading.id} unloads ${unit.low.id}`)],
    }),
  ];
}

export const B04: Rule = {
  code: 'B04',
  name: 'hl-motor-sizing',
  title: 'Drive too small for the two pumps',
  severity: 'warning',
  why: 'The motor trips when the unit switches over or holds full pressure.',
  ground: 'power = pressure x flow / efficiency, conservation of energy; the two corners of a high-low unit, fluid power textbooks',
  mend: 'Choose a larger drive, a smaller low-pressure pump, or a lower unloading setting.',
  needs: 'topology',
  page: `
Shaft power = pressure x theoretical flow / mechanical efficiency (92 % where none is declared), at two corners: both pumps just below
the unloading setting, where a declared \`peak\` of the drive counts (it is passed in a moment); the high-pressure pump at its relief with the other
unloaded, where it does not. The worse of the two is compared with \`power\`.

Stays clean: \`power ?\` (to be sized), pumps on two drives, a switch-over within the declared \`peak\`.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    return highLowUnits(graph).flatMap((unit) => judge(context, graph, unit));
  },
};
