/** The circuits the extension itself writes: the new circuit and the snippets are right as they stand. */
import { readFileSync } from 'node:fs';
import { study } from '@oilway/circuit';
import { analyseText } from '@oilway/language';
import { runRules } from '@oilway/rules';
import { expect, it } from 'vitest';
import { NEW_CIRCUIT } from '../../packages/vscode/extension/new-circuit.ts';

interface Snippet {
  readonly prefix: string;
  readonly body: readonly string[];
}
const snippets: Record<string, Snippet> = JSON.parse(
  readFileSync(new URL('../../packages/vscode/snippets/oilway.json', import.meta.url), 'utf8'),
);

/** The snippet as it stands when nothing in it is changed. */
const plain = (snippet: Snippet): string =>
  snippet.body
    .join('\n')
    .replace(/\$\{\d+:([^}]*)\}/g, '$1')
    .replace(/\$\d+/g, '');

/** Errors and warnings of text and figures together, as the editor lists them. */
function problems(text: string) {
  const uri = 'file:///a.oilway';
  const { circuit, findings, failed } = analyseText({ uri, text });
  expect(failed).toBeUndefined();
  const figures = study(circuit);
  const all = [...findings, ...runRules({ circuit, text: () => text, study: figures }).findings];
  return { findings: all.filter((one) => one.severity !== 'information').map((one) => `${one.code}: ${one.what}`), study: figures };
}

it('a new circuit has no finding, meets its requirements and ends its cycle', () => {
  const { findings, study: figures } = problems(NEW_CIRCUIT);
  expect(findings).toEqual([]);
  expect(figures.requirements.map((requirement) => requirement.verdict)).toEqual(['met', 'met']);
  expect(figures.cycles[0]?.completed).toBe(true);
});

it('the snippet of a whole circuit has none either', () => {
  const { findings } = problems(plain(snippets.Circuit!));
  expect(findings).toEqual([]);
});

it('the snippet of a cycle fits into that circuit', () => {
  const circuit = plain(snippets.Circuit!).replace(/^cycle[\s\S]*?^\}$/m, plain(snippets.Cycle!));
  expect(circuit).toContain('cycle Work');
  const { findings } = problems(circuit);
  expect(findings).toEqual([]);
});
