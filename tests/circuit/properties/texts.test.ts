/** What a text says, not how it is written, decides: order, dead ends, mirror, units; and more of what helps never gives less. Whole cycles through texts. */
import { type Study, study } from '@oilway/circuit';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { circuitOf } from '../support/text.ts';

const MACHINE = `circuit Bench
fluid HM46 (grade 46, index 100, temperature 45 degC)
reservoir R1 (volume 100 L)
drive M1 (power 15 kW, speed 1450 rpm)
pump P1 (displacement 16 cm3/rev, driven by M1, volumetric 93 %, rated 210 bar)
relief RV1 (set 100 bar, passes 40 L/min at 4 bar)
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, passes 40 L/min at 5 bar)
throttle FC1 (set 6 L/min, compensated, reverse check)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, attitude level)
switch LS1 (on C1, from 295 mm to 300 mm)
switch LS2 (on C1, from 0 mm to 3 mm)
switch PS1 (rises 80 bar, falls 70 bar)
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.cap, PS1
working C1.rod to FC1 to V1.B
return V1.T, RV1 to R1
load C1 (resist 6 kN from 100 mm to 200 mm, friction 300 N)
cycle Go {
  step Out energise SOL1 until LS1 on, at most 60 s
  step Press energise SOL1 until PS1 on, at most 5 s
  step Back energise SOL2 until LS2 on, at most 60 s
}
require C1 speed in Out at least 1 mm/s
`;
const of = (text: string): Study => study(circuitOf(text));
const HERE = of(MACHINE);

/** Statements: a block is one. */
const statements = (text: string): readonly string[] => text.match(/^[^\n{]+(?:\{[^}]*\})?\n/gm) ?? [];

interface Answer {
  readonly figures: Readonly<Record<string, number>>;
  readonly words: readonly string[];
}
/** Times, speeds, peaks, pressures, flows, powers of everything studied, each under its name. `known` leaves out what another text adds. */
function answer(one: Study, known: (name: string) => boolean = () => true): Answer {
  const figures: Record<string, number> = {};
  const words: string[] = [];
  const put = (name: string, values: Readonly<Record<string, number>>) => {
    for (const [key, value] of Object.entries(values)) if (known(key)) figures[`${name} ${key}`] = value;
  };
  for (const cycle of one.cycles) {
    put(cycle.id, { time: cycle.time ?? -1, heat: cycle.heat ?? -1, work: cycle.work ?? -1, runs: cycle.runs });
    words.push(...cycle.faults.map((fault) => fault.words));
  }
  const points = [
    ...one.steps.flatMap((step) => step.points.map((point) => ({ of: `${step.id} ${point.label}`, point }))),
    ...one.states.flatMap((state) => state.variants.map((variant) => ({ of: `${state.id} ${variant.label}`, point: variant.point }))),
  ];
  for (const step of one.steps) put(step.id, { time: step.time ?? -1 });
  for (const { of: name, point } of points) {
    words.push(name);
    put(`${name} Pa`, point.pressures);
    put(`${name} m3/s`, point.flows);
    put(`${name} W`, point.power);
    for (const rod of point.actuators) put(`${name} ${rod.id}`, { position: rod.position, velocity: rod.velocity, force: rod.force });
  }
  return { figures, words: words.sort() };
}
/** Scale of a figure by its unit, so that zero is compared with something: 100 bar, 20 L/min, 2 kW, 5 kN, 1. */
const scaleOf = (name: string): number =>
  name.includes(' Pa ') ? 1e7 : name.includes(' m3/s ') ? 4e-4 : /( W )|heat|work/.test(name) ? 2e3 : name.endsWith('force') ? 5e3 : 1;
function alike(one: Answer, other: Answer, within: number): void {
  expect(other.words).toEqual(one.words);
  const names = Object.keys(one.figures);
  expect(names.length).toBeGreaterThan(100);
  expect(Object.keys(other.figures).sort()).toEqual([...names].sort());
  for (const name of names) {
    const [a, b] = [one.figures[name]!, other.figures[name]!];
    expect(Math.abs(a - b), `${name}: ${a} and ${b}`).toBeLessThanOrEqual(within * Math.max(Math.abs(a), scaleOf(name)));
  }
}

it('the machine runs through', () => {
  expect(HERE.cycles[0]?.faults).toEqual([]);
  expect(HERE.cycles[0]?.completed).toBe(true);
});

