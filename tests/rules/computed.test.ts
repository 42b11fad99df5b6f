/** What only figures can tell: each branch of the computed rules, from faulty samples with one more thing changed. */
import { describe, expect, it } from 'vitest';
import { apply, check, edited, faulty, short } from './support.ts';

const problems = (code: string, edits: readonly (readonly [string, string])[], from = code) => {
  const text = edited(faulty(from).text, edits);
  const { language, problems: all } = check(text, 'figures');
  expect(
    language.filter((f) => f.severity === 'error').map((f) => f.what),
    text,
  ).toEqual([]);
  return all.filter((p) => p.code === code);
};
const told = (code: string, edits: readonly (readonly [string, string])[], from?: string) =>
  problems(code, edits, from).map((p) => `${p.severity} ${short(p)}: ${p.what}`);

describe('A04, setting below the need', () => {
  it('hardly anything to spare is told too', () => {
    // 30.3 kN with the friction of the seals takes (30300 + 3 bar x 3117 mm2 / 10) / 3117 mm2 = 100 bar, before losses.
    const [one] = told('A04', [['set 60 bar', 'set 101 bar']]);
    expect(one).toContain('hardly anything to spare');
  });

  it('a reducing valve in between is named, not the relief', () => {
    const found = told('A04', [
      ['set 60 bar', 'set 150 bar'],
      ['working V1.A to C1.cap', 'working V1.A to PR1.P\nworking PR1.A to C1.cap\ndrain PR1.Y to R1'],
      ['filter    F1 (', 'reducing  PR1 (set 70 bar, relieving yes, reverse check, passes 30 L/min at 4 bar)\nfilter    F1 ('],
    ]);
    expect(found).toHaveLength(1);
    expect(found[0]).toMatch(/^warning A04 PR1 in Punch.Through: PR1 \(70 bar\) is set too low/);
  });

  it('the mend raises the setting, within what the parts bear', () => {
    const { text } = faulty('A04');
    const [one] = problems('A04', []);
    expect(one!.fixes.map((f) => f.title)).toEqual(['Set RV1 to 105 bar']);
    expect(check(apply(text, one!.fixes[0]!), 'figures').problems.map((p) => p.what)).toEqual([]);
    expect(problems('A04', [['rated 210 bar, code "1.0"', 'rated 100 bar, code "1.0"']])[0]!.fixes).toEqual([]);
    expect(
      problems('A04', [
        ['set 60 bar', 'set low'],
        ['fluid     HM46', 'let low = 60 bar\nfluid     HM46'],
      ])[0]!.fixes,
    ).toEqual([]);
  });

  it('too weak to begin with, at the stop it starts from', () => {
    expect(told('A04', [['resist 30 kN from 60 mm to 90 mm extending', 'resist 30 kN extending']])[0]).toContain('C1 stalls at 0 mm');
  });

  it('the worst point of several is told once', () => {
    expect(
      told('A04', [
        [
          'resist 30 kN from 60 mm to 90 mm extending',
          'resist 25 kN from 60 mm to 90 mm extending, resist 40 kN from 20 mm to 50 mm extending',
        ],
      ]),
    ).toHaveLength(1);
  });

  it('a compensated pump is named with its setting', () => {
    const found = told('A04', [
      ['driven by M1, rated 210 bar', 'driven by M1, compensator 60 bar, rated 210 bar'],
      ['set 60 bar', 'set 75 bar'],
      ['centre tandem', 'centre closed'],
    ]);
    expect(found).toHaveLength(1);
    expect(found[0]).toContain('P1 (60 bar) is set too low');
  });
});

