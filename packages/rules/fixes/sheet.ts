/** The text as something to mend: where to insert, in whose style, under which free name. */
import type { Circuit, Component, LineStatement, Origin, Property, TextChange } from '@oilway/circuit';
import type { RuleContext } from '../rule.ts';

/** True where the component is written in this circuit's own text (not inside a unit, whose text stands for several). */
export function writable(context: RuleContext, component: Component): boolean {
  return component.origin.uri === context.circuit.uri && !component.id.includes('.');
}

function lineStart(text: string, offset: number): number {
  return text.lastIndexOf('\n', offset - 1) + 1;
}

/** Offset of the line break that ends the line (or the end of the text). */
function lineEnd(text: string, offset: number): number {
  const found = text.indexOf('\n', offset);
  if (found < 0) return text.length;
  return text[found - 1] === '\r' ? found - 1 : found;
}

function newline(text: string): string {
  return text.includes('\r\n') ? '\r\n' : '\n';
}

/** Inserts statements on lines of their own below the statement at `origin`, indented like it. */
export function below(context: RuleContext, origin: Origin, statements: readonly string[]): TextChange {
  const text = context.text(origin.uri);
  let last = Math.max(origin.start, origin.end - 1);
  while (last > origin.start && /\s/.test(text[last] ?? '')) last--;
  const end = lineEnd(text, last);
  const from = lineStart(text, origin.start);
  const indent = /^[ \t]*/.exec(text.slice(from, origin.start))?.[0] ?? '';
  const eol = newline(text);
  return { uri: origin.uri, start: end, end, text: statements.map((s) => eol + indent + s).join('') };
}

/** Width of a statement's head with the blanks behind it: how the text aligns its columns. */
function headWidth(context: RuleContext, origin: Origin): number {
  const head = /^(\S+[ \t]+)/.exec(context.text(origin.uri).slice(origin.start, origin.end));
  return head?.[1]?.length ?? 0;
}

/** `relief    RV2 (...)`: head padded like the statement at `like`. */
export function statement(context: RuleContext, like: Origin, head: string, rest: string): string {
  return `${head.padEnd(headWidth(context, like) - 1)} ${rest}`;
}

export function lastLine(circuit: Circuit): LineStatement | undefined {
  const own = circuit.lines.filter((l) => l.origin.uri === circuit.uri);
  return own.reduce<LineStatement | undefined>((last, l) => (last === undefined || l.origin.end > last.origin.end ? l : last), undefined);
}

/** First free name: `RV1`, `RV2` ... that no component, coil, line, constant, cycle or step bears. */
export function freeName(circuit: Circuit, prefix: string, taken: readonly string[] = []): string {
  const names = new Set([
    ...taken,
    ...circuit.components.map((c) => c.id),
    ...circuit.coils.map((c) => c.id),
    ...circuit.lines.flatMap((l) => (l.name === undefined ? [] : [l.name])),
    ...circuit.constants.map((c) => c.name),
    ...circuit.cycles.flatMap((c) => [c.id, ...c.steps.map((s) => s.name)]),
  ]);
  for (let n = 1; ; n++) if (!names.has(`${prefix}${n}`)) return `${prefix}${n}`;
}

/** The reservoir a mend leads to: the pump's own, else the first. */
export function reservoirFor(circuit: Circuit, near?: string): string | undefined {
  const all = circuit.components.filter((c) => c.kind === 'reservoir' && !c.id.includes('.'));
  const suction = circuit.nets.find((n) => n.reservoir !== undefined && n.ports.some((p) => p.component === near));
  return all.find((r) => r.id === suction?.reservoir)?.id ?? all[0]?.id;
}

/** The characters of a property's value: everything behind its name. */
export function valueOrigin(context: RuleContext, property: Property): Origin {
  const { uri, end } = property.origin;
  const text = context.text(uri);
  let start = property.nameOrigin.end;
  while (start < end && /\s/.test(text[start] ?? '')) start++;
  return { uri, start, end };
}
