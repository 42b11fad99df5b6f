/** Same cause, one finding; and what is accepted with a reason. */
import { fingerprintOf } from '@oilway/rules';
import { describe, expect, it } from 'vitest';
import { check, edited, faulty, short } from './support.ts';

describe('same cause, one finding', () => {
  it('a plugged relief is told at the relief, and names what it covers', () => {
    const { problems } = check(faulty('A06').text);
    expect(problems.map(short)).toEqual(['A06 RV1']);
    expect(problems[0]!.hides).toEqual(['A01']);
    expect(problems[0]!.related.some((r) => r.message.startsWith('follows from this: A01'))).toBe(true);
  });

  it('a relief whose outlet is left open is A06, not an open port', () => {
    const text = edited(faulty('A06').text, [['plug RV1.T', '']]);
    const { problems } = check(text);
    expect(problems.map(short)).toEqual(['A06 RV1']);
    expect(problems[0]!.hides).toEqual(['A01', 'H14']);
  });

  it('an open drain of a sequence valve is F05, not an open port', () => {
    const text = edited(faulty('F05').text, [['plug    SV1.Y\n', '']]);
    const { problems } = check(text);
    expect(problems.map(short)).toEqual(['F05 SV1']);
    expect(problems[0]!.hides).toEqual(['H14']);
    expect(problems[0]!.fixes.map((f) => f.title)).toEqual(['Lead SV1.Y to R1']);
  });

  it('a check the wrong way round is B06 alone: neither the missing check nor the pump without relief', () => {
    const { problems } = check(faulty('B06').text, 'figures');
    expect(problems.map(short)).toEqual(['B06 CV1']);
    expect(problems[0]!.hides).toContain('A01');
  });

  it('a missing check with two drives is B01, not also A10', () => {
    const text = edited(faulty('B01').text, [
      [
        'drive     M1 (power 5.5 kW, speed 1450 rpm)',
        'drive     M1 (power 5.5 kW, speed 1450 rpm)\ndrive     M2 (power 4 kW, speed 1450 rpm)',
      ],
      ['P2 (displacement 8 cm3/rev, driven by M1', 'P2 (displacement 8 cm3/rev, driven by M2'],
    ]);
    const { problems } = check(text);
    expect(problems.map((p) => p.code)).toEqual(['B01']);
    expect(problems[0]!.hides).toEqual(['A10']);
  });

  it('codes that hide nothing are not listed', () => {
    for (const code of ['A01', 'B01', 'E01'] as const) expect(check(faulty(code).text, 'figures').problems[0]!.hides).toBeUndefined();
  });
});

describe('fingerprints', () => {
  it('stay when lines move and differ between findings', () => {
    const { text } = faulty('A02');
    const moved = `// one line more\n\n${text}`;
    const [a, b] = [check(text).problems, check(moved).problems];
    expect(a.map(fingerprintOf)).toEqual(b.map(fingerprintOf));
    expect(a.map(fingerprintOf)).toEqual(['A02|P1']);
    expect(check(faulty('F17').text).problems.map(fingerprintOf)).toEqual(['F17|V1|Turn.Over']);
  });
});

describe('allow', () => {
  const allowed = (code: string, statement: string) => check(`${faulty(code).text}${statement}\n`, 'figures');

  it.each([
    ['A02', 'allow A02 "Only to rinse the line"'],
    ['A02', 'allow A02 on P1 "Only to rinse the line"'],
    ['A09', 'allow A09 on P1 in REST "Holds the former open"'],
    ['E01', 'allow E01 on C1.rod in Slot.Feed "Tested at 320 bar"'],
    ['E01', 'allow E01 on C1 "Tested at 320 bar"'],
    ['F17', 'allow F17 on V1 in Turn.Over "Double-coil valve made for it"'],
    ['D01', 'allow D01 on C1 "Propped while loaded"'],
  ])('%s is accepted by: %s', (code, statement) => {
    const { findings, problems } = allowed(code, statement);
    expect(problems.map((p) => `${short(p)} ${p.what}`)).toEqual([]);
    const accepted = findings.filter((f) => f.accepted !== undefined);
    expect(accepted.map((f) => f.code)).toEqual([code]);
    expect(accepted[0]!.accepted).toBe(/"(.*)"/.exec(statement)![1]);
  });

  it.each([
    ['A02', 'allow A02 on P1 in Plate.Out "Only then"'],
    ['A09', 'allow A09 on P1 in OFF "Wrong state"'],
    ['A02', 'allow A01 on P1 "Wrong rule"'],
    ['A10', 'allow A10 on CV9x "Wrong place"'],
  ])('%s is not accepted by: %s', (code, statement) => {
    const { problems } = allowed(code, statement);
    expect(problems.map((p) => p.code)).toContain(code);
  });

  it('one that accepts nothing is told once the figures are there, with a fix that takes it out', () => {
    const text = `${faulty('A02').text}allow A09 on P1 "Holds"\n`;
    expect(check(text).findings.filter((f) => f.code === 'ALLOW-UNUSED')).toEqual([]);
    const unused = check(text, 'figures').findings.filter((f) => f.code === 'ALLOW-UNUSED');
    expect(unused.map((f) => f.what)).toEqual(['A09 on P1 is not found: this permission accepts nothing.']);
    expect(unused[0]!.severity).toBe('warning');
    expect(unused[0]!.fixes[0]!.safe).toBe(true);
  });

  it('one for a rule that needs no figures is told as one types', () => {
    const text = `${faulty('A02').text}allow C01 "None here"\n`;
    expect(
      check(text)
        .findings.filter((f) => f.code === 'ALLOW-UNUSED')
        .map((f) => f.what),
    ).toEqual(['C01 is not found: this permission accepts nothing.']);
  });

  it('one for a rule that is not checked says so', () => {
    const { findings } = allowed('A02', 'allow D09 on C1.cap "Small volume"');
    const unused = findings.filter((f) => f.code === 'ALLOW-UNUSED');
    expect(unused.map((f) => [f.severity, f.what])).toEqual([
      ['information', 'No rule D09 is checked here, so this permission accepts nothing.'],
    ]);
  });
});
