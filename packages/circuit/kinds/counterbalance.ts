/** Counterbalance valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const counterbalance: Kind = {
  name: 'counterbalance',
  noun: 'counterbalance valve',
  about: '',
  ports: [
    { name: 'V', role: 'working', required: true, about: '' },
    { name: 'C', role: 'holding', required: true, about: '' },
    { name: 'X', role: 'pilot', required: false, about: '' },
    { name: 'Y', role: 'drain', required: false, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 210 bar', about: '' },
    { name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 3:1', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 60 L/min at 6 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
