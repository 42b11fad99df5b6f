/** Reads the items of a property by the shape its schema gives. What is wrong is reported at its characters and comes back as `unknown`. */
import type { KindName, Origin, PropertyValue, Shape } from '@oilway/circuit';
import type { Dimension, Quantity } from '@oilway/quantity';
import { oneOf } from './context.ts';
import type { Items } from './items.ts';
import { nearest } from '../parse/near.ts';
import { readLoad } from './load-entry.ts';
import { type Read, type Reading, readQuantity, unknown, wrong } from './reading.ts';
import { readCam, readCoil, readPosition } from './valve-entry.ts';

export function readItems(reading: Reading, items: Items, origin: Origin): Read {
  const first = items.peek();
  if (first?.is === 'wanted') {
    items.skip(1);
    reading.context.report({
      code: 'NOT-COMPUTED',
      severity: 'information',
      what: `Not computed yet: \`${reading.spec.name} ?\` of ${reading.owner} asks for a size, and sizes are not found yet`,
      mend: 'Write a value; what rests on it is computed then.',
      origin,
      place: reading.owner,
    });
    const shape = reading.spec.shape;
    const dimension = shape.form === 'quantity' && shape.dimensions.length === 1 ? shape.dimensions[0] : undefined;
    return { value: { type: 'wanted', ...(dimension === undefined ? {} : { dimension }), origin } };
  }
  return byShape(reading, reading.spec.shape, items, origin);
}

function byShape(reading: Reading, shape: Shape, items: Items, origin: Origin): Read {
  switch (shape.form) {
    case 'flag':
      return { value: { type: 'flag', origin } };
    case 'quantity': {
      const read = readQuantity(reading, items, shape.dimensions);
      return {
        value:
          read === undefined
            ? unknownOf(reading, origin)
            : { type: 'quantity', q: read.q, ...plus(read.plusMinus), origin, ...fromOf(read.from) },
      };
    }
    case 'portQuantity': {
      const port = items.count > 1 ? items.plainWord() : undefined;
      if (port !== undefined) items.skip(1);
      const read = readQuantity(reading, items, [shape.dimension]);
      const value: PropertyValue =
        read === undefined
          ? unknownOf(reading, origin)
          : { type: 'quantity', q: read.q, ...plus(read.plusMinus), origin, ...fromOf(read.from) };
      return { value, ...(port === undefined ? {} : { port: port.word }) };
    }
    case 'flowAt':
      return readFlowAt(reading, items, origin, shape.perPath === true);
    case 'word':
    case 'toWord':
      return readWord(reading, items, origin, shape.words, shape.form === 'toWord');
    case 'reference':
      return readReference(reading, items, origin, shape);
    case 'range':
    case 'span':
      return readRange(reading, items, origin, shape.form === 'span' ? [shape.dimension] : shape.dimensions);
    case 'number':
      return readNumber(reading, items, origin);
    case 'ratio':
      return readRatio(reading, items, origin);
    case 'text': {
      const piece = items.take();
      if (piece?.is !== 'text') return wrong(reading, `\`${reading.spec.name}\` needs a text in \`"\``, piece?.origin ?? origin);
      return { value: { type: 'text', text: piece.text, origin: piece.origin } };
    }
    case 'position':
      return readPosition(reading, items, origin);
    case 'coil':
      return readCoil(reading, items, origin);
    case 'cam':
      return readCam(reading, items, origin, shape.small);
    case 'attitude':
      return readAttitude(reading, items, origin);
    case 'bypass': {
      if (items.plainWord()?.word === 'none') {
        items.skip(1);
        return { value: { type: 'bypass', origin } };
      }
      const read = readQuantity(reading, items, ['pressure']);
      return { value: read === undefined ? unknownOf(reading, origin) : { type: 'bypass', crack: read.q, origin } };
    }
    case 'precharge': {
      const pressure = readQuantity(reading, items, ['pressure']);
      if (pressure === undefined) return { value: unknownOf(reading, origin) };
      if (!items.word('at')) {
        return wrong(reading, 'A precharge needs its gas temperature: `at 20 degC`', origin, 'M08');
      }
      const temperature = readQuantity(reading, items, ['temperature']);
      return {
        value:
          temperature === undefined
            ? unknownOf(reading, origin)
            : { type: 'precharge', pressure: pressure.q, temperature: temperature.q, origin },
      };
    }
    case 'list': {
      const list: Quantity[] = [];
      do {
        const read = readQuantity(reading, items, [shape.dimension]);
        if (read === undefined) return { value: unknownOf(reading, origin) };
        list.push(read.q);
      } while (items.word('and'));
      return { value: { type: 'list', items: list, origin } };
    }
    case 'place': {
      const word = items.plainWord();
      if (word !== undefined && !reading.context.constants.has(word.word)) {
        items.skip(1);
        return placeWord(reading, word, origin);
      }
      const read = readQuantity(reading, items, ['length', 'angle']);
      return { value: read === undefined ? unknownOf(reading, origin) : { type: 'place', q: read.q, origin } };
    }
    case 'load':
      return readLoad(reading, items, origin);
  }
}

