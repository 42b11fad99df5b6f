/** Quick fixes of the findings at a range, and the one action that applies every safe fix of the file. */
import { CodeActionKind, type CodeAction, type Diagnostic } from 'vscode-languageserver-types';
import type { TextChange } from '@oilway/circuit';
import type { Finding, Fix } from '@oilway/rules';
import type { Analysis } from './analysis.ts';
import { workspaceEdit } from './edits.ts';
import { sameFinding, toDiagnostic, type DiagnosticContext, type DiagnosticData } from './diagnostics.ts';

/** All safe fixes of a file at once. */
export const FIX_ALL = `${CodeActionKind.SourceFixAll}.oilway`;

function overlaps(a: TextChange, b: TextChange): boolean {
  if (a.uri !== b.uri) return false;
  if (a.start === a.end && b.start === b.end) return false;
  return a.start < b.end && b.start < a.end;
}

/** Safe fixes in text order; one that would touch the characters of an earlier one is left for the next round. */
export function safeFixes(findings: readonly Finding[]): { readonly fixes: readonly Fix[]; readonly changes: readonly TextChange[] } {
  const fixes: Fix[] = [];
  const changes: TextChange[] = [];
  const ordered = [...findings].filter((one) => one.accepted === undefined).sort((a, b) => a.origin.start - b.origin.start);
  for (const finding of ordered) {
    const fix = finding.fixes.find((one) => one.safe);
    if (!fix) continue;
    const known = fix.changes.every((change) =>
      changes.some(
        (other) => other.uri === change.uri && other.start === change.start && other.end === change.end && other.text === change.text,
      ),
    );
    if (known) continue;
    if (fix.changes.some((change) => changes.some((other) => overlaps(change, other)))) continue;
    fixes.push(fix);
    changes.push(...fix.changes);
  }
  return { fixes, changes };
}

/** Codes of rules: those of the language itself are mended, never accepted. */
const RULE = /^[A-L]\d\d$/;
const STATES: ReadonlySet<string> = new Set(['REST', 'OFF', 'STOP', 'IDLE']);

/** An `allow` statement at the end of the file. Its reason is left empty on purpose: until it is written, the statement itself is a finding. */
function allowance(analysis: Analysis, finding: Finding): readonly TextChange[] {
  const { circuit, text } = analysis;
  const owner = finding.place.split('.')[0] ?? '';
  const known =
    circuit?.components.some((one) => one.id === finding.place || one.id === owner) ||
    circuit?.lines.some((one) => one.name === finding.place);
  const on = known ? ` on ${finding.place}` : '';
  const where = finding.state !== undefined && STATES.has(finding.state) ? ` in ${finding.state}` : '';
  const gap = text === '' || text.endsWith('\n') ? '' : '\n';
  return [{ uri: analysis.uri, start: text.length, end: text.length, text: `${gap}allow ${finding.code}${on}${where} ""\n` }];
}

export interface CodeActionQuestion {
  readonly start: number;
  readonly end: number;
  /** Diagnostics the client already shows there. */
  readonly shown: readonly Diagnostic[];
  /** Kinds asked for; absent = all. */
  readonly only?: readonly string[];
}

export function codeActions(analysis: Analysis, question: CodeActionQuestion, context: DiagnosticContext): CodeAction[] {
  const wants = (kind: string): boolean => !question.only || question.only.some((one) => kind === one || kind.startsWith(`${one}.`));
  const actions: CodeAction[] = [];
  const here = analysis.findings.filter(
    (one) =>
      one.accepted === undefined && one.origin.uri === analysis.uri && one.origin.start <= question.end && one.origin.end >= question.start,
  );
  const shownFor = (finding: Finding): Diagnostic[] => {
    const shown = question.shown.filter((one) => sameFinding(finding, (one.data ?? {}) as Partial<DiagnosticData>));
    const own = toDiagnostic(finding, context);
    return shown.length > 0 ? shown : own ? [own] : [];
  };
  if (wants(CodeActionKind.QuickFix)) {
    for (const finding of here) {
      finding.fixes.forEach((fix, index) => {
        const edit = workspaceEdit(fix.changes, context);
        if (!edit) return;
        // The one mend there is, or a safe one: what "fix this" without a choice does.
        const preferred = index === 0 && (fix.safe || finding.fixes.length === 1) ? { isPreferred: true } : {};
        actions.push({ title: fix.title, kind: CodeActionKind.QuickFix, diagnostics: shownFor(finding), edit, ...preferred });
      });
    }
  }
  if (wants(CodeActionKind.QuickFix)) {
    for (const finding of here) {
      const edit = workspaceEdit(allowance(analysis, finding), context);
      const title = `Accept ${finding.code} here: adds an \`allow\` statement, the reason is yours to write`;
      if (RULE.test(finding.code) && edit) actions.push({ title, kind: CodeActionKind.QuickFix, diagnostics: shownFor(finding), edit });
    }
  }
  // Only where asked for: an editor that runs it on saving must not wait for it otherwise.
  if (wants(FIX_ALL) && question.only) {
    const { fixes, changes } = safeFixes(analysis.findings);
    const edit = fixes.length > 0 ? workspaceEdit(changes, context) : undefined;
    if (edit) actions.push({ title: `Apply all safe fixes (${fixes.length})`, kind: FIX_ALL, edit });
  }
  return actions;
}
