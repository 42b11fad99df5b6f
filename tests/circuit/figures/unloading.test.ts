/** Worked figures 4 and 5: unloading valve, set 45, closes 38, band 4.5 bar. */
import { expect, test } from 'vitest';
import { delivers, HEAD, holds } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

const unit = (pilot: number) =>
  machineOf(`${HEAD}${delivers('P1', 40, 'UV1')}${holds('x', pilot, 1, 1, 'UV1.X')}
unloading UV1 (set 45 bar, closes 38 bar, passes 80 L/min at 3 bar)
return UV1 to R1`);
const lifted = { ...blank, bits: { UV1: true } };

test('4 rising: (47 - 45)/4.5 = 0.444 open; lifted from 49.5 bar', () => {
  expect(unit(47).solve(blank).openings.UV1).toBeCloseTo(0.444, 3);
  expect(unit(49.4).settle(blank).bits.UV1).toBe(false);
  expect(unit(49.6).settle(blank).bits.UV1).toBe(true);
});

test('5 falling: open at 47, (40 - 38)/4.5 = 0.444 at 40, shut at 38 bar', () => {
  expect(unit(47).solve(lifted).openings.UV1).toBeCloseTo(1, 3);
  expect(unit(40).solve(lifted).openings.UV1).toBeCloseTo(0.444, 3);
  expect(unit(40).settle(lifted).bits.UV1).toBe(true);
  expect(unit(37.9).settle(lifted).bits.UV1).toBe(false);
  expect(unit(37.9).settle(lifted).openings.UV1).toBe(0);
});

test('both curves meet where the bit turns: nothing jumps', () => {
  expect(unit(49.5).solve(blank).openings.UV1).toBeCloseTo(1, 3);
  expect(unit(49.5).solve(lifted).openings.UV1).toBeCloseTo(1, 3);
  expect(unit(38).solve(blank).openings.UV1).toBeCloseTo(0, 3);
  expect(unit(38).solve(lifted).openings.UV1).toBeCloseTo(0, 3);
});
