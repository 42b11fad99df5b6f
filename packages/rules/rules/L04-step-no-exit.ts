/** L04: a step that ends at once, or that may wait for ever. */
import type { Circuit, Coil, Component, Condition, Step } from '@oilway/circuit';
import { read } from '@oilway/circuit';
import { graphOf, type Graph } from '../graph/graph.ts';
import { pathsIn, positionOfCoil } from '../graph/paths.ts';
import { spreadable, waysFrom } from '../graph/reach.ts';
import { tell } from '../finding.ts';
import type { Fix, Rule, RuleContext } from '../rule.ts';
import { list } from '../words.ts';

function liveCoils(step: Step): readonly { readonly coil: string; readonly ramp: boolean }[] {
  return step.actions.flatMap((a) => (a.does === 'energise' ? a.commands.map((c) => ({ coil: c.coil, ramp: c.over !== undefined })) : []));
}

/** A condition that only a person or something outside fulfils may take as long as it likes. */
function outsideOnly(circuit: Circuit, condition: Condition): boolean {
  if (condition.op === 'and' || condition.op === 'or') return condition.items.every((c) => outsideOnly(circuit, c));
  if (condition.op !== 'state') return false;
  const of = circuit.components.find((c) => c.id === condition.of);
  return of !== undefined && read.has(of, 'outside');
}

/** "C1 extended": what the step's one moving cylinder reaches; undefined where that is not plain. */
function reached(graph: Graph, step: Step): string | undefined {
  for (const { coil: id } of liveCoils(step)) {
    const coil = graph.circuit.coils.find((c) => c.id === id);
    const valve = coil === undefined ? undefined : graph.component(coil.component);
    if (coil === undefined || valve?.kind !== 'directional') continue;
    const end = fed(graph, coil, valve);
    if (end !== undefined) return end;
  }
  return undefined;
}

function fed(graph: Graph, coil: Coil, valve: Component): string | undefined {
  const outlets = pathsIn(valve, positionOfCoil(valve, coil.side)).flatMap((p) => (p.from === 'P' ? [p.to] : p.to === 'P' ? [p.from] : []));
  const ends = new Set<string>();
  for (const port of outlets) {
    const net = port === 'T' ? undefined : graph.netAt(valve.id, port)?.id;
    if (net === undefined) continue;
    for (const id of waysFrom(graph, net, (e) => (e.component === valve.id ? undefined : spreadable(e))).keys()) {
      for (const ref of graph.net(id)?.ports ?? []) {
        if (ref.port === 'cap') ends.add(`${ref.component} extended`);
        if (ref.port === 'rod') ends.add(`${ref.component} retracted`);
      }
    }
  }
  return ends.size === 1 ? [...ends][0] : undefined;
}

/** Where `, at most ..` goes: behind the until condition, before a title. */
function append(context: RuleContext, step: Step, words: string, title: string): Fix | undefined {
  if (step.origin.uri !== context.circuit.uri) return undefined;
  const text = context.text(step.origin.uri).slice(step.origin.start, step.origin.end);
  const body = text
    .replace(/\s+$/, '')
    .replace(/\s*"[^"\n]*"$/, '')
    .replace(/\s+$/, '');
  const at = step.origin.start + body.length;
  return { title, safe: false, changes: [{ uri: step.origin.uri, start: at, end: at, text: words }] };
}

/** Twice what the run takes, where that is known; else 10 s. */
function limitFor(context: RuleContext, step: Step): string {
  const time = context.study?.steps.find((s) => s.id === step.id)?.time;
  return time === undefined || time <= 0 ? '10 s' : `${Math.max(1, Math.ceil(time * 2))} s`;
}

export const L04: Rule = {
  code: 'L04',
  name: 'step-no-exit',
  title: 'Step without an end or without a time limit',
  severity: 'warning',
  why: 'A step without an end lasts no time; one that waits without a limit hangs, with its coils live, when the switch never comes.',
  ground: 'IEC 60848, transitions between steps; step-table practice',
  mend: 'Give the step `until` or `for`, and `at most` where it waits for the machine.',
  needs: 'topology',
  page: `
A step of a cycle with a live coil and neither \`until\` nor \`for\`, whose commands have no ramp, ends at once: its coils are live for no time. A step of a cycle
that waits (\`until\`) for something the machine must reach, with a coil live and without \`at most\`, may hang.

Stays clean: \`for 10 s\`; waiting for a switch \`(outside)\`; a step that runs another cycle; a ramp; \`manual\` functions, which end when the
button is released.`,
  detect(context) {
    const graph = graphOf(context.circuit);
    const found = [];
    for (const cycle of context.circuit.cycles) {
      if (cycle.mode === 'manual') continue;
      for (const step of cycle.steps) {
        const live = liveCoils(step);
        if (live.length === 0) continue;
        const coils = list([...new Set(live.map((l) => l.coil))]);
        if (step.until === undefined && step.lasts === undefined) {
          if (live.some((l) => l.ramp) || step.actions.some((a) => a.does === 'run' || a.does === 'shift')) continue;
          const end = reached(graph, step);
          const words = end === undefined ? ' for 1 s' : ` until ${end}, at most ${limitFor(context, step)}`;
          found.push(
            tell(L04, {
              what: `Step ${step.id} ends at once: it has neither \`until\` nor \`for\`, so ${coils} ${live.length === 1 ? 'is' : 'are'} live for no time.`,
              origin: step.nameOrigin,
              place: step.id,
              fixes: [append(context, step, words, `End it${words}`)],
            }),
          );
        } else if (step.until !== undefined && step.atMost === undefined && !outsideOnly(context.circuit, step.until)) {
          const limit = limitFor(context, step);
          found.push(
            tell(L04, {
              what: `Step ${step.id} waits without a time limit, with ${coils} live: if what it waits for never comes, it hangs.`,
              origin: step.nameOrigin,
              place: step.id,
              related: [{ message: 'it waits for this', origin: step.until.origin }],
              fixes: [append(context, step, `, at most ${limit}`, `Add: at most ${limit}`)],
            }),
          );
        }
      }
    }
    return found;
  },
};
