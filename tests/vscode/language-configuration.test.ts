/** Words, brackets and indentation as the editor takes them from the language configuration. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';

const file = new URL('../../packages/vscode/language-configuration.json', import.meta.url);
const configuration = JSON.parse(readFileSync(file, 'utf8'));
const words = (line: string): string[] => line.match(new RegExp(configuration.wordPattern, 'g')) ?? [];
const increases = (line: string): boolean => new RegExp(configuration.indentationRules.increaseIndentPattern).test(line);
const decreases = (line: string): boolean => new RegExp(configuration.indentationRules.decreaseIndentPattern).test(line);

describe('language configuration', () => {
  it('takes designations as one word and a dotted name as its pieces', () => {
    expect(words('working 1V1.A to C1.rod, clamp_oil')).toEqual(['working', '1V1', 'A', 'to', 'C1', 'rod', 'clamp_oil']);
  });

  it('takes a number with its decimals as one word, its unit apart', () => {
    expect(words('crack 0.5 bar, bore 63 mm')).toEqual(['crack', '0.5', 'bar', 'bore', '63', 'mm']);
  });

  it.each(['cycle Form {', 'assembly Unit (set 5 bar) ports P, T {', 'cylinder C1 (', 'limits (velocity suction 1 m/s, // house'])(
    'indents after %s',
    (line) => expect(increases(line)).toBe(true),
  );

  it.each(['fluid HM46 (grade 46)', '// a { in a comment', 'circuit A "a { in a text"', 'cycle Form { step Out energise SOL1 }'])(
    'does not indent after %s',
    (line) => expect(increases(line)).toBe(false),
  );

  it('goes back at closing brackets', () => {
    expect(decreases('  }')).toBe(true);
    expect(decreases(')')).toBe(true);
    expect(decreases('step Out')).toBe(false);
  });
});
