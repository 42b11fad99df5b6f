/** What a run is stopped for: level, oil, drop over a filter, ends of a stroke. */
import { realOilAt } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { delivers, HEAD, toBar } from '../support/bench.ts';
import { blank, machineOf } from '../support/text.ts';

test('the level falls by what the rod leaves free', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 30, 'C1.cap')}
cylinder C1 (bore 100 mm, rod 70 mm, stroke 500 mm)
working C1.rod to R1`);
  const run = m.start(blank, m.settle(blank));
  const report = run.advance(60, [{ what: 'level', reservoir: 'R1', threshold: 0.099, edge: 'falling' }]);
  expect(report.fired).toEqual([0]);
  // 1 L of rod volume.
  expect(run.now().positions.C1).toBeCloseTo(1e-3 / ((Math.PI * 0.07 ** 2) / 4), 4);
});

const STORE = `${HEAD}${delivers('P1', 10, 'ACC1, RV1')}
accumulator ACC1 (bladder, volume 4 L, precharge 50 bar at 45 degC, gas nitrogen)
relief RV1 (set 120 bar, passes 20 L/min at 2 bar)
return RV1 to R1`;

test('oil in an accumulator, and its gas pressure', () => {
  const m = machineOf(STORE);
  const run = m.start(blank, m.settle(blank));
  const report = run.advance(60, [{ what: 'oil', accumulator: 'ACC1', threshold: 1e-3, edge: 'rising' }]);
  expect(report.fired).toEqual([0]);
  const now = run.now();
  expect((now.oil.ACC1 ?? 0) * 1e3).toBeCloseTo(1, 5);
  // p V^1.4 from 51.013 bar absolute.
  const absolute = 51.01325 * (4 / 3) ** 1.4;
  expect((now.gasPressures?.ACC1 ?? 0) / 1e5).toBeCloseTo(absolute, 1);
  expect(toBar(now.pressures['P1.P'])).toBeCloseTo(absolute - 1.01325, 1);
  expect(report.time).toBeCloseTo(6, 0);
});

test('from another exponent on the charge goes on from where it is', () => {
  const m = machineOf(STORE);
  const run = m.start(blank, m.settle(blank));
  run.advance(60, [{ what: 'oil', accumulator: 'ACC1', threshold: 1e-3, edge: 'rising' }]);
  const before = run.now().gasPressures?.ACC1 ?? 0;
  run.gasExponent(1);
  run.advance(120, [{ what: 'oil', accumulator: 'ACC1', threshold: 1.5e-3, edge: 'rising' }]);
  expect((run.now().gasPressures?.ACC1 ?? 0) / before).toBeCloseTo(3 / 2.5, 3);
});

test('a drop between two lines', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 30, 'V1.P')}
directional V1 (4/2, spring to b, coil a SOL1, takes 200 ms, passes 40 L/min at 2 bar)
filter F1 (passes 30 L/min at 1 bar, bypass none)
working V1.A to F1.in
working F1.out to R1
plug V1.B
return V1.T to R1`);
  const run = m.start(blank, m.settle(blank));
  run.shift('V1', { position: 'a' });
  const report = run.advance(2, [{ what: 'pressure', net: 'V1.A', minus: 'F1.out', threshold: 0.5e5, edge: 'rising' }]);
  expect(report.fired).toEqual([0]);
  expect(toBar(run.now().pressures['V1.A'])).toBeCloseTo(0.5, 4);
});

test('a threshold at the stop itself is not passed by standing on it', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 30, 'V1.P, RV1')}
relief RV1 (set 60 bar, passes 40 L/min at 2 bar)
directional V1 (4/2, spring to b, coil a SOL1, passes 40 L/min at 2 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 100 mm, begins extended)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1`);
  const run = m.start(blank, m.settle(blank));
  const report = run.advance(5, [{ what: 'position', body: 'C1', threshold: 0, edge: 'falling' }]);
  expect(report.fired).toEqual([]);
  expect(run.now().positions.C1).toBe(0);
  expect(report.happened.map((h) => h.words)).toContain('C1 reaches its stop, retracted');
});

// 10 L, precharge 90 bar, filled slowly to 200 bar at 20 degC, let down quickly to 100 bar: 2.189 L (real nitrogen; p V^1.4 would give 2.874 L).
test('a high charge gives what real nitrogen gives', () => {
  const m =
    machineOf(`${HEAD.replace('45 degC', '20 degC')}accumulator ACC1 (bladder, volume 10 L, precharge 90 bar at 20 degC, gas nitrogen)
throttle FC1 (set 20 L/min, compensated)
working ACC1 to FC1 to R1`);
  const filled = realOilAt(0.01, 90e5 + 101325, 200e5 + 101325, 293.15);
  const setting = { ...blank, oil: { ACC1: filled }, gasPressures: { ACC1: 200e5 + 101325 } };
  const run = m.start(setting, m.settle(setting));
  const report = run.advance(60, [{ what: 'pressure', net: 'ACC1.P', threshold: 100e5, edge: 'falling' }]);
  expect(report.fired).toEqual([0]);
  expect(Math.abs((filled - (run.now().oil.ACC1 ?? 0)) / 2.189e-3 - 1)).toBeLessThan(3e-3);
  // Left alone, the gas warms up again along another curve from where it is.
  run.gasExponent(1);
  expect(toBar(run.now().pressures['ACC1.P'])).toBeCloseTo(100, 1);
});
