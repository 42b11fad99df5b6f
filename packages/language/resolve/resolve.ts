/** Syntax tree to circuit: the order in which names, settings, lines, control and requirements are resolved. */
import {
  type Circuit,
  type Component,
  type Constant,
  type Controls,
  type Cycle,
  type Interlock,
  LIMITS_PROPERTIES,
  LOAD_PROPERTIES,
  type Limits,
  type Load,
  type Property,
  type While,
} from '@oilway/circuit';
import { type Dimension, unitOf } from '@oilway/quantity';
import type { Finding } from '@oilway/rules';
import type { Controls as ControlsNode, Cycle as CycleNode, Limits as LimitsNode, Load as LoadNode, Name, Statement, Step as StepNode } from '../generated/ast.ts';
import { nearest } from '../parse/near.ts';
import type { Parsed } from '../parse/parse.ts';
import { LINE_FUNCTIONS, LINE_HEADS, isNoName } from '../parse/words.ts';
import { Components, isKind } from './components.ts';
import { Context } from './context.ts';
import { Control } from './control.ts';
import { Demands } from './demands.ts';
import { unquoted } from './items.ts';
import { Lines } from './lines.ts';
import { resolvePlace } from './places.ts';
import { readProperties } from './properties.ts';
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
  return new Resolution(parsed).run();
}

class Resolution {
  private readonly parsed: Parsed;
  private readonly context: Context;
  private readonly values: Values;
  private readonly components: Components;
  private readonly statements: readonly Statement[];

  constructor(parsed: Parsed) {
    this.parsed = parsed;
    this.context = new Context(parsed.uri, parsed.text, parsed.broken);
    this.values = new Values(this.context);
    this.components = new Components(this.context, this.values);
    this.statements = parsed.root.statements ?? [];
  }

  private all<T extends Statement['$type']>(type: T): Of<T>[] {
    // A misplaced line inside a cycle counts as one outside: it was said, and nothing is lost.
    return this.flat().filter((statement): statement is Of<T> => statement.$type === type);
  }

  private flattened: readonly Statement[] | undefined;
  private flat(): readonly Statement[] {
    this.flattened ??= this.statements.flatMap((statement): Statement[] =>
      statement.$type === 'Cycle' ? [statement, ...(statement.lines ?? []).filter((line) => line.$type !== 'Step' && line.$type !== 'While')] : [statement],
    );
    return this.flattened;
  }

