/** The words of the notation do not collide, and the generated files are those the tables give. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, relative } from 'node:path';
import { fileURLToPath } from 'node:url';
import { KINDS, LIMITS_PROPERTIES, LINE_PROPERTIES, LOAD_PROPERTIES } from '@oilway/circuit';
import { LINE_HEADS, MEASURES, RESERVED_WORDS, isNoName } from '@oilway/language';
import { unitOf } from '@oilway/quantity';
import { describe, expect, it } from 'vitest';
import { grammarText } from '../../packages/language/scripts/generate.mjs';
import { textmateText } from '../../packages/language/scripts/textmate.mjs';

const root = fileURLToPath(new URL('../../', import.meta.url));
const specs = [...Object.values(KINDS).flatMap((kind) => kind.properties), ...LINE_PROPERTIES, ...LOAD_PROPERTIES, ...LIMITS_PROPERTIES];
const settings = new Set(specs.map((spec) => spec.name));

describe('words', () => {
  it('no setting is a line head: with brackets broken over lines the statement would be cut', () => {
    expect(settings.size).toBeGreaterThan(100);
    expect(LINE_HEADS.filter((head) => settings.has(head))).toEqual([]);
  });

  it('settings share only `on at from needs` with the reserved words', () => {
    expect(RESERVED_WORDS.filter((word) => settings.has(word)).sort()).toEqual(['at', 'from', 'needs', 'on']);
  });

  it('heads and reserved words have none in common, and no measure is either', () => {
    expect(LINE_HEADS.filter((head) => RESERVED_WORDS.includes(head))).toEqual([]);
    expect(MEASURES.filter((measure) => LINE_HEADS.includes(measure) || RESERVED_WORDS.includes(measure))).toEqual([]);
  });

  it('no reserved word but `in` is a unit, and no port or position name is a word that cannot follow a number', () => {
    expect(RESERVED_WORDS.filter((word) => unitOf(word) !== undefined)).toEqual(['in']);
  });

  it('every example in the tables reads as a setting of its kind', async () => {
    const { read } = await import('./support.ts');
    for (const kind of Object.values(KINDS)) {
      for (const spec of kind.properties) {
        for (const example of spec.example.split(/ \| |, or /)) {
          // `a | b | c` of a word list: only the first stands with its setting's word.
          if (!example.startsWith(spec.name)) continue;
          const shape = kind.name === 'directional' ? '4/3, ' : spec.name === 'opening' ? 'passes 9 L/min at 1 bar, ' : '';
          const text = `${kind.name} Z9 (${shape}${example})\ndrive M1\ncylinder C2\nmotor HM1\nreservoir R1\nfilter F2\ndirectional V1 (4/3)`;
          const own = read(text).findings.filter(
            (finding) =>
              finding.origin.start >= text.indexOf('(') &&
              finding.origin.end <= text.indexOf('\n') &&
              !finding.what.includes('words for 2/2'),
          );
          expect(
            own.map((finding) => finding.what),
            `${kind.name}: ${example}`,
          ).toEqual([]);
        }
      }
    }
  });

  it('heads, reserved words and positions cannot be names', () => {
    for (const word of [...LINE_HEADS, ...RESERVED_WORDS, 'a', 'b', 'centre']) expect(isNoName(word)).toBe(true);
    for (const word of ['C1', 'system', '1V1', 'A', 'written', 'metric', 'times2']) expect(isNoName(word)).toBe(false);
  });
});

describe('generated files', () => {
  it('the grammar is the template with the words of the tables', () => {
    expect(readFileSync(join(root, 'packages/language/grammar/oilway.langium'), 'utf8')).toBe(grammarText());
  });

  it('the parser is the one the grammar gives', () => {
    const folder = mkdtempSync(join(tmpdir(), 'oilway-grammar-'));
    try {
      const config = JSON.parse(readFileSync(join(root, 'packages/language/langium-config.json'), 'utf8')) as {
        languages: { grammar: string }[];
        out: string;
      };
      for (const language of config.languages) language.grammar = relative(folder, join(root, 'packages/language', language.grammar));
      config.out = 'out';
      writeFileSync(join(folder, 'langium-config.json'), JSON.stringify(config));
      const cli = fileURLToPath(new URL('../bin/langium.js', import.meta.resolve('langium-cli')));
      execFileSync(process.execPath, [cli, 'generate', '-f', join(folder, 'langium-config.json')], { cwd: folder, stdio: 'pipe' });
      for (const name of ['ast.ts', 'grammar.ts', 'module.ts']) {
        expect(readFileSync(join(root, 'packages/language/generated', name), 'utf8'), name).toBe(
          readFileSync(join(folder, 'out', name), 'utf8'),
        );
      }
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  it('the colouring is the one the tables give', () => {
    expect(readFileSync(join(root, 'syntaxes/oilway.tmLanguage.json'), 'utf8')).toBe(textmateText());
  });
});
