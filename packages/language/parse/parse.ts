/** Text to syntax tree. One call, no document store: the tree, and what does not fit as data. */
import {
  type AstNode,
  EmptyFileSystem,
  type LangiumCoreServices,
  createDefaultCoreModule,
  createDefaultSharedCoreModule,
  inject,
} from 'langium';
import type { LangiumParser, LangiumSharedCoreServices } from 'langium';
import type { Finding, Fix } from '@oilway/rules';
import type { File as FileNode } from '../generated/ast.ts';
import { OilwayGeneratedModule, OilwayGeneratedSharedModule } from '../generated/module.ts';
import { finding } from './finding.ts';
import type { Layout } from './layout.ts';
import { OilwayLexer } from './lexer.ts';
import { MessageProvider } from './messages.ts';

/** Characters; a drawing has a few thousand. */
export const LONGEST_FILE = 2_000_000;

export interface Parsed {
  readonly uri: string;
  readonly text: string;
  /** May lack any part that the text lacks: treat every member as optional. */
  readonly root: FileNode;
  readonly layout: Layout;
  /** What does not parse, code SYNTAX; at most one a statement. */
  readonly findings: readonly Finding[];
  /** Statements with such a finding: what they declare or join may be lost. */
  readonly broken: readonly BrokenStatement[];
}

export interface BrokenStatement {
  readonly head: string;
  readonly start: number;
  readonly end: number;
  /** The parser gave up in it: what the tree holds of it is not to be trusted. False where a bracket or character was mended. */
  readonly lost: boolean;
  /** Every word in it that may be a name. */
  readonly words: readonly string[];
}

interface ParserRoom {
  readonly parser: LangiumParser;
  readonly lexer: OilwayLexer;
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

let room: ParserRoom | undefined;

function parserRoom(): ParserRoom {
  if (room === undefined) {
    const services = createCoreServices();
    room = { parser: services.parser.LangiumParser, lexer: services.parser.Lexer as OilwayLexer };
  }
  return room;
}

const EMPTY: FileNode = { $type: 'File', statements: [] };

/** Never throws. A text too long or one the parser gives up on comes back empty, with a finding that says so. */
export function parseText(uri: string, text: string): Parsed {
  if (text.length > LONGEST_FILE) {
    return refused(uri, '', `This file has ${text.length} characters; more than ${LONGEST_FILE} are not read`, 0);
  }
  try {
    const { parser, lexer } = parserRoom();
    const result = parser.parse<FileNode & AstNode>(text);
    const layout = lexer.last;
    if (layout === undefined) return refused(uri, text, 'The file could not be read', Math.min(1, text.length));
    const lexical = layout.problems.map((problem) => {
      const fixes: Fix[] = [];
      if (problem.change !== undefined) {
        const { start, end, text: written, title } = problem.change;
        fixes.push({ title, safe: false, changes: [{ uri, start, end, text: written }] });
      }
      return finding({
        code: 'SYNTAX',
        what: problem.what,
        mend: problem.mend,
        origin: { uri, start: problem.start, end: problem.end },
        fixes,
      });
    });
    const mended = statementsWithProblems(layout);
    const lost = new Set<number>();
    const syntactic = parserFindings(uri, layout, result.parserErrors, mended, lost);
    return { uri, text, root: result.value, layout, findings: [...lexical, ...syntactic], broken: brokenStatements(layout, mended, lost) };
  } catch (error) {
    // The parser keeps its stack after a throw: the next text would come out empty. A new one costs a few milliseconds.
    room = undefined;
    const reason = error instanceof RangeError ? 'it is nested too deep' : error instanceof Error ? error.message : String(error);
    return refused(uri, text, `This file cannot be read: ${reason}`, Math.min(1, text.length));
  }
}

function refused(uri: string, text: string, what: string, end: number): Parsed {
  const layout: Layout = { tokens: [], comments: [], problems: [], statements: [], lineStarts: [0] };
  return { uri, text, root: EMPTY, layout, findings: [finding({ code: 'SYNTAX', what, origin: { uri, start: 0, end } })], broken: [] };
}

type ParserErrors = ReturnType<LangiumParser['parse']>['parserErrors'];

/** Statements the scanner or the layout had to mend. */
function statementsWithProblems(layout: Layout): Set<number> {
  const found = new Set<number>();
  let next = 0;
  // Both lists rise; a statement inside a block lies within the block's own span, so the place is kept.
  layout.statements.forEach((statement, index) => {
    while (next < layout.problems.length && (layout.problems[next]?.start ?? 0) < statement.start) next++;
    const problem = layout.problems[next];
    if (problem !== undefined && problem.start <= ownEnd(layout, index)) found.add(index);
  });
  return found;
}

/** End of a statement's own line: a block ends for this purpose where its first inner statement begins. */
function ownEnd(layout: Layout, index: number): number {
  const statement = layout.statements[index];
  const next = layout.statements[index + 1];
  if (statement === undefined) return 0;
  return next === undefined ? statement.end : Math.min(statement.end, next.start - 1);
}

/** One problem a statement: the first; what follows in it is mostly its echo. */
function parserFindings(uri: string, layout: Layout, errors: ParserErrors, mended: ReadonlySet<number>, lost: Set<number>): Finding[] {
  const findings: Finding[] = [];
  for (const error of errors) {
    const token = error.token;
    const previous = 'previousToken' in error ? (error.previousToken as typeof token | undefined) : undefined;
    const own = typeof token.payload === 'number' ? token.payload : typeof previous?.payload === 'number' ? previous.payload : -1;
    const first = !mended.has(own) && !lost.has(own);
    lost.add(own);
    if (!first) continue;
    const gone = token.image === '' || Number.isNaN(token.startOffset);
    const last = gone ? (previous ?? token) : token;
    const statement = layout.statements[own];
    const start = Number.isNaN(last.startOffset) ? (statement?.start ?? 0) : last.startOffset;
    const end = Number.isNaN(last.startOffset) ? (statement?.end ?? start) : (last.endOffset ?? start) + 1;
    findings.push(finding({ code: 'SYNTAX', what: error.message, origin: { uri, start, end: Math.max(start, end) } }));
  }
  return findings;
}

function brokenStatements(layout: Layout, mended: ReadonlySet<number>, lost: ReadonlySet<number>): BrokenStatement[] {
  const broken = new Set([...mended, ...lost]);
  const words = new Map<number, string[]>();
  for (const index of broken) words.set(index, []);
  for (const token of layout.tokens) if (token.type === 'ID') words.get(token.statement)?.push(token.image);
  return [...broken]
    .sort((a, b) => a - b)
    .flatMap((index) => {
      const statement = layout.statements[index];
      return statement === undefined
        ? []
        : [
            {
              head: statement.head,
              start: statement.start,
              end: ownEnd(layout, index),
              lost: lost.has(index),
              words: words.get(index) ?? [],
            },
          ];
    });
}
