/** Reading the properties of a component or load by name, in SI. */
import type { Component } from '../model/circuit.ts';
import type { CoilValue, Property, PropertyValue } from '../model/value.ts';

interface Bearer {
  readonly properties: readonly Property[];
}

/** The first property of that name (own ones stand before those of the part). */
export function property(of: Bearer, name: string): Property | undefined {
  return of.properties.find((one) => one.name === name);
}

export function valueOf(of: Bearer, name: string): PropertyValue | undefined {
  return property(of, name)?.value;
}

/** SI value of a quantity property; undefined where it is not written, is to be found or is wrong. */
export function si(of: Bearer, name: string): number | undefined {
  const value = valueOf(of, name);
  if (value?.type === 'quantity') return value.q.si;
  if (value?.type === 'number') return value.value;
  return undefined;
}

export function word(of: Bearer, name: string): string | undefined {
  const value = valueOf(of, name);
  return value?.type === 'word' ? value.word : undefined;
}

export function flag(of: Bearer, name: string): boolean {
  return valueOf(of, name)?.type === 'flag';
}

/** `passes 80 L/min at 3 bar`: m3/s and Pa. */
export function flowAt(of: Bearer, name: string): { readonly flow: number; readonly drop: number } | undefined {
  const value = valueOf(of, name);
  return value?.type === 'flowAt' ? { flow: value.flow.si, drop: value.drop.si } : undefined;
}

export function reference(of: Bearer, name: string): { readonly id: string; readonly port?: string } | undefined {
  const value = valueOf(of, name);
  if (value?.type !== 'reference') return undefined;
  return value.port === undefined ? { id: value.id } : { id: value.id, port: value.port };
}

export function range(of: Bearer, name: string): { readonly from: number; readonly to: number; readonly dimension: string } | undefined {
  const value = valueOf(of, name);
  return value?.type === 'range' ? { from: value.from.si, to: value.to.si, dimension: value.from.dimension } : undefined;
}

export function coilsOf(of: Component): readonly CoilValue[] {
  return of.properties.flatMap((one) => (one.value.type === 'coil' ? [one.value] : []));
}
