/** What cannot be computed is taken out with its nets marked; the rest is computed. */
import { assemble } from '@oilway/circuit';
import { parseText, resolve } from '@oilway/language';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { delivers, HEAD, toBar } from '../support/bench.ts';
import { HEAD_AND_FEED } from '../support/machines.ts';
import { blank } from '../support/text.ts';

const machine = (text: string) => assemble(resolve(parseText('test.oilway', text)).circuit);

test('a valve without `passes` is taken out, its nets are marked, the other circuit is computed', () => {
  const m = machine(`${HEAD}${delivers('P1', 20, 'RV1, V1.P')}
relief RV1 (set 80 bar, passes 40 L/min at 2 bar)
directional V1 (4/3, centre closed, spring to centre, coil a SOL1)
cylinder C1 (bore 50 mm, rod 28 mm, stroke 100 mm)
working V1.A to C1.cap
working V1.B to C1.rod
return V1.T, RV1 to R1`);
  expect(m.notComputed.V1).toContain('passes');
  expect(m.notComputed['V1.A']).toBe(m.notComputed.V1);
  expect(m.notComputed['P1.P']).toBe(m.notComputed.V1);
  expect(m.notComputed.RV1).toBeUndefined();
  const s = m.settle(blank);
  expect(s.solved).toBe(true);
  expect(toBar(s.pressures['P1.P'])).toBeGreaterThan(80);
});

test('a pump whose drive is unknown is unknown too', () => {
  const m = machine(`${HEAD}drive M2 (power 3 kW)
pump P2 (displacement 8 cm3/rev, driven by M2)
relief RV2 (set 80 bar, passes 40 L/min at 2 bar)
suction R1 to P2
working P2 to RV2
return RV2 to R1`);
  expect(m.notComputed.M2).toBeDefined();
  expect(m.notComputed.P2).toContain('M2');
  expect(m.settle(blank).solved).toBe(true);
});

test('what only the law can find wrong is said in words', () => {
  const m = machine(`${HEAD}
unloading UV1 (set 40 bar, closes 45 bar, passes 40 L/min at 2 bar)
check CV1 (crack 3 bar, passes 40 L/min at 2 bar)
reducing PR1 (set 50 bar, relieving yes, passes 20 L/min at 4 bar)
pump P1 (displacement 8 cm3/rev, driven by M1, sensing 20 bar, compensator 200 bar)
working P1 to CV1 to UV1
pilot CV1.out to UV1.X
return UV1 to R1
suction R1 to P1`);
  expect(m.notComputed.UV1).toBe('UV1 closes at or above its `set`');
  expect(m.notComputed.CV1).toMatch(/crack/);
  expect(m.notComputed.PR1).toBe('PR1 has its drain Y not joined');
  expect(m.notComputed.P1).toBe('P1 is load-sensing but LS is not joined');
});

test('an empty file assembles to nothing', () => {
  const m = machine('');
  expect(m.bodies).toEqual([]);
  expect(m.settle(blank).solved).toBe(true);
});

test('a figure of zero where there must be one takes the component out, never the file', () => {
  const m = machine(`${HEAD}${delivers('P1', 20, 'RV1, BV1.A')}
relief RV1 (set 80 bar, passes 40 L/min at 2 bar)
shutoff BV1 (open, passes 40 L/min at 0 bar)
cylinder C1 (bore 0 mm, stroke 100 mm)
working BV1.B to C1.cap
return RV1 to R1`);
  expect(m.notComputed.BV1).toBeDefined();
  expect(m.notComputed.C1).toBeDefined();
  const s = m.settle(blank);
  expect(s.solved).toBe(true);
  expect(toBar(s.pressures['P1.P'])).toBeGreaterThan(80);
});

test('broken text of any kind assembles and solves without an exception', () => {
  const whole = HEAD_AND_FEED;
  fc.assert(
    fc.property(fc.nat({ max: whole.length }), fc.nat({ max: 60 }), fc.constantFrom('', '0', 'x', ' bar', '('), (from, length, instead) => {
      const m = machine(whole.slice(0, from) + instead + whole.slice(from + length));
      const s = m.settle(blank);
      for (const p of Object.values(s.pressures)) expect(Number.isFinite(p)).toBe(true);
    }),
    { numRuns: 60 },
  );
});
