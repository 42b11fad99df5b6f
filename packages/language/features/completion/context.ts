/** Where the cursor stands in its statement: read from tokens, so that it works on a line that does not parse yet. */
import type { Analysis } from '../analysis.ts';
import { isLineHead, LINE_FUNCTIONS } from '../../parse/words.ts';
import type { Token } from '../text/scan.ts';

const CONTINUES_BEFORE: ReadonlySet<string> = new Set([',', 'to', 'and', 'or', 'until', 'for', '(', ':']);

export type Block = 'file' | 'cycle' | 'assembly';

export interface Cursor {
  /** Characters of the word under the cursor that are already typed. */
  readonly prefix: string;
  /** Span that an accepted proposal replaces. */
  readonly replace: { readonly start: number; readonly end: number };
  readonly block: Block;
  /** Tokens of the statement before the word being typed, head included; empty at a line's start. */
  readonly before: readonly Token[];
  /** Tokens of the statement behind the cursor (what the line says already). */
  readonly after: readonly Token[];
  /** The cursor is directly behind a number (spaces allowed): a unit is expected. */
  readonly afterNumber: boolean;
  /** Name before the dot(s) directly before the cursor: `C1` in `C1.ca`, `U1.P1` in `U1.P1.`. */
  readonly owner: string | undefined;
  /** Inside a comment or a text in quotes: nothing is proposed. */
  readonly quiet: boolean;
}

const isFirstOnLine = (analysis: Analysis, tokens: readonly Token[], index: number): boolean => {
  const token = tokens[index];
  const previous = tokens[index - 1];
  return (
    token !== undefined &&
    (previous === undefined ||
      analysis.lines.lineOf(previous.end) < analysis.lines.lineOf(token.start) ||
      previous.text === '{' ||
      previous.text === '}')
  );
};

export function cursorAt(analysis: Analysis, offset: number): Cursor {
  const all = analysis.tokens;
  const within = all.find(
    (token) =>
      token.start < offset && (offset < token.end || (offset === token.end && (token.type !== 'string' || !/^".*"$/.test(token.text)))),
  );
  const unclosed =
    within?.type === 'comment'
      ? !(within.text.startsWith('/*') && within.text.endsWith('*/') && offset === within.end)
      : within?.type === 'string';
  const none: Cursor = {
    prefix: '',
    replace: { start: offset, end: offset },
    block: 'file',
    before: [],
    after: [],
    afterNumber: false,
    owner: undefined,
    quiet: true,
  };
  if (unclosed) return none;

  const tokens = all.filter((token) => token.type !== 'comment');
  const typed = tokens.find((token) => (token.type === 'word' || token.type === 'unit') && token.start < offset && offset <= token.end);
  const start = typed ? typed.start : offset;
  const prefix = typed ? typed.text.slice(0, offset - typed.start) : '';
  let end = tokens.findIndex((token) => token.end > start || (token.start >= start && token.end >= offset));
  if (end < 0) end = tokens.length;
  const earlier = tokens.slice(0, end);

  // Block: the innermost open brace decides which heads may stand here.
  const blocks: Block[] = [];
  let lastHead = '';
  for (let i = 0; i < earlier.length; i += 1) {
    const token = earlier[i];
    if (!token) continue;
    if (token.type === 'word' && isLineHead(token.text) && isFirstOnLine(analysis, earlier, i)) lastHead = token.text;
    if (token.text === '{' && token.type === 'mark')
      blocks.push(lastHead === 'assembly' ? 'assembly' : lastHead === 'cycle' || lastHead === 'manual' ? 'cycle' : 'file');
    if (token.text === '}' && token.type === 'mark') blocks.pop();
  }
  const block = blocks.at(-1) ?? 'file';

  // Statement: from the last head at a line's start, unless the cursor begins a new line that does not go on.
  let head = -1;
  for (let i = earlier.length - 1; i >= 0; i -= 1) {
    const token = earlier[i];
    if (token?.type === 'mark' && (token.text === '{' || token.text === '}')) break;
    if (token?.type === 'word' && isLineHead(token.text) && isFirstOnLine(analysis, earlier, i)) {
      head = i;
      break;
    }
  }
  let before = head < 0 ? [] : earlier.slice(head);
  const last = before.at(-1);
  if (last && analysis.lines.lineOf(last.end) < analysis.lines.lineOf(start)) {
    const goesOn = depthOf(before) > 0 || CONTINUES_BEFORE.has(last.text);
    if (!goesOn) before = [];
  }
  const after: Token[] = [];
  for (let i = end; i < tokens.length; i += 1) {
    const token = tokens[i];
    if (!token) break;
    if (typed && token === typed) continue;
    if (analysis.lines.lineOf(token.start) > analysis.lines.lineOf(offset) && depthOf([...before, ...after]) <= 0) break;
    if (token.type === 'word' && isLineHead(token.text) && isFirstOnLine(analysis, tokens, i)) break;
    after.push(token);
  }

  const previous = before.at(-1);
  const afterNumber = previous?.type === 'number' && analysis.lines.lineOf(previous.end) === analysis.lines.lineOf(offset);
  let owner: string | undefined;
  if (previous?.text === '.' && previous.end === start) {
    const parts: string[] = [];
    let i = before.length - 1;
    while (before[i]?.text === '.' && before[i - 1]?.type === 'word' && before[i - 1]?.end === before[i]?.start) {
      parts.unshift(before[i - 1]?.text ?? '');
      i -= 2;
    }
    owner = parts.length > 0 ? parts.join('.') : undefined;
  }
  return { prefix, replace: { start, end: offset }, block, before, after, afterNumber, owner, quiet: false };
}

