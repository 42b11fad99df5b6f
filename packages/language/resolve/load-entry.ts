/** Entries of a load: a constant or a table over position, with the range, direction and steps it holds for. */
import type { LoadValue } from '@oilway/circuit';
import type { Dimension, Quantity } from '@oilway/quantity';
import type { Entry } from '../generated/ast.ts';
import { Items } from './items.ts';
import { type Read, type Reading, readQuantity, unknown, wrong } from './reading.ts';
import { resolvePlace } from './places.ts';

export function readLoad(reading: Reading, items: Items, origin: LoadValue['origin']): Read {
  const turns = reading.actuator === 'motor' || reading.actuator === 'rotary';
  const size: Dimension = turns ? 'torque' : 'force';
  const way: Dimension = turns ? 'angle' : 'length';
  let constant: Quantity | undefined;
  let table: LoadValue['table'];
  const piece = items.peek();
  if (
    piece?.is === 'group' &&
    piece.group.entries.some((entry) => entry.items.some((item) => item.$type === 'ValueItem' && item.other !== undefined))
  ) {
    items.skip(1);
    table = readTable(reading, piece.group.entries, way, size);
    if (table === undefined) return { value: unknown('the table is not understood', origin) };
  } else {
    constant = readQuantity(reading, items, [size])?.q;
    if (constant === undefined) return { value: unknown('the load is not understood', origin) };
    if (constant.si < 0) return wrong(reading, 'Loads have no signs: `inward` and `outward` say where the force points', origin);
  }
  let range: LoadValue['range'];
  let direction: LoadValue['direction'];
  let steps: string[] | undefined;
  for (let next = items.plainWord(); next !== undefined; next = items.plainWord()) {
    items.skip(1);
    if (next.word === 'from' && range === undefined) {
      const from = readQuantity(reading, items, [way]);
      if (from === undefined) return { value: unknown('the range is not understood', origin) };
      if (!items.word('to')) return wrong(reading, 'The range needs its end: `from 270 mm to 315 mm`', items.here, 'M08');
      const to = readQuantity(reading, items, [way]);
      if (to === undefined) return { value: unknown('the range is not understood', origin) };
      if (to.q.si < from.q.si) return wrong(reading, 'The range runs backwards: the smaller position stands first', origin);
      range = { from: from.q, to: to.q };
    } else if (next.word === 'extending' || next.word === 'retracting') {
      if (reading.spec.name !== 'resist') {
        return wrong(
          reading,
          `\`${reading.spec.name}\` is fixed on the rod whether it moves or not; only \`resist\` has a direction`,
          next.origin,
        );
      }
      direction = next.word;
    } else if (next.word === 'in') {
      steps = [];
      do {
        const place = items.take();
        if (place?.is !== 'name') return wrong(reading, 'The name of a step is missing after `in`', place?.origin ?? items.here, 'M08');
        const id = resolvePlace(reading.context, place.ref, 'step');
        if (id === undefined) return { value: unknown(`\`${place.words.join('.')}\` is no step`, origin) };
        steps.push(id);
      } while (items.word('and'));
    } else {
      return wrong(
        reading,
        `\`${next.word}\` does not fit into a load: \`from .. to ..\`, \`extending\` or \`in Step\` may follow`,
        next.origin,
      );
    }
  }
  return {
    value: {
      type: 'load',
      ...(constant === undefined ? {} : { constant }),
      ...(table === undefined ? {} : { table }),
      ...(range === undefined ? {} : { range }),
      ...(direction === undefined ? {} : { direction }),
      ...(steps === undefined ? {} : { steps }),
      origin,
    },
  };
}

function readTable(reading: Reading, entries: readonly Entry[], way: Dimension, size: Dimension): LoadValue['table'] | undefined {
  const knots: { at: Quantity; value: Quantity }[] = [];
  for (const entry of entries) {
    const items = new Items(reading.context, entry);
    const piece = items.take();
    if (piece?.is !== 'value' || piece.other === undefined || items.peek() !== undefined) {
      wrong(reading, 'A table has knots `position: load`', items.origin);
      return undefined;
    }
    const at = reading.values.quantity(piece.value, [way]);
    const value = reading.values.quantity(piece.other, [size]);
    if (at === undefined || value === undefined) return undefined;
    const last = knots.at(-1);
    if (last !== undefined && at.q.si <= last.at.si) {
      wrong(reading, 'The positions of a table rise from knot to knot', at.origin);
      return undefined;
    }
    if (value.q.si < 0) {
      wrong(reading, 'Loads have no signs: `inward` and `outward` say where the force points', value.origin);
      return undefined;
    }
    knots.push({ at: at.q, value: value.q });
  }
  return knots;
}
