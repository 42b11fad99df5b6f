/** Bad input through texts: a reason at the right line, the rest computed, every figure a number, and always an end. */
import { type Circuit, type Study, study } from '@oilway/circuit';
import { analyse, type Analysed } from '@oilway/language';
import { type Finding, runRules } from '@oilway/rules';
import { describe, expect, it } from 'vitest';
import { looked, notNumbers } from './properties/support/numbers.ts';

const HEAD = `circuit Bench
fluid HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 100 L)
drive M1 (power 5 kW, speed 1450 rpm)
`;
const CYCLE = `cycle Go {
  step Out energise SOL1 until LS1 on, at most 60 s
  step Back energise SOL2 until LS2 on, at most 60 s
}
`;
const GOOD = `${HEAD}pump P1 (displacement 16 cm3/rev, driven by M1)
relief RV1 (set 100 bar, passes 40 L/min at 4 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 5 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, attitude level)
switch LS1 (on C1, from 295 mm to 300 mm)
switch LS2 (on C1, from 0 mm to 3 mm)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1
load C1 (resist 4 kN)
${CYCLE}require C1 speed in Out at least 1 mm/s
`;

/** Everything the service has to say, and the study; asserted of every text: no failure of the program, no figure that is no number. */
function all(text: string): { readonly done: Analysed; readonly study: Study } {
  let circuit: Circuit | undefined;
  const done = analyse([{ uri: 'bad.oilway', text }], {
    study: (one) => {
      circuit = one;
      return study(one);
    },
    rules: (context) => {
      const { findings, failed = [] } = runRules(context);
      expect(failed).toEqual([]);
      return findings;
    },
  }).documents[0]!;
  expect(done.failed).toBeUndefined();
  expect(circuit).toBeDefined();
  expect(notNumbers(done.study)).toEqual([]);
  expect(notNumbers(done.findings)).toEqual([]);
  return { done, study: done.study! };
}
const lineOf = (text: string, finding: Finding): string =>
  text.slice(text.lastIndexOf('\n', finding.origin.start - 1) + 1).split('\n')[0] ?? '';

/** A good figure, a bad one in its place, and what is to be said of it, on that line. */
const FIGURES: readonly (readonly [string, string, string])[] = [
  ['displacement 16 cm3/rev', 'displacement 0 cm3/rev', '`displacement` must be above zero'],
  ['displacement 16 cm3/rev', 'displacement -16 cm3/rev', '`displacement` must be above zero'],
  ['displacement 16 cm3/rev', 'displacement 1000000000000 cm3/rev', 'beyond anything that is built'],
  ['displacement 16 cm3/rev, ', '', '`P1` has no `displacement`'],
  ['displacement 16 cm3/rev', 'displacement 16 cm3/rev, volumetric 0 %', '`volumetric` must be above zero'],
  ['displacement 16 cm3/rev', 'displacement 16 cm3/rev, volumetric 101 %', '`volumetric` is an efficiency: at most 100 %'],
  ['displacement 16 cm3/rev', 'displacement 16 cm3/rev, mechanical 0 %', '`mechanical` must be above zero'],
  ['displacement 16 cm3/rev', 'displacement 16 cm3/rev, compensator 0 bar', '`compensator` must be above zero'],
  ['grade 46', 'grade 46, air 1000 %', '`air` is a share of the volume: at most 100 %'],
  ['volume 100 L', 'volume 100 L, ambient -300 degC to 35 degC', 'is no temperature of a fluid'],
  ['1450 rpm', '0 rpm', '`speed` must be above zero'],
  ['1450 rpm', '1000000000000 rpm', 'beyond anything that is built'],
  ['speed 1450 rpm', 'peak 130 %', '`M1` has no `speed`'],
  ['temperature 45 degC', 'temperature -300 degC', 'is no temperature of a fluid'],
  ['temperature 45 degC', 'temperature 1000000 degC', 'is no temperature of a fluid'],
  ['temperature 45 degC', 'cleanliness "19/17/14"', '`HM46` has no `temperature`'],
  ['grade 46', 'grade 0', '`grade` must be above zero'],
  ['grade 46', 'grade 46, density 0 kg/m3', '`density` must be above zero'],
  ['grade 46', 'grade 46, bulk -14000 bar', '`bulk` must be above zero'],
  ['set 100 bar', 'set 0 bar', '`set` must be above zero'],
  ['set 100 bar', 'set -100 bar', '`set` must be above zero'],
  ['set 100 bar', 'set 1000000000000 bar', '`set` of 1000000000000 bar is beyond anything that is built (10000 bar at most)'],
  ['set 100 bar, ', '', '`RV1` has no `set`'],
  ['set 100 bar', 'set 100 bar, override -8 %', '`override` cannot be negative'],
  ['passes 40 L/min at 4 bar', 'passes 0 L/min at 4 bar', 'above zero'],
  ['passes 40 L/min at 4 bar', 'passes 40 L/min at 0 bar', 'above zero'],
  ['passes 40 L/min at 4 bar', 'passes -40 L/min at 4 bar', 'above zero'],
  [', passes 40 L/min at 4 bar', '', '`RV1` has no `passes`'],
  ['passes 40 L/min at 5 bar', 'passes 0 L/min at 5 bar', 'above zero'],
  ['passes 40 L/min at 5 bar', 'passes 40 L/min at 1000000000000 bar', 'beyond anything that is built'],
  ['passes 40 L/min at 5 bar', 'passes 40 L/min at 5 bar, takes -1 s', '`takes` cannot be negative'],
  ['bore 50 mm', 'bore 0 mm', '`bore` must be above zero'],
  ['bore 50 mm', 'bore 1000000000000 mm', 'beyond anything that is built'],
  ['bore 50 mm, ', '', '`C1` has no `bore`'],
  ['rod 28 mm', 'rod 50 mm', 'The rod is as thick as the bore or thicker'],
  ['stroke 300 mm', 'stroke 0 mm', '`stroke` must be above zero'],
  ['stroke 300 mm', 'stroke -300 mm', '`stroke` must be above zero'],
  ['stroke 300 mm', 'stroke 300 mm, cushion -25 mm', '`cushion` cannot be negative'],
  ['stroke 300 mm', 'stroke 300 mm, seal -3 bar', '`seal` cannot be negative'],
  ['resist 4 kN', 'resist -4 kN', 'Loads have no signs'],
  ['resist 4 kN', 'resist 1000000000000 kN', 'beyond anything that is built'],
  ['resist 4 kN', 'mass -500 kg', '`mass` cannot be negative'],
  ['resist 4 kN', 'friction -1 kN', '`friction` cannot be negative'],
  ['resist 4 kN', 'resist', '`resist`'],
  ['V1.A to C1.cap', 'V1.A to C1.cap (bore 0 mm)', '`bore` must be above zero'],
  ['V1.A to C1.cap', 'V1.A to C1.cap (bore 12 mm, length -2 m)', '`length` cannot be negative'],
  ['V1.A to C1.cap', 'V1.A to C1.cap (bore 12 mm, length 1000000000000 m)', 'beyond anything that is built'],
];

