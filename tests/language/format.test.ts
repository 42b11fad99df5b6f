/** The formatter: meaning, comments and line count stay; twice is once; hand-made columns stay where they are told to. */
import type { Circuit } from '@oilway/circuit';
import { format } from '@oilway/language';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { CIRCUITS, circuitText, read } from './support.ts';

const withoutPlaces = (circuit: Circuit): unknown =>
  JSON.parse(
    JSON.stringify(circuit, (key, value: unknown) =>
      /[oO]rigin$/.test(key) || (key === 'id' && typeof value === 'string' && value.includes(' ')) ? undefined : value,
    ),
  );

describe('format', () => {
  for (const { name, text } of CIRCUITS) {
    it(`${name}: the circuit is the same, twice is once, lines stay`, () => {
      const formatted = format(text);
      expect(withoutPlaces(read(formatted).circuit)).toEqual(withoutPlaces(read(text).circuit));
      expect(read(formatted).findings.length).toBe(read(text).findings.length);
      expect(format(formatted)).toBe(formatted);
      expect(formatted.split('\n').length).toBe(text.split('\n').length);
    });
  }

  it('spaces gone wild come back to the same text', () => {
    const formatted = format(circuitText('12-moulding.oilway'));
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 1_000_000 }), (seed) => {
        let state = seed;
        const roll = (): number => {
          state = (state * 48_271) % 2_147_483_647;
          return state;
        };
        // Doubles some spaces outside texts and comments, and indents at random.
        const wild = formatted
          .split('\n')
          .map((line) => {
            if (line.includes('//')) return line;
            const parts = line
              .split('"')
              .map((part, i) => (i % 2 === 0 ? part.replace(/ /g, () => (roll() % 3 === 0 ? ' \t ' : ' ')) : part));
            return ' '.repeat(roll() % 7) + parts.join('"').trimStart() + (state % 5 === 0 ? '  ' : '');
          })
          .join('\n');
        expect(format(wild)).toBe(formatted);
      }),
      { numRuns: 15 },
    );
  });

  it('spaces, indentation, columns', () => {
    expect(
      format(
        'cylinder   C1(bore 63mm ,rod   36 mm)"Clamp"   // note\nrelief RV1 ( set system-10bar±5% )\npart check NR(crack 1bar)\nunit U1 as Power(p -5bar)',
      ),
    ).toBe(
      'cylinder C1 (bore 63 mm, rod 36 mm) "Clamp"  // note\nrelief   RV1 (set system - 10 bar ± 5 %)\npart check NR (crack 1 bar)\nunit     U1 as Power (p -5 bar)',
    );
    expect(format('cycle X{\nstep A energise S1 until P on,at most 3s\n      step Long energise S1\n// between\n}')).toBe(
      'cycle X {\n  step A    energise S1 until P on, at most 3 s\n  step Long energise S1\n  // between\n}',
    );
    expect(format('working low:P1 to\nV1 . P(bore 5mm,\nrated 9bar)')).toBe('working low: P1 to\n  V1.P (bore 5 mm,\n  rated 9 bar)');
    expect(format('load C1 (inward (5mm:0kN,9 mm : 3 kN), ratio 3 : 1)\nlet x=max( 1bar,2 bar )*-3')).toBe(
      'load C1 (inward (5 mm: 0 kN, 9 mm: 3 kN), ratio 3:1)\nlet x = max(1 bar, 2 bar) * -3',
    );
  });

  it('what stands between `format off` and `format on`, what does not parse, and comments over lines stay as they are', () => {
    const kept = '// oilway: format off\nrelief   RV1    (set 5bar)\n// oilway: format on\nrelief RV2 (set 5 bar)';
    expect(format(kept)).toBe(kept);
    expect(format('relief   RV1   (set 5bar\ngauge   G1')).toBe('relief   RV1   (set 5bar\ngauge G1');
    expect(format('/* one\n     two */\ngauge   G1 /* a */  (range 0 bar to 9 bar)')).toBe(
      '/* one\n     two */\ngauge   G1 /* a */  (range 0 bar to 9 bar)',
    );
  });

  it('line ends and a byte order mark stay', () => {
    expect(format('\uFEFFgauge   G1\r\ngauge  G2\r\n')).toBe('\uFEFFgauge G1\r\ngauge G2\r\n');
  });
});
