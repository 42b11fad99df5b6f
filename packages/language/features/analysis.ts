/** What an editor feature may look at: one document as it stands, what it resolved to, what was found, and the latest finished study. */
import type { Circuit, Origin, Study } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import { Lines } from './text/lines.ts';
import { scan, type Token } from './text/scan.ts';

export type SymbolKind =
  | 'circuit'
  | 'component'
  | 'coil'
  | 'line'
  | 'constant'
  | 'cycle'
  | 'step'
  | 'part'
  | 'assembly'
  | 'parameter'
  | 'port'
  | 'property';

/** One place where a name stands. */
export interface Occurrence {
  /** The same for the declaration and every use; unique among all documents read. */
  readonly symbol: string;
  readonly kind: SymbolKind;
  /** The name as the circuit knows it: `C1`, `U1.SOL0`, `Drill.Clamp`. */
  readonly id: string;
  readonly origin: Origin;
  readonly role: 'declaration' | 'use';
}

/** The latest finished study, perhaps of an older text. */
export interface Studied {
  readonly study: Study;
  /** The circuit it was computed from. */
  readonly circuit: Circuit;
  /** True where the text has changed since. */
  readonly older: boolean;
}

export type FiguresState = 'coming' | 'off' | 'broken' | 'shelf';

export interface AnalysisInput {
  readonly uri: string;
  readonly version: number;
  readonly text: string;
  /** Absent for a shelf (a file without a circuit). */
  readonly circuit?: Circuit;
  readonly findings: readonly Finding[];
  /** Occurrences in this document and in those it uses. */
  readonly occurrences: readonly Occurrence[];
  readonly studied?: Studied;
  /** Why there is no study of this very text: it runs (said if absent), is switched off, broke down, or the file is a shelf. */
  readonly figures?: FiguresState;
  /** Text of another document of the same circuit. */
  readonly textOf?: (uri: string) => string | undefined;
}

/** The input with the derived views that several features need, each made once. */
export class Analysis {
  readonly uri: string;
  readonly version: number;
  readonly text: string;
  readonly circuit: Circuit | undefined;
  readonly findings: readonly Finding[];
  readonly occurrences: readonly Occurrence[];
  readonly studied: Studied | undefined;
  readonly figures: FiguresState;
  readonly textOf: (uri: string) => string | undefined;
  #tokens: readonly Token[] | undefined;
  #lines: Lines | undefined;

  constructor(input: AnalysisInput) {
    this.uri = input.uri;
    this.version = input.version;
    this.text = input.text;
    this.circuit = input.circuit;
    this.findings = input.findings;
    this.occurrences = input.occurrences;
    this.studied = input.studied;
    this.figures = input.figures ?? 'coming';
    this.textOf = input.textOf ?? ((uri) => (uri === input.uri ? input.text : undefined));
  }

  get tokens(): readonly Token[] {
    this.#tokens ??= scan(this.text);
    return this.#tokens;
  }

  get lines(): Lines {
    this.#lines ??= new Lines(this.text);
    return this.#lines;
  }

  /** Occurrence in this document that holds the offset (a border counts). */
  occurrenceAt(offset: number): Occurrence | undefined {
    let best: Occurrence | undefined;
    for (const one of this.occurrences) {
      if (one.origin.uri !== this.uri || offset < one.origin.start || offset > one.origin.end) continue;
      const size = one.origin.end - one.origin.start;
      if (!best || size < best.origin.end - best.origin.start) best = one;
    }
    return best;
  }
}
