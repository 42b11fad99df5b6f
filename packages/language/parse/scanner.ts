/** Letters to tokens: names, numbers, units, texts, signs, comments. Knows no statement; never fails, never loses a character. */
import { matchUnit, nearestUnit } from '@oilway/quantity';
import { isReserved } from './words.ts';

export type RawKind = 'word' | 'number' | 'fraction' | 'unit' | 'text' | 'sign' | 'comment';

export interface Raw {
  readonly kind: RawKind;
  /** First character, UTF-16 offset. */
  readonly start: number;
  /** One past the last. */
  readonly end: number;
  readonly image: string;
  /** Line, from 0. */
  readonly line: number;
  /** Column of the first character, from 0. */
  readonly column: number;
  /** First thing on its line (comments not counted). */
  readonly first: boolean;
}

export interface ScanProblem {
  readonly start: number;
  readonly end: number;
  readonly what: string;
  readonly mend?: string;
  readonly change?: { readonly start: number; readonly end: number; readonly text: string; readonly title: string };
}

export interface Scan {
  readonly tokens: readonly Raw[];
  readonly comments: readonly Raw[];
  readonly problems: readonly ScanProblem[];
  /** Offset at which each line begins. */
  readonly lineStarts: readonly number[];
}

const WORD = /[\p{L}_][\p{L}\p{N}_]*/uy;
/** `1V1`, `2A1`: digits, capitals without E, digits (older ISO 1219 codes). */
const CODE = /[0-9]+[A-DF-Z]+[0-9]+(?![\p{L}\p{N}_])/uy;
const FRACTION = /[0-9]+\/[0-9]+(?![0-9./])/y;
const NUMBER = /[0-9]+(?:\.[0-9]+)?/y;
const TEXT = /"[^"\r\n]*"/y;
const UNKNOWN_UNIT = /[\p{L}°µ%][\p{L}\p{N}°µ%²³^]*(?:[/.·][\p{L}°µ][\p{L}\p{N}°µ²³^]*)*/uy;
const PLAIN_WORD = /[\p{L}_][\p{L}\p{N}_]*/uy;
const LONG_SIGNS = ['+-'];
const SIGNS = new Set('(){},:.=?+-*/±');

function at(pattern: RegExp, text: string, offset: number): string | undefined {
  pattern.lastIndex = offset;
  return pattern.exec(text)?.[0];
}

/** Where each line begins; `\n`, `\r\n` and `\r` end one. */
export function lineStartsOf(text: string): number[] {
  const starts = [0];
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === 10 || (code === 13 && text.charCodeAt(i + 1) !== 10)) starts.push(i + 1);
  }
  return starts;
}

const describe = (character: string): string => {
  const code = character.codePointAt(0) ?? 0;
  if (code < 32 || (code >= 0x7f && code < 0xa0) || (code >= 0xd800 && code < 0xe000))
    return `U+${code.toString(16).toUpperCase().padStart(4, '0')}`;
  return `\`${character}\``;
};

export function scan(text: string): Scan {
  const tokens: Raw[] = [];
  const comments: Raw[] = [];
  const problems: ScanProblem[] = [];
  const lineStarts = lineStartsOf(text);
  let line = 0;
  let lineOfLast = -1;
  let offset = 0;
  let junkEnd = -1;
  const push = (kind: RawKind, image: string): void => {
    while (line + 1 < lineStarts.length && (lineStarts[line + 1] ?? 0) <= offset) line++;
    const raw: Raw = {
      kind,
      start: offset,
      end: offset + image.length,
      image,
      line,
      column: offset - (lineStarts[line] ?? 0),
      first: line !== lineOfLast,
    };
    if (kind === 'comment') comments.push(raw);
    else {
      tokens.push(raw);
      lineOfLast = line;
    }
    offset += image.length;
  };

  /** A unit stands only directly after a number, spaces and tabs between. */
  const unit = (afterFraction: boolean): void => {
    let place = offset;
    while (text[place] === ' ' || text[place] === '\t') place++;
    const word = at(PLAIN_WORD, text, place);
    if (word !== undefined && word !== 'in' && isReserved(word)) return;
    const match = matchUnit(text, place);
    if (match !== undefined) {
      offset = place;
      push('unit', text.slice(place, place + match.length));
      return;
    }
    const unknown = at(UNKNOWN_UNIT, text, place);
    if (unknown === undefined) return;
    // `4/3 centre`: after a shape a word is hardly ever a unit.
    if (afterFraction && nearestUnit(unknown) === undefined) return;
    offset = place;
    push('unit', unknown);
  };

  while (offset < text.length) {
    const code = text.charCodeAt(offset);
    if (code === 32 || code === 9 || code === 10 || code === 13 || code === 0xfeff || code === 0xa0 || code === 11 || code === 12) {
      offset++;
      continue;
    }
    const character = text[offset] ?? '';
    if (character === '/' && text[offset + 1] === '/') {
      let end = offset;
      while (end < text.length && text[end] !== '\n' && text[end] !== '\r') end++;
      push('comment', text.slice(offset, end));
      continue;
    }
    if (character === '/' && text[offset + 1] === '*') {
      const end = text.indexOf('*/', offset + 2);
      if (end < 0) {
        problems.push({ start: offset, end: offset + 2, what: 'This comment is not closed: `*/` is missing' });
        push('comment', text.slice(offset));
      } else push('comment', text.slice(offset, end + 2));
      continue;
    }
    if (code >= 48 && code <= 57) {
      const name = at(CODE, text, offset);
      if (name !== undefined) {
        push('word', name);
        continue;
      }
      const fraction = at(FRACTION, text, offset);
      if (fraction !== undefined) {
        push('fraction', fraction);
        unit(true);
        continue;
      }
      push('number', at(NUMBER, text, offset) ?? character);
      // `1 1/2 in`: the fraction belongs to the number, and the unit to both.
      let next = offset;
      while (text[next] === ' ' || text[next] === '\t') next++;
      if (at(FRACTION, text, next) === undefined) unit(false);
      continue;
    }
    const word = at(WORD, text, offset);
    if (word !== undefined) {
      push('word', word);
      continue;
    }
    if (character === '"') {
      const whole = at(TEXT, text, offset);
      if (whole !== undefined) {
        push('text', whole);
        continue;
      }
      let end = offset;
      while (end < text.length && text[end] !== '\n' && text[end] !== '\r') end++;
      const image = text.slice(offset, end).trimEnd();
      problems.push({
        start: offset,
        end: offset + image.length,
        what: 'This text is not closed: a `"` is missing',
        mend: 'Close the text with `"` on the same line.',
        change: { start: offset + image.length, end: offset + image.length, text: '"', title: 'Close the text with `"`' },
      });
      push('text', image);
      continue;
    }
    const long = LONG_SIGNS.find((sign) => text.startsWith(sign, offset));
    if (long !== undefined) {
      push('sign', long);
      continue;
    }
    if (SIGNS.has(character)) {
      push('sign', character);
      continue;
    }
    // Junk: one problem for a run of it.
    const length = (text.codePointAt(offset) ?? 0) > 0xffff ? 2 : 1;
    const last = problems.at(-1);
    if (last !== undefined && junkEnd === offset) {
      problems[problems.length - 1] = { ...last, end: offset + length, what: 'These characters are no part of the notation' };
    } else {
      problems.push({
        start: offset,
        end: offset + length,
        what: `${describe(text.slice(offset, offset + length))} is no part of the notation`,
      });
    }
    offset += length;
    junkEnd = offset;
  }
  return { tokens, comments, problems, lineStarts };
}
