/** Published worked values against what the product shows of a small circuit written in the notation. */
import { describe, expect, it } from 'vitest';
import { bench, inUnits } from './bench.ts';
import { CIRCUITS } from './circuits.ts';
import { LINE_CIRCUITS } from './circuits-lines.ts';
import { ACCUMULATOR, VALVE_CIRCUITS } from './circuits-valves.ts';
import { PUBLISHED, type Published, type PublishedId } from './published-values.ts';

const ALL = [...CIRCUITS, ...LINE_CIRCUITS, ...VALVE_CIRCUITS];

for (const circuit of ALL) {
  describe(circuit.about, () => {
    const opened = bench(circuit.text);
    opened.catch(() => undefined);
    for (const [id, shown] of Object.entries(circuit.shows)) {
      const published: Published = PUBLISHED[id as PublishedId];
      it(`${id}: ${published.what} is ${published.value} ${published.unit} (${published.source})`, async () => {
        const value = inUnits(shown.read(await opened), published.unit);
        const within = shown.within?.[0] ?? published.within;
        const reason = shown.within === undefined ? '' : ` (${shown.within[1]})`;
        expect(Math.abs(value / published.value - 1), `${value} of ${published.value}${reason}`).toBeLessThanOrEqual(within);
      });
    }
  });
}

describe('accumulator of 10 L, precharged to 90 bar, between 100 bar and 200 bar', () => {
  const published = PUBLISHED['acc-08'];
  it(`${published.what}: ${published.value} L (${published.source})`, async () => {
    const [low, high] = [await bench(ACCUMULATOR.low), await bench(ACCUMULATOR.high)];
    const litres = (ACCUMULATOR.oil(high) - ACCUMULATOR.oil(low)) * 1000;
    expect(Math.abs(litres / published.value - 1)).toBeLessThanOrEqual(0.002);
  });
});

it('at least sixty published values pass through the product', () => {
  const shown = ALL.flatMap((circuit) => Object.keys(circuit.shows));
  expect(new Set(shown).size).toBe(shown.length);
  expect(shown.length).toBeGreaterThanOrEqual(60);
});
