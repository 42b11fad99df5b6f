/** Half-typed circuits: rules never fail, never say a figure they do not have, and stay within the text. */
import fc from 'fast-check';
import { codePages, RULES, ruleOf } from '@oilway/rules';
import { describe, expect, it } from 'vitest';
import { apply, check, FAULTY, SOUND } from './support.ts';

const TEXTS = [...FAULTY, ...SOUND].map((s) => s.text);

const damaged = fc
  .record({
    text: fc.constantFrom(...TEXTS),
    at: fc.nat(),
    length: fc.nat({ max: 60 }),
    what: fc.constantFrom('line', 'cut', 'characters', 'twice'),
  })
  .map(({ text, at, length, what }) => {
    const lines = text.split('\n');
    const n = at % lines.length;
    if (what === 'line') return lines.filter((_, i) => i !== n).join('\n');
    if (what === 'twice') return [...lines.slice(0, n), lines[n]!, ...lines.slice(n)].join('\n');
    const offset = at % text.length;
    return what === 'cut' ? text.slice(0, offset) : text.slice(0, offset) + text.slice(offset + length);
  });

function sane(text: string, figures: 'text' | 'figures'): void {
  const { findings } = check(text, figures);
  for (const f of findings) {
    const words = [f.what, f.why ?? '', f.mend ?? '', ...f.related.map((r) => r.message), ...f.fixes.map((x) => x.title)].join('\n');
    expect(words).not.toMatch(/NaN|undefined|Infinity|unlimited|not computed \(|\[object/);
    expect(f.origin.start).toBeGreaterThanOrEqual(0);
    expect(f.origin.end).toBeLessThanOrEqual(text.length);
    expect(f.origin.start).toBeLessThanOrEqual(f.origin.end);
    for (const fix of f.fixes) {
      for (const c of fix.changes) expect(c.end <= text.length && c.start <= c.end && c.start >= 0, fix.title).toBe(true);
      // Changes of one fix never overlap.
      const sorted = [...fix.changes].sort((a, b) => a.start - b.start || a.end - b.end);
      for (const [i, c] of sorted.slice(1).entries()) expect(c.start, fix.title).toBeGreaterThanOrEqual(sorted[i]!.end);
      // A mended text goes through the rules as well.
      check(apply(text, fix));
    }
  }
}

describe('half-typed circuits', () => {
  it('from the text', () => {
    fc.assert(
      fc.property(damaged, (text) => sane(text, 'text')),
      { numRuns: 300 },
    );
  });

  it('with figures', () => {
    fc.assert(
      fc.property(damaged, (text) => sane(text, 'figures')),
      { numRuns: 25 },
    );
  });

  it('an empty text and a shelf have no findings of the rules', () => {
    for (const text of ['', '// nothing\n', 'circuit Empty\n', 'part check NonReturn (crack 0.5 bar)\n'])
      expect(check(text).findings).toEqual([]);
  });
});

describe('what rules say of themselves', () => {
  it.each(RULES)('$code', (rule) => {
    expect(ruleOf(rule.code)).toBe(rule);
    expect(rule.code).toMatch(/^[A-M]\d\d$/);
    expect(rule.name).toMatch(/^[a-z][a-z0-9-]+$/);
    for (const words of [rule.title, rule.why, rule.ground, rule.mend]) expect(words.length).toBeGreaterThan(8);
    expect(rule.why.endsWith('.') && rule.mend.endsWith('.')).toBe(true);
    // A page says how it is decided and what stays clean.
    const page = codePages[rule.code]!;
    expect(page.startsWith(`# ${rule.code} ${rule.title}\n`)).toBe(true);
    expect(page).toContain(rule.ground);
    if (!['A01', 'B06'].includes(rule.code)) expect(page).toContain('Stays clean');
    expect(page).not.toMatch(/\bTODO\b|undefined/);
  });

  it('codes are unique and in order', () => {
    const codes = RULES.map((r) => r.code);
    expect(codes).toEqual([...new Set(codes)].sort());
  });
});
