/** Laws of kinds at work in small circuits; hand figures beside each. */
import { expect, test } from 'vitest';
import { delivers, HEAD, holds, toBar, toLpm } from '../support/bench.ts';
import { blank, load, machineOf } from '../support/text.ts';

const disc = (mm: number) => (Math.PI * mm * mm) / 4;

test('a telescopic cylinder extends its largest stage first and goes faster with each next one', () => {
  const m = machineOf(`${HEAD}cylinder C1 (bore 100 mm, telescopic 80 mm and 60 mm, single cap, stroke 900 mm, attitude rod up)
${delivers('P1', 20, 'C1.cap')}`);
  const speed = (x: number) => m.settle({ ...blank, positions: { C1: x } }).velocities.C1 ?? 0;
  expect(speed(0.1) * disc(100)).toBeCloseTo((20 / 60) * 1e3, 1);
  expect(speed(0.4) * disc(80)).toBeCloseTo((20 / 60) * 1e3, 1);
  expect(speed(0.8) * disc(60)).toBeCloseTo((20 / 60) * 1e3, 1);
  expect(m.bodies[0]?.knots.map((k) => k.at)).toEqual([0.3, 0.6]);
});

test('a bypass flow control keeps its flow and the pump at load pressure + needs', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 30, 'FC1.in')}
throttle FC1 (set 12 L/min, compensated, needs 6 bar)
${holds('load', 80, 1, 13, 'FC1.out')}
return FC1.T to R1`).settle(blank);
  expect(-toLpm(s.flows['FC1.out'])).toBeCloseTo(12, 0);
  expect(toBar(s.pressures['P1.P'])).toBeGreaterThan(86 - 0.1);
  expect(toBar(s.pressures['P1.P'])).toBeLessThan(87);
});

test('two cylinders on one beam share the load by their own areas', () => {
  const m = machineOf(`${HEAD}cylinder C1 (bore 50 mm, single cap, stroke 300 mm, seal 0 bar, attitude rod up)
cylinder C2 (bore 80 mm, single cap, stroke 300 mm, seal 0 bar, attitude rod up)
${delivers('P1', 20, 'C1.cap, C2.cap')}
load C1 with C2 (mass 1 t)`);
  expect(m.bodies.map((b) => b.actuators)).toEqual([['C1', 'C2']]);
  const s = m.settle({ ...blank, positions: { C1: 0.1 }, loads: { C1: load(-30000) } });
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo((30000 * 10) / (disc(50) + disc(80)), 1);
  expect((s.velocities.C1 ?? 0) * (disc(50) + disc(80))).toBeCloseTo((20 / 60) * 1e3, 1);
});

test('elevation: a cylinder 10 m above the oil needs 0.0853 bar a metre more', () => {
  const at = (metres: number) =>
    machineOf(`${HEAD.replace('temperature 45 degC', 'density 870 kg/m3, temperature 45 degC')}cylinder C1 (bore 50 mm, single cap, stroke 300 mm, seal 0 bar, elevation ${metres} m)
${delivers('P1', 5, 'C1.cap')}`);
  const setting = { ...blank, positions: { C1: 0.1 }, loads: { C1: load(-10000) } };
  const [low, high] = [at(0).settle(setting), at(10).settle(setting)];
  expect(toBar((high.pressures['P1.P'] ?? 0) - (low.pressures['P1.P'] ?? 0))).toBeCloseTo(0.853, 3);
  expect(toBar(at(10).heads.C1)).toBeCloseTo(0.853, 3);
});

test('a cam valve stands by the place of its actuator', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 20, 'V2.P, RV1')}
relief RV1 (set 60 bar, passes 30 L/min at 3 bar)
directional V2 (2/2, normally closed, cam a C1 from 100 mm to 200 mm, passes 40 L/min at 4 bar)
cylinder C1 (bore 50 mm, single cap, stroke 300 mm)
plug C1.cap
working V2.A to R1
return RV1 to R1`);
  const pressure = (x: number) => toBar(m.settle({ ...blank, positions: { C1: x } }).pressures['P1.P']);
  expect(pressure(0.05)).toBeGreaterThan(60);
  expect(pressure(0.1001)).toBeCloseTo(1, 1);
  expect(pressure(0.15)).toBeCloseTo(1, 1);
  expect(pressure(0.25)).toBeGreaterThan(60);
});

