/** Runs in time: shifting, stops, watches, memory bits, accumulators. */
import { assemble } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { delivers, HEAD, toBar } from '../support/bench.ts';
import { HEAD_AND_FEED } from '../support/machines.ts';
import { blank, circuitOf, load, machineOf } from '../support/text.ts';

const RAM = `${HEAD}${delivers('P1', 30, 'V1.P, RV1')}
relief RV1 (set 100 bar, passes 40 L/min at 5 bar)
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, takes 80 ms, passes 60 L/min at 5 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1`;
const A = (Math.PI * 0.05 ** 2) / 4;

test('a cylinder goes out and back: time by flow over area, stop at the end, pressures between', () => {
  const m = machineOf(RAM);
  const rest = m.settle(blank);
  expect(toBar(rest.pressures['P1.P'])).toBeGreaterThan(100);
  const run = m.start(blank, rest);
  run.shift('V1', { position: 'a' });
  const out = run.advance(10, [{ what: 'position', body: 'C1', threshold: 0.2, edge: 'rising' }]);
  expect(out.failed).toBeUndefined();
  expect(out.fired).toEqual([0]);
  expect(run.now().positions.C1).toBeCloseTo(0.2, 6);
  // 30 L/min into the cap once the valve is over, and a little that the oil at 107 bar gives when it expands.
  const stroke = (0.2 * A) / (30 / 60000);
  expect(out.time).toBeGreaterThan(stroke + 0.035);
  expect(out.time).toBeLessThan(stroke + 0.09);
  const end = run.advance(out.time + 2, []);
  expect(end.happened.map((h) => h.words)).toContain('C1 reaches its stop, extended');
  const stalled = run.now();
  expect(toBar(stalled.pressures['V1.A'])).toBeGreaterThan(100);
  expect(stalled.lifting).toEqual(['RV1']);
  run.shift('V1', { position: 'b' });
  const back = run.advance(end.time + 5, [{ what: 'position', body: 'C1', threshold: 0.01, edge: 'falling' }]);
  expect(back.fired).toEqual([0]);
  expect(back.happened.map((h) => h.words)).toContain('C1 leaves its stop');
  const annulus = A - (Math.PI * 0.028 ** 2) / 4;
  expect(back.time - end.time).toBeGreaterThan((0.29 * annulus) / (30 / 60000));
});

test('the valve is closed in the middle of its shift: all flow over the relief', () => {
  const m = machineOf(RAM);
  const start = { ...blank, valves: { V1: { position: 'a' as const } }, positions: { C1: 0.1 } };
  const run = m.start(start, m.settle(start));
  run.shift('V1', { position: 'b' });
  run.advance(0.04, []);
  const middle = run.now();
  expect(middle.flows['V1.P']).toBeCloseTo(0, 8);
  expect(middle.stands.V1?.position).toBe('a');
  run.advance(0.2, []);
  expect(run.now().stands.V1?.position).toBe('b');
  expect(run.now().velocities.C1).toBeLessThan(-0.1);
});

test('a pressure watch fires on the way', () => {
  const m = machineOf(RAM);
  const start = { ...blank, loads: { C1: load(0, 0, 0) } };
  const run = m.start(start, m.settle(start));
  run.shift('V1', { position: 'a' });
  const report = run.advance(10, [{ what: 'pressure', net: 'V1.A', threshold: 60e5, edge: 'rising' }]);
  expect(report.fired).toEqual([0]);
  expect(toBar(run.now().pressures['V1.A'])).toBeCloseTo(60, 3);
  expect(run.now().positions.C1).toBeCloseTo(0.3, 9);
});

test('an unloading valve lifts when the high-pressure pump has filled the store, and throttles when it is drawn down', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 20, 'UV1, CV1')}
pump P2 (displacement 6 cm3/rev, driven by M1, volumetric 100 %)
suction R1 to P2
unloading UV1 (set 90 bar, closes 70 bar, passes 40 L/min at 3 bar)
check CV1 (crack 0.5 bar, passes 40 L/min at 2 bar)
accumulator ACC1 (bladder, volume 2 L, precharge 50 bar at 45 degC, gas nitrogen)
throttle FC1 (set 4 L/min, compensated)
throttle FC2 (set 10 L/min, compensated)
directional V1 (2/2, normally closed, coil SOL1, passes 40 L/min at 1 bar, poppet, takes 20 ms)
working store: P2, CV1 to ACC1, FC1.in, V1.P
working V1.A to FC2
pilot store to UV1.X
return UV1, FC1.out, FC2.out to R1`);
  const run = m.start(blank, m.settle(blank));
  const up = run.advance(60, [{ what: 'pressure', net: 'store', threshold: 100e5, edge: 'rising' }]);
  expect(up.fired).toEqual([0]);
  expect(up.happened.at(-1)?.words).toBe('UV1 has lifted');
  expect(run.now().bits.UV1).toBe(true);
  run.shift('V1', { position: 'a' });
  const down = run.advance(up.time + 60, [{ what: 'pressure', net: 'store', threshold: 75e5, edge: 'falling' }]);
  expect(down.fired).toEqual([0]);
  // From 100 to 75 bar at n = 1.4, 4 + 10 - 6 L/min: V0 ((p0/p1)^(1/n) - (p0/p2)^(1/n)).
  const [p0, p1, p2] = [51.01325, 76.01325, 101.01325];
  const taken = 2 * ((p0 / p1) ** (1 / 1.4) - (p0 / p2) ** (1 / 1.4));
  expect(Math.abs((down.time - up.time) / ((taken / 8) * 60) - 1)).toBeLessThan(0.03);
  // Lower down the valve throttles: the big pump makes up what is drawn, between `closes` and a band above it.
  run.advance(down.time + 20, []);
  expect(toBar(run.now().pressures.store)).toBeGreaterThan(70);
  expect(toBar(run.now().pressures.store)).toBeLessThan(75);
  expect(run.now().openings.UV1).toBeGreaterThan(0);
});

test('a piloted valve waits for its pilot pressure and shifts when it comes', () => {
  const m = machineOf(
    `${HEAD}${delivers('P1', 20, 'V2.P, V1.P, RV1')}
