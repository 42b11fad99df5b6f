/** What the positions of a directional valve join, and with which flow figure. */
import { positionsOf, sideOfCoil } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { delivers, HEAD, toBar, toLpm } from '../support/bench.ts';
import { blank, circuitOf, load, machineOf } from '../support/text.ts';

const valve = (text: string) => {
  const c = circuitOf(`fluid HM46 (grade 46, temperature 45 degC)\ndirectional V1 (${text})`).components.find((x) => x.id === 'V1');
  if (c === undefined) throw new Error('no valve');
  return c;
};
const joins = (text: string, side: 'a' | 'b' | 'centre') => positionsOf(valve(text)).paths[side].map((p) => `${p.from}-${p.to}`);

test('what is joined by default, by a named centre, by own paths', () => {
  const four = '4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 60 L/min at 5 bar';
  expect(joins(four, 'a')).toEqual(['P-A', 'B-T']);
  expect(joins(four, 'b')).toEqual(['P-B', 'A-T']);
  expect(joins(four, 'centre')).toEqual([]);
  expect(joins(four.replace('closed', 'tandem'), 'centre')).toEqual(['P-T']);
  expect(joins(four.replace('closed', 'float'), 'centre')).toEqual(['A-T', 'B-T']);
  expect(joins(four.replace('closed', '(B to T)'), 'centre')).toEqual(['B-T']);
  expect(joins(four.replace('closed', '()'), 'centre')).toEqual([]);
  expect(joins(four.replace('centre closed', 'centre closed, a (P to A, P to B)'), 'a')).toEqual(['P-A', 'P-B']);
  expect(joins('3/2, normally closed, coil SOL1, passes 5 L/min at 1 bar', 'b')).toEqual(['A-T']);
  expect(joins('2/2, normally open, coil SOL1, passes 5 L/min at 1 bar', 'a')).toEqual(['P-A']);
  expect(joins('2/2, normally open, coil SOL1, passes 5 L/min at 1 bar', 'b')).toEqual([]);
});

test('where it stands when nothing is live, and where its one coil moves it', () => {
  const rest = (text: string) => positionsOf(valve(text)).rest;
  expect(rest('4/2, spring to b, coil a SOL1, passes 5 L/min at 1 bar')).toBe('b');
  expect(rest('3/2, normally closed, coil a SOL1, passes 5 L/min at 1 bar')).toBe('b');
  expect(rest('3/2, normally open, coil a SOL1, passes 5 L/min at 1 bar')).toBe('a');
  expect(sideOfCoil(valve('3/2, normally open, coil a SOL1, passes 5 L/min at 1 bar'), 'a')).toBe('b');
  expect(sideOfCoil(valve('2/2, normally closed, coil b SOL1, passes 5 L/min at 1 bar'), 'b')).toBe('a');
  expect(sideOfCoil(valve('4/2, spring to b, coil a SOL1, passes 5 L/min at 1 bar'), 'a')).toBe('a');
});

test('the figure of a path: its own, the general one, the mirrored one', () => {
  const paths = positionsOf(
    valve(
      '4/3, centre (A to T passes 2 L/min at 5 bar), spring to centre, coil a S1, coil b S2, passes P to A 60 L/min at 7 bar, passes A to T 40 L/min at 5 bar',
    ),
  ).paths;
  const flow = (side: 'a' | 'b' | 'centre', to: string) =>
    toLpm(paths[side].find((p) => p.from === to.split('-')[0] && p.to === to.split('-')[1])?.passes?.flow);
  expect(flow('a', 'P-A')).toBeCloseTo(60, 9);
  expect(flow('b', 'P-B')).toBeCloseTo(60, 9);
  expect(flow('b', 'A-T')).toBeCloseTo(40, 9);
  expect(flow('a', 'B-T')).toBeCloseTo(40, 9);
  expect(flow('centre', 'A-T')).toBeCloseTo(2, 9);
});

const PROPORTIONAL = (extra: string) => `${HEAD}${delivers('P1', 60, 'V1.P, RV1')}
relief RV1 (set 100 bar, passes 80 L/min at 5 bar)
directional V1 (4/3, proportional, centre closed, spring to centre, coil a SOL1, coil b SOL2, ${extra}passes 40 L/min at 5 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 900 mm, attitude level)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1`;

test('a compensated proportional valve gives flow by command, whatever the load', () => {
  const m = machineOf(PROPORTIONAL('compensator 5 bar, '));
  const flow = (opening: number, resist: number) =>
    toLpm(
      m.settle({ ...blank, valves: { V1: { position: 'a', opening } }, positions: { C1: 0.2 }, loads: { C1: load(0, resist) } }).flows[
        'V1.P'
      ],
    );
  expect(flow(0.5, 0)).toBeCloseTo(20, 1);
  expect(flow(0.5, 12000)).toBeCloseTo(20, 1);
  expect(flow(1, 5000)).toBeCloseTo(40, 1);
});

test('without a compensator the flow follows the drop', () => {
  const m = machineOf(PROPORTIONAL(''));
  const s = m.settle({ ...blank, valves: { V1: { position: 'a', opening: 0.25 } }, positions: { C1: 0.2 }, loads: { C1: load(0, 8000) } });
  const drop = toBar((s.pressures['P1.P'] ?? 0) - (s.pressures['V1.A'] ?? 0));
  expect(toLpm(s.flows['V1.P'])).toBeCloseTo(0.25 * 40 * Math.sqrt(drop / 5), 1);
});

test('a sequence valve with internal drain opens above its outlet; an external pilot opens it from elsewhere', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 10, 'SV1.P')}
sequence SV1 (set 40 bar, internal drain, passes 20 L/min at 4 bar)
relief RV1 (set 29.5 bar, override 0.1 %, passes 10 L/min at 1 bar)
working SV1.A to RV1
return RV1 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeGreaterThan(70);
  expect(toBar(s.pressures['P1.P'])).toBeLessThan(74);
});

test('a reducing valve that does not relieve traps what is pushed into it', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 20, 'RV1, PR1.P')}${delivers('P2', 1, 'PR1.A, RV2')}
relief RV1 (set 160 bar, passes 30 L/min at 3 bar)
relief RV2 (set 120 bar, passes 10 L/min at 3 bar)
reducing PR1 (set 50 bar, relieving no, passes 20 L/min at 4 bar)
drain PR1.Y to R1
return RV1, RV2 to R1`).settle(blank);
  expect(toBar(s.pressures['P2.P'] ?? s.pressures['PR1.A'])).toBeGreaterThan(120);
});