test('a shuttle passes the higher pressure and nothing across', () => {
  const s = machineOf(`${HEAD}${holds('a', 80, 5, 4, 'SH1.A')}${holds('b', 30, 5, 5, 'SH1.B')}
shuttle SH1
throttle FC1 (set 1 L/min, compensated)
working SH1.C to FC1 to R1`).settle(blank);
  expect(toBar(s.pressures['SH1.C'])).toBeCloseTo(80, 1);
  expect(toLpm(s.flows['SH1.A'])).toBeCloseTo(1, 2);
  expect(toLpm(s.flows['SH1.B'])).toBeCloseTo(0, 3);
});

test('an intensifier of 4:1 brings four times the pressure and a quarter of the flow', () => {
  const s = machineOf(`${HEAD}${holds('p', 50, 20, 12, 'IN1.P')}
intensifier IN1 (ratio 4:1)
throttle FC1 (set 2 L/min, compensated)
working IN1.A to FC1 to R1
return IN1.T to R1`).settle(blank);
  expect(toBar(s.pressures['IN1.A'])).toBeCloseTo(200, 0);
  expect(toLpm(s.flows['IN1.P'])).toBeCloseTo(8, 1);
});

test('a motor with its casing drained: half the leakage leaves at L', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 40, 'HM1.A')}
motor HM1 (displacement 100 cm3/rev, volumetric 90 %, mechanical 90 %, fastest 400 rpm, rated 200 bar)
working HM1.B to R1
drain HM1.L to R1`).settle({ ...blank, loads: { HM1: load(0, 143.2) } });
  // 143.2 N.m need 100 bar; leakage (1/0.9 - 1) x 40 L/min / 200 bar x 100 bar = 2.22 L/min, half of it at L.
  expect(toBar(s.pressures['P1.P'])).toBeCloseTo(100, 0);
  expect(-toLpm(s.flows['HM1.L'])).toBeCloseTo(1.11, 2);
  expect(((s.velocities.HM1 ?? 0) / (2 * Math.PI)) * 60).toBeCloseTo((40 - 2.22) * 10, 0);
});

test('a locked actuator presses with its pressure less seal friction', () => {
  const m = machineOf(`${HEAD}cylinder C1 (bore 63 mm, rod 36 mm, stroke 320 mm)
${holds('p', 100, 5, 5, 'C1.cap')}
working C1.rod to R1`);
  const setting = { ...blank, positions: { C1: 0.1 }, loads: { C1: load(0, 5000) } };
  const s = m.solve({ ...setting, locked: ['C1'] }, m.settle(setting));
  expect(s.forces.C1).toBeCloseTo(((100 - 3) * disc(63)) / 10, -1);
});

test('shut-offs and couplings the other way round, where a rule asks', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 20, 'BV1.A, RV1')}
relief RV1 (set 60 bar, passes 30 L/min at 3 bar)
shutoff BV1 (open)
coupling QC1 (seals both)
working BV1.B to QC1 to R1
return RV1 to R1`);
  expect(toBar(m.settle(blank).pressures['P1.P'])).toBeLessThan(0.1);
  expect(toBar(m.settle({ ...blank, contrary: ['BV1'] }).pressures['P1.P'])).toBeGreaterThan(60);
  expect(toBar(m.settle({ ...blank, contrary: ['QC1'] }).pressures['P1.P'])).toBeGreaterThan(60);
});

test('cold oil: drop of a path x (nu ratio)^0.25, of a filter x (0.3 + 0.7 nu ratio), leakage less', () => {
  const text = `${HEAD}pump P1 (displacement 20 cm3/rev, driven by M1, volumetric 90 %, rated 200 bar)
shutoff BV1 (open, passes 20 L/min at 4 bar)
filter F1 (passes 20 L/min at 0.5 bar, bypass none)
suction R1 to P1
working P1 to BV1.A
working BV1.B to F1 to R1`;
  const [warm, cold] = [machineOf(text).settle(blank), machineOf(text, 293.15).settle(blank)];
  // Grade 46, index 100: 36.9 mm2/s at 45 degC, 134.5 at 20 degC (ASTM D341, D2270); density 1.0178.
  const ratio = 134.5 / 36.9;
  const drop = (s: typeof warm, from: string, to: string) => toBar((s.pressures[from] ?? 0) - (s.pressures[to] ?? 0));
  expect(drop(cold, 'BV1.B', 'F1.out') / drop(warm, 'BV1.B', 'F1.out')).toBeCloseTo(0.3 + 0.7 * ratio, 1);
  expect(drop(cold, 'P1.P', 'BV1.B') / drop(warm, 'P1.P', 'BV1.B')).toBeCloseTo(1.0178 * ratio ** 0.25, 2);
  expect(-toLpm(cold.flows['P1.P'])).toBeGreaterThan(-toLpm(warm.flows['P1.P']));
});
