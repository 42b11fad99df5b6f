/** A finding as an editor shows it: the one converter; nothing is decided here. */
import {
  DiagnosticSeverity,
  DiagnosticTag,
  type Diagnostic,
  type DiagnosticRelatedInformation,
  type Range,
} from 'vscode-languageserver-types';
import type { Origin } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';

export interface DiagnosticContext {
  /** Range of an origin in its document; undefined where the document is not at hand. */
  range(origin: Origin): Range | undefined;
  /** Address of the rule's page; undefined = no link. */
  page(code: string): string | undefined;
}

/** What a code action needs to find the finding again. */
export interface DiagnosticData {
  readonly code: string;
  readonly place: string;
  readonly state?: string;
  /** Titles of the fixes, so that a client can tell that there are some. */
  readonly fixes: readonly string[];
}

const SEVERITY = {
  error: DiagnosticSeverity.Error,
  warning: DiagnosticSeverity.Warning,
  information: DiagnosticSeverity.Information,
} as const;

/** Findings that say "this does nothing": shown faded. */
const UNNECESSARY: ReadonlySet<string> = new Set(['UNUSED', 'ALLOW-UNUSED']);

/** What, then why it matters, then what would mend it: each a line of its own. */
export function messageOf(finding: Finding): string {
  const lines = [finding.what];
  if (finding.why) lines.push(finding.why);
  if (finding.mend) lines.push(`Mend: ${finding.mend}`);
  if (finding.hides && finding.hides.length > 0) lines.push(`Covers ${finding.hides.join(', ')} at the same place.`);
  return lines.join('\n');
}

export function toDiagnostic(finding: Finding, context: DiagnosticContext): Diagnostic | undefined {
  if (finding.accepted !== undefined) return undefined;
  const range = context.range(finding.origin);
  if (!range) return undefined;
  const related: DiagnosticRelatedInformation[] = [];
  for (const one of finding.related) {
    const place = context.range(one.origin);
    if (place) related.push({ location: { uri: one.origin.uri, range: place }, message: one.message });
  }
  const page = context.page(finding.code);
  const data: DiagnosticData = {
    code: finding.code,
    place: finding.place,
    ...(finding.state === undefined ? {} : { state: finding.state }),
    fixes: finding.fixes.map((fix) => fix.title),
  };
  return {
    range,
    severity: SEVERITY[finding.severity],
    code: finding.code,
    source: 'oilway',
    message: messageOf(finding),
    ...(page === undefined ? {} : { codeDescription: { href: page } }),
    ...(related.length > 0 ? { relatedInformation: related } : {}),
    ...(UNNECESSARY.has(finding.code) ? { tags: [DiagnosticTag.Unnecessary] } : {}),
    data,
  };
}

/** True where two findings are the same but for their place in the text: code + place + state. */
export function sameFinding(finding: Finding, data: Partial<DiagnosticData>): boolean {
  return finding.code === data.code && finding.place === data.place && finding.state === data.state;
}