describe('a figure that cannot be', () => {
  it('the circuit without it is clean', () => {
    const { done, study } = all(GOOD);
    expect(done.findings).toEqual([]);
    expect(study.cycles[0]?.completed).toBe(true);
    expect(study.requirements[0]?.verdict).toBe('met');
  });
  it.each(FIGURES)('%s -> %s', (good, bad, words) => {
    const text = GOOD.replace(good, bad);
    expect(text).not.toBe(GOOD);
    const line = text.split('\n')[GOOD.slice(0, GOOD.indexOf(good)).split('\n').length - 1];
    const { done, study } = all(text);
    const found = done.findings.filter((one) => one.severity === 'error' && one.code !== 'REQUIREMENT' && one.what.includes(words));
    expect(found.map((one) => lineOf(text, one))).toEqual([line]);
    // What is left is computed, or says why it is not; nothing is passed on a figure that is not known.
    expect(study.cycles).toHaveLength(1);
    expect(study.states.length).toBeGreaterThan(0);
    expect(study.states.every((one) => one.variants.every((variant) => variant.point.solved))).toBe(true);
    // A fluid, or a piece of pipe, that is not understood is taken as the usual one, and said so.
    if (/^(temperature|grade|volume|V1\.A)/.test(good)) return;
    expect(study.requirements[0]?.verdict, study.requirements[0]?.words).not.toBe('met');
  });
});

it.each([
  [
    'accumulator AC1 (volume 1 L, precharge -2 bar at 20 degC, bladder, gas nitrogen)\nworking P1 to AC1\n',
    '`precharge` cannot be negative',
  ],
  [
    'accumulator AC1 (volume 1 L, precharge 50 bar at -400 degC, bladder, gas nitrogen)\nworking P1 to AC1\n',
    'is no temperature of a fluid',
  ],
  ['filter F1 (passes 60 L/min at 0.5 bar, bypass -1 bar)\nworking P1 to F1\nplug F1.out\n', '`bypass` cannot be negative'],
  ['throttle OR1 (passes 20 L/min at 5 bar, opening 500 %)\nworking P1 to OR1\nplug OR1.out\n', 'at most 100 %'],
])('%s: the rest goes on', (statement, words) => {
  const { done, study } = all(GOOD + statement);
  const found = done.findings.filter((one) => one.severity === 'error' && one.code !== 'REQUIREMENT' && one.what.includes(words));
  expect(found.map((one) => lineOf(GOOD + statement, one))).toEqual([statement.split('\n')[0]]);
  expect(study.cycles[0]?.completed).toBe(true);
});

