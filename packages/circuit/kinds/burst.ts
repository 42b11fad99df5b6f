/** Hose-burst valve. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { addLeak, passesOf, SEAT_LEAK } from './passing.ts';
import { si } from './read.ts';
import { hardware } from './common.ts';

export const burst: Kind = {
  name: 'burst',
  noun: 'hose-burst valve',
  about: 'Hose-burst valve: shuts from C to V when the flow exceeds its closing flow; free from V to C.',
  ports: [
    { name: 'V', role: 'working', required: true, about: 'Valve (hose) side.' },
    { name: 'C', role: 'holding', required: true, about: 'Cylinder side.' },
  ],
  chain: { how: 'none' },
  properties: [
    {
      name: 'closes',
      shape: { form: 'quantity', dimensions: ['flow'] },
      required: true,
      default: '—',
      example: 'closes 55 L/min',
      about: 'Flow from C to V at which it shuts; it stays shut until V reaches the pressure of C.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 2 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  /** A path until the flow from C to V has exceeded `closes`; then shut until V has the pressure of C. */
  assemble(component, into) {
    const closes = si(component, 'closes');
    if (closes === undefined) return into.cannot(component, `${component.id} has no \`closes\``);
    const v = into.nodeOrBlind(component, 'V');
    const c = into.nodeOrBlind(component, 'C');
    const open = into.parameter(component, 'open', 1);
    into.onSetting((setting, put) => put(open, setting.bits[component.id] === true ? 0 : 1));
    const element = into.add(
      component,
      { type: 'path', a: c, b: v, k: pathK(passesOf(component, into)), opening: open },
      ['C', 'V'],
      'C to V',
    );
    addLeak(component, into, { node: c, port: 'C' }, { node: v, port: 'V' }, SEAT_LEAK);
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
    into.memory({ component: component.id, kind: 'shut', element, c, v, closes });
  },
};
