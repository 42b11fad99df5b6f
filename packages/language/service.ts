/**
 * The whole service on one page, without any connection: documents in, circuits, findings and studies out.
 * Editor, command and workers use the same functions. What fails inside comes back as `failed`, never as a finding.
 */
import { type Circuit, emptyCircuit, type Study } from '@oilway/circuit';
import type { Finding, RuleContext } from '@oilway/rules';
import { type Parsed, parseText } from './parse/parse.ts';
import { resolve } from './resolve/resolve.ts';
import type { SymbolIndex } from './resolve/symbols.ts';

export interface SourceDocument {
  readonly uri: string;
  readonly text: string;
}

/** What is known from the text alone: a few milliseconds. */
export interface TextAnalysis {
  readonly uri: string;
  readonly text: string;
  readonly parsed: Parsed;
  readonly circuit: Circuit;
  readonly symbols: SymbolIndex;
  /** Syntax and resolution, in text order. */
  readonly findings: readonly Finding[];
  /** An error of the tool itself; what it cost is missing from the rest. */
  readonly failed?: string;
}

export interface Engines {
  /** All rules on one circuit; computed rules speak only where a study is given. */
  readonly rules?: (context: RuleContext) => readonly Finding[];
  readonly study?: (circuit: Circuit) => Study;
}

export interface AnalyseOptions extends Engines {
  /** False: text and topology only, no figures. */
  readonly compute?: boolean;
}

export interface Analysed {
  readonly uri: string;
  readonly circuit: Circuit;
  readonly findings: readonly Finding[];
  readonly study?: Study;
  readonly failed?: string;
}

const reasonOf = (error: unknown): string => (error instanceof Error ? (error.stack ?? error.message) : String(error));

/** Syntax and resolution of one document. Never throws. */
export function analyseText(document: SourceDocument): TextAnalysis {
  const parsed = parseText(document.uri, document.text);
  try {
    const { circuit, findings, symbols } = resolve(parsed);
    const all = [...parsed.findings, ...findings].sort((a, b) => a.origin.start - b.origin.start);
    const failed = parsed.failed === undefined ? {} : { failed: parsed.failed };
    return { uri: document.uri, text: document.text, parsed, circuit, symbols, findings: all, ...failed };
  } catch (error) {
    return {
      uri: document.uri,
      text: document.text,
      parsed,
      circuit: emptyCircuit(document.uri),
      symbols: { declarations: [], references: [], ports: [] },
      findings: parsed.findings,
      failed: reasonOf(error),
    };
  }
}

/** Everything that can be said of the documents. Never throws. */
export function analyse(documents: readonly SourceDocument[], options: AnalyseOptions = {}): { readonly documents: readonly Analysed[] } {
  const texts = new Map(documents.map((document) => [document.uri, document.text]));
  return { documents: documents.map((document) => analyseOne(document, texts, options)) };
}

function analyseOne(document: SourceDocument, texts: ReadonlyMap<string, string>, options: AnalyseOptions): Analysed {
  const { uri, circuit, findings, failed } = analyseText(document);
  if (failed !== undefined) return { uri, circuit, findings, failed };
  let study: Study | undefined;
  const failures: string[] = [];
  // A file without a `circuit` line is a shelf: nothing in it runs.
  if (options.compute !== false && options.study !== undefined && circuit.name !== undefined) {
    try {
      study = options.study(circuit);
    } catch (error) {
      failures.push(reasonOf(error));
    }
  }
  let ruled: readonly Finding[] = [];
  if (options.rules !== undefined && circuit.name !== undefined) {
    try {
      ruled = options.rules({ circuit, ...(study === undefined ? {} : { study }), text: (of) => texts.get(of) ?? '' });
    } catch (error) {
      failures.push(reasonOf(error));
    }
  }
  const all = [...findings, ...ruled].sort((a, b) => a.origin.start - b.origin.start);
  return {
    uri,
    circuit,
    findings: all,
    ...(study === undefined ? {} : { study }),
    ...(failures.length === 0 ? {} : { failed: failures.join('\n') }),
  };
}
