/** Folding: cycles, manual functions, assemblies, brackets over several lines, comments, `// region` .. `// endregion`. */
import { FoldingRangeKind, type FoldingRange } from 'vscode-languageserver-types';
import type { Analysis } from './analysis.ts';

export function foldingRanges(analysis: Analysis): FoldingRange[] {
  const { lines } = analysis;
  const found: FoldingRange[] = [];
  const open: { mark: string; line: number }[] = [];
  const regions: number[] = [];
  let comments: { first: number; last: number } | undefined;
  const endComments = (): void => {
    if (comments && comments.last > comments.first)
      found.push({ startLine: comments.first, endLine: comments.last, kind: FoldingRangeKind.Comment });
    comments = undefined;
  };
  let lastCodeLine = -1;
  for (const token of analysis.tokens) {
    const line = lines.lineOf(token.start);
    if (token.type === 'comment') {
      if (token.text.startsWith('/*')) {
        endComments();
        const last = lines.lineOf(token.end);
        if (last > line) found.push({ startLine: line, endLine: last, kind: FoldingRangeKind.Comment });
        continue;
      }
      if (/^\/\/\s*#?region\b/.test(token.text)) {
        endComments();
        regions.push(line);
      } else if (/^\/\/\s*#?endregion\b/.test(token.text)) {
        endComments();
        const first = regions.pop();
        if (first !== undefined && line > first) found.push({ startLine: first, endLine: line, kind: FoldingRangeKind.Region });
      } else if (line === lastCodeLine) {
        // A remark behind a statement belongs to no block of remarks.
        endComments();
      } else if (comments && comments.last === line - 1) comments.last = line;
      else {
        endComments();
        comments = { first: line, last: line };
      }
      continue;
    }
    endComments();
    lastCodeLine = line;
    if (token.type !== 'mark') continue;
    if (token.text === '{' || token.text === '(') open.push({ mark: token.text, line });
    else if (token.text === '}' || token.text === ')') {
      const wanted = token.text === '}' ? '{' : '(';
      // An unclosed bracket inside is dropped: half-typed lines must not shift the folds behind them.
      let index = open.length - 1;
      while (index >= 0 && open[index]?.mark !== wanted) index -= 1;
      const start = open[index];
      if (index < 0 || !start) continue;
      open.length = index;
      // The closing line stays visible.
      if (line - 1 > start.line) found.push({ startLine: start.line, endLine: line - 1 });
    }
  }
  endComments();
  return found;
}
