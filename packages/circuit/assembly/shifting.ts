/** How the position parameters of a directional valve change while it shifts. Times in s. */
import type { ValveOf } from './assembly.ts';
import type { Stand } from './machine.ts';

/** A straight ramp of one parameter; end = start is a jump. */
export interface Move {
  readonly parameter: number;
  readonly from: number;
  readonly to: number;
  readonly start: number;
  readonly end: number;
}

/** Closed crossover: what is open closes in the first half, what shall be open opens in the second. */
export function crossover(
  parameters: readonly number[],
  now: Float64Array,
  target: Float64Array,
  start: number,
  end: number,
): readonly Move[] {
  const middle = (start + end) / 2;
  const moves: Move[] = [];
  for (const parameter of parameters) {
    const from = now[parameter] ?? 0;
    const to = target[parameter] ?? 0;
    if (from !== 0) moves.push({ parameter, from, to: 0, start, end: middle });
    if (to !== 0) moves.push({ parameter, from: 0, to, start: middle, end });
  }
  return moves;
}

/** Command (share) below which the paths of the rest position fade; breakpoints of the openings over the command. */
const BREAKS = [-0.1, 0, 0.1];

/** A signed command going straight from one value to another: each opening is straight between the breakpoints. */
export function proportionalMoves(
  valve: ValveOf,
  from: number,
  to: number,
  start: number,
  end: number,
  at: (stand: Stand) => Float64Array,
): readonly Move[] {
  const other: Stand['position'] = valve.rest === 'a' ? 'b' : 'a';
  const standAt = (c: number): Stand => (c === 0 ? { position: valve.rest } : { position: c > 0 ? other : 'b', opening: Math.abs(c) });
  const stops = [from, ...BREAKS.filter((b) => (b - from) * (b - to) < 0).sort((x, y) => (to > from ? x - y : y - x)), to];
  const moves: Move[] = [];
  for (let i = 1; i < stops.length; i++) {
    const [c0, c1] = [stops[i - 1] ?? from, stops[i] ?? to];
    const share = (c: number): number => (to === from ? 1 : (c - from) / (to - from));
    const [v0, v1] = [at(standAt(c0)), at(standAt(c1))];
    for (const parameter of valve.parameters) {
      const a = v0[parameter] ?? 0;
      const b = v1[parameter] ?? 0;
      moves.push({
        parameter,
        from: a,
        to: b,
        start: start + (end - start) * (i === 1 ? 0 : share(c0)),
        end: start + (end - start) * share(c1),
      });
    }
  }
  return moves;
}
