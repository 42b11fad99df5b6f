/** Worked figures 10 to 13, 29, 36, 38: cylinders. */
import { expect, test } from 'vitest';
import { HEAD, holds, delivers, toBar } from '../support/bench.ts';
import { blank, load, machineOf } from '../support/text.ts';

const CYLINDER = 'cylinder C1 (bore 63 mm, rod 36 mm, stroke 320 mm, attitude level)\n';

test('10 cap 70, rod side 2 bar, seal 3: (70 x 3117.2 - 2 x 2099.4 - 3 x 3117.2)/10 = 20.47 kN', () => {
  const m = machineOf(`${HEAD}${CYLINDER}${holds('cap', 70, 1, 1, 'C1.cap')}${holds('rod', 2, 1, 1, 'C1.rod')}`);
  const s = m.solve({ ...blank, locked: ['C1'], positions: { C1: 0.1 } });
  expect((s.forces.C1 ?? 0) / 1e3).toBeCloseTo(20.47, 2);
});

test('11 seal friction 3 bar: bore 63 0.935 kN; bore 200 9.42 kN', () => {
  const m = machineOf(`${HEAD}${CYLINDER}cylinder C2 (bore 200 mm, rod 100 mm, stroke 100 mm)
plug C1.cap, C1.rod, C2.cap, C2.rod`);
  expect((m.bodies[0]?.sealFriction ?? 0) / 1e3).toBeCloseTo(0.935, 3);
  expect((m.bodies[1]?.sealFriction ?? 0) / 1e3).toBeCloseTo(9.42, 2);
});

test('12, 13 meter-out 1.26 L/min: 10.00 mm/s; rod side (160 x 3117.2 - 90000 - 2500 - 9351.7)/2099.4 = 189.1 bar', () => {
  const m = machineOf(`${HEAD}${CYLINDER}${holds('cap', 160, 10, 8.13, 'C1.cap')}
throttle FC1 (set 1.26 L/min, compensated)
working C1.rod to FC1 to R1`);
  const s = m.settle({ ...blank, positions: { C1: 0.1 }, loads: { C1: load(0, 9000, 250) } });
  // The core lets a floor of 0.6 cm3/min at 100 bar pass every element: a thousandth here.
  expect(Math.abs((s.velocities.C1 ?? 0) * 1e2 - 1)).toBeLessThan(2e-3);
  expect(toBar(s.pressures['C1.rod'])).toBeCloseTo(189.1, 0);
});

const LIFT = 'cylinder C1 (bore 80 mm, single cap, stroke 1200 mm, attitude rod up)\n';
const weight = -(1200 * 9.80665 + 25000);

test('29 lift 1.2 t and 25 kN on bore 80: 73.1 bar holds, 77.1 bar lifts', () => {
  const held = machineOf(`${HEAD}${LIFT}shutoff BV1 (closed)
working C1.cap to BV1 to R1`).settle({ ...blank, positions: { C1: 0.6 }, loads: { C1: load(weight) }, sealFriction: 'not with load' });
  expect(toBar(held.pressures['C1.cap'])).toBeCloseTo(73.1, 0);
  const lifts = machineOf(`${HEAD}${LIFT}${delivers('P1', 10, 'C1.cap')}`).settle({
    ...blank,
    positions: { C1: 0.6 },
    loads: { C1: load(weight, 0, 500) },
  });
  expect(lifts.velocities.C1).toBeGreaterThan(0.03);
  expect(toBar(lifts.pressures['P1.P'])).toBeCloseTo(77.1, 0);
});

const TABLE = 'cylinder C1 (bore 50 mm, rod 28 mm, through, stroke 400 mm, cushion 25 mm)\n';

test.each([
  ['36 cushion at half its length, 40 bar over it: 182 mm/s', 12.5, 40, 182],
  ['36 cushion at the stop, 100 bar over it: 50 mm/s', 0.01, 100, 50],
])('%s', (_name, left, drop, expected) => {
  // Cap side: what the cushion holds back and 3 bar of seal friction on the bore.
  const cap = drop + (3 * 1963.5) / 1347.7;
  const m = machineOf(`${HEAD}${TABLE}${holds('cap', cap, 30, 30 - (expected * 1347.7 * 60) / 1e6, 'C1.cap')}
working C1.rod to R1`);
  const s = m.settle({ ...blank, positions: { C1: 0.4 - left / 1e3 } });
  expect(Math.abs((s.velocities.C1 ?? 0) * 1e3 - expected)).toBeLessThan(0.005 * expected);
});

test('38 spring 200 N to 600 N at a quarter of the stroke: 300 N inward', () => {
  const m = machineOf(`${HEAD}cylinder C1 (bore 40 mm, single cap, rod 18 mm, spring 200 N to 600 N, stroke 100 mm, seal 0 bar)
working C1.cap to R1`);
  expect(m.solve({ ...blank, locked: ['C1'], positions: { C1: 0.025 } }).forces.C1).toBeCloseTo(-300, 3);
});
