/** Pilot-operated check valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const pilotcheck: Kind = {
  name: 'pilotcheck',
  noun: 'pilot-operated check valve',
  about: '',
  ports: [
    { name: 'V', role: 'working', required: true, about: '' },
    { name: 'C', role: 'holding', required: true, about: '' },
    { name: 'X', role: 'pilot', required: true, about: '' },
    { name: 'Y', role: 'drain', required: false, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'ratio', shape: { form: 'ratio' }, required: true, default: '—', example: 'ratio 3:1', about: '' },
    { name: 'crack', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '1 bar', example: 'crack 1 bar', about: '' },
    { name: 'decompressing', shape: { form: 'flag' }, required: false, default: 'none', example: 'decompressing', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 60 L/min at 4 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
