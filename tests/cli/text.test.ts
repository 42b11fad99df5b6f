/** Excerpts, tables, colours and course files of the command. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { CycleResult } from '@oilway/circuit';
import { courseCsv } from '../../packages/cli/commands/course.ts';
import { paintFor } from '../../packages/cli/text/colour.ts';
import { excerpt } from '../../packages/cli/text/excerpt.ts';
import { LineTable } from '../../packages/cli/text/position.ts';
import { csvField, table } from '../../packages/cli/text/table.ts';

const plain = (text: string) => text;

describe('line table', () => {
  it('counts lines of all three line ends', () => {
    const lines = new LineTable('a\r\nbc\rd\n\ne');
    expect(lines.at(0)).toEqual({ line: 1, column: 1 });
    expect(lines.at(3)).toEqual({ line: 2, column: 1 });
    expect(lines.at(4)).toEqual({ line: 2, column: 2 });
    expect(lines.at(6)).toEqual({ line: 3, column: 1 });
    expect(lines.at(9)).toEqual({ line: 5, column: 1 });
    expect(lines.line(2)).toBe('bc');
    expect(lines.line(4)).toBe('');
  });
  it('finds for every offset the line that holds it', () => {
    fc.assert(
      fc.property(fc.array(fc.constantFrom('a', 'b', '\n', '\r\n', ' ')), fc.nat(50), (parts, offset) => {
        const text = parts.join('');
        const place = new LineTable(text).at(offset);
        const before = text.slice(0, Math.min(offset, text.length));
        return place.line === before.split('\n').length && place.column === before.length - (before.lastIndexOf('\n') + 1) + 1;
      }),
    );
  });
});

describe('excerpt', () => {
  it('underlines the characters', () => {
    const text = 'pump P1\nrelief RV1 (set 160 bar)\n';
    const start = text.indexOf('160');
    expect(excerpt(new LineTable(text), { start, end: start + 7 }, 3, plain)).toEqual([
      '  2 | relief RV1 (set 160 bar)',
      '    |                 ^^^^^^^',
    ]);
  });
  it('keeps tabs, and gives a caret to an empty range at the end of a line', () => {
    expect(excerpt(new LineTable('\tx'), { start: 1, end: 2 }, 3, plain)).toEqual(['  1 | \tx', '    | \t^']);
    expect(excerpt(new LineTable('ab'), { start: 2, end: 2 }, 3, plain)[1]).toBe('    |   ^');
  });
  it('underlines the first line of a range over several, and cuts a long line around the place', () => {
    expect(excerpt(new LineTable('abc\ndef'), { start: 1, end: 6 }, 3, plain)[1]).toBe('    |  ^^');
    const long = `${'x'.repeat(300)}HERE${'y'.repeat(300)}`;
    const [source = '', carets = ''] = excerpt(new LineTable(long), { start: 300, end: 304 }, 3, plain);
    expect(source.length).toBeLessThan(140);
    expect(source.slice(carets.indexOf('^'), carets.lastIndexOf('^') + 1)).toBe('HERE');
  });
});

describe('tables', () => {
  it('line up', () => {
    expect(
      table(
        [{ title: 'step' }, { title: 'time', align: 'right' }],
        [
          ['Out', '4.00 s'],
          ['B', '12.3 s'],
        ],
      ),
    ).toEqual(['step    time', '----  ------', 'Out   4.00 s', 'B     12.3 s']);
  });
  it('quote fields as RFC 4180 says', () => {
    expect(['a', 'a,b', 'a"b', 'a\nb'].map(csvField)).toEqual(['a', '"a,b"', '"a""b"', '"a\nb"']);
  });
});

describe('colour', () => {
  it('is for terminals only and honours NO_COLOR', () => {
    const coloured = paintFor(true, {}).error('x');
    expect(coloured).not.toBe('x');
    expect(coloured).toContain('x');
    expect(paintFor(false, {}).error('x')).toBe('x');
    expect(paintFor(true, { NO_COLOR: '1' }).error('x')).toBe('x');
    expect(paintFor(true, { NO_COLOR: '' }).error('x')).toBe(coloured);
    expect(paintFor(true, { TERM: 'dumb' }).error('x')).toBe('x');
  });
});

describe('course over time', () => {
  const cycle = (id: string, actuator: string): CycleResult => ({
    id,
    mode: 'cycle',
    runs: 1,
    settled: true,
    completed: true,
    faults: [],
    duty: {},
    run: {
      cycle: id,
      times: [0, 1, 2],
      positions: { [actuator]: [0, 0.1, 0.2] },
      velocities: { [actuator]: [0.1, 0.1, Number.NaN] },
      pressures: { P1: [1e5, 2e5, 3e5] },
      flows: {},
      power: {},
      oil: {},
      events: [],
      steps: [
        { id: `${id}.Out`, from: 0, to: 1 },
        { id: `${id}.Back`, from: 1, to: 2 },
      ],
      live: {},
      statistics: { steps: 2, rejected: 0, newton: 4, events: 0 },
    },
  });
  it('has a head with units and a line a sample, in SI, with nothing where there is no number', () => {
    expect(courseCsv([cycle('Main', 'C1')])).toEqual([
      'cycle,step,time [s],C1 position [m],C1 velocity [m/s],P1 pressure [Pa]',
      'Main,Main.Out,0,0,0.1,100000',
      'Main,Main.Back,1,0.1,0.1,200000',
      'Main,Main.Back,2,0.2,,300000',
    ]);
  });
  it('joins cycles under the union of their columns; motors turn', () => {
    const [head, ...rows] = courseCsv([cycle('A', 'C1'), cycle('B', 'HM1')], (id) => id === 'HM1');
    expect(head).toContain('HM1 position [rad],HM1 velocity [rad/s]');
    for (const row of rows) expect(row.split(',').length).toBe(head?.split(',').length);
  });
});
