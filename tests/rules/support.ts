/** Help for the tests of the rules: a text through resolution, figures and rules; fixes applied; statements shuffled. */
import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { type Circuit, type Study, study } from '@oilway/circuit';
import { analyseText } from '@oilway/language';
import { type Finding, type Fix, runRules } from '@oilway/rules';
import { expect } from 'vitest';

export interface Sample {
  readonly name: string;
  readonly code: string;
  readonly text: string;
}

const root = fileURLToPath(new URL('../../', import.meta.url));

function folder(...path: string[]): Sample[] {
  const at = join(root, ...path);
  return readdirSync(at)
    .filter((name) => name.endsWith('.oilway'))
    .sort()
    .map((name) => ({ name: name.replace('.oilway', ''), code: name.slice(0, 3), text: readFileSync(join(at, name), 'utf8') }));
}

/** One fault each, named by the code that must tell it. */
export const FAULTY: readonly Sample[] = folder('samples', 'faulty');
/** Right circuits. */
export const SOUND: readonly Sample[] = folder('samples');

/** Further right circuits, written to show the notation. */
export const SHOWN: readonly Sample[] = folder('tests', 'language', 'circuits');

export function faulty(code: string): Sample {
  const sample = FAULTY.find((s) => s.code === code);
  if (sample === undefined) throw new Error(`no faulty sample for ${code}`);
  return sample;
}

export interface Checked {
  readonly circuit: Circuit;
  /** Of the language (syntax, names, units, missing settings). */
  readonly language: readonly Finding[];
  /** Of the rules. */
  readonly findings: readonly Finding[];
  /** All that a person sees as a problem: errors and warnings that are not accepted. */
  readonly problems: readonly Finding[];
  readonly study?: Study;
}

const studied = new Map<string, Study>();

/** Text alone, or with figures. A rule that fails is a failure of the test. */
export function check(text: string, figures: 'text' | 'figures' = 'text', uri = 'file:///test.oilway'): Checked {
  const { circuit, findings: language, failed } = analyseText({ uri, text });
  expect(failed).toBeUndefined();
  let figured: Study | undefined;
  if (figures === 'figures') {
    figured = studied.get(text) ?? study(circuit);
    studied.set(text, figured);
  }
  const result = runRules({ circuit, text: () => text, ...(figured === undefined ? {} : { study: figured }) });
  expect(result.failed).toBeUndefined();
  const problems = [...language, ...result.findings].filter((f) => f.severity !== 'information' && f.accepted === undefined);
  return { circuit, language, findings: result.findings, problems, ...(figured === undefined ? {} : { study: figured }) };
}

export function apply(text: string, fix: Fix): string {
  return [...fix.changes]
    .map((change, i) => ({ ...change, i }))
    .sort((a, b) => b.start - a.start || b.i - a.i)
    .reduce((result, c) => result.slice(0, c.start) + c.text + result.slice(c.end), text);
}

export function at(text: string, finding: Finding): string {
  return text.slice(finding.origin.start, finding.origin.end);
}

/** `A01 P1`, `F17 V1 in Turn.Over`: what a finding is, without its words. */
export function short(finding: Finding): string {
  return `${finding.code} ${finding.place}${finding.state === undefined ? '' : ` in ${finding.state}`}`;
}

/** The text with each piece replaced; every piece must be there exactly once. */
export function edited(text: string, edits: readonly (readonly [string, string])[]): string {
  return edits.reduce((result, [from, to]) => {
    expect(result.split(from).length - 1, `"${from}" in the sample`).toBe(1);
    return result.replace(from, () => to);
  }, text);
}

/** Top-level statements of a text, blocks kept whole. */
export function statements(text: string): string[] {
  const found: string[] = [];
  let depth = 0;
  let block = '';
  for (const line of text.split('\n')) {
    block += (block === '' ? '' : '\n') + line;
    depth += (line.match(/\{/g) ?? []).length - (line.match(/\}/g) ?? []).length;
    if (depth > 0) continue;
    if (block.trim() !== '') found.push(block);
    block = '';
  }
  return found;
}
