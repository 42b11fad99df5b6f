/** Syntax tree to circuit: the order in which names, settings, lines, control and requirements are resolved. */
import type { Circuit, Component, Constant, Cycle, Interlock, While } from '@oilway/circuit';
import type { Finding } from '@oilway/rules';
import type { Assembly, Statement } from '../generated/ast.ts';
import { nearest } from '../parse/near.ts';
import type { Parsed } from '../parse/parse.ts';
import { LINE_HEADS } from '../parse/words.ts';
import { bodyOf, declareHead, within } from './assemblies.ts';
import { Components } from './components.ts';
import { Context } from './context.ts';
import { Control } from './control.ts';
import { declareNames } from './declare.ts';
import { Demands } from './demands.ts';
import { unquoted } from './items.ts';
import { Lines } from './lines.ts';
import { resolveLoad } from './loads.ts';
import { commonUnits, resolveControls, resolveDisplay, resolveLimits } from './sheet.ts';
import type { SymbolIndex } from './symbols.ts';
import { Values } from './values.ts';

export interface Resolved {
  readonly circuit: Circuit;
  readonly findings: readonly Finding[];
  readonly symbols: SymbolIndex;
}

type Of<T extends Statement['$type']> = Extract<Statement, { $type: T }>;

/** Never throws on any tree the parser makes. */
export function resolve(parsed: Parsed): Resolved {
  const whole = new Resolution(parsed, parsed.statements).run();
  const assemblies = parsed.statements.filter((statement) => statement.$type === 'Assembly');
  if (assemblies.length === 0) return whole;
  const bodies = assemblies.map((assembly) =>
    within(parsed, assembly, new Resolution(parsed, bodyOf(assembly, parsed.statements), assembly).run()),
  );
  return {
    circuit: whole.circuit,
    findings: [...whole.findings, ...bodies.flatMap((body) => body.findings)].sort((a, b) => a.origin.start - b.origin.start),
    symbols: {
      declarations: [whole.symbols, ...bodies.map((body) => body.symbols)].flatMap((index) => index.declarations),
      references: [whole.symbols, ...bodies.map((body) => body.symbols)].flatMap((index) => index.references),
      ports: [whole.symbols, ...bodies.map((body) => body.symbols)].flatMap((index) => index.ports),
    },
  };
}

class Resolution {
  private readonly parsed: Parsed;
  private readonly context: Context;
  private readonly values: Values;
  private readonly components: Components;
  private readonly statements: readonly Statement[];

  private readonly assembly: Assembly | undefined;

  /** `assembly`: the one whose body the statements are. */
  constructor(parsed: Parsed, statements: readonly Statement[], assembly?: Assembly) {
    this.assembly = assembly;
    this.parsed = parsed;
    this.context = new Context(parsed);
    this.values = new Values(this.context);
    this.components = new Components(this.context, this.values);
    this.statements = statements;
  }

  private all<T extends Statement['$type']>(type: T): Of<T>[] {
    // A misplaced line inside a cycle counts as one outside: it was said, and nothing is lost.
    return this.flat().filter((statement): statement is Of<T> => statement.$type === type);
  }

  private flattened: readonly Statement[] | undefined;
  private flat(): readonly Statement[] {
    this.flattened ??= this.statements.flatMap((statement): Statement[] =>
      statement.$type === 'Cycle'
        ? [statement, ...(statement.lines ?? []).filter((line) => line.$type !== 'Step' && line.$type !== 'While')]
        : [statement],
    );
    return this.flattened;
  }

