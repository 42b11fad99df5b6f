/** Inputs of a working with where each comes from: a property of the text, a default, the solution. */
import type { Dimension } from '@oilway/quantity';
import type { Component } from '../../model/circuit.ts';
import { property, si } from '../read.ts';
import type { Point, Working } from '../study.ts';

export type Input = Working['inputs'][number];

/** A property as written; `otherwise` with its ground where it is not. */
export function given(
  of: Component,
  name: string,
  symbol: string,
  dimension: Dimension,
  otherwise?: { readonly value: number; readonly words: string },
): Input | undefined {
  const written = property(of, name);
  const value = si(of, name);
  if (value !== undefined && written) return { symbol, value, dimension, source: `${of.id} ${name}`, origin: written.origin };
  return otherwise ? { symbol, value: otherwise.value, dimension, source: `default: ${otherwise.words}` } : undefined;
}
/** Flow and drop of `passes`. */
export function passes(of: Component, flow: number, drop: number): readonly Input[] {
  const written = property(of, 'passes');
  const origin = written ? { origin: written.origin } : {};
  return [
    { symbol: 'q N', value: flow, dimension: 'flow', source: `${of.id} passes`, ...origin },
    { symbol: 'dp N', value: drop, dimension: 'pressure', source: `${of.id} passes`, ...origin },
  ];
}
export function solved(symbol: string, value: number, dimension: Dimension): Input {
  return { symbol, value, dimension, source: 'solved' };
}
export function derived(symbol: string, value: number, dimension: Dimension, source: string): Input {
  return { symbol, value, dimension, source };
}

/** Two figures are one within 2 %; a working that does not reproduce its figure is not shown. */
export function agrees(figure: number, worked: number, scale = 0): boolean {
  return Math.abs(figure - worked) <= 0.02 * Math.max(Math.abs(figure), Math.abs(worked), scale, 1e-12);
}

export interface Reader {
  /** Pressure at a component's port, Pa gauge, at its own height. */
  pressure(component: string, port: string): number | undefined;
  /** Flow into the component, m3/s. */
  flow(component: string, port: string): number | undefined;
  readonly point: Point;
}
