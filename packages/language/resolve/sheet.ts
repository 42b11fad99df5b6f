/** What stands once on a sheet: units shown, limits of the house, names in the control. */
import { type Circuit, type Controls, LIMITS_PROPERTIES, type Limits, type Property } from '@oilway/circuit';
import { type Dimension, unitOf } from '@oilway/quantity';
import type { Controls as ControlsNode, Display as DisplayNode, Limits as LimitsNode } from '../generated/ast.ts';
import type { Layout } from '../parse/layout.ts';
import { nearest } from '../parse/near.ts';
import { LINE_FUNCTIONS } from '../parse/words.ts';
import type { Components } from './components.ts';
import type { Context } from './context.ts';
import { unquoted } from './items.ts';
import { resolvePlace } from './places.ts';
import { readProperties } from './properties.ts';
import type { Values } from './values.ts';

export function resolveDisplay(context: Context, nodes: readonly DisplayNode[]): Circuit['display'] {
  const node = nodes[0];
  if (node === undefined) return 'as written';
  const words = (node.words ?? []).map((word) => word.text ?? '').join(' ');
  if (words === 'metric' || words === 'us' || words === 'as written') return words;
  const near = nearest(words, ['metric', 'us', 'as written']);
  const first = node.words?.[0];
  const last = node.words?.at(-1);
  const origin =
    first === undefined || last === undefined ? context.origin(node) : context.span(context.origin(first), context.origin(last));
  context.report({
    code: 'VALUE',
    what: '`display` takes `metric`, `us` or `as written`',
    origin,
    fixes: near === undefined ? [] : [context.replace(origin, near, `Write \`${near}\``)],
  });
  return 'as written';
}

/** The unit met most often for each dimension; the first of equals. */
export function commonUnits(layout: Layout): Circuit['units'] {
  const counts = new Map<Dimension, Map<string, number>>();
  for (const token of layout.tokens) {
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

export function resolveLimits(context: Context, values: Values, nodes: readonly LimitsNode[]): Limits | undefined {
  if (nodes.length === 0) return undefined;
  const properties: Property[] = [];
  for (const node of nodes) {
    const read = readProperties(context, values, node.properties, {
      name: 'limits',
      specs: LIMITS_PROPERTIES,
      shaped: false,
      of: '`limits`',
    });
    for (const property of read.properties) {
      const functions: readonly string[] = LINE_FUNCTIONS;
      if (property.name === 'velocity' && (property.port === undefined || !functions.includes(property.port))) {
        context.report({
          code: 'VALUE',
          what: `A velocity is limited for a kind of line: \`velocity suction 1.0 m/s\` (${functions.join(', ')})`,
          origin: property.origin,
        });
        continue;
      }
      const first = properties.find((other) => other.name === property.name && other.port === property.port);
      if (first !== undefined) {
        context.report({
          code: 'VALUE',
          what: `This limit is given twice`,
          origin: property.origin,
          related: [{ message: 'first here', origin: first.origin }],
        });
        continue;
      }
      properties.push(property);
    }
  }
  return { properties, origin: context.origin(nodes[0]) };
}

export function resolveControls(context: Context, components: Components, nodes: readonly ControlsNode[]): Controls | undefined {
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
      context.report({
        code: 'NAME',
        what: `\`${name}\` is a ${kind ?? declared.what}: the control sees coils, switches, sensors and steps`,
        origin: at,
      });
    }
    if (id === undefined) continue;
    const twice = symbols.find((other) => other.of === id);
    if (twice !== undefined) {
      context.report({
        code: 'NAME',
        what: `\`${id}\` has its symbol already`,
        origin,
        related: [{ message: 'first here', origin: twice.origin }],
      });
      continue;
    }
    symbols.push({
      of: id,
      ...(entry.text === undefined ? {} : { symbol: unquoted(entry.text) }),
      ...(entry.number === undefined ? {} : { number: Number(entry.number) }),
      origin,
    });
  }
  return { file: unquoted(node.file), symbols, origin: context.origin(node) };
}
