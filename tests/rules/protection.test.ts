/** A01, A02 and A06 in every form: what stands between a pump and its relief, and behind the relief. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { apply, check, edited, faulty, short } from './support.ts';

/** A unit with P1 on net `P1.P`, a relief RV1, a consumer; `between` and `lines` say how the relief is reached and drained. */
function unit(declared: readonly string[], lines: readonly string[], relief = 'return  RV1 to R1'): string {
  return `circuit Unit
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 60 L)
drive M1 (power 3 kW, speed 1450 rpm)
drive M2 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 8 cm3/rev, driven by M1, rated 210 bar)
relief RV1 (set 100 bar, passes 40 L/min at 4 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 4 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 200 mm, attitude level, rated 210 bar)
${declared.join('\n')}
suction R1 to P1
working P1.P to V1.P
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T to R1
${lines.join('\n')}
${relief}
`;
}

const told = (text: string): string[] => {
  const { language, problems } = check(text);
  expect(
    language.filter((f) => f.severity === 'error').map((f) => f.what),
    text,
  ).toEqual([]);
  return problems.map((p) => `${p.severity} ${short(p)}`);
};
/** Every mend offered for these findings cures its own and brings no other. */
function cured(text: string): number {
  const { problems } = check(text);
  const before = new Set(problems.map(short));
  let mends = 0;
  for (const finding of problems) {
    for (const fix of finding.fixes) {
      mends++;
      const mended = apply(text, fix);
      const after = check(mended);
      expect(
        after.language.filter((f) => f.severity === 'error').map((f) => f.what),
        mended,
      ).toEqual([]);
      expect(after.problems.map(short), mended).not.toContain(short(finding));
      expect(
        after.problems.map(short).filter((p) => !before.has(p)),
        mended,
      ).toEqual([]);
    }
  }
  return mends;
}
const word = (text: string, code: string) => check(text).problems.find((p) => p.code === code)?.what ?? '';

describe('no relief in reach: A01', () => {
  it.each([
    ['none at all', [], []],
    [
      'an unloading valve is no relief',
      ['unloading UV1 (set 60 bar, passes 40 L/min at 4 bar)'],
      ['working P1.P to UV1', 'pilot P1.P to UV1.X', 'return UV1 to R1'],
    ],
    ['a throttle to the reservoir is no relief', ['throttle FC1 (set 5 L/min, compensated)'], ['working P1.P to FC1', 'return FC1 to R1']],
    [
      'a sequence valve to the reservoir is no relief',
      ['sequence SV1 (set 60 bar)'],
      ['working P1.P to SV1', 'return SV1 to R1', 'drain SV1.Y to R1'],
    ],
    ['a pressure switch is no relief', ['switch PS1 (rises 90 bar, falls 80 bar)'], ['working P1.P to PS1']],
    [
      'a relief at the other pump, behind its check',
      ['pump P2 (displacement 4 cm3/rev, driven by M1)', 'check CV1', 'relief RV2 (set 90 bar, passes 20 L/min at 4 bar)'],
      ['suction R1 to P2', 'working P2 to RV2, CV1.in', 'working CV1.out to P1.P', 'return RV2 to R1'],
    ],
    [
      'a relief behind a pilot-operated check, against its flow',
      ['pilotcheck PC1 (ratio 3:1)', 'relief RV2 (set 90 bar, passes 20 L/min at 4 bar)'],
      ['working P1.P to PC1.C', 'working PC1.V to RV2', 'pilot V1.B to PC1.X', 'return RV2 to R1'],
    ],
  ] as const)('%s', (_, declared, lines) => {
    const text = unit(declared, lines, '').replace(/^relief RV1.*\n/m, '');
    expect(told(text)).toContain('error A01 P1');
    expect(told(text).filter((t) => t.includes('A02') || t.includes('A06'))).toEqual([]);
    expect(cured(text)).toBeGreaterThan(0);
  });

  it('a relief behind a check that faces the other way is named with the check', () => {
    const text = unit(['check CV1'], ['working P1.P to CV1.out', 'working CV1.in to RV1']);
    expect(told(text)).toEqual(['error A01 P1']);
    expect(word(text, 'A01')).toContain('RV1 stands behind CV1, against its flow');
  });

  it('each pump without a relief is told once', () => {
    const text = unit(['pump P2 (displacement 4 cm3/rev, driven by M1)'], ['suction R1 to P2', 'working P2 to P1.P'], '').replace(
      /^relief RV1.*\n/m,
      '',
    );
    expect(told(text)).toEqual(['error A01 P1', 'error A01 P2']);
  });
});

