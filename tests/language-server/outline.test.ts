/** Outline, workspace symbols, folding, growing selection. */
import { describe, expect, test } from 'vitest';
import type { DocumentSymbol } from 'vscode-languageserver-types';
import { foldingRanges } from '../../packages/language/features/folding.ts';
import { outline, workspaceSymbols } from '../../packages/language/features/outline.ts';
import { selectionAt } from '../../packages/language/features/selection.ts';
import { analyseText, BENCH, check } from './support/check.ts';

describe('outline', () => {
  const tree = (symbols: readonly DocumentSymbol[], depth = 0): string[] =>
    symbols.flatMap((one) => [`${'  '.repeat(depth)}${one.name}: ${one.detail}`, ...tree(one.children ?? [], depth + 1)]);

  test('in text order, coils under their valve, steps under their cycle', () => {
    expect(tree(outline(analyseText(`${BENCH}require C1 speed in Out\n   at least 20 mm/s`)))).toMatchInlineSnapshot(`
      [
        "system: constant",
        "HM46: fluid",
        "R1: reservoir",
        "M1: drive",
        "P1: pump",
        "RV1: pressure-relief valve",
        "V1: 4/3 directional control valve, Table",
        "  SOL1: coil a",
        "  SOL2: coil b",
        "FC1: throttle",
        "C1: cylinder, Slide",
        "LS1: switch",
        "LS2: switch",
        "pressure: working line",
        "Part: cycle",
        "  Out: step",
        "  Back: step",
        "C1 speed in Out at least 20 mm/s: requirement",
      ]
    `);
  });
  test('every name lies inside its whole, whatever is half-typed', () => {
    for (let cut = 0; cut < BENCH.length; cut += 13) {
      const check = (symbols: readonly DocumentSymbol[]): void => {
        for (const { range, selectionRange, name, children } of symbols) {
          expect(name.length).toBeGreaterThan(0);
          const notAfter = (a: { line: number; character: number }, b: { line: number; character: number }): boolean =>
            a.line < b.line || (a.line === b.line && a.character <= b.character);
          expect(notAfter(range.start, selectionRange.start) && notAfter(selectionRange.end, range.end), `${name} at ${cut}`).toBe(true);
          check(children ?? []);
        }
      };
      check(outline(analyseText(BENCH.slice(0, cut))));
    }
  });
  test('twins of one statement are both there', () => {
    expect(outline(analyseText('circuit T\ngauge G1, G2 (range 0 bar to 250 bar)')).map((one) => one.name)).toEqual(['G1', 'G2']);
  });
  test('workspace symbols by letters in order', () => {
    const names = (query: string): string[] => workspaceSymbols(analyseText(BENCH), query).map((one) => one.name);
    expect(names('ls')).toEqual(['LS1', 'LS2']);
    expect(names('sl1')).toEqual(['SOL1']);
    expect(names('xyz')).toEqual([]);
    expect(names('').length).toBeGreaterThan(15);
  });
});

describe('folding', () => {
  const folds = (text: string): string[] =>
    foldingRanges(analyseText(text))
      .map((one) => `${one.startLine}-${one.endLine}${one.kind ? ` ${one.kind}` : ''}`)
      .sort();
  test('blocks of remarks, cycles, brackets over lines, regions', () => {
    expect(
      folds(
        '// a\n// b\ncircuit T\ncycle A {\n  step S for 1 s\n  step T for 1 s\n}\npump P1 (\n  displacement 8 cm3/rev,\n  driven by M1\n)\n/* x\n y */',
      ),
    ).toEqual(['0-1 comment', '11-12 comment', '3-5', '7-9']);
    expect(folds('// region Supply\npump P1 ()\n// endregion')).toEqual(['0-2 region']);
  });
  test('single lines and remarks behind statements do not fold', () => {
    expect(folds('circuit T // a\nlet a = 1 bar // b\n// one line\ncycle A { }')).toEqual([]);
  });
  test('a bracket that is not closed costs only its own fold', () => {
    expect(folds('pump P1 (\n  displacement 8 cm3/rev\ncycle A {\n  step S for 1 s\n  step T for 1 s\n}')).toEqual(['2-4']);
  });
});

describe('growing selection', () => {
  const grown = (marked: string): string[] =>
    check(marked, (analysis, cursor) => {
      const found: string[] = [];
      for (let one: ReturnType<typeof selectionAt> | undefined = selectionAt(analysis, cursor); one; one = one.parent) {
        found.push(analysis.text.slice(analysis.lines.offset(one.range.start), analysis.lines.offset(one.range.end)));
      }
      return found;
    });
  test('number, property, brackets, statement, file', () => {
    const text = 'circuit T\nrelief RV1 (set 16|0 bar, passes 20 L/min at 4 bar)\nplug RV1.X';
    expect(grown(text)).toEqual([
      '160',
      'set 160 bar',
      'set 160 bar, passes 20 L/min at 4 bar',
      '(set 160 bar, passes 20 L/min at 4 bar)',
      'relief RV1 (set 160 bar, passes 20 L/min at 4 bar)',
      text.replace('|', ''),
    ]);
  });
  test('step, block, statement of the cycle', () => {
    expect(grown('cycle A {\n  step S1 for 1| s\n}').slice(0, 3)).toEqual(['1', 'step S1 for 1 s', '\n  step S1 for 1 s\n']);
  });
});
