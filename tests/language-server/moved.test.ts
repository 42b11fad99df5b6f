/** Findings keep to their characters while the text around them changes. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { editBetween, move, moveFinding } from '../../packages/language/server/moved.ts';
import type { Finding } from '@oilway/rules';

const uri = 'file:///a.oilway';

const finding = (start: number, end: number): Finding => ({
  code: 'A09',
  severity: 'warning',
  what: 'P1 turns against pressure at rest',
  origin: { uri, start, end },
  related: [{ message: 'set here', origin: { uri, start: 0, end: 1 } }],
  place: 'P1',
  fixes: [{ title: 'mend', safe: true, changes: [] }],
  computed: true,
});

describe('moving with edits', () => {
  test('text before shifts, text behind does not', () => {
    expect(move({ uri, start: 10, end: 14 }, { start: 2, end: 2, length: 5 })).toEqual({ uri, start: 15, end: 19 });
    expect(move({ uri, start: 10, end: 14 }, { start: 14, end: 20, length: 0 })).toEqual({ uri, start: 10, end: 14 });
  });

  test('an edit inside grows it; one that eats a border removes it', () => {
    expect(move({ uri, start: 10, end: 14 }, { start: 11, end: 12, length: 4 })).toEqual({ uri, start: 10, end: 17 });
    expect(move({ uri, start: 10, end: 14 }, { start: 8, end: 12, length: 0 })).toBeUndefined();
  });

  test('fixes made for the old text are dropped', () => {
    expect(moveFinding(finding(10, 14), uri, { start: 20, end: 20, length: 1 })?.fixes).toEqual([]);
    expect(moveFinding(finding(10, 14), uri, { start: 8, end: 12, length: 0 })).toBeUndefined();
  });

  test('the edit between two texts turns the one into the other, and a word not touched keeps its characters', () => {
    const letters = fc.string({ unit: fc.constantFrom('a', 'b', ' ', '\n'), maxLength: 30 });
    fc.assert(
      fc.property(letters, letters, letters, letters, (head, gone, put, tail) => {
        const before = `${head}${gone}${tail}WORD${tail}`;
        const after = `${head}${put}${tail}WORD${tail}`;
        const edit = editBetween(before, after);
        if (!edit) {
          expect(before).toBe(after);
          return;
        }
        const inserted = after.slice(edit.start, edit.start + edit.length);
        expect(before.slice(0, edit.start) + inserted + before.slice(edit.end)).toBe(after);
        const at = before.indexOf('WORD');
        const moved = move({ uri, start: at, end: at + 4 }, edit);
        expect(moved && after.slice(moved.start, moved.end)).toBe('WORD');
      }),
    );
  });
});
