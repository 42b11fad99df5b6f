/** `oilway check`: findings of circuits, as text or JSON. */
import type { Finding } from '@oilway/rules';
import { gather } from '../files.ts';
import { open, type Opened } from '../service.ts';
import { COMMAND_VERSION } from '../version.ts';
import type { Paint } from '../text/colour.ts';
import { findingData, findingLines } from '../text/finding.ts';
import { type Exit, type Output, plural } from './outcome.ts';

export interface CheckOptions {
  readonly paths: readonly string[];
  readonly format: 'text' | 'json';
  /** Show accepted findings (`allow`) too. */
  readonly accepted: boolean;
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

function summary(totals: Totals): string {
  const parts = [
    totals.errors > 0 ? plural(totals.errors, 'error') : '',
    totals.warnings > 0 ? plural(totals.warnings, 'warning') : '',
    totals.information > 0 ? `${totals.information} for information` : '',
  ].filter((part) => part !== '');
  const found = parts.length === 0 ? 'nothing found' : parts.join(', ');
  const accepted = totals.accepted === 0 ? '' : `; ${totals.accepted} accepted by allow`;
  return `${plural(totals.files, 'circuit')}: ${found}${accepted}`;
}

export async function check(options: CheckOptions, output: Output, paint: Paint): Promise<Exit> {
  const gathered = await gather(options.paths);
  for (const one of gathered.unusable) output.err(`oilway: ${one.path} ${one.why}`);
  if (gathered.files.length === 0) return 2;
  const session = await open(gathered.files);
  const totals = totalsOf(session.opened);
  if (options.format === 'json') {
    const files = session.opened.map((one) => ({
      file: one.file.path,
      findings: inOrder(one.findings).map((finding) => findingData(finding, session.texts)),
    }));
    const cannotRead = gathered.unusable.map((one) => ({ file: one.path, why: one.why }));
    output.out(JSON.stringify({ tool: 'oilway', version: COMMAND_VERSION, files, cannotRead, totals }, null, 2));
  } else {
    for (const one of session.opened) {
      for (const finding of inOrder(one.findings)) {
        if (finding.accepted !== undefined && !options.accepted) continue;
        for (const line of findingLines(finding, session.texts, paint)) output.out(line);
        if (finding.accepted !== undefined) output.out(`    accepted: ${finding.accepted}`);
        output.out('');
      }
    }
    output.out(summary(totals));
  }
  for (const failure of session.failures) output.err(`oilway: internal error, please report it: ${failure}`);
  if (gathered.unusable.length > 0 || session.failures.length > 0) return 2;
  return totals.errors + totals.warnings > 0 ? 1 : 0;
}