  run(): Resolved {
    const { context, values, components } = this;
    if (this.assembly !== undefined) declareHead(context, this.assembly);
    declareNames(context, components, this.flat());
    context.uses = this.parsed.statements.some((statement) => statement.$type === 'Use');
    const heads = this.all('CircuitHead');
    for (const extra of heads.slice(1)) {
      context.report({
        code: 'NAME',
        what: 'A file has one circuit: this is a second one',
        origin: context.origin(extra),
        related: [{ message: 'the first', origin: context.origin(heads[0]) }],
      });
    }
    const constants = this.constants();
    components.readParts();
    const declared: Component[] = [];
    for (const node of this.all('Component')) {
      if (node.reusable === true) continue;
      const names = (node.names ?? []).filter((name) => context.names.get(name.text ?? '')?.origin.start === context.origin(name).start);
      declared.push(...components.resolve(node, names));
    }
    const lines = new Lines(context, values);
    for (const node of this.all('Line')) lines.add(node);
    for (const node of this.all('Plug')) lines.plug(node);
    const { nets, pieces } = lines.finish();
    const loads = this.all('Load').flatMap((node) => resolveLoad(context, values, node) ?? []);
    const control = new Control(context, values, components.coils);
    const cycles: Cycle[] = [];
    const whiles: While[] = [];
    for (const node of this.all('Cycle')) {
      const read = control.cycle(node);
      if (read === undefined) continue;
      if (context.names.get(read.cycle.id)?.origin.start === read.cycle.nameOrigin.start) cycles.push(read.cycle);
      whiles.push(...read.whiles);
    }
    for (const node of this.all('While')) whiles.push(...[control.while(node)].filter((standing) => standing !== undefined));
    const interlocks: Interlock[] = this.all('Interlock').map((node) => control.interlock(node));
    const emergencies = this.all('Emergency');
    for (const extra of emergencies.slice(1)) {
      context.report({
        code: 'NAME',
        what: 'There is one emergency stop: this is a second line for it',
        origin: context.origin(extra),
        related: [{ message: 'the first', origin: context.origin(emergencies[0]) }],
      });
    }
    const emergency = emergencies[0] === undefined ? undefined : control.emergency(emergencies[0]);
    const demands = new Demands(context, values, control);
    for (const statement of this.flat()) {
      if (statement.$type === 'Never' || statement.$type === 'Demand') demands.require(statement);
      else if (statement.$type === 'Allow') demands.allow(statement);
    }
    const limits = resolveLimits(context, values, this.all('Limits'));
    const controls = resolveControls(context, components, this.all('Controls'));
    this.strays();
    this.checkRings(cycles);
    const head = heads[0];
    const circuit: Circuit = {
      uri: context.uri,
      ...(head?.name?.text === undefined ? {} : { name: head.name.text }),
      ...(head?.title === undefined ? {} : { title: unquoted(head.title) }),
      display: resolveDisplay(context, this.all('Display')),
      units: commonUnits(this.parsed.layout),
      components: declared,
      coils: components.coils,
      lines: lines.statements,
      pieces,
      nets,
      loads,
      cycles,
      whiles,
      interlocks,
      ...(emergency === undefined ? {} : { emergency }),
      requirements: demands.requirements,
      allows: demands.allows,
      ...(limits === undefined ? {} : { limits }),
      ...(controls === undefined ? {} : { controls }),
      constants,
      notComputed: context.notComputed,
      unknown: this.unknown(declared),
    };
    return {
      circuit,
      findings: [...context.findings].sort((a, b) => a.origin.start - b.origin.start),
      symbols: { declarations: [...context.names.values()], references: context.references, ports: context.portMentions },
    };
  }

  /** A component that needs an unknown one is unknown too; the reason names both. */
  private unknown(declared: readonly Component[]): Record<string, string> {
    const unknown = this.components.unknown;
    for (const component of declared) {
      for (const property of component.properties) {
        if (property.value.type !== 'reference' || component.kind !== 'pump') continue;
        const reason = unknown[property.value.id];
        if (reason !== undefined) unknown[component.id] ??= `${component.id} is driven by ${property.value.id}: ${reason}`;
      }
    }
    return unknown;
  }

  private constants(): Constant[] {
    const { context } = this;
    return [...context.constants].map(([name, node]): Constant => {
      const value = this.values.constant(name);
      return {
        name,
        ...(value === undefined ? {} : { value: value.q }),
        origin: context.origin(node),
        nameOrigin: context.origin(node.name),
      };
    });
  }

  /** Lines that begin with no line head. */
  private strays(): void {
    const { context } = this;
    const said = this.parsed.findings;
    for (const statement of [...this.flat(), ...this.all('Assembly').flatMap((assembly) => assembly.statements ?? [])]) {
      if (statement.$type !== 'Stray') continue;
      const whole = context.origin(statement);
      if (said.some((other) => other.origin.start >= whole.start && other.origin.end <= whole.end)) continue;
      const word = /^[\p{L}\p{N}_]+/u.exec(context.slice(whole))?.[0];
      const origin = { ...whole, end: whole.start + (word?.length ?? 1) };
      const near = word === undefined ? undefined : nearest(word, LINE_HEADS);
      context.report({
        code: 'SYNTAX',
        what: `\`${context.slice(origin)}\` is no word that begins a line${near === undefined ? '' : `: did you mean \`${near}\``}`,
        mend:
          near === undefined
            ? 'A line begins with a kind (`pump`, `relief` ...), a line function (`suction`, `working` ...), `load`, `cycle`, `require` ...'
            : undefined,
        origin,
        fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)],
      });
    }
  }

  /** Cycles that run each other in a ring would never end. */
  private checkRings(cycles: readonly Cycle[]): void {
    const runs = new Map(
      cycles.map((cycle) => [
        cycle.id,
        cycle.steps.flatMap((step) => step.actions.flatMap((action) => (action.does === 'run' ? [action] : []))),
      ]),
    );
    const done = new Set<string>();
    for (const cycle of cycles) {
      const path: string[] = [];
      const visit = (id: string): boolean => {
        if (path.includes(id)) return true;
        if (done.has(id) || path.length > 100) return false;
        path.push(id);
        for (const action of runs.get(id) ?? []) {
          if (visit(action.cycle)) {
            this.context.report({
              code: 'VALUE',
              what: `The cycles ${[...path.slice(path.indexOf(action.cycle)), action.cycle].map((word) => `\`${word}\``).join(', ')} run each other in a ring`,
              origin: action.origin,
            });
          }
        }
        path.pop();
        done.add(id);
        return false;
      };
      visit(cycle.id);
    }
  }
}