describe('A09, loaded at rest', () => {
  it('one position of a detent valve is enough, and is named', () => {
    const found = told('A09', [
      ['centre closed', 'centre tandem'],
      [
        'filter    F1 (',
        'directional V2 (4/2, detent, coil a SOL3, coil b SOL4, a (P to T), b (P to A), passes 40 L/min at 4 bar)\nfilter    F1 (',
      ],
      ['working P1 to RV1, V1.P', 'working P1 to RV1, V2.P\nworking V2.A to V1.P\nreturn V2.T to R1\nplug V2.B'],
      ['V1 (4/3, centre tandem', 'V1 (4/3, centre closed'],
      ['energise SOL1 until', 'energise SOL1, SOL4 until'],
    ]);
    expect(found).toHaveLength(1);
    expect(found[0]).toMatch(/in REST \(.*V2/);
  });

  it('a pump without a relief has no figure to tell', () => {
    const found = told('A09', [['return  RV1 to R1', 'plug RV1.T']]);
    expect(found).toEqual([]);
  });

  it('a stopped drive is not idling: OFF is not looked at', () => {
    expect(problems('A09', []).map((p) => p.state)).toEqual(['REST']);
  });
});

describe('B03, the unloading valve opens too early', () => {
  it('open in every step that moves', () => {
    const found = told('B03', [
      ['set 170 bar, closes 150 bar', 'set 6 bar, closes 4 bar'],
      ['resist 20 kN extending', 'resist 60 kN'],
    ]);
    expect(found).toHaveLength(1);
    expect(found[0]).toMatch(/^warning B03 UV1: UV1 is open in every step that moves/);
  });
  it('only the band is cut: a warning', () => {
    const found = told('B03', [['set 170 bar, closes 150 bar', 'set 150 bar, closes 130 bar']]);
    expect(found[0]).toMatch(/^warning B03 UV1: UV1 is set 150 bar and does not open fully \(that takes 165 bar\)/);
  });
});

describe('D01, the load moves', () => {
  const FLOAT: readonly [string, string] = ['centre tandem', 'centre (P to T, A to T, B to T)'];

  it('before the figures are there the way is told, then the motion, both as an error', () => {
    const text = edited(faulty('D01').text, [FLOAT]);
    const before = check(text).problems.filter((p) => p.code === 'D01');
    expect(before.map((p) => `${p.severity} ${short(p)}`)).toEqual(['error D01 C1 in OFF']);
    expect(before[0]!.what).toContain('runs to the reservoir by way of FC1, V1 (A to T, position centre), F1');
    const after = check(text, 'figures').problems.filter((p) => p.code === 'D01');
    expect(after.map((p) => `${p.severity} ${short(p)}`)).toEqual(['error D01 C1 in OFF']);
    expect(after[0]!.what).toMatch(/moves under its load \(14700 N, 47\.2 bar at C1\.cap\) in OFF .*mm\/s/);
  });

  it('with nobody ever there it is a warning', () => {
    expect(told('D01', [FLOAT, ['people near', 'people never']])[0]).toMatch(/^warning D01/);
  });

  it('held by the spool, with nobody declared: a warning', () => {
    expect(told('D01', [[', people near', '']])[0]).toMatch(/^warning D01 C1: Only V1, which leaks/);
  });

  it('a load pulling outward is carried by the rod side', () => {
    const found = told('D01', [['attitude rod up', 'attitude rod down']]);
    expect(found[0]).toContain('at C1.rod');
  });

  it('two cylinders of one body share the load', () => {
    const found = told('D01', [
      ['cylinder  C1 (', 'cylinder  C1, C2 ('],
      [', code "1.0") "Platform"', ')'],
      ['working C1.cap to FC1 to V1.A', 'working C1.cap, C2.cap to FC1 to V1.A'],
      ['working V1.B to C1.rod', 'working V1.B to C1.rod, C2.rod'],
      ['load C1 (mass 1.5 t', 'load C1 with C2 (mass 3 t'],
    ]);
    expect(found).toHaveLength(2);
    expect(found[0]).toContain('14700 N');
  });

  it('a motor that its load turns back', () => {
    const base: readonly (readonly [string, string])[] = [
      [
        'cylinder  C1 (bore 63 mm, rod 36 mm, stroke 500 mm, attitude rod up, rated 210 bar, code "1.0") "Platform"',
        'motor     HM1 (displacement 100 cm3/rev, fastest 300 rpm)',
      ],
      ['working C1.cap to FC1 to V1.A', 'working V1.A to HM1.A'],
      ['throttle  FC1 (set 8 L/min, compensated, reverse check) "Lowering speed"\n', ''],
      ['working V1.B to C1.rod', 'working V1.B to HM1.B\ndrain HM1.L to R1'],
      ['load C1 (mass 1.5 t, friction 300 N, people near)', 'load HM1 (backward 80 N.m, people near)'],
      ['energise SOL1 until C1 extended', 'energise SOL1'],
      ['energise SOL2 until C1 retracted', 'energise SOL2'],
    ];
    expect(told('D01', [...base, FLOAT])[0]).toMatch(/^error D01 HM1 in OFF: HM1 moves under its load \(80 N\.m\)/);
  });
});

describe('E01, metering out', () => {
  it('the point without load is the worst one', () => {
    // Force balance: p rod = (p cap x A cap - seal friction) / A annulus; at no load, 144 bar at the cap, 63/45 mm.
    const [one] = problems('E01', []);
    const cap = 3117.2;
    const annulus = cap - (Math.PI / 4) * 45 * 45;
    const figures = [...one!.what.matchAll(/(\d+) bar/g)].map((m) => Number(m[1]));
    expect(figures[1]).toBe(144);
    // 300 N of friction and 3 bar of seal friction act against the motion.
    const expected = (figures[1]! * cap - 3000 - 3 * cap) / annulus;
    expect(Math.abs(figures[0]! - expected)).toBeLessThan(2);
  });

  it('the hose up to the throttle counts too', () => {
    const found = told('E01', [
      ['rated 210 bar, code "1.0"', 'rated 400 bar, code "1.0"'],
      ['working C1.rod to FC1 to V1.B', 'working C1.rod to FC1 to V1.B (hose, rated 225 bar)'],
    ]);
    expect(found[0]).toContain('the line is rated 225 bar');
  });
});

describe('F07, opens before the first motion is done', () => {
  it('set below what the first actuator needs on its way', () => {
    const found = told('F07', [
      ['set 130 bar', 'set 20 bar'],
      ['load C1 (friction 100 N)', 'load C1 (friction 100 N, resist 6 kN extending)'],
    ]);
    expect(found).toHaveLength(1);
    expect(found[0]).toMatch(/^error F07 SV1 in Slit.Forward: SV1 \(set 20 bar\) opens in Slit.Forward before C1 has done its motion/);
  });
});

describe('L07, in the steps that wait for it', () => {
  it('below the relief, but the work does not take that much', () => {
    const found = told('L07', [
      ['rises 140 bar, falls 120 bar', 'rises 100 bar, falls 90 bar'],
      ['resist 12 kN from 90 mm to 140 mm extending', 'resist 12 kN from 90 mm to 150 mm extending'],
      ['until PS1 on, at most 20 s', 'until PS1 on and LS1 on, at most 20 s'],
      ['filter    F1 (', 'switch    LS1 (on C1, from 0 mm to 5 mm)\nfilter    F1 ('],
    ]);
    expect(found).toEqual([]);
  });

  it('on as soon as the step begins', () => {
    const found = told('L07', [['rises 140 bar, falls 120 bar', 'rises 3 bar, falls 2 bar']]);
    expect(found[0]).toMatch(/^warning L07 PS1 in Bush.Press: PS1 \(3 bar\) is on as soon as Bush.Press begins/);
  });

  it('behind a reducing valve the reducing valve limits', () => {
    const found = told('L07', [
      ['rises 140 bar, falls 120 bar', 'rises 80 bar, falls 70 bar'],
      ['working V1.A to C1.cap, PS1', 'working V1.A to PR1.P\nworking PR1.A to C1.cap, PS1\ndrain PR1.Y to R1'],
      ['filter    F1 (', 'reducing  PR1 (set 60 bar, relieving yes, reverse check, passes 30 L/min at 4 bar)\nfilter    F1 ('],
    ]);
    expect(found[0]).toContain('PR1 holds it at 63 bar at most');
  });
});

describe('A03, back pressure counts once it is computed', () => {
  it('a return line that stands under pressure', () => {
    const edits: readonly (readonly [string, string])[] = [
      ['set 200 bar', 'set 170 bar'],
      ['return  RV1 to R1', 'return  RV1 to CV9 to R1'],
      ['filter    F1 (', 'check     CV9 (crack 12 bar)\nfilter    F1 ('],
      ['resist 20 kN extending', 'resist 40 kN extending'],
    ];
    const text = edited(faulty('A03').text, edits);
    expect(check(text).problems.filter((p) => p.code === 'A03')).toEqual([]);
    expect(check(text, 'figures').problems.filter((p) => p.code === 'A03')).toHaveLength(1);
  });
});
