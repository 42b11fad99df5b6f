/** Hostile texts: no exception, no hang, no false "clean", and the next text reads as if nothing had been. */
import { LONGEST_FILE, analyseText, forgetStatements, format } from '@oilway/language';
import { beforeEach, describe, expect, it } from 'vitest';
import { CIRCUITS, circuitText, errors, read } from './support.ts';

const good = circuitText('01-table.oilway');
const circuit = JSON.stringify(analyseText({ uri: 'u', text: good }).circuit);

/** A text that parses after a hostile one must give what it always gives. */
function stillWell(): void {
  const again = analyseText({ uri: 'u', text: good });
  expect(again.failed).toBeUndefined();
  expect(again.findings).toEqual([]);
  expect(JSON.stringify(again.circuit)).toBe(circuit);
}

const HOSTILE: readonly { readonly name: string; readonly text: string; readonly clean?: boolean }[] = [
  { name: '500 brackets', text: `let x = ${'('.repeat(500)}1 bar${')'.repeat(500)}` },
  { name: '100000 opening brackets', text: `let x = ${'('.repeat(100_000)}` },
  { name: '100000 closing brackets', text: `let x = 1 bar${')'.repeat(100_000)}` },
  { name: '5000 brackets in a condition', text: `interlock SOL1 needs ${'('.repeat(5000)}PS1 on${')'.repeat(5000)}` },
  { name: '3000 minus signs', text: `let x = ${'- '.repeat(3000)}1 bar` },
  { name: '5000 opening braces', text: 'cycle A {\n'.repeat(5000) },
  { name: '5000 assemblies in each other', text: 'assembly A ports P {\n'.repeat(5000) },
  { name: '100k junk characters', text: '§¶•ªº–≠œ∑´®†¥¨ˆøπ'.repeat(6000) },
  { name: '100k quotation marks', text: '"'.repeat(100_001) },
  { name: 'NUL and control characters', text: 'pump P1\u0000 (displacement\u0007 8 cm3/rev)\u001b\nrelief \u0000RV1' },
  { name: 'lone surrogates', text: 'pump P\ud800 (displacement 8 cm3/rev)\ndrive \udc00M1 "\ud83d"' },
  { name: 'huge numbers', text: `cylinder C1 (bore ${'9'.repeat(100_000)} mm, stroke 0.${'0'.repeat(5000)}1 mm)` },
  { name: 'a sum of 5000', text: `let x = ${Array(5000).fill('1 bar').join(' + ')}`, clean: true },
  { name: 'a ring of 1000 constants', text: Array.from({ length: 1000 }, (_, i) => `let k${i} = k${(i + 1) % 1000} + 1 bar`).join('\n') },
  { name: 'unit soup', text: 'let x = 5 bar/min·kg^2²³.°C%%%µm/L/L/L' },
  { name: 'a comment that never ends', text: `pump P1 /* ${'x'.repeat(50_000)}` },
  { name: 'a name of 100k letters', text: `pump ${'P'.repeat(100_000)} (displacement 8 cm3/rev)` },
  {
    name: 'names of every object',
    text: 'pump constructor (toString 5 bar, __proto__ 3 bar)\nworking hasOwnProperty to __proto__.constructor\nload valueOf (constructor 5 kN)',
  },
  { name: 'only a head', text: 'cylinder' },
  { name: 'only a brace', text: '}' },
  { name: 'two thousand components named alike', text: 'gauge G1\n'.repeat(2000) },
  { name: 'old Macintosh line ends', text: 'pump P1\rdrive M1\r' },
];

describe('hostile texts', () => {
  for (const { name, text, clean } of HOSTILE) {
    it(name, () => {
      const { findings, failed } = analyseText({ uri: 'u', text });
      expect(failed).toBeUndefined();
      if (clean === true) expect(findings).toEqual([]);
      else expect(findings.length).toBeGreaterThan(0);
      for (const finding of findings) {
        expect(finding.origin.start).toBeGreaterThanOrEqual(0);
        expect(finding.origin.end).toBeLessThanOrEqual(text.length);
        expect(finding.origin.start).toBeLessThanOrEqual(finding.origin.end);
        expect(finding.what).not.toMatch(/undefined|NaN|\[object/);
      }
      expect(format(text).replace(/\s/g, '')).toBe(text.replace(/\s/g, ''));
      stillWell();
      // And with a parser that remembers none of it.
      forgetStatements();
      const { findings: again } = analyseText({ uri: 'u', text });
      expect(again).toEqual(findings);
      stillWell();
    });
  }

  it('nothing at all, spaces, a comment: no finding', () => {
    for (const text of ['', '\n\n', '\uFEFF', '// note', '/* a */']) expect(read(text).findings).toEqual([]);
  });

  it('a byte order mark and CRLF change nothing but the places', () => {
    expect(errors(`\uFEFF${good.replace(/\n/g, '\r\n')}`)).toEqual([]);
  });

  it('a file over the limit is refused with a reason', () => {
    const { findings, circuit: empty } = analyseText({ uri: 'u', text: `gauge G1 // ${'x'.repeat(LONGEST_FILE)}` });
    expect(findings.map((finding) => finding.what)).toEqual([expect.stringMatching(/more than 2000000 are not read/)]);
    expect(empty.components).toEqual([]);
    stillWell();
  });

  it('assemblies nested too deep are said, and the next file reads well', () => {
    const text = 'assembly A ports P {\n'.repeat(30);
    expect(errors(text).join()).toContain('nested deeper than 8');
    stillWell();
  });

  it('nesting is said once, and the statements after it stand', () => {
    const text = `let x = ${'('.repeat(500)}1 bar${')'.repeat(500)}\ngauge G1\ngauge G2`;
    expect(errors(text)).toEqual([expect.stringContaining('nested deeper than 40')]);
    expect(read(text).circuit.components.map((component) => component.id)).toEqual(['G1', 'G2']);
  });
});

describe('texts in every state of being typed', () => {
  beforeEach(stillWell);

  it('every prefix of a circuit, cut at every tenth character', () => {
    const text = CIRCUITS.find((each) => each.name === '07-lift-table.oilway')?.text ?? '';
    for (let end = 0; end < text.length; end += 10) {
      const { findings, failed } = analyseText({ uri: 'u', text: text.slice(0, end) });
      expect(failed).toBeUndefined();
      for (const finding of findings) expect(finding.origin.end).toBeLessThanOrEqual(end);
    }
  });
});
