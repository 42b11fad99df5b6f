/** Definition, references, highlights and rename: every place of a name, and no other. */
import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { definitionAt, highlightsAt, referencesAt } from '../../packages/language/features/navigation.ts';
import { renameAt, renameTarget } from '../../packages/language/features/rename.ts';
import { analyseText, BENCH, check, sliced, unmark } from './support/check.ts';

/** Marks all places of the name under the cursor. */
function marked(text: string): string {
  const { text: plain, cursor } = unmark(text);
  const analysis = analyseText(plain);
  const places = referencesAt(analysis, cursor, true)
    .filter((one) => one.uri === analysis.uri)
    .sort((a, b) => b.start - a.start);
  return places.reduce((now, one) => `${now.slice(0, one.start)}«${now.slice(one.start, one.end)}»${now.slice(one.end)}`, plain);
}
/** Lines of a marked text that hold a mark. */
const lines = (text: string): string[] =>
  text
    .split('\n')
    .filter((line) => line.includes('«'))
    .map((line) => line.trim());

describe('references', () => {
  test('a component: declaration, line, load', () => {
    expect(lines(marked(BENCH.replace('cylinder  C1', 'cylinder  C|1')))).toEqual([
      'cylinder  «C1» (bore 63 mm, rod 36 mm, stroke 200 mm, attitude level) "Slide"',
      'switch    LS1 (on «C1», from 195 mm to 200 mm)',
      'switch    LS2 (on «C1», from 0 mm to 2 mm)',
      'working V1.A to «C1».cap',
      'working «C1».rod to FC1 to V1.B',
      'load «C1» (friction 200 N, resist 4 kN extending)',
    ]);
  });
  test('a coil: where the valve names it and where it is energised', () => {
    expect(lines(marked(BENCH.replace('energise SOL2', 'energise S|OL2')))).toEqual([
      'directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b «SOL2», passes 30 L/min at 3 bar) "Table"',
      'step Back energise «SOL2» until LS2 on, at most 8 s',
    ]);
  });
  test('a line and a constant', () => {
    expect(
      lines(marked(`${BENCH.replace('working pressure:', 'working pr|essure:')}working pressure to G1\ngauge G1 (range 0 bar to 250 bar)`)),
    ).toEqual(['working «pressure»: P1 to RV1, V1.P', 'working «pressure» to G1']);
    expect(lines(marked(BENCH.replace('set system', 'set sys|tem')))).toEqual([
      'let «system» = 120 bar',
      'relief    RV1 (set «system», passes 20 L/min at 4 bar)',
    ]);
  });
  test('a step by its short and its long name', () => {
    const text = `${BENCH.replace('step Out', 'step O|ut')}require C1 speed in Out at least 20 mm/s\nrequire C1 force in Part.Out at least 1 kN`;
    expect(lines(marked(text))).toEqual([
      'step «Out»  energise SOL1 until LS1 on, at most 8 s',
      'require C1 speed in «Out» at least 20 mm/s',
      'require C1 force in Part.«Out» at least 1 kN',
    ]);
  });
});

describe('definition and highlights', () => {
  test('definition goes to the name', () => {
    const found = check(BENCH.replace('until LS1', 'until L|S1'), (analysis, cursor) =>
      definitionAt(analysis, cursor).map((one) => analysis.lines.position(one.start).line),
    );
    expect(found).toEqual([BENCH.split('\n').findIndex((line) => line.includes('switch    LS1'))]);
  });
  test('the declaration is a write, uses are reads', () => {
    const found = check(BENCH.replace('driven by M1', 'driven by M|1'), (analysis, cursor) =>
      highlightsAt(analysis, cursor).map((one) => one.write),
    );
    expect(found).toEqual([true, false]);
  });
  test('nothing at a word of the notation or a number', () => {
    for (const marks of [BENCH.replace('cylinder', 'cyl|inder'), BENCH.replace('120 bar', '12|0 bar')]) {
      expect(check(marks, definitionAt)).toEqual([]);
      expect(check(marks, (analysis, cursor) => referencesAt(analysis, cursor, true))).toEqual([]);
    }
  });
});

const samples = fileURLToPath(new URL('../../samples', import.meta.url));
const apply = (text: string, changes: readonly { readonly start: number; readonly end: number; readonly text: string }[]): string =>
  [...changes].sort((a, b) => b.start - a.start).reduce((now, one) => now.slice(0, one.start) + one.text + now.slice(one.end), text);

