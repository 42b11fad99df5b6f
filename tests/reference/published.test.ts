/** Published worked values against what the product shows of a small circuit written in the notation. */
import { describe, expect, it } from 'vitest';
import { bench, inUnits } from './bench.ts';
import { CIRCUITS } from './circuits.ts';
import { LINE_CIRCUITS } from './circuits-lines.ts';
import { ACCUMULATORS, VALVE_CIRCUITS } from './circuits-valves.ts';
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

describe('accumulators', () => {
  for (const { id, circuits, read } of ACCUMULATORS) {
    const published: Published = PUBLISHED[id];
    it(`${id}: ${published.what} is ${published.value} ${published.unit} (${published.source})`, async () => {
      const value = inUnits(read(await Promise.all(circuits.map(bench))), published.unit);
      expect(Math.abs(value / published.value - 1), `${value}`).toBeLessThanOrEqual(published.within);
    });
  }
});

it('at least sixty published values pass through the product', () => {
  const shown = [...ALL.flatMap((circuit) => Object.keys(circuit.shows)), ...ACCUMULATORS.map((one) => one.id)];
  expect(new Set(shown).size).toBe(shown.length);
  expect(shown.length).toBeGreaterThanOrEqual(60);
});
