/** Variants of a machine state: detents x accumulators x drives x lifted bits x load cases x positions, cut to what can be studied. */
import type { Body, BodyLoad, Stand } from '../assembly/machine.ts';
import { isDetent, positionsOf } from './coils.ts';
import { type LoadCase, greatestHolding, loadCases, NO_LOAD } from './loads.ts';
import { product } from './lookup.ts';
import type { Plant } from './scene.ts';
import { list, sayPlace } from './words.ts';

/** Up to so many variants all are studied; above, one factor at a time, then pairs, at most `MOST`. */
const ALL = 64;
const MOST = 256;

export interface Choice {
  readonly detents: Readonly<Record<string, Stand['position']>>;
  readonly oil: Readonly<Record<string, number | 'empty'>>;
  readonly gasPressures?: Readonly<Record<string, number>>;
  readonly accumulators: 'charged' | 'empty' | 'none';
  /** Drives that stand. */
  readonly standing: readonly string[];
  /** Unloading valves taken as lifted, if that keeps itself. */
  readonly lifted: readonly string[];
  readonly loads: Readonly<Record<string, BodyLoad>>;
  readonly positions: Readonly<Record<string, number>>;
  /** Bodies whose stops do not hold. */
  readonly free: readonly string[];
  readonly label: string;
}

export interface Factors {
  readonly detents?: readonly Readonly<Record<string, Stand['position']>>[];
  readonly accumulators?: readonly {
    readonly oil: Readonly<Record<string, number | 'empty'>>;
    readonly gasPressures?: Readonly<Record<string, number>>;
    readonly as: Choice['accumulators'];
  }[];
  readonly standing?: readonly (readonly string[])[];
}

/** Every position of every detented valve. */
export function allDetents(plant: Plant): readonly Record<string, Stand['position']>[] {
  const valves = plant.at.ofKind('directional').filter(isDetent);
  return product(valves.map((valve) => positionsOf(valve).map((position) => [valve.id, position] as const))).map((row) =>
    Object.fromEntries(row),
  );
}

interface Stance {
  readonly loads: Readonly<Record<string, BodyLoad>>;
  readonly positions: Readonly<Record<string, number>>;
  readonly free: readonly string[];
  readonly label: string;
}

/** Load cases and positions: bodies varied one at a time, the others at `begins` with their greatest holding load. */
export function stances(plant: Plant, ends: Readonly<Record<string, readonly number[]>>): readonly Stance[] {
  const cases = new Map(plant.bodies.map((one) => [one.id, loadCases(plant.at, one)]));
  const baseLoads = Object.fromEntries(plant.bodies.map((one) => [one.id, greatestHolding(cases.get(one.id)!).load]));
  const basePositions = Object.fromEntries(plant.bodies.map((one) => [one.id, one.begins]));
  if (plant.bodies.length === 0) return [{ loads: {}, positions: {}, free: [], label: '' }];
  const found: Stance[] = [];
  const seen = new Set<string>();
  for (const body of plant.bodies) {
    for (const one of cases.get(body.id)!) {
      for (const x of positionsFor(body, cases.get(body.id)!, ends[body.id] ?? [])) {
        const positions = { ...basePositions, [body.id]: x };
        const loads = { ...baseLoads, [body.id]: one.load };
        // Equal settings are solved once: the load at this place decides, not the name of its case.
        const key = JSON.stringify([positions, plant.bodies.map((other) => near(loads[other.id] ?? NO_LOAD, positions[other.id] ?? 0))]);
        if (seen.has(key)) continue;
        seen.add(key);
        const free = x === body.begins ? [] : [body.id];
        found.push({
          loads,
          positions,
          free,
          label: `${body.actuators.join(' with ')} ${caseWords(one)} at ${placeWords(plant, body, x)}`,
        });
      }
    }
  }
  return found;
}

