/** Worked figures 25 to 28: motor with gear, brake, gear divider. */
import { expect, test } from 'vitest';
import { delivers, HEAD, holds, toBar, toLpm } from '../support/bench.ts';
import { blank, load, machineOf } from '../support/text.ts';

test('25, 26 motor 200 cm3/rev, 10:1, 920 N.m: 32.11 bar, 19.7 rpm', () => {
  const m = machineOf(`${HEAD.replace('1000 rpm', '1450 rpm')}
pump P1 (displacement 28 cm3/rev, driven by M1, volumetric 92 %, rated 250 bar)
shutoff BV1 (open, passes 40.08 L/min at 7.89 bar)
motor HM1 (displacement 200 cm3/rev, gear 10:1, mechanical 90 %, volumetric 94 %, fastest 400 rpm, rated 250 bar)
suction R1 to P1
working P1 to BV1.A
working BV1.B to HM1.A
working HM1.B to R1
plug HM1.L`);
  const s = m.settle({ ...blank, loads: { HM1: load(0, 920) } });
  expect(toBar(s.pressures['BV1.B'])).toBeCloseTo(32.11, 1);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(40, 1);
  expect(((s.velocities.HM1 ?? 0) * 60) / (2 * Math.PI)).toBeCloseTo(19.7, 1);
  expect(s.forces.HM1).toBeCloseTo(920, 0);
});

test('27 brake 180 N.m, opens 20 bar, at 8 bar: holds 108 N.m at the motor shaft', () => {
  const m = machineOf(`${HEAD}motor HM1 (displacement 200 cm3/rev)
brake BR1 (on HM1, opens 20 bar, torque 180 N.m)
working HM1.A to R1
working HM1.B to R1
${holds('br', 8, 1, 1, 'BR1')}`);
  const turns = (torque: number) => Math.abs(m.settle({ ...blank, loads: { HM1: load(torque) } }).velocities.HM1 ?? Number.NaN);
  expect(turns(107)).toBeLessThan(1e-3);
  expect(turns(109)).toBeGreaterThan(0.01);
  expect(turns(-107)).toBeLessThan(1e-3);
});

test('28 gear divider 1:1, 2 %, A at 100, B at 60 bar, 20.3 L/min: P 83.96 bar; A 10.05, B 10.25 L/min', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 20.3, 'FD1.P')}
divider FD1 (gear, share 1:1, error 2 %, passes 25 L/min at 6 bar)
relief RV1 (set 99.5 bar, override 0.1 %, passes 10.05 L/min at 1 bar)
relief RV2 (set 59.5 bar, override 0.1 %, passes 10.25 L/min at 1 bar)
working FD1.A to RV1
working FD1.B to RV2
return RV1, RV2 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(83.96, 1);
  expect(-toLpm(s.flows['FD1.A'])).toBeCloseTo(10.05, 2);
  expect(-toLpm(s.flows['FD1.B'])).toBeCloseTo(10.25, 2);
});
