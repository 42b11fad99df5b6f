/** Sequence valve. */
import type { Kind } from './kind.ts';
import { hardware } from './common.ts';

export const sequence: Kind = {
  name: 'sequence',
  noun: 'sequence valve',
  about: '',
  ports: [
    { name: 'P', role: 'pressure', required: true, about: '' },
    { name: 'A', role: 'working', required: true, about: '' },
    { name: 'X', role: 'pilot', required: false, about: '' },
    { name: 'Y', role: 'drain', required: true, about: '' },
  ],
  chain: { how: 'through', from: 'P', to: 'A' },
  properties: [
    { name: 'set', shape: { form: 'quantity', dimensions: ['pressure'] }, required: true, default: '—', example: 'set 90 bar', about: '' },
    { name: 'reverse', shape: { form: 'word', words: ['check'] }, required: false, default: 'no reverse path', example: 'reverse check', about: '' },
    { name: 'external', shape: { form: 'word', words: ['pilot'] }, required: false, default: 'internal pilot', example: 'external pilot', about: '' },
    { name: 'internal', shape: { form: 'word', words: ['drain'] }, required: false, default: 'external drain', example: 'internal drain', about: '' },
    { name: 'passes', shape: { form: 'flowAt' }, required: false, default: 'no loss (said among assumptions)', example: 'passes 40 L/min at 4 bar', about: '' },
    ...hardware,
  ],
  groups: [],
};