describe('only through something that can close: A02', () => {
  it.each([
    [
      'directional valve, open at rest',
      'error',
      ['directional V2 (2/2, normally open, coil a SOL3, passes 40 L/min at 2 bar)'],
      ['working P1.P to V2.P', 'working V2.A to RV1'],
      'only while V2 joins P to A (position open)',
    ],
    [
      'directional valve, open when energised',
      'error',
      ['directional V2 (2/2, normally closed, coil a SOL3, passes 40 L/min at 2 bar)'],
      ['working P1.P to V2.P', 'working V2.A to RV1'],
      'with V2 in closed',
    ],
    ['directional valve, in one position of three', 'error', [], ['working V1.B to RV1'], 'with V1 in a or centre'],
    [
      'a valve that joins in every position may stick between them',
      'error',
      ['directional V2 (4/2, detent, coil a SOL3, coil b SOL4, a (P to A, B to T), b (P to A, A to B), passes 40 L/min at 2 bar)'],
      ['working P1.P to V2.P', 'working V2.A to RV1', 'return V2.T to R1', 'plug V2.B'],
      'on its way between two positions',
    ],
    ['shut-off open', 'warning', ['shutoff BV1 (open)'], ['working P1.P to BV1 to RV1'], 'only while BV1 is open'],
    ['shut-off closed', 'error', ['shutoff BV1 (closed)'], ['working P1.P to BV1 to RV1'], 'it is declared closed'],
    ['quick coupling', 'error', ['coupling Q1 (seals both)'], ['working P1.P to Q1 to RV1'], 'with Q1 closed'],
    ['filter without bypass', 'error', ['filter F1 (passes 40 L/min at 1 bar, bypass none)'], ['working P1.P to F1 to RV1'], 'F1'],
    ['sequence valve', 'error', ['sequence SV1 (set 60 bar)'], ['working P1.P to SV1 to RV1', 'drain SV1.Y to R1'], 'SV1'],
    ['reducing valve', 'error', ['reducing PR1 (set 60 bar, relieving yes)'], ['working P1.P to PR1 to RV1', 'drain PR1.Y to R1'], 'PR1'],
    ['hose-burst valve', 'error', ['burst HB1 (closes 30 L/min)'], ['working P1.P to HB1.V', 'working HB1.C to RV1'], 'HB1'],
    [
      'shut-off and directional valve',
      'error',
      ['shutoff BV1 (open)', 'directional V2 (2/2, normally open, coil a SOL3, passes 40 L/min at 2 bar)'],
      ['working P1.P to BV1 to V2.P', 'working V2.A to RV1'],
      'BV1 is open and V2 joins P to A',
    ],
  ] as const)('%s', (_, severity, declared, lines, words) => {
    const text = unit(declared, lines);
    expect(told(text)).toEqual([`${severity} A02 P1`]);
    expect(cured(text)).toBeGreaterThan(0);
    expect(word(text, 'A02')).toContain(words);
  });

  it('the easiest way decides: a shut-off beside a directional valve is a warning', () => {
    const text = unit(['shutoff BV1 (open)'], ['working V1.A to RV1', 'working P1.P to BV1', 'working BV1.B to V1.A']);
    expect(told(text)).toEqual(['warning A02 P1']);
  });
});

describe('pumps with a compensator: A07', () => {
  const compensated = (text: string) => text.replace('driven by M1, rated 210 bar', 'driven by M1, compensator 80 bar, rated 210 bar');

  it('no relief in reach: a warning, an error with people near', () => {
    const none = compensated(unit([], [], '').replace(/^relief RV1.*\n/m, ''));
    expect(told(none)).toEqual(['warning A07 P1']);
    expect(cured(none)).toBe(1);
    expect(told(`${none}load C1 (friction 100 N, people near)\n`)).toEqual(['error A07 P1']);
    expect(word(`${none}load C1 (friction 100 N, people near)\n`, 'A07')).toContain('People are near C1.');
  });

  it('only through something that can close', () => {
    const text = compensated(unit(['shutoff BV1 (open)'], ['working P1.P to BV1 to RV1']));
    expect(told(text)).toEqual(['warning A07 P1']);
    expect(word(text, 'A07')).toContain('RV1 protects P1 only while BV1 is open');
  });

  it('with a sure relief nothing is said', () => {
    expect(told(compensated(unit([], ['working P1.P to RV1'])))).toEqual([]);
  });

  it('a relief without a way to the reservoir is A06 alone', () => {
    expect(told(compensated(unit([], ['working P1.P to RV1'], 'plug RV1.T')))).toEqual(['error A06 RV1']);
  });
});

