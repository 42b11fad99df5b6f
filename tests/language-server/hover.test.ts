/**
 * Hover texts as a person reads them: each is a file beside this one. The figures are those of the study; here it is their form, units and
 * wording that are fixed, and that a hover tells them.
 */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, test } from 'vitest';
import { hoverAt } from '../../packages/language/features/hover/index.ts';
import { meteringOf } from '../../packages/language/features/hover/metering.ts';
import { inlayHints } from '../../packages/language/features/inlay-hints.ts';
import { workJob } from '../../packages/language/server/study-job.ts';
import type { Analysis } from '../../packages/language/features/analysis.ts';
import { analyseText, BENCH, check, unmark, URI } from './support/check.ts';
import { expectTold, sameButForFigures } from './support/told.ts';

const sample = (name: string): string => readFileSync(fileURLToPath(new URL(`../../samples/${name}.oilway`, import.meta.url)), 'utf8');

/** The text with its study, as after a pause. */
function studied(text: string, older = false): Analysis {
  const { circuit } = analyseText(text);
  if (!circuit) throw new Error('no circuit');
  const { study } = workJob({ circuit, texts: { [URI]: text } });
  return analyseText(text, { study, circuit, older });
}
/** Hover at the mark in the text. */
function hover(analysis: Analysis, marked: string): string {
  const { text, cursor } = unmark(marked);
  const start = analysis.text.indexOf(text);
  if (start < 0) throw new Error(`${text} does not stand in the text`);
  return hoverAt(analysis, start + cursor)?.markdown ?? '(none)';
}

describe('figures', () => {
  const circuits = new Map<string, Analysis>();
  beforeAll(() => {
    for (const name of ['03-clamp-work', '04-traverse-feed', '05-two-pump']) circuits.set(name, studied(sample(name)));
    circuits.set('no-cycle', studied(BENCH.replace(/cycle[^}]*\}/, '')));
  });

  test.each([
    ['actuator', '04-traverse-feed', 'cylinder  1A|1'],
    ['actuator-without-cycle', 'no-cycle', 'cylinder  C|1'],
    ['pump', '05-two-pump', 'pump      P|1'],
    ['drive', '05-two-pump', 'drive     M|1'],
    ['relief', '05-two-pump', 'relief    RV|1'],
    ['directional', '04-traverse-feed', 'directional 1V|1'],
    ['throttle', '04-traverse-feed', 'throttle  1V|2'],
    ['line', '05-two-pump', 'work|ing pressure: P2'],
    ['line-piece', '04-traverse-feed', 'working 1A1.rod t|o 1V2'],
    ['line-name', '05-two-pump', 'pilot   press|ure to UV1.X'],
    ['setting', '04-traverse-feed', '(se|t 1.26 L/min'],
    ['constant', '05-two-pump', 'let sys|tem'],
    ['step', '04-traverse-feed', 'step O|ut'],
    ['cycle', '05-two-pump', 'cycle For|m'],
    ['requirement', '04-traverse-feed', 'req|uire 1A1 speed from 255'],
    ['requirement-of-the-run', '05-two-pump', 'req|uire C1 force'],
    ['state', '05-two-pump', 'power in RES|T'],
    ['requirement-word', '05-two-pump', 'force in Out rea|ches'],
    ['coil', '05-two-pump', 'energise SO|L0'],
    ['switch', '05-two-pump', 'switch    PS|1'],
    ['reservoir', '05-two-pump', 'reservoir R|1'],
    ['fluid', '05-two-pump', 'fluid     HM|46'],
    ['keyword', '03-clamp-work', 'pilotch|eck PC1'],
    ['line-keyword', '03-clamp-work', 'lo|ad C1'],
    ['number', '04-traverse-feed', 'set 7|0 bar'],
    ['port', '04-traverse-feed', 'working 1V1.A to 1A1.ca|p'],
  ])('%s', async (file, name, marked) => {
    const analysis = circuits.get(name);
    if (!analysis) throw new Error(name);
    await expectTold(`${hover(analysis, marked)}\n`, `hover/${file}.md`);
  });

  test('the working adds up: anyone with a pocket calculator gets the result from the inputs shown', () => {
    const analysis = circuits.get('04-traverse-feed');
    if (!analysis) throw new Error('no circuit');
    const text = hover(analysis, 'cylinder  1A|1');
    const shown = (name: string, unit: string): number => Number(new RegExp(`- ${name} = (-?[\\d.]+) ${unit} `).exec(text)?.[1]);
    const result = (name: string, unit: string): number => Number(new RegExp(`${name}: .*\\*\\*(-?[\\d.]+) ${unit}`).exec(text)?.[1]);
    // 1 bar on 1 cm2 is 10 N; 1 L/min through 1 cm2 is 1000/6 mm/s (definitions of the units).
    const force =
      10 * (shown('p cap', 'bar') * shown('A cap', 'cm2') - shown('p rod', 'bar') * shown('A rod', 'cm2')) - shown('seal friction', 'N');
    expect(force / result('Force on the load', 'N')).toBeCloseTo(1, 1);
    expect(((shown('q cap', 'L/min') / shown('A cap', 'cm2')) * 1000) / 6 / result('Speed', 'mm/s')).toBeCloseTo(1, 2);
    // Bore 63 mm, rod 36 mm: pi/4 d2.
    expect(shown('A cap', 'cm2')).toBeCloseTo((Math.PI / 4) * 6.3 ** 2, 1);
    expect(shown('A rod', 'cm2')).toBeCloseTo((Math.PI / 4) * (6.3 ** 2 - 3.6 ** 2), 1);
  });

  test('inlay hints stand behind the names', async () => {
    const analysis = circuits.get('04-traverse-feed');
    if (!analysis) throw new Error('no circuit');
    const shown = inlayHints(analysis, { start: 0, end: analysis.text.length })
      .reverse()
      .reduce((text, hint) => {
        const at = analysis.lines.offset(hint.position);
        return `${text.slice(0, at)} ‹${typeof hint.label === 'string' ? hint.label : ''}›${text.slice(at)}`;
      }, analysis.text);
    await expectTold(shown, 'hover/hints.oilway.txt');
  });

  test('each kind of hint has its switch', () => {
    const analysis = circuits.get('04-traverse-feed');
    if (!analysis) throw new Error('no circuit');
    const off = { actuators: false, steps: false, requirements: false, metering: false };
    const labels = (on: object): string[] =>
      inlayHints(analysis, { start: 0, end: analysis.text.length }, { ...off, ...on }).map((one) => String(one.label));
    expect(labels({})).toEqual([]);
    expect(labels({ metering: true })).toEqual(['meters 1A1 extending']);
    expect(labels({ steps: true })).toHaveLength(2);
    expect(labels({ actuators: true })).toHaveLength(1);
    expect(labels({ requirements: true })).toHaveLength(analysis.circuit?.requirements.length ?? 0);
  });

  test('no hover of any sample shows NaN, undefined or an object', () => {
    for (const analysis of circuits.values()) {
      for (const token of analysis.tokens) {
        const found = hoverAt(analysis, token.start);
        expect(found?.markdown ?? '').not.toMatch(/NaN|undefined|\[object|Infinity/);
      }
    }
  });
});

