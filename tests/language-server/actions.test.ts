/** Findings to diagnostics and quick fixes: nothing of a finding is lost, nothing is decided anew. */
import { describe, expect, test } from 'vitest';
import { DiagnosticSeverity } from 'vscode-languageserver-types';
import type { Finding } from '@oilway/rules';
import { Analysis } from '../../packages/language/features/analysis.ts';
import { codeActions, FIX_ALL, safeFixes } from '../../packages/language/features/code-actions.ts';
import { toDiagnostic, type DiagnosticContext } from '../../packages/language/features/diagnostics.ts';
import { URI } from './support/check.ts';

const TEXT = 'pump P1 ()\nrelief RV1 ()\n';
const finding = (more: Partial<Finding> = {}): Finding => ({
  code: 'A01',
  severity: 'error',
  what: 'P1 has no relief',
  why: 'Nothing limits its pressure (ISO 4413).',
  mend: 'Put a relief at P1.P.',
  origin: { uri: URI, start: 5, end: 7 },
  related: [{ message: 'the nearest relief', origin: { uri: URI, start: 18, end: 21 } }],
  place: 'P1.P',
  state: 'REST',
  fixes: [{ title: 'Insert a relief', safe: true, changes: [{ uri: URI, start: 10, end: 10, text: '\nrelief RV2 ()' }] }],
  computed: false,
  ...more,
});
const analysis = (findings: readonly Finding[]): Analysis => new Analysis({ uri: URI, version: 1, text: TEXT, findings, occurrences: [] });
const context: DiagnosticContext = {
  range: (origin) => (origin.uri === URI ? analysis([]).lines.range(origin) : undefined),
  page: (code) => `oilway-rule:/${code}.md`,
};

describe('diagnostics', () => {
  test('all of a finding is told', () => {
    expect(toDiagnostic(finding(), context)).toEqual({
      range: { start: { line: 0, character: 5 }, end: { line: 0, character: 7 } },
      severity: DiagnosticSeverity.Error,
      code: 'A01',
      codeDescription: { href: 'oilway-rule:/A01.md' },
      source: 'oilway',
      message: 'P1 has no relief\nNothing limits its pressure (ISO 4413).\nMend: Put a relief at P1.P.',
      relatedInformation: [
        {
          message: 'the nearest relief',
          location: { uri: URI, range: { start: { line: 1, character: 7 }, end: { line: 1, character: 10 } } },
        },
      ],
      data: { code: 'A01', place: 'P1.P', state: 'REST', fixes: ['Insert a relief'] },
    });
  });
  test('accepted findings and findings of files not at hand are not shown', () => {
    expect(toDiagnostic(finding({ accepted: 'bolted' }), context)).toBeUndefined();
    expect(toDiagnostic(finding({ origin: { uri: 'file:///gone', start: 0, end: 1 } }), context)).toBeUndefined();
  });
});

describe('quick fixes', () => {
  const ask = (findings: readonly Finding[], only?: readonly string[]) =>
    codeActions(analysis(findings), { start: 6, end: 6, shown: [], ...(only ? { only } : {}) }, context);
  test('at the finding; preferred where it is safe or the only one', () => {
    expect(ask([finding()]).slice(0, 1)).toMatchObject([
      { title: 'Insert a relief', kind: 'quickfix', isPreferred: true, edit: { changes: { [URI]: [{ newText: '\nrelief RV2 ()' }] } } },
    ]);
    const [one, other] = ['One', 'Other'].map((title) => ({ title, safe: false, changes: [] }));
    if (!one || !other) throw new Error('no fixes');
    expect(ask([finding({ fixes: [one] })])[0]?.isPreferred).toBe(true);
    expect(ask([finding({ fixes: [one, other] })]).some((action) => action.isPreferred)).toBe(false);
  });
  test('none elsewhere, none of accepted findings', () => {
    expect(ask([finding({ origin: { uri: URI, start: 18, end: 21 } })])).toEqual([]);
    expect(ask([finding({ accepted: 'yes' })])).toEqual([]);
  });
  test('a finding of a rule can be accepted; the reason stays open', () => {
    const accept = ask([finding({ fixes: [] })])[0];
    expect(accept?.title).toBe('Accept A01 here: adds an `allow` statement, the reason is yours to write');
    expect(accept?.edit?.changes?.[URI]?.[0]?.newText).toBe('allow A01 in REST ""\n');
    expect(ask([finding({ code: 'NAME', fixes: [] })])).toEqual([]);
  });
  test('fix all: only where asked for, only safe ones, no two at the same characters', () => {
    const other = finding({
      place: 'P2',
      origin: { uri: URI, start: 1, end: 2 },
      fixes: [{ title: 'Other', safe: true, changes: [{ uri: URI, start: 0, end: 4, text: 'drive' }] }],
    });
    const clash = finding({ place: 'P3', fixes: [{ title: 'Clash', safe: true, changes: [{ uri: URI, start: 2, end: 6, text: '' }] }] });
    const unsafe = finding({
      place: 'P4',
      fixes: [{ title: 'Unsafe', safe: false, changes: [{ uri: URI, start: 20, end: 21, text: '' }] }],
    });
    expect(safeFixes([finding(), other, clash, unsafe]).fixes.map((fix) => fix.title)).toEqual(['Other', 'Insert a relief']);
    expect(ask([finding(), other], [FIX_ALL])).toMatchObject([{ kind: FIX_ALL, title: 'Apply all safe fixes (2)' }]);
    expect(ask([finding(), other]).some((action) => action.kind === FIX_ALL)).toBe(false);
  });
});
