/** Help for the tests of the language: circuits on disk, short texts, findings as a person reads them. */
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type TextAnalysis, analyseText } from '@oilway/language';
import { expect } from 'vitest';

const folder = join(fileURLToPath(new URL('.', import.meta.url)), 'circuits');

export const CIRCUITS: readonly { readonly name: string; readonly text: string }[] = readdirSync(folder)
  .filter((name) => name.endsWith('.oilway'))
  .sort()
  .map((name) => ({ name, text: readFileSync(join(folder, name), 'utf8') }));

export function circuitText(name: string): string {
  return CIRCUITS.find((circuit) => circuit.name === name)?.text ?? '';
}

/** Resolves a text; the tool itself must not fail on it. */
export function read(text: string, uri = 'file:///test.oilway'): TextAnalysis {
  const analysis = analyseText({ uri, text });
  expect(analysis.failed).toBeUndefined();
  return analysis;
}

/** `CODE what @ characters`, one a finding. */
export function said(text: string): string[] {
  return read(text).findings.map((finding) => `${finding.code} ${finding.what} @ ${text.slice(finding.origin.start, finding.origin.end)}`);
}

/** What is wrong, without the information. */
export function errors(text: string): string[] {
  return read(text)
    .findings.filter((finding) => finding.severity === 'error')
    .map((finding) => `${finding.code} ${finding.what} @ ${text.slice(finding.origin.start, finding.origin.end)}`);
}

/** The text with one fix of the first finding that has one. */
export function fixed(text: string, title?: string): string {
  for (const finding of read(text).findings) {
    const fix = finding.fixes.find((candidate) => title === undefined || candidate.title === title);
    if (fix === undefined) continue;
    let result = text;
    for (const change of [...fix.changes].sort((a, b) => b.start - a.start))
      result = result.slice(0, change.start) + change.text + result.slice(change.end);
    return result;
  }
  throw new Error(`no fix${title === undefined ? '' : ` "${title}"`} for ${said(text).join('; ')}`);
}
