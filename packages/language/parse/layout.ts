/**
 * Tokens to statements: a line head ends what went before, line ends become EOL tokens, lost brackets and braces are put back (and said),
 * so that a broken line costs no good line and the parser never nests deeper than MOST_BRACKETS.
 */
import { KIND_NAMES } from '@oilway/circuit';
import { nearest } from './near.ts';
import { type Raw, type Scan, type ScanProblem, scan } from './scanner.ts';
import { LINE_HEADS, isLineHead, isReserved } from './words.ts';

/** Brackets in brackets: far more than any circuit needs, far fewer than a stack holds. */
export const MOST_BRACKETS = 40;

/** Blocks in blocks: an assembly holds cycles at most, and assemblies in assemblies are rare. */
const MOST_BLOCKS = 8;

/** Problems said of one statement; what follows is the echo of these. */
const MOST_PROBLEMS = 10;

export interface LayoutToken {
  /** Name of the token type in the grammar. */
  readonly type: string;
  readonly image: string;
  readonly start: number;
  readonly end: number;
  /** Number of the statement it belongs to. */
  readonly statement: number;
  /** Put in where a bracket or brace is missing. */
  readonly inserted: boolean;
}

export interface LayoutStatement {
  readonly head: string;
  readonly start: number;
  end: number;
}

export interface Layout {
  readonly tokens: readonly LayoutToken[];
  readonly comments: readonly Raw[];
  readonly problems: readonly ScanProblem[];
  readonly statements: readonly LayoutStatement[];
  readonly lineStarts: readonly number[];
}

interface Brace {
  readonly head: string;
  readonly column: number;
  readonly open: Raw | undefined;
  readonly matched: boolean;
  readonly statement: number;
  inner: number | undefined;
}

const KINDS: ReadonlySet<string> = new Set(KIND_NAMES);
const BLOCK_HEADS: ReadonlySet<string> = new Set(['cycle', 'manual', 'assembly']);
const IN_CYCLE: ReadonlySet<string> = new Set(['step', 'meanwhile', 'while']);
const ENDS_OPEN: ReadonlySet<string> = new Set([',', 'to', 'and', 'or', 'until', 'for']);
const BEGINS_OPEN: ReadonlySet<string> = new Set(['to', 'and', 'or', 'until', 'for', 'at', 'energise', 'shift', 'stop', 'run', ',']);

/** Braces that have no partner. */
function loneBraces(tokens: readonly Raw[]): ReadonlySet<Raw> {
  const lone = new Set<Raw>();
  const stack: Raw[] = [];
  for (const token of tokens) {
    if (token.kind !== 'sign') continue;
    if (token.image === '{') stack.push(token);
    else if (token.image === '}' && stack.pop() === undefined) lone.add(token);
  }
  for (const token of stack) lone.add(token);
  return lone;
}

export function layout(text: string): Layout {
  return new Layouter(scan(text)).run();
}

class Layouter {
  private readonly source: Scan;
  private readonly tokens: LayoutToken[] = [];
  private readonly problems: ScanProblem[];
  private readonly statements: LayoutStatement[] = [];
  private readonly braces: Brace[] = [];
  private readonly lone: ReadonlySet<Raw>;
  /** Brackets of the statement now open. */
  private brackets: Raw[] = [];
  private tooDeep = 0;
  private depthSaid = false;
  /** Index of the open statement, -1 between statements. */
  private open = -1;
  /** Problems said of the open statement. */
  private saidHere = 0;
  private stray: { start: number; end: number } | undefined;
  private last: Raw | undefined;
  /** Where the last `}` without partner stands; -1 if there is none. */
  private readonly lastLoneClosing: number;

  constructor(source: Scan) {
    this.source = source;
    this.problems = [...source.problems];
    this.lone = loneBraces(source.tokens);
    this.lastLoneClosing = [...this.lone].reduce((most, raw) => (raw.image === '}' ? Math.max(most, raw.start) : most), -1);
  }

  run(): Layout {
    const raws = this.source.tokens;
    for (let i = 0; i < raws.length; i++) {
      const raw = raws[i];
      if (raw !== undefined) this.take(raw, raws[i + 1]);
    }
    this.end(undefined);
    while (this.braces.length > 0) this.closeLostBrace();
    return {
      tokens: this.tokens,
      comments: this.source.comments,
      problems: this.problems.sort((a, b) => a.start - b.start),
      statements: this.statements,
      lineStarts: this.source.lineStarts,
    };
  }

