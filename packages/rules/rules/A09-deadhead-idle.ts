/** A09: with nothing to do, a fixed pump works against pressure. */
import { type Component, read, type StateResult, type Variant } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { pressureAt } from '../figures.ts';
import { tell } from '../finding.ts';
import type { Finding, Rule, RuleContext } from '../rule.ts';
import { list, show } from '../words.ts';
import { relatedTo } from './pump-guard.ts';
import { driveOf } from './sources.ts';

/** Highest pressure at which a pump counts as idle, Pa, where `limits` says nothing (common practice). */
const IDLE = 20e5;

interface Loaded {
  readonly state: StateResult;
  readonly variant: Variant;
  readonly pressure: number;
}

function worst(context: RuleContext, graph: Graph, pump: Component, limit: number): Loaded | undefined {
  const outlet = graph.netAt(pump.id, 'P')?.id;
  const drive = driveOf(pump);
  if (outlet === undefined || drive === undefined) return undefined;
  for (const name of ['REST', 'IDLE']) {
    let found: Loaded | undefined;
    for (const state of context.study?.states ?? []) {
      if (state.state !== name) continue;
      for (const variant of state.variants) {
        const pressure = pressureAt(variant.point, outlet);
        // Without any way out there is no figure: that pump has no relief (A01, A02).
        const closed = variant.point.diagnosis.some((d) => d.kind === 'OVERPRESSURE' && d.nets.includes(outlet));
        if (closed || !variant.drivesOn.includes(drive) || pressure === undefined || pressure <= limit) continue;
        if (found === undefined || pressure > found.pressure) found = { state, variant, pressure };
      }
    }
    if (found !== undefined) return found;
  }
  return undefined;
}

/** The variant is named where not all are loaded. */
function variantWords(state: StateResult, variant: Variant, outlet: string, limit: number): string {
  const all = state.variants.every((v) => (pressureAt(v.point, outlet) ?? 0) > limit);
  return all || variant.label === '' ? '' : ` (${variant.label})`;
}

function say(context: RuleContext, graph: Graph, pump: Component, limit: number, { state, variant, pressure }: Loaded): Finding {
  const { circuit } = context;
  const power = variant.point.power[pump.id];
  const over = variant.point.lifting.flatMap((id) => graph.component(id) ?? []);
  const heat = power === undefined ? '' : `; ${show(circuit, power, 'power')} turn into heat`;
  const by = over.length === 0 ? '' : `, all over ${list(over.map((c) => c.id))}`;
  return tell(A09, {
    what: `${pump.id} works against ${show(circuit, pressure, 'pressure')} in ${state.id}${variantWords(state, variant, graph.netAt(pump.id, 'P')?.id ?? '', limit)}${by}; idle is at most ${show(circuit, limit, 'pressure')}${heat}.`,
    origin: pump.nameOrigin,
    place: pump.id,
    state: state.id,
    related: over.map((c) => relatedTo(c, `${c.id} passes the oil of ${pump.id} while nothing is done`)),
  });
}

export const A09: Rule = {
  code: 'A09',
  name: 'deadhead-idle',
  title: 'Pump works against pressure at rest',
  severity: 'warning',
  why: 'All its power turns into heat while the machine waits.',
  ground: 'power = pressure x flow, conservation of energy; ISO 4413, oil temperature',
  mend: 'Unload it at rest: tandem or open centre, a vented relief, an unloading valve, or a compensated pump.',
  needs: 'computed',
  page: `
REST (all drives turning, no coil live) is solved with every position of detent valves and accumulators charged and empty; IDLE too where it differs. A fixed
pump whose outlet stands above \`limits idle\` (20 bar unless said) in any of them is told once, in the worst variant.

Stays clean: tandem and open centres, a relief vented at rest, an unloading valve held open by an accumulator, pumps with a compensator (they give no flow).
Holding under pressure on purpose: \`allow A09 on P1 "reason"\`.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    const limit = (context.circuit.limits === undefined ? undefined : read.si(context.circuit.limits, 'idle')) ?? IDLE;
    return graph.ofKind('pump').flatMap((pump) => {
      if (read.has(pump, 'compensator')) return [];
      const loaded = worst(context, graph, pump, limit);
      return loaded === undefined ? [] : [say(context, graph, pump, limit, loaded)];
    });
  },
};