/** Words after which something must follow on the line. */
const OPENERS: ReadonlySet<string> = new Set(
  (
    'to from by with as until and or energise shift stop run needs over above below require interlock emergency load plug while display allow use ' +
    'never in on least most between reaches within'
  ).split(' '),
);

/**
 * True where a space alone is reason enough to offer something: a unit after a number, a name after `energise`.
 * Elsewhere a list that opens at a space would take the next Enter, and one breaks lines after commas and brackets.
 */
export function expectsMore(cursor: Cursor): boolean {
  const last = cursor.before.at(-1);
  if (cursor.quiet || cursor.prefix !== '' || !last) return false;
  if (cursor.afterNumber) return true;
  if (last.type !== 'word') return false;
  return OPENERS.has(last.text) || (LINE_FUNCTIONS as readonly string[]).includes(last.text);
}

/** Open round brackets at the end of the tokens. */
export function depthOf(tokens: readonly Token[]): number {
  let depth = 0;
  for (const token of tokens) {
    if (token.type !== 'mark') continue;
    if (token.text === '(') depth += 1;
    if (token.text === ')') depth = Math.max(0, depth - 1);
  }
  return depth;
}

/** What stands in the innermost bracket's current entry, and the entries before it. */
export interface BracketEntry {
  /** Tokens before the bracket opened. */
  readonly outside: readonly Token[];
  readonly depth: number;
  /** First words of the entries already written in the outermost bracket. */
  readonly written: readonly string[];
  /** Tokens of the current entry of the outermost bracket. */
  readonly entry: readonly Token[];
}

export function bracketEntry(cursor: Cursor): BracketEntry | undefined {
  const depth = depthOf(cursor.before);
  if (depth === 0) return undefined;
  let level = 0;
  let open = -1;
  for (let i = 0; i < cursor.before.length; i += 1) {
    const token = cursor.before[i];
    if (token?.type !== 'mark') continue;
    if (token.text === '(') {
      level += 1;
      if (level === 1) open = i;
    }
    if (token.text === ')') level = Math.max(0, level - 1);
  }
  const inside = cursor.before.slice(open + 1);
  const written: string[] = [];
  let entry: Token[] = [];
  level = 0;
  const note = (tokens: readonly Token[]): void => {
    const first = tokens[0];
    if (first?.type === 'word') written.push(first.text);
  };
  for (const token of inside) {
    if (token.type === 'mark' && token.text === '(') level += 1;
    if (token.type === 'mark' && token.text === ')') level -= 1;
    if (token.type === 'mark' && token.text === ',' && level === 0) {
      note(entry);
      entry = [];
    } else entry.push(token);
  }
  // Entries behind the cursor count as written too.
  let behind: Token[] = [];
  level = depth - 1;
  for (const token of cursor.after) {
    if (token.type === 'mark' && token.text === '(') level += 1;
    if (token.type === 'mark' && token.text === ')') {
      level -= 1;
      if (level < 0) break;
    }
    if (token.type === 'mark' && token.text === ',' && level === 0) {
      note(behind);
      behind = [];
    } else behind.push(token);
  }
  note(behind);
  return { outside: cursor.before.slice(0, open), depth, written, entry };
}
