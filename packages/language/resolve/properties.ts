/** The properties of one statement by its schema: known words, each once, groups, required ones. */
import type { KindName, Origin, Property, PropertySpec } from '@oilway/circuit';
import type { Properties, Property as PropertyNode } from '../generated/ast.ts';
import { nearest } from '../parse/near.ts';
import type { Context } from './context.ts';
import { Items } from './items.ts';
import { type Reading, readItems } from './shapes.ts';
import type { Values } from './values.ts';

export interface Shape {
  readonly ports: number;
  readonly positions: number;
  readonly origin: Origin;
}

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
  /** `a relief`, `a line`: for "is no setting of". */
  readonly of: string;
  readonly actuator?: KindName | undefined;
}

/** All properties between the brackets, with the commas that have nothing after them said. */
export function readProperties(context: Context, values: Values, node: Properties | undefined, owner: Owner): ReadProperties {
  const properties: Property[] = [];
  let shape: Shape | undefined;
  const bySpec = new Map(owner.specs.map((spec) => [spec.name, spec]));
  const seen = new Map<string, Property>();
  let before: PropertyNode | undefined;
  for (const { property: entry, comma } of entriesOf(node)) {
    if (entry === undefined) {
      context.report({ code: 'SYNTAX', what: 'A setting is missing after this comma', origin: { uri: context.uri, start: comma, end: comma + 1 }, place: owner.name });
      continue;
    }
    if (entry.head === undefined) {
      const found = readHeadless(context, entry, owner, before);
      if (found !== undefined) {
        if (shape !== undefined) context.report({ code: 'VALUE', what: 'The shape is given twice', origin: found.origin, related: [{ message: 'first here', origin: shape.origin }], place: owner.name });
        else shape = found;
      }
      before = entry;
      continue;
    }
    before = entry;
    const name = entry.head.text ?? '';
    const nameOrigin = context.origin(entry.head);
    const origin = context.origin(entry);
    const spec = bySpec.get(name);
    if (spec === undefined) {
      const near = nearest(name, bySpec.keys());
      context.report({
        code: 'M08',
        what: `\`${name}\` is no setting of ${owner.of}${near === undefined ? '' : `: did you mean \`${near}\``}`,
        mend: near === undefined ? `Settings of ${owner.of}: ${[...bySpec.keys()].join(', ')}.` : undefined,
        origin: nameOrigin,
        place: owner.name,
        fixes: near === undefined ? [] : [context.replace(nameOrigin, near, `Write \`${near}\``)],
      });
      continue;
    }
    const items = new Items(context, entry);
    const reading: Reading = { context, values, spec, owner: owner.name, actuator: owner.actuator };
    const read = readItems(reading, items, origin);
    const left = items.leftover;
    if (left !== undefined && read.value.type !== 'unknown') {
      context.report({
        code: 'VALUE',
        what: `\`${clip(context.slice(left))}\` does not fit after \`${clip(context.text.slice(origin.start, left.start).trim())}\`: a comma is missing, or it is too much`,
        mend: `Write it as in \`${spec.example}\`.`,
        origin: left,
        place: owner.name,
      });
    }
    const property: Property = { name, ...(read.port === undefined ? {} : { port: read.port }), value: read.value, origin, nameOrigin };
    const first = seen.get(name);
    if (first !== undefined && spec.many !== true) {
      context.report({
        code: 'VALUE',
        what: `\`${name}\` is given twice`,
        origin: nameOrigin,
        related: [{ message: `\`${name}\` is given here first`, origin: first.nameOrigin }],
        place: owner.name,
      });
      continue;
    }
    if (first === undefined) seen.set(name, property);
    properties.push(property);
  }
  return { properties, ...(shape === undefined ? {} : { shape }) };
}

const clip = (text: string): string => (text.length > 40 ? `${text.slice(0, 37)}...` : text);

function* entriesOf(node: Properties | undefined): Generator<{ readonly property: PropertyNode | undefined; readonly comma: number }> {
  if (node === undefined) return;
  const rest = node.rest ?? [];
  if (node.first !== undefined || rest.length > 0) {
    if (node.first !== undefined) yield { property: node.first, comma: 0 };
    else yield { property: undefined, comma: rest[0]?.$cstNode?.offset ?? 0 };
  }
  for (const next of rest) yield { property: next.property, comma: next.$cstNode?.offset ?? 0 };
}

/** A property that begins with no word: a shape (`4/3`), or a figure whose word is lost (`0,5 bar`). */
function readHeadless(context: Context, entry: PropertyNode, owner: Owner, before: PropertyNode | undefined): Shape | undefined {
  const origin = context.origin(entry);
  const text = context.slice(origin);
  const shape = /^([0-9]{1,2})\/([0-9]{1,2})$/.exec(text);
  if (shape !== null && owner.shaped) {
    const ports = Number(shape[1]);
    const positions = Number(shape[2]);
    if ([2, 3, 4].includes(ports) && [2, 3].includes(positions) && !(ports === 2 && positions === 3)) return { ports, positions, origin };
    context.report({
      code: 'VALUE',
      what: `There is no valve \`${text}\`: a shape is 2/2, 3/2, 3/3, 4/2 or 4/3 (ports/positions)`,
      origin,
      place: owner.name,
      fixes: ['4/3', '4/2', '3/2', '2/2'].map((word) => context.replace(origin, word, `Write \`${word}\``)),
    });
    return undefined;
  }
  if (shape !== null) {
    context.report({ code: 'VALUE', what: `Only a directional valve has a shape such as \`${text}\``, origin, place: owner.name });
    return undefined;
  }
  const last = before === undefined ? undefined : context.origin(before);
  const between = last === undefined ? '' : context.text.slice(last.end, origin.start);
  if (last !== undefined && /^,\s?$/.test(between) && /[0-9]$/.test(context.slice(last)) && /^[0-9]/.test(text)) {
    const whole: Origin = { uri: context.uri, start: last.end, end: origin.start };
    const thousands = /^[0-9]{3}(?![0-9])/.test(text) && !between.includes(' ');
    context.report({
      code: 'SYNTAX',
      what: thousands ? 'A comma ends a setting: write a number without a mark for thousands, and a decimal point where one is meant' : 'A comma ends a setting: write the decimal point',
      origin: { uri: context.uri, start: last.end, end: origin.end },
      place: owner.name,
      fixes: thousands ? [context.replace(whole, '', 'Remove the comma'), context.replace(whole, '.', 'Write the decimal point')] : [context.replace(whole, '.', 'Write the decimal point')],
    });
    return undefined;
  }
  context.report({
    code: 'SYNTAX',
    what: `A setting begins with its word: which setting is \`${clip(text)}\``,
    mend: owner.specs.length > 0 ? `Settings of ${owner.of}: ${owner.specs.map((spec) => spec.name).join(', ')}.` : undefined,
    origin,
    place: owner.name,
  });
  return undefined;
}
