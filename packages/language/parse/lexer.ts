/** The parser's lexer: the layout's tokens in the parser's own token types. */
import type { Lexer, LexerResult, LangiumCoreServices } from 'langium';
import { type LayoutToken, layout } from './layout.ts';

type TokenDictionary = Lexer['definition'];
type ParserToken = LexerResult['tokens'][number];

export class OilwayLexer implements Lexer {
  readonly definition: TokenDictionary;
  /** Tokens of the statement to be parsed next, made already; offsets count from `base`. */
  private ready: { readonly tokens: readonly LayoutToken[]; readonly base: number } | undefined;

  constructor(services: LangiumCoreServices) {
    const built = services.parser.TokenBuilder.buildTokens(services.Grammar, { caseInsensitive: false });
    const definition: TokenDictionary = {};
    for (const token of Array.isArray(built) ? built : Object.values(built as TokenDictionary)) {
      if (typeof token === 'object' && token !== null && 'name' in token) definition[token.name] = token;
    }
    this.definition = definition;
  }

  /** The next call of `tokenize` gives these tokens instead of reading its text. */
  prepare(tokens: readonly LayoutToken[], base: number): void {
    this.ready = { tokens, base };
  }

  tokenize(text: string): LexerResult {
    const ready = this.ready;
    this.ready = undefined;
    if (ready !== undefined) {
      // Lines are never asked for: places are offsets.
      return {
        tokens: ready.tokens.map((token) => this.parserToken(token, ready.base, 1, token.start - ready.base + 1)),
        hidden: [],
        errors: [],
      };
    }
    const result = layout(text);
    const lines = new LineCounter(result.lineStarts);
    return {
      tokens: result.tokens.map((token) =>
        this.parserToken(token, 0, lines.lineAt(token.start) + 1, token.start - lines.startAt(token.start) + 1),
      ),
      hidden: [],
      errors: result.problems.map((problem) => ({
        offset: problem.start,
        length: problem.end - problem.start,
        line: lines.lineAt(problem.start) + 1,
        column: problem.start - lines.startAt(problem.start) + 1,
        message: problem.what,
      })),
    };
  }

  private parserToken(token: LayoutToken, base: number, line: number, column: number): ParserToken {
    const tokenType = this.definition[token.type];
    if (tokenType === undefined) throw new Error(`the grammar has no token ${token.type}`);
    return {
      image: token.image,
      startOffset: token.start - base,
      endOffset: token.end - base - 1,
      startLine: line,
      startColumn: column,
      endLine: line,
      endColumn: column + (token.end - token.start) - 1,
      tokenType,
      tokenTypeIdx: tokenType.tokenTypeIdx as number,
      payload: token.statement,
    };
  }
}

/** Line numbers of ascending offsets without searching from the start each time. */
class LineCounter {
  private readonly starts: readonly number[];
  private line = 0;

  constructor(starts: readonly number[]) {
    this.starts = starts;
  }

  /** Line of an offset, from 0. */
  lineAt(offset: number): number {
    while (this.line > 0 && (this.starts[this.line] ?? 0) > offset) this.line--;
    while (this.line + 1 < this.starts.length && (this.starts[this.line + 1] ?? 0) <= offset) this.line++;
    return this.line;
  }

  startAt(offset: number): number {
    return this.starts[this.lineAt(offset)] ?? 0;
  }
}
