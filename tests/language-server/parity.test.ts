/** Editor and command say the same of the same text: the very findings, in words, place, state and fixes. And what the editor mends is gone. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { describe, expect, test } from 'vitest';
import type { Finding } from '@oilway/rules';
import { open } from '../../packages/cli/service.ts';
import type { DiagnosticContext } from '../../packages/language/features/diagnostics.ts';
import { codeActions } from '../../packages/language/features/code-actions.ts';
import type { Analysis } from '../../packages/language/features/analysis.ts';
import { languageAnalyser } from '../../packages/language/server/language-analyser.ts';
import { Session } from '../../packages/language/server/session.ts';
import { workJob } from '../../packages/language/server/study-job.ts';
import { InlineRunner } from '../../packages/language/server/study-runner.ts';

const samples = fileURLToPath(new URL('../../samples', import.meta.url));
const files = [samples, join(samples, 'faulty')].flatMap((folder) =>
  readdirSync(folder)
    .filter((name) => name.endsWith('.oilway'))
    .map((name) => join(folder, name)),
);

/** The document as the editor has it when the figures are there. */
async function inEditor(uri: string, text: string): Promise<Analysis> {
  const logged: string[] = [];
  let ended: () => void = () => undefined;
  const end = new Promise<void>((resolve) => {
    ended = resolve;
  });
  const session = new Session({
    analyser: languageAnalyser(),
    runner: new InlineRunner(workJob, 0),
    readFile: () => Promise.resolve(undefined),
    publish: () => undefined,
    studied: () => ended(),
    log: (message) => {
      logged.push(message);
      ended();
    },
  });
  session.update(uri, 1, text);
  const first = session.analysis(uri);
  if (first?.circuit?.name !== undefined) await end;
  const analysis = session.analysis(uri);
  session.dispose();
  expect(logged).toEqual([]);
  if (!analysis) throw new Error('not known');
  return analysis;
}

const sorted = (findings: readonly Finding[]): readonly Finding[] =>
  [...findings].sort((a, b) => a.origin.start - b.origin.start || (a.code < b.code ? -1 : a.code > b.code ? 1 : a.what < b.what ? -1 : 1));

describe.each(files.map((file) => ({ file, name: file.slice(samples.length + 1) })))('$name', ({ file }) => {
  const uri = pathToFileURL(file).href;
  const text = readFileSync(file, 'utf8');

  test('the same findings in the editor and from the command', async () => {
    const editor = await inEditor(uri, text);
    const command = open([{ path: file, uri, text }]);
    expect(command.failures).toEqual([]);
    expect(sorted(editor.findings)).toEqual(sorted(command.opened[0]?.findings ?? []));
  });
});

test('the first quick fix mends what it says', async () => {
  let mendings = 0;
  for (const file of files) {
    const uri = pathToFileURL(file).href;
    const text = readFileSync(file, 'utf8');
    const analysis = await inEditor(uri, text);
    const context: DiagnosticContext = {
      range: (origin) => (origin.uri === uri ? analysis.lines.range(origin) : undefined),
      page: () => undefined,
    };
    for (const finding of analysis.findings.filter((one) => one.fixes.length > 0)) {
      const action = codeActions(analysis, { start: finding.origin.start, end: finding.origin.end, shown: [] }, context).find(
        (one) => one.title === finding.fixes[0]?.title,
      );
      const edits = [...(action?.edit?.changes?.[uri] ?? [])].sort(
        (a, b) => analysis.lines.offset(b.range.start) - analysis.lines.offset(a.range.start),
      );
      expect(edits.length).toBeGreaterThan(0);
      const mended = edits.reduce(
        (now, one) => now.slice(0, analysis.lines.offset(one.range.start)) + one.newText + now.slice(analysis.lines.offset(one.range.end)),
        text,
      );
      mendings += 1;
      const after = await inEditor(uri, mended);
      expect(
        after.findings.some((one) => one.code === finding.code && one.place === finding.place && one.state === finding.state),
        `${finding.code} in ${file}: ${action?.title}`,
      ).toBe(false);
    }
  }
  expect(mendings).toBeGreaterThan(10);
}, 240_000);
