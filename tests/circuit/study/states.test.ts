/** Machine states and requirements on the real machine: what moves at rest, by what, which variants are studied. */
import { type Study, study } from '@oilway/circuit';
import { describe, expect, it } from 'vitest';
import { circuitOf } from './support/circuits.ts';

/** A vertical cylinder that carries 1.2 t on its cap side. `holding`: between valve and cap; `centre` of the valve. */
const lift = (more: {
  readonly centre?: string;
  readonly holding?: boolean;
  readonly control?: string;
  readonly load?: string;
}) => `circuit Lift
fluid     HM46 (grade 46, temperature 45 degC)
reservoir R1 (volume 60 L)
drive     M1 (power 4 kW, speed 1450 rpm)
pump      P1 (displacement 10 cm3/rev, driven by M1, rated 210 bar)
relief    RV1 (set 150 bar, passes 30 L/min at 4 bar)
directional V1 (4/3, centre ${more.centre ?? 'closed'}, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 5 bar)
${more.holding ? 'pilotcheck PC1 (ratio 4:1, passes 40 L/min at 3 bar)' : ''}
cylinder  C1 (bore 63 mm, rod 36 mm, stroke 400 mm, attitude rod up, rated 210 bar)
switch    LS1 (on C1, from 390 mm to 400 mm)
switch    LS2 (on C1, from 0 mm to 3 mm)
suction R1 to P1
working P1 to RV1, V1.P
${more.holding ? 'working V1.A to PC1.V\nworking PC1.C to C1.cap\npilot V1.B to PC1.X' : 'working V1.A to C1.cap'}
working V1.B to C1.rod
return V1.T to R1
return RV1 to R1
load C1 (${more.load ?? 'mass 1.2 t'})
${more.control ?? ''}`;
const CYCLE = 'cycle Go {\n  step Up energise SOL1 until LS1 on, at most 20 s\n  step Down energise SOL2 until LS2 on, at most 20 s\n}\n';
const of = (result: Study, id: string) => result.states.find((one) => one.id === id)!;
const words = (result: Study) => result.requirements.map((one) => `${one.verdict}: ${one.words}`);

describe('a load on a valve whose centre lets it down', () => {
  const circuit = circuitOf(lift({ centre: 'float', control: `${CYCLE}require C1 still in REST and OFF and STOP\n` }));
  const result = study(circuit);
  it('moves by its load in REST, OFF and STOP, and the way of the oil is named', () => {
    for (const id of ['REST', 'OFF', 'STOP', 'STOP from Go.Up']) {
      const moving = of(result, id).variants.flatMap((one) => one.moving);
      expect(moving.length).toBeGreaterThan(0);
      expect(moving.every((one) => one.velocity < 0 && one.cause === 'load' && one.path.includes('V1 A to T (centre)'))).toBe(true);
    }
  });
  it('does not move where its stop holds it', () => {
    expect(of(result, 'REST').variants.find((one) => one.point.actuators[0]!.position === 0)!.moving).toEqual([]);
  });
  it('misses what it is required to do', () => {
    expect(result.requirements[0]!.verdict).toBe('missed');
    expect(words(result)[0]).toMatch(
      /^missed: C1 moves at [\d.]+ mm\/s in REST: C1 greatest load inward at \d+ mm, by load through V1 A to T \(centre\), R1$/,
    );
  });
});

describe('a load on a seat', () => {
  const control = `${CYCLE}emergency stop M1\nrequire C1 still in REST and OFF and STOP for 2 min\nrequire C1 drift in OFF at most 2 mm for 10 min\nrequire C1 speed in Up at least 40 mm/s\nrequire C1.cap pressure in REST at most 60 bar\nrequire P1 power in REST at most 0.5 kW\nrequire M1 loading at most 100 %\nrequire Go time at most 30 s\n`;
  const result = study(circuitOf(lift({ centre: 'open', holding: true, control })));
  it('stands still; what leakage moves stays small', () => {
    expect(
      words(result)
        .slice(0, 2)
        .map((one) => one.slice(0, 4)),
    ).toEqual(['met:', 'met:']);
    // 0.25 cm3/min at 100 bar of a seat, 37.8 bar under 1.2 t on 31.2 cm2: 0.3 mm in 10 min; the computing core's own floor adds less than 1 mm.
    expect(result.requirements[1]!.worst!.value).toBeGreaterThan(0.25e-3);
    expect(result.requirements[1]!.worst!.value).toBeLessThan(1.5e-3);
  });
  it('holds the weight over the bore: 11 768 N on 3117 mm2 are 37.8 bar', () => {
    const rest = of(result, 'REST').variants.find((one) => one.point.actuators[0]!.position > 0.1)!;
    const cap = Object.entries(rest.point.pressures).find(([net]) => net.startsWith('PC1.C') || net.startsWith('C1.cap'))!;
    expect(cap[1] / 1e5).toBeCloseTo(37.75, 0);
  });
  it('takes a closed volume at no more than any step leads to, and does not decide a bound inside its range', () => {
    const onStop = of(result, 'REST').variants.find((one) => one.point.actuators[0]!.position === 0)!;
    const [span] = Object.values(onStop.point.undetermined);
    const highest = Math.max(...result.steps.flatMap((one) => Object.values(one.peaks)));
    expect(span!.low).toBe(0);
    expect(span!.high).toBeLessThanOrEqual(highest);
    const tight = study(
      circuitOf(lift({ centre: 'open', holding: true, control: `${CYCLE}require C1.cap pressure in REST at most 20 bar\n` })),
    );
    expect(tight.requirements[0]!.verdict).toBe('missed');
    const straddled = study(
      circuitOf(lift({ centre: 'open', holding: true, control: `${CYCLE}require C1.cap pressure in REST at most 39 bar\n` })),
    );
    expect(straddled.requirements[0]!.verdict).toBe('undecidable');
  });
  it('meets the rest', () => {
    expect(
      words(result)
        .slice(2)
        .filter((one) => !one.startsWith('met')),
    ).toEqual([]);
  });
  it('STOP with `emergency stop M1` is studied with the drive stopped only', () => {
    expect(of(result, 'STOP').variants.every((one) => one.drivesOn.length === 0)).toBe(true);
    const unsaid = study(circuitOf(lift({ centre: 'open', holding: true, control: CYCLE })));
    expect(new Set(of(unsaid, 'STOP').variants.map((one) => one.drivesOn.length))).toEqual(new Set([0, 1]));
  });
});

