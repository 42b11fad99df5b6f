/**
 * The formatter: indentation, spaces, names in columns. It moves no token to another line, changes no token and no comment, and leaves alone
 * what does not parse and what stands between `// oilway: format off` and `// oilway: format on`.
 */
import { KIND_NAMES } from '@oilway/circuit';
import { type Layout, layout } from '../parse/layout.ts';
import { parseText } from '../parse/parse.ts';
import { type Raw, scan } from '../parse/scanner.ts';
import { LINE_FUNCTIONS } from '../parse/words.ts';
import { spaceBefore } from './spacing.ts';

const STEP = 2;
/** Longer heads run over the column instead of pushing every name to the right. */
const WIDEST_HEAD = 9;
const KINDS: ReadonlySet<string> = new Set(KIND_NAMES);
const FUNCTIONS: ReadonlySet<string> = new Set(LINE_FUNCTIONS);

interface Line {
  readonly start: number;
  readonly end: number;
  /** Token indices, first and one past the last. */
  readonly from: number;
  readonly to: number;
  readonly comments: readonly Raw[];
  /** Left as it is. */
  readonly verbatim: boolean;
  /** Begins a statement. */
  readonly heads: boolean;
  readonly depth: number;
}

/** The text, formatted. Formatting twice changes nothing more. */
export function format(text: string): string {
  const once = formatOnce(text);
  // A text so broken that its layout hangs on its spaces stays as it is.
  return once === text || formatOnce(once) === once ? once : text;
}

function formatOnce(text: string): string {
  const source = scan(text);
  const laid = layout(text);
  const lines = linesOf(text, source.tokens, source.comments, laid);
  const columns = columnsOf(lines, source.tokens);
  const braces = source.tokens.filter((token) => token.kind === 'sign' && (token.image === '{' || token.image === '}')).length;
  // Where braces are lost the depth is a guess: indentation stays as written.
  const sure = laid.tokens.filter((token) => token.type === '{' || token.type === '}').every((token) => !token.inserted);
  const all = laid.tokens.filter((token) => token.type === '{' || token.type === '}').length === braces;
  let result = '';
  lines.forEach((line, i) => {
    const next = lines[i + 1];
    const ending = text.slice(line.end, next?.start ?? text.length);
    const own = text.slice(line.start, line.end);
    const indent = sure && all ? ' '.repeat(STEP * indentOf(line, lines, i)) : (/^[ \t]*/.exec(own)?.[0] ?? '');
    result += (line.verbatim ? own : written(line, source.tokens, columns.get(i), indent)) + ending;
  });
  return sameTokens(source.tokens, result) ? result : text;
}

/** Nothing but spaces may have changed; where anything else did, the text stays as it was. */
function sameTokens(before: readonly Raw[], text: string): boolean {
  const after = scan(text).tokens;
  return (
    after.length === before.length &&
    after.every((token, i) => token.image === before[i]?.image && token.kind === before[i]?.kind && token.line === before[i]?.line)
  );
}

function linesOf(text: string, tokens: readonly Raw[], comments: readonly Raw[], laid: Layout): Line[] {
  const starts = laid.lineStarts;
  const broken = parseText('', text).broken;
  const problems = laid.problems;
  const heads = new Set(laid.statements.map((statement) => statement.start));
  const lines: Line[] = [];
  let token = 0;
  let comment = 0;
  let depth = 0;
  let off = false;
  let nextBroken = 0;
  let nextProblem = 0;
  let commentEnd = -1;
  starts.forEach((start, i) => {
    const stop = starts[i + 1] ?? text.length;
    const end = start + text.slice(start, stop).replace(/[\r\n]+$/, '').length;
    const from = token;
    while (token < tokens.length && (tokens[token]?.start ?? 0) < stop) token++;
    const own: Raw[] = [];
    const insideComment = commentEnd > start;
    for (let raw = comments[comment]; raw !== undefined && raw.start < stop; raw = comments[++comment]) {
      own.push(raw);
      commentEnd = raw.end;
    }
    const spans = insideComment || own.some((raw) => raw.end > end);
    const inner = own.some((raw) => raw.start < (tokens[token - 1]?.start ?? 0) && token > from);
    while ((broken[nextBroken]?.end ?? Number.POSITIVE_INFINITY) < start) nextBroken++;
    while ((problems[nextProblem]?.end ?? Number.POSITIVE_INFINITY) < start) nextProblem++;
    const isBroken =
      (broken[nextBroken]?.start ?? Number.POSITIVE_INFINITY) <= end || (problems[nextProblem]?.start ?? Number.POSITIVE_INFINITY) <= end;
    const marks = own.map((raw) => /^\/\/\s*oilway:\s*format\s+(on|off)\s*$/.exec(raw.image)?.[1]).filter((mark) => mark !== undefined);
    const wasOff = off;
    if (marks.length > 0) off = marks.at(-1) === 'off';
    const first = tokens[from];
    const closes = token > from && first?.kind === 'sign' && first.image === '}';
    let after = depth;
    for (let k = from; k < token; k++) {
      if (tokens[k]?.kind !== 'sign') continue;
      if (tokens[k]?.image === '{') after++;
      else if (tokens[k]?.image === '}') after = Math.max(0, after - 1);
    }
    lines.push({
      start: i === 0 && text.startsWith('\uFEFF') ? start + 1 : start,
      end,
      from,
      to: token,
      comments: own,
      verbatim: wasOff || off || marks.length > 0 || spans || inner || isBroken,
      heads: closes || (first !== undefined && token > from && heads.has(first.start)),
      depth: closes ? Math.max(0, depth - 1) : depth,
    });
    depth = after;
  });
  const first = lines[0];
  if (first !== undefined && first.start > 0) lines.unshift({ ...first, start: 0, end: 1, from: 0, to: 0, comments: [], verbatim: true });
  return lines;
}

