/** The language service as the session wants it. An error inside is handed on to the log, never shown as a finding. */
import type { Finding } from '@oilway/rules';
import { analyseText } from '../service.ts';
import { occurrencesOf } from '../features/names.ts';
import type { Analyser, TextAnswer } from './analyser.ts';
import { engines } from './engines.ts';

const reason = (error: unknown): string => (error instanceof Error ? (error.stack ?? error.message) : String(error));

export function languageAnalyser(): Analyser {
  return {
    analyse(uri, textOf): TextAnswer {
      const { circuit, findings, symbols, failed } = analyseText({ uri, text: textOf(uri) ?? '' });
      const failures = failed === undefined ? [] : [failed];
      let topology: readonly Finding[] = [];
      // A file without a `circuit` line is a shelf: nothing in it runs.
      const runs = circuit.name !== undefined && failed === undefined;
      if (runs && engines.rules) {
        try {
          topology = engines.rules({ circuit, text: (of) => textOf(of) ?? '' });
        } catch (error) {
          failures.push(reason(error));
        }
      }
      return { circuit, runs, language: findings, topology, occurrences: occurrencesOf(symbols, uri), uses: [], ...(failures.length > 0 ? { failed: failures.join('\n') } : {}) };
    },
  };
}
