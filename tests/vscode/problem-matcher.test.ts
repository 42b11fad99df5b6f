/** A task that runs `oilway check` puts its findings where they belong: the matcher reads what the command writes. */
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { paintFor } from '../../packages/cli/text/colour.ts';
import { findingLines, Texts } from '../../packages/cli/text/finding.ts';

const manifest = JSON.parse(readFileSync(new URL('../../packages/vscode/package.json', import.meta.url), 'utf8'));
const { pattern } = manifest.contributes.problemMatchers[0];

it.each(['error', 'warning', 'information'] as const)('reads the first line of a finding: %s', (severity) => {
  const text = 'circuit A\npump P1 (displacement 8 cm3/rev)\n';
  const start = text.indexOf('P1');
  const finding = {
    code: 'A01',
    severity,
    what: 'P1.P: no relief (have 0, need 1)',
    origin: { uri: 'memory:a.oilway', start, end: start + 2 },
    related: [],
    place: 'P1',
    fixes: [],
    computed: false,
  };
  const lines = findingLines(finding, new Texts(() => text), paintFor(false, {}));
  const found = lines.flatMap((line) => new RegExp(pattern.regexp).exec(line) ?? []);
  expect(found[pattern.file]).toBe('memory:a.oilway');
  expect([found[pattern.line], found[pattern.column], found[pattern.severity]]).toEqual(['2', '6', severity]);
  expect([found[pattern.code], found[pattern.message]]).toEqual(['A01', 'P1.P: no relief (have 0, need 1)']);
});
