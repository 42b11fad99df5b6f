/** Completion: what may stand at the cursor, from the statement before it and what the circuit holds. */
import { CompletionItemKind, type CompletionItem } from 'vscode-languageserver-types';
import { type Circuit, emptyCircuit, KIND_NAMES, KINDS } from '@oilway/circuit';
import type { Analysis } from '../analysis.ts';
import { LINE_FUNCTIONS } from '../../parse/words.ts';
import { bracketEntry, cursorAt, type Cursor } from './context.ts';
import { controlDimensions, emergency, interlock, requirement, step, whileLine } from './control.ts';
import { toItem, word, type Proposal } from './item.ts';
import { coils, components, constants, cycles, members, places, STATES, steps } from './names.ts';
import { dimensionsOf, isKind, propertyNames, propertyTable, propertyValues, units } from './properties.ts';
import { cycleSnippets, sheetSnippets } from './snippets.ts';
import { HEAD_ABOUT } from './heads.ts';

export interface CompletionOptions {
  /** The client can fill in snippets. */
  readonly snippets: boolean;
  /** Command that opens the list again; absent where the client has none. */
  readonly suggestCommand?: string;
  /** Codes that `allow` may name, with their titles. */
  readonly rules?: readonly { readonly code: string; readonly title: string }[];
}

const EMPTY = emptyCircuit('');

export function completionAt(analysis: Analysis, offset: number, options: CompletionOptions): CompletionItem[] {
  const cursor = cursorAt(analysis, offset);
  if (cursor.quiet) return [];
  const seen = new Set<string>();
  return proposals(analysis, cursor, options)
    .filter((one) => !seen.has(one.label) && seen.add(one.label))
    .map((one, order) => toItem(one, order, analysis, cursor, options))
    .filter((one): one is CompletionItem => one !== undefined);
}

function heads(cursor: Cursor, circuit: Circuit, file: boolean): Proposal[] {
  const head = (name: string, rank: number): Proposal => ({
    label: name,
    kind: CompletionItemKind.Keyword,
    detail: HEAD_ABOUT[name] ?? '',
    insert: `${name} `,
    rank,
  });
  if (cursor.block === 'cycle') return [head('step', 1), head('meanwhile', 2), head('while', 3), ...cycleSnippets()];
  const kinds: Proposal[] = KIND_NAMES.map((name) => ({
    label: name,
    kind: CompletionItemKind.Class,
    detail: KINDS[name].about || KINDS[name].noun,
    insert: `${name} `,
    rank: 2,
  }));
  const lines = LINE_FUNCTIONS.map((name) => head(name, 3));
  const shared = ['unit', 'plug', 'load', 'interlock', 'while'].map((name) => head(name, 4));
  if (cursor.block === 'assembly') return [...kinds, ...lines, ...shared, ...sheetSnippets()];
  const rest = ['use', 'let', 'part', 'assembly', 'cycle', 'manual', 'require', 'limits', 'controls', 'allow', 'emergency', 'display'].map(
    (name) => head(name, 4),
  );
  return [...(circuit.name === undefined && file ? [head('circuit', 0)] : []), ...kinds, ...lines, ...shared, ...rest, ...sheetSnippets()];
}

