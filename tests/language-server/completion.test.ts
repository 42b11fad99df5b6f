/** Completion: what is offered where; what is offered first; nothing in the wrong place. */
import { describe, expect, test } from 'vitest';
import { cursorAt, expectsMore } from '../../packages/language/features/completion/context.ts';
import { completionAt } from '../../packages/language/features/completion/index.ts';
import { plain, SNIPPETS } from '../../packages/language/features/completion/snippets.ts';
import { analyseText, BENCH, check } from './support/check.ts';

const rules = [{ code: 'A01', title: 'pump without relief' }];
const items = (marked: string) => check(marked, (analysis, cursor) => completionAt(analysis, cursor, { snippets: true, rules }));
/** Labels in the order an editor shows them. */
const offered = (marked: string): string[] =>
  [...items(marked)].sort((a, b) => ((a.sortText ?? '') < (b.sortText ?? '') ? -1 : 1)).map((one) => one.label);
/** What an editor's text is after the proposal is taken. */
function taken(marked: string, label: string): string {
  return check(marked, (analysis, cursor) => {
    const item = completionAt(analysis, cursor, { snippets: true, rules }).find((one) => one.label === label);
    if (!item?.textEdit || !('range' in item.textEdit)) throw new Error(`${label} is not offered`);
    const { range, newText } = item.textEdit;
    const start = analysis.lines.offset(range.start);
    const end = analysis.lines.offset(range.end);
    return analysis.text.slice(0, start) + newText + analysis.text.slice(end);
  });
}

describe('at a line start', () => {
  test('kinds, lines, heads and snippets', () => {
    expect(offered(`${BENCH}|`)).toEqual(
      expect.arrayContaining([
        'cylinder',
        'pump',
        'working',
        'load',
        'cycle',
        'require',
        'two-pump unit',
        'accumulator block',
        'clamp with reducing valve',
      ]),
    );
  });
  test('half a word is replaced', () => {
    expect(taken('cyl|', 'cylinder')).toBe('cylinder ');
  });
  test('`circuit` only where there is none yet', () => {
    expect(offered('|')[0]).toBe('circuit');
    expect(offered(`${BENCH}|`)).not.toContain('circuit');
  });
  test('in a cycle its own heads only', () => {
    const labels = offered(BENCH.replace('}', '  |\n}'));
    expect(labels.slice(0, 3)).toEqual(['step', 'meanwhile', 'while']);
    expect(labels).not.toContain('cylinder');
  });
});

describe('in brackets', () => {
  test('properties of the kind, required ones first, written ones not again', () => {
    const labels = offered(`${BENCH}cylinder C2 (bore 40 mm, |)`);
    expect(labels[0]).toBe('stroke');
    expect(labels).toContain('rod');
    expect(labels).not.toContain('bore');
  });
  test('what stands behind the cursor counts as written', () => {
    expect(offered(`${BENCH}cylinder C2 (|, stroke 100 mm)`)).not.toContain('stroke');
  });
  test('an open bracket at the end of the file', () => {
    expect(offered(`${BENCH}pump P2 (|`)).toEqual(expect.arrayContaining(['displacement', 'driven']));
  });
  test('units of the dimension; the one the file uses comes first', () => {
    const labels = offered(`${BENCH}relief RV2 (set 100 |)`);
    expect(labels[0]).toBe('bar');
    expect(labels).toContain('psi');
    expect(labels).not.toContain('mm');
  });
  test('flow, then `at`, then pressure', () => {
    expect(offered(`${BENCH}check CV1 (passes 40 |)`)).toContain('L/min');
    expect(offered(`${BENCH}check CV1 (passes 40 L/min |)`)).toEqual(['at']);
    expect(offered(`${BENCH}check CV1 (passes 40 L/min at 3 |)`)[0]).toBe('bar');
  });
  test('words of a property, references of the right kind', () => {
    expect(offered(`${BENCH}cylinder C2 (mounted |)`)).toEqual(['flange', 'clevis', 'trunnion', 'foot']);
    expect(offered(`${BENCH}pump P2 (driven |)`)).toEqual(['by']);
    expect(offered(`${BENCH}pump P2 (driven by |)`)).toEqual(['M1']);
    expect(offered(`${BENCH}directional V2 (4/3, spring to |)`)).toEqual(['a', 'b', 'centre']);
    expect(offered(`${BENCH}directional V2 (4/3, centre |)`)).toEqual(expect.arrayContaining(['closed', 'open', 'tandem', 'float']));
  });
  test('constants of the right dimension', () => {
    expect(offered(`${BENCH}relief RV2 (set |)`)).toContain('system');
    expect(offered(`${BENCH}cylinder C2 (bore |)`)).not.toContain('system');
  });
  test('properties of lines and loads', () => {
    expect(offered(`${BENCH}working V1.A to C1.cap (|)`)).toEqual(expect.arrayContaining(['bore', 'length', 'hose']));
    expect(offered(`${BENCH}load C1 (|)`)).toEqual(expect.arrayContaining(['mass', 'resist', 'people']));
    expect(offered(`${BENCH}limits (|)`)).toEqual(expect.arrayContaining(['velocity', 'idle', 'margin']));
    expect(offered(`${BENCH}limits (velocity |)`)).toEqual(expect.arrayContaining(['suction', 'return']));
    expect(offered(`${BENCH}limits (velocity return 3 |)`)).toContain('m/s');
    expect(offered(`${BENCH}load C1 (inward 3 kN in |)`)).toEqual(expect.arrayContaining(['Out', 'Back']));
  });
});

