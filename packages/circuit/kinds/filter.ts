/** Filter. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const filter: Kind = {
  name: 'filter',
  noun: 'filter',
  about: '',
  ports: [
    { name: 'in', role: 'any', required: true, about: '' },
    { name: 'out', role: 'any', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'in', to: 'out' },
  properties: [
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 120 L/min at 0.4 bar', about: '' },
    { name: 'bypass', shape: { form: 'bypass' }, required: true, default: '—', example: 'bypass 1.7 bar | bypass none', about: '' },
    { name: 'fineness', shape: { form: 'quantity', dimensions: ['length'] }, required: false, default: '—', example: 'fineness 10 um', about: '' },
    { name: 'collapse', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '10 bar', example: 'collapse 210 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
