/** What the positions of a directional control valve join, what brings it back, and the flow figure of each path. */
import type { FlowAt } from '../assembly/assembly.ts';
import type { Component } from '../model/circuit.ts';
import { flowAt, has, pathPasses, position, word } from './read.ts';

export type Side = 'a' | 'b' | 'centre';

export interface ValvePath {
  readonly from: string;
  readonly to: string;
  /** Own `passes`, the general one, or the mirrored path's; undefined: an error of the file. SI. */
  readonly passes: FlowAt | undefined;
}
export interface Positions {
  readonly sides: readonly Side[];
  readonly paths: Readonly<Record<Side, readonly ValvePath[]>>;
  /** Where it stands with nothing live; a detent valve: a. */
  readonly rest: Side;
  readonly detent: boolean;
}

/** Main ports by the first number of the shape. */
export const PORTS_BY_SHAPE: Readonly<Record<number, readonly string[]>> = {
  2: ['P', 'A'],
  3: ['P', 'T', 'A'],
  4: ['P', 'T', 'A', 'B'],
};

type Pair = readonly [string, string];
const DEFAULTS: Readonly<Record<number, { readonly a: readonly Pair[]; readonly b: readonly Pair[] }>> = {
  2: { a: [['P', 'A']], b: [] },
  3: { a: [['P', 'A']], b: [['A', 'T']] },
  4: {
    a: [
      ['P', 'A'],
      ['B', 'T'],
    ],
    b: [
      ['P', 'B'],
      ['A', 'T'],
    ],
  },
};

/** Paths of a named centre, for the ports there are. */
export function pathsOfWord(named: string, ports: readonly string[]): readonly Pair[] {
  const all: readonly Pair[] =
    named === 'tandem'
      ? [['P', 'T']]
      : named === 'float'
        ? [
            ['A', 'T'],
            ['B', 'T'],
          ]
        : named === 'open'
          ? [
              ['P', 'A'],
              ['P', 'B'],
              ['A', 'T'],
              ['B', 'T'],
              ['P', 'T'],
            ]
          : [];
  return all.filter(([x, y]) => ports.includes(x) && ports.includes(y));
}

const mirror = (port: string): string => (port === 'A' ? 'B' : port === 'B' ? 'A' : port);
const same = (x: Pair, y: Pair): boolean => (x[0] === y[0] && x[1] === y[1]) || (x[0] === y[1] && x[1] === y[0]);

/** All positions of the valve with their paths. */
export function positionsOf(component: Component): Positions {
  const shape = component.shape ?? { ports: 4, positions: 2 };
  const ports = PORTS_BY_SHAPE[shape.ports] ?? ['P', 'T', 'A', 'B'];
  const sides: readonly Side[] = shape.positions >= 3 ? ['a', 'centre', 'b'] : ['a', 'b'];
  const general = flowAt(component, 'passes');
  const perPath = pathPasses(component);
  const figure = (pair: Pair): FlowAt | undefined => {
    const own = perPath.find((p) => same([p.from, p.to], pair));
    return own === undefined ? undefined : { flow: own.flow.si, drop: own.drop.si };
  };
  const passes = (pair: Pair): FlowAt | undefined => figure(pair) ?? general ?? figure([mirror(pair[0]), mirror(pair[1])]);
  const pathsOf = (side: Side): readonly ValvePath[] => {
    const written = position(component, side);
    if (written !== undefined && (written.word === undefined || written.paths.length > 0)) {
      return written.paths.map((p) => ({
        from: p.from,
        to: p.to,
        passes: p.passes === undefined ? passes([p.from, p.to]) : { flow: p.passes.flow.si, drop: p.passes.drop.si },
      }));
    }
    const pairs =
      written?.word !== undefined ? pathsOfWord(written.word, ports) : side === 'centre' ? [] : (DEFAULTS[shape.ports]?.[side] ?? []);
    return pairs.map((pair) => ({ from: pair[0], to: pair[1], passes: passes(pair) }));
  };
  const spring = word(component, 'spring');
  const normally = word(component, 'normally');
  const detent = has(component, 'detent');
  const rest: Side =
    spring === 'a' || spring === 'b' || spring === 'centre'
      ? spring
      : normally === 'closed'
        ? 'b'
        : normally === 'open' || detent
          ? 'a'
          : shape.positions >= 3
            ? 'centre'
            : 'a';
  return { sides, paths: { a: pathsOf('a'), b: pathsOf('b'), centre: shape.positions >= 3 ? pathsOf('centre') : [] }, rest, detent };
}

/**
 * Position a live coil moves the valve to. 2/2 and 3/2 with `normally`: the one coil moves it to the other position, whatever its letter.
 * A single signed command (no side): a.
 */
export function sideOfCoil(component: Component, side: Side | undefined): Side {
  const normally = word(component, 'normally');
  if (normally !== undefined) return normally === 'closed' ? 'a' : 'b';
  return side ?? 'a';
}