relief RV1 (set 100 bar, passes 40 L/min at 5 bar)
directional V2 (2/2, normally open, coil a SOL2, passes 40 L/min at 1 bar)
directional V1 (4/2, spring to b, internal pilot, needs 15 bar, coil a SOL1, passes 40 L/min at 5 bar, centre closed)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm, begins retracted)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1, V2.A to R1`.replace(', centre closed', ''),
  );
  const asked = { ...blank, valves: { V1: { position: 'a' as const } } };
  const settled = m.settle(asked);
  expect(settled.remarks[0]?.words).toMatch(/^V1 cannot shift: 0\.\d of 15 bar$/);
  expect(settled.stands.V1?.position).toBe('b');
  const loaded = { ...blank, loads: { C1: load(0, 6000) } };
  const run = m.start(loaded, m.settle(loaded));
  run.shift('V1', { position: 'a' });
  const waits = run.advance(0.5, []);
  expect(waits.happened[0]?.words).toMatch(/^V1 cannot shift/);
  run.shift('V2', { position: 'b' });
  const goes = run.advance(1.5, []);
  expect(goes.happened.map((h) => h.words)).toContain('V1 shifts to a');
  expect(run.now().velocities.C1).toBeGreaterThan(0);
});

test('a proportional command is followed along its ramp', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 60, 'V1.P, RV1')}
relief RV1 (set 100 bar, passes 80 L/min at 5 bar)
directional V1 (4/3, proportional, centre closed, spring to centre, coil a SOL1, coil b SOL2, compensator 5 bar, passes 30 L/min at 5 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 900 mm)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1`);
  const run = m.start(blank, m.settle(blank));
  run.shift('V1', { position: 'a', opening: 0.8 }, { over: 1 });
  run.advance(0.5, []);
  expect((run.now().velocities.C1 ?? 0) * A * 60000).toBeCloseTo(0.4 * 30, 1);
  run.advance(1.5, []);
  expect((run.now().velocities.C1 ?? 0) * A * 60000).toBeCloseTo(0.8 * 30, 1);
  run.shift('V1', { position: 'b', opening: 0.5 }, { over: 1.3 });
  run.advance(1.5 + 0.8, []);
  expect(Math.abs(run.now().velocities.C1 ?? 1)).toBeLessThan(1e-3);
  run.advance(3, []);
  expect(run.now().velocities.C1).toBeLessThan(-0.1);
});

