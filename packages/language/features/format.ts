/** Formatting through the language's formatter: whole text in, the changed lines out. */
import type { TextEdit } from 'vscode-languageserver-types';
import type { Analysis } from './analysis.ts';

/** Edits of the whole text, or of the lines a range touches. `formatted`: the text as the formatter leaves it. */
export function formatEdits(analysis: Analysis, formatted: string, range?: { readonly start: number; readonly end: number }): TextEdit[] {
  const before = analysis.text.split('\n');
  const after = formatted.split('\n');
  // Formatting keeps lines: where it does not, the text is replaced as a whole.
  if (before.length !== after.length) {
    if (range) return [];
    return analysis.text === formatted
      ? []
      : [{ range: analysis.lines.range({ start: 0, end: analysis.text.length }), newText: formatted }];
  }
  const edits: TextEdit[] = [];
  for (let line = 0; line < before.length; line += 1) {
    const old = before[line] ?? '';
    const fresh = after[line] ?? '';
    if (old === fresh) continue;
    const start = analysis.lines.start(line);
    if (range && (start > range.end || start + old.length < range.start)) continue;
    edits.push({ range: analysis.lines.range({ start, end: start + old.length }), newText: fresh });
  }
  return edits;
}
