/** B01 where the lines of both pumps have names: the mend goes into the line that joins them. */
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { apply, check } from './support.ts';

const SOUND = readFileSync(new URL('../../samples/05-two-pump.oilway', import.meta.url), 'utf8');
const CUT = SOUND.replace('working low to CV1 to pressure', 'working low to pressure');

const mend = (text: string) => {
  const found = check(text).problems.find((p) => p.code === 'B01');
  expect(found?.fixes).toHaveLength(1);
  return apply(text, found!.fixes[0]!);
};

it('a check taken out of the line comes back into it, and nothing else changes', () => {
  expect(CUT).not.toBe(SOUND);
  expect(mend(CUT)).toBe(SOUND);
});

it('where no check is left over, one is declared', () => {
  const none = CUT.replace(/^check +CV1 .*\n/m, '');
  const mended = mend(none);
  expect(mended).toMatch(/^working low to CV1 to pressure$/m);
  expect(check(mended, 'figures').problems).toEqual([]);
});

it('a line read the other way, or a second one beside it, takes a person', () => {
  for (const line of ['working pressure to low', 'working low to pressure\nworking low to G1']) {
    const found = check(CUT.replace('working low to pressure', line)).problems.find((p) => p.code === 'B01');
    expect(found, line).toBeDefined();
    expect(found?.fixes, line).toEqual([]);
  }
});
