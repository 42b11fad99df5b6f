/** `oilway check`: findings of circuits, as text or JSON. */
import type { Finding } from '@oilway/rules';
import { gather, type Gathered } from '../files.ts';
import { open, type Opened, type Session } from '../service.ts';
import { COMMAND_VERSION } from '../version.ts';
import type { Paint } from '../text/colour.ts';
import { findingData, findingLines } from '../text/finding.ts';
import { type Exit, type Output, plural } from './outcome.ts';

export interface CheckOptions {
  readonly paths: readonly string[];
  readonly format: 'text' | 'json';
  /** Show accepted findings (`allow`) too. */
  readonly accepted: boolean;
  /** Longest computation of one circuit, s. */
  readonly limit?: number;
}

const ORDER = { error: 0, warning: 1, information: 2 } as const;

interface Totals {
  readonly files: number;
  readonly errors: number;
  readonly warnings: number;
  readonly information: number;
  readonly accepted: number;
}

function totalsOf(opened: readonly Opened[]): Totals {
  const all = opened.flatMap((one) => one.findings);
  const standing = all.filter((finding) => finding.accepted === undefined);
  const count = (severity: Finding['severity']) => standing.filter((finding) => finding.severity === severity).length;
  return {
    files: opened.length,
    errors: count('error'),
    warnings: count('warning'),
    information: count('information'),
    accepted: all.length - standing.length,
  };
}

/** In the order of the text; at one place the graver first. */
function inOrder(findings: readonly Finding[]): readonly Finding[] {
  return [...findings].sort(
    (a, b) => a.origin.start - b.origin.start || ORDER[a.severity] - ORDER[b.severity] || (a.code < b.code ? -1 : 1),
  );
}

function summary(totals: Totals, complete: boolean): string {
  const parts = [
    totals.errors > 0 ? plural(totals.errors, 'error') : '',
    totals.warnings > 0 ? plural(totals.warnings, 'warning') : '',
    totals.information > 0 ? `${totals.information} for information` : '',
  ].filter((part) => part !== '');
  const found = parts.length === 0 ? 'nothing found' : parts.join(', ');
  const accepted = totals.accepted === 0 ? '' : `; ${totals.accepted} accepted by allow`;
  return `${plural(totals.files, 'circuit')}${complete ? '' : ', not fully computed'}: ${found}${accepted}`;
}

function textOf(session: Session, options: CheckOptions, paint: Paint): string[] {
  const lines: string[] = [];
  for (const one of session.opened) {
    for (const finding of inOrder(one.findings)) {
      if (finding.accepted !== undefined && !options.accepted) continue;
      lines.push(...findingLines(finding, session.texts, paint));
      if (finding.accepted !== undefined) lines.push(`    accepted: ${finding.accepted}`);
      lines.push('');
    }
  }
  return [...lines, summary(totalsOf(session.opened), session.failures.length === 0)];
}

function dataOf(session: Session, gathered: Gathered): Record<string, unknown> {
  return {
    tool: 'oilway',
    version: COMMAND_VERSION,
    files: session.opened.map((one) => ({
      file: one.file.path,
      findings: inOrder(one.findings).map((finding) => findingData(finding, session.texts)),
    })),
    cannotRead: gathered.unusable.map((one) => ({ file: one.path, why: one.why })),
    failures: session.failures,
    totals: totalsOf(session.opened),
  };
}

export async function check(options: CheckOptions, output: Output, paint: Paint): Promise<Exit> {
  const gathered = await gather(options.paths);
  for (const one of gathered.unusable) output.err(`oilway: ${one.path} ${one.why}`);
  if (gathered.files.length === 0 && options.format === 'text') return 2;
  const session = open(gathered.files, options.limit);
  if (options.format === 'json') output.out(JSON.stringify(dataOf(session, gathered), null, 2));
  else for (const line of textOf(session, options, paint)) output.out(line);
  for (const failure of session.failures) output.err(`oilway: ${failure}`);
  if (gathered.unusable.length > 0 || session.failures.length > 0) return 2;
  const { errors, warnings } = totalsOf(session.opened);
  return errors + warnings > 0 ? 1 : 0;
}
