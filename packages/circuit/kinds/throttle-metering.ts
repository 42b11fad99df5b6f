/** The metering edge of a throttle: which law its declared figures mean. */
import type { NodeIndex } from '@oilway/engine';
import type { Assembly, Limitation } from '../assembly/assembly.ts';
import { orificeAt, pathK } from '../assembly/laws.ts';
import { BAR, toLitresPerSecond, toMPa } from '../assembly/units.ts';
import type { Component } from '../model/circuit.ts';
import { coilOf, passesOf, scaled, settingParameter } from './passing.ts';
import { flowAt, has, si } from './read.ts';

interface End {
  readonly node: NodeIndex;
  readonly port: string;
}
/** Least drop of a compensated valve, and drop at which a plain setting holds, where nothing is said (common practice, no source). */
const DEFAULT_NEEDS = 6 * BAR;
/** A coil that closes leaves this much, L/s, so that the law stays defined: a thousandth of a drop a minute. */
const SHUT = 1e-9;

/** Adds the edge and says what may limit by it; a string says why it cannot be computed. */
export function addMetering(component: Component, into: Assembly, a: End, b: End): Limitation | string {
  const id = component.id;
  const coil = coilOf(component, into);
  const orifice = si(component, 'orifice');
  if (orifice !== undefined) {
    const element = into.add(
      component,
      {
        type: 'path',
        a: a.node,
        b: b.node,
        k: pathK(orificeAt(orifice, into.oil.density)),
      },
      [a.port, b.port],
      'in to out',
    );
    return { component: id, words: `${id} orifice`, targets: [{ element, size: 'k' }] };
  }
  const passes = flowAt(component, 'passes');
  if (passes !== undefined) {
    const declared = si(component, 'opening') ?? 1;
    // A coil commands a share of the full opening.
    const opening = into.parameter(component, 'opening', declared);
    if (coil !== undefined) {
      into.onSetting((setting, put) => {
        const asked = setting.commands[coil] ?? setting.commands[id];
        put(opening, asked === undefined ? 0 : Math.min(1, Math.max(0, asked)));
      });
    }
    into.add(component, { type: 'path', a: a.node, b: b.node, k: pathK(scaled(passes, into)), opening }, [a.port, b.port], 'in to out');
    return { component: id, words: `${id} opening`, targets: [{ parameter: opening }] };
  }
  const set = si(component, 'set');
  if (set === undefined) return `${id} has none of \`set\`, \`orifice\`, \`passes\``;
  const needs = si(component, 'needs') ?? DEFAULT_NEEDS;
  if (si(component, 'needs') === undefined) {
    into.assume({
      component: id,
      property: 'needs',
      value: '6 bar',
      source: 'default',
      note: 'drop at which the setting holds: common practice, no source',
    });
  }
  if (!(needs > 0)) return `${id} \`needs\` a drop of more than zero`;
  const t = into.node(component, 'T');
  if (!has(component, 'compensated') && t === undefined) {
    const at = scaled({ flow: set, drop: needs }, into);
    const opening = into.parameter(component, 'set', 1);
    if (coil !== undefined) {
      into.onSetting((setting, put) => {
        const asked = setting.commands[coil] ?? setting.commands[id];
        put(opening, asked === undefined ? 0 : Math.min(1, Math.max(0, asked / set)));
      });
    }
    into.add(component, { type: 'path', a: a.node, b: b.node, k: pathK(at), opening }, [a.port, b.port], 'in to out');
    return { component: id, words: `${id} set`, targets: [{ parameter: opening }] };
  }
  const dense = 1 / Math.sqrt(into.oil.densityRatio);
  const parameter = settingParameter(component, into, coil, 'set', { lowest: 0, set }, (v) => Math.max(toLitresPerSecond(v) * dense, SHUT));
  if (t !== undefined) {
    into.add(
      component,
      { type: 'bypassRegulator', a: a.node, b: b.node, t, set: parameter, needs: toMPa(needs) },
      [a.port, b.port, 'T'],
      'in to out',
    );
  } else {
    into.add(component, { type: 'regulator', a: a.node, b: b.node, set: parameter, needs: toMPa(needs) }, [a.port, b.port], 'in to out');
  }
  return { component: id, words: `${id} set`, targets: [{ parameter }] };
}

/** Says among the assumptions that the reverse path has no declared loss. */
export function passesForReverse(component: Component, into: Assembly): void {
  if (flowAt(component, 'passes') === undefined) passesOf(component, into);
}
