/** Control and requirements: cycles, conditions, commands, interlocks, measures, places. */
import { describe, expect, it } from 'vitest';
import { errors, fixed, read } from './support.ts';

const BASE = `reservoir R1 (volume 40 L)
drive M1 (power 3 kW, speed 1450 rpm)
pump P1 (displacement 8 cm3/rev, driven by M1)
relief RV2 (set 120 bar, coil SOL10, passes 100 L/min at 6 bar)
cylinder C1 (bore 80 mm, rod 50 mm, stroke 1200 mm, attitude level)
motor HM1 (displacement 100 cm3/rev)
accumulator ACC1 (bladder, volume 20 L, precharge 130 bar at 20 degC, gas nitrogen)
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 9 L/min at 1 bar)
directional V2 (4/3, proportional, centre closed, spring to centre, coil a SOL3, coil b SOL4, passes 9 L/min at 1 bar)
directional V3 (4/3, centre closed, spring to centre, lever, passes 9 L/min at 1 bar)
switch PS1, START (outside)
sensor PT1 (range 0 bar to 400 bar)
working feed: P1 to V1.P
`;
const wrong = (lines: string) => errors(BASE + lines);
const circuit = (lines: string) => {
  expect(wrong(lines)).toEqual([]);
  return read(BASE + lines).circuit;
};

