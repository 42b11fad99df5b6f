/** What "Copy Figures at Cursor" puts on the clipboard: tables that a spreadsheet takes, prose without marks. */
import { describe, expect, it } from 'vitest';
import { plainTables } from '../../packages/vscode/extension/figures.ts';

describe('plain text of a hover', () => {
  it('separates the cells of a table by tabs and drops its rule', () => {
    const table = '| step | speed | force |\n|:---|---:|---:|\n| **Out** | 145 mm/s | 100 kN |';
    expect(plainTables(table)).toBe('step\tspeed\tforce\nOut\t145 mm/s\t100 kN');
  });

  it('keeps a bar inside a cell and empty cells', () => {
    expect(plainTables('| a \\| b |  | c |')).toBe('a | b\t\tc');
  });

  it('drops headings, fences, links and emphasis, and keeps the sign of multiplication and indices', () => {
    expect(plainTables('### C1\n```oilway\ncylinder C1\n```\nSee [A01](command:x) and *why*: `p_cap` 2 * 3')).toBe(
      'C1\ncylinder C1\nSee A01 and why: p_cap 2 * 3',
    );
  });

  it('takes escapes away', () => {
    expect(plainTables('5 \\* 3 &lt; 16')).toBe('5 * 3 < 16');
  });

  it('makes nothing of nothing', () => {
    expect(plainTables('')).toBe('');
  });
});
