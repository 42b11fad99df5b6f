/** Flow divider. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const divider: Kind = {
  name: 'divider',
  noun: 'flow divider',
  about: '',
  ports: [
    { name: 'P', role: 'working', required: true, about: '' },
    { name: 'A', role: 'working', required: true, about: '' },
    { name: 'B', role: 'working', required: true, about: '' },
  ],
  chain: { how: 'none' },
  properties: [
    { name: 'gear', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'gear', about: '' },
    { name: 'spool', shape: { form: 'flag' }, required: false, group: 'form', default: '—', example: 'spool', about: '' },
    { name: 'combines', shape: { form: 'flag' }, required: false, default: 'divides only', example: 'combines', about: '' },
    { name: 'share', shape: { form: 'ratio' }, required: false, default: '1:1', example: 'share 1:1', about: '' },
    { name: 'error', shape: { form: 'quantity', dimensions: ['ratio'] }, required: false, default: '3 %', example: 'error 2 %', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 40 L/min at 8 bar', about: '' },
    ...hardware,
  ],
  groups: [{ name: 'form', need: 'exactly one', of: ['gear', 'spool'] }],
};
