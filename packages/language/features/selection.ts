/** Growing selection: word, entry of the brackets, brackets, statement, block, file. */
import type { SelectionRange } from 'vscode-languageserver-types';
import type { Analysis } from './analysis.ts';
import { tokenAt, type Token } from './text/scan.ts';
import { isLineHead } from '../parse/words.ts';

interface Span {
  readonly start: number;
  readonly end: number;
}

export function selectionAt(analysis: Analysis, offset: number): SelectionRange {
  const spans: Span[] = [{ start: 0, end: analysis.text.length }];
  const tokens = analysis.tokens.filter((token) => token.type !== 'comment');
  for (const block of brackets(tokens, '{', '}'))
    if (block.start <= offset && offset <= block.end) spans.push(block, { start: block.start + 1, end: block.end - 1 });
  const statement = statementAt(analysis, tokens, offset);
  if (statement) spans.push(statement);
  for (const bracket of brackets(tokens, '(', ')')) {
    if (offset <= bracket.start || offset >= bracket.end) continue;
    spans.push(bracket, { start: bracket.start + 1, end: bracket.end - 1 }, entryAt(tokens, bracket, offset));
  }
  const token = tokenAt(analysis.tokens, offset);
  if (token) spans.push({ start: token.start, end: token.end });
  const ordered = spans.filter((span) => span.start <= offset && offset <= span.end).sort((a, b) => b.end - b.start - (a.end - a.start));
  let selection: SelectionRange | undefined;
  let outer: Span | undefined;
  for (const span of ordered) {
    if (outer && (span.start < outer.start || span.end > outer.end || (span.start === outer.start && span.end === outer.end))) continue;
    selection = { range: analysis.lines.range(span), ...(selection ? { parent: selection } : {}) };
    outer = span;
  }
  return selection ?? { range: analysis.lines.range({ start: offset, end: offset }) };
}

function brackets(tokens: readonly Token[], open: string, close: string): Span[] {
  const stack: number[] = [];
  const found: Span[] = [];
  for (const token of tokens) {
    if (token.type !== 'mark') continue;
    if (token.text === open) stack.push(token.start);
    if (token.text === close) {
      const start = stack.pop();
      if (start !== undefined) found.push({ start, end: token.end });
    }
  }
  return found;
}

function entryAt(tokens: readonly Token[], bracket: Span, offset: number): Span {
  let { start } = bracket;
  start += 1;
  let end = bracket.end - 1;
  let depth = 0;
  for (const token of tokens) {
    if (token.start <= bracket.start || token.end >= bracket.end || token.type !== 'mark') continue;
    if (token.text === '(') depth += 1;
    if (token.text === ')') depth -= 1;
    if (token.text !== ',' || depth !== 0) continue;
    if (token.end <= offset) start = token.end;
    else {
      end = Math.min(end, token.start);
      break;
    }
  }
  const inside = tokens.filter((token) => token.start >= start && token.end <= end);
  return { start: inside[0]?.start ?? start, end: inside.at(-1)?.end ?? end };
}

function statementAt(analysis: Analysis, tokens: readonly Token[], offset: number): Span | undefined {
  let start: number | undefined;
  let end = 0;
  let line = -1;
  for (const token of tokens) {
    const first = analysis.lines.lineOf(token.start) !== line;
    line = analysis.lines.lineOf(token.end);
    if (token.type === 'word' && first && isLineHead(token.text)) {
      if (start !== undefined && end >= offset) break;
      if (token.start > offset) break;
      start = token.start;
    }
    if (token.type === 'mark' && (token.text === '{' || token.text === '}')) {
      if (start !== undefined && end >= offset) break;
      if (token.text === '}') start = undefined;
      continue;
    }
    end = token.end;
  }
  return start === undefined || end < start ? undefined : { start, end };
}