test('the comparison lets figures drift a little and nothing else', () => {
  expect(sameButForFigures('| Out | 10.0 mm/s |', '| Out | 10.2 mm/s |')).toBe(true);
  expect(sameButForFigures('| Out | 10.0 mm/s |', '| Out | 12.0 mm/s |')).toBe(false);
  expect(sameButForFigures('| Out | 10.0 mm/s |', '| Out | 10.0 m/s |')).toBe(false);
  expect(sameButForFigures('| Out | 10.0 mm/s |', '| Back | 10.0 mm/s |')).toBe(false);
});

describe('standing', () => {
  test('before the first study figures are said to be on their way', () => {
    expect(hover(analyseText(BENCH), 'cylinder  C|1')).toBe('**C1** cylinder, Slide\n\n_Figures are being computed._');
  });
  test('figures of an older text say so', () => {
    expect(hover(studied(BENCH, true), 'cylinder  C|1')).toContain('_These figures are older than the text; new ones are being computed._');
  });
  test('what cannot be computed says why', () => {
    const analysis = studied(BENCH.replace(', passes 30 L/min at 3 bar', ''));
    expect(hover(analysis, 'directional V|1')).toContain('**Not computed**');
  });
  test('nothing in comments and texts', () => {
    expect(hover(analyseText(BENCH), '"Test b|ench"')).toBe('(none)');
  });
});

describe('metered motion', () => {
  const words = (line: string): string | undefined => {
    const { circuit } = analyseText(
      BENCH.replace('working C1.rod to FC1 to V1.B', line).replace(
        'working V1.A to C1.cap\n',
        line.includes('V1.A') ? '' : 'working V1.A to C1.cap\n',
      ),
    );
    const throttle = circuit?.components.find((one) => one.id === 'FC1');
    const metering = circuit && throttle ? meteringOf(circuit, throttle) : undefined;
    return metering && `${metering.how}: ${metering.words}`;
  };
  test.each([
    ['working C1.rod to FC1 to V1.B', 'meter-out: meters C1 extending'],
    ['working V1.B to FC1 to C1.rod', 'meter-in: meters C1 retracting'],
    ['working V1.A to FC1 to C1.cap\nworking V1.B to C1.rod', 'meter-in: meters C1 extending'],
    ['working C1.cap to FC1 to V1.A\nworking V1.B to C1.rod', 'meter-out: meters C1 retracting'],
  ])('%s', (line, expected) => {
    expect(words(line)).toBe(expected);
  });
  test('without a reverse check nothing is said', () => {
    const { circuit } = analyseText(BENCH.replace(', reverse check', ''));
    const throttle = circuit?.components.find((one) => one.id === 'FC1');
    expect(circuit && throttle && meteringOf(circuit, throttle)).toBeUndefined();
  });
});

describe('numbers', () => {
  const at = (marked: string): string => check(marked, (analysis, cursor) => hoverAt(analysis, cursor)?.markdown ?? '(none)');
  test('a number and its unit say the same, in the other units', () => {
    // 160 bar = 16 MPa exactly; 14.5037738 psi/bar (exact definition of the pound-force per square inch).
    expect(at('let a = 16|0 bar')).toContain('= 2321 psi = 16.00 MPa');
    expect(at('let a = 160 b|ar')).toBe(at('let a = 16|0 bar'));
    // 1 in = 25.4 mm (international yard and pound agreement, 1959).
    expect(at('let a = 2 1/2 i|n')).toContain('63.50 mm');
    expect(at('let a = 45 deg|C')).toContain('113.0 °F');
  });
  test('a number without a unit says nothing', () => {
    expect(at('let a = 3| ')).toBe('(none)');
  });
});
