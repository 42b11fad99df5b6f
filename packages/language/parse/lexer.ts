/** The parser's lexer: the layout's tokens in the parser's own token types. */
import type { Lexer, LexerResult, LangiumCoreServices } from 'langium';
import { type Layout, type LayoutToken, layout } from './layout.ts';

type TokenDictionary = Lexer['definition'];
type ParserToken = LexerResult['tokens'][number];

export class OilwayLexer implements Lexer {
  readonly definition: TokenDictionary;
  /** The layout of the text last read: statements, problems. */
  last: Layout | undefined;

  constructor(services: LangiumCoreServices) {
    const built = services.parser.TokenBuilder.buildTokens(services.Grammar, { caseInsensitive: false });
    const definition: TokenDictionary = {};
    for (const token of Array.isArray(built) ? built : Object.values(built as TokenDictionary)) {
      if (typeof token === 'object' && token !== null && 'name' in token) definition[token.name] = token;
    }
    this.definition = definition;
  }

  tokenize(text: string): LexerResult {
    const result = layout(text);
    this.last = result;
    const lines = new LineCounter(result.lineStarts);
    const commentLines = new LineCounter(result.lineStarts);
    return {
      tokens: result.tokens.map((token) => this.parserToken(token, lines)),
      hidden: result.comments.map((raw) =>
        this.parserToken(
          {
            type: raw.image.startsWith('//') ? 'SL_COMMENT' : 'ML_COMMENT',
            image: raw.image,
            start: raw.start,
            end: raw.end,
            statement: -1,
            inserted: false,
          },
          commentLines,
        ),
      ),
      errors: result.problems.map((problem) => ({
        offset: problem.start,
        length: problem.end - problem.start,
        line: lines.lineAt(problem.start) + 1,
        column: problem.start - lines.startAt(problem.start) + 1,
        message: problem.what,
      })),
    };
  }

  private parserToken(token: LayoutToken, lines: LineCounter): ParserToken {
    const tokenType = this.definition[token.type];
    if (tokenType === undefined) throw new Error(`the grammar has no token ${token.type}`);
    const startLine = lines.lineAt(token.start);
    const startColumn = token.start - lines.startAt(token.start);
    const endLine = token.image.includes('\n') ? lines.lineAt(Math.max(token.start, token.end - 1)) : startLine;
    const endColumn = token.end - lines.startAt(endLine === startLine ? token.start : token.end - 1);
    return {
      image: token.image,
      startOffset: token.start,
      endOffset: token.end - 1,
      startLine: startLine + 1,
      startColumn: startColumn + 1,
      endLine: endLine + 1,
      endColumn,
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
