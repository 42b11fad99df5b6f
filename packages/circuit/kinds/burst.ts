/** Hose-burst valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const burst: Kind = {
  name: 'burst',
  noun: 'hose-burst valve',
  about: '',
  ports: [
    { name: 'V', role: 'working', required: true, about: '' },
    { name: 'C', role: 'holding', required: true, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'closes', shape: { form: 'quantity', dimensions: ['flow'] }, required: true, default: '—', example: 'closes 55 L/min', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 40 L/min at 2 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
