/** Worked figures 19 to 22: counterbalance, pilot-operated check, sequence, reducing. */
import { expect, test } from 'vitest';
import { delivers, HEAD, holds, toBar } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

const opening = (x: number, valve: string, c: number, v: number, drain: string): number => {
  const id = valve.split(' ')[1] ?? '';
  const m = machineOf(`${HEAD}${valve}
${holds('c', c, 1, 1, `${id}.C`)}${holds('v', v, 1, 1, `${id}.V`)}${holds('x', x, 1, 1, `${id}.X`)}${drain}`);
  return m.settle(blank).openings[id] ?? Number.NaN;
};

test('19 counterbalance 210 bar 3:1, C 140, V 4: X from (210 + 16 - 140)/3 = 28.7 bar; Y vented: 23.3 bar', () => {
  const cb = 'counterbalance CB1 (set 210 bar, ratio 3:1, passes 60 L/min at 6 bar)';
  expect(opening(28.5, cb, 140, 4, '')).toBe(0);
  expect(opening(28.9, cb, 140, 4, '')).toBeGreaterThan(0);
  expect(opening(23.2, cb, 140, 4, 'drain CB1.Y to R1')).toBe(0);
  expect(opening(23.6, cb, 140, 4, 'drain CB1.Y to R1')).toBeGreaterThan(0);
});

test('20 pilot-operated check 3:1, crack 1, C 120, V 5: X from 43.67 bar; 4:1: 34.0 bar', () => {
  const pc = (ratio: number) => `pilotcheck PC1 (ratio ${ratio}:1, crack 1 bar, passes 60 L/min at 4 bar)`;
  expect(opening(43.6, pc(3), 120, 5, '')).toBe(0);
  expect(opening(43.75, pc(3), 120, 5, '')).toBeGreaterThan(0);
  expect(opening(33.95, pc(4), 120, 5, '')).toBe(0);
  expect(opening(34.05, pc(4), 120, 5, '')).toBeGreaterThan(0);
});

test('21 sequence 80 bar, A at 66 bar, 11.2 L/min: P 82.22 bar, 0.278 open', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 11.2, 'SV1.P')}
sequence SV1 (set 80 bar, passes 20 L/min at 4 bar)
relief RV1 (set 65.5 bar, override 0.1 %, passes 11.2 L/min at 1 bar)
working SV1.A to RV1
drain SV1.Y to R1
return RV1 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(82.22, 1);
  expect(s.openings.SV1).toBeCloseTo(0.278, 2);
});

const reducing = (rest: string) => `${HEAD}${holds('p', 160, 60, 40, 'PR1.P')}
reducing PR1 (set 70 bar, relieving yes, passes 80 L/min at 6 bar)
drain PR1.Y to R1
${rest}`;

test('22 reducing 70 bar, P 160, 20 L/min: A 69.77 bar; relieves from 73.5 bar', () => {
  const flowing = machineOf(reducing('throttle FC1 (set 20 L/min, compensated)\nworking PR1.A to FC1 to R1')).settle(blank);
  expect(toBar(flowing.pressures['PR1.A'])).toBeCloseTo(69.77, 1);
  const pushed = machineOf(reducing(delivers('P2', 0.02, 'PR1.A'))).settle(blank);
  const key = Object.keys(pushed.pressures).find((k) => k.includes('P2.P') || k.includes('PR1.A')) ?? '';
  expect(toBar(pushed.pressures[key])).toBeGreaterThan(73.5);
  expect(toBar(pushed.pressures[key])).toBeLessThan(73.8);
});