test('a brake lets go as its release pressure rises, and holds again when it is gone', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 40, 'V1.P, RV1')}
relief RV1 (set 150 bar, passes 60 L/min at 5 bar)
directional V1 (4/3, centre open, spring to centre, coil a SOL1, coil b SOL2, takes 80 ms, passes 60 L/min at 5 bar)
motor HM1 (displacement 200 cm3/rev, gear 10:1, fastest 400 rpm, rated 250 bar)
shuttle SH1
throttle OR1 (orifice 1 mm, reverse check)
brake BR1 (on HM1, opens 20 bar, torque 180 N.m, volume 30 cm3)
counterbalance CB1 (set 200 bar, ratio 4:1, passes 60 L/min at 6 bar)
working up: V1.A to CB1.V
working CB1.C to HM1.A
working side_b: V1.B to HM1.B
pilot side_b to CB1.X
working up to SH1.A
working side_b to SH1.B
working SH1.C to OR1 to BR1
drain HM1.L to R1
return V1.T, RV1 to R1`);
  const hoist = { ...blank, loads: { HM1: load(-900, 0, 20) } };
  const run = m.start(hoist, m.settle(hoist));
  run.advance(1, []);
  expect(Math.abs(run.now().velocities.HM1 ?? 1)).toBeLessThan(1e-3);
  run.shift('V1', { position: 'a' });
  const up = run.advance(8, []);
  expect(up.failed).toBeUndefined();
  expect(((run.now().velocities.HM1 ?? 0) * 60) / (2 * Math.PI)).toBeCloseTo(20, 0);
  run.shift('V1', { position: 'centre' });
  run.advance(10, []);
  expect(Math.abs(run.now().velocities.HM1 ?? 1)).toBeLessThan(1e-3);
});

test('what happens along the way is told in words, when it happens', () => {
  const m = machineOf(HEAD_AND_FEED);
  const setting = { ...blank, valves: { V0: { position: 'b' as const } }, loads: { C2: load(0, 0, 250) } };
  const run = m.start(setting, m.settle(setting));
  run.shift('V2', { position: 'a' });
  const report = run.advance(20, [{ what: 'position', body: 'C2', threshold: 0.3, edge: 'rising' }]);
  const at = (words: string) => report.happened.find((h) => h.words === words)?.time ?? Number.NaN;
  // 371 mm/s in fast motion, the valve over in 50 ms; then 35 mm at 10 mm/s.
  expect(at('DV1 begins to close')).toBeGreaterThan(0.25 / 0.371);
  expect(at('DV1 begins to close')).toBeLessThan(0.25 / 0.371 + 0.06);
  expect(at('DV1 closed')).toBeGreaterThan(at('DV1 begins to close'));
  // 35 mm less the 2 mm by which 0.35 L of rod-side oil gives way when its pressure rises by 180 bar.
  expect(report.time - at('DV1 closed')).toBeGreaterThan(3.2);
  expect(report.time - at('DV1 closed')).toBeLessThan(3.5);
  expect(report.happened.map((h) => h.words)).toContain('UV1 has lifted');
});

test('a telescopic cylinder takes the volume of all its stages', () => {
  const m = machineOf(`${HEAD}cylinder C1 (bore 100 mm, telescopic 80 mm and 60 mm, single cap, stroke 900 mm, attitude rod up)
${delivers('P1', 20, 'C1.cap, RV1')}
relief RV1 (set 150 bar, passes 30 L/min at 3 bar)
return RV1 to R1`);
  const setting = { ...blank, loads: { C1: load(-20000) } };
  const run = m.start(setting, m.settle({ ...setting, drives: { M1: false } }));
  run.drive('M1', true);
  const report = run.advance(60, [{ what: 'position', body: 'C1', threshold: 0.899, edge: 'rising' }]);
  const volume = ((100 ** 2 + 80 ** 2 + 60 ** 2) * (Math.PI / 4) * 300) / 1e6;
  expect(report.fired).toEqual([0]);
  // And what the oil takes as its pressure rises from stage to stage.
  expect(report.time).toBeGreaterThan((volume / 20) * 60 - 0.05);
  expect(report.time).toBeLessThan((volume / 20) * 60 + 0.3);
  expect(report.happened.filter((h) => h.words === 'C1 next stage').length).toBe(2);
});

test('a cushion slows the rod before its stop', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 20, 'C1.cap, RV1')}
relief RV1 (set 60 bar, passes 30 L/min at 3 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 400 mm, cushion 25 mm)
working C1.rod to R1
return RV1 to R1`);
  const start = { ...blank, positions: { C1: 0.3 } };
  const run = m.start(start, m.settle(start));
  run.advance(5, [{ what: 'position', body: 'C1', threshold: 0.37, edge: 'rising' }]);
  const before = run.now().velocities.C1 ?? 0;
  run.advance(5, [{ what: 'position', body: 'C1', threshold: 0.3995, edge: 'rising' }]);
  const last = run.now().velocities.C1 ?? 0;
  expect(before).toBeCloseTo(20 / 60 / 1.9635, 2);
  expect(last).toBeLessThan(0.5 * before);
  const end = run.advance(8, []);
  expect(end.happened.map((h) => h.words)).toContain('C1 reaches its stop, extended');
});

test('a spring brings a single-acting cylinder back when its port is led to the reservoir', () => {
  const m = machineOf(`${HEAD}${delivers('P1', 10, 'V1.P, RV1')}
relief RV1 (set 60 bar, passes 30 L/min at 3 bar)
directional V1 (3/2, normally closed, coil SOL1, passes 20 L/min at 4 bar)
cylinder C1 (bore 40 mm, rod 18 mm, single cap, spring 900 N to 1500 N, stroke 100 mm)
working V1.A to C1.cap
return V1.T, RV1 to R1`);
  const run = m.start(blank, m.settle(blank));
  run.shift('V1', { position: 'a' });
  run.advance(3, []);
  expect(run.now().positions.C1).toBeCloseTo(0.1, 6);
  run.shift('V1', { position: 'b' });
  run.advance(10, []);
  expect(run.now().positions.C1).toBeCloseTo(0, 6);
});

test('full dynamics and quasi-static run agree on a slow machine', () => {
  const end = (dynamics: boolean): number => {
    const m = assemble(circuitOf(RAM), { dynamics });
    const run = m.start(blank, m.settle(blank));
    run.shift('V1', { position: 'a' });
    return run.advance(10, [{ what: 'position', body: 'C1', threshold: 0.25, edge: 'rising' }]).time;
  };
  expect(Math.abs(end(true) / end(false) - 1)).toBeLessThan(0.01);
});
