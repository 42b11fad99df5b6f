/** The table of edge classes: for each kind, which ways through it oil always has, which can be closed, which are never open. A new kind is one line. */
import { type Component, type KindName, read } from '@oilway/circuit';
import { pathsIn, positionsOf, positionWords, type Position } from './paths.ts';

/**
 * `always`: open whatever happens. `closable`: open or closed as people, coils, pilots or dirt will have it.
 * `never`: against a seat, or shut by hand.
 */
export type EdgeClass = 'always' | 'closable' | 'never';

export interface EdgeSpec {
  readonly from: string;
  readonly to: string;
  readonly class: EdgeClass;
  /** What shuts it, or why it is never open: "shut-off BV1 may be closed". Absent for `always`. */
  readonly words?: string;
  /** Directional valves: the positions that join the two ports. */
  readonly positions?: readonly Position[];
  /** True where only a hand can close it and it is declared open. */
  readonly byHand?: boolean;
  /** Closed by hand as declared, and could be opened by hand. */
  readonly shut?: boolean;
}

const always = (from: string, to: string): EdgeSpec => ({ from, to, class: 'always' });
const closable = (from: string, to: string, words: string): EdgeSpec => ({ from, to, class: 'closable', words });
const never = (from: string, to: string, words: string): EdgeSpec => ({ from, to, class: 'never', words });

function checkWays(c: Component): EdgeSpec[] {
  return [always('in', 'out'), never('out', 'in', `${c.id} lets oil through from in to out only`)];
}

/** Seat valves that hold a load: free from V to C, against the seat from C to V. */
function holdingWays(c: Component): EdgeSpec[] {
  return [always('V', 'C'), never('C', 'V', `${c.id} blocks from C to V until its pilot opens it`)];
}

function reverseCheck(c: Component, from: string, to: string, forward: string): EdgeSpec {
  return read.word(c, 'reverse') === 'check' ? always(to, from) : closable(to, from, forward);
}

function shutoffWays(c: Component): EdgeSpec[] {
  const both: readonly (readonly [string, string])[] = [
    ['A', 'B'],
    ['B', 'A'],
  ];
  if (read.has(c, 'closed')) return both.map(([a, b]) => ({ ...never(a, b, `${c.id} is closed`), shut: true }));
  if (read.has(c, 'open') && read.has(c, 'locked')) return both.map(([a, b]) => always(a, b));
  return both.map(([a, b]) => ({ ...closable(a, b, `${c.id} may be closed by hand`), byHand: true }));
}

function directionalWays(c: Component): EdgeSpec[] {
  const joined = new Map<string, Position[]>();
  for (const position of positionsOf(c)) {
    for (const { from, to } of pathsIn(c, position)) {
      for (const key of [`${from}>${to}`, `${to}>${from}`]) joined.set(key, [...(joined.get(key) ?? []), position]);
    }
  }
  return [...joined].map(([key, positions]) => {
    const [from = '', to = ''] = key.split('>');
    const at = positions.map((p) => positionWords(c, p)).join(' or ');
    return { from, to, class: 'closable', words: `${c.id} joins ${from} to ${to} only in position ${at}`, positions };
  });
}

function throttleWays(c: Component): EdgeSpec[] {
  const shuts = read.has(c, 'coil') || (read.si(c, 'opening') ?? 1) <= 0;
  const way = (from: string, to: string): EdgeSpec => (shuts ? closable(from, to, `${c.id} may be commanded shut`) : always(from, to));
  const back = read.word(c, 'reverse') === 'check' ? always('out', 'in') : way('out', 'in');
  return [way('in', 'out'), back, closable('in', 'T', `${c.id} regulates the way to T`)];
}

function filterWays(c: Component): EdgeSpec[] {
  const bypass = c.properties.find((p) => p.name === 'bypass')?.value;
  const blocked = bypass?.type === 'bypass' && bypass.crack === undefined;
  const words = `${c.id} has no bypass and may clog`;
  return [blocked ? closable('in', 'out', words) : always('in', 'out'), closable('out', 'in', `${c.id} may clog`)];
}

const none = (): EdgeSpec[] => [];

export const EDGES: Readonly<Record<KindName, (component: Component) => readonly EdgeSpec[]>> = {
  fluid: none,
  reservoir: none,
  drive: none,
  pump: none,
  // The way over a pressure valve is not a way for other valves: guards are looked at by name (guards.ts).
  relief: none,
  unloading: none,
  sequence: (c) => {
    const shut = `${c.id} opens at its setting only`;
    return [
      closable('P', 'A', shut),
      ...(read.word(c, 'reverse') === 'check' ? [always('A', 'P')] : [never('A', 'P', `${c.id} has no reverse path`)]),
    ];
  },
  counterbalance: holdingWays,
  reducing: (c) => {
    const shut = `${c.id} closes at its setting`;
    return [
      closable('P', 'A', shut),
      ...(read.word(c, 'reverse') === 'check' ? [always('A', 'P')] : [never('A', 'P', `${c.id} has no reverse path`)]),
    ];
  },
  check: checkWays,
  pilotcheck: holdingWays,
  burst: (c) => [closable('V', 'C', `${c.id} may have shut`), closable('C', 'V', `${c.id} may have shut`)],
  shuttle: (c) => [
    always('A', 'C'),
    always('B', 'C'),
    closable('C', 'A', `${c.id} joins C with the higher side only`),
    closable('C', 'B', `${c.id} joins C with the higher side only`),
  ],
  directional: directionalWays,
  deceleration: (c) => [
    closable('in', 'out', `${c.id} is closed by its cam`),
    reverseCheck(c, 'in', 'out', `${c.id} is closed by its cam`),
  ],
  throttle: throttleWays,
  divider: (c) => ['A', 'B'].flatMap((port) => [closable('P', port, `${c.id} may stand`), closable(port, 'P', `${c.id} may stand`)]),
  shutoff: shutoffWays,
  coupling: (c) => [closable('A', 'B', `${c.id} may be parted`), closable('B', 'A', `${c.id} may be parted`)],
  cylinder: none,
  motor: none,
  rotary: none,
  brake: none,
  accumulator: none,
  intensifier: (c) => [closable('P', 'A', `${c.id} may stand`)],
  filter: filterWays,
  cooler: () => [always('in', 'out'), always('out', 'in')],
  heater: none,
  switch: none,
  sensor: none,
  gauge: none,
};