  private take(raw: Raw, next: Raw | undefined): void {
    const head = raw.kind === 'word' && isLineHead(raw.image);
    if (this.open >= 0 && raw.first) {
      if (head || (raw.image === '}' && raw.kind === 'sign')) this.end(raw);
      else if (this.brackets.length === 0 && !this.goesOn(raw)) this.end(raw);
    }
    if (raw.kind === 'sign' && raw.image === '}') this.closeBrace(raw);
    else if (this.open < 0) this.begin(raw, next);
    else this.inside(raw);
    this.last = raw;
  }

  private goesOn(raw: Raw): boolean {
    const before = this.last;
    if (before !== undefined && before.kind !== 'text' && ENDS_OPEN.has(before.image)) return true;
    return (raw.kind === 'word' || raw.kind === 'sign') && BEGINS_OPEN.has(raw.image);
  }

  private begin(raw: Raw, next: Raw | undefined): void {
    const word = raw.kind === 'word' ? raw.image : '';
    if (word !== '') {
      // A lost `}`: a line that cannot stand in the block, or one no deeper than the block's own line.
      for (let brace = this.braces.at(-1); brace !== undefined && !brace.matched; brace = this.braces.at(-1)) {
        const outdented = brace.inner !== undefined && brace.inner > brace.column && raw.column <= brace.column;
        const foreign = brace.head !== 'assembly' && isLineHead(word) && !IN_CYCLE.has(word);
        if (!outdented && !foreign) break;
        this.closeLostBrace();
      }
      const inside = this.braces.at(-1);
      if (inside !== undefined && inside.inner === undefined) inside.inner = raw.first ? raw.column : undefined;
    }
    let type = word;
    if (!isLineHead(word)) {
      const near = word === '' ? undefined : nearest(word, LINE_HEADS);
      if (near !== undefined && next !== undefined && !next.first && (next.kind === 'word' || next.image === '(' || near === 'emergency')) {
        this.say({
          start: raw.start,
          end: raw.end,
          what: `\`${word}\` is no word that begins a line: did you mean \`${near}\``,
          change: { start: raw.start, end: raw.end, text: near, title: `Write \`${near}\`` },
        });
        type = near;
      } else {
        this.openStatement('', raw);
        this.stray = { start: raw.start, end: raw.end };
        this.strayBracket(raw);
        return;
      }
    }
    this.openStatement(type, raw);
    // A mistyped head is read as the word it was meant to be.
    this.push(type, { ...raw, image: type });
  }

  /** The first of many: a hundred brackets too many are one trouble. */
  private say(problem: ScanProblem): void {
    this.saidHere++;
    if (this.saidHere <= MOST_PROBLEMS) this.problems.push(problem);
  }

  private openStatement(head: string, raw: Raw): void {
    this.saidHere = 0;
    this.open = this.statements.length;
    this.statements.push({ head, start: raw.start, end: raw.end });
    this.brackets = [];
    this.tooDeep = 0;
    this.depthSaid = false;
  }

  private inside(raw: Raw): void {
    const statement = this.statements[this.open];
    if (statement !== undefined) statement.end = raw.end;
    if (this.stray !== undefined) {
      this.stray.end = raw.end;
      this.strayBracket(raw);
      return;
    }
    if (raw.kind === 'sign') this.sign(raw, statement?.head ?? '');
    else if (raw.kind === 'word') this.push(this.wordType(raw, statement?.head ?? ''), raw);
    else this.push(raw.kind.toUpperCase(), raw);
  }

  private strayBracket(raw: Raw): void {
    if (raw.kind !== 'sign') return;
    if (raw.image === '(') this.brackets.push(raw);
    else if (raw.image === ')') this.brackets.pop();
  }

  private wordType(raw: Raw, head: string): string {
    if (this.last?.image === '.' && this.last.kind === 'sign') return 'ID';
    if (head === 'part' && this.last?.image === 'part' && KINDS.has(raw.image)) return raw.image;
    return isReserved(raw.image) ? raw.image : 'ID';
  }

  private sign(raw: Raw, head: string): void {
    switch (raw.image) {
      case '(':
        if (this.brackets.length >= MOST_BRACKETS) {
          this.tooDeep++;
          if (!this.depthSaid)
            this.say({
              start: raw.start,
              end: raw.end,
              what: `Brackets are nested deeper than ${MOST_BRACKETS}: what is inside cannot be read`,
            });
          this.depthSaid = true;
          return;
        }
        this.brackets.push(raw);
        break;
      case ')':
        if (this.tooDeep > 0) {
          this.tooDeep--;
          return;
        }
        if (this.brackets.pop() === undefined) {
          this.say({
            start: raw.start,
            end: raw.end,
            what: 'This `)` closes nothing: a `(` is missing, or one `)` is too many',
            change: { start: raw.start, end: raw.end, text: '', title: 'Remove `)`' },
          });
          return;
        }
        break;
      case '{':
        if (BLOCK_HEADS.has(head) && this.braces.length >= MOST_BLOCKS) {
          this.say({ start: raw.start, end: raw.end, what: `Blocks are nested deeper than ${MOST_BLOCKS}: this one cannot be read` });
          return;
        }
        if (!BLOCK_HEADS.has(head)) {
          this.say({
            start: raw.start,
            end: raw.end,
            what: 'A `{` does not stand here: only `cycle`, `manual` and `assembly` have braces',
          });
          return;
        }
        this.closeBrackets();
        this.insert('EOL', this.last?.end ?? raw.start);
        this.push('{', raw);
        this.enterBlock(raw, !this.lone.has(raw));
        return;
      default:
    }
    this.push(raw.image, raw);
  }

