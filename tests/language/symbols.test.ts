/** Names: every declaration and every use, so that a rename changes all of them and nothing else. */
import { placesOf, symbolAt } from '@oilway/language';
import { describe, expect, it } from 'vitest';
import { CIRCUITS, circuitText, errors, read } from './support.ts';

function rename(text: string, id: string, fresh: string): string {
  let result = text;
  for (const place of [...placesOf(read(text).symbols, id)].reverse())
    result = result.slice(0, place.start) + fresh + result.slice(place.end);
  return result;
}

describe('the index of names', () => {
  for (const { name, text } of CIRCUITS) {
    it(`${name}: every place shows its name, none twice`, () => {
      const { symbols } = read(text);
      expect(symbols.declarations.length).toBeGreaterThan(0);
      const names = new Map(symbols.declarations.map((declaration) => [declaration.id, declaration.name]));
      for (const { origin, name: written } of symbols.declarations) expect(text.slice(origin.start, origin.end)).toBe(written);
      for (const { origin, target } of symbols.references) expect(text.slice(origin.start, origin.end)).toBe(names.get(target));
      for (const { origin, port } of symbols.ports) expect(text.slice(origin.start, origin.end)).toBe(port);
      const keys = [...symbols.declarations, ...symbols.references, ...symbols.ports].map(({ origin }) => `${origin.start}-${origin.end}`);
      expect(keys.filter((key, i) => keys.indexOf(key) !== i)).toEqual([]);
    });
  }

  it('each name of two circuits can be renamed: the circuit stays whole, and the old name is gone', () => {
    for (const file of ['06-press.oilway', '09-load-sensing.oilway']) {
      const text = circuitText(file);
      for (const { id, name } of read(text).symbols.declarations) {
        const fresh = `${name}_new`;
        const renamed = rename(text, id, fresh);
        expect(errors(renamed), `${id} in ${file}`).toEqual([]);
        const left = read(renamed).symbols.declarations.map((declaration) => declaration.id);
        expect(left, id).toContain(id.includes('.') ? `${id}_new` : fresh);
      }
    }
  });

  it('the symbol at a place, declared or used', () => {
    const text = 'gauge G1\nswitch PS1 (rises 5 bar)\nworking low: G1 to PS1';
    const { symbols } = read(text);
    expect(symbolAt(symbols, text.lastIndexOf('G1'))).toMatchObject({ id: 'G1', what: 'component', kind: 'gauge' });
    expect(symbolAt(symbols, text.indexOf('low'))).toMatchObject({ id: 'low', what: 'line' });
    expect(symbolAt(symbols, text.indexOf('rises'))).toBeUndefined();
  });
});
