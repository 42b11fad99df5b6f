/** What all parts of the resolution share: the text, the names, the findings so far. */
import {
  type Component,
  KINDS,
  KIND_NAMES,
  type Kind,
  type KindName,
  type NotComputed,
  type Origin,
  type PortSpec,
  type Chain,
} from '@oilway/circuit';
import type { Finding, Fix } from '@oilway/rules';
import type { Name, Ref, Value } from '../generated/ast.ts';
import { type FindingParts, finding } from '../parse/finding.ts';
import type { BrokenStatement, Parsed, Placed } from '../parse/parse.ts';
import { LINE_FUNCTIONS } from '../parse/words.ts';
import { nearest } from '../parse/near.ts';
import type { PortMention, SymbolDeclaration, SymbolKind, SymbolReference } from './symbols.ts';

/** Beyond so many unknown names a file is no slip of the hand, and proposals would only cost time. */
const MOST_PROPOSED = 200;

const LINES: ReadonlySet<string> = new Set(LINE_FUNCTIONS);
/** Kinds with a `coil` setting. */
const HAVE_COILS: ReadonlySet<string> = new Set<string>([
  ...KIND_NAMES.filter((kind) => KINDS[kind].properties.some((spec) => spec.name === 'coil')),
]);

export type { Placed } from '../parse/parse.ts';

/** A `let`, or a parameter of an assembly with its default. */
export interface ConstantNode extends Placed {
  readonly name?: Placed | undefined;
  readonly value?: Value | undefined;
}

export class Context {
  readonly uri: string;
  readonly text: string;
  readonly findings: Finding[] = [];
  readonly names = new Map<string, SymbolDeclaration>();
  readonly references: SymbolReference[] = [];
  readonly portMentions: PortMention[] = [];
  readonly constants = new Map<string, ConstantNode>();
  /** The file uses another one: parts, assemblies and constants may stand there. */
  uses = false;
  readonly components = new Map<string, Component>();
  readonly notComputed: NotComputed[] = [];
  /** Short step names: `Clamp` -> ids; more than one: the cycle must be written. */
  readonly stepsByName = new Map<string, string[]>();
  readonly steps = new Set<string>();
  private readonly placeOf: Parsed['originOf'];
  /** Words of statements that do not parse: they may be declared there, so nothing is said of them elsewhere. */
  private readonly perhaps: ReadonlySet<string>;
  private readonly broken: readonly BrokenStatement[];
  private readonly said = new Set<string>();
  private unknownNames = 0;

  constructor(parsed: Pick<Parsed, 'uri' | 'text' | 'broken' | 'originOf'>) {
    this.uri = parsed.uri;
    this.text = parsed.text;
    this.placeOf = parsed.originOf;
    const { broken } = parsed;
    this.broken = broken;
    this.perhaps = new Set(broken.flatMap((statement) => statement.words));
  }

  /** The statement with a problem that holds this place; they stand in text order and do not overlap. */
  private brokenAt(start: number): BrokenStatement | undefined {
    let low = 0;
    let high = this.broken.length;
    while (low < high) {
      const middle = (low + high) >> 1;
      if ((this.broken[middle]?.start ?? 0) <= start) low = middle + 1;
      else high = middle;
    }
    const statement = this.broken[low - 1];
    return statement !== undefined && start <= statement.end ? statement : undefined;
  }

  /** True where the statement that holds this place does not parse as it stands. */
  isBroken(origin: Origin): boolean {
    return this.brokenAt(origin.start) !== undefined;
  }

  /** True where the parser gave up in the statement. */
  isLost(origin: Origin): boolean {
    return this.brokenAt(origin.start)?.lost === true;
  }

  /** True where the component's own line, or that of its part, does not parse: what it lacks may be in the lost part. */
  isHalfRead(component: Component): boolean {
    if (this.uses && component.part !== undefined && this.names.get(component.part) === undefined) return true;
    if (this.broken.length === 0) return false;
    if (this.isBroken(component.nameOrigin)) return true;
    const part = component.part === undefined ? undefined : this.names.get(component.part);
    return component.part !== undefined && (part === undefined || this.isBroken(part.origin));
  }

  /** A line that could have declared what fits does not parse: its name may be half typed. */
  private mayBeLost(fits: (declaration: SymbolDeclaration) => boolean): boolean {
    const nowhere: Origin = { uri: this.uri, start: 0, end: 0 };
    const could = (what: SymbolKind, kind?: KindName): boolean =>
      fits({ id: '', name: '', what, origin: nowhere, statement: nowhere, ...(kind === undefined ? {} : { kind }) });
    if (this.uses && (could('part') || could('assembly') || could('constant') || KIND_NAMES.some((kind) => could('part', kind))))
      return true;
    return this.broken.some(({ head }) => {
      const kind = KIND_NAMES.find((name) => name === head);
      if (kind !== undefined) return could('component', kind) || (HAVE_COILS.has(kind) && could('coil'));
      if (head === 'part') return could('part') || could('coil') || KIND_NAMES.some((name) => could('part', name));
      if (LINES.has(head)) return could('line');
      if (head === 'cycle' || head === 'manual') return could('cycle') || could('step');
      if (head === 'step' || head === 'meanwhile') return could('step');
      if (head === 'let') return could('constant');
      // A line whose head is unknown may declare anything.
      return head === '' || head === 'unit';
    });
  }