  private enterBlock(raw: Raw | undefined, matched: boolean): void {
    const statement = this.statements[this.open];
    const column = statement === undefined ? 0 : this.columnOf(statement.start);
    this.braces.push({ head: statement?.head ?? '', column, open: raw, matched, statement: this.open, inner: undefined });
    this.open = -1;
  }

  private columnOf(offset: number): number {
    const starts = this.source.lineStarts;
    let low = 0;
    let high = starts.length;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if ((starts[middle] ?? 0) <= offset) low = middle;
      else high = middle;
    }
    return offset - (starts[low] ?? 0);
  }

  private closeBrace(raw: Raw): void {
    if (this.open >= 0) this.end(undefined);
    const brace = this.braces.pop();
    if (brace === undefined) {
      this.say({
        start: raw.start,
        end: raw.end,
        what: 'This `}` closes nothing: a `{` is missing, or one `}` is too many',
        change: { start: raw.start, end: raw.end, text: '', title: 'Remove `}`' },
      });
      return;
    }
    this.open = brace.statement;
    this.push('}', raw);
    this.open = -1;
    const statement = this.statements[brace.statement];
    if (statement !== undefined) statement.end = raw.end;
  }

  private closeLostBrace(): void {
    const brace = this.braces.pop();
    if (brace === undefined) return;
    const at = this.last?.end ?? 0;
    const opening = brace.open;
    if (opening !== undefined) {
      this.say({
        start: opening.start,
        end: opening.end,
        what: `The \`{\` of this \`${brace.head}\` is not closed: a \`}\` is missing`,
        change: { start: at, end: at, text: '\n}', title: 'Close it with `}`' },
      });
    }
    this.open = brace.statement;
    this.insert('}', at);
    this.open = -1;
  }

  /** Ends the open statement; `next` is the token that follows it. */
  private end(next: Raw | undefined): void {
    if (this.open < 0) return;
    const statement = this.statements[this.open];
    const at = this.last?.end ?? 0;
    if (this.stray !== undefined) {
      this.tokens.push({ type: 'STRAY', image: '', start: this.stray.start, end: this.stray.end, statement: this.open, inserted: false });
      this.stray = undefined;
      this.brackets = [];
    } else {
      this.closeBrackets();
      if (statement !== undefined && BLOCK_HEADS.has(statement.head) && this.missingBrace(statement, at, next)) return;
    }
    this.insert('EOL', at);
    this.open = -1;
  }

  /** A block's head without its `{`: true, with the block entered where lines of it follow, else closed at once. */
  private missingBrace(statement: LayoutStatement, at: number, next: Raw | undefined): true {
    this.say({
      start: Math.max(statement.start, at - 1),
      end: at,
      what: `A \`{\` is missing after this \`${statement.head}\``,
      change: { start: at, end: at, text: ' {', title: 'Write `{`' },
    });
    this.insert('EOL', at);
    this.insert('{', at);
    const goesIn = next !== undefined && next.kind === 'word' && (IN_CYCLE.has(next.image) || statement.head === 'assembly');
    if (goesIn && this.lastLoneClosing >= at) {
      this.enterBlock(undefined, true);
      return true;
    }
    this.insert('}', at);
    this.open = -1;
    return true;
  }

  private closeBrackets(): void {
    const opening = this.brackets.at(-1);
    if (opening === undefined) return;
    const at = this.last?.end ?? 0;
    this.say({
      start: Math.max(opening.start, at - 1),
      end: at,
      what: 'A `)` is missing',
      mend: 'Close the bracket that opens in this statement.',
      change: { start: at, end: at, text: ')'.repeat(this.brackets.length), title: 'Close the bracket' },
    });
    for (let i = this.brackets.length; i > 0; i--) this.insert(')', at);
    this.brackets = [];
  }

  private push(type: string, raw: Raw): void {
    this.tokens.push({ type, image: raw.image, start: raw.start, end: raw.end, statement: this.open, inserted: false });
  }

  private insert(type: string, at: number): void {
    this.tokens.push({ type, image: '', start: at, end: at, statement: this.open, inserted: true });
  }
}
