/** Worked figures 39 to 42: a two-pump drilling station at rest, in fast motion, in feed, and with its cam valve part closed. */
import { expect, test } from 'vitest';
import { toBar, toLpm } from '../support/bench.ts';
import { blank, load, machineOf } from '../support/text.ts';

const STATION = `
fluid HM46 (grade 46, index 100, temperature 45 degC)
reservoir R1 (volume 220 L)
drive M1 (power 5.5 kW, speed 1450 rpm)
pump P1 (displacement 40 cm3/rev, driven by M1, volumetric 94 %, rated 210 bar)
pump P2 (displacement 8 cm3/rev, driven by M1, volumetric 93 %, rated 250 bar)
check CV1 (crack 0.5 bar, passes 80 L/min at 3 bar)
unloading UV1 (set 40 bar, closes 34 bar, passes 80 L/min at 3 bar)
relief RV1 (set 160 bar, override 8 %, piloted, vented 4 bar, passes 90 L/min at 6 bar)
directional V0 (2/2, normally open, coil a SOL0, passes 5 L/min at 1 bar)
directional V1 (4/2, detent, coil a SOL1, coil b SOL4, passes 80 L/min at 5 bar)
directional V2 (4/3, centre closed, spring to centre, coil a SOL2, coil b SOL3, passes 100 L/min at 5 bar)
reducing PR1 (set 70 bar, relieving yes, reverse check, passes 80 L/min at 6 bar)
check CV2 (crack 0.5 bar, passes 80 L/min at 3 bar)
accumulator ACC1 (diaphragm, volume 0.5 L, precharge 50 bar at 20 degC, gas nitrogen)
throttle FC1 (set 1.26 L/min, compensated, reverse check)
deceleration DV1 (closed by C2 from 250 mm to 265 mm, passes 60 L/min at 4 bar)
cylinder C1 (bore 63 mm, rod 36 mm, stroke 60 mm, attitude rod down)
cylinder C2 (bore 63 mm, rod 36 mm, stroke 320 mm, attitude level)
filter F1 (passes 160 L/min at 0.4 bar, bypass 1.7 bar)
suction R1 to P1, P2
working P1 to UV1, CV1
working pressure: P2, CV1 to RV1, V2.P, CV2.in
pilot pressure to UV1.X
pilot RV1.X to V0.P
drain V0.A to R1
working CV2.out to PR1
working clamp_oil: PR1.A to V1.P, ACC1
working V1.A to C1.cap
working V1.B to C1.rod
working V2.A to C2.cap
working C2.rod to FC1, DV1 to V2.B
return V1.T, V2.T to F1 to R1
return UV1, RV1 to R1
drain PR1.Y to R1
load C1 (mass 6 kg)
load C2 (mass 120 kg)
`;
// The clamp stands at its stop and its oil is under 70 bar: nothing flows through CV2.
const clamped = { ...blank, positions: { C1: 0.06, C2: 0.1 }, oil: { ACC1: 1.6e-4 }, valves: { V1: { position: 'a' as const } } };
const out = { ...clamped, valves: { ...clamped.valves, V0: { position: 'b' as const }, V2: { position: 'a' as const } } };
const near = (value: number, expected: number, share: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(share);
const station = machineOf(STATION);

test('39 both pumps at rest: P2 4.40 bar, P1 6.22 bar, 69.2 L/min over RV1', () => {
  const s = station.settle(clamped);
  expect(s.solved).toBe(true);
  near(toBar(s.pressures.pressure), 4.4, 2e-3);
  near(toBar(s.pressures['P1.P']), 6.22, 2e-3);
  near(-toLpm(s.flows['RV1.T']), 69.2, 1e-3);
});

test('40 fast out: 371 mm/s, P2 8.60, P1 10.41, cap 6.19, rod 3.51 bar', () => {
  const s = station.settle({ ...out, loads: { C2: load(0, 0, 250) } });
  near((s.velocities.C2 ?? 0) * 1e3, 371, 2e-3);
  // Cap pressure by the balance of forces is (3.506 x 2099.4 + 2500 + 9351.7)/3117.2 = 6.163: the hand figures of cap and rod differ by 0.4 %.
  near(toBar(s.pressures.pressure), 8.6, 5e-3);
  near(toBar(s.pressures['P1.P']), 10.41, 5e-3);
  near(toBar(s.pressures['V2.A']), 6.19, 5e-3);
  near(toBar(s.pressures['C2.rod']), 3.51, 5e-3);
});

test('41 feed against 9 kN, then 0: 10.0 mm/s, P2 161.3, P1 1.58, rod 191.0 and 233.9 bar, shaft 3.56 kW, 9.2 L/min over RV1', () => {
  const feed = (resist: number) => station.settle({ ...out, positions: { C1: 0.06, C2: 0.28 }, loads: { C2: load(0, resist, 250) } });
  const s = feed(9000);
  expect(s.bits.UV1).toBe(true);
  near((s.velocities.C2 ?? 0) * 1e3, 10.0, 5e-3);
  near(toBar(s.pressures.pressure), 161.3, 1e-3);
  near(toBar(s.pressures['P1.P']), 1.58, 5e-3);
  near(toBar(s.pressures['C2.rod']), 191.0, 1e-3);
  near((s.shaft.M1 ?? 0) / 1e3, 3.56, 3e-3);
  near(-toLpm(s.flows['RV1.T']), 9.2, 5e-3);
  near(toBar(feed(0).pressures['C2.rod']), 233.9, 1e-3);
});

test('42 cam valve 0.2 open: UV1 throttles at 0.014 open, not lifted; P2 40.05, P1 41.66 bar, 346 mm/s', () => {
  const s = station.settle({ ...out, positions: { C1: 0.06, C2: 0.262 }, loads: { C2: load(0, 0, 250) } });
  expect(s.bits.UV1).toBe(false);
  expect(s.openings.UV1).toBeCloseTo(0.014, 3);
  near(toBar(s.pressures.pressure), 40.05, 1e-3);
  near(toBar(s.pressures['P1.P']), 41.66, 1e-3);
  near((s.velocities.C2 ?? 0) * 1e3, 346, 2e-3);
});