describe('cycles', () => {
  it('steps, times, limits, meanwhile, run, repeat, manual, titles', () => {
    const { cycles, whiles } = circuit(`cycle Stroke { 
  step Push energise SOL1 until C1 extended, at most 1 s
}
cycle Auto repeat 5 times "By itself" {
  while Auto energise SOL10
  step Out energise SOL1, SOL3 at 30 % over 0.5 s for 0.5 s and until PS1 on, at most 3 s "Out"
  meanwhile Wait for 20 s
  meanwhile Ramp energise SOL4 from 20 % to 80 % over 0.4 s
  step Again run Stroke 2 times
  step Halt
}
manual Hand {
  step Back energise SOL2 until C1 at 100 mm
}
cycle Ever repeat {
  step Lever shift V3 to a for 1 s
}`);
    expect(cycles.map((cycle) => [cycle.id, cycle.mode, cycle.repeat])).toEqual([
      ['Stroke', 'cycle', undefined],
      ['Auto', 'cycle', 5],
      ['Hand', 'manual', undefined],
      ['Ever', 'cycle', 'ever'],
    ]);
    const [out, wait, ramp, again, halt] = cycles[1]?.steps ?? [];
    expect(out).toMatchObject({ id: 'Auto.Out', lasts: 0.5, atMost: 3, title: 'Out', until: { op: 'state', of: 'PS1', is: 'on' } });
    expect(out?.actions[0]).toMatchObject({ commands: [{ coil: 'SOL1' }, { coil: 'SOL3', at: { si: 0.3 }, over: 0.5 }] });
    expect([wait?.beside, ramp?.beside, again?.beside, halt?.actions]).toEqual(['Auto.Out', 'Auto.Out', undefined, []]);
    expect(ramp?.actions[0]).toMatchObject({ commands: [{ from: { si: 0.2 }, to: { si: 0.8 }, over: 0.4 }] });
    expect(again?.actions[0]).toMatchObject({ does: 'run', cycle: 'Stroke', times: 2 });
    expect(whiles).toMatchObject([{ when: { op: 'running', of: 'Auto' }, action: { does: 'energise' } }]);
    expect(cycles[3]?.steps[0]?.actions[0]).toMatchObject({ does: 'shift', valve: 'V3', to: 'a' });
  });

  it('commands: % of a signed or proportional coil, a pressure of a relief, none of a switching valve', () => {
    expect(wrong('cycle X {\n step A energise SOL10 at 80 bar for 1 s\n step B energise SOL10 at 50 % for 1 s\n}')).toEqual([]);
    expect(wrong('cycle X {\n step A energise SOL1 at 50 % for 1 s\n}')).toEqual([
      expect.stringContaining('`SOL1` belongs to a switching valve'),
    ]);
    expect(wrong('cycle X {\n step A energise SOL3 at 150 % for 1 s\n}')).toEqual([expect.stringContaining('between 0 and 100 %')]);
    expect(wrong('cycle X {\n step A energise SOL3 at 5 L/min for 1 s\n}')).toEqual([
      expect.stringContaining('M07 `5 L/min` is a flow; a ratio (%)'),
    ]);
    expect(wrong('cycle X {\n step A energise V1 for 1 s\n}')).toEqual([
      expect.stringContaining('what is energised is a coil: `SOL1` or `SOL2`'),
    ]);
    expect(wrong('cycle X {\n step A energise SOL1, SOL1 for 1 s\n}')).toEqual([expect.stringContaining('stands twice in this list')]);
  });

  it('step names: doubled, short where unique, written out where not', () => {
    expect(wrong('cycle X {\n step A for 1 s\n step A for 1 s\n}')).toEqual([expect.stringContaining('`A` is given twice')]);
    const two = 'cycle X {\n step A for 1 s\n step C for 1 s\n}\ncycle Y {\n step A for 1 s\n}\n';
    expect(wrong(`${two}require A time at most 2 s`)).toEqual([
      expect.stringContaining('is a step of several cycles: write `X.A` or `Y.A`'),
    ]);
    expect(
      circuit(`${two}require C time at most 2 s\nrequire Y.A time at most 2 s\nrequire X time at most 5 s`).requirements.map(
        (one) => one.form === 'bound' && one.of,
      ),
    ).toEqual(['X.C', 'Y.A', 'X']);
  });

  it('a step outside, and a component inside a cycle, are said and cost nothing', () => {
    expect(wrong('step A for 1 s')).toEqual([expect.stringContaining('stands inside a `cycle`')]);
    const text = 'cycle X {\n step A for 1 s\n gauge G9\n step B for 1 s\n}';
    expect(wrong(text)).toEqual([expect.stringContaining('Only `step`, `meanwhile` and `while` lines stand inside a cycle')]);
    expect(read(BASE + text).circuit.components.some((component) => component.id === 'G9')).toBe(true);
    expect(read(BASE + text).circuit.cycles[0]?.steps.length).toBe(2);
  });

  it('cycles that run each other in a ring', () =>
    expect(wrong('cycle X {\n step A run Y\n}\ncycle Y {\n step B run X\n}')).toEqual([
      expect.stringContaining('run each other in a ring'),
    ]));

  it('S7: what an emergency stop does', () => {
    expect(circuit('emergency energise SOL3 stop M1 "Held"').emergency).toMatchObject({
      actions: [{ does: 'energise' }, { does: 'stop', drives: ['M1'] }],
      title: 'Held',
    });
    expect(circuit('emergency').emergency).toMatchObject({ actions: [] });
    expect(circuit('let x = 1 bar')).not.toHaveProperty('emergency');
    expect(wrong('emergency stop P1')).toEqual([expect.stringContaining('`P1` is a pump; a drive is needed here')]);
    expect(wrong('emergency\nemergency stop M1')).toEqual([expect.stringContaining('a second line for it')]);
  });
});