function proposals(analysis: Analysis, cursor: Cursor, options: CompletionOptions): Proposal[] {
  const circuit = analysis.circuit ?? EMPTY;
  const statement = cursor.before;
  if (cursor.owner !== undefined) return members(circuit, cursor.owner);
  if (statement.length === 0) return heads(cursor, circuit, true);
  const head = statement[0]?.text ?? '';
  const last = statement.at(-1)?.text ?? '';

  const inside = bracketEntry(cursor);
  if (inside) {
    const table = propertyTable(statement);
    if (table) {
      const name = inside.entry[0]?.text;
      if (name === undefined)
        return [
          ...propertyNames(table, inside.written),
          ...(inside.outside[0]?.text === 'directional' && inside.written.length === 0 ? shapes() : []),
        ];
      const spec = table.find((one) => one.name === name);
      if (!spec) return [];
      return cursor.afterNumber ? units(circuit, dimensionsOf(spec, inside.entry)) : propertyValues(circuit, spec, inside);
    }
    if (head === 'controls')
      return inside.entry.length === 0 ? [...coils(circuit), ...components(circuit, ['switch', 'sensor'], 2), ...steps(circuit, 3)] : [];
    if (head === 'unit')
      return parameters(
        analysis,
        inside.outside.map((token) => token.text),
        inside.written,
        inside.entry.length,
      );
    if (cursor.afterNumber) return units(circuit, controlDimensions(circuit, statement));
  }
  if (cursor.afterNumber && head !== 'let')
    return ['step', 'meanwhile', 'while', 'require', 'interlock'].includes(head)
      ? units(circuit, controlDimensions(circuit, statement))
      : [];

  if ((LINE_FUNCTIONS as readonly string[]).includes(head)) return chain(circuit, last, statement.length);
  switch (head) {
    case 'step':
    case 'meanwhile':
      return step(circuit, statement);
    case 'while':
      return whileLine(circuit, statement);
    case 'interlock':
      return interlock(circuit, statement);
    case 'emergency':
      return emergency(circuit, statement);
    case 'require':
      return requirement(circuit, statement);
    case 'plug':
      return statement.length === 1 || last === ',' ? places(circuit) : [];
    case 'load':
      return statement.length === 1 || last === 'with'
        ? components(circuit, ['cylinder', 'motor', 'rotary'], 1)
        : [word('with', 'moves as one body with')];
    case 'display':
      return last === 'as' ? [word('written')] : statement.length === 1 ? [word('metric'), word('us'), word('as written')] : [];
    case 'cycle':
      return statement.length === 2
        ? [word('repeat')]
        : last === 'repeat'
          ? []
          : statement.at(-1)?.type === 'number'
            ? [word('times')]
            : [];
    case 'let':
      return cursor.afterNumber
        ? units(circuit, ['pressure', 'length', 'flow', 'force', 'time', 'velocity', 'power', 'volume'])
        : last === '='
          ? constants(circuit)
          : [];
    case 'allow':
      if (statement.length === 1)
        return (options.rules ?? []).map((rule) => ({ label: rule.code, kind: CompletionItemKind.Value, detail: rule.title, rank: 1 }));
      return last === 'on'
        ? [...components(circuit, undefined, 1), ...places(circuit)]
        : last === 'in'
          ? [...STATES, ...steps(circuit), ...cycles(circuit)]
          : statement.length === 2
            ? [word('on'), word('in')]
            : [word('in')];
    case 'part':
      return statement.length === 1
        ? KIND_NAMES.map((name) => ({ label: name, kind: CompletionItemKind.Class, detail: KINDS[name].noun, rank: 1 }))
        : [];
    default:
      if (last === 'as' && (isKind(head) || head === 'unit')) return declared(analysis, head === 'unit' ? 'assembly' : 'part');
      return isKind(head) && statement.length > 1 && !statement.some((token) => token.text === '(') && last !== ','
        ? [word('as', 'properties of a part')]
        : [];
  }
}

function chain(circuit: Circuit, last: string, length: number): Proposal[] {
  if (length === 1 || last === 'to' || last === ',' || last === ':') return places(circuit);
  return [
    { ...word('to', 'goes on to'), insert: 'to ' },
    { ...word(',', 'joined on the same side'), insert: ', ' },
    { ...word('(', 'properties of the line'), insert: '(' },
  ];
}

const shapes = (): Proposal[] =>
  ['4/3', '4/2', '3/2', '2/2', '3/3'].map((shape) => ({
    label: shape,
    kind: CompletionItemKind.Value,
    detail: `${shape[0]} ports, ${shape[2]} positions`,
    rank: 0,
  }));

/** Names declared as parts or assemblies, here or in files used. */
function declared(analysis: Analysis, kind: 'part' | 'assembly'): Proposal[] {
  return analysis.occurrences
    .filter((one) => one.kind === kind && one.role === 'declaration')
    .map((one) => ({ label: one.id, kind: CompletionItemKind.Struct, detail: kind, rank: 1 }));
}

function parameters(analysis: Analysis, outside: readonly string[], written: readonly string[], entered: number): Proposal[] {
  if (entered > 0) return [];
  const assembly = outside[outside.indexOf('as') + 1] ?? '';
  return analysis.occurrences
    .filter(
      (one) =>
        one.kind === 'parameter' &&
        one.role === 'declaration' &&
        one.id.startsWith(`${assembly}.`) &&
        !written.includes(one.id.slice(assembly.length + 1)),
    )
    .map((one) => ({
      label: one.id.slice(assembly.length + 1),
      kind: CompletionItemKind.Property,
      detail: `parameter of ${assembly}`,
      rank: 1,
    }));
}
