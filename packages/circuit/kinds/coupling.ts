/** Quick-action coupling. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const coupling: Kind = {
  name: 'coupling',
  noun: 'quick-action coupling',
  about: '',
  ports: [
    { name: 'A', role: 'any', required: true, about: '' },
    { name: 'B', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'A', to: 'B' },
  properties: [
    { name: 'seals', shape: { form: 'word', words: ['one', 'both', 'none'] }, required: true, default: '—', example: 'seals both', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 40 L/min at 3 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
