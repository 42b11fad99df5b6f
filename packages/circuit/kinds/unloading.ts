/** Unloading valve. */
import type { Kind } from './kind.ts';
import { bandOf, pathK } from '../assembly/laws.ts';
import { toMPa } from '../assembly/units.ts';
import { addLeak, scaled, siOr } from './passing.ts';
import { flowAt, si } from './read.ts';
import { hardware } from './common.ts';

export const unloading: Kind = {
  name: 'unloading',
  noun: 'unloading valve',
  about: 'Unloading valve: leads the pump from P to T without pressure while the pilot at X is above its setting.',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: 'Pump outlet that is unloaded.' },
    { name: 'T', role: 'return', required: true, about: 'To the reservoir.' },
    { name: 'X', role: 'pilot', required: true, about: 'Pilot: pressure behind the check valve.' },
    { name: 'Y', role: 'drain', required: false, about: 'Drain of the pilot stage, led away separately.' },
  ],
  chain: { how: 'end', entry: 'P', exit: 'T' },
  properties: [
    {
      name: 'set',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: true,
      default: '—',
      example: 'set 45 bar',
      about: 'Pilot pressure at which it begins to open; fully open (lifted) 10 % above.',
    },
    {
      name: 'closes',
      shape: { form: 'quantity', dimensions: ['pressure'] },
      required: false,
      default: '90 % of set',
      defaultSource: 'common practice, from memory',
      example: 'closes 38 bar',
      about: 'Pilot pressure at which a lifted valve has closed again; below `set`.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: true,
      default: '—',
      example: 'passes 80 L/min at 3 bar',
      about: 'Flow at pressure drop, fully open.',
    },
    ...hardware,
  ],
  groups: [],
  /** Opening by the pilot above T (or Y): from `set` when not lifted, from `closes` when lifted; the two curves meet where the bit turns. */
  assemble(component, into) {
    const set = si(component, 'set');
    const passes = flowAt(component, 'passes');
    if (set === undefined || passes === undefined)
      return into.cannot(component, `${component.id} has no \`${set === undefined ? 'set' : 'passes'}\``);
    const closes = siOr(component, into, 'closes', 0.9 * set, '90 % of set');
    if (closes >= set) return into.cannot(component, `${component.id} closes at or above its \`set\``);
    const p = into.nodeOrBlind(component, 'P');
    const t = into.nodeOrBlind(component, 'T');
    const x = into.nodeOrBlind(component, 'X');
    const drain = into.node(component, 'Y') ?? t;
    const parameter = into.parameter(component, 'set', toMPa(set));
    const bit = into.parameter(component, 'lifted', 0);
    into.onSetting((setting, put) => put(bit, setting.bits[component.id] === true ? 1 : 0));
    const element = into.add(
      component,
      {
        type: 'piloted',
        a: p,
        b: t,
        k: pathK(scaled(passes, into)),
        pilots: [
          { node: x, weight: 1 },
          { node: drain, weight: -1 },
        ],
        set: parameter,
        band: into.parameter(component, 'band', toMPa(bandOf(set))),
        bit,
        setWhenOn: into.parameter(component, 'closes', toMPa(closes)),
        oneWay: false,
      },
      ['P', 'T'],
      'P to T',
    );
    addLeak(component, into, { node: p, port: 'P' }, { node: t, port: 'T' }, 20);
    into.limitation({ component: component.id, words: `${component.id} set`, targets: [{ parameter }] });
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.opening({ component: component.id, element });
    into.memory({ component: component.id, kind: 'lifted', element, pilot: x, drain, set, band: bandOf(set), closes });
  },
};
