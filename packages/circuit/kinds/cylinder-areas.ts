/** Areas, stages and ends of a cylinder, from its diameters. SI. */
import type { Component } from '../model/circuit.ts';
import { has, si, valuesOf, word } from './read.ts';

export interface CylinderAreas {
  /** Area pressed by oil in the cap port, m2; absent where there is no such port. The largest stage of a telescopic one. */
  readonly cap?: number;
  /** Area pressed by oil in the rod port, m2. */
  readonly rod?: number;
  /** Area of the bore (of the plunger), m2: what `seal` is a pressure on. */
  readonly bore: number;
  /** Telescopic: areas in the order of extension, and the positions at which they begin. */
  readonly stages?: { readonly at: readonly number[]; readonly area: readonly number[] };
}

/** The only port of a single-acting cylinder or plunger; undefined for a double-acting one. */
export function portOfSingle(component: Component): 'cap' | 'rod' | undefined {
  const single = word(component, 'single');
  if (single === 'cap' || single === 'rod') return single;
  return has(component, 'rod') ? undefined : 'cap';
}

const disc = (d: number): number => (Math.PI * d * d) / 4;

/** Undefined where bore or stroke is missing, or the rod is as thick as the bore. */
export function areasOf(component: Component): CylinderAreas | undefined {
  const bore = si(component, 'bore');
  const stroke = si(component, 'stroke');
  if (bore === undefined || stroke === undefined || !(bore > 0) || !(stroke > 0)) return undefined;
  const rod = si(component, 'rod');
  if (rod !== undefined && rod >= bore) return undefined;
  const full = disc(bore);
  const annulus = full - (rod === undefined ? 0 : disc(rod));
  const capSide = has(component, 'through') ? annulus : full;
  const only = portOfSingle(component);
  const further = valuesOf(component, 'telescopic').flatMap((v) => (v.type === 'list' ? v.items.map((q) => q.si) : []));
  const stages =
    further.length === 0
      ? undefined
      : {
          at: [bore, ...further].map((_, i) => (i * stroke) / (further.length + 1)),
          area: [bore, ...further].map(disc),
        };
  return {
    ...(only === 'rod' ? {} : { cap: capSide }),
    ...(only === 'cap' ? {} : { rod: annulus }),
    bore: full,
    ...(stages === undefined ? {} : { stages }),
  };
}

/** Where it begins, m from retracted. */
export function beginsAt(component: Component): number {
  const stroke = si(component, 'stroke') ?? 0;
  for (const v of valuesOf(component, 'begins')) {
    if (v.type === 'place' && v.q !== undefined) return Math.min(Math.max(v.q.si, 0), stroke);
    if (v.type === 'quantity') return Math.min(Math.max(v.q.si, 0), stroke);
    if ((v.type === 'place' || v.type === 'word') && v.word === 'extended') return stroke;
  }
  return 0;
}

/** Default seal friction as a pressure on the bore area, Pa (common practice, no source). */
export const DEFAULT_SEAL = 3e5;
