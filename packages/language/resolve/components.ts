/** Components: twins, parts, shapes, positions, coils, and what is required of each kind. */
import { type Coil, type Component, KINDS, type KindName, type Origin, type PathSpec, type Property } from '@oilway/circuit';
import type { Component as ComponentNode, Name } from '../generated/ast.ts';
import { type Context, kindOf, oneOf, portsOf } from './context.ts';
import { unquoted } from './items.ts';
import { type Owner, type Shape, readProperties } from './properties.ts';
import { wrongSize } from './sizes.ts';
import { NAMED_CENTRES, pathsOfCentre } from './valve-entry.ts';
import type { Values } from './values.ts';

interface PartContent {
  readonly kind: KindName;
  readonly properties: readonly Property[];
  readonly shape?: Shape;
}

export const isKind = (word: string | undefined): word is KindName => word !== undefined && Object.hasOwn(KINDS, word);

/** `a relief valve`, `an accumulator`. */
export const withArticle = (noun: string): string => `${/^[aeiou]/.test(noun) ? 'an' : 'a'} ${noun}`;

export class Components {
  readonly coils: Coil[] = [];
  readonly unknown: Record<string, string> = {};
  private readonly context: Context;
  private readonly values: Values;
  private readonly parts = new Map<string, ComponentNode>();
  private readonly read = new Map<string, PartContent | 'reading'>();

  constructor(context: Context, values: Values) {
    this.context = context;
    this.values = values;
  }

  addPart(name: string, node: ComponentNode): void {
    this.parts.set(name, node);
  }

  /** Reads every part, used or not: its own errors are said at itself. */
  readParts(): void {
    for (const name of this.parts.keys()) this.part(name);
  }

  private part(name: string): PartContent | undefined {
    const known = this.read.get(name);
    if (known === 'reading') return undefined;
    if (known !== undefined) return known;
    const node = this.parts.get(name);
    const kind = node?.kind?.text;
    if (node === undefined || !isKind(kind)) return undefined;
    this.read.set(name, 'reading');
    const content = this.content(node, kind, name);
    this.read.set(name, content);
    return content;
  }

  /** Own properties first, then those of the part that are not overridden. */
  private content(node: ComponentNode, kind: KindName, name: string): PartContent {
    const owner: Owner = { name, specs: KINDS[kind].properties, shaped: kind === 'directional', of: withArticle(KINDS[kind].noun) };
    const own = readProperties(this.context, this.values, node.properties, owner);
    const part = this.partOf(node.part, kind, name);
    if (part === undefined) return { kind, ...own };
    const written = new Set(own.properties.map(keyOf));
    const groups = KINDS[kind].groups.filter(
      (group) => group.need === 'exactly one' && own.properties.some((property) => group.of.includes(property.name)),
    );
    const inherited = part.properties
      .filter((property) => !written.has(keyOf(property)) && !groups.some((group) => group.of.includes(property.name)))
      .map((property) => ({ ...property, part: property.part ?? node.part?.text ?? '' }));
    const shape = own.shape ?? part.shape;
    return { kind, properties: [...own.properties, ...inherited], ...(shape === undefined ? {} : { shape }) };
  }

  private partOf(name: Name | undefined, kind: KindName, owner: string): PartContent | undefined {
    const word = name?.text;
    if (word === undefined) return undefined;
    const origin = this.context.origin(name);
    const declared = this.context.names.get(word);
    if (declared?.what !== 'part') {
      if (declared === undefined)
        this.context.unknownName(
          word,
          origin,
          (d) => d.what === 'part' && d.kind === kind,
          `a part (\`part ${kind} ${word} (..)\`)`,
          owner,
        );
      else this.context.report({ code: 'NAME', what: `\`${word}\` is a ${declared.what}, not a part`, origin, place: owner });
      return undefined;
    }
    this.context.refer(origin, declared.id);
    if (declared.kind !== kind) {
      this.context.report({
        code: 'NAME',
        what: `\`${word}\` is a part of the kind \`${declared.kind}\`; \`${owner}\` is ${withArticle(kind)}`,
        origin,
        related: [{ message: 'the part', origin: declared.origin }],
        place: owner,
      });
      return undefined;
    }
    const content = this.part(word);
    if (content === undefined)
      this.context.report({ code: 'VALUE', what: `The part \`${word}\` is defined through itself`, origin, place: owner });
    return content;
  }