describe('states that come from the control', () => {
  it('IDLE is studied where a while line needs no cycle, with the coils it shifts', () => {
    const standing = study(circuitOf(lift({ centre: 'closed', control: `${CYCLE}while LS2 off energise SOL2\n` })));
    const moving = of(standing, 'IDLE').variants.flatMap((one) => one.moving);
    expect(moving.some((one) => one.velocity < 0)).toBe(true);
    expect(study(circuitOf(lift({ control: CYCLE }))).states.some((one) => one.id === 'IDLE')).toBe(false);
  });
  it('every coil alone ignores interlocks; a push button heeds them', () => {
    const control = 'manual Hand {\n  step Up energise SOL1 until LS1 on\n}\ninterlock SOL1 needs LS1 on\n';
    const result = study(circuitOf(lift({ centre: 'open', control })));
    expect(of(result, 'coil SOL1').variants.some((one) => one.moving.some((moving) => moving.velocity > 0))).toBe(true);
    expect(of(result, 'manual Hand.Up').variants.some((one) => one.moving.some((moving) => moving.velocity > 0))).toBe(false);
  });
  it('detented valves are studied in every position at rest, as the step left them at a stop', () => {
    const text = lift({ control: CYCLE }).replace('4/3, centre closed, spring to centre', '4/2, detent');
    const result = study(circuitOf(text));
    expect(new Set(of(result, 'REST').variants.map((one) => one.detents.V1))).toEqual(new Set(['a', 'b']));
    expect(new Set(of(result, 'STOP from Go.Up').variants.map((one) => one.detents.V1))).toEqual(new Set(['a']));
    expect(new Set(of(result, 'STOP from Go.Down').variants.map((one) => one.detents.V1))).toEqual(new Set(['b']));
  });
  it('says how many of the possible variants it studied', () => {
    for (const state of study(circuitOf(lift({ control: CYCLE }))).states) {
      expect(state.studied.of).toBe(state.variants.length);
      expect(state.studied.all).toBeGreaterThanOrEqual(state.studied.of);
    }
  });
});

describe('a file without a cycle', () => {
  it('gives the same table for each coil, from begins over mid-stroke to the other end', () => {
    const result = study(circuitOf(lift({ centre: 'open' })));
    expect(result.steps.map((one) => one.id)).toEqual(['coil SOL1', 'coil SOL2']);
    const [up, down] = result.steps;
    expect(up!.points.map((one) => one.label)).toEqual(expect.arrayContaining(['entry', 'mid-stroke', 'just before the stop']));
    expect(up!.speeds.C1!.direction).toBe(1);
    expect(down!.speeds.C1!.direction).toBe(-1);
    expect(down!.points[0]!.actuators[0]!.position).toBeCloseTo(0.4);
  });
});

describe('a stall', () => {
  const control =
    'cycle Go {\n  step Up energise SOL1 until LS1 on, at most 9 s\n}\nrequire C1 speed in Up at least 10 mm/s\nrequire C1 force in Up reaches 60 kN\n';
  const result = study(circuitOf(lift({ centre: 'open', load: 'mass 1.2 t, resist 60 kN from 200 mm to 390 mm extending', control })));
  it('is short by what the load needs more than the oil can press', () => {
    const end = result.steps[0]!.points.at(-1)!.actuators[0]!;
    expect(end.position).toBeCloseTo(0.2, 3);
    expect(end.needed).toBeCloseTo(71768, 0);
    expect(end.shortBy).toBeCloseTo(end.needed - end.available!, 6);
  });
  it('counts as a speed of nothing, and the step as a fault that says why', () => {
    expect(result.requirements.map((one) => one.verdict)).toEqual(['missed', 'missed']);
    expect(result.requirements[0]!.worst!.value).toBe(0);
    expect(result.cycles[0]!.faults[0]!.words).toMatch(
      /^Go.Up is not over after 9.00 s: waits for LS1, C1 at 200 mm.*\(C1 stalled, short by [\d.]+ kN/,
    );
  });
});

describe('a requirement that cannot be decided', () => {
  it('is never a pass: no range, no place, no part', () => {
    const control = `${CYCLE}require C1 speed in Down from 395 mm to 399 mm at least 1 mm/s\nrequire P1 pressure in IDLE at most 200 bar\n`;
    const result = study(circuitOf(lift({ centre: 'open', control })));
    expect(result.requirements[0]!.verdict).toBe('undecidable');
    expect(result.requirements[0]!.words).toBe('cannot be decided: Go.Down does not pass 395 mm to 399 mm');
    // IDLE that is no other than REST is REST.
    expect(result.requirements[1]!.verdict).toBe('met');
  });
});
