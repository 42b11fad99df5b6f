/** Every circuit of the collection parses and resolves; spaces, line ends and line breaks change nothing. */
import type { Circuit } from '@oilway/circuit';
import { describe, expect, it } from 'vitest';
import { CIRCUITS, errors, read, said } from './support.ts';

/** The circuit without its places in the text. */
function withoutPlaces(circuit: Circuit): unknown {
  return JSON.parse(JSON.stringify(circuit, (key, value: unknown) => (/[oO]rigin$/.test(key) ? undefined : value)));
}

/** Every setting on a line of its own. */
const broken = (text: string): string => {
  let depth = 0;
  let quoted = false;
  let result = '';
  for (let i = 0; i < text.length; i++) {
    const character = text[i] ?? '';
    if (!quoted && depth === 0 && text.startsWith('//', i)) {
      const end = text.indexOf('\n', i);
      result += text.slice(i, end);
      i = end - 1;
      continue;
    }
    if (character === '"') quoted = !quoted;
    else if (!quoted && character === '(') depth++;
    else if (!quoted && character === ')') depth--;
    result += character;
    if (!quoted && character === ',' && depth > 0) result += '\n   ';
  }
  return result;
};

describe('the collection', () => {
  it('has the fourteen files', () => expect(CIRCUITS.length).toBe(14));

  for (const { name, text } of CIRCUITS) {
    it(`${name} resolves without an error`, () => {
      expect(errors(text)).toEqual([]);
      const informations = said(text);
      // Each statement that is understood but not yet computed is named, and nothing else is.
      const expected = (text.match(/^(use|unit|assembly)\b|[(,] *\w+ \?/gm) ?? []).length;
      expect(informations.length, informations.join('\n')).toBe(expected);
      for (const one of informations) expect(one).toMatch(/^NOT-COMPUTED Not (resolved|computed) yet: /);
      if (/^circuit\b/m.test(text)) expect(read(text).circuit.components.length).toBeGreaterThan(5);
    });

    it(`${name} is the same with every setting on a line of its own, and with CRLF`, () => {
      const whole = withoutPlaces(read(text).circuit);
      const apart = broken(text);
      expect(apart.split('\n').length).toBeGreaterThan(text.split('\n').length);
      expect(errors(apart)).toEqual([]);
      // The words of a requirement are its id: they hold no bracket and stay.
      expect(withoutPlaces(read(apart).circuit)).toEqual(whole);
      const crlf = text.replace(/\n/g, '\r\n');
      expect(errors(crlf)).toEqual([]);
      expect(withoutPlaces(read(crlf).circuit)).toEqual(whole);
    });
  }
});
