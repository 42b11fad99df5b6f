/** Settings that begin with no word: a shape (`4/3`), or a figure whose word is lost (`0,5 bar`). */
import type { Origin } from '@oilway/circuit';
import type { Property as PropertyNode } from '../generated/ast.ts';
import type { Context } from './context.ts';

export interface Shape {
  readonly ports: number;
  readonly positions: number;
  readonly origin: Origin;
}

interface OwnerWords {
  readonly name: string;
  readonly of: string;
  readonly shaped: boolean;
  readonly specs: readonly { readonly name: string }[];
}

export const clip = (text: string): string => (text.length > 40 ? `${text.slice(0, 37)}...` : text);

/** The comma between a setting that ends with a digit and one that begins with one: a decimal comma. */
export function cutByComma(context: Context, before: PropertyNode | undefined, after: PropertyNode | undefined): Origin | undefined {
  if (before === undefined || after === undefined || after.head !== undefined) return undefined;
  const first = context.origin(before);
  const second = context.origin(after);
  const between = context.text.slice(first.end, second.start);
  if (!/^,\s?$/.test(between) || !/[0-9]$/.test(context.slice(first)) || !/^[0-9]/.test(context.slice(second))) return undefined;
  if (/^[0-9]+\/[0-9]+$/.test(context.slice(second))) return undefined;
  return { uri: context.uri, start: first.end, end: second.start };
}

/** The shape, if it is one, and how many items it took; what is wrong is said. */
export function readHeadless(
  context: Context,
  entry: PropertyNode,
  owner: OwnerWords,
  before: PropertyNode | undefined,
): Shape | undefined {
  const whole = context.origin(entry);
  const first = (entry.items ?? [])[0];
  const firstOrigin = first === undefined ? whole : context.origin(first);
  const shape = /^([0-9]{1,2})\/([0-9]{1,2})$/.exec(context.slice(firstOrigin));
  if (shape !== null) return readShape(context, owner, firstOrigin, Number(shape[1]), Number(shape[2]));
  const comma = cutByComma(context, before, entry);
  const text = context.slice(whole);
  if (comma !== undefined) {
    const thousands = /^[0-9]{3}(?![0-9])/.test(text) && comma.end - comma.start === 1;
    const point = context.replace(comma, '.', 'Write the decimal point');
    context.report({
      code: 'SYNTAX',
      what: `A comma ends a setting: ${thousands ? 'write a number without a mark for thousands, and a decimal point where one is meant' : 'write the decimal point'}`,
      origin: { ...whole, start: comma.start },
      place: owner.name,
      fixes: thousands ? [context.replace(comma, '', 'Remove the comma'), point] : [point],
    });
    return undefined;
  }
  context.report({
    code: 'SYNTAX',
    what: `A setting begins with its word: which setting is \`${clip(text)}\``,
    mend: owner.specs.length > 0 ? `Settings of ${owner.of}: ${owner.specs.map((spec) => spec.name).join(', ')}.` : undefined,
    origin: whole,
    place: owner.name,
  });
  return undefined;
}

function readShape(context: Context, owner: OwnerWords, origin: Origin, ports: number, positions: number): Shape | undefined {
  if (!owner.shaped) {
    context.report({
      code: 'VALUE',
      what: `Only a directional valve has a shape such as \`${context.slice(origin)}\``,
      origin,
      place: owner.name,
    });
    return undefined;
  }
  if ([2, 3, 4].includes(ports) && [2, 3].includes(positions) && !(ports === 2 && positions === 3)) return { ports, positions, origin };
  context.report({
    code: 'VALUE',
    what: `There is no valve \`${context.slice(origin)}\`: a shape is 2/2, 3/2, 3/3, 4/2 or 4/3 (ports/positions)`,
    origin,
    place: owner.name,
    fixes: ['4/3', '4/2', '3/2', '2/2'].map((word) => context.replace(origin, word, `Write \`${word}\``)),
  });
  return undefined;
}