describe('parts', () => {
  const WITH_PART = `${BENCH}part directional Four (4/3, centre closed, spring to centre, passes 50 L/min at 5 bar)\n`;
  test('kinds after part, parts after as', () => {
    expect(offered(`${BENCH}part |`)).toContain('check');
    expect(offered(`${WITH_PART}directional V2 |`)).toContain('as');
    expect(offered(`${WITH_PART}directional V2 as |`)).toContain('Four');
  });
  test('properties of the kind of a part', () => {
    expect(offered(`${BENCH}part check NonReturn (|)`)).toEqual(expect.arrayContaining(['crack', 'passes']));
  });
});

describe('lines', () => {
  test('components that still have an open port come first', () => {
    const labels = offered(`${BENCH}cylinder C2 (bore 40 mm, stroke 100 mm)\nworking V1.A to |`);
    expect(labels.indexOf('C2')).toBeLessThan(labels.indexOf('C1'));
    expect(labels).toContain('pressure');
    expect(labels).not.toContain('M1');
  });
  test('open ports first after a dot', () => {
    const labels = offered(`${BENCH}cylinder C2 (bore 40 mm, rod 20 mm, stroke 100 mm)\nworking V1.A to C2.cap\nworking V1.B to C2.|`);
    expect(labels).toEqual(['rod', 'cap']);
  });
  test('a part of a port is replaced', () => {
    expect(taken(`${BENCH}working V1.A to C1.c|`, 'cap').endsWith('C1.cap')).toBe(true);
  });
  test('a component that must be written with its port brings its dot', () => {
    expect(taken(`${BENCH}working V1.A to |`, 'C1').endsWith('to C1.')).toBe(true);
  });
});

