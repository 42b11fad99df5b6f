/** One thing taken out of, or turned round in, a sound circuit: the rule that is there for it speaks. */
import { describe, expect, it } from 'vitest';
import { check, edited, short, SOUND } from './support.ts';

const sound = (name: string): string => {
  const sample = SOUND.find((s) => s.name.startsWith(name));
  if (sample === undefined) throw new Error(`no sample ${name}`);
  return sample.text;
};

type Mutation = readonly [
  what: string,
  sample: string,
  edits: readonly (readonly [string | RegExp, string])[],
  expected: readonly string[],
];

const MUTATIONS: readonly Mutation[] = [
  ['relief taken off the pump line', '01', [['P1 to RV1, FC1', 'P1 to FC1']], ['A01 P1', 'H14 RV1.P']],
  ['relief outlet plugged', '01', [['return  RV1 to R1', 'plug RV1.T']], ['A06 RV1']],
  [
    'relief moved behind the directional valve',
    '01',
    [
      ['P1 to RV1, FC1', 'P1 to FC1'],
      ['working V1.A to C1.cap', 'working V1.A to C1.cap, RV1'],
    ],
    ['A02 P1'],
  ],
  ['valve outlet forgotten', '01', [[/^working V1\.B to C1\.rod.*\n/m, '']], ['H14 V1.B', 'H14 C1.rod']],
  ['time limit forgotten', '01', [['until LS2 on, at most 8 s', 'until LS2 on']], ['L04 Sand.Right']],
  [
    'check of the regeneration turned round',
    '02',
    [
      ['working P1 to RV1, CV1', 'working P1 to RV1, CV1.out'],
      ['pressure: CV1 to', 'pressure: CV1.in to'],
    ],
    [],
  ],
  ['both coils in one step', '02', [['step Return energise SOL2', 'step Return energise SOL1, SOL2']], ['F17 V1']],
  ['switch above the relief', '02', [['rises 130 bar, falls 115 bar', 'rises 190 bar, falls 115 bar']], ['L07 PS1']],
  ['drain of the reducing valve forgotten', '03', [['drain   PR1.Y, SV1.Y', 'drain   SV1.Y']], ['F05 PR1']],
  [
    'drain of a sequence valve plugged',
    '03',
    [['drain   PR1.Y, SV1.Y, SV2.Y to R1', 'drain   PR1.Y, SV1.Y to R1\nplug SV2.Y']],
    ['F05 SV2'],
  ],
  ['sequence valve set above the relief', '03', [['let work_begins = 80 bar', 'let work_begins = 130 bar']], ['F07 SV1']],
  ['code used twice', '03', [['code "2.0"', 'code "1.0"']], ['M01 C2']],
  ['unit forgotten', '03', [['let clamping = 50 bar', 'let clamping = 50']], ['M07']],
  ['pilot on the wrong side', '05', [['pilot   pressure to UV1.X', 'pilot   low to UV1.X']], ['B02 UV1']],
  ['unloading above the relief', '05', [['let unload = 45 bar', 'let unload = 165 bar']], ['B03 UV1']],
  ['drive too small', '05', [[/power [\d.]+ kW, speed/, 'power 3 kW, speed']], ['B04 M1']],
  [
    'shut-off of the accumulator left out',
    '06',
    [
      ['PS1, BV1.A (bore', 'PS1, ACC1, RV3, V8.P, BV2, G1 (bore'],
      [/^working BV1\.B to .*\n/m, ''],
    ],
    ['C01 ACC1', 'H14 BV1'],
  ],
  [
    'both bleeds left out',
    '06',
    [
      ['ACC1, RV3, V8.P, BV2, G1', 'ACC1, RV3, G1'],
      ['return  V8.A, BV2, RV3', 'return  RV3'],
    ],
    ['C02 ACC1', 'H14 V8', 'H14 BV2'],
  ],
  [
    'check at the pump left out',
    '06',
    [
      ['working P1 to RV1, CV1', 'working P1 to RV1'],
      ['pressure: CV1 to', 'pressure: P1.P to'],
    ],
    ['A10 P1', 'H14 CV1'],
  ],
  [
    'counterbalance valve left out',
    '06',
    [
      ['working lift: FC2 to CB1.V\nworking CB1.C to C1.rod, V5.P (flanged)', 'working lift: FC2 to C1.rod, V5.P (flanged)'],
      ['pilot   C1.cap to CB1.X\n', ''],
      [/^counterbalance CB1 .*\n/m, ''],
    ],
    ['D01 C1'],
  ],
];

describe('sound circuits with one fault', () => {
  it.each(MUTATIONS)('%s (sample %s)', (_, name, edits, expected) => {
    const text = edits.reduce((one, [from, to]) => {
      if (typeof from === 'string') return edited(one, [[from, to]]);
      expect(one, String(from)).toMatch(from);
      return one.replace(from, to);
    }, sound(name));
    const codes = check(text).problems.map((p) => (p.code === 'M07' ? 'M07' : short(p).replace(/ in .*/, '')));
    for (const code of expected) expect(codes, text).toContain(code);
    // Nothing but what was done, and what the language says of it.
    expect(
      codes.filter((c) => /^[A-L]\d\d /.test(c) && !expected.includes(c)),
      text,
    ).toEqual([]);
  });
});