  run(): Resolved {
    const { context, values, components } = this;
    this.declareNames();
    const heads = this.all('CircuitHead');
    for (const extra of heads.slice(1)) {
      context.report({ code: 'NAME', what: 'A file has one circuit: this is a second one', origin: context.origin(extra), related: [{ message: 'the first', origin: context.origin(heads[0]) }] });
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
    const loads = this.all('Load').flatMap((node) => this.load(node) ?? []);
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
      context.report({ code: 'NAME', what: 'There is one emergency stop: this is a second line for it', origin: context.origin(extra), related: [{ message: 'the first', origin: context.origin(emergencies[0]) }] });
    }
    const emergency = emergencies[0] === undefined ? undefined : control.emergency(emergencies[0]);
    const demands = new Demands(context, values, control);
    for (const statement of this.flat()) {
      if (statement.$type === 'Never' || statement.$type === 'Demand') demands.require(statement);
      else if (statement.$type === 'Allow') demands.allow(statement);
    }
    const limits = this.limits();
    const controls = this.controls(components);
    this.strays();
    this.checkRings(cycles);
    const head = heads[0];
    const circuit: Circuit = {
      uri: context.uri,
      ...(head?.name?.text === undefined ? {} : { name: head.name.text }),
      ...(head?.title === undefined ? {} : { title: unquoted(head.title) }),
      display: this.display(),
      units: this.units(),
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

  /** Names of everything, before anything is read: the order of statements is free. */
  private declareNames(): void {
    const { context } = this;
    const name = (node: Name | undefined, what: Parameters<Context['declare']>[1], statement: Statement, detail: Parameters<Context['declare']>[3] = {}): boolean => {
      if (node?.text !== undefined && isNoName(node.text)) {
        context.report({ code: 'NAME', what: `\`${node.text}\` is a word of the notation and cannot be a name`, origin: context.origin(node) });
      }
      return context.declare(node, what, statement, detail) !== undefined;
    };
    for (const statement of this.flat()) {
      switch (statement.$type) {
        case 'Let':
          if (name(statement.name, 'constant', statement) && statement.name?.text !== undefined) context.constants.set(statement.name.text, statement);
          break;
        case 'Component': {
          const kind = statement.kind?.text;
          const detail = isKind(kind) ? { kind } : {};
          for (const node of statement.names ?? []) {
            const fresh = name(node, statement.reusable === true ? 'part' : 'component', statement, detail);
            if (fresh && statement.reusable === true && node.text !== undefined) this.components.addPart(node.text, statement);
          }
          break;
        }
        case 'Unit':
          for (const node of statement.names ?? []) name(node, 'unit', statement);
          break;
        case 'Assembly':
          name(statement.name, 'assembly', statement);
          break;
        case 'Line':
          if (statement.name !== undefined) name(statement.name, 'line', statement);
          break;
        case 'Cycle':
          name(statement.name, 'cycle', statement);
          this.declareSteps(statement);
          break;
        case 'Step':
          context.report({ code: 'SYNTAX', what: `A \`${statement.kind ?? 'step'}\` stands inside a \`cycle\` or \`manual\`, between its braces`, origin: context.origin(statement) });
          break;
        default:
      }
    }
    this.notResolvedYet();
  }

  private declareSteps(cycle: CycleNode): void {
    const { context } = this;
    const owner = cycle.name?.text;
    for (const line of cycle.lines ?? []) {
      if (line.$type === 'Step') {
        if (owner !== undefined) this.declareStep(line, owner);
        continue;
      }
      if (line.$type !== 'While' && line.$type !== 'Stray') {
        context.report({
          code: 'SYNTAX',
          what: 'Only `step`, `meanwhile` and `while` lines stand inside a cycle: this line belongs outside its braces',
          origin: context.origin(line),
          related: [{ message: 'the cycle', origin: context.origin(cycle.name) }],
        });
      }
    }
  }

  private declareStep(step: StepNode, owner: string): void {
    const { context } = this;
    const word = step.name?.text;
    if (word === undefined || step.name === undefined) return;
    if (isNoName(word)) context.report({ code: 'NAME', what: `\`${word}\` is a word of the notation and cannot be a name`, origin: context.origin(step.name) });
    const id = `${owner}.${word}`;
    if (context.declareWord(word, context.origin(step.name), 'step', context.origin(step), { id }) === undefined) return;
    const known = context.stepsByName.get(word);
    if (known === undefined) context.stepsByName.set(word, [id]);
    else known.push(id);
  }

  /** Units of assemblies are understood but not resolved: said once, so that nothing seems computed that is not. */
  private notResolvedYet(): void {
    const { context } = this;
    const first = this.flat().find((statement) => statement.$type === 'Unit' || statement.$type === 'Use' || statement.$type === 'Assembly');
    if (first === undefined) return;
    const origin = context.origin(first.$type === 'Assembly' ? (first.name ?? first) : first);
    const what = 'units of an assembly';
    context.notComputed.push({ what, why: 'not resolved yet', origin });
    context.report({ code: 'NOT-COMPUTED', severity: 'information', what: 'Not resolved yet: units of an assembly are not computed', mend: 'What the rest of the file says is computed; write the unit out to have it computed too.', origin });
  }

  private constants(): Constant[] {
    const { context } = this;
    return [...context.constants].map(([name, node]): Constant => {
      const value = this.values.constant(name);
      return { name, ...(value === undefined ? {} : { value: value.q }), origin: context.origin(node), nameOrigin: context.origin(node.name) };
    });
  }

  private display(): Circuit['display'] {
    const { context } = this;
    const nodes = this.all('Display');
    const node = nodes[0];
    if (node === undefined) return 'as written';
    const words = (node.words ?? []).map((word) => word.text ?? '').join(' ');
    if (words === 'metric' || words === 'us' || words === 'as written') return words;
    const near = nearest(words, ['metric', 'us', 'as written']);
    const first = node.words?.[0];
    const last = node.words?.at(-1);
    const origin = first === undefined || last === undefined ? context.origin(node) : context.span(context.origin(first), context.origin(last));
    context.report({ code: 'VALUE', what: '`display` takes `metric`, `us` or `as written`', origin, fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)] });
    return 'as written';
  }

