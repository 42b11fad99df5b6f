/** Mends that put a check valve at a pump's outlet, so that oil leaves but never comes back. */
import type { Component, TextChange } from '@oilway/circuit';
import type { Graph } from '../graph/graph.ts';
import type { Fix, RuleContext } from '../rule.ts';
import { isMiddle, neighbours, replace, takeOut, type Written, writtenAt } from './places.ts';
import { below, freeName, statement, writable } from './sheet.ts';
import { pumpFlow } from '../graph/flow.ts';
import { drop, round } from './values.ts';

/**
 * A check at the outlet of `pump`. What is in `keep` (an unloading valve's P) stays on the pump's side, everything else comes behind the
 * check. Undefined where the lines are written so that it takes a person to part them.
 */
export function checkAtOutlet(
  context: RuleContext,
  graph: Graph,
  pump: Component,
  keep: readonly Component[] = [],
  more: readonly TextChange[] = [],
): Fix | undefined {
  const { circuit } = graph;
  const flow = pumpFlow(graph, pump);
  if (!writable(context, pump) || flow === undefined) return undefined;
  const outlets = writtenAt(circuit, pump.id, 'P').filter((w) => w.line.function !== 'pilot');
  const first = outlets[0];
  if (first === undefined) return undefined;
  const name = freeName(circuit, 'CV');
  const declared = below(context, pump.origin, [
    statement(
      context,
      pump.origin,
      'check',
      `${name} (crack ${drop(circuit, 0.5)}, passes ${round(circuit, flow, 'flow', 'up').text} at ${drop(circuit, 3)})`,
    ),
  ]);
  const title = `Insert check valve ${name} at the outlet of ${pump.id}`;
  const middle = outlets.find(isMiddle);
  if (middle !== undefined) {
    if (keep.length > 0 || outlets.length > 1 || neighbours(middle) > 1) return undefined;
    const { uri, end } = middle.place.origin;
    return { title, safe: false, changes: [declared, { uri, start: end, end, text: ` to ${name}` }, ...more] };
  }
  const parted = part(graph, pump, keep, outlets, name);
  if (parted === undefined) return undefined;
  const start = parted.natural ? pump.id : `${pump.id}.P`;
  const joined = statement(context, first.line.origin, 'working', `${start} to ${[...parted.kept, name].join(', ')}`);
  return { title, safe: false, changes: [declared, ...parted.changes, below(context, first.line.origin, [joined]), ...more] };
}

/** Every line that has more than the pump and what is kept gets the check's outlet in place of the pump. */
function part(graph: Graph, pump: Component, keep: readonly Component[], outlets: readonly Written[], name: string) {
  const kept: string[] = [];
  const changes: TextChange[] = [];
  const keptAt = keep.flatMap((c) => writtenAt(graph.circuit, c.id, 'P'));
  const touched = outlets.filter((o) => !onlyThese(o, pump, keep));
  const moved = keptAt.filter((k) => !onlyThese(k, pump, keep));
  const out = touched.length > 1 || touched.some((t) => t.station > 0) ? `${name}.out` : name;
  // One station at a time: the first pump place becomes the check, further ones and kept valves leave.
  for (const at of touched) changes.push(replace(at, out));
  for (const at of moved) {
    if (isMiddle(at) || neighbours(at) < 2) return undefined;
    changes.push(...takeOut([at]));
  }
  kept.push(...moved.map((m) => m.place.ports.find((p) => p.port === 'P')?.component ?? '').filter((id) => id !== ''));
  if (touched.length === 0) return undefined;
  // The name alone stands for the port once: it is free again where the place that had it became the check.
  return { kept, changes, natural: touched.some((t) => !t.place.written) };
}

/** True where a line joins nothing but the pump and what stays with it. */
function onlyThese(at: Written, pump: Component, keep: readonly Component[]): boolean {
  const own = new Set([pump.id, ...keep.map((k) => k.id)]);
  return at.line.stations.every((s) => s.places.every((p) => p.line === undefined && p.ports.every((r) => own.has(r.component))));
}
