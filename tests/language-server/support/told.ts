/** Texts kept in files as a person reads them. Wording and units must be the same to the letter; figures may differ by a little: they are proven elsewhere. */
import { existsSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect } from 'vitest';

const NUMBER = /-?\d+(?:\.\d+)?/g;
/** Share, and the same of the smallest figure shown. */
const NEAR = 0.05;
const SMALL = 0.2;

/** `file` under tests/language-server. Written anew with `vitest -u`. */
export async function expectTold(text: string, file: string): Promise<void> {
  const path = fileURLToPath(new URL(`../${file}`, import.meta.url));
  const kept = existsSync(path) ? readFileSync(path, 'utf8') : undefined;
  if (kept !== undefined && kept !== text && sameButForFigures(kept, text)) return;
  await expect(text).toMatchFileSnapshot(path);
}

/** How many assumptions there are is said by the study, not by the hover. */
const uncounted = (text: string): string =>
  text.replace(/Rests on \d+ assumptions/g, 'Rests on assumptions').replace(/ and \d+ more\._/g, ' and more._');

export function sameButForFigures(one: string, other: string): boolean {
  const [a, b] = [uncounted(one), uncounted(other)];
  if (a.replace(NUMBER, '#') !== b.replace(NUMBER, '#')) return false;
  const numbers = (text: string): number[] => [...text.matchAll(NUMBER)].map((one) => Number(one[0]));
  const found = numbers(b);
  return numbers(a).every((value, index) => {
    const compared = found[index] ?? Number.NaN;
    return Math.abs(value - compared) <= Math.max(SMALL, NEAR * Math.max(Math.abs(value), Math.abs(compared)));
  });
}