/** The word after which a column begins, and what is padded: head of a component or line, name of a constant or step. */
function cellOf(line: Line, tokens: readonly Raw[]): { readonly group: string; readonly text: string; readonly count: number } | undefined {
  if (line.verbatim || !line.heads || line.to - line.from < 2) return undefined;
  const head = tokens[line.from]?.image ?? '';
  const second = tokens[line.from + 1];
  if (KINDS.has(head) || head === 'unit') return { group: 'component', text: head, count: 1 };
  // A part stands among the components without a column of its own.
  if (head === 'part') return { group: 'component', text: '', count: 0 };
  if (FUNCTIONS.has(head)) return { group: 'line', text: head, count: 1 };
  if ((head === 'let' || head === 'step') && second?.kind === 'word' && line.to - line.from > 2)
    return { group: head, text: `${head} ${second.image}`, count: 2 };
  return undefined;
}

/** Width of the first cell of each line, by runs of lines of one group. */
function columnsOf(lines: readonly Line[], tokens: readonly Raw[]): Map<number, number> {
  const columns = new Map<number, number>();
  for (let i = 0; i < lines.length; ) {
    const cell = cellOf(lines[i] as Line, tokens);
    let end = i + 1;
    if (cell !== undefined) {
      const depth = lines[i]?.depth;
      const widths: number[] = [];
      for (end = i; end < lines.length; end++) {
        const other = lines[end] as Line;
        const own = cellOf(other, tokens);
        if (own?.group !== cell.group || other.depth !== depth) break;
        if (cell.group !== 'component' || own.text.length <= WIDEST_HEAD) widths.push(own.text.length);
      }
      const width = Math.max(0, ...widths);
      for (let k = i; k < end; k++) columns.set(k, width);
    }
    i = end;
  }
  return columns;
}

function written(line: Line, tokens: readonly Raw[], column: number | undefined, indent: string): string {
  if (line.from === line.to && line.comments.length === 0) return '';
  let code = '';
  const cell = column === undefined ? undefined : cellOf(line, tokens);
  for (let k = line.from; k < line.to; k++) {
    const space = k > line.from && spaceBefore(tokens, k);
    if (cell !== undefined && cell.count > 0 && k === line.from + cell.count) code = code.padEnd(column ?? 0);
    code += (space ? ' ' : '') + (tokens[k]?.image ?? '');
  }
  const comments = line.comments.map((raw) => raw.image.trimEnd()).join(' ');
  if (code === '') return indent + comments;
  return comments === '' ? indent + code : `${indent}${code}  ${comments}`;
}

/** Steps of indentation: braces, and one more for a line that goes on with the statement above. */
function indentOf(line: Line, lines: readonly Line[], index: number): number {
  if (line.from < line.to) return line.heads ? line.depth : line.depth + 1;
  // A comment on its own line goes with the code below it.
  for (let i = index + 1; i < lines.length; i++) {
    const below = lines[i] as Line;
    if (below.from === below.to) continue;
    if (!below.heads) return below.depth + 1;
    break;
  }
  return line.depth;
}
