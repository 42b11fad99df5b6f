/** Rules of control, ports, drains and codes in the forms the faulty samples do not show. */
import { describe, expect, it } from 'vitest';
import { apply, check, edited, faulty, short } from './support.ts';

const found = (code: string, edits: readonly (readonly [string, string])[], from = code) => {
  const text = edited(faulty(from).text, edits);
  const { language, findings } = check(text);
  expect(
    language.filter((f) => f.severity === 'error').map((f) => f.what),
    text,
  ).toEqual([]);
  return { text, all: findings.filter((f) => f.code === code) };
};

describe('F17, both coils', () => {
  const ONE: readonly [string, string] = ['energise SOL1, SOL2 for 3 s', 'energise SOL1 for 3 s'];
  it.each([
    [
      'in a meanwhile line',
      [ONE, ['for 3 s', 'for 3 s\n  meanwhile Beside energise SOL2 for 1 s']],
      'step Turn.Over and meanwhile Turn.Beside',
    ],
    [
      'in a while line that is true for certain',
      [ONE, ['cycle Turn {', 'cycle Turn {\n  while Turn energise SOL2']],
      'step Turn.Over and a while line',
    ],
    [
      'in a while line by one of several',
      [ONE, ['cycle Turn {', 'cycle Turn {\n  while Turn.Over or Turn.Back energise SOL2']],
      'a while line',
    ],
  ] as const)('%s', (_, edits, words) => {
    const { all } = found('F17', edits);
    expect(all.map(short)).toEqual(['F17 V1 in Turn.Over']);
    expect(all[0]!.what).toContain(words);
  });

  it('kept by an emergency stop', () => {
    const { all } = found('F17', [ONE, ['load C1', 'emergency stop M1 energise SOL1, SOL2\nload C1']]);
    expect(all.map(short)).toEqual(['F17 V1 in STOP']);
  });

  it.each([
    ['an interlock lets one live only while the other is dead', [['load C1', 'interlock SOL1 needs SOL2 off\nload C1']]],
    ['a while line of another step', [ONE, ['cycle Turn {', 'cycle Turn {\n  while Turn.Back energise SOL2']]],
    ['the same coil twice', [ONE, ['energise SOL1 for 3 s', 'energise SOL1 for 3 s\n  meanwhile Beside energise SOL1 for 1 s']]],
  ] as const)('silent: %s', (_, edits) => {
    expect(found('F17', edits).all.map((f) => f.what)).toEqual([]);
  });
});

describe('L04, steps without an end', () => {
  it('ends at once, and the mend names what the step moves', () => {
    const { text, all } = found('L04', [['energise SOL1 until LS1 on', 'energise SOL1 "Gate out"']]);
    expect(all[0]!.what).toBe('Step Gate.Out ends at once: it has neither `until` nor `for`, so SOL1 is live for no time.');
    const mended = apply(text, all[0]!.fixes[0]!);
    expect(mended).toContain('energise SOL1 until C1 extended, at most 10 s "Gate out"');
    expect(check(mended).findings.filter((f) => f.code === 'L04')).toEqual([]);
  });

  it('a valve that moves nothing plain: a time', () => {
    const { text, all } = found('L04', [
      ['energise SOL1 until LS1 on', 'energise SOL0'],
      ['filter    F1 (', 'directional V0 (2/2, normally open, coil a SOL0, passes 20 L/min at 3 bar)\nfilter    F1 ('],
      ['working P1 to RV1, V1.P', 'working P1 to RV1, V1.P, V0.P\nreturn V0.A to R1'],
    ]);
    expect(apply(text, all[0]!.fixes[0]!)).toContain('energise SOL0 for 1 s');
  });

  it.each([
    [
      'a ramp ends it',
      [
        ['energise SOL1 until LS1 on', 'energise SOL1 at 50 % over 2 s'],
        ['centre tandem', 'proportional, centre tandem'],
      ],
    ],
    ['no coil is live', [['energise SOL1 until LS1 on', 'until LS1 on']]],
    ['at least so long and until, with a limit', [['until LS1 on', 'for 0.5 s and until LS1 on, at most 4 s']]],
  ] as const)('silent: %s', (_, edits) => {
    expect(found('L04', edits).all.map((f) => f.what)).toEqual([]);
  });
});

describe('H14, open ports', () => {
  it('a component joined to nothing is told once', () => {
    const { all } = found('H14', [
      ['filter    F1 (', 'check     CV1 (crack 0.5 bar)\nfilter    F1 ('],
      ['working V1.A to C1.cap', 'working V1.A to C1.cap\nplug V1.B'],
    ]);
    expect(all.map((f) => f.what)).toEqual(['CV1 (check valve) is joined to nothing: CV1.in and CV1.out are open.']);
  });

  it('an external pilot must be joined, a drain that is only there if used need not', () => {
    const { all } = found('H14', [
      ['filter    F1 (', 'directional V2 (2/2, normally open, external pilot, passes 20 L/min at 3 bar)\nfilter    F1 ('],
      ['working P1 to RV1, V1.P', 'working P1 to RV1, V1.P, V2.P\nreturn V2.A to R1'],
      ['working V1.A to C1.cap', 'working V1.A to C1.cap\nplug V1.B'],
    ]);
    expect(all.map(short)).toEqual(['H14 V2.X']);
  });

  it('a return port is offered the reservoir before a plug', () => {
    const { text, all } = found('H14', [
      ['return  V1.T to F1 to R1\n', ''],
      ['working V1.A to C1.cap', 'working V1.A to C1.cap\nplug V1.B'],
      ['filter    F1 (passes 60 L/min at 0.3 bar, bypass 1.7 bar)\n', ''],
    ]);
    expect(all.map(short)).toEqual(['H14 V1.T']);
    expect(all[0]!.fixes.map((f) => f.title)).toEqual(['Lead V1.T to R1', 'Plug V1.T: it is meant to be closed']);
    expect(apply(text, all[0]!.fixes[0]!)).toContain('return  V1.T to R1');
  });
});

