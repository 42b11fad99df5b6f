/** Colouring as an editor does it: the grammar in the engine editors use. */
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { KINDS } from '@oilway/circuit';
import { UNIT_SPELLINGS } from '@oilway/quantity';
import { beforeAll, describe, expect, it } from 'vitest';
import oniguruma from 'vscode-oniguruma';
import textmate from 'vscode-textmate';
import { CIRCUITS } from './support.ts';

let grammar: textmate.IGrammar;

beforeAll(async () => {
  const require = createRequire(import.meta.url);
  await oniguruma.loadWASM(readFileSync(require.resolve('vscode-oniguruma/release/onig.wasm')).buffer as ArrayBuffer);
  const path = fileURLToPath(new URL('../../syntaxes/oilway.tmLanguage.json', import.meta.url));
  const registry = new textmate.Registry({
    onigLib: Promise.resolve({
      createOnigScanner: (sources) => new oniguruma.OnigScanner(sources),
      createOnigString: (text) => new oniguruma.OnigString(text),
    }),
    loadGrammar: async () => textmate.parseRawGrammar(readFileSync(path, 'utf8'), path),
  });
  const loaded = await registry.loadGrammar('source.oilway');
  if (loaded === null) throw new Error('the grammar does not load');
  grammar = loaded;
});

/** Innermost scope of each piece of text. */
function colours(text: string): { text: string; scope: string }[] {
  let state = textmate.INITIAL;
  const found: { text: string; scope: string }[] = [];
  for (const line of text.split('\n')) {
    const result = grammar.tokenizeLine(line, state);
    for (const token of result.tokens) {
      const piece = line.slice(token.startIndex, token.endIndex).trim();
      if (piece !== '') found.push({ text: piece, scope: token.scopes.at(-1) ?? '' });
    }
    state = result.ruleStack;
  }
  return found;
}

const scopeOf = (text: string, word: string): string | undefined => colours(text).find((piece) => piece.text === word)?.scope;

describe('colouring', () => {
  it('a component: kind, names, settings, numbers, units, words, title', () => {
    const text = 'cylinder  C1, 1A2 (bore 63 mm, attitude rod down, rated 210 bar, code "1.0") "Clamp" // note';
    expect(scopeOf(text, 'cylinder')).toBe('storage.type.kind.oilway');
    expect(scopeOf(text, 'C1')).toBe('entity.name.type.component.oilway');
    expect(scopeOf(text, '1A2')).toBe('entity.name.type.component.oilway');
    expect(scopeOf(text, 'bore')).toBe('support.variable.property.oilway');
    expect(scopeOf(text, '63')).toBe('constant.numeric.oilway');
    expect(scopeOf(text, 'mm')).toBe('keyword.other.unit.oilway');
    expect(scopeOf(text, 'down')).toBe('constant.language.oilway');
    expect(scopeOf(text, 'Clamp')).toBe('string.quoted.double.oilway');
    expect(scopeOf(text, '// note')).toBe('comment.line.double-slash.oilway');
  });

  it('`reverse check`, `test point`: second words that are heads elsewhere are no kinds', () => {
    expect(scopeOf('throttle FC1 (set 1.26 L/min ± 5 %, reverse check)', 'check')).toBe('constant.language.oilway');
    expect(scopeOf('throttle FC1 (set 1.26 L/min ± 5 %, reverse check)', 'L/min')).toBe('keyword.other.unit.oilway');
    expect(scopeOf('throttle FC1 (set 1.26 L/min ± 5 %, reverse check)', '%')).toBe('keyword.other.unit.oilway');
  });

  it('shapes, lines, ports, steps, requirements', () => {
    expect(scopeOf('directional V1 (4/3, centre closed)', '4/3')).toBe('constant.numeric.oilway');
    expect(scopeOf('working pressure: P1 to V1.P', 'pressure')).toBe('variable.other.readwrite.line.oilway');
    expect(scopeOf('working pressure: P1 to V1.P', 'P')).toBe('variable.other.property.port.oilway');
    expect(scopeOf('drain CV1.in to R1', 'in')).toBe('variable.other.property.port.oilway');
    expect(scopeOf('  step Clamp energise SOL1 for 0.5 s and until PS1 on, at most 3 s', 'Clamp')).toBe('entity.name.function.step.oilway');
    expect(scopeOf('  step Clamp energise SOL1 for 0.5 s and until PS1 on, at most 3 s', 'energise')).toBe('keyword.operator.word.oilway');
    expect(scopeOf('require C1 still in STOP and OFF for 5 min', 'STOP')).toBe('constant.language.state.oilway');
    expect(scopeOf('require C1 force in Out at least 17 kN', 'force')).toBe('support.type.measure.oilway');
  });

  it('a lost bracket or quotation mark colours no other line', () => {
    const text = 'relief RV1 (set 160 bar, passes 90 L/min at 6 bar\npump P2 (displacement 8 cm3/rev) "High\ncheck CV1 (crack 0.5 bar)';
    expect(scopeOf(text, 'pump')).toBe('storage.type.kind.oilway');
    expect(scopeOf(text, 'check')).toBe('storage.type.kind.oilway');
  });

  it('every kind and every unit of the tables is coloured', () => {
    for (const kind of Object.keys(KINDS)) expect(scopeOf(`${kind} X1`, kind), kind).toBe('storage.type.kind.oilway');
    for (const { spelling } of UNIT_SPELLINGS)
      expect(scopeOf(`let x = 5 ${spelling}`, spelling), spelling).toBe('keyword.other.unit.oilway');
  });

  it('in the collection every number with a unit shows both, and nothing stays without a colour', () => {
    for (const { name, text } of CIRCUITS) {
      const plain = colours(text).filter((piece) => piece.scope === 'source.oilway' && !/^[(),.:{}]+$/.test(piece.text));
      expect(plain, name).toEqual([]);
    }
  });
});
