/** Tokens of a text for editor features: tolerant, works on half-typed lines, keeps comments. It never decides what is right; the grammar does. */

import { matchUnit } from '@oilway/quantity';
import { isReserved } from '../../parse/words.ts';

export type TokenType = 'word' | 'number' | 'string' | 'comment' | 'mark' | 'unit';

export interface Token {
  readonly type: TokenType;
  readonly text: string;
  /** First character, offset from the text's start. */
  readonly start: number;
  /** One past the last character. */
  readonly end: number;
}

const BLANK = /[ \t\r\n\u00a0\ufeff]+/y;
const COMMENT = /\/\/[^\n\r]*|\/\*[\s\S]*?(?:\*\/|$)/y;
const STRING = /"[^"\n\r]*"?/y;
/** A mixed number `1 1/2`, a fraction `3/4`, a decimal number; a name such as `1V1` is no number. */
const NUMBER = /\d+(?:\.\d+)?(?:[ \t]+\d+\/\d+|\/\d+)?(?![\d]*[A-DF-Z_])/y;
const WORD = /[A-Za-z_][A-Za-z0-9_]*|\d+[A-Z][A-Za-z0-9_]*/y;
/** A word after a number that is no unit we know: a mistyped one. */
const STRANGE_UNIT = /[°A-Za-zµμΩ][A-Za-z0-9°µμ²³^/·]*/y;
const GAP = /[ \t]*/y;

function at(pattern: RegExp, text: string, offset: number): string | undefined {
  pattern.lastIndex = offset;
  return pattern.exec(text)?.[0];
}

/** All tokens of the text in order. Characters that fit nothing become marks of their own. */
export function scan(text: string): Token[] {
  const tokens: Token[] = [];
  let offset = 0;
  const push = (type: TokenType, found: string): void => {
    tokens.push({ type, text: found, start: offset, end: offset + found.length });
    offset += found.length;
  };
  while (offset < text.length) {
    const blank = at(BLANK, text, offset);
    if (blank) {
      offset += blank.length;
      continue;
    }
    const comment = at(COMMENT, text, offset);
    if (comment) {
      push('comment', comment);
      continue;
    }
    const string = at(STRING, text, offset);
    if (string) {
      push('string', string);
      continue;
    }
    const word = at(WORD, text, offset);
    const number = at(NUMBER, text, offset);
    if (number && !(word && word.length > number.length)) {
      push('number', number);
      const gap = at(GAP, text, offset) ?? '';
      const known = matchUnit(text, offset + gap.length);
      const unit = known ? text.slice(offset + gap.length, offset + gap.length + known.length) : at(STRANGE_UNIT, text, offset + gap.length);
      if (unit && (known || !isReserved(unit))) {
        offset += gap.length;
        push('unit', unit);
      }
      continue;
    }
    if (word) {
      push('word', word);
      continue;
    }
    push('mark', text[offset] ?? '');
  }
  return tokens;
}

/** Index of the token that holds the offset; at a border the one that begins there, unless it is a mark and a word ends there. */
export function tokenAt(tokens: readonly Token[], offset: number): Token | undefined {
  let low = 0;
  let high = tokens.length - 1;
  let found: Token | undefined;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const token = tokens[middle];
    if (!token) break;
    if (offset < token.start) high = middle - 1;
    else if (offset > token.end) low = middle + 1;
    else {
      found = token;
      const other = offset === token.end ? tokens[middle + 1] : offset === token.start ? tokens[middle - 1] : undefined;
      const touching = other && other.start <= offset && other.end >= offset ? other : undefined;
      if (touching && (touching.type === 'word' || (touching.type !== 'mark' && token.type === 'mark'))) found = token.type === 'word' && touching.start < token.start ? token : touching;
      return found;
    }
  }
  return found;
}
