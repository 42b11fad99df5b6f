/** Worked figures 30 and 31: leakage of a seat and of a spool (common practice, from memory). */
import { expect, test } from 'vitest';
import { HEAD, holds, toLpm } from '../support/bench.ts';
import { blank, load, machineOf } from '../support/text.ts';

test('30 a lift on one seat, 73.1 bar, bore 80, ten minutes: 0.25 x 0.731 x 10/50.27 cm2 = 0.36 mm', () => {
  const m = machineOf(`${HEAD}cylinder C1 (bore 80 mm, single cap, stroke 1200 mm, attitude rod up)
pilotcheck PC1 (ratio 4:1, passes 30 L/min at 3 bar)
working PC1.C to C1.cap
working PC1.V to R1
pilot PC1.X to R1`);
  const setting = {
    ...blank,
    positions: { C1: 0.6 },
    loads: { C1: load(-(1200 * 9.80665 + 25000)) },
    sealFriction: 'not with load' as const,
    leakage: true,
  };
  const run = m.start(setting, m.settle(setting));
  run.advance(1, []);
  const begins = run.now().positions.C1 ?? Number.NaN;
  run.advance(601, []);
  expect((begins - (run.now().positions.C1 ?? 0)) * 1e3).toBeCloseTo(0.364, 2);
});

test('31 spool of 60 L/min: 30 cm3/min at 100 bar an edge', () => {
  const s = machineOf(`${HEAD}${holds('p', 100, 10, 9.94, 'V1.P')}
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 60 L/min at 5 bar)
working V1.A to R1
working V1.B to R1
return V1.T to R1`).settle({ ...blank, leakage: true });
  expect(toLpm(s.flows['V1.P']) * 1e3).toBeCloseTo(60, 0);
  expect(-toLpm(s.flows['V1.A']) * 1e3).toBeCloseTo(30, 0);
});
