/** Pressure-relief valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const relief: Kind = {
  name: 'relief',
  noun: 'pressure-relief valve',
  about: '',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'T', role: 'return', required: true, about: '' },
    { name: 'X', role: 'vent', required: false, about: '' },
    { name: 'Y', role: 'drain', required: false, about: '' },
  ],
  chain: { how: 'end', entry: 'P', exit: 'T' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 160 bar ± 3 bar', about: '' },
    { name: 'override', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '10 % at the flow it passes', example: 'override 8 %', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: true, default: '—', example: 'passes 100 L/min at 5 bar', about: '' },
    { name: 'piloted', shape: { form: 'flag' }, required: false, default: 'direct', example: 'piloted', about: '' },
    { name: 'vented', shape: { form: 'quantity', dimensions: ['pressure'] }, required: false, default: '3 bar', example: 'vented 4 bar', about: '' },
    { name: 'coil', shape: { form: 'coil' }, required: false, many: true, default: '—', example: 'coil a SOL1, coil b SOL2 24 V', about: '' },
    { name: 'certified', shape: { form: 'flag' }, required: false, default: '—', example: 'certified', about: '' },
    ...hardware,
  ],
  groups: [],
};
