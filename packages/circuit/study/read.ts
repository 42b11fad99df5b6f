/** Reading properties in the short forms the study needs; see kinds/read.ts for the readers themselves. */
import { range as rangeOf } from '../kinds/read.ts';
import type { Property, PropertyValue } from '../model/value.ts';

export { flowAt, has as flag, reference, si } from '../kinds/read.ts';

interface Bearer {
  readonly properties: readonly Property[];
}

/** The first property of that name (own ones stand before those of the part). */
export function property(of: Bearer, name: string): Property | undefined {
  return of.properties.find((one) => one.name === name);
}
export function valueNamed(of: Bearer, name: string): PropertyValue | undefined {
  return property(of, name)?.value;
}
/** A range in SI with its dimension. */
export function range(of: Bearer, name: string): { readonly from: number; readonly to: number; readonly dimension: string } | undefined {
  const value = rangeOf(of, name);
  return value === undefined ? undefined : { from: value.from.si, to: value.to.si, dimension: value.from.dimension };
}
