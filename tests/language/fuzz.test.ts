/**
 * Random edits of the collection: no exception, no error of the tool, places inside the text, and reading after many edits is reading afresh.
 * 20,000 edits a run; `OILWAY_FUZZ=1000000` sets the number, `OILWAY_SEED` the sequence. Every tenth text also goes through the rules of topology.
 */
import { analyseText, forgetStatements, format } from '@oilway/language';
import { runRules } from '@oilway/rules';
import { describe, expect, it } from 'vitest';
import { CIRCUITS } from './support.ts';

const EDITS = Number(process.env.OILWAY_FUZZ ?? 20_000);
const SEED = Number(process.env.OILWAY_SEED ?? 20_251);

/** Mulberry32: small, seeded, the same everywhere. */
function random(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}

const PIECES = [
  '(',
  ')',
  '{',
  '}',
  ',',
  ':',
  '.',
  '"',
  '\n',
  ' ',
  '//',
  '/*',
  '*/',
  '-',
  '+',
  '±',
  '?',
  '/',
  '=',
  '0',
  '1/2',
  '4/3',
  ' bar',
  ' mm',
  ' %',
  'a',
  'P',
  'to ',
  'at ',
  'and ',
  'in ',
  'step ',
  'cycle X {',
  'working ',
  'cylinder C1 ',
  'let ',
  'require ',
  'passes ',
  'coil a ',
  'as ',
  'until ',
  'for ',
  'energise ',
  '\u0000',
  '\ud800',
  'é',
  '²',
  '°C',
  '1V1',
  'C1.cap',
  '\r\n',
  '\t',
];

function edit(text: string, roll: () => number): string {
  const at = Math.floor(roll() * (text.length + 1));
  const length = Math.floor(roll() ** 3 * 40);
  const kind = roll();
  if (kind < 0.4) return text.slice(0, at) + (PIECES[Math.floor(roll() * PIECES.length)] ?? '') + text.slice(at);
  if (kind < 0.7) return text.slice(0, at) + text.slice(at + length);
  const from = Math.floor(roll() * text.length);
  const copy = text.slice(from, from + length);
  return kind < 0.9 ? text.slice(0, at) + copy + text.slice(at) : text.slice(0, at) + copy + text.slice(at + length);
}

describe('random edits', () => {
  it(`${EDITS} edits from seed ${SEED}`, { timeout: 24 * 3600 * 1000 }, () => {
    const roll = random(SEED);
    let done = 0;
    let rounds = 0;
    while (done < EDITS) {
      // A part of a circuit keeps a single reading short, so that more of them fit.
      const source = CIRCUITS[Math.floor(roll() * CIRCUITS.length)]?.text ?? '';
      const lines = source.split('\n');
      const first = Math.floor(roll() * lines.length);
      let text = lines.slice(first, first + 4 + Math.floor(roll() * 12)).join('\n');
      for (let i = 0; i < 12 && done < EDITS; i++, done++) {
        text = edit(text, roll);
        const { circuit, findings, failed } = analyseText({ uri: 'u', text });
        if (failed !== undefined) throw new Error(`${failed}\n--- text ---\n${text}`);
        for (const { origin, what } of findings) {
          if (!(origin.start >= 0 && origin.start <= origin.end && origin.end <= text.length) || /undefined|NaN/.test(what))
            throw new Error(`${what} at ${origin.start}..${origin.end} of ${text.length}\n--- text ---\n${text}`);
        }
        if (done % 10 === 0) expect(runRules({ circuit, text: () => text }).failed ?? []).toEqual([]);
      }
      // What the parser has been through and what it remembers leave no trace in the next reading.
      const warm = analyseText({ uri: 'u', text });
      if (++rounds % 200 === 0) forgetStatements();
      else analyseText({ uri: 'u', text: source });
      const fresh = analyseText({ uri: 'u', text });
      expect(JSON.stringify(fresh.circuit)).toBe(JSON.stringify(warm.circuit));
      expect(fresh.findings).toEqual(warm.findings);
      const formatted = format(text);
      expect(format(formatted)).toBe(formatted);
      expect(formatted.replace(/\s/g, '')).toBe(text.replace(/\s/g, ''));
    }
    expect(done).toBe(EDITS);
  });
});
