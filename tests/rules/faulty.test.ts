/** Every faulty sample is told by the code in its name, alone, at the right characters; the words are kept to be read. */
import { RULES } from '@oilway/rules';
import { describe, expect, it } from 'vitest';
import { at, check, FAULTY, short } from './support.ts';

/** What the squiggle stands under. */
const CHARACTERS: Readonly<Record<string, string>> = {
  A01: 'P1',
  A02: 'P1',
  A03: 'set 200 bar',
  A04: 'set 60 bar',
  A06: 'RV1',
  A07: 'P1',
  A09: 'P1',
  A10: 'P1',
  A19: 'P1',
  B01: 'P1',
  B02: 'UV1.X',
  B03: 'set 170 bar',
  B04: 'power 4 kW',
  B06: 'CV1',
  C01: 'ACC1',
  C02: 'ACC1',
  D01: 'C1',
  E01: 'FC1',
  E03: 'FC1',
  F05: 'SV1.Y',
  F07: 'set 130 bar',
  F17: 'SOL2',
  H14: 'V1',
  L04: 'Out',
  L07: 'rises 140 bar',
  M01: '"1.1"',
  M07: '110',
  M08: 'C1',
};
const COMPUTED: readonly string[] = RULES.filter((r) => r.needs === 'computed').map((r) => r.code);

describe('faulty samples', () => {
  it('there is one for every rule, and its first line says what a person would call it', () => {
    expect(FAULTY.map((s) => s.code).sort()).toEqual(RULES.map((r) => r.code).sort());
    for (const { name, text } of FAULTY) expect(text, name).toMatch(/^\/\/ [A-Z].{20,}\.\n|^\/\/ [A-Z].{20,}\?\n/);
  });

  it.each(FAULTY.filter((s) => !COMPUTED.includes(s.code)))('$name is told from the text', ({ code, text }) => {
    const { problems } = check(text);
    expect(problems.map((p) => p.code)).toEqual([code]);
    expect(at(text, problems[0]!)).toBe(CHARACTERS[code]);
  });

  it.each(FAULTY)('$name is told alone, with figures', ({ code, text }) => {
    const { problems } = check(text, 'figures');
    expect([...new Set(problems.map((p) => p.code))]).toEqual([code]);
    expect(at(text, problems[0]!)).toBe(CHARACTERS[code]);
  });

  it('the words read well', async () => {
    const page = FAULTY.map(({ name, text }) => {
      const { problems } = check(text, 'figures');
      return [
        `=== ${name}`,
        ...problems.flatMap((p) => [
          `${p.severity} ${short(p)}   under "${at(text, p)}"`,
          `  ${p.what}`,
          ...(p.why === undefined ? [] : [`  why:  ${p.why}`]),
          ...(p.mend === undefined ? [] : [`  mend: ${p.mend}`]),
          ...p.related.map((r) => `  see:  "${text.slice(r.origin.start, r.origin.end).split('\n')[0]}": ${r.message}`),
          ...p.fixes.map((f) => `  fix:  ${f.title}`),
        ]),
      ].join('\n');
    }).join('\n\n');
    await expect(`${page}\n`).toMatchFileSnapshot('./messages.txt');
  });

  it('figures in messages have units', () => {
    for (const { name, text } of FAULTY) {
      for (const { what } of check(text, 'figures').problems) {
        // Numbers that stand alone, not in names (P1, 4/3), quotations or codes.
        const bare = what
          .replace(/`[^`]*`|"[^"]*"/g, '')
          .match(/(?<![\w./])\d+(\.\d+)?(?![\w./])(?! ?(%|bar|L\/min|kW|kN|N|mm|s|L|psi|gpm|mm\/s|°C)\b| %)/g);
        expect(bare, `${name}: ${what}`).toBeNull();
      }
    }
  });
});