describe('conditions', () => {
  const until = (condition: string) => wrong(`cycle X {\n step A energise SOL1 until ${condition}\n}`);

  it('L9: `and` and `or` mixed need brackets', () => {
    expect(until('PS1 on or START on and C1 extended')).toEqual([expect.stringContaining('`and` and `or` are mixed')]);
    expect(until('(PS1 on or START on) and C1 extended')).toEqual([]);
    expect(until('PS1 on and START off and C1 above 5 mm')).toEqual([]);
  });

  it('S8: states, not edges', () => {
    expect(until('PS1 rises')[0]).toMatch(/^SYNTAX/);
    expect(until('PS1')).toEqual([expect.stringContaining('write `PS1 on` or `PS1 off`')]);
    expect(fixed(`${BASE}cycle X {\n step A until PS1\n}`, 'Write `PS1 off`')).toContain('until PS1 off');
    expect(until('C1 on')).toEqual([expect.stringContaining('A cylinder is not `on`: write `C1 extended` or `C1 retracted`')]);
    expect(until('PT1 on')).toEqual([expect.stringContaining('write `PT1 above` or `PT1 below` and a value')]);
  });

  it('S4: pressures in the control only through a switch or sensor', () => {
    expect(until('C1.cap below 10 bar')).toEqual([expect.stringContaining('declare a `switch` or a `sensor`')]);
    expect(until('PT1 below 10 bar')).toEqual([]);
    expect(until('PT1 below 10 mm')).toEqual([expect.stringContaining('M07 `10 mm` is a length; a pressure')]);
    expect(until('V1 above 5 bar')).toEqual([expect.stringContaining('has no figure to compare with')]);
  });

  it('S9: a position no switch sees is computed, but said, with the switch as its fix', () => {
    const text = `${BASE}cycle X {\n step A energise SOL1 until C1 at 265 mm\n}`;
    const { circuit: resolved, findings } = read(text);
    expect(resolved.cycles[0]?.steps[0]?.until).toMatchObject({ op: 'compare', of: 'C1', is: 'at' });
    expect(findings.map((finding) => [finding.severity, finding.what])).toEqual([
      ['warning', 'No switch sees `C1 at 265 mm`: the step list cannot be wired as written'],
    ]);
    const mended = fixed(text);
    expect(mended).toContain('switch LS1 (on C1, at 265 mm)');
    expect(mended).toContain('until LS1 on');
    expect(read(mended).findings).toEqual([]);
    expect(read(`${BASE}require never C1 above 5 mm and PS1 off`).findings).toEqual([]);
  });

  it('coils, steps and cycles are conditions too', () => {
    expect(wrong('cycle X {\n step A for 1 s\n}\nwhile X and SOL1 off energise SOL3\ninterlock SOL1, SOL2 needs X.A or START on')).toEqual(
      [],
    );
    expect(wrong('interlock SOL1 needs Y')).toEqual([expect.stringContaining('NAME `Y` is not declared')]);
  });
});