it('the order of statements changes nothing', () => {
  const lines = statements(MACHINE);
  expect(lines.join('')).toBe(MACHINE);
  fc.assert(
    fc.property(fc.shuffledSubarray([...lines], { minLength: lines.length, maxLength: lines.length }), (shuffled) => {
      // Net names and the order in which the solver adds up may change; what is computed does not.
      alike(answer(HERE), answer(of(shuffled.join(''))), 1e-6);
    }),
    { numRuns: 6, seed: 1 },
  );
});

describe('a plugged pipe that leads nowhere', () => {
  const PORTS = ['P1.P', 'V1.A', 'C1.rod', 'V1.T'];
  const dead = (text: string, port: string): string =>
    `${text}shutoff X9 (open, passes 100 L/min at 1 bar)\nworking ${port} to X9.A (bore 10 mm, length 2 m)\nplug X9.B\n`;
  // Without a cycle the states stand where the text says, not where a run left them.
  const STANDING = MACHINE.replace(/cycle Go [^}]*\}\n/, '').replace(/require .*\n/, '');
  it.each(PORTS)('at %s changes no state, to 1e-9', (port) => {
    const before = answer(of(STANDING));
    const names = new Set(Object.keys(before.figures));
    const now = answer(of(dead(STANDING, port)));
    const kept = Object.fromEntries(Object.entries(now.figures).filter(([name]) => names.has(name)));
    expect(Object.keys(now.figures).length).toBeGreaterThan(Object.keys(kept).length);
    alike(before, { ...now, figures: kept }, 1e-9);
  });
  it.each(PORTS)('at %s changes a run by no more than the oil that is pressed together in it', (port) => {
    const now = of(dead(MACHINE, port));
    expect(now.cycles[0]?.faults).toEqual([]);
    // 0.16 L at 140 bar and 14000 bar of stiffness, with air: 2 cm3; at 6 L/min and two strokes 40 ms.
    expect(Math.abs(now.cycles[0]!.time! - HERE.cycles[0]!.time!)).toBeLessThan(0.04);
    for (const [index, step] of HERE.steps.entries()) {
      for (const [id, speed] of Object.entries(step.speeds))
        expect(Math.abs(now.steps[index]!.speeds[id]!.low - speed.low)).toBeLessThan(1e-3 * Math.abs(speed.low) + 1e-6);
    }
  });
});

it('cap and rod side exchanged, loads and switches turned about: the mirrored run', () => {
  const through = MACHINE.replace('rod 28 mm', 'rod 28 mm, through').replace(' from 100 mm to 200 mm', '');
  const turned = through
    .replace('V1.A to C1.cap', 'V1.A to C1.rod')
    .replace('working C1.rod to', 'working C1.cap to')
    .replace('stroke 300 mm', 'stroke 300 mm, begins extended')
    .replace('from 295 mm to 300 mm', 'from 0 mm to 5 mm')
    .replace('from 0 mm to 3 mm', 'from 297 mm to 300 mm');
  const [one, other] = [of(through), of(turned)];
  expect(one.cycles[0]?.completed).toBe(true);
  expect(other.cycles[0]?.faults).toEqual([]);
  // The integration chooses its steps by the order of the unknowns: its tolerance shows in the fifth digit of the time.
  expect(Math.abs(one.cycles[0]!.time! - other.cycles[0]!.time!)).toBeLessThan(1e-4);
  for (const [index, step] of one.steps.entries()) {
    const mirrored = other.steps[index]!;
    expect(mirrored.points.map((point) => point.label.replace(/\d.*/, ''))).toEqual(
      step.points.map((point) => point.label.replace(/\d.*/, '')),
    );
    for (const [at, point] of step.points.entries()) {
      const [a, b] = [point.actuators[0]!, mirrored.points[at]!.actuators[0]!];
      expect(Math.abs(a.velocity + b.velocity)).toBeLessThan(1e-6);
      expect(Math.abs(a.position + b.position - 0.3)).toBeLessThan(1e-6);
      expect(Math.abs(a.force + b.force)).toBeLessThan(1);
      expect(Math.abs((point.pressures['V1.A'] ?? 0) - (mirrored.points[at]!.pressures['V1.A'] ?? 0))).toBeLessThan(100);
    }
  }
});

