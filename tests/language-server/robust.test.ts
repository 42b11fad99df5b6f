/** Every feature at every place of broken texts: an answer or none, never an exception, never a range outside the text. */
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Analysis } from '../../packages/language/features/analysis.ts';
import { codeActions } from '../../packages/language/features/code-actions.ts';
import { completionAt } from '../../packages/language/features/completion/index.ts';
import { toDiagnostic, type DiagnosticContext } from '../../packages/language/features/diagnostics.ts';
import { foldingRanges } from '../../packages/language/features/folding.ts';
import { hoverAt } from '../../packages/language/features/hover/index.ts';
import { inlayHints } from '../../packages/language/features/inlay-hints.ts';
import { definitionAt, highlightsAt, referencesAt } from '../../packages/language/features/navigation.ts';
import { outline, workspaceSymbols } from '../../packages/language/features/outline.ts';
import { renameAt, renameTarget } from '../../packages/language/features/rename.ts';
import { selectionAt } from '../../packages/language/features/selection.ts';
import { semanticTokens } from '../../packages/language/features/semantic-tokens.ts';
import { signatureAt } from '../../packages/language/features/signature.ts';
import { workJob } from '../../packages/language/server/study-job.ts';
import { analyseText, BENCH, URI } from './support/check.ts';

const samples = fileURLToPath(new URL('../../samples', import.meta.url));
const texts = [
  BENCH,
  ...readdirSync(samples)
    .filter((name) => name.endsWith('.oilway'))
    .map((name) => readFileSync(join(samples, name), 'utf8')),
];
/** A study of the whole text: the broken one is shown with it as an editor does, older. */
const bench = analyseText(BENCH);
const study = bench.circuit && {
  study: workJob({ circuit: bench.circuit, texts: { [URI]: BENCH } }).study,
  circuit: bench.circuit,
  older: true,
};

function inside(analysis: Analysis, start: number, end: number): void {
  expect(start).toBeGreaterThanOrEqual(0);
  expect(end).toBeLessThanOrEqual(analysis.text.length);
  expect(start).toBeLessThanOrEqual(end);
}

function everything(analysis: Analysis, offset: number): void {
  const context: DiagnosticContext = {
    range: (origin) => (origin.uri === URI ? analysis.lines.range(origin) : undefined),
    page: () => undefined,
  };
  for (const finding of analysis.findings) {
    inside(analysis, finding.origin.start, finding.origin.end);
    toDiagnostic(finding, context);
    for (const fix of finding.fixes) for (const change of fix.changes) inside(analysis, change.start, change.end);
  }
  const hover = hoverAt(analysis, offset);
  if (hover) {
    inside(analysis, hover.start, hover.end);
    expect(hover.markdown).not.toMatch(/NaN|undefined|\[object/);
  }
  for (const item of completionAt(analysis, offset, { snippets: true })) expect(item.label.length).toBeGreaterThan(0);
  for (const origin of [
    ...definitionAt(analysis, offset),
    ...referencesAt(analysis, offset, true),
    ...highlightsAt(analysis, offset).map((one) => one.origin),
  ])
    inside(analysis, origin.start, origin.end);
  const target = renameTarget(analysis, offset);
  if (target.ok) {
    inside(analysis, target.value.start, target.value.end);
    const answer = renameAt(analysis, offset, 'fresh_name');
    if (answer.ok) for (const change of answer.value) inside(analysis, change.start, change.end);
  }
  signatureAt(analysis, offset);
  selectionAt(analysis, offset);
  codeActions(analysis, { start: offset, end: offset, shown: [] }, context);
}

function whole(analysis: Analysis): void {
  outline(analysis);
  workspaceSymbols(analysis, 'a');
  for (const fold of foldingRanges(analysis)) expect(fold.startLine).toBeLessThan(fold.endLine);
  semanticTokens(analysis);
  inlayHints(analysis, { start: 0, end: analysis.text.length });
}

test('texts cut off anywhere', () => {
  fc.assert(
    fc.property(fc.constantFrom(...texts), fc.double({ min: 0, max: 1, noNaN: true }), (text, share) => {
      const cut = text.slice(0, Math.floor(share * text.length));
      const analysis = analyseText(cut, study);
      whole(analysis);
      for (const offset of [0, cut.length, Math.max(0, cut.length - 1), Math.floor(cut.length / 2), cut.lastIndexOf('\n') + 1])
        everything(analysis, offset);
    }),
    { numRuns: 60 },
  );
}, 120_000);

test('texts with pieces of others and signs strewn in', () => {
  const piece = fc.constantFrom(
    '(',
    ')',
    '{',
    '}',
    ',',
    ':',
    '.',
    '"',
    '//',
    '/*',
    'to',
    'pump',
    'step',
    'until',
    '5',
    'bar',
    '±',
    '?',
    '\n',
    '\r\n',
    '\u0000',
    '\uD800',
    'é',
    'require ',
    'C1.',
    'cylinder C9 (',
  );
  fc.assert(
    fc.property(
      fc.array(fc.record({ at: fc.nat(BENCH.length), gone: fc.nat(8), put: piece }), { minLength: 1, maxLength: 8 }),
      fc.nat(BENCH.length),
      (strewn, place) => {
        const text = strewn.reduce((now, { at, gone, put }) => now.slice(0, at) + put + now.slice(at + gone), BENCH);
        const analysis = analyseText(text, study);
        whole(analysis);
        for (const offset of [place, ...strewn.map((one) => one.at)]) everything(analysis, Math.min(offset, text.length));
      },
    ),
    { numRuns: 60 },
  );
}, 120_000);

test('every token of the samples', () => {
  for (const text of texts) {
    const analysis = analyseText(text, study);
    for (const token of analysis.tokens) everything(analysis, token.start);
  }
}, 120_000);