describe('F05, drains', () => {
  it.each([
    [
      'behind a shut-off',
      [
        ['plug    SV1.Y', 'drain SV1.Y to BV1 to R1'],
        ['filter    F1 (', 'shutoff BV1 (open)\nfilter    F1 ('],
      ],
      'error',
      'BV1 may be closed by hand',
    ],
    ['leading nowhere', [['plug    SV1.Y', 'drain SV1.Y to C1.rod']], 'error', ''],
    [
      'through a preload check',
      [
        ['plug    SV1.Y', 'drain SV1.Y to CV1 to R1'],
        ['filter    F1 (', 'check CV1 (crack 3 bar)\nfilter    F1 ('],
      ],
      'warning',
      'goes through CV1',
    ],
    [
      'internal, with a consumer behind',
      [
        ['plug    SV1.Y\n', ''],
        ['set 70 bar, reverse check', 'set 70 bar, internal drain, reverse check'],
      ],
      'warning',
      'drains internally into SV1.A',
    ],
  ] as const)('%s', (_, edits, severity, words) => {
    const { all } = found('F05', edits);
    expect(all.map((f) => f.severity)).toEqual([severity]);
    expect(all[0]!.what).toContain(words);
  });

  it('several plugged ports in one statement: only the drain leaves it', () => {
    const { text, all } = found('F05', [['plug    SV1.Y', 'plug    V1.X, SV1.Y // closed']]);
    const mended = apply(text, all[0]!.fixes[0]!);
    expect(mended).toContain('plug    V1.X // closed\ndrain SV1.Y to R1\n');
  });
});

describe('B02 with an accumulator', () => {
  it('one pump that is unloaded into an accumulator circuit, sensed on its own side', () => {
    const { all } = found(
      'B02',
      [
        ['working P1 to RV1, V1.P, BV1', 'working P1 to UV1, CV1\nworking CV1 to RV1, V1.P, BV1\npilot P1.P to UV1.X\nreturn UV1 to R1'],
        ['filter    F1 (', 'check CV1\nunloading UV1 (set 110 bar, closes 90 bar, passes 30 L/min at 3 bar)\nfilter    F1 ('],
      ],
      'A10',
    );
    expect(all.map(short)).toEqual(['B02 UV1']);
    expect(all[0]!.what).toContain('It must sense the pressure at ACC1.P');
  });
});

describe('M01, designations', () => {
  it('twins share one code: told at the second, without a mend', () => {
    const { all } = found('M01', [
      ['code "1.1") "Right chuck"', 'code "2.1") "Right chuck"'],
      ['filter    F1 (', 'gauge     G1, G2 (range 0 bar to 100 bar, code "0.9")\nfilter    F1 ('],
      ['working V1.A to C1.cap', 'working V1.A to C1.cap, G1, G2'],
    ]);
    expect(all.map(short)).toEqual(['M01 G2']);
    expect(all[0]!.fixes).toEqual([]);
  });

  it('the next free number is offered', () => {
    const { text, all } = found('M01', [['code "2.0"', 'code "1.2"']]);
    expect(all[0]!.fixes.map((f) => f.title)).toEqual(['Number V2 1.3']);
    expect(check(apply(text, all[0]!.fixes[0]!)).problems).toEqual([]);
  });
});

describe('D01, nothing said of the load', () => {
  it('a cylinder that is not level is told for information; `inward 0 N` answers it', () => {
    const edits: readonly (readonly [string, string])[] = [['mass 1.5 t, friction 300 N, people near', 'friction 300 N']];
    expect(found('D01', edits).all.map((f) => `${f.severity} ${short(f)}`)).toEqual(['information D01 C1']);
    expect(found('D01', [['mass 1.5 t, friction 300 N, people near', 'friction 300 N, inward 0 N']]).all).toEqual([]);
    expect(found('D01', [...edits, ['attitude rod up', 'attitude level']]).all).toEqual([]);
  });

  it('no mend is offered where there is no other side to pilot from', () => {
    const { all } = found('D01', [
      ['rod 36 mm, stroke 500 mm', 'single cap, stroke 500 mm'],
      ['working V1.B to C1.rod', 'plug V1.B'],
      ['energise SOL2 until C1 retracted', 'energise SOL2'],
    ]);
    expect(all.map((f) => f.severity)).toEqual(['error']);
    expect(all[0]!.fixes).toEqual([]);
  });
});
