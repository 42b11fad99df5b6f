/** What the engine found wrong, in trade words and net names. */
import type { EngineDiagnosis, SteadyResult } from '@oilway/engine';
import type { Diagnosis } from '../study/study.ts';
import type { Assembled } from './assembled.ts';
import type { Stand } from './machine.ts';
import { fromLitresPerSecond, fromMPa } from './units.ts';

/** Highest pressure the computing core knows, MPa: beyond it oil has no outlet. */
const CEILING = 60;

export function translate(
  assembled: Assembled,
  found: readonly EngineDiagnosis[],
  result: SteadyResult,
  parameters: Float64Array,
  stands: Readonly<Record<string, Stand>>,
): readonly Diagnosis[] {
  const nets = (nodes: readonly number[]): readonly string[] => nodes.flatMap((n) => assembled.netOf.get(n) ?? []);
  const out: Diagnosis[] = [];
  for (const d of found) {
    if (d.kind === 'NO EQUILIBRIUM') {
      out.push({ kind: d.kind, nets: nets(d.nodes), why: d.why });
      continue;
    }
    const named = nets(d.nodes);
    if (named.length === 0) continue;
    if (d.kind === 'CLOSED VOLUME') {
      out.push({ kind: d.kind, nets: named, low: 0, high: fromMPa(letOut(assembled, d.nodes, result, parameters)) });
      continue;
    }
    out.push({
      kind: d.kind,
      nets: named,
      flow: fromLitresPerSecond(d.flow),
      sources: [
        ...new Set([
          ...d.sources.flatMap((tag) => assembled.elements[tag]?.component ?? []),
          ...d.actuators.flatMap((a) => assembled.bodies[a]?.id ?? []),
        ]),
      ],
      closed: [...new Set(d.closed.flatMap((tag) => closedWords(assembled, tag, stands)))],
    });
  }
  return out;
}

/** "V1 P to A (centre)", "CV1 against flow", "RV1 P to T". */
function closedWords(assembled: Assembled, tag: number, stands: Readonly<Record<string, Stand>>): readonly string[] {
  const note = assembled.elements[tag];
  if (note === undefined || note.words === 'leakage' || note.words === '') return [];
  const kind = assembled.circuit.components.find((c) => c.id === note.component)?.kind;
  if (kind === 'check') return [`${note.component} against flow`];
  const stand = stands[note.component];
  return [`${note.component} ${note.words}${stand === undefined ? '' : ` (${stand.position})`}`];
}

/** Pressure at which a relief, check or pressure-opened valve would let a closed volume out; MPa. */
function letOut(assembled: Assembled, nodes: readonly number[], result: SteadyResult, parameters: Float64Array): number {
  const inside = new Set(nodes);
  const p = (node: number): number => result.pressures[node] ?? 0;
  let lowest = CEILING;
  for (const e of assembled.specs) {
    if (e.type === 'relief' && inside.has(e.p) && !inside.has(e.t)) {
      const set = (parameters[e.set] ?? CEILING) + (inside.has(e.ref) ? 0 : p(e.ref));
      const vent = e.x === undefined || inside.has(e.x) ? set : p(e.x) + e.vented;
      lowest = Math.min(lowest, set, vent);
    }
    // A shuttle lets oil back to the higher of its inlets.
    if (e.type === 'shuttle' && inside.has(e.c) && !inside.has(e.a) && !inside.has(e.b))
      lowest = Math.min(lowest, Math.max(p(e.a), p(e.b)));
    if (e.type === 'check' && inside.has(e.a) && !inside.has(e.b) && (e.opening === undefined || (parameters[e.opening] ?? 0) > 0))
      lowest = Math.min(lowest, p(e.b) + e.crack);
    if (e.type === 'piloted' && inside.has(e.a) !== inside.has(e.b)) {
      const own = e.pilots.filter((x) => inside.has(x.node)).reduce((sum, x) => sum + x.weight, 0);
      if (own <= 0) continue;
      const others = e.pilots.filter((x) => !inside.has(x.node)).reduce((sum, x) => sum + x.weight * p(x.node), 0);
      lowest = Math.min(lowest, ((parameters[e.set] ?? CEILING) - others) / own);
    }
  }
  return Math.max(0, lowest);
}