describe('requirements', () => {
  const required = (line: string) => wrong(`cycle X {\n step A energise SOL1 for 1 s\n}\nrequire ${line}`);

  it('all forms', () => {
    const { requirements } = circuit(`cycle X {\n step A energise SOL1 for 1 s\n}
require never SOL1 on and SOL2 on
require C1 still in STOP and OFF for 5 min
require C1 speed from 270 mm to 315 mm extending between 8 mm/s and 12 mm/s
require C1.cap pressure in A reaches 10 bar within 2 s
require M1 loading at most 100 %
require feed pressure at most 250 bar
require C1 drift in OFF at most 2 mm for 10 min
require ACC1 volume in X at least 2 L
require HM1 speed at least 20 rpm
require P1 power in REST at most 1.5 kW`);
    expect(requirements.map((one) => one.form)).toEqual(['never', 'still', ...Array(8).fill('bound')]);
    expect(requirements[1]).toMatchObject({ of: 'C1', where: { places: ['STOP', 'OFF'] }, lasts: 300 });
    expect(requirements[2]).toMatchObject({ where: { range: { from: { si: 0.27 } }, direction: 'extending' }, bound: { is: 'between' } });
    expect(requirements[3]).toMatchObject({ of: 'C1', port: 'cap', where: { places: ['X.A'] }, bound: { is: 'reaches', within: 2 } });
    expect(requirements[2]?.id).toBe('C1 speed from 270 mm to 315 mm extending between 8 mm/s and 12 mm/s');
  });

  it('the measure fits the subject', () => {
    expect(required('C1 torque at most 5 N.m')).toEqual([expect.stringContaining('`torque` is a measure of a motor')]);
    expect(required('P1 speed at most 5 rpm')).toEqual([expect.stringContaining('`speed` is a measure of an actuator')]);
    expect(required('C1 time at most 5 s')).toEqual([expect.stringContaining('`time` is a measure of a step or cycle')]);
    expect(required('P1 still in REST')).toEqual([expect.stringContaining('does not move')]);
    expect(required('C1 spead at most 5 mm/s')).toEqual(['VALUE `spead` is no measure: did you mean `speed` @ spead']);
    expect(required('C1 speed at most 5 bar')).toEqual([expect.stringContaining('M07 `5 bar` is a pressure; a velocity')]);
    expect(required('HM1 speed at most 5 mm/s')).toEqual([expect.stringContaining('a speed of rotation is needed')]);
  });

  it('S4: which chamber', () => {
    expect(required('C1 pressure at most 180 bar')).toEqual([expect.stringContaining('Which pressure of `C1`: `C1.cap` or `C1.rod`')]);
    expect(required('P1 pressure at most 180 bar')).toEqual([]);
    expect(required('C1.caps pressure at most 180 bar')).toEqual([expect.stringContaining('PORT `C1` has no port `caps`')]);
  });

  it('places that are not there, bounds that are missing or backwards, a drift without its time', () => {
    expect(required('C1 speed in B at most 5 mm/s')).toEqual([expect.stringContaining('NAME `B` is not declared')]);
    expect(required('C1 speed')).toEqual([expect.stringContaining('A bound is missing')]);
    expect(required('C1 speed between 8 mm/s and 5 mm/s')).toEqual([expect.stringContaining('run backwards')]);
    expect(required('C1 speed from 9 mm to 5 mm at most 5 mm/s')).toEqual([expect.stringContaining('runs backwards')]);
    expect(required('C1 drift in OFF at most 2 mm')).toEqual([expect.stringContaining('A drift needs its time')]);
  });

  it('a range on what does not move is that of the only actuator', () => {
    expect(required('RV2 flow extending at most 5 L/min')).toEqual([
      expect.stringContaining('Whose way or direction is meant: there are `C1`, `HM1`'),
    ]);
    const alone =
      'reservoir R1 (volume 40 L)\nrelief RV2 (set 120 bar, passes 100 L/min at 6 bar)\ncylinder C1 (bore 80 mm, rod 50 mm, stroke 1200 mm)\nrequire RV2 flow extending at most 5 L/min';
    expect(errors(alone)).toEqual([]);
  });

  it('S16: an allowance has its reason', () => {
    expect(wrong('allow D09 on C1.cap')).toEqual([expect.stringContaining('An allowance needs its reason')]);
    expect(circuit('allow D09 on C1.cap in STOP "bolted on"').allows).toMatchObject([
      { rule: 'D09', on: 'C1', port: 'cap', reason: 'bolted on', where: { places: ['STOP'] } },
    ]);
  });
});

