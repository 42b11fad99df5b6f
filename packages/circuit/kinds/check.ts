/** Check valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const check: Kind = {
  name: 'check',
  noun: 'check valve',
  about: '',
  ports: [
    { name: 'in', role: 'any', required: true, about: '' },
    { name: 'out', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    { name: 'crack', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '0.5 bar', example: 'crack 0.5 bar', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 80 L/min at 3 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
