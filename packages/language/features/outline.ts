/** Outline: the circuit's parts in groups a tradesman looks for, with what each is as detail; and the symbols of a workspace. */
import { SymbolKind, type DocumentSymbol, type SymbolInformation } from 'vscode-languageserver-types';
import { KINDS, type Circuit, type Component, type KindName, type Origin, type Requirement } from '@oilway/circuit';
import type { Analysis } from './analysis.ts';

const ICON: Partial<Record<KindName, SymbolKind>> = {
  cylinder: SymbolKind.Object,
  motor: SymbolKind.Object,
  rotary: SymbolKind.Object,
  pump: SymbolKind.Class,
  drive: SymbolKind.Class,
  directional: SymbolKind.Method,
  switch: SymbolKind.Boolean,
  sensor: SymbolKind.Boolean,
  fluid: SymbolKind.Constant,
};

function nounOf(component: Component): string {
  const noun = KINDS[component.kind].noun;
  const shape = component.shape ? `${component.shape.ports}/${component.shape.positions} ` : '';
  return component.title ? `${shape}${noun}, ${component.title}` : `${shape}${noun}`;
}

/** What a requirement asks, as written, in one line. */
export function requirementText(analysis: Analysis, requirement: Requirement): string {
  const text = analysis.textOf(requirement.origin.uri) ?? '';
  return text
    .slice(requirement.origin.start, requirement.origin.end)
    .replace(/\/\/[^\n]*|\/\*[\s\S]*?\*\//g, ' ')
    .replace(/\s+/g, ' ')
    .replace(/^require /, '')
    .trim();
}

class Builder {
  readonly #analysis: Analysis;
  constructor(analysis: Analysis) {
    this.#analysis = analysis;
  }

  symbol(
    name: string,
    detail: string,
    kind: SymbolKind,
    origin: Origin,
    nameOrigin: Origin,
    children: DocumentSymbol[] = [],
  ): DocumentSymbol[] {
    if (origin.uri !== this.#analysis.uri) return [];
    const { lines } = this.#analysis;
    // The name must lie inside the whole, or an editor refuses the list.
    const inside = nameOrigin.uri === origin.uri && nameOrigin.start >= origin.start && nameOrigin.end <= origin.end;
    return [
      {
        name: name || '(no name yet)',
        detail,
        kind,
        range: lines.range(origin),
        selectionRange: lines.range(inside ? nameOrigin : origin),
        ...(children.length > 0 ? { children } : {}),
      },
    ];
  }
}

export function outline(analysis: Analysis): DocumentSymbol[] {
  const { circuit } = analysis;
  const declared = analysis.occurrences.filter((one) => one.role === 'declaration' && one.origin.uri === analysis.uri);
  const build = new Builder(analysis);
  const all: DocumentSymbol[] = [];
  for (const one of declared) {
    if (one.kind === 'part') all.push(...build.symbol(one.id, 'part', SymbolKind.Struct, one.origin, one.origin));
    if (one.kind === 'assembly') all.push(...build.symbol(one.id, 'assembly', SymbolKind.Module, one.origin, one.origin));
  }
  if (circuit) all.push(...ofCircuit(circuit, analysis, build));
  return all.sort((p, q) => p.range.start.line - q.range.start.line || p.range.start.character - q.range.start.character);
}

function ofCircuit(circuit: Circuit, analysis: Analysis, build: Builder): DocumentSymbol[] {
  const all: DocumentSymbol[] = [];
  for (const constant of circuit.constants)
    all.push(...build.symbol(constant.name, 'constant', SymbolKind.Constant, constant.origin, constant.nameOrigin));
  for (const component of circuit.components) {
    const coils = circuit.coils
      .filter((coil) => coil.component === component.id)
      .flatMap((coil) => build.symbol(coil.id, coil.side ? `coil ${coil.side}` : 'coil', SymbolKind.Event, coil.origin, coil.origin));
    // Twins of one statement share its range: each is shown at its own name.
    const twins = circuit.components.some(
      (other) => other !== component && other.origin.start === component.origin.start && other.origin.uri === component.origin.uri,
    );
    all.push(
      ...build.symbol(
        component.id,
        nounOf(component),
        ICON[component.kind] ?? SymbolKind.Field,
        twins ? component.nameOrigin : component.origin,
        component.nameOrigin,
        twins ? [] : coils,
      ),
    );
  }
  for (const line of circuit.lines) {
    if (line.name) all.push(...build.symbol(line.name, `${line.function} line`, SymbolKind.Interface, line.origin, line.origin));
  }
  for (const cycle of circuit.cycles) {
    const steps = cycle.steps.flatMap((step) =>
      build.symbol(step.name, step.beside ? 'meanwhile' : 'step', SymbolKind.Function, step.origin, step.nameOrigin),
    );
    all.push(
      ...build.symbol(
        cycle.id,
        cycle.mode === 'manual' ? 'manual function' : 'cycle',
        SymbolKind.Namespace,
        cycle.origin,
        cycle.nameOrigin,
        steps,
      ),
    );
  }
  for (const requirement of circuit.requirements) {
    all.push(
      ...build.symbol(requirementText(analysis, requirement), 'requirement', SymbolKind.Property, requirement.origin, requirement.origin),
    );
  }
  return all;
}

/** Names of one document that contain the letters of the query in order, as a workspace search lists them. */
export function workspaceSymbols(analysis: Analysis, query: string): SymbolInformation[] {
  const found: SymbolInformation[] = [];
  const walk = (symbols: readonly DocumentSymbol[], container: string): void => {
    for (const symbol of symbols) {
      if (matches(symbol.name, query)) {
        found.push({
          name: symbol.name,
          kind: symbol.kind,
          location: { uri: analysis.uri, range: symbol.selectionRange },
          ...(container ? { containerName: container } : {}),
        });
      }
      walk(symbol.children ?? [], symbol.name);
    }
  };
  walk(outline(analysis), analysis.circuit?.name ?? '');
  return found;
}

function matches(name: string, query: string): boolean {
  const letters = query.toLowerCase();
  let index = 0;
  for (const letter of name.toLowerCase()) if (letter === letters[index]) index += 1;
  return index >= letters.length;
}
