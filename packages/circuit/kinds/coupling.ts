/** Quick-action coupling. */
import type { Kind } from './kind.ts';
import { pathK } from '../assembly/laws.ts';
import { passesOf } from './passing.ts';
import { hardware } from './common.ts';

export const coupling: Kind = {
  name: 'coupling',
  noun: 'quick-action coupling',
  about: 'Quick-action coupling: joined in service; parted only in faults.',
  ports: [
    { name: 'A', role: 'any', required: true, about: 'Machine side.' },
    { name: 'B', role: 'any', required: true, about: 'Other side.' },
  ],
  chain: { how: 'through', from: 'A', to: 'B' },
  properties: [
    {
      name: 'seals',
      shape: { form: 'word', words: ['one', 'both', 'none'] },
      required: true,
      default: '—',
      example: 'seals both',
      about: 'Which side closes when parted: one, both, none.',
    },
    {
      name: 'passes',
      shape: { form: 'flowAt' },
      required: false,
      default: 'no loss (said among assumptions)',
      example: 'passes 40 L/min at 3 bar',
      about: 'Flow at pressure drop of the open valve. Left out: no loss is counted, and the report says so.',
    },
    ...hardware,
  ],
  groups: [],
  /** Joined; parted only where a rule or fault asks for it. */
  assemble(component, into) {
    const open = into.parameter(component, 'open', 1);
    into.onSetting((setting, put) => put(open, setting.contrary?.includes(component.id) === true ? 0 : 1));
    const element = into.add(
      component,
      {
        type: 'path',
        a: into.nodeOrBlind(component, 'A'),
        b: into.nodeOrBlind(component, 'B'),
        k: pathK(passesOf(component, into)),
        opening: open,
      },
      ['A', 'B'],
      'A to B',
    );
    into.limitation({ component: component.id, words: `${component.id} passes`, targets: [{ element, size: 'k' }] });
  },
};
