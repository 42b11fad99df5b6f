/** What every reader of a property shares: what it knows, what it gives back, and how one quantity is read. */
import type { KindName, Origin, PropertySpec, PropertyValue } from '@oilway/circuit';
import type { Dimension, Quantity } from '@oilway/quantity';
import type { Context } from './context.ts';
import type { Items } from './items.ts';
import type { Values } from './values.ts';

/** What a property's reading needs to know besides its items. */
export interface Reading {
  readonly context: Context;
  readonly values: Values;
  readonly spec: PropertySpec;
  /** Component, part or other owner, for messages. */
  readonly owner: string;
  /** Kind of the actuator a load stands on. */
  readonly actuator?: KindName | undefined;
}

export interface Read {
  readonly value: PropertyValue;
  readonly port?: string;
}

export function unknown(why: string, origin: Origin): PropertyValue {
  return { type: 'unknown', why, origin };
}

/** Reports, and gives the unknown value. */
export function wrong(reading: Reading, what: string, origin: Origin, code = 'VALUE'): Read {
  const { context, spec } = reading;
  context.report({ code, what, mend: `Write it as in \`${spec.example}\`.`, origin, place: reading.owner });
  return { value: unknown(what, origin) };
}

/** One quantity of the items, with the tolerance it may carry. */
export function readQuantity(
  reading: Reading,
  items: Items,
  dimensions: readonly Dimension[],
): { readonly q: Quantity; readonly plusMinus?: number; readonly from: readonly string[]; readonly origin: Origin } | undefined {
  const piece = items.peek();
  if (piece === undefined || piece.is === 'word' || piece.is === 'text' || piece.is === 'wanted') {
    wrong(
      reading,
      piece === undefined
        ? `\`${reading.spec.name}\` needs a value`
        : `A value is needed here, not \`${reading.context.slice(piece.origin)}\``,
      items.here,
    );
    items.skip(1);
    return undefined;
  }
  items.skip(1);
  if (piece.is === 'value' && piece.other !== undefined) {
    wrong(reading, `A value is needed here, not the pair \`${reading.context.slice(piece.origin)}\``, piece.origin);
    return undefined;
  }
  const computed = reading.values.quantity(piece.value, dimensions, reading.spec.example);
  if (computed === undefined) return undefined;
  const band = piece.is === 'value' && piece.tolerance !== undefined ? tolerance(reading, computed.q, piece.tolerance) : undefined;
  return { q: computed.q, ...(band === undefined ? {} : { plusMinus: band }), from: computed.from, origin: piece.origin };
}

function tolerance(reading: Reading, q: Quantity, node: Parameters<Values['compute']>[0]): number | undefined {
  const point = q.dimension === 'temperature';
  const band = reading.values.quantity(node, [point ? 'temperature difference' : q.dimension, ...(point ? [] : (['ratio'] as const))]);
  if (band === undefined) return undefined;
  const size = Math.abs(band.q.dimension === 'ratio' && q.dimension !== 'ratio' ? q.si * band.q.si : band.q.si);
  return size;
}
