/** Pressure-reducing valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const reducing: Kind = {
  name: 'reducing',
  noun: 'pressure-reducing valve',
  about: '',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'A', role: 'working', required: true, about: '' },
    { name: 'Y', role: 'drain', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 70 bar', about: '' },
    { name: 'relieving', shape: { form: 'word', words: ['yes', 'no'] }, required: true, default: '—', example: 'relieving yes', about: '' },
    { name: 'reverse', shape: { form: 'word', words: ['check'] }, required: false, default: 'no reverse path', example: 'reverse check', about: '' },
    { name: 'coil', shape: { form: 'coil' }, required: false, many: true, default: '—', example: 'coil a SOL1, coil b SOL2 24 V', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 40 L/min at 5 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
