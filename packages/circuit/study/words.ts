/** Figures in words, in the units the circuit is shown in. */
import { format, formatAgainst, type Dimension, type FormatOptions } from '@oilway/quantity';
import type { Circuit } from '../model/circuit.ts';

export function options(circuit: Circuit, position = false): FormatOptions {
  return position ? { display: circuit.display, units: circuit.units, position: true } : { display: circuit.display, units: circuit.units };
}
/** `183 bar`. */
export function say(circuit: Circuit, si: number, dimension: Dimension): string {
  return format(si, dimension, options(circuit));
}
/** `265 mm`: a place on a stroke. */
export function sayPlace(circuit: Circuit, si: number, rotating: boolean): string {
  return rotating ? format(si, 'angle', options(circuit)) : format(si, 'length', options(circuit, true));
}
/** Value and bound with as many digits as tell them apart. */
export function sayAgainst(
  circuit: Circuit,
  si: number,
  bound: number,
  dimension: Dimension,
): { readonly value: string; readonly bound: string } {
  return formatAgainst(si, bound, dimension, options(circuit));
}
/** `SOL1`, `SOL1 and SOL2`, `SOL1, SOL2 and SOL3`. */
export function list(names: readonly string[], joint = 'and'): string {
  if (names.length <= 1) return names[0] ?? '';
  return `${names.slice(0, -1).join(', ')} ${joint} ${names.at(-1)}`;
}
