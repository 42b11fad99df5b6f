/** Worked figures 1 to 3: relief valves. Hand figures from the law: set + override in proportion to flow, body as floor. */
import { expect, test } from 'vitest';
import { delivers, HEAD, toBar } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

test('1 relief at 60 of 100 L/min with 2 bar behind it: 160 + 2 + 16 x 0.6 = 171.6 bar', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 60, 'RV1')}
relief RV1 (set 160 bar, override 10 %, passes 100 L/min at 5 bar)
check CV1 (crack 2 bar)
return RV1 to CV1 to R1`);
  const s = m.settle(blank);
  expect(s.solved).toBe(true);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(171.6, 1);
  expect(s.lifting).toEqual(['RV1']);
});

const VENTED = (flow: number, x: string) => `${HEAD}${delivers('P1', flow, 'RV1')}
relief RV1 (set 160 bar, override 8 %, piloted, vented 4 bar, passes 90 L/min at 6 bar)
${x}
return RV1 to R1`;

// 8 % of 4 bar is less than the least band of 0.5 bar: 4 + 0.5 x 69.6/90 (figure 39 rests on the same; 4.25 bar would leave the least band out).
test('2 vented relief: 4 + 0.5 x 69.6/90 = 4.39 bar, floor 3.59', () => {
  expect(toBar(machineOf(VENTED(69.6, 'pilot RV1.X to R1')).settle(blank).pressures['P1.P'])).toBeCloseTo(4.39, 1);
  expect(toBar(machineOf(VENTED(0.5, 'pilot RV1.X to R1')).settle(blank).pressures['P1.P'])).toBeCloseTo(4.0, 1);
});

test('2 the override of a vented valve is a share of `vented`: 8 + 0.1 x 8 x 0.5 at half the flow', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 45, 'RV1')}
relief RV1 (set 160 bar, override 10 %, piloted, vented 8 bar, passes 90 L/min at 6 bar)
pilot RV1.X to R1
return RV1 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(8.4, 1);
});

test('2 a blocked vent leaves the setting: 160 + 12.8 x 69.6/90', () => {
  const s = machineOf(VENTED(69.6, 'plug RV1.X')).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(160 + (12.8 * 69.6) / 90, 1);
});

test('3 relief by coil: half command 60 + 6 x 0.4 = 62.4 bar; dead coil 3 + 0.5 x 0.4 = 3.2 bar', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 40, 'RV1')}
relief RV1 (set 120 bar, coil SOL1, passes 100 L/min at 6 bar, vented 3 bar)
return RV1 to R1`);
  expect(toBar(m.solve({ ...blank, commands: { SOL1: 60e5 } }).pressures['P1.P'])).toBeCloseTo(62.4, 1);
  expect(toBar(m.solve(blank).pressures['P1.P'])).toBeCloseTo(3.2, 1);
});