  /** The components of one statement: one, or twins. */
  resolve(node: ComponentNode, names: readonly Name[]): Component[] {
    const kind = node.kind?.text;
    if (!isKind(kind)) return [];
    const { context } = this;
    const statement = context.origin(node);
    const content = this.content(node, kind, names[0]?.text ?? kind);
    if (names.length > 1) this.checkTwins(content.properties, names);
    return names.map((name) => {
      const id = name.text ?? '';
      const base: Component = {
        id,
        kind,
        properties: content.properties,
        ...(content.shape === undefined ? {} : { shape: content.shape }),
        ...(node.part?.text === undefined ? {} : { part: node.part.text }),
        ...(node.title === undefined ? {} : { title: unquoted(node.title) }),
        origin: statement,
        nameOrigin: context.origin(name),
      };
      const component = kind === 'directional' ? this.withPositions(base) : base;
      context.components.set(id, component);
      this.check(component);
      if (context.uses && component.part !== undefined && context.names.get(component.part) === undefined) {
        this.unknown[id] ??= `${id}: its part \`${component.part}\` stands in another file`;
      }
      this.addCoils(component);
      return component;
    });
  }

  private checkTwins(properties: readonly Property[], names: readonly Name[]): void {
    for (const property of properties) {
      if (property.value.type === 'coil') {
        this.context.report({
          code: 'NAME',
          what: `\`${property.value.name}\` would be the coil of ${names.length} valves: give ${names.map((name) => `\`${name.text}\``).join(' and ')} a line each`,
          origin: property.value.nameOrigin,
        });
      }
    }
  }

  private addCoils(component: Component): void {
    for (const property of component.properties) {
      const value = property.value;
      if (value.type !== 'coil') continue;
      const declared = this.context.declareWord(value.name, value.nameOrigin, 'coil', property.origin);
      if (declared === undefined) continue;
      this.coils.push({
        id: value.name,
        component: component.id,
        ...(value.side === undefined ? {} : { side: value.side }),
        ...(value.voltage === undefined ? {} : { voltage: value.voltage.si }),
        origin: value.nameOrigin,
      });
    }
  }

  /** Required settings, exclusive groups, ports named in settings. */
  private check(component: Component): void {
    const kind = kindOf(component);
    const names = new Set(component.properties.map((property) => property.name));
    const missing: string[] = [];
    for (const spec of kind.properties) {
      if (!spec.required || names.has(spec.name)) continue;
      missing.push(spec.name);
      this.missing(component, `\`${component.id}\` has no \`${spec.name}\``, spec.example);
    }
    for (const group of kind.groups) {
      const written = component.properties.filter((property) => group.of.includes(property.name));
      const distinct = [...new Set(written.map((property) => property.name))];
      if (distinct.length === 0) {
        missing.push(group.of.join('/'));
        const brings = kind.name === 'directional' && group.name === 'return' ? ': nothing says where the spool goes without current' : '';
        this.missing(
          component,
          `\`${component.id}\` needs ${group.need === 'exactly one' ? 'one of' : 'at least one of'} ${oneOf(group.of)}${brings}`,
          exampleOf(component, group.of),
        );
      } else if (group.need === 'exactly one' && distinct.length > 1) {
        const second = written.find((property) => property.name !== written[0]?.name);
        this.context.report({
          code: 'VALUE',
          what: `\`${component.id}\` has ${distinct.map((word) => `\`${word}\``).join(' and ')}: only one of ${oneOf(group.of)} can hold`,
          origin: second?.nameOrigin ?? component.nameOrigin,
          related: written[0] === undefined ? [] : [{ message: `\`${written[0].name}\` stands here`, origin: written[0].nameOrigin }],
          place: component.id,
        });
        this.unknown[component.id] ??= `${component.id} has ${distinct.join(' and ')}: only one can hold`;
      }
    }
    for (const name of missing)
      if (!isOnlyChecked(component.kind, name)) this.unknown[component.id] ??= `${component.id} has no \`${name}\``;
    for (const property of component.properties) this.checkProperty(component, property);
    if (component.kind === 'directional') this.checkShape(component);
    this.checkSizes(component);
  }

  private missing(component: Component, what: string, example: string): void {
    // A line that does not parse may have it in the part that was lost.
    if (this.context.isHalfRead(component)) return;
    this.context.report({
      code: 'M08',
      what,
      mend: `Write it in the brackets: \`${example}\`.`,
      origin: component.nameOrigin,
      place: component.id,
      fixes: this.insertion(component, example),
    });
  }

  /** Adds a setting at the end of the brackets, as an example whose figure is still to be set. */
  private insertion(
    component: Component,
    example: string,
  ): { title: string; safe: boolean; changes: { uri: string; start: number; end: number; text: string }[] }[] {
    const text = this.context.slice(component.origin);
    const first = example.split(/ \||, /)[0] ?? example;
    const closing = text.lastIndexOf(')');
    const title = `Add \`${first}\``;
    if (closing >= 0) {
      const empty = /\(\s*$/.test(text.slice(0, closing));
      const at = component.origin.start + closing;
      return [{ title, safe: false, changes: [{ uri: component.origin.uri, start: at, end: at, text: `${empty ? '' : ', '}${first}` }] }];
    }
    if (text.includes('(')) return [];
    const quote = text.indexOf('"');
    const at = component.origin.start + (quote >= 0 ? text.slice(0, quote).trimEnd().length : text.length);
    return [{ title, safe: false, changes: [{ uri: component.origin.uri, start: at, end: at, text: ` (${first})` }] }];
  }

  private checkProperty(component: Component, property: Property): void {
    const { value } = property;
    if (value.type === 'unknown') {
      const required = kindOf(component).properties.find((spec) => spec.name === property.name)?.required === true;
      const grouped = kindOf(component).groups.some((group) => group.of.includes(property.name));
      if ((required || grouped) && !isOnlyChecked(component.kind, property.name))
        this.unknown[component.id] ??= `${component.id}: ${value.why}`;
    }
    if (value.type === 'wanted' && !isOnlyChecked(component.kind, property.name))
      this.unknown[component.id] ??= `${component.id} \`${property.name}\` is to be found (\`?\`)`;
    const ports = portsOf(component).map((port) => port.name);
    const check = (port: string, origin: Origin): void => {
      if (!ports.includes(port)) this.noPort(component, port, origin, ports);
    };
    if (property.port !== undefined) check(property.port, property.origin);
    if (value.type === 'pathPasses') {
      check(value.from, property.origin);
      check(value.to, property.origin);
    }
    if (value.type === 'position' && property.part === undefined) {
      for (const path of value.paths) {
        check(path.from, path.origin);
        check(path.to, path.origin);
        if (path.from === path.to)
          this.context.report({ code: 'VALUE', what: `\`${path.from}\` is joined with itself`, origin: path.origin, place: component.id });
      }
    }
  }

  private noPort(component: Component, port: string, origin: Origin, ports: readonly string[]): void {
    if (this.context.isHalfRead(component)) return;
    this.context.report({
      code: 'PORT',
      what: `\`${component.id}\` has no port \`${port}\`${ports.length === 0 ? '' : `: it has ${ports.map((name) => `\`${name}\``).join(', ')}`}`,
      origin,
      related: [{ message: `\`${component.id}\` is declared here`, origin: component.nameOrigin }],
      place: component.id,
    });
  }

  private checkShape(component: Component): void {
    const { shape } = component;
    if (shape === undefined) {
      // A shape that there is not was said where it is written.
      if (!/[(,]\s*[0-9]+\/[0-9]+/.test(this.context.slice(component.origin)))
        this.missing(component, `\`${component.id}\` has no shape`, '4/3');
      this.unknown[component.id] ??= `${component.id} has no shape (\`4/3\`)`;
      return;
    }
    const written = (name: string): Property | undefined => component.properties.find((property) => property.name === name);
    const centre = written('centre');
    if (shape.positions === 3 && centre === undefined) {
      this.missing(component, `\`${component.id}\` has three positions, but nothing says what the centre joins`, 'centre closed');
      this.unknown[component.id] ??= `${component.id} has no \`centre\``;
    }
    const refuse = (property: Property | undefined, what: string): void => {
      if (property === undefined) return;
      this.context.report({
        code: 'VALUE',
        what,
        origin: property.origin,
        related: [{ message: 'the shape', origin: shape.origin }],
        place: component.id,
      });
      this.unknown[component.id] ??= `${component.id}: ${what}`;
    };
    if (shape.positions === 2) {
      refuse(centre, 'A valve with two positions has no centre');
      const spring = written('spring');
      if (spring?.value.type === 'word' && spring.value.word === 'centre')
        refuse(spring, 'A valve with two positions has no centre to spring to');
    }
    if (shape.ports === 4 || shape.positions === 3)
      refuse(written('normally'), '`normally open` and `normally closed` are words for 2/2 and 3/2 valves');
    const coils = component.properties.filter((property) => property.value.type === 'coil');
    coils.forEach((property, i) => {
      const side = property.value.type === 'coil' ? property.value.side : undefined;
      const before = coils.slice(0, i).find((other) => other.value.type === 'coil' && other.value.side === side);
      if (before !== undefined) refuse(property, `There is a coil ${side === undefined ? '' : `on side \`${side}\` `}already`);
      if (side === undefined && written('proportional') === undefined && written('normally') === undefined) {
        refuse(property, 'A switching valve needs the side its coil shifts to: `coil a SOL1`');
      }
      if (side === 'centre' && shape.positions === 2) refuse(property, 'A valve with two positions has no centre');
    });
  }

  /** Figures that contradict each other. */
  private checkSizes(component: Component): void {
    const size = (name: string): { readonly si: number; readonly origin: Origin } | undefined => {
      const property = component.properties.find((candidate) => candidate.name === name && candidate.port === undefined);
      return property?.value.type === 'quantity' ? { si: property.value.q.si, origin: property.origin } : undefined;
    };
    for (const property of component.properties) {
      const what = wrongSize(property);
      if (what === undefined) continue;
      this.context.report({ code: 'VALUE', what, origin: property.origin, place: component.id });
      this.unknown[component.id] ??= `${component.id}: ${what}`;
    }
    const bore = size('bore');
    const rod = size('rod');
    if (component.kind === 'cylinder' && bore !== undefined && rod !== undefined && rod.si >= bore.si) {
      this.context.report({
        code: 'VALUE',
        what: 'The rod is as thick as the bore or thicker',
        origin: rod.origin,
        related: [{ message: 'the bore', origin: bore.origin }],
        place: component.id,
      });
      this.unknown[component.id] ??= `${component.id}: the rod is as thick as the bore`;
    }
    const opening = component.properties.find((property) => property.name === 'opening');
    if (component.kind === 'throttle' && opening !== undefined && !component.properties.some((property) => property.name === 'passes')) {
      this.context.report({
        code: 'VALUE',
        what: '`opening` is a part of what the throttle passes when open: it needs `passes`',
        origin: opening.origin,
        place: component.id,
      });
    }
    const passes = component.properties.find((property) => property.name === 'passes')?.value;
    const crack = size('crack');
    if (component.kind === 'check' && crack !== undefined && passes?.type === 'flowAt' && passes.drop.si <= crack.si) {
      this.context.report({
        code: 'VALUE',
        what: 'The pressure drop of `passes` counts from the closed valve, cracking included: it must be above `crack`',
        origin: passes.origin,
        related: [{ message: '`crack`', origin: crack.origin }],
        place: component.id,
      });
      this.unknown[component.id] ??= `${component.id}: \`passes\` is below \`crack\``;
    }
  }

  /** Paths of the named centres, and the usual paths of the positions that are not written. */
  private withPositions(component: Component): Component {
    const { shape } = component;
    if (shape === undefined) return component;
    const ports = ['P', 'T', 'A', 'B'].filter((port) => portsOf(component).some((spec) => spec.name === port));
    const properties = component.properties.map((property): Property => {
      if (property.value.type !== 'position' || property.value.word === undefined) return property;
      const word = NAMED_CENTRES.find((name) => property.value.type === 'position' && name === property.value.word) ?? 'closed';
      return { ...property, value: { ...property.value, paths: pathsOfCentre(word, ports, property.origin) } };
    });
    const usual: readonly (readonly ['a' | 'b', readonly (readonly [string, string])[]])[] =
      shape.ports === 4
        ? [
            [
              'a',
              [
                ['P', 'A'],
                ['B', 'T'],
              ],
            ],
            [
              'b',
              [
                ['P', 'B'],
                ['A', 'T'],
              ],
            ],
          ]
        : shape.ports === 3
          ? [
              ['a', [['P', 'A']]],
              ['b', [['A', 'T']]],
            ]
          : [
              ['a', [['P', 'A']]],
              ['b', []],
            ];
    for (const [name, pairs] of usual) {
      if (properties.some((property) => property.name === name)) continue;
      const paths: PathSpec[] = pairs.map(([from, to]) => ({ from, to, origin: shape.origin }));
      properties.push({ name, value: { type: 'position', paths, origin: shape.origin }, origin: shape.origin, nameOrigin: shape.origin });
    }
    return { ...component, properties };
  }
}

/** What makes two entries of one name the same setting: `passes` for one path, `rated` for one port, `coil` of one side. */
function keyOf(property: Property): string {
  const { value } = property;
  if (value.type === 'pathPasses') return `${property.name} ${value.from} ${value.to}`;
  if (value.type === 'coil' || value.type === 'cam') return `${property.name} ${value.side ?? ''}`;
  return `${property.name} ${property.port ?? ''}`;
}

/** Settings the laws do not need: without them a component still computes. */
function isOnlyChecked(kind: KindName, name: string): boolean {
  return (
    (kind === 'drive' && name === 'power') ||
    name === 'gas' ||
    name === 'seals' ||
    (kind === 'sensor' && name === 'range') ||
    (kind === 'accumulator' && name.includes('bladder'))
  );
}

function exampleOf(component: Component, names: readonly string[]): string {
  const kind = kindOf(component);
  const two = component.shape?.positions === 2;
  const best = component.kind !== 'directional' ? names[0] : two && component.shape?.ports !== 4 ? 'normally' : two ? 'detent' : 'spring';
  return kind.properties.find((spec) => spec.name === best)?.example ?? names[0] ?? '';
}