describe('loads', () => {
  const load = (text: string) => read(BASE + text).circuit.loads[0];

  it('constants, tables, ranges, directions, steps', () => {
    const text =
      'load C1 (mass 1.2 t, resist 9 kN from 270 mm to 315 mm extending, inward (45 mm: 0 kN, 50 mm: 14 kN), outward 3 kN in A and B, friction 100 N, people near)\ncycle X {\n step A for 1 s\n step B for 1 s\n}';
    expect(wrong(text)).toEqual([]);
    expect(load(text)?.properties.map((property) => property.value)).toMatchObject([
      { q: { si: 1200 } },
      { constant: { si: 9000 }, range: { to: { si: 0.315 } }, direction: 'extending' },
      { table: [{ at: { si: 0.045 }, value: { si: 0 } }, { value: { si: 14000 } }] },
      { steps: ['X.A', 'X.B'] },
      { q: { si: 100 } },
      { word: 'near' },
    ]);
  });

  it('S2: no signs; only `resist` has a direction; a motor is pushed forward and backward', () => {
    expect(wrong('load C1 (inward -5 kN)')).toEqual([expect.stringContaining('Loads have no signs')]);
    expect(wrong('load C1 (inward 5 kN extending)')).toEqual([expect.stringContaining('only `resist` has a direction')]);
    expect(fixed(`${BASE}load HM1 (inward 5 N.m)`)).toContain('load HM1 (backward 5 N.m)');
    expect(wrong('load HM1 (forward 5 kN)')).toEqual([expect.stringContaining('is a force; a torque is needed here')]);
    expect(wrong('load C1 (inward (50 mm: 0 kN, 45 mm: 14 kN))')).toEqual([expect.stringContaining('rise from knot to knot')]);
  });

  it('S3: a mass needs to know how the cylinder stands', () => {
    expect(errors('cylinder C9 (bore 80 mm, rod 50 mm, stroke 1 m)\nload C9 (mass 5 kg)')).toEqual([
      expect.stringContaining('`attitude` is missing @ mass 5 kg'),
    ]);
    expect(errors('cylinder C9 (bore 80 mm, rod 50 mm, stroke 1 m, attitude 30 deg)\nload C9 (mass 5 kg)')).toEqual([]);
  });

  it('S14: several actuators move as one', () => {
    const text = 'cylinder C2 (bore 80 mm, rod 50 mm, stroke 1200 mm, attitude level)\nload C1 with C2 (mass 2.4 t)';
    expect(load(text)?.actuators).toEqual(['C1', 'C2']);
    expect(wrong('load C1 with HM1 (friction 5 N)')).toEqual([expect.stringContaining('cannot move as one body')]);
    expect(wrong('load P1 (friction 5 N)')).toEqual([expect.stringContaining('A load stands on an actuator')]);
  });
});

describe('limits, controls, display', () => {
  it('limits', () => {
    expect(
      circuit(
        'limits (velocity suction 1.0 m/s, velocity return 3 m/s, temperature 60 degC, viscosity 12 mm2/s to 800 mm2/s, cleanliness "18/16/13", margin 10 %, idle 20 bar, surge 30 bar)',
      ).limits?.properties.map((property) => [property.name, property.port]),
    ).toEqual([
      ['velocity', 'suction'],
      ['velocity', 'return'],
      ['temperature', undefined],
      ['viscosity', undefined],
      ['cleanliness', undefined],
      ['margin', undefined],
      ['idle', undefined],
      ['surge', undefined],
    ]);
    expect(wrong('limits (velocity 3 m/s)')).toEqual([expect.stringContaining('for a kind of line')]);
    expect(wrong('limits (velocity return 3 m/s, velocity return 4 m/s)')).toEqual([expect.stringContaining('given twice')]);
  });

  it('A8: the list of symbols, with step numbers', () => {
    expect(
      circuit('cycle X {\n step A for 1 s\n}\ncontrols "plc/x.st" (SOL1 "Y_Out", PS1 "B_On", PT1 "I_P", X.A 10)').controls,
    ).toMatchObject({
      file: 'plc/x.st',
      symbols: [{ of: 'SOL1', symbol: 'Y_Out' }, { of: 'PS1' }, { of: 'PT1' }, { of: 'X.A', number: 10 }],
    });
    expect(wrong('controls "x.st" (V1 "Y")')).toEqual([expect.stringContaining('the control sees coils, switches, sensors and steps')]);
    expect(wrong('controls "x.st" (SOL1 "Y", SOL1 "Z")')).toEqual([expect.stringContaining('has its symbol already')]);
  });

  it('display, units met most often, title', () => {
    expect(circuit('circuit T "A title"\ndisplay us')).toMatchObject({ name: 'T', title: 'A title', display: 'us' });
    expect(circuit('display as written')).toMatchObject({ display: 'as written', units: { pressure: 'bar', length: 'mm' } });
    expect(wrong('display metrik')).toEqual([expect.stringContaining('`display` takes')]);
    expect(wrong('circuit A\ncircuit B')).toEqual([expect.stringContaining('A file has one circuit')]);
  });
});
