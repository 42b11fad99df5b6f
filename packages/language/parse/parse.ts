/** Text to syntax trees. One call, no document store: the statements, and what does not fit as data. */
import type { Origin } from '@oilway/circuit';
import type { Finding, Fix } from '@oilway/rules';
import type { Statement } from '../generated/ast.ts';
import { finding } from './finding.ts';
import { type Layout, type LayoutToken, layout } from './layout.ts';
import { type StatementError, parseStatement } from './statements.ts';

export { createCoreServices, forgetStatements } from './statements.ts';

/** Characters; a drawing has a few thousand. */
export const LONGEST_FILE = 2_000_000;

/** A syntax node, as far as its place in the text goes. */
export interface Placed {
  readonly $cstNode?: { readonly offset: number; readonly end: number; readonly root: object } | undefined;
}

export interface Parsed {
  readonly uri: string;
  readonly text: string;
  /** May lack any part that the text lacks: treat every member as optional. Their own offsets count from each statement's start. */
  readonly statements: readonly Statement[];
  readonly layout: Layout;
  /** What does not parse, code SYNTAX; at most one a statement. */
  readonly findings: readonly Finding[];
  /** Statements with such a finding: what they declare or join may be lost. */
  readonly broken: readonly BrokenStatement[];
  /** Errors of the tool itself, with the statements they cost. */
  readonly failed?: string;
  /** Where a node of these statements stands in the text. */
  originOf(node: Placed | undefined): Origin;
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

/** Never throws. A text too long comes back empty, with a finding that says so. */
export function parseText(uri: string, text: string): Parsed {
  if (text.length > LONGEST_FILE) return refused(uri, text.length);
  const laid = layout(text);
  const bases = new Map<object, number>();
  const statements: Statement[] = [];
  const errors: StatementError[] = [];
  const failures: string[] = [];
  for (const tokens of statementTokens(laid.tokens)) {
    const first = tokens[0];
    const last = tokens.at(-1);
    if (first === undefined || last === undefined) continue;
    const { node, errors: own, failed } = parseStatement(text.slice(first.start, last.end), tokens, bases);
    if (failed !== undefined) failures.push(failed);
    const root = node?.$cstNode?.root;
    if (root !== undefined) bases.set(root, first.start);
    if (node !== undefined) statements.push(node);
    for (const error of own) {
      errors.push({ ...error, ordinal: error.ordinal + first.statement, start: error.start + first.start, end: error.end + first.start });
    }
  }
  const mended = statementsWithProblems(laid);
  const lost = new Set(errors.map((error) => error.ordinal));
  return {
    uri,
    text,
    statements,
    layout: laid,
    findings: [...lexicalFindings(uri, laid), ...parserFindings(uri, errors, mended)],
    broken: brokenStatements(laid, mended, lost),
    ...(failures.length === 0 ? {} : { failed: failures.join('\n') }),
    originOf: (node) => {
      const cst = node?.$cstNode;
      if (cst === undefined) return { uri, start: 0, end: 0 };
      const base = bases.get(cst.root) ?? 0;
      return { uri, start: base + cst.offset, end: base + cst.end };
    },
  };
}

/** Tokens of each statement: up to its line's end, a block up to its brace. */
function* statementTokens(tokens: readonly LayoutToken[]): Generator<readonly LayoutToken[]> {
  let from = 0;
  let depth = 0;
  for (let i = 0; i < tokens.length; i++) {
    const { type } = tokens[i] as LayoutToken;
    if (type === '{') depth++;
    else if (type === '}') depth--;
    const ends = depth === 0 && (type === '}' || (type === 'EOL' && tokens[i + 1]?.type !== '{'));
    if (!ends) continue;
    yield tokens.slice(from, i + 1);
    from = i + 1;
  }
  if (from < tokens.length) yield tokens.slice(from);
}

function refused(uri: string, length: number): Parsed {
  const what = `This file has ${length} characters; more than ${LONGEST_FILE} are not read`;
  return {
    uri,
    text: '',
    statements: [],
    layout: { tokens: [], comments: [], problems: [], statements: [], lineStarts: [0] },
    findings: [finding({ code: 'SYNTAX', what, origin: { uri, start: 0, end: 0 } })],
    broken: [],
    originOf: () => ({ uri, start: 0, end: 0 }),
  };
}

function lexicalFindings(uri: string, laid: Layout): Finding[] {
  return laid.problems.map(({ what, mend, start, end, change }) => {
    const fixes: Fix[] = [];
    if (change !== undefined) {
      fixes.push({ title: change.title, safe: false, changes: [{ uri, start: change.start, end: change.end, text: change.text }] });
    }
    return finding({ code: 'SYNTAX', what, mend, origin: { uri, start, end }, fixes });
  });
}

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
function parserFindings(uri: string, errors: readonly StatementError[], mended: ReadonlySet<number>): Finding[] {
  const said = new Set(mended);
  const findings: Finding[] = [];
  for (const { ordinal, start, end, message } of errors) {
    if (said.has(ordinal)) continue;
    said.add(ordinal);
    findings.push(finding({ code: 'SYNTAX', what: message, origin: { uri, start, end } }));
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