describe('a circuit that cannot work', () => {
  /** Error findings of a code, with their lines. */
  const told = (text: string, code: string): readonly string[] => {
    const { done } = all(text);
    return done.findings.filter((one) => one.code === code && one.severity === 'error').map((one) => lineOf(text, one));
  };
  it('a ring of check valves takes nothing from the rest', () => {
    const ring = `${GOOD}check K1, K2, K3 (crack 0.5 bar)
working K1.out to K2.in
working K2.out to K3.in
working K3.out to K1.in
`;
    const { study } = all(ring);
    expect(study.cycles[0]?.completed).toBe(true);
    expect(study.cycles[0]?.time).toBeCloseTo(all(GOOD).study.cycles[0]!.time!, 6);
    // Joined to a line that gets pressure, the ring fills and nothing flows around in it.
    const joined = all(`${ring}working V1.A to K1.in\n`).study;
    const flows = joined.steps.flatMap((one) => one.points.map((point) => Math.abs(point.flows['K2.in'] ?? 0)));
    expect(flows.length).toBeGreaterThan(0);
    expect(Math.max(...flows) * 60000).toBeLessThan(0.01);
  });
  it('a pump into a closed shut-off: nothing limits the pressure; the flow without an outlet is said', () => {
    const text = `${HEAD}pump P1 (displacement 16 cm3/rev, driven by M1)
shutoff S1 (closed)
suction R1 to P1
working P1 to S1
return S1 to R1
`;
    expect(told(text, 'A01')).toEqual(['pump P1 (displacement 16 cm3/rev, driven by M1)']);
    const rest = all(text).study.states.find((one) => one.id === 'REST')!;
    const over = rest.variants[0]!.point.diagnosis.find((one) => one.kind === 'OVERPRESSURE');
    expect(over?.kind === 'OVERPRESSURE' && over.sources).toEqual(['P1']);
    // 16 cm3/rev at 1450/min: 23.2 L/min less what leaks at the pressure the pump is then said to reach.
    expect(over?.kind === 'OVERPRESSURE' && over.flow * 60000).toBeGreaterThan(10);
    expect(over?.kind === 'OVERPRESSURE' && over.closed.join()).toContain('S1');
  });
  it('two pumps on one plugged line: both are named', () => {
    const text = `${HEAD}pump P1, P2 (displacement 16 cm3/rev, driven by M1)
check K1 (crack 0.5 bar)
suction R1 to P1
suction R1 to P2
working P1.P, P2.P to K1
plug K1.out
`;
    expect(told(text, 'A01').length).toBe(2);
    const rest = all(text).study.states.find((one) => one.id === 'REST')!;
    const over = rest.variants[0]!.point.diagnosis.find((one) => one.kind === 'OVERPRESSURE');
    expect(over?.kind === 'OVERPRESSURE' && [...over.sources].sort()).toEqual(['P1', 'P2']);
  });
  it('a cylinder without lines is joined to nothing', () => {
    const text = `${HEAD}cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, attitude rod up)\nload C1 (mass 100 kg)\n`;
    expect(told(text, 'H14')).toHaveLength(1);
  });
  it.each([
    ['nothing but its name', 'circuit Bench\n'],
    ['a fluid alone', 'circuit Bench\nfluid HM46 (grade 46, temperature 45 degC)\n'],
  ])('%s: an empty study, no finding', (_, text) => {
    const { done, study } = all(text);
    expect(done.findings).toEqual([]);
    expect([study.cycles, study.steps, study.requirements]).toEqual([[], [], []]);
  });
});

