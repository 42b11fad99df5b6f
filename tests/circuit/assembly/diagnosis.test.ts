/** What is wrong with a state, in trade words; memory bits that find no rest. */
import type { Diagnosis } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { delivers, HEAD, holds, toBar, toLpm } from '../support/bench.ts';
import { blank, load, machineOf } from '../support/text.ts';

type Flowing = Extract<Diagnosis, { flow: number }>;
const flowing = (d: readonly Diagnosis[], kind: Flowing['kind']): Flowing | undefined => d.find((x): x is Flowing => x.kind === kind);

test('a pump against a closed centre: no outlet, source and closed elements named', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 30, 'V1.P')}
directional V1 (4/3, centre closed, spring to centre, coil a SOL1, coil b SOL2, passes 60 L/min at 5 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T to R1`).settle(blank);
  const over = flowing(s.diagnosis, 'OVERPRESSURE');
  expect(over?.sources).toEqual(['P1']);
  expect(over?.nets).toEqual(['P1.P']);
  expect(toLpm(over?.flow)).toBeCloseTo(30, 1);
  expect(over?.closed).toContain('V1 P to A (centre)');
});

test('a check is named as closed against flow', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 30, 'CV1.out')}
check CV1 (crack 1 bar, passes 60 L/min at 5 bar)
working CV1.in to R1`).settle(blank);
  expect(flowing(s.diagnosis, 'OVERPRESSURE')?.closed).toEqual(['CV1 against flow']);
});

test('a load that pulls faster than oil comes in starves its cap side', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 5, 'C1.cap')}
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm)
throttle OR1 (orifice 4 mm)
working C1.rod to OR1 to R1`).settle({ ...blank, positions: { C1: 0.1 }, loads: { C1: load(20000) } });
  const starved = flowing(s.diagnosis, 'STARVED');
  expect(starved?.sources).toContain('C1');
  expect(starved?.nets).toContain('P1.P');
});

test('a closed volume is not determined; a relief bounds it', () => {
  const s = machineOf(`${HEAD}cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm)
shutoff BV1, BV2 (closed)
relief RV1 (set 90 bar, passes 20 L/min at 2 bar)
working C1.cap to BV1 to R1
working C1.rod to RV1, BV2.A
working BV2.B to R1
return RV1 to R1`).settle({ ...blank, positions: { C1: 0.1 } });
  expect(s.undetermined['C1.cap']).toEqual({ low: 0, high: 600e5 });
  expect(toBar(s.undetermined['C1.rod']?.high)).toBeCloseTo(90, 3);
});

test('an unloading valve whose own pump feeds the pilot throttles: the two curves meet, so it does not hunt', () => {
  const s = machineOf(`${HEAD}${delivers('P1', 40, 'UV1, CV1')}
unloading UV1 (set 45 bar, closes 38 bar, passes 40 L/min at 1 bar)
check CV1 (crack 0.5 bar, passes 60 L/min at 2 bar)
throttle OR1 (orifice 1 mm)
working main: CV1 to OR1
pilot main to UV1.X
return UV1, OR1 to R1`).settle(blank);
  expect(s.openings.UV1).toBeGreaterThan(0);
  expect(s.openings.UV1).toBeLessThan(1);
  expect(s.remarks).toEqual([]);
});

test('a burst valve shuts when the load falls faster than it allows', () => {
  const text = (closes: number) => `${HEAD}burst HB1 (closes ${closes} L/min, passes 15 L/min at 2 bar)
cylinder C1 (bore 80 mm, single cap, stroke 1200 mm, attitude rod up)
working HB1.C to C1.cap
working HB1.V to R1`;
  const setting = { ...blank, positions: { C1: 0.6 }, loads: { C1: load(-36768) } };
  const shut = machineOf(text(22)).settle(setting);
  expect(shut.bits.HB1).toBe(true);
  expect(shut.remarks).toEqual([{ of: 'HB1', words: 'HB1 has shut' }]);
  expect(Math.abs(shut.velocities.C1 ?? 1)).toBeLessThan(1e-5);
  const open = machineOf(text(500)).settle(setting);
  expect(open.bits.HB1).toBe(false);
  expect(open.velocities.C1).toBeLessThan(-0.1);
});

test('a piloted valve without pilot pressure stays, and says so', () => {
  const text = (bar: number) => `${HEAD}${holds('x', bar, 1, 1, 'V1.X')}${delivers('P1', 20, 'V1.P')}
directional V1 (4/3, centre open, spring to centre, external pilot, needs 6 bar, coil a SOL1, coil b SOL2, passes 60 L/min at 5 bar)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 300 mm)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T to R1
drain V1.Y to R1`;
  const asked = { ...blank, valves: { V1: { position: 'a' as const } }, positions: { C1: 0.1 } };
  const stays = machineOf(text(2.1)).settle(asked);
  expect(stays.remarks).toEqual([{ of: 'V1', words: 'V1 cannot shift: 2.1 of 6.0 bar' }]);
  expect(stays.stands.V1?.position).toBe('centre');
  const goes = machineOf(text(7)).settle(asked);
  expect(goes.remarks).toEqual([]);
  expect(goes.velocities.C1).toBeGreaterThan(0.1);
});