describe('behind the relief: A06', () => {
  it.each([
    ['T plugged', [], [], 'plug RV1.T', 'RV1.T is plugged'],
    ['T open', [], [], '', 'RV1.T is open'],
    ['shut-off', ['shutoff BV1 (open)'], [], 'return RV1 to BV1 to R1', 'BV1 may be closed by hand'],
    ['quick coupling', ['coupling Q1 (seals both)'], [], 'return RV1 to Q1 to R1', 'Q1 may be parted'],
    [
      'directional valve',
      ['directional V2 (2/2, normally open, coil a SOL3, passes 40 L/min at 2 bar)'],
      [],
      'return RV1 to V2 to R1',
      'V2 joins P to A only in position open',
    ],
    ['filter without bypass', ['filter F1 (passes 40 L/min at 1 bar, bypass none)'], [], 'return RV1 to F1 to R1', 'F1 has no bypass'],
    ['cooler alone', ['cooler K1 (power 0.1 kW/K)'], [], 'return RV1 to K1 to R1', 'K1, which has no check valve beside it'],
    ['check against its flow', ['check CV1'], [], 'return RV1.T to CV1.out\nreturn CV1.in to R1', 'leads to no reservoir'],
  ] as const)('%s', (_, declared, lines, relief, words) => {
    const text = unit(declared, ['working P1.P to RV1', ...lines], relief);
    expect(told(text)).toEqual(['error A06 RV1']);
    expect(word(text, 'A06')).toContain(words);
    cured(text);
  });

  it.each([
    ['return filter with bypass', ['filter F1 (passes 40 L/min at 1 bar, bypass 2 bar)'], 'return RV1 to F1 to R1'],
    ['preload check', ['check CV1 (crack 3 bar)'], 'return RV1 to CV1 to R1'],
    ['locked shut-off', ['shutoff BV1 (open, locked)'], 'return RV1 to BV1 to R1'],
    ['cooler with a check beside it', ['cooler K1 (power 0.1 kW/K)', 'check CV1 (crack 2 bar)'], 'return RV1 to K1, CV1 to R1'],
  ] as const)('%s is clean', (_, declared, relief) => {
    expect(told(unit(declared, ['working P1.P to RV1'], relief))).toEqual([]);
  });
});

describe('chains of any length', () => {
  interface Link {
    readonly name: string;
    readonly declare: (id: string) => string;
    readonly inlet: string;
    readonly outlet: string;
    readonly more: (id: string) => string;
    readonly class: 'always' | 'hand' | 'closable' | 'never';
  }
  const link = (kind: string, prefix: string, properties: string, inlet: string, outlet: string, cls: Link['class'], more = ''): Link => ({
    name: `${kind} ${inlet}>${outlet}`,
    declare: (id) => `${kind} ${prefix}${id} ${properties}`,
    inlet: `${prefix}#.${inlet}`,
    outlet: `${prefix}#.${outlet}`,
    more: (id) => more.replaceAll('#', id),
    class: cls,
  });
  // Written apart from the table of the rules: what a fitter would say of each.
  const LINKS: readonly Link[] = [
    link('check', 'CK', '', 'in', 'out', 'always'),
    link('check', 'CR', '', 'out', 'in', 'never'),
    link('shutoff', 'BL', '(open, locked)', 'A', 'B', 'always'),
    link('shutoff', 'BO', '(open)', 'B', 'A', 'hand'),
    link('filter', 'FB', '(passes 40 L/min at 1 bar, bypass 3 bar)', 'in', 'out', 'always'),
    link('filter', 'FN', '(passes 40 L/min at 1 bar, bypass none)', 'in', 'out', 'closable'),
    link('throttle', 'TH', '(orifice 2 mm)', 'in', 'out', 'always'),
    link('cooler', 'KL', '(power 0.1 kW/K)', 'in', 'out', 'always'),
    link('coupling', 'QC', '(seals both)', 'A', 'B', 'closable'),
    link('pilotcheck', 'PV', '(ratio 3:1)', 'V', 'C', 'always', 'pilot V1.B to PV#.X'),
    link('pilotcheck', 'PR', '(ratio 3:1)', 'C', 'V', 'never', 'pilot V1.B to PR#.X'),
    link('directional', 'DV', '(2/2, normally open, lever, passes 40 L/min at 2 bar)', 'P', 'A', 'closable'),
  ];

  it('A01 where one link is never open, A02 where one can close, else clean', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom(...LINKS), { minLength: 0, maxLength: 6 }), (chain) => {
        const ports = chain.map((l, i) => ({ in: l.inlet.replace('#', String(i)), out: l.outlet.replace('#', String(i)) }));
        const stops = ['P1.P', ...ports.flatMap((p) => [p.in, p.out]), 'RV1.P'];
        const lines: string[] = [];
        for (let i = 0; i < stops.length; i += 2) lines.push(`working ${stops[i]} to ${stops[i + 1]}`);
        const text = unit(
          chain.map((l, i) => l.declare(String(i))),
          [...lines, ...chain.map((l, i) => l.more(String(i))).filter((m) => m !== '')],
        );
        const classes = chain.map((l) => l.class);
        const expected = classes.includes('never')
          ? ['error A01 P1']
          : classes.includes('closable')
            ? ['error A02 P1']
            : classes.includes('hand')
              ? ['warning A02 P1']
              : [];
        expect(told(text), text).toEqual(expected);
      }),
      { numRuns: 150 },
    );
  });
});

