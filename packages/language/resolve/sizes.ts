/** Sizes no circuit can have: below zero, zero where something is divided by it, and beyond anything that is built. */
import type { Property } from '@oilway/circuit';
import { type Dimension, format, type Quantity } from '@oilway/quantity';

/** Zero means there is no such thing. */
const ABOVE_ZERO: ReadonlySet<string> = new Set([
  'angle',
  'bore',
  'bulk',
  'closes',
  'compensator',
  'density',
  'displacement',
  'grade',
  'mechanical',
  'opens',
  'orifice',
  'power',
  'ratio',
  'rod',
  'set',
  'speed',
  'stroke',
  'torque',
  'volume',
  'volumetric',
]);

/** An efficiency above one would make energy; of a whole there is no more than all. */
const AT_MOST_ONE: ReadonlyMap<string, string> = new Map([
  ['mechanical', 'an efficiency'],
  ['volumetric', 'an efficiency'],
  ['air', 'a share of the volume'],
  ['opening', 'a share of what it passes when open'],
]);

/** May have a sign: a suction below the atmosphere, a height below oil level. Temperatures have bounds of their own. */
const SIGNED: ReadonlySet<string> = new Set(['inlet', 'elevation']);

/** SI; one order of magnitude beyond the largest that is built (from memory, no source): a slip of the keyboard, not a design. */
const LARGEST: Readonly<Partial<Record<Dimension, number>>> = {
  pressure: 1e9,
  length: 1e4,
  flow: 100,
  volume: 1e5,
  displacement: 1,
  force: 1e10,
  torque: 1e10,
  mass: 1e9,
  inertia: 1e12,
  power: 1e9,
  rotation: 1e5,
  velocity: 1e3,
  time: 1e8,
};
/** Stiffness of an oil and of nothing else, Pa. */
const LARGEST_BULK = 1e11;
/** Beyond these no oil flows, or none is left, K (from memory, no source). */
const COLDEST = 193.15;
const HOTTEST = 673.15;

function wrongQuantity(name: string, q: Quantity): string | undefined {
  if (q.dimension === 'temperature') {
    if (q.si >= COLDEST && q.si <= HOTTEST) return undefined;
    return `\`${name}\` of ${format(q.si, 'temperature')} is no temperature of a fluid in a circuit: it lies between ${format(COLDEST, 'temperature')} and ${format(HOTTEST, 'temperature')}`;
  }
  if (ABOVE_ZERO.has(name) && !(q.si > 0)) return `\`${name}\` must be above zero`;
  if (q.si < 0 && !SIGNED.has(name)) return `\`${name}\` cannot be negative`;
  const share = AT_MOST_ONE.get(name);
  if (share !== undefined && q.dimension === 'ratio' && q.si > 1) return `\`${name}\` is ${share}: at most 100 %`;
  return tooLarge(name, q);
}

function tooLarge(name: string, q: Quantity): string | undefined {
  const largest = name === 'bulk' ? LARGEST_BULK : LARGEST[q.dimension];
  if (largest === undefined || Math.abs(q.si) <= largest) return undefined;
  return `\`${name}\` of ${format(q.si, q.dimension)} is beyond anything that is built (${format(largest, q.dimension)} at most)`;
}

/** What is wrong with the size of a property, in words; nothing where it can be. Ranges and shapes are checked where they are read. */
export function wrongSize({ name, value }: Pick<Property, 'name' | 'value'>): string | undefined {
  switch (value.type) {
    case 'quantity':
      return wrongQuantity(name, value.q);
    case 'number':
      if (ABOVE_ZERO.has(name) && !(value.value > 0)) return `\`${name}\` must be above zero`;
      return value.value < 0 && name !== 'index' ? `\`${name}\` cannot be negative` : undefined;
    case 'flowAt':
    case 'pathPasses':
      return tooLarge('passes', value.flow) ?? tooLarge('passes', value.drop);
    case 'precharge':
      // Zero is gas at the pressure of the atmosphere: of little use, but it can be.
      return wrongQuantity(name, value.pressure) ?? wrongQuantity(name, value.temperature);
    case 'range':
      return value.from.dimension === 'temperature' ? (wrongQuantity(name, value.from) ?? wrongQuantity(name, value.to)) : undefined;
    case 'bypass':
      return value.crack === undefined ? undefined : wrongQuantity(name, value.crack);
    case 'load': {
      const sizes = [...(value.constant === undefined ? [] : [value.constant]), ...(value.table ?? []).map((row) => row.value)];
      return sizes.map((q) => tooLarge(name, q)).find((words) => words !== undefined);
    }
    default:
      return undefined;
  }
}