describe('control', () => {
  const inCycle = (line: string): string => BENCH.replace('}', `  ${line}\n}`);
  test('coils after energise, and after a comma', () => {
    expect(offered(inCycle('step Third energise |'))).toEqual(['SOL1', 'SOL2']);
    expect(offered(inCycle('step Third energise SOL1, |'))).toEqual(expect.arrayContaining(['SOL1', 'SOL2', 'at most']));
  });
  test('switches first after until; then what they may be', () => {
    expect(offered(inCycle('step Third energise SOL1 until |')).slice(0, 2)).toEqual(['LS1', 'LS2']);
    expect(offered(inCycle('step Third energise SOL1 until LS1 |'))).toEqual(expect.arrayContaining(['on', 'off', 'and']));
    expect(offered(inCycle('step Third energise SOL1 until LS1 on |'))).toContain(', at most');
  });
  test('time after for and at most', () => {
    expect(offered(inCycle('step Third energise SOL1 for 3 |'))).toContain('s');
    expect(offered(inCycle('step Third energise SOL1 until LS1 on, at most 3 |'))[0]).toBe('s');
  });
  test('interlock, emergency, load, display, allow', () => {
    expect(offered(`${BENCH}interlock |`)).toEqual(['SOL1', 'SOL2']);
    expect(offered(`${BENCH}interlock SOL1 needs |`)[0]).toBe('LS1');
    expect(offered(`${BENCH}emergency stop |`)).toEqual(['M1']);
    expect(offered(`${BENCH}load |`)).toEqual(['C1']);
    expect(offered(`${BENCH}display |`)).toEqual(['metric', 'us', 'as written']);
    expect(offered(`${BENCH}allow |`)).toEqual(['A01']);
  });
  test('requirements: subject, measure, place, bound, unit of the measure', () => {
    expect(offered(`${BENCH}require |`)).toEqual(expect.arrayContaining(['never', 'C1', 'Part', 'pressure']));
    expect(offered(`${BENCH}require C1 |`)).toEqual(expect.arrayContaining(['speed', 'force', 'still']));
    expect(offered(`${BENCH}require C1 |`)).not.toContain('temperature');
    expect(offered(`${BENCH}require R1 |`)).toEqual(expect.arrayContaining(['temperature', 'volume']));
    expect(offered(`${BENCH}require R1 |`)).not.toContain('speed');
    expect(offered(`${BENCH}require C1.cap |`)).toEqual(expect.arrayContaining(['pressure', 'flow']));
    expect(offered(`${BENCH}require Part |`)).toEqual(['time']);
    expect(offered(`${BENCH}require C1 speed |`)).toEqual(expect.arrayContaining(['in', 'at least', 'between']));
    expect(offered(`${BENCH}require C1 speed in |`)).toEqual(expect.arrayContaining(['Out', 'Back', 'REST']));
    expect(offered(`${BENCH}require C1 speed in Out at least 20 |`)).toContain('mm/s');
    expect(offered(`${BENCH}require C1 speed in Out at least 20 |`)).not.toContain('bar');
  });
});

describe('a space', () => {
  const opens = (marked: string): boolean => check(marked, (analysis, cursor) => expectsMore(cursorAt(analysis, cursor)));
  test.each([
    'relief RV9 (set 100 |)',
    'working V1.A to |',
    'interlock |',
    'pump P9 (driven by |)',
    'emergency stop |',
    'require C1 speed in |',
  ])('opens the list: %s', (line) => {
    expect(opens(BENCH + line)).toBe(true);
  });
  test.each([
    'cylinder C9 |',
    'cylinder C9 (bore 63 mm, |)',
    'cylinder C9 (|',
    '|',
    'circuit X "a |b"',
    'require C1 speed at least 5 mm/s |',
  ])('does not, so that Enter breaks the line: %s', (line) => {
    expect(opens(BENCH + line)).toBe(false);
  });
});

describe('quiet', () => {
  test.each(['// cyl|', '/* pu| */', `${BENCH}circuit X "ta|ble"`, 'let a = 3 bar // |'])(
    'nothing is offered in comments and texts: %s',
    (marked) => {
      expect(offered(marked)).toEqual([]);
    },
  );
  test('without snippets in the client none are offered', () => {
    const labels = check(`${BENCH}|`, (analysis, cursor) => completionAt(analysis, cursor, { snippets: false })).map((one) => one.label);
    expect(labels).not.toContain('two-pump unit');
    expect(labels).toContain('cylinder');
  });
});

describe('snippets', () => {
  /** What a snippet stands on that asks for a line `pressure`. */
  const SUPPLY = `drive M9 (power 4 kW, speed 1450 rpm)
pump P9 (displacement 16 cm3/rev, driven by M9, rated 250 bar)
relief RV9 (set 160 bar, passes 40 L/min at 5 bar)
check CV9 (passes 40 L/min at 3 bar)
gauge G9 (range 0 bar to 250 bar)
suction R1 to P9
working P9 to RV9, CV9
working pressure: CV9 to G9
return RV9 to R1
`;
  const AROUND = 'circuit Sheet\nfluid HM46 (grade 46, temperature 45 degC)\nreservoir R1 (volume 100 L)\n';
  test.each(SNIPPETS)('$label stands without an error, of the text or of a rule', (snippet) => {
    const own = plain(snippet);
    const needsLine = /\bpressure to\b/.test(own) && !/pressure:/.test(own);
    const supply = needsLine ? SUPPLY : '';
    const text = snippet.label === 'pump unit' ? `circuit Sheet\n${own}\n` : `${AROUND}${supply}${own}\n`;
    const errors = analyseText(text).findings.filter((one) => one.severity === 'error');
    expect(errors.map((one) => `${text.slice(one.origin.start, one.origin.end)}: ${one.what}`)).toEqual([]);
  });
});
