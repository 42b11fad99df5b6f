/** Unloading valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const unloading: Kind = {
  name: 'unloading',
  noun: 'unloading valve',
  about: '',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'T', role: 'return', required: true, about: '' },
    { name: 'X', role: 'pilot', required: true, about: '' },
    { name: 'Y', role: 'drain', required: false, about: '' },
  ],
  chain: { how: 'end', entry: 'P', exit: 'T' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 45 bar', about: '' },
    { name: 'closes', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '90 % of set', example: 'closes 38 bar', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 80 L/min at 3 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
