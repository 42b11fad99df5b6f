/** The properties of one statement by its schema: known words, each once, items that fit. */
import type { KindName, Origin, Property, PropertySpec } from '@oilway/circuit';
import type { Properties, Property as PropertyNode } from '../generated/ast.ts';
import { nearest } from '../parse/near.ts';
import type { Context } from './context.ts';
import { type Shape, clip, cutByComma, readHeadless } from './headless.ts';
import { Items } from './items.ts';
import { readItems } from './shapes.ts';
import type { Values } from './values.ts';

export type { Shape } from './headless.ts';

export interface ReadProperties {
  readonly properties: readonly Property[];
  readonly shape?: Shape;
}

export interface Owner {
  /** Name for messages: `C1`, `the line`. */
  readonly name: string;
  readonly specs: readonly PropertySpec[];
  /** The kind may have a shape (`4/3`). */
  readonly shaped: boolean;
  /** `a relief valve`, `a line`: for "is no setting of". */
  readonly of: string;
  readonly actuator?: KindName | undefined;
}

/** All properties between the brackets. What is wrong is said; the rest is read. */
export function readProperties(context: Context, values: Values, node: Properties | undefined, owner: Owner): ReadProperties {
  return new PropertyReader(context, values, owner).read(node);
}

class PropertyReader {
  private readonly context: Context;
  private readonly values: Values;
  private readonly owner: Owner;
  private readonly specs: ReadonlyMap<string, PropertySpec>;
  private readonly properties: Property[] = [];
  private readonly seen = new Map<string, Property>();
  private shape: Shape | undefined;

  constructor(context: Context, values: Values, owner: Owner) {
    this.context = context;
    this.values = values;
    this.owner = owner;
    this.specs = new Map(owner.specs.map((spec) => [spec.name, spec]));
  }

  read(node: Properties | undefined): ReadProperties {
    const entries = entriesOf(this.context, node);
    entries.forEach(({ property, comma }, i) => {
      if (property === undefined) {
        const origin = { uri: this.context.uri, start: comma, end: comma + 1 };
        this.context.report({ code: 'SYNTAX', what: 'A setting is missing after this comma', origin, place: this.owner.name });
      } else if (property.head === undefined) this.headless(property, entries[i - 1]?.property);
      else this.headed(property, entries[i + 1]?.property);
    });
    return { properties: this.properties, ...(this.shape === undefined ? {} : { shape: this.shape }) };
  }

  private headless(node: PropertyNode, before: PropertyNode | undefined): void {
    const shape = readHeadless(this.context, node, this.owner, before);
    if (shape === undefined) return;
    if (this.shape === undefined) this.shape = shape;
    else
      this.context.report({
        code: 'VALUE',
        what: 'The shape is given twice',
        origin: shape.origin,
        related: [{ message: 'first here', origin: this.shape.origin }],
        place: this.owner.name,
      });
    const items = new Items(this.context, node);
    items.skip(1);
    const left = items.leftover;
    if (left !== undefined) this.goOn(items, left, shape.origin, '');
  }

  private headed(node: PropertyNode, after: PropertyNode | undefined): void {
    const { context } = this;
    const name = node.head?.text ?? '';
    const nameOrigin = context.origin(node.head);
    const origin = context.origin(node);
    const spec = this.specs.get(name);
    if (spec === undefined) {
      this.unknownWord(name, nameOrigin);
      return;
    }
    if (cutByComma(context, node, after) !== undefined) {
      // The next entry says it: `0,5 bar`.
      this.keep({ name, value: { type: 'unknown', why: `\`${name}\` has a decimal comma`, origin }, origin, nameOrigin }, spec);
      return;
    }
    this.items(new Items(context, node), spec, origin, nameOrigin);
  }

  private unknownWord(name: string, origin: Origin): void {
    const { context, owner } = this;
    const near = nearest(name, this.specs.keys());
    context.report({
      code: 'VALUE',
      what: `\`${name}\` is no setting of ${owner.of}${near === undefined ? '' : `: did you mean \`${near}\``}`,
      mend: near === undefined ? `Settings of ${owner.of}: ${[...this.specs.keys()].join(', ')}.` : undefined,
      origin,
      place: owner.name,
      fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)],
    });
  }

  private items(items: Items, spec: PropertySpec, origin: Origin, nameOrigin: Origin): void {
    const { context, values, owner } = this;
    const read = readItems({ context, values, spec, owner: owner.name, actuator: owner.actuator }, items, origin);
    const left = items.leftover;
    const own = left === undefined ? origin : { ...origin, end: context.text.slice(0, left.start).trimEnd().length };
    this.keep(
      { name: spec.name, ...(read.port === undefined ? {} : { port: read.port }), value: read.value, origin: own, nameOrigin },
      spec,
    );
    if (left !== undefined && (read.value.type !== 'unknown' || this.specs.has(items.plainWord()?.word ?? '')))
      this.goOn(items, left, own, spec.example);
  }

  /** Items that fit no more: another setting whose comma is lost, or too much. */
  private goOn(items: Items, left: Origin, own: Origin, example: string): void {
    const { context, owner } = this;
    const word = items.plainWord();
    const spec = word === undefined ? undefined : this.specs.get(word.word);
    if (word === undefined || spec === undefined) {
      context.report({
        code: 'VALUE',
        what: `\`${clip(context.slice(left))}\` does not fit after \`${clip(context.slice(own))}\`: it is too much, or something between is missing`,
        mend: example === '' ? undefined : `Write it as in \`${example}\`.`,
        origin: left,
        place: owner.name,
      });
      return;
    }
    const gap: Origin = { uri: context.uri, start: own.end, end: word.origin.start };
    context.report({
      code: 'SYNTAX',
      what: `A comma is missing before \`${word.word}\``,
      origin: word.origin,
      place: owner.name,
      fixes: [context.replace(gap, ', ', 'Write the comma')],
    });
    items.skip(1);
    const origin = { ...left, start: word.origin.start };
    this.items(new Items(context, { pieces: items.rest, origin }), spec, origin, word.origin);
  }

  private keep(property: Property, spec: PropertySpec): void {
    const first = this.seen.get(property.name);
    if (first !== undefined && spec.many !== true) {
      this.context.report({
        code: 'VALUE',
        what: `\`${property.name}\` is given twice`,
        origin: property.nameOrigin,
        related: [{ message: `\`${property.name}\` is given here first`, origin: first.nameOrigin }],
        place: this.owner.name,
      });
      return;
    }
    if (first === undefined) this.seen.set(property.name, property);
    this.properties.push(property);
  }
}

interface EntryNode {
  readonly property: PropertyNode | undefined;
  /** Offset of the comma before it. */
  readonly comma: number;
}

function entriesOf(context: Context, node: Properties | undefined): EntryNode[] {
  const rest = (node?.rest ?? []).map((next) => ({ property: next.property, comma: context.origin(next).start }));
  if (node?.first !== undefined) return [{ property: node.first, comma: 0 }, ...rest];
  return rest.length > 0 ? [{ property: undefined, comma: rest[0]?.comma ?? 0 }, ...rest] : [];
}