describe('rename', () => {
  const renamed = (marks: string, name: string): string =>
    check(marks, (analysis, cursor) => {
      const answer = renameAt(analysis, cursor, name);
      if (!answer.ok) return answer.problem;
      return [...answer.value]
        .sort((a, b) => b.start - a.start)
        .reduce((text, one) => text.slice(0, one.start) + one.text + text.slice(one.end), analysis.text);
    });

  test.each([
    ['a component', 'cylinder  C|1', 'C9', /\bC1\b/],
    ['a coil', 'energise SO|L1', 'Y1', /\bSOL1\b/],
    ['a line', 'working pre|ssure:', 'supply', /\bpressure\b/],
    ['a constant', 'let sys|tem', 'highest', /\bsystem\b/],
    ['a step', 'step O|ut', 'Advance', /\bOut\b/],
    ['a cycle', 'cycle Pa|rt', 'Work', /\bPart\b/],
  ])('%s everywhere, and the text still says the same', (_, mark, name, gone) => {
    const before = BENCH;
    const after = renamed(before.replace(mark.replace('|', ''), mark), name);
    expect(after).not.toMatch(gone);
    expect(after.replaceAll(new RegExp(`\\b${name}\\b`, 'g'), '#')).toBe(before.replaceAll(new RegExp(gone.source, 'g'), '#'));
    expect(analyseText(after).findings.filter((one) => one.severity === 'error').length).toBe(
      analyseText(before).findings.filter((one) => one.severity === 'error').length,
    );
  });
  test('words of the notation, positions, ports cannot be new or old names', () => {
    const mark = BENCH.replace('cylinder  C1', 'cylinder  C|1');
    expect(renamed(mark, 'pump')).toBe('`pump` is a word of the notation and cannot be a name');
    expect(renamed(mark, 'centre')).toContain('word of the notation');
    expect(renamed(mark, '1x')).toContain('is no name');
    expect(renamed(mark, 'two words')).toContain('is no name');
    expect(renamed(mark, '1A1')).toContain('1A1 (bore 63 mm');
    expect(renamed(BENCH.replace('cylinder', 'cyl|inder'), 'C9')).toBe('`cylinder` is a word of the notation: it has no other name');
    expect(renamed(BENCH.replace('C1.cap', 'C1.c|ap'), 'head')).toContain('the name of a port');
  });
  test('a name that is taken', () => {
    expect(renamed(BENCH.replace('cylinder  C1', 'cylinder  C|1'), 'P1')).toBe('P1 is already the name of a component');
    expect(renamed(BENCH.replace('step Out', 'step O|ut'), 'Back')).toBe('Back is already the name of a step');
  });
  test('the span offered is the name under the cursor', () => {
    const found = check(BENCH.replace('C1.rod to', 'C|1.rod to'), (analysis, cursor) => {
      const target = renameTarget(analysis, cursor);
      return target.ok ? sliced(analysis, [target.value]) : [target.problem];
    });
    expect(found).toEqual(['C1']);
  });

  test('every name of every sample, there and back: no new error, no place forgotten', () => {
    for (const file of readdirSync(samples).filter((name) => name.endsWith('.oilway'))) {
      const text = readFileSync(join(samples, file), 'utf8');
      const before = analyseText(text);
      const errors = (one: typeof before): number => one.findings.filter((found) => found.severity === 'error').length;
      for (const declared of before.occurrences.filter((one) => one.role === 'declaration')) {
        const there = renameAt(before, declared.origin.start, 'Zz9');
        if (!there.ok) throw new Error(`${file}: ${declared.id}: ${there.problem}`);
        const changed = apply(text, there.value);
        const after = analyseText(changed);
        expect(errors(after), `${file}: ${declared.id}`).toBe(errors(before));
        const name = text.slice(declared.origin.start, declared.origin.end);
        const place = after.occurrences.find(
          (one) => one.role === 'declaration' && changed.slice(one.origin.start, one.origin.end) === 'Zz9',
        );
        const back = place && renameAt(after, place.origin.start, name);
        expect(back?.ok ? apply(changed, back.value) : back?.problem, `${file}: ${declared.id}`).toBe(text);
      }
    }
  }, 240_000);
});
