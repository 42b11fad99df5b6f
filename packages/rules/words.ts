/** Figures and places as people read them, in the units of the circuit. */
import type { Circuit } from '@oilway/circuit';
import { type Dimension, format, formatAgainst } from '@oilway/quantity';

/** `183 bar`, `0.72 kN`: SI in, the circuit's units out. `unit`: of the one setting the value comes from. */
export function show(circuit: Circuit, si: number, dimension: Dimension, unit?: string): string {
  return plain(format(si, dimension, options(circuit, unit)));
}

/** `45 bar`, not `45.0 bar`: most figures in a message are settings as somebody wrote them. */
function plain(shown: string): string {
  return shown.replace(/(\.\d*?)0+(?= )/, '$1').replace(/\.(?= )/, '');
}

/** A value and its bound with enough digits to tell them apart. */
export function against(
  circuit: Circuit,
  si: number,
  bound: number,
  dimension: Dimension,
  unit?: string,
): { readonly value: string; readonly bound: string } {
  const shown = formatAgainst(si, bound, dimension, options(circuit, unit));
  return { value: plain(shown.value), bound: plain(shown.bound) };
}

function options(circuit: Circuit, unit: string | undefined) {
  return { display: circuit.display, units: circuit.units, ...(unit === undefined ? {} : { unit }) };
}

/** "P1", "P1 and P2", "P1, P2 and P3". */
export function list(items: readonly string[], word = 'and'): string {
  if (items.length < 2) return items[0] ?? '';
  return `${items.slice(0, -1).join(', ')} ${word} ${items[items.length - 1]}`;
}

/** Names in the order a person would list them: C2 before C10. */
export function byName(a: string, b: string): number {
  return a.localeCompare(b, 'en', { numeric: true });
}
