/** The order of statements changes nothing: no finding, no word of it. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { check, FAULTY, short, SOUND, statements } from './support.ts';

describe('order of statements', () => {
  it.each([...FAULTY, ...SOUND])('$name', ({ text }) => {
    const parts = statements(text);
    const words = (one: string) =>
      check(one)
        .findings.map((f) => `${f.severity} ${short(f)}: ${f.what}`)
        .sort();
    const before = words(text);
    fc.assert(
      fc.property(fc.shuffledSubarray(parts, { minLength: parts.length, maxLength: parts.length }), (shuffled) => {
        // A comment may stand anywhere; a statement never continues the one before it.
        expect(words(`${shuffled.join('\n')}\n`)).toEqual(before);
      }),
      { numRuns: 12 },
    );
  });
});
