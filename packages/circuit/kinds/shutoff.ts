/** Shut-off valve. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { addLeak, passesOf, SEAT_LEAK } from './passing.ts';
import { has } from './read.ts';
import { hardware } from './common.ts';

export const shutoff: Kind = {
  name: 'shutoff',
  noun: 'shut-off valve',
  about: 'Shut-off valve, worked by hand: open or closed as declared in every state.',
  ports: [
    { name: 'A', role: 'any', required: true, about: 'One side.' },
    { name: 'B', role: 'any', required: true, about: 'Other side.' },
  ],
  chain: { how: 'through', from: 'A', to: 'B' },
  properties: [
    { name: 'open', shape: { form: 'flag' }, required: false, group: 'position', default: '—', example: 'open', about: 'Stands open.' },
    {
      name: 'closed',
      shape: { form: 'flag' },
      required: false,
      group: 'position',
      default: '—',
      example: 'closed',
      about: 'Stands closed.',
    },
    { name: 'locked', shape: { form: 'flag' }, required: false, default: '—', example: 'locked', about: 'Secured in its position.' },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 100 L/min at 1 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [{ name: 'position', need: 'exactly one', of: ['open', 'closed'] }],
  /** As declared in every state; the contrary only where a rule asks for it. */
  assemble(component, into) {
    const declared = has(component, 'closed') ? 0 : 1;
    const open = into.parameter(component, 'open', declared);
    into.onSetting((setting, put) => put(open, setting.contrary?.includes(component.id) === true ? 1 - declared : declared));
    const a = { node: into.nodeOrBlind(component, 'A'), port: 'A' };
    const b = { node: into.nodeOrBlind(component, 'B'), port: 'B' };
    const element = into.add(
      component,
      { type: 'path', a: a.node, b: b.node, k: pathK(passesOf(component, into)), opening: open },
      ['A', 'B'],
      'A to B',
    );
    if (declared === 0) addLeak(component, into, a, b, SEAT_LEAK);
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
  },
};
