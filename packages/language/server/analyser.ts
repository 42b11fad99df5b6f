/** What the server asks of the language: one text with those it uses, to a circuit, findings and names. Never throws, never waits. */
import type { Circuit } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import type { Occurrence } from '../features/analysis.ts';

export interface TextAnswer {
  readonly circuit: Circuit;
  /** False for a shelf: nothing in it runs, there is no study. */
  readonly runs: boolean;
  /** Of the language itself: letters, words, names, units. */
  readonly language: readonly Finding[];
  /** Of the rules that need no figures. */
  readonly topology: readonly Finding[];
  readonly occurrences: readonly Occurrence[];
  /** Addresses of the files it uses, those they use, and so on; missing ones too. */
  readonly uses: readonly string[];
  /** An error of the tool itself, for the log. */
  readonly failed?: string;
}

export interface Analyser {
  analyse(uri: string, textOf: (uri: string) => string | undefined): TextAnswer;
}