/** The load around a place: forces within 5 mm decide motion and relaxing. */
function near(load: BodyLoad, x: number): readonly unknown[] {
  return load.fixed
    .map((one) => {
      const inside = one.at.map((at, index) => [at, one.force[index]] as const).filter(([at]) => Math.abs(at - x) <= 6e-3);
      const at = (place: number) => {
        const right = one.at.findIndex((knot) => knot > place);
        if (right <= 0) return right === 0 ? one.force[0] : one.force.at(-1);
        const [x0, x1] = [one.at[right - 1]!, one.at[right]!];
        return one.force[right - 1]! + ((one.force[right]! - one.force[right - 1]!) * (place - x0)) / (x1 - x0);
      };
      const here = [at(x), at(x - 5e-3), at(x + 5e-3)];
      return here.every((force) => force === 0) && inside.every(([, force]) => force === 0) ? 0 : [here, inside];
    })
    .filter((one) => one !== 0);
}

function positionsFor(body: Body, cases: readonly LoadCase[], ends: readonly number[]): readonly number[] {
  if (!Number.isFinite(body.stroke)) return [body.begins];
  const all = [body.begins, body.stroke / 2, ...ends, ...cases.flatMap((one) => (one.at === undefined ? [] : [one.at]))];
  const sorted: number[] = [];
  for (const x of all) {
    const held = Math.min(body.stroke, Math.max(0, x));
    if (!sorted.some((one) => Math.abs(one - held) < 1e-4)) sorted.push(held);
  }
  return sorted;
}
function caseWords(one: LoadCase): string {
  return one.name === 'none' ? 'no load' : `greatest load ${one.name}`;
}
function placeWords(plant: Plant, body: Body, x: number): string {
  return sayPlace(plant.circuit, x, body.type === 'rotating');
}

export interface Selection {
  readonly chosen: readonly Choice[];
  /** Variants that there would be. */
  readonly all: number;
}

export function variantsOf(plant: Plant, factors: Factors, ends: Readonly<Record<string, readonly number[]>>): Selection {
  const detents = factors.detents ?? [{}];
  const accumulators = factors.accumulators ?? [{ oil: {}, as: 'none' as const }];
  const standing = factors.standing ?? [[]];
  const lifted = product(plant.at.ofKind('unloading').map((one) => [[], [one.id]])).map((row) => row.flat());
  const places = stances(plant, ends);
  const factorLists = [detents, accumulators, standing, lifted, places] as const;
  const all = factorLists.reduce((count, one) => count * one.length, 1);
  const make = (indices: readonly number[]): Choice => {
    const [d, a, s, l, p] = indices as [number, number, number, number, number];
    const [detent, accumulator, stand, lift, place] = [detents[d]!, accumulators[a]!, standing[s]!, lifted[l]!, places[p]!];
    const label = [
      Object.keys(detent).length > 0
        ? list(
            Object.entries(detent).map(([id, position]) => `${id} as ${position}`),
            'and',
          )
        : '',
      accumulator.as === 'none' ? '' : `accumulators ${accumulator.as}`,
      standing.length > 1 ? (stand.length > 0 ? `${stand.join(', ')} stopped` : 'drives turning') : '',
      lift.length > 0 ? `${lift.join(', ')} lifted` : '',
      place.label,
    ].filter((one) => one !== '');
    return {
      detents: detent,
      oil: accumulator.oil,
      ...(accumulator.gasPressures === undefined ? {} : { gasPressures: accumulator.gasPressures }),
      accumulators: accumulator.as,
      standing: stand,
      lifted: lift,
      loads: place.loads,
      positions: place.positions,
      free: place.free,
      label: label.join(', '),
    };
  };
  const indices =
    all <= ALL ? product(factorLists.map((one) => one.map((_, index) => index))) : pairs(factorLists.map((one) => one.length));
  return { chosen: indices.map(make), all };
}

/** The base, every factor alone from the base, then all pairs, at most `MOST`. */
export function pairs(sizes: readonly number[]): readonly (readonly number[])[] {
  const base = sizes.map(() => 0);
  const found: number[][] = [base];
  const with_ = (changes: readonly (readonly [number, number])[]) => {
    const row = [...base];
    for (const [factor, value] of changes) row[factor] = value;
    return row;
  };
  const choices = sizes.flatMap((size, factor) =>
    Array.from({ length: Math.max(0, size - 1) }, (_, value) => [factor, value + 1] as const),
  );
  for (const one of choices) if (found.length < MOST) found.push(with_([one]));
  for (const [index, one] of choices.entries()) {
    for (const other of choices.slice(index + 1)) {
      if (one[0] === other[0]) continue;
      if (found.length >= MOST) return found;
      found.push(with_([one, other]));
    }
  }
  return found;
}