/** The same sizes, exactly: 1 in = 25.4 mm, 1 psi = 6894.757293168361 Pa, 1 US gal = 3.785411784 L, 1 lbf = 4.4482216152605 N (NIST SP 811). */
const PAIRS: readonly (readonly [string, string])[] = [
  ['temperature 45 degC', 'temperature 113 degF'],
  ['volume 75.70823568 L', 'volume 20 gal'],
  ['displacement 32.774128 cm3/rev', 'displacement 2 in3/rev'],
  ['rated 206.84271879505083 bar', 'rated 3000 psi'],
  ['set 103.42135939752542 bar, passes 75.70823568 L/min at 5.515805834534689 bar', 'set 1500 psi, passes 20 gpm at 80 psi'],
  ['passes 75.70823568 L/min at 5.171067969876271 bar', 'passes 20 gpm at 75 psi'],
  ['bore 63.5 mm, rod 38.1 mm, stroke 304.8 mm', 'bore 2.5 in, rod 1.5 in, stroke 12 in'],
  ['from 299.72 mm to 304.8 mm', 'from 11.8 in to 12 in'],
  ['from 0 mm to 2.54 mm', 'from 0 in to 0.1 in'],
  ['resist 8.896443230521 kN', 'resist 2000 lbf'],
];
const SIZED = (index: 0 | 1): string => {
  const p = PAIRS.map((pair) => pair[index]);
  return `circuit Bench
fluid HM46 (grade 46, index 100, ${p[0]})
reservoir R1 (${p[1]})
drive M1 (power 15 kW, speed 1450 rpm)
pump P1 (${p[2]}, driven by M1, volumetric 94 %, ${p[3]})
relief RV1 (${p[4]})
directional V1 (4/3, centre tandem, spring to centre, coil a SOL1, coil b SOL2, ${p[5]})
cylinder C1 (${p[6]}, attitude level)
switch LS1 (on C1, ${p[7]})
switch LS2 (on C1, ${p[8]})
suction R1 to P1
working P1 to RV1, V1.P
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1
load C1 (${p[9]})
cycle Go {
  step Out energise SOL1 until LS1 on, at most 60 s
  step Back energise SOL2 until LS2 on, at most 60 s
}
`;
};
it('a whole cycle in metric and in US units: the same answer to 1e-12', () => {
  const [metric, us] = [of(SIZED(0)), of(SIZED(1))];
  expect(metric.cycles[0]?.completed).toBe(true);
  // Words carry no units here: the labels name positions as they are shown, in each text's own units.
  const bare = (one: Study): Answer => ({ ...answer(one), words: [] });
  const numbered = ({ figures }: Answer): Answer => ({
    words: [],
    figures: Object.fromEntries(Object.entries(figures).map(([name, value]) => [name.replace(/[\d.]+ (mm|in)\b/g, 'way'), value])),
  });
  alike(numbered(bare(metric)), numbered(bare(us)), 1e-12);
});

describe('more of what helps', () => {
  const out = (one: Study) => one.steps.find((step) => step.id === 'Go.Out')!;
  /** Each value in the text, and what it gives. */
  const series = (
    swap: (value: number) => readonly [string, string],
    values: readonly number[],
    figure: (one: Study) => number,
    text = MACHINE,
  ): readonly number[] =>
    values.map((value) => {
      const [from, to] = swap(value);
      expect(text).toContain(from);
      return figure(of(text.replace(from, to)));
    });
  const rises = (found: readonly number[]): void => {
    expect(found.every(Number.isFinite)).toBe(true);
    for (let i = 1; i < found.length; i += 1) expect(found[i]!).toBeGreaterThanOrEqual(found[i - 1]! * (1 - 1e-6));
    expect(found.at(-1)!).toBeGreaterThan(found[0]! * 1.02);
  };
  it('more displacement never slows the rod', () => {
    rises(
      series(
        (value) => ['displacement 16 cm3/rev', `displacement ${value} cm3/rev`],
        [1, 2, 4, 8, 16, 32],
        (one) => out(one).speeds.C1!.low,
      ),
    );
  });
  it('a higher relief setting never takes force away', () => {
    rises(
      series(
        (value) => ['set 100 bar', `set ${value} bar`],
        [85, 100, 130, 170, 210],
        (one) => Math.min(...out(one).points.map((point) => point.actuators[0]!.available ?? Number.NaN)),
      ),
    );
  });
  it('more load never shortens the way out', () => {
    rises(
      series(
        (value) => ['resist 6 kN from 100 mm to 200 mm', `resist ${value} kN`],
        [1, 4, 8, 11, 13],
        (one) => out(one).time ?? Number.NaN,
        MACHINE.replace('set 6 L/min', 'set 30 L/min'),
      ),
    );
  });
});