/** Words a place may be: where a cylinder begins, where a valve stands. */
function placeWord(reading: Reading, word: { readonly word: string; readonly origin: Origin }, origin: Origin): Read {
  const words = reading.spec.name === 'begins' ? ['retracted', 'extended'] : ['a', 'b', 'centre', 'open', 'closed'];
  if (words.includes(word.word)) return { value: { type: 'place', word: word.word, origin } };
  return notAWord(reading, word, words);
}

function notAWord(reading: Reading, found: { readonly word: string; readonly origin: Origin }, words: readonly string[]): Read {
  const near = nearest(found.word, words);
  const { context, spec, owner } = reading;
  const what = `\`${spec.name}\` takes ${oneOf(words)}, not \`${found.word}\``;
  context.report({
    code: 'VALUE',
    what,
    origin: found.origin,
    place: owner,
    fixes:
      near !== undefined
        ? [context.replace(found.origin, near, `Write \`${near}\``)]
        : words.length <= 4
          ? words.map((word) => context.replace(found.origin, word, `Write \`${word}\``))
          : [],
  });
  return { value: unknown(what, found.origin) };
}

function unknownOf(reading: Reading, origin: Origin): PropertyValue {
  return unknown(`\`${reading.spec.name}\` is not understood`, origin);
}
const plus = (band: number | undefined): { readonly plusMinus?: number } => (band === undefined ? {} : { plusMinus: band });
const fromOf = (from: readonly string[]): { readonly from?: readonly string[] } => (from.length === 0 ? {} : { from });

function readFlowAt(reading: Reading, items: Items, origin: Origin, perPath: boolean): Read {
  let path: { readonly from: string; readonly to: string } | undefined;
  const from = items.plainWord();
  const second = items.peek(1);
  if (from !== undefined && second?.is === 'word' && second.word === 'to') {
    const to = items.plainWord(2);
    if (!perPath) return wrong(reading, `\`${reading.spec.name}\` of this kind has no paths of its own`, from.origin);
    if (to === undefined) return wrong(reading, 'The second port of the path is missing', items.here);
    path = { from: from.word, to: to.word };
    items.skip(3);
  }
  const flow = readQuantity(reading, items, ['flow']);
  if (flow === undefined) return { value: unknownOf(reading, origin) };
  if (!items.word('at'))
    return wrong(reading, `\`${reading.spec.name}\` needs the pressure drop at this flow: \`at 5 bar\``, origin, 'M08');
  const drop = readQuantity(reading, items, ['pressure']);
  if (drop === undefined) return { value: unknownOf(reading, origin) };
  if (!(flow.q.si > 0) || !(drop.q.si > 0)) return wrong(reading, 'Flow and pressure drop must both be above zero', origin);
  if (path === undefined) return { value: { type: 'flowAt', flow: flow.q, drop: drop.q, origin } };
  return { value: { type: 'pathPasses', from: path.from, to: path.to, flow: flow.q, drop: drop.q, origin } };
}

function readWord(reading: Reading, items: Items, origin: Origin, words: readonly string[], afterTo: boolean): Read {
  if (afterTo && !items.word('to')) {
    return wrong(
      reading,
      `\`${reading.spec.name}\` needs \`to\` and a position: \`${reading.spec.example}\``,
      items.count === 0 ? origin : items.here,
      'M08',
    );
  }
  const word = items.plainWord();
  if (word === undefined) return wrong(reading, `\`${reading.spec.name}\` needs a word: ${oneOf(words)}`, items.here, 'M08');
  items.skip(1);
  return words.includes(word.word) ? { value: { type: 'word', word: word.word, origin } } : notAWord(reading, word, words);
}

