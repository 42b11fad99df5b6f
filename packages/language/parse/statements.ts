/**
 * Parses statement by statement and remembers: after an edit only the statements that changed are parsed again, a statement that does not
 * parse costs itself only, and one that overflows the stack takes no other with it.
 */
import {
  type AstNode,
  EmptyFileSystem,
  type LangiumCoreServices,
  type LangiumParser,
  type LangiumSharedCoreServices,
  createDefaultCoreModule,
  createDefaultSharedCoreModule,
  inject,
} from 'langium';
import type { Statement } from '../generated/ast.ts';
import { OilwayGeneratedModule, OilwayGeneratedSharedModule } from '../generated/module.ts';
import type { LayoutToken } from './layout.ts';
import { OilwayLexer } from './lexer.ts';
import { MessageProvider } from './messages.ts';

/** What does not fit, counted from the first character and first statement of what was parsed. */
export interface StatementError {
  readonly ordinal: number;
  readonly start: number;
  readonly end: number;
  readonly message: string;
}

export interface ParsedStatement {
  readonly node: Statement | undefined;
  readonly errors: readonly StatementError[];
  /** An error of the tool itself. */
  readonly failed?: string;
}

interface Kept extends ParsedStatement {
  /** The reading that used it last: one node stands for one place in a text. */
  usedBy: object | undefined;
}

/** Langium services of the notation (parser, lexer, grammar), without any editor service. */
export function createCoreServices(): LangiumCoreServices {
  const shared: LangiumSharedCoreServices = inject(createDefaultSharedCoreModule(EmptyFileSystem), OilwayGeneratedSharedModule);
  const services: LangiumCoreServices = inject(createDefaultCoreModule({ shared }), OilwayGeneratedModule, {
    parser: {
      Lexer: (s: LangiumCoreServices) => new OilwayLexer(s),
      ParserErrorMessageProvider: () => new MessageProvider(),
    },
  });
  shared.ServiceRegistry.register(services);
  return services;
}

/** Statements remembered; a large circuit has a thousand. */
const MOST_KEPT = 6000;

let room: { readonly parser: LangiumParser; readonly lexer: OilwayLexer } | undefined;
const kept = new Map<string, Kept>();

/** Forgets every statement read and the parser itself: what is read next is read as in a new process. */
export function forgetStatements(): void {
  kept.clear();
  room = undefined;
}

function parserRoom(): { readonly parser: LangiumParser; readonly lexer: OilwayLexer } {
  if (room === undefined) {
    const services = createCoreServices();
    room = { parser: services.parser.LangiumParser, lexer: services.parser.Lexer as OilwayLexer };
  }
  return room;
}

/** Text and tokens put in: what decides the tree. */
function keyOf(text: string, tokens: readonly LayoutToken[]): string {
  let key = text;
  const last = tokens.length - 1;
  tokens.forEach((token, i) => {
    if (token.inserted && i !== last) key += `\u0000${i}${token.type}`;
    else if (token.type !== token.image && i === 0) key += `\u0000${token.type}`;
  });
  return key;
}

/** One statement, a block with all its lines. `reading`: the same object for all statements of one text. Never throws. */
export function parseStatement(text: string, tokens: readonly LayoutToken[], reading: object): ParsedStatement {
  const key = keyOf(text, tokens);
  const known = kept.get(key);
  if (known !== undefined && known.usedBy !== reading) {
    known.usedBy = reading;
    // Used again: the youngest.
    kept.delete(key);
    kept.set(key, known);
    return known;
  }
  const fresh: Kept = { ...parseAfresh(text, tokens), usedBy: reading };
  if (known === undefined) kept.set(key, fresh);
  if (kept.size > MOST_KEPT) {
    for (const oldest of kept.keys()) {
      kept.delete(oldest);
      if (kept.size <= MOST_KEPT) break;
    }
  }
  return fresh;
}

function parseAfresh(text: string, tokens: readonly LayoutToken[]): ParsedStatement {
  const base = tokens[0]?.start ?? 0;
  const firstStatement = tokens[0]?.statement ?? 0;
  try {
    const { parser, lexer } = parserRoom();
    lexer.prepare(tokens, base);
    const result = parser.parse<Statement & AstNode>(text, { rule: 'Statement' });
    return { node: result.value, errors: result.parserErrors.map((error) => errorOf(error, firstStatement)) };
  } catch (error) {
    // The parser keeps its stack after a throw: the next statement would come out empty. A new parser costs a few milliseconds.
    room = undefined;
    const what = { ordinal: 0, start: 0, end: Math.min(1, text.length) };
    if (error instanceof RangeError)
      return { node: undefined, errors: [{ ...what, message: 'This statement cannot be read: it is nested too deep' }] };
    const failed = error instanceof Error ? (error.stack ?? error.message) : String(error);
    return { node: undefined, errors: [{ ...what, message: 'This statement cannot be read' }], failed };
  }
}

type ParserError = ReturnType<LangiumParser['parse']>['parserErrors'][number];

function errorOf(error: ParserError, firstStatement: number): StatementError {
  const { token } = error;
  const previous = 'previousToken' in error ? (error.previousToken as typeof token | undefined) : undefined;
  const statement =
    typeof token.payload === 'number' ? token.payload : typeof previous?.payload === 'number' ? previous.payload : firstStatement;
  const gone = token.image === '' || Number.isNaN(token.startOffset);
  const last = gone && previous !== undefined ? previous : token;
  const start = Number.isNaN(last.startOffset) ? 0 : last.startOffset;
  const end = Number.isNaN(last.startOffset) ? 0 : (last.endOffset ?? start) + 1;
  return { ordinal: statement - firstStatement, start, end: Math.max(start, end), message: error.message };
}