  /** The unit met most often for each dimension; the first of equals. */
  private units(): Circuit['units'] {
    const counts = new Map<Dimension, Map<string, number>>();
    for (const token of this.parsed.layout.tokens) {
      const unit = token.type === 'UNIT' ? unitOf(token.image) : undefined;
      if (unit === undefined) continue;
      const count = counts.get(unit.dimension) ?? new Map<string, number>();
      count.set(unit.symbol, (count.get(unit.symbol) ?? 0) + 1);
      counts.set(unit.dimension, count);
    }
    const units: Partial<Record<Dimension, string>> = {};
    for (const [dimension, count] of counts) {
      let most = 0;
      for (const [symbol, times] of count) {
        if (times <= most) continue;
        most = times;
        units[dimension] = symbol;
      }
    }
    return units;
  }

  private load(node: LoadNode): Load | undefined {
    const { context } = this;
    const actuators: Component[] = [];
    for (const ref of node.actuators ?? []) {
      const words = context.wordsOf(ref);
      const name = words[0] ?? '';
      const origin = context.origin(ref);
      const component = words.length === 1 ? context.components.get(name) : undefined;
      const declared = context.names.get(name);
      if (declared?.what === 'unit') {
        context.refer(context.origin(ref.parts?.[0]), declared.id);
        continue;
      }
      if (component === undefined || !['cylinder', 'motor', 'rotary'].includes(component.kind)) {
        if (declared === undefined) context.unknownName(name, origin, (d) => d.kind === 'cylinder' || d.kind === 'motor' || d.kind === 'rotary', 'an actuator');
        else context.report({ code: 'NAME', what: `A load stands on an actuator: \`${words.join('.')}\` is ${words.length > 1 ? 'a port' : `a ${component?.kind ?? declared.what}`}`, origin });
        continue;
      }
      context.refer(origin, component.id);
      actuators.push(component);
    }
    const first = actuators[0];
    if (first === undefined) return undefined;
    const turns = first.kind !== 'cylinder';
    const other = actuators.find((actuator) => (actuator.kind !== 'cylinder') !== turns);
    if (other !== undefined) {
      context.report({ code: 'VALUE', what: `\`${first.id}\` and \`${other.id}\` cannot move as one body: one turns, the other does not`, origin: context.origin(node) });
      return undefined;
    }
    const specs = LOAD_PROPERTIES.map((spec) => (spec.name === 'friction' ? { ...spec, shape: { form: 'quantity', dimensions: [turns ? 'torque' : 'force'] } as const } : spec)).map((spec) =>
      spec.name === 'speed' && turns ? { ...spec, shape: { form: 'quantity', dimensions: ['rotation'] } as const } : spec,
    );
    const { properties } = readProperties(context, this.values, node.properties, { name: first.id, specs, shaped: false, of: 'a load', actuator: first.kind });
    this.checkLoad(properties, actuators, turns);
    return { actuators: actuators.map((actuator) => actuator.id), properties, origin: context.origin(node) };
  }

  private checkLoad(properties: readonly Property[], actuators: readonly Component[], turns: boolean): void {
    const { context } = this;
    const other: Readonly<Record<string, string>> = turns ? { inward: 'backward', outward: 'forward' } : { backward: 'inward', forward: 'outward', inertia: 'mass' };
    for (const property of properties) {
      const better = Object.hasOwn(other, property.name) ? other[property.name] : undefined;
      if (better !== undefined) {
        context.report({
          code: 'VALUE',
          what: `\`${property.name}\` is no load of a ${actuators[0]?.kind ?? 'actuator'}: write \`${better}\``,
          origin: property.nameOrigin,
          fixes: [context.replace(property.nameOrigin, better, `Write \`${better}\``)],
          place: actuators[0]?.id,
        });
      }
      if (property.name !== 'mass' && property.name !== 'people') continue;
      if (turns || (property.value.type === 'word' && property.value.word === 'never')) continue;
      for (const actuator of actuators) {
        if (actuator.kind !== 'cylinder' || actuator.properties.some((own) => own.name === 'attitude') || context.isHalfRead(actuator)) continue;
        context.report({
          code: 'M08',
          what: `\`${actuator.id}\` carries ${property.name === 'mass' ? 'a mass' : 'a load near people'}, but nothing says how it stands: \`attitude\` is missing`,
          why: 'Whether the weight pulls the rod out, pushes it in or does neither decides what holds it.',
          mend: 'Write `attitude rod up`, `rod down`, `level` or an angle at the cylinder.',
          origin: property.origin,
          related: [{ message: `\`${actuator.id}\` is declared here`, origin: actuator.nameOrigin }],
          place: actuator.id,
        });
      }
    }
  }

