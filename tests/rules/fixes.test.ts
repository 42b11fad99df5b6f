/** Every mend offered makes its finding go away and brings no other. */
import { describe, expect, it } from 'vitest';
import { apply, check, edited, FAULTY, faulty, short } from './support.ts';

const MENDS = FAULTY.flatMap(({ name, text }) =>
  check(text).problems.flatMap((p) =>
    p.fixes.map((fix, i) => ({ name, text, code: p.code, place: p.place, fix, title: `${i + 1}: ${fix.title}` })),
  ),
);

/** Rules whose mend is mechanical. */
const MECHANICAL = [
  'A01',
  'A02',
  'A03',
  'A06',
  'A07',
  'A10',
  'A19',
  'B01',
  'B02',
  'B06',
  'C01',
  'C02',
  'D01',
  'F05',
  'H14',
  'L04',
  'M01',
  'M07',
  'M08',
];

describe('quick fixes', () => {
  it('are there for every rule whose mend is mechanical', () => {
    expect(MECHANICAL.filter((code) => !MENDS.some((m) => m.code === code))).toEqual([]);
  });

  it.each(MENDS)('$name, $title', ({ text, code, place, fix }) => {
    const before = new Set(check(text).problems.map(short));
    const mended = apply(text, fix);
    const { problems, language } = check(mended);
    expect(
      language.filter((f) => f.severity === 'error').map((f) => f.what),
      mended,
    ).toEqual([]);
    expect(
      problems.filter((p) => p.code === code && p.place === place).map((p) => p.what),
      mended,
    ).toEqual([]);
    expect(
      problems.filter((p) => !before.has(short(p))).map((p) => p.what),
      mended,
    ).toEqual([]);
  });

  it.each(MENDS)('with figures too: $name, $title', ({ text, code, place, fix }) => {
    const before = new Set(check(text, 'figures').problems.map((p) => p.code));
    const { problems } = check(apply(text, fix), 'figures');
    expect(problems.filter((p) => p.code === code && p.place === place).map((p) => p.what)).toEqual([]);
    // `110 mbar` for `110`, or a working port plugged, is as offered, though the machine then does not run: CYCLE tells that.
    expect(problems.filter((p) => !before.has(p.code) && p.code !== 'CYCLE').map((p) => `${p.code} ${p.what}`)).toEqual([]);
  });

  it('keep the style of the text: columns, indentation, line ends', () => {
    const { text } = faulty('A01');
    const crlf = text.replace(/\n/g, '\r\n');
    for (const one of [text, crlf]) {
      const fix = check(one).problems[0]!.fixes[0]!;
      const lines = apply(one, fix).split(one === crlf ? '\r\n' : '\n');
      expect(lines).toContain('relief    RV1 (set 190 bar, passes 15 L/min at 5 bar)');
      expect(lines).toContain('working P1.P to RV1');
      expect(lines).toContain('return  RV1 to R1');
      expect(lines.some((l) => l.includes('\r') || l.includes('\n'))).toBe(false);
    }
  });

  it('take a constant of the text where one fits, and free names', () => {
    const { text } = faulty('A01');
    const own = edited(text, [
      ['fluid     HM46', 'let system = 150 bar\nlet clamping = 40 bar\nfluid     HM46'],
      ['filter    F1 (', 'gauge     RV1 (range 0 bar to 250 bar)\nfilter    F1 ('],
      ['working P1 to V1.P', 'working P1 to V1.P, RV1'],
    ]);
    const fix = check(own).problems[0]!.fixes[0]!;
    expect(fix.title).toBe('Insert relief RV2 at P1.P, set system (the constant system), with a line to R1');
    expect(apply(own, fix)).toContain('relief    RV2 (set system, passes 15 L/min at 5 bar)');
  });

  it('write in the units of the text', () => {
    const { text } = faulty('A01');
    const us = edited(text, [
      ['displacement 10 cm3/rev', 'displacement 0.61 in3/rev'],
      ['P1 (displacement 0.61 in3/rev, driven by M1, rated 210 bar', 'P1 (displacement 0.61 in3/rev, driven by M1, rated 3000 psi'],
      ['passes 30 L/min at 4 bar', 'passes 8 gpm at 60 psi'],
      ['rated 210 bar, code "1.0"', 'rated 3000 psi, code "1.0"'],
      ['passes 60 L/min at 0.3 bar, bypass 1.7 bar', 'passes 16 gpm at 5 psi, bypass 25 psi'],
    ]);
    const fix = check(us).problems[0]!.fixes[0]!;
    expect(apply(us, fix)).toContain('relief    RV1 (set 2700 psi, passes 4 gpm at 73 psi)');
  });

  it('a mend that a person must decide is not offered: a relief inside a chain of several pumps', () => {
    const { text } = faulty('A10');
    const chained = edited(text, [
      ['suction R1 to P1\n', ''],
      ['working P1 to RV1, V1.P, BV1', 'working R1 to P1 to RV1, V1.P, BV1'],
    ]);
    const a10 = check(chained).problems.find((p) => p.code === 'A10')!;
    expect(a10.fixes.map((f) => f.title)).toEqual(['Insert check valve CV1 at the outlet of P1']);
    expect(apply(chained, a10.fixes[0]!)).toContain('working R1 to P1 to CV1 to RV1, V1.P, BV1');
  });
});