describe('two pumps', () => {
  it('protected through the check of the other pump, not against it', () => {
    const pumps = ['pump P2 (displacement 4 cm3/rev, driven by M1)', 'check CV1'];
    const right = unit(pumps, ['suction R1 to P2', 'working P2 to CV1.in', 'working CV1.out to P1.P, RV1']);
    expect(told(right)).toEqual([]);
    const wrong = unit(pumps, ['suction R1 to P2', 'working P2 to CV1.in, RV1', 'working CV1.out to P1.P']);
    expect(told(wrong)).toEqual(['error A01 P1']);
  });

  it('a relief on the way that only the other pump opens: the pilot valve it shifts is closable', () => {
    const text = unit(
      [
        'pump P2 (displacement 4 cm3/rev, driven by M2)',
        'relief RV2 (set 90 bar, passes 20 L/min at 4 bar)',
        'directional V2 (2/2, normally closed, external pilot, passes 40 L/min at 2 bar)',
      ],
      ['suction R1 to P2', 'working P2 to RV2', 'return RV2 to R1', 'pilot P2.P to V2.X', 'working P1.P to V2.P', 'working V2.A to RV1'],
    );
    const problems = check(text).problems.map((p) => `${p.severity} ${short(p)}`);
    expect(problems).toContain('error A02 P1');
  });
});

describe('missing check between two pumps: B01 in every form', () => {
  const base = faulty('B01').text;
  const common: readonly [string, string] = ['working pressure: P1, P2 to UV1, RV1, V1.P', ''];
  it.each([
    ['joined by a line of their own', [[common[0], 'working P1 to UV1\nworking P2 to RV1, V1.P\nworking P1.P to P2.P']]],
    ['joined by line names', [[common[0], 'working low: P1 to UV1\nworking high: P2 to RV1, V1.P\nworking low to high']]],
    [
      'the check at the wrong pump',
      [
        [common[0], 'working P2 to CV1\nworking P1, CV1 to UV1, RV1, V1.P'],
        ['filter    F1 (', 'check     CV1\nfilter    F1 ('],
      ],
    ],
    [
      'joined through a locked shut-off',
      [
        [common[0], 'working P1 to UV1, BV1.A\nworking P2, BV1.B to RV1, V1.P'],
        ['filter    F1 (', 'shutoff   BV1 (open, locked)\nfilter    F1 ('],
      ],
    ],
    [
      'joined through a directional valve',
      [
        [common[0], 'working P1 to UV1, V2.A, CV1\nworking P2, V2.P, CV1 to RV1, V1.P'],
        ['filter    F1 (', 'check     CV1\ndirectional V2 (2/2, normally closed, coil a SOL9, passes 40 L/min at 2 bar)\nfilter    F1 ('],
      ],
    ],
    ['the pilot on either side', [['pilot   P2.P to UV1.X', 'pilot   P1.P to UV1.X']]],
  ] as const)('%s', (_, edits) => {
    const text = edited(base, edits);
    expect(check(text).problems.map((p) => p.code)).toEqual(['B01']);
    cured(text);
  });
});