  private limits(): Limits | undefined {
    const nodes: readonly LimitsNode[] = this.all('Limits');
    if (nodes.length === 0) return undefined;
    const properties: Property[] = [];
    for (const node of nodes) {
      const read = readProperties(this.context, this.values, node.properties, { name: 'limits', specs: LIMITS_PROPERTIES, shaped: false, of: '`limits`' });
      for (const property of read.properties) {
        const functions: readonly string[] = LINE_FUNCTIONS;
        if (property.name === 'velocity' && (property.port === undefined || !functions.includes(property.port))) {
          this.context.report({ code: 'VALUE', what: `A velocity is limited for a kind of line: \`velocity suction 1.0 m/s\` (${functions.join(', ')})`, origin: property.origin });
          continue;
        }
        const first = properties.find((other) => other.name === property.name && other.port === property.port);
        if (first !== undefined) {
          this.context.report({ code: 'VALUE', what: `This limit is given twice`, origin: property.origin, related: [{ message: 'first here', origin: first.origin }] });
          continue;
        }
        properties.push(property);
      }
    }
    return { properties, origin: this.context.origin(nodes[0]) };
  }

  private controls(components: Components): Controls | undefined {
    const { context } = this;
    const nodes: readonly ControlsNode[] = this.all('Controls');
    const node = nodes[0];
    if (node === undefined) return undefined;
    const coils = new Set(components.coils.map((coil) => coil.id));
    const symbols: Controls['symbols'][number][] = [];
    for (const entry of nodes.flatMap((each) => each.symbols ?? [])) {
      const words = context.wordsOf(entry.of);
      const name = words.join('.');
      const origin = context.origin(entry);
      const at = context.origin(entry.of);
      if (name === '') continue;
      const declared = context.names.get(words[0] ?? '');
      if (declared?.what === 'unit' && words.length > 1) {
        context.refer(context.origin(entry.of?.parts?.[0]), declared.id);
        continue;
      }
      const kind = words.length === 1 ? context.components.get(name)?.kind : undefined;
      let id: string | undefined;
      if (coils.has(name) || kind === 'switch' || kind === 'sensor') {
        context.refer(at, name);
        id = name;
      } else if (entry.number !== undefined || context.names.get(name)?.what === 'step' || declared?.what === 'cycle') {
        id = resolvePlace(context, entry.of, 'step');
      } else if (declared === undefined) {
        context.unknownName(name, at, (d) => d.what === 'coil' || d.kind === 'switch' || d.kind === 'sensor', 'a coil, switch or sensor');
      } else {
        context.report({ code: 'NAME', what: `\`${name}\` is a ${kind ?? declared.what}: the control sees coils, switches, sensors and steps`, origin: at });
      }
      if (id === undefined) continue;
      const twice = symbols.find((other) => other.of === id);
      if (twice !== undefined) {
        context.report({ code: 'NAME', what: `\`${id}\` has its symbol already`, origin, related: [{ message: 'first here', origin: twice.origin }] });
        continue;
      }
      symbols.push({ of: id, ...(entry.text === undefined ? {} : { symbol: unquoted(entry.text) }), ...(entry.number === undefined ? {} : { number: Number(entry.number) }), origin });
    }
    return { file: unquoted(node.file), symbols, origin: context.origin(node) };
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
        mend: near === undefined ? 'A line begins with a kind (`pump`, `relief` ...), a line function (`suction`, `working` ...), `load`, `cycle`, `require` ...' : undefined,
        origin,
        fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)],
      });
    }
  }

  /** Cycles that run each other in a ring would never end. */
  private checkRings(cycles: readonly Cycle[]): void {
    const runs = new Map(cycles.map((cycle) => [cycle.id, cycle.steps.flatMap((step) => step.actions.flatMap((action) => (action.does === 'run' ? [action] : [])))]));
    const done = new Set<string>();
    for (const cycle of cycles) {
      const path: string[] = [];
      const visit = (id: string): boolean => {
        if (path.includes(id)) return true;
        if (done.has(id) || path.length > 100) return false;
        path.push(id);
        for (const action of runs.get(id) ?? []) {
          if (visit(action.cycle)) {
            this.context.report({ code: 'VALUE', what: `The cycles ${[...path.slice(path.indexOf(action.cycle)), action.cycle].map((word) => `\`${word}\``).join(', ')} run each other in a ring`, origin: action.origin });
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