function readReference(
  reading: Reading,
  items: Items,
  origin: Origin,
  shape: { readonly small?: 'by'; readonly kinds: readonly KindName[] },
): Read {
  const { context, spec, owner } = reading;
  if (shape.small !== undefined && !items.word(shape.small)) {
    return wrong(reading, `\`${spec.name}\` needs \`${shape.small}\` and a name: \`${spec.example}\``, items.here, 'M08');
  }
  const piece = items.take();
  if (piece?.is !== 'name') return wrong(reading, `\`${spec.name}\` needs the name of a component`, piece?.origin ?? origin, 'M08');
  const found = context.names.get(piece.words[0] ?? '');
  const kinds = shape.kinds;
  const fits = (kind: KindName | undefined): boolean => kind !== undefined && (kinds.length === 0 || kinds.includes(kind));
  if (found === undefined) {
    context.unknownName(
      piece.words[0] ?? '',
      piece.origin,
      (d) => d.what === 'component' && fits(d.kind),
      kinds.length === 0 ? 'a component' : `a ${kinds.join(' or ')}`,
      owner,
    );
    return { value: unknown(`\`${piece.words.join('.')}\` is not declared`, origin) };
  }
  if (found.what === 'unit') return { value: unknown(`\`${found.id}\` is a unit; units are not computed yet`, origin) };
  if (found.what !== 'component' || !fits(found.kind)) {
    const is = found.what === 'component' ? `a ${found.kind}` : `a ${found.what}`;
    return wrong(
      reading,
      `\`${found.id}\` is ${is}; \`${spec.name}\` needs ${kinds.length === 0 ? 'a component' : `a ${kinds.join(' or ')}`}`,
      piece.origin,
      'NAME',
    );
  }
  const start = piece.origin.start;
  context.refer({ ...piece.origin, start, end: start + (piece.words[0]?.length ?? 0) }, found.id);
  const port = piece.words[1];
  return { value: { type: 'reference', id: found.id, ...(port === undefined ? {} : { port }), origin: piece.origin } };
}

function readRange(reading: Reading, items: Items, origin: Origin, dimensions: readonly Dimension[]): Read {
  const from = readQuantity(reading, items, dimensions);
  if (from === undefined) {
    items.skip(items.rest.length);
    return { value: unknownOf(reading, origin) };
  }
  if (!items.word('to')) return { value: { type: 'range', from: from.q, to: from.q, origin } };
  const to = readQuantity(reading, items, [from.q.dimension]);
  if (to === undefined) return { value: unknownOf(reading, origin) };
  if (to.q.si < from.q.si) return wrong(reading, 'The range runs backwards: the smaller value stands first', origin);
  return { value: { type: 'range', from: from.q, to: to.q, origin } };
}

function readNumber(reading: Reading, items: Items, origin: Origin): Read {
  const piece = items.take();
  if (piece === undefined || !('value' in piece))
    return wrong(reading, `\`${reading.spec.name}\` needs a number`, piece?.origin ?? origin, 'M08');
  const computed = reading.values.compute(piece.value);
  if (computed === undefined) return { value: unknownOf(reading, origin) };
  if (computed.q.dimension !== 'ratio' || computed.q.unit !== '') {
    return wrong(reading, `\`${reading.spec.name}\` is a plain number without a unit`, piece.origin, 'M07');
  }
  return { value: { type: 'number', value: computed.q.si, origin } };
}

function readRatio(reading: Reading, items: Items, origin: Origin): Read {
  const piece = items.take();
  if (piece === undefined || !('value' in piece))
    return wrong(reading, `\`${reading.spec.name}\` needs a ratio`, piece?.origin ?? origin, 'M08');
  const first = reading.values.compute(piece.value);
  const other = piece.is === 'value' ? piece.other : undefined;
  const second = other === undefined ? undefined : reading.values.compute(other);
  if (first === undefined || (other !== undefined && second === undefined)) return { value: unknownOf(reading, origin) };
  if (first.q.dimension !== 'ratio' || (second !== undefined && second.q.dimension !== 'ratio')) {
    return wrong(reading, `\`${reading.spec.name}\` is a ratio of two numbers without units`, piece.origin, 'M07');
  }
  const value = first.q.si / (second?.q.si ?? 1);
  if (!Number.isFinite(value) || value <= 0) return wrong(reading, `\`${reading.spec.name}\` must be above zero`, piece.origin);
  return { value: { type: 'number', value, origin } };
}

function readAttitude(reading: Reading, items: Items, origin: Origin): Read {
  const word = items.plainWord()?.word;
  if (word === 'level') {
    items.skip(1);
    return { value: { type: 'attitude', angle: 0, origin } };
  }
  if (word === 'rod') {
    items.skip(1);
    const way = items.plainWord();
    items.skip(1);
    if (way?.word === 'up') return { value: { type: 'attitude', angle: Math.PI / 2, origin } };
    if (way?.word === 'down') return { value: { type: 'attitude', angle: -Math.PI / 2, origin } };
    return wrong(reading, 'The rod points `up` or `down`', way?.origin ?? origin);
  }
  if (word !== undefined && !reading.context.constants.has(word)) {
    return wrong(reading, '`attitude` takes `rod up`, `rod down`, `level` or an angle of the rod above horizontal', items.here);
  }
  const read = readQuantity(reading, items, ['angle']);
  if (read === undefined) return { value: unknownOf(reading, origin) };
  if (Math.abs(read.q.si) > Math.PI / 2 + 1e-9)
    return wrong(reading, 'The angle of the rod above horizontal lies between -90 and 90 degrees', read.origin);
  return { value: { type: 'attitude', angle: read.q.si, origin } };
}