  /** Components named in lines that do not parse: their ports may be joined there. */
  get perhapsJoined(): ReadonlySet<string> {
    return new Set(
      this.broken.flatMap((statement) =>
        (LINE_FUNCTIONS as readonly string[]).includes(statement.head) || statement.head === '' || statement.head === 'plug'
          ? statement.words
          : [],
      ),
    );
  }

  origin(node: Placed | undefined): Origin {
    return this.placeOf(node);
  }

  span(from: Origin, to: Origin): Origin {
    return { uri: this.uri, start: from.start, end: Math.max(from.end, to.end) };
  }

  slice(origin: Origin): string {
    return this.text.slice(origin.start, origin.end);
  }

  /** One finding; the same words at the same place (twins share their text) are said once. */
  report(parts: FindingParts): void {
    // Where the parser gave up, what else seems wrong is mostly its echo.
    if (parts.code !== 'SYNTAX' && this.isLost(parts.origin)) return;
    const key = `${parts.origin.start} ${parts.origin.end} ${parts.code} ${parts.what}`;
    if (this.said.has(key)) return;
    this.said.add(key);
    this.findings.push(finding(parts));
  }

  replace(origin: Origin, text: string, title: string, safe = false): Fix {
    return { title, safe, changes: [{ uri: this.uri, start: origin.start, end: origin.end, text }] };
  }

  declare(
    node: Name | undefined,
    what: SymbolKind,
    statement: Placed,
    detail: Partial<Pick<SymbolDeclaration, 'kind' | 'id'>> = {},
  ): SymbolDeclaration | undefined {
    const name = node?.text;
    if (name === undefined || node === undefined) return undefined;
    return this.declareWord(name, this.origin(node), what, this.origin(statement), detail);
  }

  /** First come keeps the name; a second one is said with the first as related place. */
  declareWord(
    name: string,
    origin: Origin,
    what: SymbolKind,
    statement: Origin,
    detail: Partial<Pick<SymbolDeclaration, 'kind' | 'id'>> = {},
  ): SymbolDeclaration | undefined {
    const id = detail.id ?? name;
    const first = this.names.get(id);
    if (first !== undefined) {
      this.report({
        code: 'NAME',
        what: `The name \`${name}\` is given twice: it is a ${WHAT[first.what]} already`,
        mend: 'Give one of the two another name; a name stands for one thing in a circuit.',
        origin,
        related: [{ message: `\`${name}\` is declared here first`, origin: first.origin }],
        place: id,
      });
      return undefined;
    }
    const declaration: SymbolDeclaration = {
      id,
      name,
      what,
      origin,
      statement,
      ...(detail.kind === undefined ? {} : { kind: detail.kind }),
    };
    this.names.set(id, declaration);
    return declaration;
  }

  refer(origin: Origin, target: string): void {
    this.references.push({ origin, target });
  }

  /** The words of a reference, `['U1', 'M1']`. */
  wordsOf(ref: Ref | undefined): string[] {
    return (ref?.parts ?? []).map((part) => part.text ?? '').filter((text) => text !== '');
  }

  /** Says that a name is not declared, with the nearest name of those that would fit. */
  unknownName(word: string, origin: Origin, fits: (declaration: SymbolDeclaration) => boolean, wanted: string, place = ''): void {
    if (this.perhaps.has(word) || this.mayBeLost(fits)) return;
    this.unknownNames++;
    const candidates: string[] = [];
    for (const declaration of this.names.values())
      if (fits(declaration)) candidates.push(declaration.what === 'step' ? declaration.name : declaration.id);
    const near = this.unknownNames > MOST_PROPOSED ? undefined : nearest(word, candidates);
    this.report({
      code: 'NAME',
      what: `\`${word}\` is not declared${near === undefined ? '' : `: did you mean \`${near}\``}`,
      mend: near === undefined ? `Declare ${wanted} of this name, or write one that is declared.` : undefined,
      origin,
      place,
      fixes: near === undefined ? [] : [this.replace(origin, near, `Write \`${near}\``)],
    });
  }
}

export const WHAT: Readonly<Record<SymbolKind, string>> = {
  component: 'component',
  part: 'part',
  assembly: 'assembly',
  unit: 'unit',
  coil: 'coil',
  line: 'line',
  constant: 'constant',
  cycle: 'cycle',
  step: 'step',
};

export function kindOf(component: Component): Kind {
  return KINDS[component.kind];
}
export function portsOf(component: Component): readonly PortSpec[] {
  const kind = kindOf(component);
  return kind.portsOf?.(component) ?? kind.ports;
}
export function chainOf(component: Component): Chain {
  const kind = kindOf(component);
  return kind.chainOf?.(component) ?? kind.chain;
}

/** `a`, `b or c`, `a, b or c` for messages. */
export function oneOf(words: readonly string[]): string {
  const quoted = words.map((word) => `\`${word}\``);
  return quoted.length < 2 ? (quoted[0] ?? 'nothing') : `${quoted.slice(0, -1).join(', ')} or ${quoted.at(-1)}`;
}
