/** Values for mends: round figures in the circuit's own units, and settings that fit what is there. */
import { type Circuit, read } from '@oilway/circuit';
import { type Dimension, displayUnit, fromSi, toSi } from '@oilway/quantity';
import type { Graph } from '../graph/graph.ts';
import { ratingOf } from '../graph/rating.ts';
import { type Passing, spreadable, waysFrom } from '../graph/reach.ts';

/** Steps to which written figures are rounded, by unit. */
const STEPS: Readonly<Record<string, number>> = { bar: 5, MPa: 0.5, kPa: 500, psi: 50, 'L/min': 5, gpm: 1, s: 1 };

/** A round figure as one writes it, with its SI value. */
export function round(
  circuit: Circuit,
  si: number,
  dimension: Dimension,
  way: 'up' | 'down',
): { readonly text: string; readonly si: number } {
  const unit = displayUnit(dimension, { display: circuit.display, units: circuit.units });
  const value = fromSi(si, unit);
  const usual = STEPS[unit.symbol] ?? 10 ** Math.floor(Math.log10(Math.max(Math.abs(value), 1e-9)) - 1);
  // A small figure is rounded finer than the usual step.
  const step = value < 2 * usual ? usual / 5 : usual;
  const count = way === 'up' ? Math.ceil(value / step - 1e-9) : Math.floor(value / step + 1e-9);
  const rounded = Math.max(count, 1) * step;
  const decimals = Math.max(0, Math.ceil(-Math.log10(step) - 1e-9));
  return { text: `${rounded.toFixed(decimals)} ${unit.symbol}`, si: toSi(rounded, unit) };
}

/** A fixed number of bar (or the like) in the circuit's pressure unit: 5 bar, 73 psi. */
export function drop(circuit: Circuit, bar: number): string {
  const unit = displayUnit('pressure', { display: circuit.display, units: circuit.units });
  const value = fromSi(bar * 1e5, unit);
  return `${Number(value.toPrecision(2))} ${unit.symbol}`;
}

/** Everything the oil of a net can stand against at full pressure: not behind a reducing valve, an intensifier or a divider. */
export const spreads: Passing = (edge) => (['reducing', 'intensifier', 'divider'].includes(edge.kind) ? undefined : spreadable(edge));

export interface Setting {
  /** As written: `160 bar` or a constant's name. */
  readonly text: string;
  readonly si: number;
  /** "below the rating of P1, 210 bar", "as RV2". */
  readonly reason: string;
}

/**
 * A relief setting that protects a net: not above the weakest part less 10 % for override, not below what switches, sequence and
 * unloading valves wait for. A constant of the text is taken where one fits. Undefined where nothing in the text tells.
 */
export function reliefSetting(graph: Graph, net: string): Setting | undefined {
  const { circuit } = graph;
  let highest = Infinity;
  let weakest = '';
  let needed = 0;
  for (const id of waysFrom(graph, net, spreads).keys()) {
    const rating = ratingOf(graph, id);
    if (rating !== undefined && rating.value / 1.1 < highest) {
      highest = rating.value / 1.1;
      weakest = rating.of;
    }
    for (const ref of graph.net(id)?.ports ?? []) {
      const component = graph.component(ref.component);
      if (component === undefined) continue;
      if (component.kind === 'switch') needed = Math.max(needed, read.si(component, 'rises') ?? read.si(component, 'falls') ?? 0);
      if (component.kind === 'sequence' && ref.port === 'P') needed = Math.max(needed, (read.si(component, 'set') ?? 0) * 1.1);
      if (component.kind === 'reducing' && ref.port === 'P') needed = Math.max(needed, (read.si(component, 'set') ?? 0) * 1.1);
      if (component.kind === 'unloading' && ref.port === 'X') needed = Math.max(needed, (read.si(component, 'set') ?? 0) * 1.3);
    }
  }
  const fitting = circuit.constants
    .flatMap((c) =>
      c.value?.dimension === 'pressure' && c.value.si <= highest && c.value.si >= needed * 1.05 ? [{ name: c.name, si: c.value.si }] : [],
    )
    .sort((a, b) => b.si - a.si)[0];
  if (fitting !== undefined) return { text: fitting.name, si: fitting.si, reason: `the constant ${fitting.name}` };
  if (Number.isFinite(highest)) {
    const set = round(circuit, highest, 'pressure', 'down');
    return { text: set.text, si: set.si, reason: `10 % below the rating of ${weakest}` };
  }
  if (needed > 0) {
    const set = round(circuit, needed * 1.15, 'pressure', 'up');
    return { text: set.text, si: set.si, reason: 'above what switches and valves wait for; no rating is declared' };
  }
  return undefined;
}
