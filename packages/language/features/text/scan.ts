/** The scanner's tokens as editor features want them: comments in their place, one list in text order, search by offset. */
import { scan as scanText, type Raw } from '../../parse/scanner.ts';

export type TokenType = 'word' | 'number' | 'string' | 'comment' | 'mark' | 'unit';

export interface Token {
  readonly type: TokenType;
  readonly text: string;
  /** First character, offset from the text's start. */
  readonly start: number;
  /** One past the last character. */
  readonly end: number;
}

const TYPE: Readonly<Record<Raw['kind'], TokenType>> = {
  word: 'word',
  number: 'number',
  fraction: 'number',
  unit: 'unit',
  text: 'string',
  sign: 'mark',
  comment: 'comment',
};

/** All tokens of the text in order, comments among them. */
export function scan(text: string): Token[] {
  const found = scanText(text);
  return [...found.tokens, ...found.comments]
    .sort((a, b) => a.start - b.start)
    .map((raw) => ({ type: TYPE[raw.kind], text: raw.image, start: raw.start, end: raw.end }));
}

const WEIGHT: Readonly<Record<TokenType, number>> = { word: 3, unit: 2, number: 2, string: 2, comment: 1, mark: 0 };

/** The token that holds the offset. Where two touch there, names win over numbers and units, those over marks; else the one that begins there. */
export function tokenAt(tokens: readonly Token[], offset: number): Token | undefined {
  let low = 0;
  let high = tokens.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((tokens[middle]?.end ?? 0) < offset) low = middle + 1;
    else high = middle;
  }
  const first = tokens[low];
  const second = tokens[low + 1];
  if (!first || first.start > offset) return undefined;
  if (!second || second.start > offset) return first;
  return WEIGHT[second.type] >= WEIGHT[first.type] ? second : first;
}
