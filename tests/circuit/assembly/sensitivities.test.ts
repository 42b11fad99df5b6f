/** What limits a speed. */
import type { Setting } from '@oilway/circuit';
import { expect, test } from 'vitest';
import { HEAD_AND_FEED } from '../support/machines.ts';
import { blank, load, machineOf } from '../support/text.ts';

const m = machineOf(HEAD_AND_FEED);
const out: Setting = {
  ...blank,
  valves: { V0: { position: 'b' }, V2: { position: 'a' } },
  positions: { C2: 0.1 },
  loads: { C2: load(0, 0, 250) },
};

test('in feed the flow control limits, and it alone', () => {
  const setting = { ...out, positions: { C2: 0.28 }, loads: { C2: load(0, 9000, 250) } };
  const limits = m.sensitivities(setting, m.settle(setting), 'C2');
  expect(limits[0]?.words).toBe('FC1 set');
  expect(limits[0]?.share).toBeCloseTo(1, 2);
  expect(Math.abs(limits[1]?.share ?? 0)).toBeLessThan(0.1);
});

test('in fast motion both pumps limit, each with its share of the flow', () => {
  const limits = m.sensitivities(out, m.settle(out), 'C2');
  const share = (words: string) => limits.find((l) => l.words === words)?.share ?? 0;
  expect(share('pump flow P1')).toBeCloseTo(58 / 69.6, 1);
  expect(share('pump flow P2')).toBeCloseTo(11.6 / 69.6, 1);
  expect(limits.map((l) => l.of).slice(0, 2)).toEqual(['P1', 'P2']);
});

test('nothing limits what stands', () => {
  const stalled = { ...out, loads: { C2: load(0, 90000) } };
  expect(m.sensitivities(stalled, m.settle(stalled), 'C2')).toEqual([]);
});

test('asking does not change the machine', () => {
  const before = m.settle(out);
  m.sensitivities(out, before, 'C2');
  expect(m.settle(out).pressures).toEqual(before.pressures);
});
