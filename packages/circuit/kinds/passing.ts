/** What `passes`, `crack`, `reverse check` and `leak` of any kind mean for its elements. */
import type { NodeIndex, Param } from '@oilway/engine';
import type { Assembly, FlowAt } from '../assembly/assembly.ts';
import { behindCrack, laminarG, NO_LOSS, pathK, REVERSE_CRACK } from '../assembly/laws.ts';
import { BAR, CM3_PER_MINUTE, toMPa } from '../assembly/units.ts';
import type { Component } from '../model/circuit.ts';
import { flowAt, si, word } from './read.ts';

/** The drop of a valve path at the oil's present temperature. */
export const scaled = (at: FlowAt, into: Assembly): FlowAt => ({ flow: at.flow, drop: at.drop * into.oil.pathDrop });

/** General `passes`; left out: no loss, said among the assumptions. */
export function passesOf(component: Component, into: Assembly): FlowAt {
  const declared = flowAt(component, 'passes');
  if (declared !== undefined) return scaled(declared, into);
  into.assume({
    component: component.id,
    property: 'passes',
    value: 'no loss',
    source: 'not counted',
    note: `no loss declared for ${component.id}`,
  });
  return NO_LOSS;
}

/** A one-way path with a cracking pressure. `passes` is the total drop, crack included. False: the crack is as high as the drop, an error of the file. */
export function addCheck(
  component: Component,
  into: Assembly,
  from: { readonly node: NodeIndex; readonly port: string },
  to: { readonly node: NodeIndex; readonly port: string },
  crack: number,
  words: string,
): boolean {
  const k = checkK(component, into, crack);
  if (k === undefined) return false;
  const element = into.add(component, { type: 'check', a: from.node, b: to.node, k, crack: toMPa(crack) }, [from.port, to.port], words);
  into.limitation({ component: component.id, words: `${component.id} passes ${words}`, targets: [{ element, size: 'k' }] });
  return true;
}

/** K of the check law for the component's `passes`; undefined when the crack leaves nothing of the declared drop. */
export function checkK(component: Component, into: Assembly, crack: number): number | undefined {
  const declared = flowAt(component, 'passes');
  if (declared === undefined) return pathK(NO_LOSS);
  const own = behindCrack(declared, crack);
  return own === undefined ? undefined : pathK(scaled(own, into));
}

/** `reverse check`: crack 0.5 bar and the valve's own `passes`. */
export function addReverse(
  component: Component,
  into: Assembly,
  from: { readonly node: NodeIndex; readonly port: string },
  to: { readonly node: NodeIndex; readonly port: string },
): boolean {
  if (word(component, 'reverse') !== 'check') return true;
  return addCheck(component, into, from, to, REVERSE_CRACK, `${from.port} to ${to.port}`);
}
/** True when `reverse check` (or the free direction) can be made of the declared `passes`. */
export function crackFits(component: Component, crack: number): boolean {
  const declared = flowAt(component, 'passes');
  return declared === undefined || declared.drop > crack;
}

/** Leakage across a blocked edge: declared, or the kind's figure in cm3/min at 100 bar; counted only while leakage is. */
export function addLeak(
  component: Component,
  into: Assembly,
  a: { readonly node: NodeIndex; readonly port: string | undefined },
  b: { readonly node: NodeIndex; readonly port: string | undefined },
  cm3PerMinute: number,
): void {
  const declared = flowAt(component, 'leak');
  const at = declared ?? { flow: cm3PerMinute * CM3_PER_MINUTE, drop: 100 * BAR };
  if (!(at.flow > 0) || !(at.drop > 0)) return;
  if (declared === undefined) {
    into.assume({
      component: component.id,
      property: 'leak',
      value: `${Number(cm3PerMinute.toPrecision(3))} cm3/min at 100 bar`,
      source: 'memory',
      note: 'leakage by kind: common practice, from memory; counted in drift only',
    });
  }
  if (!into.leakage) return;
  into.add(component, { type: 'laminar', a: a.node, b: b.node, g: laminarG(at) * into.oil.leakage }, [a.port, b.port], 'leakage');
}

/** Seats leak five drops a minute (0.25 cm3/min at 100 bar), in the drift study only. */
export const SEAT_LEAK = 0.25;

/** A parameter for a setting with an optional coil: value in SI, clamped to [lowest, set]; a dead coil gives the lowest. */
export function settingParameter(
  component: Component,
  into: Assembly,
  coil: string | undefined,
  name: string,
  range: { readonly lowest: number; readonly set: number },
  convert: (value: number) => number,
): Param {
  const parameter = into.parameter(component, name, convert(range.set));
  if (coil !== undefined) {
    into.onSetting((setting, set) => {
      const asked = setting.commands[coil] ?? setting.commands[component.id];
      const value = asked === undefined ? range.lowest : Math.min(Math.max(asked, range.lowest), range.set);
      set(parameter, convert(value));
    });
  }
  return parameter;
}

/** First coil of the component as it is named in the circuit. */
export const coilOf = (component: Component, into: Assembly): string | undefined =>
  into.circuit.coils.find((c) => c.component === component.id)?.id;

export const siOr = (
  component: Component,
  into: Assembly,
  name: string,
  otherwise: number,
  shown: string,
  source: 'default' | 'memory' = 'default',
): number => {
  const v = si(component, name);
  if (v !== undefined) return v;
  into.assume({ component: component.id, property: name, value: shown, source, note: 'common practice, no source' });
  return otherwise;
};
