/** Entries of valves: positions with their paths, coils, cams. */
import type { Origin, PathSpec } from '@oilway/circuit';
import { Items } from './items.ts';
import { type Read, type Reading, readQuantity, unknown, wrong } from './reading.ts';

export const NAMED_CENTRES = ['closed', 'open', 'tandem', 'float'] as const;
type NamedCentre = (typeof NAMED_CENTRES)[number];
const isNamed = (word: string): word is NamedCentre => (NAMED_CENTRES as readonly string[]).includes(word);

export function sideOf(word: string): 'a' | 'b' | 'centre' | undefined {
  return word === 'a' || word === 'b' || word === 'centre' ? word : undefined;
}

/** The paths of a named centre, as far as the valve has the ports. */
export function pathsOfCentre(word: NamedCentre, ports: readonly string[], origin: Origin): PathSpec[] {
  const pairs: readonly (readonly [string, string])[] =
    word === 'tandem'
      ? [['P', 'T']]
      : word === 'float'
        ? [
            ['A', 'T'],
            ['B', 'T'],
          ]
        : word === 'open'
          ? [
              ['P', 'T'],
              ['P', 'A'],
              ['P', 'B'],
              ['A', 'T'],
              ['B', 'T'],
            ]
          : [];
  return pairs.filter(([from, to]) => ports.includes(from) && ports.includes(to)).map(([from, to]) => ({ from, to, origin }));
}

export function readPosition(reading: Reading, items: Items, origin: Origin): Read {
  const piece = items.peek();
  const word = items.plainWord();
  if (word !== undefined) {
    items.skip(1);
    if (isNamed(word.word)) return { value: { type: 'position', word: word.word, paths: [], origin } };
    return wrong(
      reading,
      `A position is ${NAMED_CENTRES.map((name) => `\`${name}\``).join(', ')}, or its paths in brackets: \`(P to T)\``,
      word.origin,
    );
  }
  if (piece?.is !== 'group')
    return wrong(reading, `\`${reading.spec.name}\` needs its paths: \`${reading.spec.name} (P to A)\``, piece?.origin ?? origin, 'M08');
  items.skip(1);
  const paths: PathSpec[] = [];
  for (const entry of piece.group.entries ?? []) {
    const path = readPath(reading, new Items(reading.context, entry));
    if (path === undefined) return { value: unknown('a path is not understood', origin) };
    paths.push(path);
  }
  return { value: { type: 'position', paths, origin } };
}

function readPath(reading: Reading, items: Items): PathSpec | undefined {
  const from = items.plainWord();
  items.skip(1);
  const joined = items.word('to');
  const to = items.plainWord();
  items.skip(1);
  if (from === undefined || to === undefined || !joined) {
    wrong(reading, 'A path joins two ports: `P to A`', items.origin);
    return undefined;
  }
  let passes: PathSpec['passes'];
  if (items.plainWord()?.word === 'passes') {
    items.skip(1);
    const flow = readQuantity(reading, items, ['flow']);
    if (flow === undefined) return undefined;
    if (!items.word('at')) {
      wrong(reading, 'The path needs the pressure drop at this flow: `passes 2 L/min at 5 bar`', items.origin, 'M08');
      return undefined;
    }
    const drop = readQuantity(reading, items, ['pressure']);
    if (drop === undefined) return undefined;
    passes = { flow: flow.q, drop: drop.q };
  }
  const left = items.leftover;
  if (left !== undefined) {
    wrong(reading, `\`${reading.context.slice(left)}\` does not fit into a path`, left);
    return undefined;
  }
  return { from: from.word, to: to.word, ...(passes === undefined ? {} : { passes }), origin: items.origin };
}

export function readCoil(reading: Reading, items: Items, origin: Origin): Read {
  let first = items.plainWord();
  const second = items.peek(1);
  const side = first === undefined ? undefined : sideOf(first.word);
  if (side !== undefined && second?.is === 'name') {
    items.skip(1);
    first = items.plainWord();
  }
  const piece = items.peek();
  if (first === undefined || piece?.is !== 'name' || piece.words.length !== 1 || sideOf(first.word) !== undefined) {
    return wrong(reading, 'A coil needs a name: `coil a SOL1`', items.count === 0 ? origin : items.here, 'M08');
  }
  items.skip(1);
  let voltage: ReturnType<typeof readQuantity>;
  const next = items.peek();
  if (next?.is === 'value' || (next?.is === 'name' && reading.context.constants.has(next.words[0] ?? ''))) {
    voltage = readQuantity(reading, items, ['voltage']);
    if (voltage === undefined) return { value: unknown('the voltage is not understood', origin) };
  }
  return {
    value: {
      type: 'coil',
      ...(side === undefined || second?.is !== 'name' ? {} : { side }),
      name: first.word,
      ...(voltage === undefined ? {} : { voltage: voltage.q }),
      origin,
      nameOrigin: first.origin,
    },
  };
}

export function readCam(reading: Reading, items: Items, origin: Origin, small: 'by' | undefined): Read {
  const { context } = reading;
  const first = items.plainWord();
  const side = small === undefined && first !== undefined ? sideOf(first.word) : undefined;
  if (side !== undefined) items.skip(1);
  if (small !== undefined && !items.word(small))
    return wrong(reading, `\`${reading.spec.name}\` needs \`${small}\` and an actuator`, items.here, 'M08');
  if (small === undefined && side === undefined)
    return wrong(reading, 'A cam shifts to `a`, `b` or `centre`: `cam a C2 from 250 mm to 320 mm`', items.here, 'M08');
  const piece = items.take();
  if (piece?.is !== 'name') return wrong(reading, 'The actuator that carries the cam is missing', piece?.origin ?? origin, 'M08');
  const name = piece.words[0] ?? '';
  const found = context.names.get(name);
  if (found?.what !== 'component' || (found.kind !== 'cylinder' && found.kind !== 'rotary')) {
    if (found === undefined)
      context.unknownName(name, piece.origin, (d) => d.kind === 'cylinder' || d.kind === 'rotary', 'a cylinder', reading.owner);
    else wrong(reading, `\`${name}\` carries no cam: a cylinder or a semi-rotary actuator does`, piece.origin, 'NAME');
    return { value: unknown(`\`${name}\` is no cylinder`, origin) };
  }
  context.refer(piece.origin, found.id);
  if (!items.word('from')) return wrong(reading, 'The cam needs its way: `from 250 mm to 265 mm`', items.here, 'M08');
  const from = readQuantity(reading, items, [found.kind === 'rotary' ? 'angle' : 'length']);
  if (from === undefined) return { value: unknown('the way of the cam is not understood', origin) };
  if (!items.word('to')) return wrong(reading, 'The cam needs the end of its way: `to 265 mm`', items.here, 'M08');
  const to = readQuantity(reading, items, [from.q.dimension]);
  if (to === undefined) return { value: unknown('the way of the cam is not understood', origin) };
  if (to.q.si < from.q.si) return wrong(reading, 'The cam runs backwards: the smaller position stands first', origin);
  return { value: { type: 'cam', ...(side === undefined ? {} : { side }), actuator: found.id, from: from.q, to: to.q, origin } };
}