describe('a cycle that cannot go on', () => {
  const BACK = 'working P1 to RV1, V1.P, PS1\n';
  const PRESSURE = GOOD.replace('working P1 to RV1, V1.P\n', BACK).replace('switch LS1', 'switch PS1 (rises 60 bar)\nswitch LS1');
  const own = (cycle: string, text = GOOD): string => text.replace(CYCLE, cycle).replace(/require .*\n/, '');
  const faultsOf = (text: string): readonly (readonly [string, string])[] =>
    all(text).study.cycles.flatMap((cycle) =>
      cycle.faults.map((one) => [one.kind, text.slice(one.origin.start, one.origin.end).split('\n')[0] ?? ''] as const),
    );
  it('a switch without hysteresis unloads the pump it watches: it chatters, the rest of the cycle is run', () => {
    const text = `${HEAD}pump P1 (displacement 16 cm3/rev, driven by M1)
relief RV1 (set 160 bar, passes 40 L/min at 4 bar, coil SOL1)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, attitude level)
switch PS1 (rises 60 bar)
suction R1 to P1
working P1 to RV1, C1.cap, PS1
working C1.rod to R1
return RV1 to R1
load C1 (resist 40 kN)
cycle Go {
  step Press energise SOL1 at 100 % for 5 s
}
interlock SOL1 needs PS1 off
`;
    expect(faultsOf(text).map(([kind]) => kind)).toEqual(['chatters']);
    expect(all(text).done.findings.filter((one) => one.what.includes('PS1')).length).toBeGreaterThan(0);
    expect(all(text).study.cycles[0]?.completed).toBe(true);
  });
  it('a while line that undoes its own cause chatters too', () => {
    const text =
      `${own('cycle Go {\n  step Wait for 3 s\n}\n', PRESSURE)}directional V2 (2/2, normally open, coil SOL9, passes 40 L/min at 5 bar)
working P1 to V2.P
return V2.A to R1
while PS1 off energise SOL9
`.replace('centre tandem', 'centre closed');
    expect(faultsOf(text).map(([kind]) => kind)).toEqual(['chatters']);
  });
  it('a step whose end cannot come waits for ever, and says at what', () => {
    const text = own('cycle Go {\n  step Out energise SOL1 until LS1 on and LS2 on\n  step Back energise SOL2 until LS2 on\n}\n');
    expect(faultsOf(text)).toEqual([['waits for ever', 'step Out energise SOL1 until LS1 on and LS2 on']]);
    // What was reached is kept: the way out, 300 mm.
    const run = all(text).study.cycles[0]!.run!;
    expect(run.positions.C1?.at(-1)).toBeCloseTo(0.3, 6);
  });
  it('a step that lasts 30,000 years is ended after an hour of the machine', () => {
    const text = own('cycle Go {\n  step Out energise SOL1 for 1000000000000 s\n  step Back energise SOL2 until LS2 on\n}\n');
    expect(faultsOf(text)).toEqual([['waits for ever', 'step Out energise SOL1 for 1000000000000 s']]);
  });
  it.each([
    ['no duration', '  step A energise SOL1 for 0 s\n  step B energise SOL2 for 0 s\n'],
    ['next to none', '  step A energise SOL1 for 0.0000000001 s\n  step B energise SOL2 for 0.0000000001 s\n'],
    ['a negative one', '  step A energise SOL1 for -1 s\n'],
    ['no step at all', ''],
    ['only itself to run', '  step A run Go\n'],
  ])('steps of %s in a repeat: a cycle without time', (_, steps) => {
    for (const repeat of [' repeat', ' repeat 10000 times'])
      expect(faultsOf(own(`cycle Go${repeat} {\n${steps}}\n`)).map(([kind]) => kind)).toEqual(['cycle without time']);
  });
  it('a count no one could wait for is refused where it stands', () => {
    const text = GOOD.replace('cycle Go', 'cycle Go repeat 1000000 times');
    const found = all(text).done.findings.filter((one) => one.severity === 'error');
    expect(found.map((one) => [one.code, lineOf(text, one)])).toEqual([['VALUE', 'cycle Go repeat 1000000 times {']]);
  });
});

describe('what was not solved', () => {
  it('is told as such, state by state, with the reason', () => {
    const done = analyse([{ uri: 'bad.oilway', text: GOOD }], { study }).documents[0]!;
    const why = 'the flows around P1 do not meet at any pressure';
    const lost: Study = {
      ...done.study!,
      states: done.study!.states.map((state) => ({
        ...state,
        variants: state.variants.map((variant) => ({
          ...variant,
          point: { ...variant.point, solved: state.id !== 'REST', diagnosis: [{ kind: 'NO EQUILIBRIUM' as const, nets: [], why }] },
        })),
      })),
    };
    const { findings } = runRules({ circuit: done.circuit, study: lost, text: () => GOOD });
    const told = findings.filter((one) => one.code === 'NOT-COMPUTED' && one.what.startsWith('No solution was found'));
    expect(told.map((one) => [one.place, one.why])).toEqual([['REST', why]]);
  });
  it('the search for figures that are no numbers finds them', () => {
    expect(notNumbers({ a: [1, Number.NaN], b: { c: 'NaN bar', d: Number.POSITIVE_INFINITY } })).toHaveLength(3);
    expect(looked({ a: [1, 2], b: { c: 3 } })).toBe(3);
  });
});
