/** Worked figures 6 to 9: pumps. */
import { expect, test } from 'vitest';
import { HEAD, holds, toBar, toLpm } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

const head = HEAD.replace('speed 1000 rpm', 'speed 1450 rpm');

test('6, 7 flow 58 (1 - 0.06 x 40/210) = 57.34 L/min at 40 bar; shaft 58 x 40/(600 x 0.92) = 4.203 kW', () => {
  const s = machineOf(`${head}
pump P1 (displacement 40 cm3/rev, driven by M1, volumetric 94 %, mechanical 92 %, rated 210 bar)
relief RV1 (set 39.5 bar, override 0.1 %, passes 57.34 L/min at 1 bar)
suction R1 to P1
working P1 to RV1
return RV1 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(40, 2);
  expect(-toLpm(s.flows['P1.P'])).toBeCloseTo(57.34, 2);
  expect((s.shaft.P1 ?? 0) / 1e3).toBeCloseTo(4.203, 2);
  expect(s.shaft.M1).toBe(s.shaft.P1);
});

test('8 compensator 140 bar at 137 bar: (140 - 137)/4.2 of 81.2 = 58.0 L/min', () => {
  const s = machineOf(`${head}
pump P1 (displacement 56 cm3/rev, driven by M1, compensator 140 bar, volumetric 100 %)
relief RV1 (set 136.5 bar, override 0.1 %, passes 58 L/min at 1 bar)
suction R1 to P1
working P1 to RV1
return RV1 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(137, 2);
  expect(-toLpm(s.flows['P1.P'])).toBeCloseTo(58.0, 1);
});

test('9 load sensing 20 bar above 90 at 60 % stroke: 90 + 20 - 2 x 0.6 = 108.8 bar', () => {
  const s = machineOf(`${head.replace('1450', '1000')}${holds('ls', 90, 1, 1, 'P1.LS')}
pump P1 (displacement 50 cm3/rev, driven by M1, compensator 250 bar, sensing 20 bar, volumetric 100 %)
relief RV1 (set 108.3 bar, override 0.1 %, passes 30 L/min at 1 bar)
suction R1 to P1
working P1 to RV1
return RV1 to R1`).settle(blank);
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(108.8, 1);
  expect(-toLpm(s.flows['P1.P'])).toBeCloseTo(30, 1);
});
