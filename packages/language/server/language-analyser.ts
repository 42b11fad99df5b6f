/** The language service as the session wants it. An error inside is handed on to the log, never shown as a finding. */
import { analyseText } from '../service.ts';
import { occurrencesOf } from '../features/names.ts';
import type { Analyser, TextAnswer } from './analyser.ts';
import { checkCircuit, type Checked } from './engines.ts';

const NOTHING: Checked = { findings: [] };

export function languageAnalyser(): Analyser {
  return {
    analyse(uri, textOf): TextAnswer {
      const { circuit, findings, symbols, failed } = analyseText({ uri, text: textOf(uri) ?? '' });
      // A file without a `circuit` line is a shelf: nothing in it runs.
      const runs = circuit.name !== undefined && failed === undefined;
      const topology = runs ? checkCircuit({ circuit, text: (of) => textOf(of) ?? '' }) : NOTHING;
      const failures = [failed, topology.failed].filter((one) => one !== undefined);
      return {
        circuit,
        runs,
        language: findings,
        topology: topology.findings,
        occurrences: occurrencesOf(symbols, uri),
        uses: [],
        ...(failures.length > 0 ? { failed: failures.join('\n') } : {}),
      };
    },
  };
}
